"""The lines of a member's form: the readings in the order one takes them, with what is taken where none was."""

from __future__ import annotations

from dataclasses import dataclass

from assess.kinds import KINDS


@dataclass(frozen=True)
class Field:
    """One line of the form.

    key     dotted path in the record
    label   what the line is called, at most 11 columns
    hint    what may be typed
    form    how its text becomes the record: 'text', 'note', 'reading' (several of one thing with ;), 'list' (one for
            each place, with ;), 'words', 'whole', 'wholes', 'yes', 'texts', 'of' (5 of 22), 'dead', 'use', 'edge',
            'partitions', 'condition', 'points', 'lines', 'candidates' or 'values'
    main    shown always; else only where it holds something, or when asked for
    """

    key: str
    label: str
    hint: str
    form: str = "reading"
    main: bool = False

    @property
    def path(self) -> tuple[str, ...]:
        """Path in the record."""
        return tuple(self.key.split("."))


FORM = (
    Field("where", "where", "place in the building", "text", True),
    Field("bay", "bay", "id of the bay whose readings it takes over", "text"),
    Field("stands_for", "stands for", "measured of alike, as 5 of 22", "of"),
    Field("kind", "kind", ", ".join(KINDS), "words", True),
    Field("size.width", "width", "thickness across, of one ply: 1 5/8 in or 41 mm; several with ;", main=True),
    Field("size.depth", "depth", "in the direction of load: 7 1/2 in ± 1/8 or 190 mm; several with ;", main=True),
    Field("size.plies", "plies", "how many pieces side by side", "whole", True),
    Field("size.plies_fastened", "fastened", "plies fastened to act as one: yes or no", "yes"),
    Field("size.surface", "surface", "dressed, rough", "words"),
    Field("size.nominal", "or nominal", "a size by name where it cannot be measured: 2x8", "text", True),
    Field("size.dressing", "dressed as", "current, 1925-1969, full sawn", "words"),
    Field("size.diameter", "or diameter", "of a round member: 8 in or 200 mm"),
    Field("orientation", "lies on", "edge, flat", "words"),
    Field("wood.species", "species", "douglas fir, hem-fir, spf, syp ...", "text", True),
    Field("wood.grade", "grade", "ss, no 1, no 2, no 3, stud ...", "text", True),
    Field("wood.basis", "known from", "stamp, certificate, graded in place, assumed", "words", True),
    Field("wood.stamp", "stamp reads", "the text on the stamp", "text"),
    Field("wood.rules", "rules", "current, 1991-2013", "words"),
    Field("wood.candidates", "or one of", "species, grade; species, grade", "candidates"),
    Field("wood.source", "values from", "who gave the values, and when", "text"),
    Field("wood.values", "or values", "Fb 1200 psi, Fv 95 psi, Fc_perp 400 psi, E 1400000 psi, G 0.45", "values"),
    Field("spans", "span", "13'4\" or 4.06 m; several spans left to right with ;", "list", True),
    Field("span_basis", "measured", "clear, design", "words"),
    Field("overhang_left", "over left", "overhang left of the first support: 2'6\" or 0.76 m"),
    Field("overhang_right", "over right", "overhang right of the last support: 2'6\" or 0.76 m"),
    Field("over_supports", "at supports", "continuous, separate", "words"),
    Field("bearing", "bearing", "length on each support, left to right: 3 in; 3 1/2 in", "list", True),
    Field("bearing_on", "bears on", "wood, masonry, hanger", "words"),
    Field("loaded_on", "loaded on", "top, side", "words"),
    Field("spacing", "spacing", "centre to centre: 16 in or 400 mm", main=True),
    Field("tributary", "or carries", "width of floor carried: 8 ft or 2.4 m", main=True),
    Field("alike", "alike", "parallel members sharing the floor, this one counted", "whole"),
    Field("condition", "condition", "notch bottom at 2 ft length 4 in depth 1 in; hole at 6 ft diameter 1 in height 4",
          "condition", True),
    Field("moisture", "moisture", "14 %, dry or wet", main=True),
    Field("temperature", "temperature", "sustained: 110 °F or 43 °C"),
    Field("incised", "incised", "yes or no", "yes"),
    Field("top_edge", "top edge", "held, ends only, 4 ft between braces, or their places with ;", "edge", True),
    Field("bottom_edge", "bottom edge", "held, ends only, 4 ft between braces, or their places with ;", "edge"),
    Field("ends_held", "ends held", "against rotation: yes or no", "yes"),
    Field("sag", "sag", "measured below a straight line: 5/8 in or 16 mm"),
    Field("not_seen", "not seen", "faces hidden, bays insulated; several with ;", "texts"),
    Field("dead", "dead load", "12 psf or 0.6 kPa; or layers: hardwood flooring + plaster on wood lath + 3 psf", "dead",
          True),
    Field("own_weight", "own weight", "add, included", "words"),
    Field("present_use", "used as", "a use by name; or its loads: 40 psf, 300 lb", "use", True),
    Field("proposed_use", "to be", "a use by name, e.g. offices; or its loads: 50 psf, 2000 lb", "use", True),
    Field("partitions", "partitions", "yes, no, or a load: 15 psf", "partitions"),
    Field("snow", "snow", "on the projection: 25 psf or 1.2 kPa"),
    Field("roof_live", "roof live", "on the projection: 20 psf or 1 kPa"),
    Field("slope", "slope", "6:12 or 26 deg"),
    Field("reduce", "reduce", "live-load reduction by area: yes or no", "yes"),
    Field("supported_area", "area", "supported by the member: 400 ft2 or 37 m2"),
    Field("point_loads", "point loads", "stove 300 lb at 4 ft live; post 2 kN at 1.2 m dead", "points"),
    Field("line_loads", "line loads", "wall 120 plf from 0 ft to 4 ft dead", "lines"),
    Field("limits.live", "live limit", "L/360", "text"),
    Field("limits.total", "total limit", "L/240", "text"),
    Field("hold_down", "hold-downs", "supports held against uplift, counted from the left: 1; 3", "wholes"),
    Field("ties_rafters", "ties", "ties rafters as well: yes or no", "yes"),
    Field("photos", "photos", "file names, relative; several with ;", "texts"),
    Field("remarks", "remarks", "anything; several lines", "note", True),
)  # fmt: skip
BY_KEY = {field.key: field for field in FORM}
ROOF = ("snow", "roof_live", "slope")

# Taken where nothing is recorded; each also stands among the finding's assumptions where it matters.
_TAKEN = {
    "size.plies": "1",
    "size.dressing": "current",
    "wood.basis": "assumed",
    "wood.rules": "current",
    "span_basis": "clear",
    "overhang_left": "none",
    "overhang_right": "none",
    "over_supports": "continuous",
    "bearing": "1 1/2 in",
    "bearing_on": "wood",
    "incised": "no",
    "condition": "none recorded",
    "bottom_edge": "ends only",
    "ends_held": "yes",
    "own_weight": "add",
    "orientation": "edge",
}


def taken(key: str, kind: str | None) -> str:
    """What is taken for a line with no reading, in words; '' where nothing is.

    >>> taken("top_edge", "beam"), taken("size.plies", None), taken("alike", None)
    ('ends only', '1', '')
    """
    if key in _TAKEN:
        return _TAKEN[key]
    if kind not in KINDS:
        return ""
    of = KINDS[kind]
    return {
        "alike": str(of.alike),
        "top_edge": "held" if of.top_held else "ends only",
        "loaded_on": "top" if of.loaded_on_top else "side",
        "moisture": "wet" if of.wet else "dry",
        "limits.live": f"L/{of.limit_live:g}",
        "limits.total": f"L/{of.limit_total:g}",
    }.get(key, "")
