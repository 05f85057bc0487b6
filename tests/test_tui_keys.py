"""Every key of the registry acts, every one that acts is in the registry, and the footer fits."""

from __future__ import annotations

from pathlib import Path

import pytest

from tests.screens import JOIST, NARROW, member, on_disk, opened, session, text, typed, until
from tui import actions
from tui.app import Willcarry
from tui.screens.ask import SureScreen
from tui.screens.bays import BaysScreen
from tui.screens.member import MemberScreen
from tui.screens.note import NoteScreen
from tui.screens.page import PageScreen
from tui.screens.pick import PickScreen
from tui.screens.walk import WalkScreen

SCREENS = {
    "walk": WalkScreen, "member": MemberScreen, "page": PageScreen, "list": PickScreen, "note": NoteScreen,
    "question": SureScreen, "anywhere": Willcarry, "bays": BaysScreen,
}  # fmt: skip


@pytest.mark.parametrize("where", actions.WHERE)
def test_footers_fit_eighty_columns_and_say_help_first(where: str) -> None:
    words = [f"{a.shown} {a.footer}" for a in actions.of(where) if a.footer is not None]
    assert actions.footer(where, 78) == "  ".join(words)  # none is left out
    if where in ("walk", "member"):
        assert words[0] == "? help"
    for width in range(80):
        assert len(actions.footer(where, width)) <= width


def test_no_key_that_terminals_do_not_deliver() -> None:
    keys = [key for action in actions.ACTIONS for key in action.keys.split(",")]
    assert not [key for key in keys if key.startswith(("alt+", "ctrl+h", "ctrl+i", "ctrl+j", "ctrl+m")) or key == "f3"]
    for where in actions.WHERE:
        mine = [key for action in actions.of(where) for key in action.keys.split(",")]
        assert len(mine) == len(set(mine)), where


@pytest.mark.parametrize("action", actions.ACTIONS, ids=lambda a: f"{a.where}-{a.id}-{a.keys}")
def test_every_action_has_its_method(action: actions.Action) -> None:
    if action.where == "typing":  # its keys act in the entry itself; the walk through them below proves it
        return
    assert hasattr(SCREENS[action.where], f"action_{action.id}")


def test_every_binding_of_a_screen_is_in_the_registry() -> None:
    for where, screen in SCREENS.items():
        if where != "anywhere":
            assert list(screen.BINDINGS) == actions.bindings(where)


async def test_the_keys_of_the_walk_list(tmp_path: Path) -> None:
    path = session(tmp_path, {f"J-{n:02d}": JOIST for n in range(1, 41)})
    async with opened(path) as (app, pilot):
        walk = app.walk
        for key, row in (
            ("down", 1), ("j", 2), ("up", 1), ("k", 0), ("end", 39), ("home", 0), ("pagedown", 17), ("pageup", 0),
        ):  # fmt: skip
            await pilot.press(key)
            assert walk.list.cursor == row, key
        for key in ("question_mark", "w"):
            await pilot.press(key)
            await until(pilot, lambda: isinstance(app.screen, PageScreen))
            await pilot.press("escape")
            await until(pilot, lambda: app.screen is walk)
        await pilot.press("slash", "0", "7", "enter")
        assert walk.current == "J-07"
        assert "1 shown that hold '07'" in text(app)
        await pilot.press("d")
        await until(pilot, lambda: isinstance(app.screen, SureScreen))
        await pilot.press("n")
        await until(pilot, lambda: app.screen is walk)
        assert on_disk(path, "J-07")
        await pilot.press("d")
        await until(pilot, lambda: isinstance(app.screen, SureScreen))
        await pilot.press("y")
        await until(pilot, lambda: app.screen is walk)
        assert "J-07" not in walk.all
        await pilot.press("u")
        assert on_disk(path, "J-07") == JOIST
        await pilot.press("U")
        assert "J-07" not in walk.all
        await pilot.press("escape")
        assert len(walk.list.shown) == 39
        await pilot.press("home", "c", "enter")
        await until(pilot, lambda: isinstance(app.screen, MemberScreen))
        assert on_disk(path, "J-41") == JOIST
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is walk)
        await pilot.press("a", "x", "enter")
        await until(pilot, lambda: isinstance(app.screen, MemberScreen))
        assert on_disk(path, "x") == {}
        await pilot.press("escape", "escape")
        await until(pilot, lambda: app.screen is walk)
        await pilot.press("e")
        assert "first line" in text(app)
        await pilot.press("ctrl+s")
        assert "already saved" in text(app)
        await pilot.press("ctrl+c")
        assert "Ctrl+Q quits" in text(app)
        await pilot.press("home", "enter")
        await until(pilot, lambda: isinstance(app.screen, MemberScreen))
        await pilot.press("q")
        await until(pilot, lambda: app._exit)
    assert app.return_code == 0


async def test_the_keys_of_a_member_and_of_typing(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    async with opened(path, NARROW) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        rows = screen.readings.rows
        last = len(rows.lines) - 1
        for key, row in (
            ("down", 1), ("j", 2), ("tab", 3), ("up", 2), ("k", 1), ("shift+tab", 0), ("end", last), ("home", 0),
            ("pagedown", 13), ("pageup", 0),
        ):  # fmt: skip
            await pilot.press(key)
            assert rows.cursor == row, key
        await pilot.press("m")
        assert len(rows.lines) > last + 20
        await pilot.press("m")
        assert len(rows.lines) == last + 1
        for key in ("question_mark", "w"):
            await pilot.press(key)
            await until(pilot, lambda: isinstance(app.screen, PageScreen))
            await pilot.press("q")
            await until(pilot, lambda: app.screen is screen)
        await pilot.press("enter")
        assert screen.readings.typing
        for key, row in (("tab", 1), ("down", 2), ("up", 1), ("shift+tab", 0), ("enter", 1)):
            await pilot.press(key)
            assert screen.readings.typing
            assert rows.cursor == row, key
        for key, other in (("f1", PageScreen), ("f2", PageScreen), ("f4", PickScreen)):
            await pilot.press(key)
            await until(pilot, lambda kind=other: isinstance(app.screen, kind))
            await pilot.press("escape")
            await until(pilot, lambda: app.screen is screen)
            assert screen.readings.line.has_focus
        await pilot.press("ctrl+s")
        assert "already saved" in text(app)
        await pilot.press("end", "ctrl+c")
        assert "Ctrl+Q quits" in text(app)
        assert app.clipboard == ""
        await pilot.press("tab", "ctrl+c")
        assert "sent to the terminal" in text(app)
        assert app.clipboard == "1 1/2 in"
        await pilot.press("escape")
        assert not screen.readings.typing
        await pilot.press("u")
        assert "nothing to undo" in text(app)
        await pilot.press("U")
        assert "nothing to redo" in text(app)
        await typed(screen, pilot, "spacing", "24 in")
        await pilot.press("escape", "u")
        assert on_disk(path, "J-1")["spacing"] == "16 in"
        await pilot.press("q")
        await until(pilot, lambda: app._exit)


async def test_the_keys_of_a_page(tmp_path: Path) -> None:
    async with opened(session(tmp_path, {"J-1": JOIST})) as (app, pilot):
        await pilot.press("w")
        await until(pilot, lambda: isinstance(app.screen, PageScreen))
        page = app.screen.query_one("#page")
        top = "adequate for dwelling, living areas (40 psf) under the assumptions listed"
        assert top in text(app)
        for key, moved in (("j", 1), ("down", 2), ("k", 1), ("up", 0), ("pagedown", 22), ("pageup", 0), ("space", 22)):
            await pilot.press(key)
            assert page.scroll_offset.y == moved, key
        await pilot.press("end")
        assert "ratio = demand / capacity" in text(app)
        assert page.scroll_offset.y == page.max_scroll_y
        await pilot.press("home")
        assert top in text(app)


async def test_the_palette_finds_every_command(tmp_path: Path) -> None:
    async with opened(session(tmp_path, {"J-1": JOIST})) as (app, pilot):
        offered = {command.title for command in app.get_system_commands(app.screen)}
        assert {action.words.capitalize() for action in actions.of("walk")} <= offered
        await pilot.press("ctrl+p")
        await until(pilot, lambda: app.screen is not app.walk)
        await pilot.press(*"add a mem")
        await until(pilot, lambda: "Add a member" in text(app))
        await pilot.press("enter")
        await until(pilot, lambda: "A new member" in text(app))
