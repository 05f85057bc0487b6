"""Hostile texts (T1 to T10) in every free-text field, in every screen: shown clean and verbatim, and nothing else."""

from __future__ import annotations

import json
import unicodedata
from pathlib import Path
from typing import Any

import pytest
from textual.events import Paste
from textual.pilot import Pilot

from assess.errors import ReadingError
from assess.log.fold import check_id
from tests.hostile_texts import ALIKE, CONTROL, INVISIBLE, LONG, MARKUP
from tests.screens import JOIST, NARROW, member, on_disk, opened, text, until
from tui.app import Willcarry
from tui.clean import clean
from tui.field_text import raw_of
from tui.fields import BY_KEY
from tui.screens.line import Line
from tui.screens.note import NoteArea, NoteScreen
from tui.screens.page import PageScreen
from tui.screens.pick import PickScreen

TEXTS = [words[:9_000] for words in dict.fromkeys(MARKUP + CONTROL + INVISIBLE + LONG + ALIKE) if words != "\ud800"]
EMPTY = {"kind": "joist", "spans": ["12 ft"]}


def with_text(words: str) -> dict[str, Any]:
    """A member with a text in every field that takes any."""
    short = words[:200]
    return JOIST | {
        "where": words,
        "remarks": words,
        "not_seen": [words[:500], "the ends"],
        "photos": [words[:255]],
        "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp", "stamp": short},
        "point_loads": [{"name": short, "load": "20 lb", "at": "4 ft", "type": "dead"}],
        "line_loads": [{"name": short, "load": "2 plf", "from": "0 ft", "to": "4 ft", "type": "dead"}],
        "proposed_use": {"live": "40 psf", "name": short},
        "dead": [{"layer": short or "x", "load": "10 psf"}],
        "condition": [{"defect": "check", "remarks": words}],
    }


def may_be_id(words: str) -> bool:
    try:
        check_id(words)
    except ReadingError:
        return False
    return True


@pytest.fixture
def told(monkeypatch: pytest.MonkeyPatch) -> list[str]:
    """What a text made the app do, against its will."""
    done: list[str] = []
    for name in ("bell", "action_bell", "open_url", "copy_to_clipboard", "simulate_key"):
        monkeypatch.setattr(Willcarry, name, lambda self, *args, name=name, **more: done.append(name))
    return done


def assert_clean(app: Any) -> None:
    """No control character, no link and no action anywhere on the screen."""
    for strip in app.screen._compositor.render_strips():
        for part in strip:
            bad = [char for char in part.text if unicodedata.category(char) in ("Cc", "Cf", "Cs")]
            assert not bad, ascii(part.text)
            if part.style is not None:
                assert part.style.link is None
                assert "@click" not in part.style.meta
    assert all(strip.cell_length == app.size.width for strip in app.screen._compositor.render_strips())


async def everywhere(app: Willcarry, pilot: Pilot[int], name: str) -> None:
    """Open a member in every screen there is, click on it, press Enter on it, toast it."""
    screen = await member(app, pilot, name)
    await pilot.press("m")
    assert_clean(app)
    await pilot.click("#sheet", offset=(20, 0))
    assert screen.readings.typing
    assert_clean(app)
    await pilot.press("escape")
    rows = screen.readings.rows
    for key in ("wood.stamp", "point_loads", "remarks"):
        rows.cursor = [line.field.key for line in rows.lines].index(key)
        screen.readings.begin()
        await pilot.pause()
        assert_clean(app)
        if isinstance(app.screen, NoteScreen):
            await pilot.press("escape")
            await until(pilot, lambda: app.screen is screen)
        screen.readings.stop()
    await pilot.press("w")
    await until(pilot, lambda: isinstance(app.screen, PageScreen))
    assert_clean(app)
    await pilot.press("end", "escape")
    await until(pilot, lambda: app.screen is screen)
    await pilot.press("escape")
    await until(pilot, lambda: app.screen is app.walk)


async def test_every_text_on_every_screen(tmp_path: Path, told: list[str]) -> None:
    ids = [words if may_be_id(words) else f"J-{n}" for n, words in enumerate(TEXTS)]
    path = tmp_path / "inv\u202egpj [bold]\x1b]0;x\x07[@click=app.quit].survey"
    lines: list[dict[str, Any]] = [{"willcarry": 1, "site": "".join(CONTROL) + MARKUP[0], "inspector": TEXTS[0]}]
    lines += [{"put": "member", "id": name, "data": with_text(words)} for name, words in zip(ids, TEXTS, strict=True)]
    path.write_text("".join(json.dumps(line) + "\n" for line in lines), encoding="utf-8")
    before = path.read_bytes()
    async with opened(path, NARROW) as (app, pilot):
        assert app.store is not None
        assert list(app.store.members) == ids
        assert app.store.unread() == 0
        for _ in range(0, len(ids), 17):
            assert_clean(app)
            await pilot.press("pagedown")
        for name, words in zip(ids, TEXTS, strict=True):
            row = app.walk.all[name]
            assert row.where == clean(words, longest=300)
            if name == words:
                assert row.name == clean(words, longest=200)
        await pilot.press("home")
        for y in range(1, 16, 5):
            await pilot.click("#walk", offset=(8, y))
            assert app.walk.list.cursor == y
            app.notify(clean(TEXTS[y]), markup=False)
        await pilot.pause()
        assert_clean(app)
        # A few of each kind go through every screen by their keys; all of them were on this one.
        for words in (MARKUP[0], CONTROL[0]):
            await everywhere(app, pilot, ids[TEXTS.index(words)])
        await pilot.press("slash")
        app.walk.line.value = "app.quit"
        await pilot.pause()
        assert_clean(app)
        await pilot.press("enter", "d", "n")
        assert app.return_code is None
    assert path.read_bytes() == before
    assert told == []


async def test_every_text_typed_into_every_kind_of_field(tmp_path: Path, told: list[str]) -> None:
    path = tmp_path / "s.survey"
    start = [{"willcarry": 1}, {"put": "member", "id": "J", "data": {"kind": "joist"}}]
    path.write_text("".join(json.dumps(line) + "\n" for line in start), encoding="utf-8")
    async with opened(path, NARROW) as (app, pilot):
        screen = await member(app, pilot, "J")
        assert app.store is not None
        for key in ("where", "wood.stamp", "not_seen", "wood.source", "remarks"):
            for words in TEXTS:
                typed = clean(words, lines=key == "remarks", longest=9_000)
                why = screen.keep(key, typed)
                kept = raw_of(app.store.members["J"], BY_KEY[key])
                if why is None and typed.strip():
                    whole = typed if key == "remarks" else typed.strip()
                    parts = [part.strip() for part in whole.split(";") if part.strip()]
                    assert kept == (parts if key == "not_seen" else whole)
                elif why is not None:
                    assert "accepted" in why
            assert on_disk(path, "J") == app.store.members["J"]
            await pilot.pause()
            assert_clean(app)
            assert screen.keep(key, "\ud800") is not None  # half a character could never be saved
    assert told == []


async def test_what_is_pasted_is_cleaned_at_the_door(tmp_path: Path, told: list[str]) -> None:
    path = tmp_path / "s.survey"
    start = [{"willcarry": 1}, {"put": "member", "id": "J", "data": EMPTY}]
    path.write_text("".join(json.dumps(line) + "\n" for line in start), encoding="utf-8")
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J")
        await pilot.press("enter")
        line = screen.readings.line
        for words in (*MARKUP[:3], *CONTROL, *INVISIBLE[:9], *LONG[:2]):
            line.value = ""
            line.post_message(Paste(words))
            await pilot.pause()
            several = "\n" in words.strip("\r\n") or "\r" in words.strip("\r\n")
            taken = "" if several or len(words) > 2_000 else clean(words.strip("\r\n"))
            assert line.value == taken
            assert_clean(app)
        line.value = ""
        await pilot.press("escape", "end", "enter")
        await until(pilot, lambda: isinstance(app.screen, NoteScreen))
        area = app.screen.query_one(NoteArea)
        for words in (*MARKUP[:2], *CONTROL[:9], "a\r\nb", INVISIBLE[0], LONG[2][:9_000]):
            area.text = ""
            area.post_message(Paste(words))
            await pilot.pause()
            assert area.text == clean(words.replace("\r\n", "\n").replace("\r", "\n"), lines=True, longest=10_000)
        area.text = ""
        area.post_message(Paste("x" * 20_000))
        await until(pilot, lambda: "too long" in text(app))
    assert told == []


async def test_questions_and_lists_take_texts_clean(tmp_path: Path, told: list[str]) -> None:
    path = tmp_path / "new.survey"
    async with opened(path) as (app, pilot):
        await pilot.press("e")
        await until(pilot, lambda: len(app.screen.query(Line)) == 3)
        first, second, _ = app.screen.query(Line)
        first.post_message(Paste(CONTROL[0] + MARKUP[0]))
        second.post_message(Paste("\u202ex"))
        await pilot.pause()
        assert_clean(app)
        await pilot.press("enter", "enter", "enter")
        await until(pilot, lambda: app.screen is app.walk)
        assert clean(CONTROL[0] + MARKUP[0]) in text(app)
        app.push_screen(PickScreen(clean(MARKUP[0]), [clean(words, longest=100) for words in TEXTS], "[bold]"))
        await until(pilot, lambda: isinstance(app.screen, PickScreen))
        assert_clean(app)
        await pilot.click("#names", offset=(4, 0))
        await until(pilot, lambda: app.screen is app.walk)
    assert told == []


async def test_a_hostile_draft_file_harms_nothing(tmp_path: Path, told: list[str]) -> None:
    path = tmp_path / "s.survey"
    start = [{"willcarry": 1}, {"put": "member", "id": "J", "data": EMPTY}]
    path.write_text("".join(json.dumps(line) + "\n" for line in start), encoding="utf-8")
    side = Path(f"{path}.draft")
    fields = ["where", "size.depth", "remarks", "nothing", "__class__", "size", "condition"]
    held = [{"kind": "member", "id": "J", "field": fields[n % 7], "text": words} for n, words in enumerate(TEXTS)]
    held += [{"kind": "member", "id": "J", "field": "wood.stamp", "text": "\ud800"}]
    held += [{"kind": "member", "id": "gone", "field": "where", "text": "x"}]
    held += [{"kind": "member", "id": "J", "field": "where", "text": "x" * 100_000}]
    for content in (json.dumps(held), "[" * 5_000, "[1]"):
        side.write_text(content, encoding="utf-8")
        async with opened(path) as (app, pilot):
            screen = await member(app, pilot, "J")
            assert_clean(app)
            screen.readings.begin()
            await pilot.pause()
            assert_clean(app)
            await pilot.press("escape")
    assert told == []
