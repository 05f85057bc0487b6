"""Load combinations of ASCE 7-16 2.4.1 (ASD), each with the duration factor of its shortest load."""

from __future__ import annotations

import functools
from dataclasses import dataclass

TYPES = ("dead", "live", "roof live", "snow", "construction", "wind")
CONCENTRATED = "concentrated"  # the use's concentrated load, standing in for the uniform live load

# NDS 2018 Table 2.3.2; construction and roof live share the seven-day factor.
DURATION_FACTOR = {
    "dead": 0.9,
    "live": 1.0,
    CONCENTRATED: 1.0,
    "snow": 1.15,
    "construction": 1.25,
    "roof live": 1.25,
    "wind": 1.6,
}


@dataclass(frozen=True)
class Combination:
    """A sum of load effects: name as printed, coefficient of each load type, duration factor CD."""

    name: str
    coefficients: tuple[tuple[str, float], ...]
    CD: float

    def of(self, load_type: str) -> float:
        """Coefficient of the load type, 0 where it takes no part."""
        for kind, factor in self.coefficients:
            if kind == load_type:
                return factor
        return 0.0


# Combination 6 of ASCE 7-16 2.4.1 carries 0.75(0.6W); the construction row is ASCE 37 practice, without L.
_ROWS: tuple[tuple[str, dict[str, float]], ...] = (
    ("D", {"dead": 1.0}),
    ("D+L", {"dead": 1.0, "live": 1.0}),
    ("D+Lr", {"dead": 1.0, "roof live": 1.0}),
    ("D+S", {"dead": 1.0, "snow": 1.0}),
    ("D+0.75L+0.75Lr", {"dead": 1.0, "live": 0.75, "roof live": 0.75}),
    ("D+0.75L+0.75S", {"dead": 1.0, "live": 0.75, "snow": 0.75}),
    ("D+0.6W", {"dead": 1.0, "wind": 0.6}),
    ("D+0.75L+0.75(0.6W)", {"dead": 1.0, "live": 0.75, "wind": 0.45}),
    ("D+0.75L+0.75(0.6W)+0.75Lr", {"dead": 1.0, "live": 0.75, "wind": 0.45, "roof live": 0.75}),
    ("D+0.75L+0.75(0.6W)+0.75S", {"dead": 1.0, "live": 0.75, "wind": 0.45, "snow": 0.75}),
    ("D+0.75(0.6W)+0.75Lr", {"dead": 1.0, "wind": 0.45, "roof live": 0.75}),
    ("D+0.75(0.6W)+0.75S", {"dead": 1.0, "wind": 0.45, "snow": 0.75}),
    ("0.6D+0.6W", {"dead": 0.6, "wind": 0.6}),
    ("D+C", {"dead": 1.0, "construction": 1.0}),
)


@functools.cache
def combinations(present: frozenset[str]) -> tuple[Combination, ...]:
    """Combinations of the load types that are present; dead alone is always one.

    present   load types that stand on the member, from TYPES and CONCENTRATED
    returns   combinations in the order of ASCE 7-16 2.4.1. CD is that of the shortest load in the
              combination (NDS 2.3.2.2), whatever its size. A combination stands only with all its loads
              present: without one of them it repeats, or is less than, a shorter row.

    >>> [(c.name, c.CD) for c in combinations(frozenset({"dead", "live"}))]
    [('D', 0.9), ('D+L', 1.0)]
    >>> [c.name for c in combinations(frozenset({"dead", "snow"}))]
    ['D', 'D+S']
    """
    found: list[Combination] = []
    for name, row in _ROWS:
        if not all(kind in present or kind == "dead" for kind in row):
            continue
        CD = max(DURATION_FACTOR[kind] for kind in row)
        found.append(Combination(name, tuple(row.items()), CD))
        if "live" in row and CONCENTRATED in present:
            # ASCE 7-16 4.4: the concentrated load acts instead of the uniform one, so it gets a row of its own.
            swapped = {CONCENTRATED if kind == "live" else kind: factor for kind, factor in row.items()}
            found.append(Combination(f"{name} (concentrated)", tuple(swapped.items()), CD))
    return tuple(found)
