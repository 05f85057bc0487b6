"""Own weight of wood from its specific gravity and moisture."""

from __future__ import annotations

from assess.trace import Array, formula

DRY_PERCENT, WET_PERCENT = 19.0, 30.0  # taken for "dry" and "wet" without a reading


@formula("density", "lb/ft3", "NDS Supplement 3.1.3")
def density_pcf(G: Array, m: Array) -> Array:
    """Density of wood at moisture m percent, from its oven-dry specific gravity.

    >>> round(float(density_pcf(0.5, 19.0)), 2)
    34.2
    """
    return 62.4 * G / (1 + 0.009 * G * m) * (1 + m / 100)


@formula("own weight", "lb/in", "mechanics")
def own_weight_pli(density: Array, A: Array) -> Array:
    """Weight of the member for each inch of its length.

    >>> float(own_weight_pli(34.56, 13.875)) * 12
    3.33
    """
    return density * A / 1728
