"""Weights of floor and roof materials by the layer, psf, each with its source."""

from __future__ import annotations

import csv
import functools
import re
from dataclasses import dataclass
from math import inf
from pathlib import Path

from assess.errors import ReadingError
from assess.offers import key, offers

_TABLE = Path(__file__).parent / "data" / "dead_loads.csv"
_PER = re.compile(r", per (?:(\d+)/(\d+) )?(?:in|inch)$")
_OWN = re.compile(r" (?:(\d+) )?(?:(\d+)/(\d+)|(\d+)) in$")


@dataclass(frozen=True)
class Material:
    """A row of the table; per_in is the thickness its weight is for, None where it is for the layer as it comes."""

    name: str
    psf: float
    per_in: float | None
    scales: bool
    source: str


@functools.cache
def all_materials() -> tuple[Material, ...]:
    """Every material of the table, in its order; 'scales' where a thickness must be given."""
    lines = _TABLE.read_text(encoding="utf-8").splitlines()
    found = []
    for row in csv.DictReader(line for line in lines if not line.startswith("#")):
        name = row["material"]
        per, own = _PER.search(name), _OWN.search(name)
        if per:
            thickness = int(per[1]) / int(per[2]) if per[1] else 1.0
            found.append(Material(name[: per.start()], float(row["psf"]), thickness, True, row["source"]))
        elif own:
            thickness = float(own[1] or 0) + (int(own[2]) / int(own[3]) if own[2] else float(own[4]))
            found.append(Material(name, float(row["psf"]), thickness, False, row["source"]))
        else:
            found.append(Material(name, float(row["psf"]), None, False, row["source"]))
    return tuple(found)


# Short names people say for one row alone.
_SHORT = {
    "plywood": "plywood or OSB",
    "OSB": "plywood or OSB",
    "drywall": "gypsum board",
    "hardwood": "hardwood flooring 7/8 in",
    "linoleum": "linoleum or asphalt tile 1/4 in",
    "asphalt tile": "linoleum or asphalt tile 1/4 in",
    "sand pugging": "dry sand pugging",
}


@functools.cache
def _index() -> dict[str, Material]:
    index = {}
    for material in all_materials():
        index[key(material.name)] = material
        short = _OWN.sub("", material.name)
        # A name without its thickness stands for its row where only one row has it.
        if sum(_OWN.sub("", other.name) == short for other in all_materials()) == 1:
            index.setdefault(key(short), material)
    return index | {key(short): index[key(name)] for short, name in _SHORT.items()}


def layer_psf(layer: str, thickness_in: float | None = None) -> tuple[float, str, str | None]:
    """Weight of a layer.

    layer          a material of the table, whatever its case and punctuation
    thickness_in   thickness as measured [in]; needed where the table weighs by thickness
    returns        (psf, source, what was assumed or None); a row for one thickness is scaled to another, and said
    raises         ReadingError for an unknown material, a missing thickness, or one that is none
    source         ASCE 7-16 Table C3.1-1 and others, as each row names

    >>> layer_psf("gypsum board", 0.5)[0], layer_psf("hardwood flooring")[0]
    (2.2, 4.0)
    """
    material = _index().get(key(layer))
    if material is None:
        nearest = "; ".join(offers(layer, [one.name for one in all_materials()]) or ("plaster on wood lath",))
        raise ReadingError(
            "layer", layer, f"a material of the table, nearest: {nearest}; or a typed load", "is not known"
        )
    if thickness_in is not None and not 0.0 < thickness_in < inf:
        raise ReadingError("thickness", thickness_in, "a thickness above 0", "is no thickness")
    if material.scales:
        if thickness_in is None or material.per_in is None:
            raise ReadingError("thickness", None, f"a thickness: {material.name} is weighed by thickness", "is missing")
        return material.psf * thickness_in / material.per_in, material.source, None
    if material.per_in is None:
        one = f"{material.name}: the table has one weight for any thickness"
        return material.psf, material.source, one if thickness_in is not None else None
    if thickness_in is None:
        # The row's own name says its thickness; a short name leaves it to be assumed.
        taken = f"{material.name}: taken, no thickness read"
        return material.psf, material.source, None if key(layer) == key(material.name) else taken
    if thickness_in == material.per_in:
        return material.psf, material.source, None
    note = f"{material.name}: weight of {material.per_in:g} in scaled to {thickness_in:g} in"
    return material.psf * thickness_in / material.per_in, material.source, note
