"""One field of a record set by its path."""

from __future__ import annotations

import json
from typing import Any

import pytest

from assess.errors import ReadingError
from assess.record import (
    KINDS_OF_RECORD,
    record_problems,
)
from assess.record_set import allowed_paths, apply_set
from tests.record_forms import FIELDS, JOIST


def test_a_field_is_set_and_the_record_given_is_left_alone() -> None:
    before = json.dumps(JOIST)
    changed = apply_set("member", JOIST, ["size", "depth"], "7 3/8 in")
    assert changed["size"] == {"width": "1 5/8 in", "depth": "7 3/8 in"}
    assert json.dumps(JOIST) == before
    assert apply_set("member", {}, ["wood", "values", "G"], 0.5) == {"wood": {"values": {"G": 0.5}}}


def test_null_restores_the_default() -> None:
    assert "spacing" not in apply_set("member", JOIST, ["spacing"], None)
    assert apply_set("member", {"limits": {"live": "L/480"}}, ["limits", "live"], None) == {}
    assert apply_set("member", {}, ["limits", "live"], None) == {}


def test_lists_are_set_whole() -> None:
    assert apply_set("member", JOIST, ["spans"], ["10 ft", "9 ft"])["spans"] == ["10 ft", "9 ft"]
    with pytest.raises(ReadingError):
        apply_set("member", JOIST, ["spans", "0"], "10 ft")


@pytest.mark.parametrize(
    ("data", "path", "value", "left"),
    [
        ({"spacing": "16 in"}, ["tributary"], "4 ft", {"tributary": "4 ft"}),
        ({"tributary": "4 ft"}, ["spacing"], "16 in", {"spacing": "16 in"}),
        ({"size": {"width": "2 in", "depth": "9 in", "plies": 2}}, ["size", "diameter"], "8 in",
         {"size": {"plies": 2, "diameter": "8 in"}}),
        ({"size": {"nominal": "2x8", "dressing": "current"}}, ["size", "depth"], "7 in", {"size": {"depth": "7 in"}}),
        ({"size": {"width": "2 in", "depth": "9 in"}}, ["size", "nominal"], "2x8", {"size": {"nominal": "2x8"}}),
        ({"wood": {"species": "HF", "grade": "#2", "basis": "stamp", "stamp": "No2 HF"}}, ["wood", "candidates"], [],
         {"wood": {"stamp": "No2 HF", "candidates": []}}),
        ({"wood": {"candidates": [], "stamp": "x"}}, ["wood", "grade"], "#2", {"wood": {"stamp": "x", "grade": "#2"}}),
        ({"wood": {"values": {"G": 0.5}, "source": "x"}}, ["wood", "species"], "HF", {"wood": {"species": "HF"}}),
        # what only goes with a form drives nothing out
        ({"wood": {"candidates": []}}, ["wood", "basis"], "assumed", {"wood": {"candidates": [], "basis": "assumed"}}),
        ({"size": {"width": "2 in"}}, ["size", "dressing"], "current",
         {"size": {"width": "2 in", "dressing": "current"}}),
        # taking one away brings nothing back
        ({"spacing": "16 in"}, ["tributary"], None, {"spacing": "16 in"}),
    ],
)  # fmt: skip
def test_setting_one_of_an_exclusive_pair_removes_the_other(
    data: dict[str, Any], path: list[str], value: Any, left: dict[str, Any]
) -> None:
    assert apply_set("member", data, path, value) == left


@pytest.mark.parametrize(
    "path",
    [
        ["__class__"], ["size", "__class__"], ["..", "x"], [-1], [1_000_000_000], ["__proto__"], ["size.depth"], [],
        [""],
        ["size", "depth", "x"], ["size", "depth", "x", "y"], ["condition", 0, "depth"], ["spans", 0], "size", None, {},
        [None], [["size"]], ["model_fields"], ["missing"], ["sise", "depth"], ["x" * 10_000], [True], ["kind", "x"],
    ],
)  # fmt: skip
@pytest.mark.parametrize("value", ["9 in", None])
def test_no_path_outside_the_fixed_list_can_be_set(path: object, value: object) -> None:
    with pytest.raises(ReadingError) as caught:
        apply_set("member", JOIST, path, value)
    assert caught.value.field == "path"
    assert len(caught.value.line()) < 400


def test_a_misspelt_path_is_answered_with_the_nearest() -> None:
    with pytest.raises(ReadingError, match=r"size\.depth"):
        apply_set("member", JOIST, ["size", "dept"], "9 in")


@pytest.mark.parametrize("value", ["40 psf", None])
def test_no_path_leads_through_a_single_value(value: object) -> None:
    for data, path in (({"present_use": "offices"}, ["present_use", "live"]), ({"sag": "1 in"}, ["sag", "left"])):
        with pytest.raises(ReadingError, match="single value"):
            apply_set("member", data, path, value)


def test_every_field_of_every_kind_can_be_set() -> None:
    for kind, model in KINDS_OF_RECORD.items():
        assert set(model.model_fields) <= allowed_paths(kind)
    for name, forms in FIELDS.items():
        for form in forms:
            changed = apply_set("member", {}, [name], form)
            assert record_problems("member", changed) == []
    assert allowed_paths("note") == {"text"}
    assert "tolerances.size" in allowed_paths("survey")
