"""Readings that are each understood but cannot stand together, alone or with those of a bay."""

from __future__ import annotations

from typing import Any

import pytest

from assess.errors import ReadingError
from assess.record import (
    read_bay,
    read_member,
    record_problems,
    to_json,
)
from assess.record_effective import effective
from tests.record_forms import EXTENT, JOIST


def refused(change: dict[str, Any], units: str = "US") -> ReadingError:
    with pytest.raises(ReadingError) as caught:
        read_member(JOIST | change, units)
    assert "\n" not in caught.value.line()
    return caught.value


@pytest.mark.parametrize(
    ("change", "field", "problem"),
    [
        ({"condition": [{"defect": "notch", "edge": "top", "depth": "8 in"} | EXTENT]},
         "condition.0.depth", "too deep"),
        ({"condition": [{"defect": "notch", "edge": "top", "depth": "7 1/2 in"} | EXTENT]},
         "condition.0.depth", "through"),
        ({"condition": [{"defect": "decay", "face": "side", "depth": "2 in"} | EXTENT]},
         "condition.0.depth", "too deep"),
        ({"condition": [{"defect": "char", "faces": ["top"], "depth": "8 in"} | EXTENT]},
         "condition.0.depth", "too deep"),
        ({"condition": [{"defect": "remaining", "width": "3 in", "depth": "7 in"} | EXTENT]},
         "condition.0.width", "deep"),
        ({"condition": [{"defect": "end split", "end": "left", "remaining": "8 in", "length": "4 in"}]},
         "condition.0.remaining", "too deep"),
        ({"condition": [{"defect": "end split", "end": "left", "remaining": "6 in", "length": "15 ft"}]},
         "condition.0.length", "too long"),
        ({"condition": [{"defect": "notch", "edge": "top", "depth": "1 in", "at": "14 ft", "length": "4 in"}]},
         "condition.0.at", "is off"),
        ({"condition": [{"defect": "notch", "edge": "top", "depth": "1 in", "at": "13 ft", "length": "1 ft"}]},
         "condition.0.at", "reaches off"),
        ({"condition": [{"defect": "hole", "at": "-1 ft", "diameter": "1 in", "height": "3 in"}]},
         "condition.0.at", "is off"),
        ({"condition": [{"defect": "hole", "at": "3 ft", "diameter": "2 in", "height": "1 in"}]},
         "condition.0.height", "breaks an edge"),
        ({"condition": [{"defect": "hole", "at": "3 ft", "diameter": "2 in", "height": "7 in"}]},
         "condition.0.height", "breaks an edge"),
        ({"size": {"nominal": "2x8"}, "condition": [{"defect": "notch", "edge": "top", "depth": "7 3/8 in"} | EXTENT]},
         "condition.0.depth", "too deep"),
        ({"size": {"diameter": "6 in"}, "condition": [{"defect": "notch", "edge": "top", "depth": "7 in"} | EXTENT]},
         "condition.0.depth", "too deep"),
        ({"condition": [{"defect": "hanger corrosion", "support": 3}]}, "condition.0.support", "no support"),
        ({"point_loads": [{"load": "400 lb", "at": "14 ft", "type": "dead"}]}, "point_loads.0.at", "is off"),
        ({"line_loads": [{"load": "40 plf", "from": "1 ft", "to": "14 ft", "type": "dead"}]}, "line_loads.0.to", "off"),
        ({"top_edge": ["4 ft", "20 ft"]}, "top_edge.1", "is off"),
        ({"stiffness_test": {"load": "400 lb", "at": "14 ft", "deflection": "0.1 in"}}, "stiffness_test.at", "is off"),
        ({"added": [{"part": "sister", "from": "0 ft", "to": "20 ft"}]}, "added.0.to", "is off"),
        ({"new_supports": [{"at": "20 ft"}]}, "new_supports.0.at", "is off"),
        ({"overhang_left": "13'5\""}, "overhang_left", "too long"),
        ({"overhang_right": "14 ft"}, "overhang_right", "too long"),
        ({"bearing": ["3 in", "3 in", "3 in"]}, "bearing", "too long"),
        ({"hold_down": [1, 3]}, "hold_down.1", "no support"),
        ({"orientation": "flat"}, "orientation", "contradicts"),
        ({"orientation": "edge", "size": {"width": "9 in", "depth": "2 in"}}, "orientation", "contradicts"),
        ({"bearing_on": "wood", "hanger": {"kind": "seat"}}, "bearing_on", "contradicts"),
    ],
)  # fmt: skip
def test_readings_that_cannot_stand_together_are_refused(change: dict[str, Any], field: str, problem: str) -> None:
    error = refused(change)
    assert error.field == field
    assert problem in error.problem
    assert len(record_problems("member", JOIST | change)) == 1


@pytest.mark.parametrize(
    "change",
    [
        {"orientation": "flat", "size": {"nominal": "2x8"}},
        {"orientation": "flat", "size": {"width": "9 in", "depth": "2 in"}},
        {"overhang_left": "2 ft", "point_loads": [{"load": "400 lb", "at": "-1'11\"", "type": "dead"}]},
        {"bearing": ["4 in", "4 in"], "condition": [{"defect": "decay", "face": "all", "at": "-3 in", "length": "9 in",
                                                     "depth": "1 in"}]},
        {"point_loads": [{"load": "400 lb", "at": "13'4\"", "type": "dead"}]},
        {"condition": [{"defect": "remaining", "width": "1 3/4 in", "depth": "7 3/4 in"} | EXTENT]},
    ],
)  # fmt: skip
def test_what_stands_together_is_read(change: dict[str, Any]) -> None:
    assert record_problems("member", JOIST | change) == []


def test_a_bay_gives_what_the_member_does_not_say_itself() -> None:
    bay = read_bay(
        {"spacing": "16 in", "spans": ["13'4\""], "dead": "12 psf", "proposed_use": "offices", "kind": "joist"}
    )
    member = read_member({"bay": "north", "spans": ["12 ft"], "size": JOIST["size"], "wood": JOIST["wood"]})
    whole = effective(member, bay)
    assert whole.missing() == []
    assert whole.bay == "north"
    assert whole.spans is not None
    assert whole.spans[0].value == 144.0
    assert whole.dead == bay.dead
    assert effective(member, None) is member


@pytest.mark.parametrize(("own", "bays"), [("tributary", "spacing"), ("spacing", "tributary")])
def test_a_members_own_width_stands_alone(own: str, bays: str) -> None:
    whole = effective(read_member({own: "4 ft"}), read_bay({bays: "2 ft"}))
    assert getattr(whole, own).value == 48.0
    assert getattr(whole, bays) is None


def test_a_half_given_size_or_wood_takes_the_rest_of_the_same_form_only() -> None:
    bay = read_bay(
        {
            "size": {"width": "1 5/8 in", "depth": "9 in", "plies": 2},
            "wood": {"species": "DF-L", "grade": "#2", "basis": "stamp"},
        }
    )
    half = effective(read_member({"size": {"depth": "7 in"}, "wood": {"grade": "#1"}}), bay)
    assert to_json(half) == {
        "size": {"width": "1 5/8 in", "depth": "7 in", "plies": 2},
        "wood": {"species": "DF-L", "grade": "#1"},
    }
    full = effective(read_member({"size": {"width": "2 in", "depth": "7 in"}, "wood": {"candidates": []}}), bay)
    assert to_json(full) == {"size": {"width": "2 in", "depth": "7 in"}, "wood": {"candidates": []}}


def test_a_defect_off_the_span_its_bay_gives_is_refused() -> None:
    member = read_member(
        {"condition": [{"defect": "notch", "edge": "top", "depth": "1 in", "at": "20 ft", "length": 4}]}
    )
    with pytest.raises(ReadingError) as caught:
        effective(member, read_bay({"spans": ["13 ft"]}))
    assert caught.value.field == "condition.0.at"
