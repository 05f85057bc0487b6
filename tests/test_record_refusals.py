"""What a record must not hold: unknown names, wrong values, contradictions, hostile texts and numbers."""

from __future__ import annotations

from typing import Any, get_args

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from assess import quantities as q
from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.reading import Reading, parse
from assess.record import (
    Fields,
    read_member,
    record_problems,
    to_json,
)
from assess.record_lists import check_plain
from tests.hostile_texts import HOSTILE, bad_texts
from tests.record_forms import EXTENT, JOIST
from tests.stopwatch import within


def refused(change: dict[str, Any], units: str = "US") -> ReadingError:
    with pytest.raises(ReadingError) as caught:
        read_member(JOIST | change, units)
    assert "\n" not in caught.value.line()
    return caught.value


@pytest.mark.parametrize(
    ("change", "field", "said"),
    [
        # nothing misspelt is ever silently ignored
        ({"spacng": "16 in"}, "spacng", "spacing (nearest)"),
        ({"kind": "joyst"}, "kind", "joist (nearest)"),
        ({"size": {"width": "2 in", "depht": "9 in"}}, "size.depht", "depth (nearest)"),
        ({"wood": {"species": "Duglas fir", "grade": "No. 2"}}, "wood.species", "Douglas Fir"),
        ({"wood": {"species": "DF-L", "grade": "No. 9"}}, "wood.grade", "No. "),
        ({"wood": {"candidates": [{"species": "DF-L", "grade": "#2"}, {"species": "x", "grade": "#2"}]}},
         "wood.candidates.1.species", ""),
        ({"wood": {"species": "DF-L", "grade": "#2", "basis": "guessed"}}, "wood.basis", "assumed"),
        ({"proposed_use": "ofices"}, "proposed_use", "offices"),
        ({"dead": [{"layer": "hardwod flooring"}]}, "dead.0.layer", "hardwood flooring"),
        ({"condition": [{"defect": "knotch"} | EXTENT]}, "condition.0.defect", "notch (nearest)"),
        ({"condition": [{"defect": "notch", "edge": "tip", "depth": "1 in"} | EXTENT]}, "condition.0.edge", "top"),
        ({"condition": [{"defect": "notch", "edge": "top"} | EXTENT]}, "condition.0.depth", "a value"),
        ({"condition": [{"edge": "top"}]}, "condition.0.defect", "notch"),
        ({"size": {"nominal": "2x9"}}, "size.nominal", ""),
        ({"limits": {"live": "L/0"}}, "limits.live", "L/360"),
        ({"limits": {"live": 360}}, "limits.live", "L/360"),
        # readings
        ({"size": {"width": "40 psf", "depth": "9 in"}}, "size.width", "a size of"),
        ({"spans": ["13'4\"", "x"]}, "spans.1", "a span of"),
        ({"spans": "13'4\""}, "spans", "a list of 1 to 5 readings"),
        ({"top_edge": "braced"}, "top_edge", "held"),
        ({"top_edge": ["4 ft", "x"]}, "top_edge.1", "a place"),
        ({"moisture": "damp"}, "moisture", "wet"),
        ({"moisture": "900 %"}, "moisture", "0 to 200 %"),
        # forms that exclude each other
        ({"tributary": "4 ft"}, "tributary", "not both"),
        ({"size": {"width": "2 in", "depth": "9 in", "diameter": "9 in"}}, "size.diameter", "one of"),
        ({"size": {"width": "2 in", "nominal": "2x8"}}, "size.nominal", "one of"),
        ({"wood": {"species": "DF-L", "grade": "#2", "candidates": []}}, "wood.candidates", "one of"),
        ({"wood": {"values": {"Fb": 1, "Fv": 1, "Fc_perp": 1, "E": 1e6}}}, "wood.source", "text"),
        ({"added": [{"part": "plate", "steel": {"thickness": "1/4 in", "depth": "7 in"}, "size": {"nominal": "2x8"}}]},
         "added.0.steel", "steel alone"),
        # values that contradict themselves
        ({"point_loads": [{"load": "-5 lb", "at": "2 ft", "type": "live"}]}, "point_loads.0.load", "0 or"),
        ({"line_loads": [{"load": "5 plf", "from": "4 ft", "to": "3 ft", "type": "live"}]},
         "line_loads.0.to", "beyond"),
        ({"stands_for": {"count": 5, "measured": 6}}, "stands_for.measured", "at most the count"),
        ({"concentrated_on": ["30 in"]}, "concentrated_on", "2 readings"),
        # limits of length
        ({"spans": ["3 ft"] * 6}, "spans", "1 to 5"),
        ({"spans": []}, "spans", "1 to 5"),
        ({"condition": [{"defect": "check"}] * 101}, "condition", "at most 100"),
        ({"point_loads": [{"load": 1, "at": 1, "type": "live"}] * 101}, "point_loads", "at most 100"),
        ({"remarks": "x" * 10_001}, "remarks", "10000 characters"),
        ({"photos": ["x" * 256]}, "photos.0", "255 characters"),
        ({"alike": 0}, "alike", "1 to 1000"),
        ({"size": {"width": "2 in", "depth": "9 in", "plies": 100}}, "size.plies", "1 to 8"),
    ],
)  # fmt: skip
def test_a_bad_record_is_refused_by_field_with_what_is_accepted(change: dict[str, Any], field: str, said: str) -> None:
    error = refused(change)
    assert error.field == field
    assert said in error.accepted


@pytest.mark.parametrize("bad", [True, None, {}, [[]], float("nan"), float("inf"), 10**400, [None]])
@pytest.mark.parametrize("name", ["spacing", "snow", "sag", "moisture", "temperature"])
def test_what_is_no_reading_is_refused_where_one_belongs(name: str, bad: object) -> None:
    with pytest.raises(ReadingError) as caught:
        read_member({name: bad})
    assert caught.value.field.split(".")[0] == name


@pytest.mark.parametrize("bad", ["true", 1, 0, None, [], {}])
@pytest.mark.parametrize("name", ["ends_held", "incised", "ties_rafters", "reduce"])
def test_only_true_and_false_are_flags(name: str, bad: object) -> None:
    assert refused({name: bad}).accepted == "true or false"


@pytest.mark.parametrize("bad", [True, "3", 3.0, None, [3], 10**30])
def test_only_a_whole_number_is_a_count(bad: object) -> None:
    assert refused({"alike": bad}).field == "alike"


def test_every_problem_of_a_record_is_named_not_only_the_first() -> None:
    data = {
        "kind": "joyst",
        "size": {"width": "x", "depth": "y"},
        "spans": ["13'4\"", "z", "-1"],
        "condition": [{"defect": "check"}, {"defect": "hole", "at": "q", "diameter": "r", "height": "3 in"}],
        "colour": "red",
    }
    fields = [error.field for error in record_problems("member", data)]
    assert fields == [
        "kind", "size.width", "size.depth", "spans.1", "spans.2", "condition.1.at", "condition.1.diameter", "colour",
    ]  # fmt: skip


@pytest.mark.parametrize("data", [None, [], "x", 3, True])
def test_a_record_that_is_no_object_is_refused(data: object) -> None:
    assert [error.accepted for error in record_problems("member", data)] == ["an object"]


def plain_readings(model: type, prefix: str = "") -> list[tuple[str, Quantity]]:
    """Paths of all fields of a record that hold one reading, and what each measures."""
    found = []
    for name, field in model.model_fields.items():  # type: ignore[attr-defined]
        if Reading in get_args(field.annotation) or field.annotation is Reading:
            found.append(field.alias or name)
    return [(prefix + name, q.SIZE) for name in found]


SINGLE = sorted(name for name, _ in plain_readings(Fields))


@settings(max_examples=200, derandomize=True, deadline=None)
@given(name=st.sampled_from(SINGLE), typed=bad_texts(), units=st.sampled_from(("US", "SI")))
def test_any_text_in_any_reading_field_is_kept_verbatim_or_refused(name: str, typed: str, units: str) -> None:
    parse("1 m", q.SPAN)
    with within(0.05):
        errors = record_problems("member", {name: typed}, units)
    if errors:
        assert errors[0].field == name
        assert "\n" not in errors[0].line()
    else:
        assert to_json(read_member({name: typed}, units)) == {name: typed}


@pytest.mark.parametrize("name", ["where", "remarks", "bay"])
def test_free_text_is_kept_verbatim_or_refused_by_length_or_half_characters(name: str) -> None:
    for typed in HOSTILE:
        errors = record_problems("member", {name: typed})
        if errors:
            assert len(typed) > 100 or "\ud800" in typed
            errors[0].line().encode()
        else:
            assert to_json(read_member({name: typed})) == {name: typed}


@pytest.mark.parametrize(
    "free", [{"a": float("nan")}, {"a": [float("inf")]}, {"a": 10**400}, {1: 2}, {"a": object()}, {"a": "\ud800"}]
)
def test_free_data_must_be_what_a_file_can_hold(free: Any) -> None:
    assert refused({"identified": free}).field.startswith("identified")


def test_free_data_nested_without_end_or_beyond_measure_is_refused() -> None:
    deep: Any = "x"
    for _ in range(100_000):
        deep = [deep]
    assert "deep" in refused({"identified": {"a": deep}}).accepted
    assert "values" in refused({"identified": {"a": [1] * 30_000}}).accepted
    assert "characters" in refused({"identified": {"a": "x" * 200_000}}).accepted
    check_plain({"a": [1, 2.5, None, True, {"b": "x"}]})


def test_ten_thousand_spans_or_defects_are_refused_at_once() -> None:
    with within(1.0):
        assert refused({"spans": ["3 ft"] * 10_000}).field == "spans"
        assert refused({"condition": [{"defect": "check"}] * 10_000}).field == "condition"
