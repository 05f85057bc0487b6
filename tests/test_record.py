"""The member record: every field read and written back as typed; what is missing; the whole survey."""

from __future__ import annotations

import json
from typing import Any

import pytest
from hypothesis import Phase, given, settings
from hypothesis import strategies as st

from assess import assess
from assess import quantities as q
from assess.reading import parse
from assess.record import (
    Member,
    read_bay,
    read_member,
    read_note,
    read_survey,
    record_problems,
    to_json,
)
from tests.record_forms import FIELDS, JOIST
from tests.strategies import members


def test_the_record_has_every_field_of_the_interface_and_no_other() -> None:
    assert set(Member.model_fields) == set(FIELDS)


@pytest.mark.parametrize("name", sorted(FIELDS))
def test_every_form_of_a_field_is_read_and_written_back_as_typed(name: str) -> None:
    for value in FIELDS[name]:
        assert to_json(read_member({name: value})) == {name: value}
        if name != "bay":
            assert to_json(read_bay({name: value})) == {name: value}


@settings(max_examples=50, derandomize=True, deadline=None)
@given(units=st.sampled_from(("US", "SI")), data=st.data())
def test_reading_a_member_and_writing_it_back_changes_nothing(units: str, data: st.DataObject) -> None:
    given_data = data.draw(members(units=units))
    text = json.dumps(given_data)
    member = read_member(json.loads(text), units)
    assert to_json(member) == given_data
    assert read_member(to_json(member), units) == member
    assert member.missing() == []


@pytest.fixture(scope="module")
def drawn() -> list[dict[str, Any]]:
    found: list[dict[str, Any]] = []

    @settings(max_examples=100, derandomize=True, database=None, deadline=None, phases=[Phase.generate])
    @given(members())
    def draw(data: dict[str, Any]) -> None:
        found.append(data)

    draw()
    assert len(found) >= 90  # nothing is filtered away
    return found


@pytest.mark.parametrize("name", sorted(FIELDS))
def test_members_are_drawn_with_every_field(drawn: list[dict[str, Any]], name: str) -> None:
    assert any(data.get(name) is not None for data in drawn)


def test_many_of_the_members_drawn_are_overstressed_and_many_are_not(drawn: list[dict[str, Any]]) -> None:
    findings = [assess(read_member(data)) for data in drawn]
    over = sum(finding.ratio is None or finding.ratio > 1.0 for finding in findings)
    assert len(findings) / 5 <= over <= len(findings) * 4 / 5
    assert sum(finding.verdict != "adequate" for finding in findings) >= len(findings) / 5
    # With every field filled most hold something not yet assessed, so that few can be called adequate.
    assert any(finding.verdict == "undetermined" and (finding.ratio or 9.0) <= 1.0 for finding in findings)


@pytest.mark.parametrize(
    ("lacking", "named"),
    [
        ("kind", "kind"),
        ("size", "size"),
        ("wood", "wood"),
        ("spans", "spans"),
        ("spacing", "spacing or tributary"),
        ("dead", "dead"),
        ("proposed_use", "proposed_use"),
    ],
)
def test_an_incomplete_member_is_kept_and_says_what_is_missing(lacking: str, named: str) -> None:
    assert read_member(JOIST).missing() == []
    assert read_member({name: value for name, value in JOIST.items() if name != lacking}).missing() == [named]


def test_parts_of_a_size_wood_or_hanger_are_missing_by_name() -> None:
    change = {"size": {"depth": "9 in"}, "wood": {"species": "HF"}, "hanger": {"kind": "fasteners"}}
    assert read_member(JOIST | change).missing() == ["size.width", "wood.grade", "hanger.de"]
    assert len(read_member({}).missing()) == 7


@pytest.mark.parametrize(("load", "missing"), [("30 psf", []), ("0 psf", ["proposed_use"])])
def test_a_roof_load_stands_in_for_a_use_where_there_is_any(load: str, missing: list[str]) -> None:
    rafter = {name: value for name, value in JOIST.items() if name != "proposed_use"} | {"kind": "rafter"}
    assert read_member(rafter | {"snow": load}).missing() == missing
    assert read_member(rafter | {"roof_live": load}).missing() == missing


def test_words_are_read_in_any_case_and_kept_in_one() -> None:
    member = read_member({"kind": " Ceiling  JOIST", "bearing_on": "Masonry", "limits": {"live": "l / 360"}})
    assert to_json(member) == {"kind": "ceiling joist", "bearing_on": "masonry", "limits": {"live": "L/360"}}


def test_a_record_cannot_be_changed_once_read() -> None:
    with pytest.raises(ValueError, match="frozen"):
        read_member(JOIST).kind = "beam"  # type: ignore[misc]


def test_bare_numbers_take_the_sessions_units() -> None:
    member = read_member({"size": {"width": 38, "depth": 190}, "spans": [4], "spacing": 400}, "SI")
    assert member.size is not None
    assert member.size.depth is not None
    assert member.spans is not None
    assert member.size.depth.value == pytest.approx(190 / 25.4)
    assert member.spans[0].value == pytest.approx(4 / 0.0254)


def test_a_note_is_text_and_a_survey_has_its_own_fields() -> None:
    assert read_note({"text": "lower floor under water"}).text == "lower floor under water"
    data = {
        "tolerances": {"size": "1/32 in", "span": "1/4 in", "moisture": "3 %"},
        "stock": [
            {"size": {"nominal": "2x8"}, "wood": {"species": "SPF", "grade": "#2"}, "longest": "16 ft"},
            {"steel": {"thickness": "1/4 in", "depth": "7 in"}, "longest": "10 ft"},
        ],
        "site_limits": {"depth": "9 in", "longest": "12 ft", "jacking": True, "side": "left", "wet": False},
        "codes": {"NDS": "2018", "loads": "ASCE 7-16", "building": "IBC 2021"},
    }
    survey = read_survey(data)
    assert to_json(survey) == data
    assert survey.tolerance(parse("7 1/2 in", q.SIZE)) == 1 / 32
    assert survey.tolerance(parse("7 1/2 in ± 1/8", q.SIZE)) == 1 / 8
    assert survey.tolerance(parse("14 %", q.MOISTURE)) == 3.0
    assert survey.tolerance(parse("16 in", q.SPACING)) == q.SPACING.default_tolerance


@pytest.mark.parametrize(
    ("data", "field"),
    [
        ({"tolerances": {"siz": "1/16 in"}}, "tolerances.siz"),
        ({"tolerances": {"size": "12 in"}}, "tolerances.size"),
        ({"tolerances": {"size": "-1 in"}}, "tolerances.size"),
        ({"stock": [{"longest": "12 ft"}]}, "stock.0.size"),
        ({"site_limits": {"side": "top"}}, "site_limits.side"),
        ({"codes": {"nds": "2018"}}, "codes.nds"),
    ],
)
def test_a_bad_survey_is_refused_by_field(data: dict[str, Any], field: str) -> None:
    assert [error.field for error in record_problems("survey", data)] == [field]
