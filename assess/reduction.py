"""Live-load reduction by the area a member supports (ASCE 7-16 4.7), with its limits."""

from __future__ import annotations

from math import sqrt

from assess.trace import formula

LEAST_AREA_FT2 = 400.0  # KLL AT below this is not reduced
LEAST_FACTOR = 0.5  # members that support one floor
HEAVY_PSF = 100.0  # loads above are not reduced
KLL = {"beam": 2.0}  # ASCE 7-16 Table 4.7-1, interior beams; 1 for every other kind here


@formula("L/Lo", "", "ASCE 7-16 4.7.2 (4.7-1)")
def reduced_fraction(K_LL: float, A_T: float) -> float:
    """Fraction of the live load that stays, before its lower limit.

    >>> round(float(reduced_fraction(2.0, 400.0)), 4)
    0.7803
    """
    return 0.25 + 15.0 / sqrt(K_LL * A_T)


def reduction(kind: str, live_psf: float, reducible: bool, area_ft2: float) -> tuple[float, str]:
    """Factor on the uniform live load, and why it is that.

    kind        kind of member
    live_psf    unreduced live load [psf]
    reducible   whether the use allows it (not assembly, garages, heavy loads)
    area_ft2    supported area AT [ft2]
    returns     (factor of 0.5 to 1 [-], words)
    source      ASCE 7-16 4.7.2 to 4.7.6

    >>> round(reduction("beam", 50.0, True, 400.0)[0], 4), reduction("joist", 50.0, True, 200.0)[0]
    (0.7803, 1.0)
    """
    if not reducible or live_psf > HEAVY_PSF:
        return 1.0, "no live-load reduction: the use allows none (ASCE 7-16 4.7.3 to 4.7.5)"
    influence = KLL.get(kind, 1.0) * area_ft2
    if influence < LEAST_AREA_FT2:
        return 1.0, f"no live-load reduction: KLL AT is {influence:.0f} ft2, under 400 (ASCE 7-16 4.7.2)"
    factor = max(float(reduced_fraction(KLL.get(kind, 1.0), area_ft2)), LEAST_FACTOR)
    return factor, f"live load reduced to {factor:.3f} of {live_psf:g} psf for {influence:.0f} ft2 (ASCE 7-16 4.7.2)"
