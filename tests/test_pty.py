"""The interface for real, through a pseudo-terminal: typed, killed, reopened; signals, a crash, a second copy."""

from __future__ import annotations

import json
import os
import re
import signal
import sys
from pathlib import Path
from typing import Any

import pytest

from assess.log.fold import fold
from assess.log.read import read_session
from tests.terminal import CTRL_Q, ENTER, F1, HOME, PROGRAM, UP, Terminal, pasted

# Every line of the form that shows by itself, in its order; None leaves it as it is.
TYPED: tuple[tuple[str, str | None, list[str], Any], ...] = (
    ("where", "north bay, second from the stair", ["where"], "north bay, second from the stair"),
    ("kind", "joist", ["kind"], "joist"),
    ("width", "1 5/8; 1 9/16", ["size", "width"], ["1 5/8", "1 9/16"]),
    ("depth", "7 1/2 in ± 1/8", ["size", "depth"], "7 1/2 in ± 1/8"),
    ("plies", "2", ["size", "plies"], 2),
    ("or nominal", None, [], None),
    ("species", "douglas fir", ["wood", "species"], "douglas fir"),
    ("grade", "no 2", ["wood", "grade"], "no 2"),
    ("known from", "stamp", ["wood", "basis"], "stamp"),
    ("span", "13'4\"", ["spans"], ["13'4\""]),
    ("bearing", "3 in; 3 1/2 in", ["bearing"], ["3 in", "3 1/2 in"]),
    ("spacing", "16 in", ["spacing"], "16 in"),
    ("or carries", None, [], None),
    ("condition", "notch bottom at 2 ft length 4 in depth 1 in", ["condition"],
     [{"defect": "notch", "edge": "bottom", "at": "2 ft", "length": "4 in", "depth": "1 in"}]),
    ("moisture", "14 %", ["moisture"], "14 %"),
    ("top edge", "held", ["top_edge"], "held"),
    ("dead load", "hardwood flooring + 3 psf", ["dead"],
     [{"layer": "hardwood flooring"}, {"layer": "as read", "load": "3 psf"}]),
    ("used as", "dwelling, sleeping rooms", ["present_use"], "dwelling, sleeping rooms"),
    ("to be", "offices", ["proposed_use"], "offices"),
)  # fmt: skip


def record(path: Path, member: str) -> dict[str, object]:
    file = read_session(str(path))
    state = fold(file.lines, file.units)
    assert not file.problems
    assert not state.problems
    return state.members[member]


def test_a_member_typed_in_one_breath_survives_a_kill(tmp_path: Path) -> None:
    path = tmp_path / "new.survey"
    terminal = Terminal(PROGRAM, str(path), columns=80, lines=24)
    terminal.wait_for("a new session")
    typed = "".join((text or "") + ENTER for _, text, _, _ in TYPED)
    terminal.send("a", "N-20", ENTER, typed)
    terminal.wait_for("offices", "saved", "remarks:")
    terminal.kill(signal.SIGKILL)
    assert terminal.ended() == -signal.SIGKILL

    kept = record(path, "N-20")
    for label, text, place, value in TYPED:
        if text is None:
            continue
        found: object = kept
        for name in place:
            assert isinstance(found, dict)
            found = found[name]
        assert found == value, label

    again = Terminal(PROGRAM, str(path), columns=140, lines=45)
    again.wait_for("N-20", "1 member")
    again.send(ENTER)
    again.wait_for("7 1/2 in ± 1/8", "13 ft 4 in", "Douglas Fir", "ratio")
    again.send("q")
    assert again.ended() == 0


RESTORED = (b"\x1b[?1049l", b"\x1b[?1000l", b"\x1b[?1003l", b"\x1b[?25h", b"\x1b[?2004l")


def test_a_second_copy_reads_only_and_a_terminated_one_keeps_the_text_and_the_terminal(tmp_path: Path) -> None:
    path = tmp_path / "new.survey"
    first = Terminal(PROGRAM, str(path))
    first.wait_for("a new session")
    first.send("a", "J-1", ENTER, "cellar", ENTER)
    first.wait_for("saved")
    second = Terminal(PROGRAM, str(path))
    second.wait_for("read only", "another copy")
    before = path.read_bytes()
    second.send("d")
    second.send(ENTER)
    second.wait_for("to be read")
    second.send(ENTER, "attic", ENTER)
    second.wait_for("read only")
    assert path.read_bytes() == before
    second.send(CTRL_Q)
    assert second.ended() == 0

    first.send(UP, "stair ha")
    first.wait_for("stair ha")
    first.kill(signal.SIGTERM)
    assert first.ended() == 143
    assert all(code in first.out.split(b"stair ha")[-1] for code in RESTORED)
    again = Terminal(PROGRAM, str(path))
    again.wait_for("1 text typed but not kept")
    again.send(ENTER)
    again.wait_for("stair ha", "not kept yet")
    again.send(ENTER, "ll", ENTER)
    again.wait_for("saved")
    assert record(path, "J-1")["where"] == "ll"  # the draft is offered selected: typing replaces it
    again.send(CTRL_Q)
    assert again.ended() == 0


def test_a_crash_prints_three_lines_and_no_value_of_the_session(tmp_path: Path) -> None:
    path = tmp_path / "new.survey"
    code = (
        "import sys, tui.store\n"
        "def seen(self, member_id, data=None):\n"
        "    site = 'a private place'\n"
        "    raise RuntimeError(site)\n"
        "tui.store.Store.seen = seen\n"
        "from tui.command import main\n"
        f"sys.exit(main([{str(path)!r}]))"
    )
    terminal = Terminal(sys.executable, "-c", code, TMPDIR=str(tmp_path))
    terminal.wait_for("a new session")
    terminal.send("a", "J-1", ENTER)
    assert terminal.ended() == 3
    said = terminal.out.split(b"\x1b[?1049l")[-1].decode()
    assert "stopped by something unexpected (RuntimeError)" in said
    assert f"all 2 entries are in {path}" in said.replace("\r\n", "")
    assert "private" not in terminal.out.decode()
    [details] = tmp_path.glob("willcarry-*.txt")
    assert "in seen" in details.read_text(encoding="utf-8")
    assert "private place'" not in details.read_text(encoding="utf-8").replace("site = 'a private place'", "")
    assert b"\x1b[?1000l" in terminal.out
    assert record(path, "J-1") == {}


HOSTILE = "\x1b]52;c;cHdu\x07 \x1b]0;x\x07 \x1b[2J \x9b31m [@click=app.quit]x[/] inv\u202egpj.exe"


def test_no_byte_of_a_text_reaches_the_terminal_raw(tmp_path: Path) -> None:
    path = tmp_path / "h\x1b]0;owned\x07[bold].survey"
    lines = [
        {"willcarry": 1, "site": HOSTILE, "units": "US"},
        {"put": "member", "id": "[@click=app.quit]J", "data": {"where": HOSTILE, "remarks": HOSTILE, "kind": "joist"}},
    ]
    path.write_text("".join(json.dumps(line) + "\n" for line in lines), encoding="utf-8")
    terminal = Terminal(PROGRAM, str(path))
    terminal.wait_for("1 member:", "]52;c;cHdu")
    terminal.send(ENTER)
    terminal.wait_for("to be read")
    terminal.send(ENTER, HOME, pasted("\x1b]52;c;cGFzdGVk\x07"), ENTER)
    terminal.wait_for("saved")
    terminal.send("stair ha")
    terminal.wait_for("stair ha")
    terminal.kill(signal.SIGHUP)
    assert terminal.ended() == 129
    assert all(code in terminal.out.split(b"stair ha")[-1] for code in RESTORED)
    assert "stair ha" in Path(f"{path}.draft").read_text(encoding="utf-8")
    # the shape of the mouse pointer is the interface's own
    out = re.sub(rb"\x1b\]22;[a-z]+\x07", b"", terminal.out)
    for bad in (b"\x1b]52", b"\x1b]0;", b"\x07", "\x9b".encode(), b"\x1b[2J \xc2", b"\xe2\x80\xae", b"]0;owned\x07"):
        assert bad not in out, bad
    assert "cGFzdGVk" in str(record(path, "[@click=app.quit]J")["where"])


@pytest.mark.parametrize("term", ["dumb", ""])
def test_a_terminal_without_a_screen_is_told(tmp_path: Path, term: str) -> None:
    terminal = Terminal(PROGRAM, str(tmp_path / "s.survey"), TERM=term)
    assert terminal.ended() == 2
    assert b"cannot show a screen" in terminal.out
    assert not (tmp_path / "s.survey").exists()


@pytest.mark.parametrize("name", ["", "fifo", "missing/s.survey", "bad.survey"])
def test_what_is_no_session_is_refused_in_one_line(tmp_path: Path, name: str) -> None:
    if name == "fifo":
        os.mkfifo(tmp_path / name)
    if name == "bad.survey":
        (tmp_path / name).write_text("hello\n", encoding="utf-8")
    terminal = Terminal(PROGRAM, str(tmp_path / name))
    assert terminal.ended(3.0) == 2
    assert terminal.out.count(b"\n") == 1
    assert b"\x1b" not in terminal.out


def test_without_colour_in_a_plain_locale(tmp_path: Path) -> None:
    terminal = Terminal(PROGRAM, "demo", NO_COLOR="1", LANG="C", TMPDIR=str(tmp_path))
    terminal.wait_for("N-07", "inadequate", "› ")
    terminal.send(F1)
    terminal.wait_for("Help")
    terminal.send("q", ENTER)
    terminal.wait_for("====", "adequate for")
    terminal.send(CTRL_Q)
    assert terminal.ended() == 0
