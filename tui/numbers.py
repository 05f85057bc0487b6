"""Numbers as people read them: rounded so that what is shown never contradicts the verdict."""

from __future__ import annotations

import math


def ratio_text(ratio: float | None) -> str:
    """A ratio rounded up, with more digits near 1, so that it never reads as passing where it does not.

    >>> ratio_text(0.873), ratio_text(0.9951), ratio_text(1.0), ratio_text(1.004), ratio_text(None)
    ('0.88', '0.996', '1.00', '1.004', 'none')
    >>> ratio_text(1.0000001), ratio_text(0.9999999)
    ('1.001', '0.9999999')
    """
    if ratio is None:
        return "none"
    if ratio == 1.0:
        return "1.00"
    gap = abs(ratio - 1.0)
    if gap < 1e-9:
        return "just over 1" if ratio > 1.0 else "just under 1"
    digits = 2 if gap >= 0.01 else 3
    while True:
        text = f"{_ceil(ratio, digits):.{digits}f}"
        if float(text) != 1.0:
            return text
        digits += 1


def _ceil(value: float, digits: int) -> float:
    # The inner rounding keeps 0.88 from becoming 0.89 for the sake of the last binary digit.
    scale = 10.0**digits
    return math.ceil(round(value * scale, 4)) / scale


def load_text(psf: float | None) -> str:
    """A load the member can carry, rounded down to a whole psf.

    >>> load_text(54.99), load_text(None)
    ('54', 'not limited')
    """
    return "not limited" if psf is None else f"{math.floor(psf + 1e-9):d}"


def place_text(at_in: float | None) -> str:
    """A place along the member in feet and inches from the first support's design point.

    >>> place_text(80.0), place_text(-3.0), place_text(None)
    ('6 ft 8 in', '-3 in', 'no one place')
    """
    if at_in is None:
        return "no one place"
    sign, inches = ("-", -at_in) if at_in < 0 else ("", at_in)
    inches = round(inches * 4) / 4
    feet, rest = divmod(inches, 12.0)
    parts = ([f"{feet:.0f} ft"] if feet else []) + ([f"{rest:g} in"] if rest or not feet else [])
    return sign + " ".join(parts)
