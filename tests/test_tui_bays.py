"""Bays on the screen: added, read, inherited by the members that name them, picked, dropped."""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

import pytest

from assess.log.fold import fold
from assess.log.read import read_session
from tests.screens import JOIST, NARROW, WIDE, answer, flat, member, on_disk, opened, session, text, typed, until
from tui.app import Willcarry
from tui.screens.ask import AskScreen, SureScreen
from tui.screens.bay import BayScreen
from tui.screens.bays import BaysScreen
from tui.screens.member import MemberScreen
from tui.screens.page import PageScreen
from tui.screens.pick import PickScreen

BARE = {name: value for name, value in JOIST.items() if name not in ("spacing", "spans", "where")}
BAY = {"spacing": "16 in", "spans": ["12 ft"]}


def with_bays(folder: Path, members: dict[str, dict[str, Any]], bays: dict[str, dict[str, Any]]) -> Path:
    """A session whose bays stand before its members."""
    path = session(folder, members)
    head, *rest = path.read_text().splitlines(keepends=True)
    puts = [json.dumps({"put": "bay", "id": name, "data": data}) + "\n" for name, data in bays.items()]
    path.write_text("".join([head, *puts, *rest]))
    return path


def bays_on_disk(path: Path) -> dict[str, Any]:
    """The bays as the file has them."""
    file = read_session(str(path))
    return fold(file.lines, file.units).records["bay"]


async def bays(app: Willcarry, pilot: Any) -> BaysScreen:
    """Open the list of bays."""
    await pilot.press("b")
    await until(pilot, lambda: isinstance(app.screen, BaysScreen))
    assert isinstance(app.screen, BaysScreen)
    return app.screen


async def bay(app: Willcarry, pilot: Any) -> BayScreen:
    """Open the bay under the cursor."""
    await pilot.press("enter")
    await until(pilot, lambda: isinstance(app.screen, BayScreen))
    assert isinstance(app.screen, BayScreen)
    return app.screen


async def test_a_bay_added_and_read_serves_the_member_that_names_it(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": BARE})
    async with opened(path, NARROW) as (app, pilot):
        await bays(app, pilot)
        assert "no bays yet: a adds one" in text(app)
        await pilot.press("a")
        await until(pilot, lambda: isinstance(app.screen, AskScreen))
        await pilot.press("n", "b", "enter")
        await until(pilot, lambda: isinstance(app.screen, BayScreen) and app.screen.readings.typing)
        screen = app.screen
        assert isinstance(screen, BayScreen)
        assert "bay nb" in text(app)
        assert "no member names this bay yet" in answer(app)
        assert "bay" not in [line.field.key for line in screen.readings.rows.lines]
        assert {line.state for line in screen.readings.rows.lines} == {"none"}  # no default is its members'
        await typed(screen, pilot, "spacing", "16 in")
        await typed(screen, pilot, "spans", "12 ft")
        await pilot.press("escape", "escape")
        await until(pilot, lambda: isinstance(app.screen, BaysScreen))
        assert bays_on_disk(path) == {"nb": BAY}
        assert "nb 0 16 in centres, span 12 ft" in flat(app)
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is app.walk)

        form = await member(app, pilot, "J-1")
        assert "incomplete" in answer(app)
        await typed(form, pilot, "bay", "", press="f4")
        await until(pilot, lambda: isinstance(app.screen, PickScreen))
        await pilot.press("enter")
        await until(pilot, lambda: app.screen is form)
        assert form.readings.line.value == "nb"
        await pilot.press("enter", "escape")
        assert on_disk(path, "J-1") == BARE | {"bay": "nb"}
        spacing = next(line for line in form.readings.rows.lines if line.field.key == "spacing")
        assert (spacing.state, spacing.text, spacing.echo) == ("bay", "", "16 in (bay)")
        assert "adequate" in answer(app)
        assert "inadequate" not in answer(app)


@pytest.mark.parametrize("size", [NARROW, WIDE])
async def test_a_reading_of_the_bay_moves_all_its_members(tmp_path: Path, size: tuple[int, int]) -> None:
    of_bay = BARE | {"bay": "nb"}
    path = with_bays(tmp_path, {"J-1": of_bay, "J-2": of_bay, "J-3": JOIST}, {"nb": BAY})
    async with opened(path, size) as (app, pilot):
        before = app.walk.all["J-3"]
        await bays(app, pilot)
        assert "nb 2 16 in centres, span 12 ft" in flat(app)
        screen = await bay(app, pilot)
        assert "2 members: 0 undetermined, 2 adequate" in answer(app)
        await typed(screen, pilot, "spans", "20 ft", press="end")
        await until(pilot, lambda: "as kept before" in answer(app))  # nothing is said of a span not kept
        assert "2 adequate" in answer(app)
        await pilot.press("enter")
        await until(pilot, lambda: "2 inadequate" in answer(app))
        assert "x J-1 inadequate" in answer(app)
        await pilot.press("escape", "w")
        await until(pilot, lambda: isinstance(app.screen, PageScreen))
        assert "J-2" in text(app)
        assert "J-3" not in text(app)
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is screen)
        await pilot.press("escape")
        await until(pilot, lambda: isinstance(app.screen, BaysScreen))
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is app.walk and all(row.verdict for row in app.walk.all.values()))
        assert [app.walk.all[name].verdict for name in ("J-1", "J-2")] == ["inadequate"] * 2
        assert app.walk.all["J-3"] == before
        await pilot.press("u")
        await until(pilot, lambda: app.walk.all["J-1"].verdict == "adequate")
        assert bays_on_disk(path) == {"nb": BAY}


async def test_a_text_the_bay_cannot_take_is_refused_and_kept_as_a_draft(tmp_path: Path) -> None:
    path = with_bays(tmp_path, {"nb": BARE | {"bay": "nb"}}, {"nb": BAY})  # a member of the same id
    async with opened(path) as (app, pilot):
        await bays(app, pilot)
        screen = await bay(app, pilot)
        await typed(screen, pilot, "spacing", "40 psf")
        assert screen.readings.typing
        assert "no answer" in answer(app)
        await pilot.press("escape")
        assert app.store is not None
        assert (app.store.bay_drafts, app.store.drafts) == ({("nb", "spacing"): "40 psf"}, {})
        assert bays_on_disk(path) == {"nb": BAY}
    async with opened(path) as (app, pilot):
        assert "1 text typed but not kept" in text(app)
        await bays(app, pilot)
        screen = await bay(app, pilot)
        line = next(line for line in screen.readings.rows.lines if line.field.key == "spacing")
        assert (line.text, line.state) == ("40 psf", "refused")


async def test_a_bay_is_dropped_after_a_question_and_not_while_members_name_it(tmp_path: Path) -> None:
    path = with_bays(tmp_path, {"J-1": BARE | {"bay": "nb"}}, {"nb": BAY, "sb": {}})
    async with opened(path) as (app, pilot):
        screen = await bays(app, pilot)
        await pilot.press("d")
        assert app.screen is screen
        assert "nb is not dropped: 1 member names it" in text(app)
        for key, row in (("j", 1), ("up", 0), ("end", 1), ("k", 0), ("home", 0), ("down", 1)):
            await pilot.press(key)
            assert screen.list.cursor == row, key
        for press, left in (("n", ["nb", "sb"]), ("y", ["nb"])):
            await pilot.press("d")
            await until(pilot, lambda: isinstance(app.screen, SureScreen))
            await pilot.press(press)
            await until(pilot, lambda: app.screen is screen)
            assert list(bays_on_disk(path)) == left
        await pilot.press("u")
        assert list(bays_on_disk(path)) == ["nb", "sb"]
        await pilot.press("U")
        assert list(bays_on_disk(path)) == ["nb"]
        await pilot.press("a")
        await until(pilot, lambda: isinstance(app.screen, AskScreen))
        await pilot.press("n", "b", "enter")
        assert "a bay of this id is there already" in text(app)
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is screen)
        await pilot.press("question_mark")
        await until(pilot, lambda: isinstance(app.screen, PageScreen))
        await pilot.press("q")
        await until(pilot, lambda: app.screen is screen)
        await pilot.press("q")
        await until(pilot, lambda: app._exit)


async def test_a_member_added_beside_one_of_a_bay_starts_in_that_bay(tmp_path: Path) -> None:
    path = with_bays(tmp_path, {"J-1": BARE | {"bay": "nb"}, "J-2": BARE | {"bay": "gone"}}, {"nb": BAY})
    async with opened(path) as (app, pilot):
        for row, data in ((0, {"bay": "nb"}), (1, {})):
            app.walk.list.cursor = row
            await pilot.press("a")
            await until(pilot, lambda: isinstance(app.screen, AskScreen))
            assert ("A new member of nb" in text(app)) == bool(data)
            await pilot.press("enter")
            await until(pilot, lambda: isinstance(app.screen, MemberScreen))
            assert on_disk(path, f"J-{row + 3}") == data
            await pilot.press("escape", "escape")
            await until(pilot, lambda: app.screen is app.walk)
