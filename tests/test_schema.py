"""The published JSON Schema of a session line, read by a library of others."""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

import jsonschema
import pytest
from hypothesis import given, settings

from assess.schema import session_line_schema
from tests.record_forms import FIELDS, JOIST
from tests.strategies import members

DEMO = Path(__file__).resolve().parent.parent / "tui" / "data" / "demo.survey"
HEADER = {"willcarry": 1, "site": "x", "inspector": "y", "opened": "2026-03-02T08:40:00Z", "units": "US"}
STAMP = {"n": 1, "from": "k3f9x7q2m4ab", "at": "2026-03-02T08:52:11Z", "by": "T2", "crc": "5d1c0a77"}


@pytest.fixture(scope="module")
def schema() -> jsonschema.Draft202012Validator:
    made = session_line_schema()
    jsonschema.Draft202012Validator.check_schema(made)
    return jsonschema.Draft202012Validator(json.loads(json.dumps(made)))


@pytest.mark.parametrize(
    "line",
    [
        HEADER,
        {"willcarry": 1},
        {"put": "member", "id": "N-07", "data": JOIST} | STAMP,
        {"put": "member", "id": "N-07", "data": {}},
        {"put": "bay", "id": "north bay", "data": {"spacing": "16 in", "spans": ["13'4\""]}},
        {"put": "note", "id": "stair-hall", "data": {"text": "x"}},
        {"put": "survey", "id": "survey", "data": {"tolerances": {"size": "1/16 in"}}},
        {"put": "finding", "id": "N-07", "data": {"verdict": "adequate"}},
        {"set": "member", "id": "N-07", "path": ["size", "depth"], "data": "7 1/2 in ± 1/8", "n": 2},
        {"set": "member", "id": "N-07", "path": ["spacing"], "data": None},
        {"drop": "member", "id": "N-03", "n": 9},
        {"conflict": "member", "id": "N-03", "path": ["spacing"], "data": "16 in", "other": "24 in"},
    ],
)
def test_a_sound_line_fits_the_schema(schema: jsonschema.Draft202012Validator, line: dict[str, Any]) -> None:
    schema.validate(line)


@pytest.mark.parametrize("name", sorted(FIELDS))
def test_every_form_of_a_field_fits_the_schema(schema: jsonschema.Draft202012Validator, name: str) -> None:
    for value in FIELDS[name]:
        schema.validate({"put": "member", "id": "a", "data": {name: value}})
        schema.validate({"set": "member", "id": "a", "path": [name], "data": value})


def test_every_line_of_the_demo_survey_fits_the_schema(schema: jsonschema.Draft202012Validator) -> None:
    lines = DEMO.read_text(encoding="utf-8").splitlines()
    assert len(lines) > 10
    for line in lines:
        schema.validate(json.loads(line))


@settings(max_examples=25, derandomize=True, deadline=None)
@given(data=members())
def test_every_member_drawn_fits_the_schema(schema: jsonschema.Draft202012Validator, data: dict[str, Any]) -> None:
    schema.validate({"put": "member", "id": "a", "data": data})


def put(**data: Any) -> dict[str, Any]:
    return {"put": "member", "id": "a", "data": data}


@pytest.mark.parametrize(
    "line",
    [
        {},
        [],
        {"willcarry": 2},
        HEADER | {"units": "metric"},
        HEADER | {"colour": "red"},
        {"put": "member", "id": "a"},
        {"put": "member", "id": "", "data": {}},
        {"put": "member", "id": " ", "data": {}},
        {"put": "member", "id": "x" * 10_000, "data": {}},
        {"put": "window", "id": "a", "data": {}},
        {"put": "member", "set": "member", "id": "a", "data": {}},
        {"put": "member", "id": "a", "data": {}, "n": -1},
        {"put": "member", "id": "a", "data": {}, "crc": "5D1C0A77"},
        {"put": "note", "id": "a", "data": {}},
        {"set": "member", "id": "a", "path": ["__class__"], "data": 1},
        {"set": "member", "id": "a", "path": ["spans", 0], "data": 1},
        {"set": "finding", "id": "a", "path": ["verdict"], "data": 1},
        {"drop": "member", "id": "a", "data": {}},
        put(spacng="16 in"),
        put(kind="joyst"),
        put(spacing=True),
        put(spacing=None),
        put(spacing={}),
        put(spacing=[]),
        put(spacing=""),
        put(spans=["3 ft"] * 6),
        put(spans="13 ft"),
        put(size={"depht": "9 in"}),
        put(alike=0),
        put(ends_held="true"),
        put(limits={"live": 360}),
        put(condition=[{"defect": "knotch"}]),
        put(condition=[{"defect": "notch", "edge": "top"}]),
        put(point_loads=[{"load": "420 lb", "at": "6 ft", "type": "heavy"}]),
    ],
)
def test_a_bad_line_does_not_fit_the_schema(schema: jsonschema.Draft202012Validator, line: Any) -> None:
    with pytest.raises(jsonschema.ValidationError):
        schema.validate(line)
