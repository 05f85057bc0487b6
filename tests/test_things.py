"""The list of heavy things: complete rows, weights within their ranges, and entries the form can read."""

from __future__ import annotations

import pytest

from assess.errors import ReadingError
from assess.record import record_problems
from assess.things import all_things, thing_named
from tui.field_shown import choices
from tui.field_text import to_raw
from tui.fields import BY_KEY


def test_rows_are_complete_and_within_their_ranges() -> None:
    for thing in all_things():
        assert 0 < thing.low_lb <= thing.load_lb <= thing.high_lb
        assert thing.source
        assert thing.footprint
        assert thing.why
        assert thing_named(thing.name.upper()) is thing


def test_an_unknown_thing_is_refused_with_the_nearest() -> None:
    with pytest.raises(ReadingError, match="upright piano"):
        thing_named("uprigth piano")


def test_every_suggested_load_reads_once_its_place_is_typed() -> None:
    field = BY_KEY["point_loads"]
    suggested = choices(field, {})
    assert len(suggested) == len(all_things())
    for text, thing in zip(suggested, all_things(), strict=True):
        raw = to_raw(text.replace("?", "5 ft"), field)
        assert raw == [{"name": thing.name, "load": f"{thing.load_lb:g} lb", "at": "5 ft", "type": thing.load_type}]
        assert record_problems("member", {"spans": ["12 ft"], "point_loads": raw}) == []
        with pytest.raises(ReadingError):
            _all(text, field)


def _all(text: str, field: object) -> None:
    """Read the text as the form does, its place still open."""
    raw = to_raw(text, field)  # type: ignore[arg-type]
    found = record_problems("member", {"spans": ["12 ft"], "point_loads": raw})
    if found:
        raise found[0]
