"""Dressed sizes by period: what a nominal 2x8 measures, where it cannot be measured."""

from __future__ import annotations

import re
from functools import cache

from species.datafile import read
from species.errors import WoodError
from species.inches import from_mixed, to_mixed

DRESSINGS = ("current", "1925-1969", "full sawn")
LUMBER = (2, 3, 4, 5, 6, 8, 10, 12, 14)  # nominal, in
TIMBERS = (5, 6, 8, 10, 12, 14, 16, 18, 20, 22, 24)  # nominal, in
NOMINAL = re.compile(r"\s*(\d{1,2})\s*(?:in|\")?\s*(?:x|×|by)\s*(\d{1,2})\s*(?:in|\")?\s*$", re.IGNORECASE)
LATER = re.compile(r"(?P<first>[\d /]+?) \((?P<later>[\d /]+) from (?P<year>\d{4})\)")


@cache
def _lumber(dressing: str) -> tuple[dict[int, float], dict[int, str]]:
    """Dressed size of each nominal size of lumber to 4 in thick (in), and what is to be said of it."""
    if dressing == "full sawn":
        # Its row gives nominal sizes themselves, from 2 in on, and so does not line up with the column's widths.
        return {nominal: float(nominal) for nominal in LUMBER}, {}
    row = next(r for r in read("sizes_by_period.csv")[1] if r["dressing"] == dressing)
    added = next(r for r in read("sizes_added.csv")[1] if r["dressing"] == dressing)
    sizes, notes = {2: from_mixed(row["thickness_of_2x"])}, {}
    for nominal, text in zip((4, 6, 8, 10, 12, 14), row["widths_of_4_6_8_10_12_14"].split(";"), strict=False):
        changed = LATER.match(text)
        if changed is None:
            sizes[nominal] = from_mixed(text)
            continue
        first, later = from_mixed(changed["first"]), from_mixed(changed["later"])
        sizes[nominal] = min(first, later)
        notes[nominal] = (
            f"nominal {nominal} in was dressed to {to_mixed(first)} in before {changed['year']}, "
            f"{to_mixed(later)} in from then: the lesser is taken"
        )
    for nominal in (3, 5):
        if added[f"nominal_{nominal}"]:
            sizes[nominal] = from_mixed(added[f"nominal_{nominal}"])
    return sizes, notes


@cache
def standard_widths_in() -> tuple[float, ...]:
    """Widths that lumber to 4 in thick is dressed to today, dry.

    returns  widths, ascending [in]

    >>> standard_widths_in()
    (1.5, 2.5, 3.5, 4.5, 5.5, 7.25, 9.25, 11.25, 13.25)
    """
    return tuple(sorted(_lumber("current")[0].values()))


def _nominal(nominal: str, dressing: str) -> tuple[int, int]:
    """The two nominal dimensions, lesser first; both must be known sizes of that dressing."""
    if dressing not in DRESSINGS:
        raise WoodError("dressing", dressing, ", ".join(DRESSINGS))
    found = NOMINAL.match(nominal) if len(nominal) <= 40 else None
    if found is None:
        raise WoodError("nominal", nominal, "a nominal size such as 2x8")
    thickness, width = sorted((int(found[1]), int(found[2])))
    known = sorted(_lumber(dressing)[0]) if thickness <= 4 else list(TIMBERS)
    thicknesses = (2, 3, 4) if thickness <= 4 else TIMBERS
    if thickness not in thicknesses or width not in known:
        by_distance = sorted(known, key=lambda n: (abs(n - width), n)) if thickness in thicknesses else []
        near = tuple(f"{thickness}x{n}" for n in sorted(by_distance[:2]))
        nearest = f"; nearest: {' or '.join(near)}" if near else ""
        widths = ", ".join(map(str, sorted(_lumber(dressing)[0])))
        raise WoodError(
            "nominal",
            nominal,
            f"2, 3 or 4 in thick by {widths} in wide, or a timber from 5x5, in even sizes over 6, to 24x24; "
            f"else the measured size{nearest}",
            near,
            f"is no nominal size with a {dressing} dressed size on file",
        )
    return thickness, width


def dressed_size(nominal: str, dressing: str) -> tuple[float, float]:
    """What a nominal size measures in a period's dressing: a guide for typing, no substitute for measuring.

    nominal   e.g. '2x8', either dimension first [in]
    dressing  'current' (PS 20, dry), '1925-1969' or 'full sawn'
    returns   (thickness, width), the lesser first [in]
    raises    WoodError for a size or dressing that has no dressed size on file

    >>> dressed_size("2x8", "current"), dressed_size("2x8", "1925-1969"), dressed_size("8x12", "current")
    ((1.5, 7.25), (1.625, 7.5), (7.5, 11.5))

    source    sizes_by_period.csv and sizes_added.csv, each with what was seen in print and what is recalled
    """
    thickness, width = _nominal(nominal, dressing)
    if thickness >= TIMBERS[0]:
        row = next(r for r in read("sizes_added.csv")[1] if r["dressing"] == dressing)
        under = from_mixed(row["timber_under_nominal"])
        return thickness - under, width - under
    sizes = _lumber(dressing)[0]
    return sizes[thickness], sizes[width]


def dressed_note(nominal: str, dressing: str) -> str:
    """What must be said beside a dressed size: where it comes from, and where the period's size changed.

    nominal   e.g. '2x6' [in]
    dressing  'current', '1925-1969' or 'full sawn'
    returns   one line
    raises    WoodError as dressed_size does

    >>> dressed_note("2x6", "1925-1969")[:58]
    '2x6, 1925-1969 dressing, not measured; recalled; 1 5/8 see'
    """
    thickness, width = _nominal(nominal, dressing)
    row = next(r for r in read("sizes_by_period.csv")[1] if r["dressing"] == dressing)
    timber = thickness >= TIMBERS[0]
    parts = [f"{thickness}x{width}, {dressing} dressing, not measured", row["confidence"]]
    if not timber:
        notes = _lumber(dressing)[1]
        parts += [notes[n] for n in dict.fromkeys((thickness, width)) if n in notes]
    if dressing != "full sawn":
        if timber:
            parts[1] = "timbers 1/2 in under nominal: recalled"
        elif thickness > 2 or width in (3, 5):
            parts.append("sizes beyond those of 2x4 to 2x14: recalled")
    return "; ".join(parts)
