"""Members drawn for property tests: every field of the record, typed as people type it."""

from __future__ import annotations

import json
from collections.abc import Callable
from typing import Any

from hypothesis import strategies as st

from assess import quantities as q
from assess.quantities import Quantity
from tests.hostile_texts import bad_texts, free_texts, hostile_texts
from tests.typed_readings import Draw, typed

__all__ = ["bad_texts", "hostile_texts", "members", "sites"]

Data = dict[str, Any]

SECTIONS = (  # (thickness, width) [in]: dressed, mid-century, full-sawn, worn, timbers
    (1.5, 5.5), (1.5, 7.25), (1.5, 9.25), (1.625, 7.5), (1.625, 9.5), (1.625, 11.5), (2.0, 7.875), (2.0, 10.0),
    (1.9375, 11.75), (3.5, 9.25), (3.5, 11.25), (3.0, 8.0), (5.5, 9.5), (7.5, 11.5),
)  # fmt: skip
NOMINAL = {"2x8": (1.5, 7.25), "2x10": (1.5, 9.25), "2x12": (1.5, 11.25)}
SPECIES = ("Douglas Fir-Larch", "DF-L", "hem-fir", "HF", "Spruce-Pine-Fir", "S-P-F")
GRADES = ("No. 2", "#2", "No. 1", "SS", "select structural")
USES = (
    "dwelling, living areas",
    "dwelling, sleeping rooms",
    "offices",
    "classrooms",
    "light storage",
    "retail, first floor",
)


@st.composite
def members(draw: Draw, units: str = "US") -> Data:
    """Data of a member that can be assessed, as the session file has it; any other field is there half the time.

    units    'US' or 'SI': what its bare numbers mean
    returns  data that `read_member(data, units)` reads. Stocky and slender members mix, so that many are overstressed
    """

    def read(value: float, quantity: Quantity, exact: bool = False) -> Any:
        return typed(draw, value, quantity, units, exact)

    def maybe() -> bool:
        return bool(draw(st.booleans()))

    def some(low: float, high: float) -> float:
        return float(draw(st.integers(0, 64))) / 64 * (high - low) + low

    kind = draw(st.sampled_from(("joist", "joist", "beam", "header", "rafter", "ceiling joist", "deck joist")))
    size, breadth, depth = _size(draw, read)
    count = draw(st.sampled_from((1, 1, 1, 2, 3, 5)))
    spans = [min(max(depth * some(5, 22), 24), 700) for _ in range(count)]
    data: Data = {
        "kind": kind,
        "size": size,
        "wood": _wood(draw, read),
        "spans": [read(span, q.SPAN) for span in spans],
        "dead": _dead(draw, read, some),
    }
    if kind in ("beam", "header"):
        data["tributary"] = read(some(24, 96), q.TRIBUTARY)
    else:
        data["spacing"] = read(draw(st.sampled_from((12, 16, 19.1875, 24))), q.SPACING)
    data |= _uses(draw, read, some, kind)
    left, right = 0.0, 0.0
    if maybe() and maybe():
        left = spans[0] * some(0.1, 0.4)
        data["overhang_left"] = read(left, q.OVERHANG)
    if maybe() and maybe():
        right = spans[-1] * some(0.1, 0.4)
        data["overhang_right"] = read(right, q.OVERHANG)

    def place() -> float:
        return some(-0.9 * left, sum(spans) + 0.9 * right)

    optional: dict[str, Callable[[], Any]] = {
        "bay": lambda: draw(st.sampled_from(("north bay", "б-2"))),
        "where": lambda: draw(free_texts()),
        "stands_for": lambda: {"count": draw(st.integers(5, 40)), "measured": draw(st.integers(0, 5))},
        "ties_rafters": maybe,
        "orientation": lambda: "edge",
        "span_basis": lambda: draw(st.sampled_from(("clear", "design"))),
        "over_supports": lambda: draw(st.sampled_from(("continuous", "separate"))),
        "bearing": lambda: [read(some(1.5, 5), q.BEARING) for _ in range(draw(st.integers(1, count + 1)))],
        "loaded_on": lambda: draw(st.sampled_from(("top", "side"))),
        "alike": lambda: draw(st.integers(1, 12)),
        "top_edge": lambda: _edge(draw, read, place),
        "bottom_edge": lambda: _edge(draw, read, place),
        "ends_held": lambda: draw(st.integers(0, 5)) > 0,
        "moisture": lambda: draw(st.sampled_from(("dry", "wet"))) if maybe() else read(some(8, 40), q.MOISTURE),
        "temperature": lambda: read(some(40, 140), q.TEMPERATURE),
        "incised": maybe,
        "own_weight": lambda: draw(st.sampled_from(("add", "included"))),
        "partitions": lambda: maybe() if maybe() else read(some(0, 20), q.AREA_LOAD),
        "concentrated_on": lambda: [read(some(4, 40), q.LENGTH), read(some(4, 40), q.LENGTH)],
        "point_loads": lambda: [_point(draw, read, some, place) for _ in range(draw(st.integers(0, 3)))],
        "line_loads": lambda: [_line(draw, read, some, sum(spans)) for _ in range(draw(st.integers(0, 2)))],
        "limits": lambda: {"live": "L/480", "total": draw(st.sampled_from(("L/240", "L/180")))},
        "condition": lambda: [
            _defect(draw, read, some, sum(spans), breadth, depth, count) for _ in range(draw(st.integers(0, 4)))
        ],
        "sag": lambda: _sag(draw, read, some),
        "stiffness_test": lambda: {
            "load": read(some(100, 600), q.WEIGHT), "at": read(place(), q.POSITION),
            "deflection": read(some(0.0625, 0.5), q.DEFLECTION), "carried_by": draw(st.integers(1, 5)),
        },
        "hold_down": lambda: draw(st.sampled_from((list(range(1, count + 2)), [count + 1], []))),
        "photos": lambda: draw(st.lists(st.sampled_from(("n07.jpg", "../x.jpg", "inv\u202egpj.exe")), max_size=3)),
        "remarks": lambda: draw(free_texts()),
        "not_seen": lambda: draw(st.lists(free_texts(), max_size=3)),
        "identified": lambda: {"resin canals": draw(st.sampled_from(("large", "none"))), "rings": [4, 6]},
        "graded": lambda: {
            "knots": [{"size": "1 1/2 in", "on": "edge"}, "3/4 in at the middle"], "slope_of_grain": "1:9",
            "wane": "1/4 in", "faces_seen": draw(st.integers(1, 4)), "rings_per_inch": draw(st.integers(2, 30)),
        },
        "added": lambda: [_added(draw, read, some, sum(spans), depth)],
        "new_supports": lambda: [
            {"at": read(spans[0] / 2, q.POSITION), "bearing": read(3.5, q.BEARING), "jacked": 0.5}
        ],
    }  # fmt: skip
    for name, make in optional.items():
        if maybe():
            data[name] = make()
    if maybe():
        data["reduce"] = maybe()
        data["supported_area"] = read(some(100, 900), q.AREA)
    on = draw(st.sampled_from((None, "wood", "masonry", "hanger")))
    if on is not None:
        data["bearing_on"] = on
    if on == "hanger" and maybe():
        data["hanger"] = draw(
            st.sampled_from(({"kind": "seat"}, {"kind": "fasteners", "de": read(depth * 0.8, q.SIZE)}))
        )
    return data


def sites(units: str = "US") -> st.SearchStrategy[Data]:
    """Data of members that can be assessed, as a session file gives it back: through JSON text."""
    return members(units=units).map(lambda data: json.loads(json.dumps(data)))


def _size(draw: Draw, read: Any) -> tuple[Data, float, float]:
    form = draw(st.integers(0, 9))
    if form == 0:
        return {"diameter": read(8.0, q.SIZE)}, 8.0, 8.0
    if form == 1:
        name = draw(st.sampled_from(tuple(NOMINAL)))
        return {"nominal": name, "dressing": "current"}, *NOMINAL[name]
    thickness, width = draw(st.sampled_from(SECTIONS))
    size = {"width": read(thickness, q.SIZE), "depth": read(width, q.SIZE)}
    if draw(st.booleans()):
        size |= {"plies": draw(st.integers(1, 3)), "plies_fastened": draw(st.booleans())}
    if draw(st.booleans()):
        size["surface"] = draw(st.sampled_from(("dressed", "rough")))
    return size, thickness * size.get("plies", 1), width


def _wood(draw: Draw, read: Any) -> Data:
    name = st.sampled_from(SPECIES)
    grade = st.sampled_from(GRADES)
    form = draw(st.integers(0, 4))
    if form == 0:
        found = draw(st.lists(st.fixed_dictionaries({"species": name, "grade": grade}), min_size=1, max_size=3))
        return {"candidates": found}
    if form == 1:
        values = {
            "Fb": read(1200, q.STRESS, True),
            "Fv": read(95, q.STRESS, True),
            "Fc_perp": read(400, q.STRESS, True),
        }
        values |= {"E": read(1.4e6, q.MODULUS, True), "Emin": read(510000, q.MODULUS, True), "G": 0.45}
        return {"values": values, "source": "letter of an engineer, invented"}
    wood = {"species": draw(name), "grade": draw(grade)}
    wood["basis"] = draw(st.sampled_from(("stamp", "certificate", "graded in place", "assumed")))
    if draw(st.booleans()):
        wood |= {"stamp": draw(free_texts()), "rules": "current"}
    return wood


def _dead(draw: Draw, read: Any, some: Any) -> Any:
    if draw(st.booleans()):
        return read(some(5, 25), q.AREA_LOAD)
    layers: list[Data] = [
        {"layer": "hardwood flooring 7/8 in"},
        {"layer": "tile on mortar bed", "load": read(16, q.AREA_LOAD)},
    ]
    layers.append({"layer": "gypsum board", "thickness": read(0.5, q.SIZE)})
    return layers[: draw(st.integers(1, 3))]


def _uses(draw: Draw, read: Any, some: Any, kind: str) -> Data:
    by_loads = {
        "live": read(some(20, 120), q.AREA_LOAD),
        "concentrated": read(some(0, 2000), q.CONCENTRATED),
        "name": "typed",
    }
    use = st.one_of(st.sampled_from(USES), st.just(by_loads))
    if kind == "rafter":
        names = draw(st.sampled_from((("snow",), ("roof_live",), ("snow", "roof_live"))))
        roof: Data = {name: read(some(10, 60), q.AREA_LOAD) for name in names}
        roof["slope"] = read(some(5, 45), q.SLOPE, True)
        return roof
    found = {"proposed_use": draw(use)}
    if draw(st.booleans()):
        found["present_use"] = draw(use)
    return found


def _edge(draw: Draw, read: Any, place: Any) -> Any:
    form = draw(st.integers(0, 3))
    if form < 2:
        return ("held", "ends only")[form]
    # Of an edge a list is of places, never of several readings of one distance.
    return read(48, q.SPAN, True) if form == 2 else [read(place(), q.POSITION) for _ in range(2)]


def _point(draw: Draw, read: Any, some: Any, place: Any) -> Data:
    kind = draw(st.sampled_from(("dead", "live", "snow", "roof live", "construction", "wind")))
    load = some(50, 900) * (-1 if kind == "wind" and draw(st.booleans()) else 1)
    return {"name": "post", "load": read(load, q.FORCE), "at": read(place(), q.POSITION), "type": kind}


def _line(draw: Draw, read: Any, some: Any, length: float) -> Data:
    start = some(0, 0.5) * length
    kind = draw(st.sampled_from(("dead", "live")))
    return {
        "load": read(some(10, 150), q.LINE_LOAD), "from": read(start, q.POSITION),
        "to": read(start + length * some(0.1, 0.4), q.POSITION), "type": kind,
    }  # fmt: skip


def _defect(draw: Draw, read: Any, some: Any, length: float, breadth: float, depth: float, count: int) -> Data:
    at, long, deep = length * some(0, 0.8), length * some(0.01, 0.1), depth * some(0.05, 0.4)
    extent = {"at": read(at, q.POSITION), "length": read(long, q.LENGTH)}
    kind = draw(st.sampled_from(
        ("notch", "hole", "decay", "insects", "end split", "check", "char", "remaining", "hanger corrosion")
    ))  # fmt: skip
    shapes: dict[str, Callable[[], Data]] = {
        "notch": lambda: extent | {"edge": draw(st.sampled_from(("top", "bottom"))), "depth": read(deep, q.SIZE)},
        "hole": lambda: {
            "at": extent["at"], "diameter": read(depth * 0.25, q.SIZE), "height": read(depth * some(0.3, 0.7), q.HEIGHT)
        },
        "decay": lambda: extent | {
            "face": "side", "depth": read(breadth * 0.3, q.SIZE), "margin": read(0.25, q.MARGIN)
        },
        "insects": lambda: extent | {"face": draw(st.sampled_from(("top", "all"))), "depth": read(deep, q.SIZE)},
        "end split": lambda: {
            "end": draw(st.sampled_from(("left", "right"))), "remaining": read(depth - deep, q.SIZE),
            "length": extent["length"],
        },
        "check": lambda: extent | {"depth": read(breadth * 0.4, q.SIZE)},
        "char": lambda: extent | {"faces": ["left", "bottom"], "depth": read(0.25, q.SIZE)},
        "remaining": lambda: extent | {"width": read(breadth * 0.8, q.SIZE), "depth": read(depth * 0.9, q.SIZE)},
        "hanger corrosion": lambda: {"support": draw(st.integers(1, count + 1))},
    }  # fmt: skip
    defect = {"defect": kind} | shapes[kind]()
    return defect | {"new_work": True} if draw(st.booleans()) else defect


def _sag(draw: Draw, read: Any, some: Any) -> Any:
    if draw(st.booleans()):
        return read(some(0, 2), q.SAG)
    return {"left": read(40, q.LEVEL), "middle": read(40 + some(0, 2), q.LEVEL), "right": read(40.25, q.LEVEL)}


def _added(draw: Draw, read: Any, some: Any, length: float, depth: float) -> Data:
    part = {"part": "sister", "from": read(0.0, q.POSITION), "to": read(length * some(0.5, 0.95), q.POSITION)}
    part |= {"bears": [True, draw(st.booleans())], "jacked": draw(st.sampled_from((0, 0.5, 1.0)))}
    part["fasteners"] = {"kind": "10d common", "rows": 2, "spacing": read(12, q.SPACING), "at_ends": 4}
    if draw(st.booleans()):
        steel = {"thickness": read(0.25, q.SIZE), "depth": read(depth * 0.9, q.SIZE), "Fy": read(36000, q.STRESS, True)}
        return part | {"steel": steel}
    return part | {
        "size": {"width": read(1.5, q.SIZE), "depth": read(7.25, q.SIZE)},
        "wood": {"species": "SPF", "grade": "#2"},
    }
