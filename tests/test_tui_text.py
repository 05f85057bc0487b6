"""What is typed into the form and shown of it: text to record and back, cleaned, undone; figures that fit."""

from __future__ import annotations

import copy
import doctest
import importlib
import pkgutil
import unicodedata
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from rich.cells import cell_len

import tui
from assess.errors import ReadingError
from assess.log.read import read_session
from assess.record import Member, read_member, record_problems
from assess.record_set import allowed_paths, apply_set
from assess.survey import assessed, survey
from assess.whole import study
from tests.hostile_texts import hostile_texts
from tests.screens import JOIST
from tui.answer import answer, checks, listed
from tui.clean import MOST_MARKS, clean
from tui.commands.demo import SURVEY
from tui.elevation import FINE, PLAIN, elevation
from tui.field_shown import choices, refusal, understood
from tui.field_text import raw_of, to_raw, to_text, whole
from tui.fields import BY_KEY, FORM, taken
from tui.screens.rows import fit
from tui.sheet import lines, problem_of
from tui.undo import inverse

DEMO = read_session(SURVEY)
STATE, _ = survey(DEMO)
# Texts a person may type, by line: what the record then holds.
TYPED: list[tuple[str, str, Any]] = [
    ("size.width", "1 5/8; 1 9/16", ["1 5/8", "1 9/16"]),
    ("spans", "13'4\"; 9 ft", ["13'4\"", "9 ft"]),
    ("stands_for", "5 of 22", {"count": 22, "measured": 5}),
    ("ends_held", "no", False),
    ("alike", "3", 3),
    ("hold_down", "1; 3", [1, 3]),
    ("partitions", "yes", True),
    ("partitions", "20 psf", "20 psf"),
    ("top_edge", "4 ft", "4 ft"),
    ("top_edge", "4 ft; 8 ft", ["4 ft", "8 ft"]),
    ("dead", "12", "12"),
    ("dead", "12 psf; 14 psf", ["12 psf", "14 psf"]),
    ("dead", "gypsum board 1/2 in + tile on mortar bed 16 psf + 3 psf",
     [{"layer": "gypsum board", "thickness": "1/2 in"}, {"layer": "tile on mortar bed", "load": "16 psf"},
      {"layer": "as read", "load": "3 psf"}]),
    ("proposed_use", "offices", "offices"),
    ("proposed_use", "50 psf, 2000 lb", {"live": "50 psf", "concentrated": "2000 lb"}),
    ("proposed_use", "walkway, as typed: 60 psf", {"live": "60 psf", "name": "walkway, as typed"}),
    ("point_loads", "stove 300 lb at 4 ft live; 2 kN at 1.2 m roof live",
     [{"name": "stove", "load": "300 lb", "at": "4 ft", "type": "live"},
      {"load": "2 kN", "at": "1.2 m", "type": "roof live"}]),
    ("line_loads", "wall 120 plf from 0 ft to 4 ft dead",
     [{"name": "wall", "load": "120 plf", "from": "0 ft", "to": "4 ft", "type": "dead"}]),
    ("condition", "end split left remaining 5 in length 1 ft; hole at 3 ft diameter 1 in height 4 in new work",
     [{"defect": "end split", "end": "left", "remaining": "5 in", "length": "1 ft"},
      {"defect": "hole", "at": "3 ft", "diameter": "1 in", "height": "4 in", "new_work": True}]),
    ("condition", "char top bottom at 0 ft length 1 ft depth 1/4 in; hanger corrosion support 1",
     [{"defect": "char", "faces": ["top", "bottom"], "at": "0 ft", "length": "1 ft", "depth": "1/4 in"},
      {"defect": "hanger corrosion", "support": 1}]),
    ("wood.candidates", "hem-fir, no 2; spf, no 2",
     [{"species": "hem-fir", "grade": "no 2"}, {"species": "spf", "grade": "no 2"}]),
    ("wood.values", "Fb 1200 psi, Fv 95 psi, Fc_perp 400 psi, E 1400000 psi, G 0.45",
     {"Fb": "1200 psi", "Fv": "95 psi", "Fc_perp": "400 psi", "E": "1400000 psi", "G": 0.45}),
    ("remarks", "a\n b ", "a\n b "),
    ("where", "  ", None),
]  # fmt: skip


@pytest.mark.parametrize(("key", "words", "raw"), TYPED, ids=[f"{key}-{n}" for n, (key, _, _) in enumerate(TYPED)])
def test_a_line_becomes_the_record_and_comes_back(key: str, words: str, raw: Any) -> None:
    field = BY_KEY[key]
    assert to_raw(words, field) == raw
    assert to_raw(to_text(raw, field), field) == raw
    assert whole(raw, field)


@pytest.mark.parametrize("name", STATE.members)
def test_the_form_says_all_there_is_of_the_built_in_survey(name: str) -> None:
    data = STATE.members[name]
    rebuilt: dict[str, Any] = {}
    for field in FORM:
        raw = raw_of(data, field)
        assert whole(raw, field), field.key
        if raw is not None:
            rebuilt = apply_set("member", rebuilt, list(field.path), to_raw(to_text(raw, field), field))
    assert rebuilt == data


def test_every_line_is_a_field_of_the_record_and_fits_its_column() -> None:
    assert {field.key for field in FORM} <= allowed_paths("member")
    assert all(len(field.label) <= 11 for field in FORM)
    assert len({field.label for field in FORM}) == len(FORM)
    for field in FORM:
        data = {"size": {"nominal": "2x8"}} if field.key == "size.dressing" else {}
        for word in choices(field, {}):
            # What is offered is understood, once a place is typed over the question mark of a load.
            assert problem_of(data, field, word.replace(" ? ", " 4 ft "), "US") is None


def test_what_is_taken_is_what_the_engine_takes() -> None:
    for kind in ("joist", "beam", "header", "rafter", "ceiling joist", "deck joist"):
        member = Member.of(**(JOIST | {"kind": kind, "snow": "20 psf"}))
        finding = study(member, 4)[0]
        said = " ".join(finding.assumptions)
        held = taken("top_edge", kind) == "held"
        assert ("top edge held along its length" if held else "top edge held at the ends only") in said
        assert f"{taken('moisture', kind)} service taken" in said
        assert f"deflection limits {taken('limits.live', kind)} live, {taken('limits.total', kind)} total" in said
        assert f"bearing of {taken('bearing', kind)} taken" in said


@settings(derandomize=True, max_examples=150, deadline=None)
@given(st.sampled_from(FORM), st.one_of(st.sampled_from(hostile_texts()), st.text(max_size=60)))
def test_any_text_in_any_line_is_understood_or_refused_in_words(field: Any, words: str) -> None:
    error = problem_of(JOIST, field, words, "US")
    if error is not None:
        said = refusal(error, field)
        assert said == clean(said)
        assert "\n" not in said
        return
    data = apply_set("member", JOIST, list(field.path), to_raw(words, field))
    assert record_problems("member", data) == []
    for line in lines(data, read_member(data), {}, "US", True):
        assert line.text == clean(line.text, longest=20_000)
        assert line.echo == clean(line.echo, longest=20_000)


@settings(derandomize=True, max_examples=150, deadline=None)
@given(st.sampled_from(list(STATE.members)), st.sampled_from(FORM), st.sampled_from(list(STATE.members)))
def test_an_undo_leads_back_in_one_line(name: str, field: Any, other: str) -> None:
    before = STATE.members[name]
    event = {"set": "member", "id": name, "path": list(field.path), "data": raw_of(STATE.members[other], field)}
    after = apply_set("member", before, event["path"], event["data"])
    back = inverse(event, copy.deepcopy(before))
    if "put" in back:
        assert back["data"] == before
    else:
        assert apply_set("member", after, back["path"], back["data"]) == before


def test_an_undo_of_a_whole_record() -> None:
    put = {"put": "member", "id": "J", "data": {}}
    assert inverse(put, None) == {"drop": "member", "id": "J"}
    assert inverse(put, JOIST) == {"put": "member", "id": "J", "data": JOIST}
    assert inverse({"drop": "member", "id": "J"}, JOIST) == {"put": "member", "id": "J", "data": JOIST}


@pytest.mark.parametrize("words", hostile_texts(), ids=lambda words: ascii(words)[:30])
def test_a_cleaned_text_is_harmless_and_its_own(words: str) -> None:
    for several in (False, True):
        shown = clean(words, lines=several)
        bad = [c for c in shown if unicodedata.category(c) in ("Cc", "Cf", "Cs") and not (several and c in "\n\t")]
        assert not bad
        marks = 0
        for char in shown:
            marks = marks + 1 if unicodedata.combining(char) else 0
            assert marks <= MOST_MARKS
        assert len(shown) <= 2_000 * 8 + 40
        if words.isascii() and words.isprintable() and len(words) <= 2_000:
            assert shown == words  # verbatim, every character
    for width in (0, 1, 2, 7, 40):
        assert cell_len(fit(clean(words), width)) == width


@pytest.mark.parametrize("name", STATE.members)
@pytest.mark.parametrize("width", [24, 40, 76, 138])
def test_the_drawing_fits_and_shows_supports_and_spans(name: str, width: int) -> None:
    item = assessed(STATE, name)
    assert item.finding is not None
    assert item.member is not None
    assert item.finding.governs is not None
    uses = study(item.member, 120)[1]
    for plain in (False, True):
        pen = PLAIN if plain else FINE
        drawn = elevation(item.member, width, uses, item.finding.governs.at_in, plain)
        assert all(cell_len(line) <= width for line in drawn)
        assert drawn[2].count(pen.support) == len(item.member.spans or ()) + 1
        if plain:
            assert "".join(drawn).isascii()
        if width >= 76 and item.finding.governs.at_in is not None:
            assert f"{(item.member.spans or ())[0].shown()} " in drawn[3]
            assert "worst at" in drawn[5]


def test_the_drawing_of_two_spans_an_overhang_and_loads() -> None:
    member = Member.of(**(JOIST | {
        "spans": ["10 ft", "5 ft"], "overhang_right": "2 ft",
        "point_loads": [{"load": "200 lb", "at": "5 ft", "type": "dead"}],
        "line_loads": [{"load": "50 plf", "from": "10 ft", "to": "15 ft", "type": "dead"}],
        "condition": [{"defect": "notch", "edge": "bottom", "at": "0 ft", "length": "6 in", "depth": "1 in"}],
    }))  # fmt: skip
    loads, beam, feet, spans = elevation(member, 36, (), None)
    # 17 ft over 33 columns: supports at columns 1, 20 and 30, the point load at 11
    assert feet == " △" + " " * 18 + "△" + " " * 9 + "△"
    assert loads == " " + "╷" * 10 + "▼" + "╷" * 8 + "┃" * 11 + "╷" * 4
    assert beam == " ▒▒" + "━" * 32
    assert spans == " ├── 10 ft clear ───├─ 5 ft ──┤"
    assert elevation(Member(), 80, (), None) == []


def test_the_answer_never_says_safe() -> None:
    for name in STATE.members:
        item = assessed(STATE, name)
        assert item.finding is not None
        words = " ".join(text for text, _ in [*answer(item, None), *listed(item.finding)]).lower()
        assert not {"safe", "ok", "passes"} & set(words.split())
        assert item.finding.verdict in words
        assert item.finding.leading.lower() in words
        assert checks(item.finding)
        assert answer(item, "depth") == [("! no answer: depth is not understood", "refused")]


def test_the_examples_in_the_docstrings() -> None:
    tried = 0
    for found in pkgutil.walk_packages(tui.__path__, "tui."):
        result = doctest.testmod(importlib.import_module(found.name))
        assert not result.failed, found.name
        tried += result.attempted
    assert tried > 10


def test_texts_that_cannot_be_taken_apart_say_what_is_accepted() -> None:
    for key, words in (
        ("size.plies", "two"), ("ends_held", "maybe"), ("stands_for", "22"), ("wood.candidates", "hem-fir"),
        ("point_loads", "stove 300 lb"), ("line_loads", "x"), ("condition", "crack"), ("condition", "hole top at 3 ft"),
        ("wood.values", "Fb 1200 psi, Fb 1300 psi"), ("wood.values", "G heavy"), ("hold_down", "left"),
    ):  # fmt: skip
        with pytest.raises(ReadingError) as caught:
            to_raw(words, BY_KEY[key])
        assert "accepted: " in str(caught.value)


def test_several_readings_show_their_mean() -> None:
    member = Member.of(size={"width": ["1 5/8 in", "1 9/16 in"]})
    assert understood(member, BY_KEY["size.width"]) == "mean 1.594 in, spread 1/16 in"
