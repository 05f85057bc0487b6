"""Uses by plain names: the live load each puts on a floor, its concentrated load, and what comes with it."""

from __future__ import annotations

import csv
import functools
from dataclasses import dataclass
from pathlib import Path

from assess.errors import ReadingError
from assess.offers import key, offers

_TABLE = Path(__file__).parent / "data" / "live_loads.csv"
PARTITION_PSF = 15.0  # ASCE 7-16 4.3.2, where partitions may be moved and the live load is under 80 psf


@dataclass(frozen=True)
class Use:
    """A use of the table of minimum live loads (ASCE 7-16 Table 4.3-1, IRC R301.5).

    uniform_psf             live load over the floor
    concentrated_lb         load on the patch instead of the uniform one; None where the table has none
    concentrated_patch_in   footprint, along and across
    partition_psf           allowance that comes with the use, 0 where it has none
    reducible               whether ASCE 7-16 4.7 may reduce the uniform load
    """

    name: str
    uniform_psf: float
    concentrated_lb: float | None
    concentrated_patch_in: tuple[float, float]
    partition_psf: float
    reducible: bool
    source: str


@functools.cache
def all_uses() -> tuple[Use, ...]:
    """Every use of the table, in its order.

    >>> len(all_uses()) > 30
    True
    """
    lines = _TABLE.read_text(encoding="utf-8").splitlines()
    found = []
    for row in csv.DictReader(line for line in lines if not line.startswith("#")):
        patch = float(row["patch_in"])
        found.append(
            Use(
                name=row["use"],
                uniform_psf=float(row["uniform_psf"]),
                concentrated_lb=float(row["concentrated_lb"]) if row["concentrated_lb"] else None,
                concentrated_patch_in=(patch, patch),
                partition_psf=PARTITION_PSF if row["partitions"] == "yes" else 0.0,
                reducible=row["reduction"] == "yes",
                source=row["source"],
            )
        )
    return tuple(found)


# Short names people say for one row alone. A word that two rows answer to (a shop on which floor, a dwelling's living
# or its sleeping rooms) is not among them: as a present use the greater load would excuse what it must not.
_SHORT = {
    "office": "offices",
    "living": "dwelling, living areas",
    "living areas": "dwelling, living areas",
    "living room": "dwelling, living areas",
    "bedroom": "dwelling, sleeping rooms",
    "bedrooms": "dwelling, sleeping rooms",
    "sleeping rooms": "dwelling, sleeping rooms",
    "attic storage": "attic with limited storage",
    "classroom": "classrooms",
    "deck": "dwelling deck",
    "restaurant": "dining rooms and restaurants",
    "restaurants": "dining rooms and restaurants",
    "gymnasium": "gymnasiums",
    "garage": "passenger garage",
}


@functools.cache
def _index() -> dict[str, Use]:
    by_name = {use.name: use for use in all_uses()}
    index = {key(name): use for name, use in by_name.items()}
    index |= {key(short): by_name[name] for short, name in _SHORT.items()}
    return index


def use_named(text: str) -> Use:
    """The use of a name, whatever its case and punctuation.

    text      a row's name, or a short name such as 'office'
    raises    ReadingError naming the nearest uses; a name that fits two is never chosen between
    source    ASCE 7-16 Table 4.3-1, IRC R301.5

    >>> use_named("Offices").concentrated_lb, use_named("Offices").partition_psf
    (2000.0, 15.0)
    """
    found = _index().get(key(text[:200].replace("/", " ")))
    if found is not None:
        return found
    nearest = "; ".join(offers(text, [use.name for use in all_uses()]) or ("offices", "dwelling, living areas"))
    raise ReadingError(
        "use", text, f"a use of the table, nearest: {nearest}; or its loads as live, concentrated, name", "is not known"
    )
