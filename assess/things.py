"""Heavy things people bring in: typical weights with their sources, and whether they count as permanent."""

from __future__ import annotations

import csv
import functools
from dataclasses import dataclass
from pathlib import Path

from assess.errors import ReadingError
from assess.offers import key, offers

_TABLE = Path(__file__).parent / "data" / "heavy_things.csv"
BY_HEIGHT = "plf per ft of height"


@dataclass(frozen=True)
class Named:
    """What every row of the table says, whether it stands at one place or runs along the floor.

    permanent, why   whether it is dead load for load duration (NDS 2.3.2), and the reason
    """

    name: str
    permanent: bool
    why: str
    source: str

    @property
    def load_type(self) -> str:
        """'dead' for what stays ten years or more, else 'live'."""
        return "dead" if self.permanent else "live"


@dataclass(frozen=True)
class Thing(Named):
    """A heavy thing that stands at one place.

    load_lb        typical weight; low_lb and high_lb the range seen
    footprint_in   the floor under it, along and across
    """

    load_lb: float
    low_lb: float
    high_lb: float
    footprint_in: tuple[float, float]

    @property
    def psf(self) -> float:
        """Typical weight over its footprint."""
        along, across = self.footprint_in
        return self.load_lb * 144.0 / (along * across)


@dataclass(frozen=True)
class Run(Named):
    """A heavy thing that runs along the floor: shelves, a wall.

    load_plf    typical weight of a foot of it, low_plf and high_plf the range seen; of one foot of its height
                where by_height is True
    """

    load_plf: float
    low_plf: float
    high_plf: float
    by_height: bool

    def at_height(self, height_ft: float) -> float:
        """Typical weight of a foot of it [plf] at a height [ft]; what is no wall weighs what the table says.

        >>> thing_named("brick partition, 4 in").at_height(8.0)
        312.0
        """
        return self.load_plf * height_ft if self.by_height else self.load_plf


def all_things() -> tuple[Thing, ...]:
    """Every thing that stands at one place, in the order of the table.

    >>> len(all_things()) > 10
    True
    """
    return tuple(row for row in _rows() if isinstance(row, Thing))


def all_runs() -> tuple[Run, ...]:
    """Everything that runs along the floor, in the order of the table.

    >>> [run.name for run in all_runs() if not run.by_height]
    ['bookshelves along a wall, full, 7 ft high']
    """
    return tuple(row for row in _rows() if isinstance(row, Run))


def thing_named(text: str) -> Thing | Run:
    """The heavy thing of a name, whatever its case and punctuation.

    text      a row's name
    raises    ReadingError naming the nearest things; a name that fits two is never chosen between
    source    head and rows of the table

    >>> thing_named("Safe").load_type, thing_named("upright piano").load_lb
    ('dead', 550.0)
    """
    by_key = {key(row.name): row for row in _rows()}
    found = by_key.get(key(text))
    if found is not None:
        return found
    names = [row.name for row in _rows()]
    nearest = "; ".join(offers(text, names) or names[:3])
    raise ReadingError("name", text, f"a thing of the list, nearest: {nearest}; or its weight as read", "is not known")


@functools.cache
def _rows() -> tuple[Thing | Run, ...]:
    lines = _TABLE.read_text(encoding="utf-8").splitlines()
    return tuple(_row(row) for row in csv.DictReader(line for line in lines if not line.startswith("#")))


def _row(row: dict[str, str]) -> Thing | Run:
    said = (row["thing"], row["permanent"] == "yes", row["why"], row["source"])
    load, low, high = float(row["load"]), float(row["low"]), float(row["high"])
    if row["unit"] != "lb":
        return Run(*said, load, low, high, row["unit"] == BY_HEIGHT)
    along, across = (float(side) for side in row["footprint_in"].split(" x "))
    return Thing(*said, load, low, high, (along, across))
