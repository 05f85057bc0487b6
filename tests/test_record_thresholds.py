"""Where a record stops being possible: each refusal between fields at its limit, read, and a sixteenth past it."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import pytest

from assess.record import record_problems
from tests.record_forms import EXTENT, JOIST

# JOIST: 1 5/8 x 7 1/2 in over one clear span of 160 in. With seats of 1 1/2 in, the least taken, its design span is
# 161 1/2 in and the piece reaches 1 1/2 in past either design point: from -1 1/2 in to 163 in.
LAST, OFF_RIGHT = "163 in", "163 1/16 in"
FIRST, OFF_LEFT = "-1 1/2 in", "-1 9/16 in"

Change = dict[str, Any]


def defect(kind: str, **fields: Any) -> Change:
    return {"condition": [{"defect": kind} | fields]}


def post(at: str, **fields: Any) -> Change:
    return {"point_loads": [{"load": "400 lb", "at": at, "type": "dead"}]} | fields


def wall(start: str, end: str) -> Change:
    return {"line_loads": [{"load": "40 plf", "from": start, "to": end, "type": "dead"}]}


def weighed(at: str) -> Change:
    return {"stiffness_test": {"load": "400 lb", "at": at, "deflection": "0.1 in"}}


def hole(height: str) -> Change:
    return defect("hole", at="3 ft", diameter="2 in", height=height)


def split(remaining: str = "6 in", length: str = "12 in") -> Change:
    return defect("end split", end="left", remaining=remaining, length=length)


def measured(width: str = "1 1/2 in", depth: str = "7 in") -> Change:
    return defect("remaining", width=width, depth=depth, **EXTENT)


def eaten(kind: str, face: str, depth: str) -> Change:
    return defect(kind, face=face, depth=depth, **EXTENT)


@pytest.mark.parametrize(
    ("make", "at_limit", "past_limit", "field"),
    [
        # off the member
        (post, LAST, OFF_RIGHT, "point_loads.0.at"),
        (post, FIRST, OFF_LEFT, "point_loads.0.at"),
        (post, "4140.2 mm", "4140.3 mm", "point_loads.0.at"),
        (lambda at: post(at, span_basis="design"), "161 1/2 in", "161 9/16 in", "point_loads.0.at"),
        (lambda at: post(at, bearing=["4 in", "5 in"]), "166 1/2 in", "166 9/16 in", "point_loads.0.at"),
        (lambda at: post(at, bearing=["4 in", "5 in"]), "-4 in", "-4 1/16 in", "point_loads.0.at"),
        (lambda at: post(at, overhang_left="2 ft"), "-24 in", "-24 1/16 in", "point_loads.0.at"),
        (lambda at: post(at, overhang_right="2 ft"), "185 1/2 in", "185 9/16 in", "point_loads.0.at"),
        (lambda at: post(at, spans=["10 ft", "8 ft"]), "220 1/2 in", "220 9/16 in", "point_loads.0.at"),
        (lambda at: wall("1 ft", at), LAST, OFF_RIGHT, "line_loads.0.to"),
        (lambda at: wall(at, "9 ft"), FIRST, OFF_LEFT, "line_loads.0.from"),
        (lambda at: {"top_edge": [at]}, LAST, OFF_RIGHT, "top_edge.0"),
        (lambda at: {"bottom_edge": ["4 ft", at]}, LAST, OFF_RIGHT, "bottom_edge.1"),
        (weighed, LAST, OFF_RIGHT, "stiffness_test.at"),
        (lambda at: {"added": [{"part": "sister", "to": at}]}, LAST, OFF_RIGHT, "added.0.to"),
        (lambda at: {"added": [{"part": "sister", "from": at}]}, FIRST, OFF_LEFT, "added.0.from"),
        (lambda at: {"new_supports": [{"at": at}]}, LAST, OFF_RIGHT, "new_supports.0.at"),
        (lambda at: defect("notch", edge="top", at=at, length="1 in", depth="1 in"), FIRST, OFF_LEFT,
         "condition.0.at"),
        (lambda length: defect("notch", edge="top", at="159 in", length=length, depth="1 in"), "4 in", "4 1/16 in",
         "condition.0.at"),
        (lambda length: split(length=length), "164 1/2 in", "164 9/16 in", "condition.0.length"),
        # more than there is of it
        (lambda length: {"overhang_left": length}, "160 in", "160 1/16 in", "overhang_left"),
        (lambda length: {"overhang_right": length}, "160 in", "160 1/16 in", "overhang_right"),
        (lambda count: {"bearing": ["3 in"] * count}, 2, 3, "bearing"),
        (lambda support: {"hold_down": [support]}, 2, 3, "hold_down.0"),
        (lambda support: defect("hanger corrosion", support=support), 2, 3, "condition.0.support"),
        # deeper than the section
        (lambda depth: defect("notch", edge="top", depth=depth, **EXTENT), "7 7/16 in", "7 1/2 in",
         "condition.0.depth"),
        (lambda depth: eaten("decay", "top", depth), "7 1/2 in", "7 9/16 in", "condition.0.depth"),
        (lambda depth: eaten("decay", "all", depth), "7 1/2 in", "7 9/16 in", "condition.0.depth"),
        (lambda depth: eaten("insects", "side", depth), "1 5/8 in", "1 11/16 in", "condition.0.depth"),
        (lambda depth: eaten("decay", "side", depth)
         | {"size": {"width": "1 5/8 in", "depth": "7 1/2 in", "plies": 2}},
         "3 1/4 in", "3 5/16 in", "condition.0.depth"),
        (lambda depth: defect("char", faces=["top"], depth=depth, **EXTENT), "7 1/2 in", "7 9/16 in",
         "condition.0.depth"),
        (lambda depth: defect("check", depth=depth), "7 1/2 in", "7 9/16 in", "condition.0.depth"),
        (lambda depth: measured(depth=depth), "8 in", "8 1/16 in", "condition.0.depth"),
        (lambda width: measured(width=width), "2 1/8 in", "2 3/16 in", "condition.0.width"),
        (lambda remaining: split(remaining=remaining), "7 1/2 in", "7 9/16 in", "condition.0.remaining"),
        (hole, "1 1/16 in", "1 in", "condition.0.height"),
        (hole, "6 7/16 in", "6 1/2 in", "condition.0.height"),
        # a contradiction: as deep as it is wide lies either way
        (lambda width: {"orientation": "edge", "size": {"width": width, "depth": "7 1/2 in"}}, "7 1/2 in", "7 9/16 in",
         "orientation"),
        (lambda depth: {"orientation": "flat", "size": {"width": "7 1/2 in", "depth": depth}}, "7 1/2 in", "7 9/16 in",
         "orientation"),
    ],
)  # fmt: skip
def test_a_limit_is_read_and_what_lies_past_it_is_refused_by_field(
    make: Callable[[Any], Change], at_limit: Any, past_limit: Any, field: str
) -> None:
    assert record_problems("member", JOIST | make(at_limit)) == []
    assert [error.field for error in record_problems("member", JOIST | make(past_limit))] == [field]
