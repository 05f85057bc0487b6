"""Heavy things people bring in: typical weights with their sources, and whether they count as permanent."""

from __future__ import annotations

import csv
import difflib
import functools
from dataclasses import dataclass
from pathlib import Path

from assess.errors import ReadingError

_TABLE = Path(__file__).parent / "data" / "heavy_things.csv"


@dataclass(frozen=True)
class Thing:
    """A heavy thing.

    load_lb          typical weight; low_lb and high_lb the range seen
    permanent, why   whether it is dead load for load duration (NDS 2.3.2), and the reason
    """

    name: str
    load_lb: float
    low_lb: float
    high_lb: float
    footprint: str
    permanent: bool
    why: str
    source: str

    @property
    def load_type(self) -> str:
        """'dead' for what stays ten years or more, else 'live'."""
        return "dead" if self.permanent else "live"


@functools.cache
def all_things() -> tuple[Thing, ...]:
    """Every thing of the table, in its order.

    >>> len(all_things()) >= 10
    True
    """
    lines = _TABLE.read_text(encoding="utf-8").splitlines()
    return tuple(
        Thing(
            row["thing"], float(row["load_lb"]), float(row["low_lb"]), float(row["high_lb"]), row["footprint"],
            row["permanent"] == "yes", row["why"], row["source"],
        )
        for row in csv.DictReader(line for line in lines if not line.startswith("#"))
    )  # fmt: skip


def thing_named(name: str) -> Thing:
    """The thing of a name, whatever its case; raises ReadingError naming the nearest.

    >>> thing_named("Safe").load_type, thing_named("upright piano").load_lb
    ('dead', 550.0)
    """
    by_name = {thing.name.lower(): thing for thing in all_things()}
    found = by_name.get(name.strip().lower())
    if found is None:
        near = difflib.get_close_matches(name[:100].lower(), by_name, 3, 0.3)
        raise ReadingError("name", name, "a thing of the list, nearest: " + "; ".join(near or list(by_name)[:3]))
    return found
