"""The interface under test: opened on a session in a folder, driven by its keys, read as text."""

from __future__ import annotations

import json
from collections.abc import AsyncIterator
from contextlib import asynccontextmanager
from pathlib import Path
from typing import Any

from textual.pilot import Pilot

from assess.log.read import read_session
from tui.app import Willcarry
from tui.screens.member import MemberScreen
from tui.screens.words import Words
from tui.walk_row import first_rows

NARROW, WIDE = (80, 24), (140, 45)
JOIST: dict[str, Any] = {
    "kind": "joist",
    "where": "north bay",
    "size": {"width": "1 1/2 in", "depth": "7 1/4 in"},
    "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp"},
    "spans": ["12 ft"],
    "spacing": "16 in",
    "dead": "10 psf",
    "proposed_use": "dwelling, living areas",
}


def session(folder: Path, members: dict[str, dict[str, Any]], **header: Any) -> Path:
    """A session file with members, written by hand."""
    lines = [{"willcarry": 1, "site": "Sluice cottage", "units": "US"} | header]
    lines += [{"put": "member", "id": name, "data": data} for name, data in members.items()]
    path = folder / "s.survey"
    path.write_text("".join(json.dumps(line) + "\n" for line in lines), encoding="utf-8")
    return path


@asynccontextmanager
async def opened(path: Path, size: tuple[int, int] = NARROW) -> AsyncIterator[tuple[Willcarry, Pilot[int]]]:
    """The app on a session, read and assessed."""
    app = Willcarry(str(path), first_rows(read_session(str(path))) if path.exists() else [])
    async with app.run_test(size=size) as pilot:
        await until(pilot, lambda: app.ready and all(row.verdict for row in app.walk.all.values()))
        yield app, pilot


async def until(pilot: Pilot[int], true: Any) -> None:
    """Wait until something is so."""
    for _ in range(500):
        if true():
            await pilot.pause()
            return
        await pilot.pause(0.01)
    raise AssertionError(f"never came: {text(pilot.app)}")


def text(app: Any) -> str:
    """The screen as text."""
    return "\n".join("".join(part.text for part in strip) for strip in app.screen._compositor.render_strips())


def flat(app: Any) -> str:
    """The screen's words in a row, whatever their columns."""
    return " ".join(text(app).split())


def answer(app: Any) -> str:
    """The words of the answer, before they are wrapped."""
    return " ".join(words for words, _ in app.screen.query_one(Words).said)


async def member(app: Willcarry, pilot: Pilot[int], name: str) -> MemberScreen:
    """Open a member."""
    app.open_member(name)
    await until(pilot, lambda: isinstance(app.screen, MemberScreen))
    assert isinstance(app.screen, MemberScreen)
    return app.screen


async def typed(screen: MemberScreen, pilot: Pilot[int], key: str, words: str, press: str = "enter") -> None:
    """Type into a line of the form: the words set at once, one key to prove the wiring."""
    keys = [line.field.key for line in screen.readings.rows.lines]
    if screen.readings.typing:
        screen.readings.stop()
    screen.readings.rows.cursor = keys.index(key)
    screen.readings.begin()
    screen.readings.line.value = words
    screen.readings.line.cursor_position = len(words)
    await pilot.press(press)


def on_disk(path: Path, name: str) -> dict[str, Any]:
    """A member as the file has it."""
    from assess.log.fold import fold

    file = read_session(str(path))
    state = fold(file.lines, file.units)
    assert not file.problems
    assert not state.problems
    return state.members[name]
