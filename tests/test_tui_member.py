"""A member's screen through its keys: understood, refused, kept, left, undone; the answer beside it all the while."""

from __future__ import annotations

import os
from pathlib import Path

import pytest

from tests.screens import JOIST, NARROW, WIDE, answer, flat, member, on_disk, opened, session, text, typed, until
from tui.screens.member import MemberScreen
from tui.screens.walk import WalkScreen


@pytest.mark.parametrize("size", [NARROW, WIDE, (60, 24)])
async def test_readings_answer_and_drawing_stand_together(tmp_path: Path, size: tuple[int, int]) -> None:
    async with opened(session(tmp_path, {"J-1": JOIST}), size) as (app, pilot):
        await member(app, pilot, "J-1")
        shown = flat(app)
        assert "7 1/4 in" in shown
        assert "+ adequate for" in shown
        assert "+ adequate for dwelling, living areas (40 psf) under the assumptions listed" in answer(app)
        assert "ratio 0." in shown
        assert "carries" in shown
        assert "(1)" in shown  # a default, in brackets, is no reading
        if size[0] >= 80:
            assert "12 ft clear" in shown
            assert "△" in shown
            assert "worst at 6 ft" in shown
        if size == WIDE:
            assert "live deflection" in shown
            assert "assumed" in shown


async def test_typing_moves_the_answer_and_keeps_nothing_until_enter(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    before = path.read_bytes()
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await typed(screen, pilot, "size.depth", "3 1/2", "0")  # 3 1/20: a shallow joist
        await until(pilot, lambda: "x inadequate" in text(app))
        assert "3.05 in" in text(app)
        assert path.read_bytes() == before
        await pilot.press("backspace", "enter")
        assert on_disk(path, "J-1")["size"]["depth"] == "3 1/2"
        assert screen.status == "saved"
        assert screen.readings.typing
        current = screen.readings.current
        assert current is not None
        assert current.field.key == "size.plies"


async def test_what_is_not_understood_is_refused_in_place_and_leaves_no_answer(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    before = path.read_bytes()
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await typed(screen, pilot, "size.depth", "45 psf")
        await until(pilot, lambda: "no answer: depth is not understood" in answer(app))
        assert "! has the" in text(app)
        assert "accepted: a size of 1/64 to 36 in" in flat(app)
        assert "adequate for" not in answer(app)
        assert "adequate for" not in text(app)
        assert screen.readings.typing  # Enter stays where it is refused
        await pilot.press("escape")
        assert not screen.readings.typing
        assert path.read_bytes() == before
        assert "no answer: depth is not understood" in answer(app)
        assert app.store is not None
        assert app.store.drafts == {("J-1", "size.depth"): "45 psf"}
        await pilot.press("escape")
        await until(pilot, lambda: isinstance(app.screen, WalkScreen))
        assert "1 text typed but not kept" in text(app)
    async with opened(path) as (app, pilot):  # and it is offered again
        screen = await member(app, pilot, "J-1")
        assert "45 psf" in text(app)
        await typed(screen, pilot, "size.depth", "7 1/4 in")
        await pilot.press("escape")
        assert "45 psf" not in text(app)
        assert not Path(f"{path}.draft").exists()


async def test_leaving_a_line_keeps_what_is_understood(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await typed(screen, pilot, "spacing", "24 in", "tab")
        assert on_disk(path, "J-1")["spacing"] == "24 in"
        await typed(screen, pilot, "spacing", "12 in", "up")
        assert on_disk(path, "J-1")["spacing"] == "12 in"
        await typed(screen, pilot, "spacing", "16 in", "escape")
        assert on_disk(path, "J-1")["spacing"] == "12 in"
        assert "not kept yet" in text(app)
        await pilot.press("enter", "enter")
        assert on_disk(path, "J-1")["spacing"] == "16 in"
        await typed(screen, pilot, "spacing", "14 in", "escape")
        await typed(screen, pilot, "spacing", "16 in")  # back to what is recorded: nothing to log, no draft left
        assert app.store is not None
        assert not app.store.drafts
        await typed(screen, pilot, "tributary", "9 ft")  # the other of an exclusive pair gives way
        assert "spacing" not in on_disk(path, "J-1")
        await typed(screen, pilot, "tributary", "")  # an emptied line restores the default
        assert "tributary" not in on_disk(path, "J-1")
        assert "incomplete" in text(app)
        await pilot.press("escape", "u", "u")
        assert on_disk(path, "J-1")["spacing"] == "16 in"
        assert "undone: J-1 or carries" in text(app)
        await pilot.press("U")
        assert on_disk(path, "J-1")["tributary"] == "9 ft"


async def test_a_text_being_typed_is_on_disk_after_a_pause(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr("tui.screens.readings.DRAFT_AFTER", 0.05)
    path = session(tmp_path, {"J-1": JOIST})
    side = Path(f"{path}.draft")
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await typed(screen, pilot, "where", "stair hal", "l")
        await until(pilot, side.exists)
        assert "stair hall" in side.read_text(encoding="utf-8")
        await pilot.press("enter")
        assert not side.exists()


async def test_names_are_picked_from_a_list_and_never_taken_unasked(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await typed(screen, pilot, "proposed_use", "living", "f4")
        await until(pilot, lambda: "dwelling, living areas" in text(app) and not isinstance(app.screen, MemberScreen))
        await pilot.press("escape")
        await until(pilot, lambda: app.screen is screen)
        assert screen.readings.line.value == "living"
        await pilot.press("f4")
        await until(pilot, lambda: app.screen is not screen)
        await pilot.press("enter")
        await until(pilot, lambda: app.screen is screen)
        assert screen.readings.line.value == "dwelling, living areas"
        assert on_disk(path, "J-1") == JOIST
        await typed(screen, pilot, "wood.grade", "", "f4")
        await until(pilot, lambda: "Select Structural" in text(app))


async def test_remarks_hold_several_lines(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await pilot.press("end", "enter", "a", "enter", "b", "ctrl+s")
        await until(pilot, lambda: app.screen is screen)
        assert on_disk(path, "J-1")["remarks"] == "a\nb"
        await pilot.press("enter", "c", "escape")
        await until(pilot, lambda: app.screen is screen)
        assert on_disk(path, "J-1")["remarks"] == "a\nb"
        assert app.store is not None
        assert app.store.drafts == {("J-1", "remarks"): "a\nbc"}


async def test_a_paste_of_several_lines_is_refused_and_said(tmp_path: Path) -> None:
    from textual.events import Paste

    async with opened(session(tmp_path, {"J-1": JOIST})) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await pilot.press("enter")
        line = screen.readings.line
        line.post_message(Paste("one\ntwo"))
        await until(pilot, lambda: "several lines" in text(app))
        assert line.value == "north bay"
        line.post_message(Paste("x" * 3000))
        await until(pilot, lambda: "too long" in text(app))
        line.post_message(Paste("cellar\x1b]52;c;x\x07\n"))
        await until(pilot, lambda: line.value == "cellar␛]52;c;x␇")


async def test_what_a_line_cannot_show_whole_is_not_scraped_away(tmp_path: Path) -> None:
    data = JOIST | {"dead": [{"layer": "as read", "thickness": "1 in", "load": "10 psf"}]}
    path = session(tmp_path, {"J-1": data})
    before = path.read_bytes()
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        keys = [line.field.key for line in screen.readings.rows.lines]
        screen.readings.rows.cursor = keys.index("dead")
        await pilot.press("enter")
        assert "holds more here than this line can show" in flat(app)
        await pilot.press("enter", "escape", "escape")
        assert path.read_bytes() == before


async def test_a_bay_shows_what_it_gives(tmp_path: Path) -> None:
    path = session(
        tmp_path, {"J-1": {key: value for key, value in JOIST.items() if key != "spacing"} | {"bay": "north"}}
    )
    with path.open("a", encoding="utf-8") as file:
        file.write('{"put": "bay", "id": "north", "data": {"spacing": "19.2 in"}}\n')
    async with opened(path) as (app, pilot):
        await member(app, pilot, "J-1")
        assert "19.2 in (bay)" in text(app)


async def test_metric_sessions_read_bare_numbers_in_mm_and_m(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST}, units="SI")
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        await typed(screen, pilot, "size.depth", "19", "0")
        await until(pilot, lambda: "190 mm" in text(app))
        await pilot.press("enter")
        assert on_disk(path, "J-1")["size"]["depth"] == "190"


async def test_a_change_that_cannot_be_written_is_said_and_kept(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        whole = os.write

        def full(descriptor: int, data: bytes) -> int:
            raise OSError(28, "No space left on device")

        monkeypatch.setattr("assess.log.write.os.write", full)
        await typed(screen, pilot, "spacing", "24 in")
        assert "NOT SAVED" in text(app)
        assert "No space left" in flat(app)
        assert "24 in" in text(app)
        await pilot.press("escape", "q")
        await until(pilot, lambda: "could not be written" in flat(app))
        await pilot.press("n")
        await until(pilot, lambda: app.screen is screen)
        monkeypatch.setattr("assess.log.write.os.write", whole)
        await pilot.press("ctrl+s")
        assert "already saved" in flat(app)
        assert on_disk(path, "J-1")["spacing"] == "24 in"


async def test_a_file_taken_away_is_saved_elsewhere(tmp_path: Path) -> None:
    path = session(tmp_path, {"J-1": JOIST})
    other = tmp_path / "other.survey"
    async with opened(path) as (app, pilot):
        screen = await member(app, pilot, "J-1")
        path.unlink()
        await typed(screen, pilot, "spacing", "24 in")
        assert "NOT SAVED" in text(app)
        await pilot.press("ctrl+s")
        await until(pilot, lambda: "another file" in flat(app))
        from tui.screens.line import Line

        app.screen.query_one(Line).value = str(other)
        await pilot.press("enter")
        await until(pilot, lambda: app.screen is screen)
        assert on_disk(other, "J-1")["spacing"] == "24 in"
