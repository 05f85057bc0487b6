"""The walk list: what it says of each member, what it counts, new sessions, files another holds."""

from __future__ import annotations

import fcntl
import json
from pathlib import Path

import pytest

from assess.log.read import read_session
from tests.screens import JOIST, NARROW, WIDE, member, opened, session, text, until
from tui.screens.line import Line
from tui.screens.walk_rows import next_id, widths
from tui.walk_row import counts, first_rows

DEEP = JOIST | {"spans": ["20 ft"], "where": "south bay"}
NOTCHED = JOIST | {"ties_rafters": True}


@pytest.mark.parametrize("size", [NARROW, WIDE, (60, 20), (40, 12)])
async def test_each_member_in_its_rank(tmp_path: Path, size: tuple[int, int]) -> None:
    members = {"J-1": JOIST, "J-2": DEEP, "J-3": NOTCHED, "J-4": {"kind": "joist", "where": "loft"}}
    async with opened(session(tmp_path, members), size) as (app, _):
        rows = {line.split()[1]: line for line in text(app).replace("›", " ").splitlines() if " J-" in line}
        assert [rows[name].split()[0] for name in members] == ["+", "x", "?", "-"]
        for name, verdict in zip(members, ("adequate", "inadequate", "undetermined", "incomplete"), strict=True):
            assert verdict in rows[name]
        if size[0] >= 80:
            order = [rows["J-2"].index(word) for word in ("south bay", "inadequate", "bending 10 ft", " psf")]
            assert order == sorted(order)
            assert "still to be read: size" in rows["J-4"]
        if size[0] >= 80:
            assert "4 members: 1 undetermined, 1 incomplete, 1 inadequate, 1 adequate" in text(app)


async def test_a_window_too_small_says_so_and_nothing_breaks(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    async with opened(path, (39, 11)) as (app, pilot):
        assert "too small" in text(app)
        await member(app, pilot, "J-1")
        assert "too small" in text(app)
        for size in ((20, 5), (1, 1), (70, 12), (69, 30), (120, 14), (200, 60), (80, 24)):
            await pilot.resize_terminal(*size)
            await pilot.pause()
        assert "7 1/4 in" in text(app)


async def test_a_new_session_has_its_site_before_its_first_member(tmp_path: Path) -> None:
    path = tmp_path / "new.survey"
    async with opened(path) as (app, pilot):
        assert "a new session" in text(app)
        assert not path.exists()
        await pilot.press("e")
        await until(pilot, lambda: len(app.screen.query(Line)) == 3)
        for line, words in zip(app.screen.query(Line), ("Sluice cottage", "T2", "si"), strict=True):
            line.value = words
        await pilot.press("enter", "enter", "enter")
        await until(pilot, lambda: app.screen is app.walk)
        assert "Sluice cottage" in text(app)
    header = read_session(str(path)).header
    assert (header["site"], header["inspector"], header["units"]) == ("Sluice cottage", "T2", "SI")


async def test_an_id_that_cannot_be_is_refused_where_it_is_asked(tmp_path: Path) -> None:
    async with opened(session(tmp_path, {"J-1": JOIST})) as (app, pilot):
        await pilot.press("a")
        await until(pilot, lambda: bool(app.screen.query(Line)))
        line = app.screen.query_one(Line)
        assert line.value == "J-2"
        for words, why in (("J-1", "there already"), (" ", "not only spaces"), ("x" * 101, "1 to 100")):
            line.value = words
            await pilot.press("enter")
            assert why in text(app)
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is app.walk)
        assert list(app.walk.all) == ["J-1"]


async def test_a_session_another_copy_holds_is_read_only(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    before = path.read_bytes()
    with path.open("rb") as holder:
        fcntl.flock(holder, fcntl.LOCK_EX)
        async with opened(path) as (app, pilot):
            assert "read only: another copy" in text(app)
            for key in ("a", "c", "d", "u", "U", "e"):
                await pilot.press(key)
                assert app.screen is app.walk
            screen = await member(app, pilot, "J-1")
            assert "read only" in text(app)
            await pilot.press("enter")
            assert not screen.readings.typing
            await pilot.press("ctrl+s")
            assert "read only" in text(app)
    assert path.read_bytes() == before
    assert not Path(f"{path}.draft").exists()


async def test_lines_another_program_adds_are_folded_in_and_said(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    async with opened(path) as (app, pilot):
        with path.open("a", encoding="utf-8") as file:
            file.write(json.dumps({"put": "member", "id": "K-1", "data": DEEP}) + "\n")
        await pilot.press("c", "enter")
        await until(pilot, lambda: app.screen is not app.walk and "K-1" in app.walk.all)
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is app.walk)
        assert "1 line(s) added by another program" in text(app)


async def test_what_is_not_applied_is_counted(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST, "J-2": JOIST | {"dept": "7 in"}})
    with path.open("ab") as file:
        file.write(b'{"put": "member", "id": "J-3", "da')
    async with opened(path, WIDE) as (app, _):
        assert "1 line(s) of the file are not applied" in text(app)
        assert "torn" in text(app)
        assert list(app.walk.all) == ["J-1"]


async def test_many_members_are_assessed_off_the_screen(tmp_path: Path) -> None:
    members = {f"J-{n}": JOIST | {"spans": [f"{6 + n % 9} ft"]} for n in range(300)}
    async with opened(session(tmp_path, members)) as (app, pilot):
        await pilot.press("end")
        assert "J-299" in text(app)
        assert app.store is not None
        assert len(app.store.found) == 300


def test_rows_as_the_files_own_lines_name_them(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST, "J-2": DEEP})
    with path.open("a", encoding="utf-8") as file:
        for event in (
            {"set": "member", "id": "J-1", "path": ["where"], "data": "cellar"},
            {"drop": "member", "id": "J-2"},
            {"drop": "member", "id": "never"},
        ):
            file.write(json.dumps(event) + "\n")
    rows = first_rows(read_session(str(path)))
    assert [(row.id, row.where, row.verdict) for row in rows] == [("J-1", "cellar", "")]
    assert counts(rows) == "1 member, 1 not assessed yet: 0 undetermined"


def test_columns_never_exceed_the_width() -> None:
    for width in range(34, 200):
        for longest in (1, 7, 12, 100):
            assert sum(widths(width, longest)) <= width


def test_ids_suggested_are_new() -> None:
    assert next_id(["N-09"], "N-09") == "N-10"
    assert next_id(["N-09", "N-10"], "N-09") == "N-11"
    assert next_id(["beam"]) == "beam-2"
    assert next_id(["7"]) == "8"
