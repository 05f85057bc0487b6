"""The session file read back: limits, torn ends, bad lines, hostile bytes; each with its line number."""

from __future__ import annotations

import json
import os
import re
import socket
import time
import tracemalloc
from pathlib import Path
from typing import Any

import pytest

from assess.log.fold import fold
from assess.log.lines import encode
from assess.log.read import Line, SessionError, read_session
from tui.check_text import check_lines

HEADER = {"willcarry": 1, "site": "Sluice cottage", "units": "US"}
JOIST = {"kind": "joist", "size": {"width": "1 1/2 in", "depth": "7 1/4 in"}, "spans": ["10 ft"]}


def put(name: str = "J-1", data: dict[str, Any] | None = None, **stamp: Any) -> dict[str, Any]:
    return {"put": "member", "id": name, "data": JOIST if data is None else data} | stamp


def write(folder: Path, *events: dict[str, Any], tail: bytes = b"") -> Path:
    path = folder / "s.survey"
    path.write_bytes(b"".join(encode(event) for event in (HEADER, *events)) + tail)
    return path


def _line(event: dict[str, Any], number: int = 2) -> Line:
    return Line(number, event)


def test_the_file_cut_at_every_byte_of_its_last_two_lines_opens(tmp_path: Path) -> None:
    path = write(tmp_path, put("J-1"), put("J-2"), put("J-3"))
    data = path.read_bytes()
    ends = [i + 1 for i, byte in enumerate(data) if byte == 0x0A]
    for cut in range(ends[1], len(data) + 1):
        path.write_bytes(data[:cut])
        file = read_session(str(path))
        state = fold(file.lines)
        # A last line without its newline that is whole and sound is kept.
        expected = sum(1 for end in ends[1:] if cut >= end - 1)
        assert list(state.members) == ["J-1", "J-2", "J-3"][:expected], cut
        assert not file.problems
        whole = max(end for end in ends if end <= cut)
        if file.torn:
            assert data[whole:cut] == file.torn
            assert any("torn" in notice for notice in file.notices)


@pytest.mark.parametrize("tail", [b"\x00" * 4096, b'{"put": "mem', b"\xff", b'{"a": 1, "crc": "00000000"}'])
def test_a_torn_end_is_set_aside(tmp_path: Path, tail: bytes) -> None:
    file = read_session(str(write(tmp_path, put(), tail=tail)))
    assert file.torn == tail
    assert list(fold(file.lines).members) == ["J-1"]


def test_a_bad_line_in_the_middle_is_named_and_stops_nothing(tmp_path: Path) -> None:
    path = write(tmp_path, put("J-1"))
    with path.open("ab") as file:
        file.write(b"not json\n")
        file.write(b'{"put": "member", "id": "J-2", "data": {"size": {"depth": "40 psf"}}}\n')
        file.write(b'{"put": "member", "id": "J-3", "data": {"knd": "joist"}}\n')
        file.write(b'{"putt": "member", "id": "J-4", "data": {}}\n')
        file.write(encode(put("J-5")))
    read = read_session(str(path))
    state = fold(read.lines)
    assert list(state.members) == ["J-1", "J-5"]
    found = [(p.line, p.id, p.field) for p in (*read.problems, *state.problems)]
    assert found == [(3, "", ""), (4, "J-2", "size.depth"), (5, "J-3", "knd"), (6, "J-4", "")]


@pytest.mark.parametrize(
    ("data", "word"),
    [
        (b"", "no header"),
        (b"\n", "no header"),
        (b"\x00" * 100 + b"\n", "no header"),
        (b"x", "no header"),
        (b'{"put": "member", "id": "a", "data": {}}\n', "no header"),
        (b'{"willcarry": 1}\n{"willcarry": 1}\n', "second header"),
        (b'{"willcarry": 999}\n', "version"),
        (b'{"willcarry": true}\n', "version"),
        (b'{"willcarry": 1, "units": "UK"}\n', "units"),
        (b'{"willcarry": 1, "sight": "x"}\n', "unknown field"),
        ('{"willcarry": 1}\n'.encode("utf-16"), "UTF-16"),
        ('{"willcarry": 1}\n'.encode("utf-16-be"), "no header"),
        (b'{"willcarry": 1, "crc": "00000000"}\n', "does not match its checksum"),
        (b'\n{"willcarry": 1}\n', "no header"),
        (b'{"willcarry": 0}\n', "version"),
        (b'{"willcarry": "1"}\n', "version"),
        (b'{"willcarry": 2, "new": [1]}\n', "version 2"),
        (b'{"willcarry": 1, "units": ["US"]}\n', "units"),
        (b'{"willcarry": 1, "site": 5}\n', "site is not text"),
        (b'{"willcarry": 1}\r{"put": "note", "id": "a", "data": {"text": "x"}}\r', "no header"),
    ],
)
def test_a_file_that_is_no_session_is_refused_in_one_line(tmp_path: Path, data: bytes, word: str) -> None:
    path = tmp_path / "x.survey"
    path.write_bytes(data)
    with pytest.raises(SessionError, match=word) as error:
        read_session(str(path))
    assert "\n" not in str(error.value)


def test_bom_and_crlf_are_tolerated_and_said(tmp_path: Path) -> None:
    path = write(tmp_path, put())
    path.write_bytes(b"\xef\xbb\xbf" + path.read_bytes().replace(b"\n", b"\r\n"))
    file = read_session(str(path))
    assert list(fold(file.lines).members) == ["J-1"]
    assert len(file.notices) == 2


@pytest.mark.parametrize(
    "kind", ["folder", "fifo", "socket", "zero", "full", "missing", "dangling", "newline", "NUL", "long"]
)
def test_what_is_no_regular_file_is_refused_at_once(tmp_path: Path, kind: str) -> None:
    path = tmp_path / kind
    if kind == "folder":
        path.mkdir()
    elif kind == "fifo":
        os.mkfifo(path)
    elif kind == "zero":
        path = Path("/dev/zero")
    elif kind == "full":
        path = Path("/dev/full")
    elif kind == "socket":
        listening = socket.socket(socket.AF_UNIX)
        listening.bind(str(path))
        listening.close()
    elif kind == "NUL":
        path = Path("a\0b")
    elif kind == "long":
        path = tmp_path / ("x" * 256)
    elif kind == "dangling":
        path.symlink_to(tmp_path / "nowhere")
    elif kind == "newline":
        path = Path(str(tmp_path / "a\nb"))
    start = time.perf_counter()
    with pytest.raises(SessionError) as error:
        read_session(str(path))
    assert time.perf_counter() - start < 1.0
    assert "\n" not in str(error.value)


@pytest.mark.parametrize("name", [b"-x.survey", b"a\nb", b"a\x1b[2J", b"[bold]x[", b"\xff\xfe.survey", b"x" * 255])
def test_a_file_of_any_name_is_read_and_through_a_link(tmp_path: Path, name: bytes) -> None:
    path = os.fsencode(tmp_path) + b"/" + name
    with open(path, "wb") as file:
        file.write(encode(HEADER) + encode(put()))
    os.symlink(path, tmp_path / "link")
    for place in (os.fsdecode(path), str(tmp_path / "link")):
        assert list(fold(read_session(place).lines).members) == ["J-1"]


def test_limits_refuse_quickly_and_in_little_memory(tmp_path: Path) -> None:
    path = tmp_path / "big.survey"
    with path.open("wb") as file:
        file.truncate(100_000_000)
    tracemalloc.start()
    start = time.perf_counter()
    with pytest.raises(SessionError, match="50,000,000"):
        read_session(str(path))
    path.write_bytes(encode(HEADER) + b"\n" * 10_000_000)
    with pytest.raises(SessionError, match="1,000,000 lines"):
        read_session(str(path))
    peak = tracemalloc.get_traced_memory()[1]
    tracemalloc.stop()
    assert time.perf_counter() - start < 2.0
    assert peak < 300_000_000


def test_a_line_repeated_counts_once_and_a_number_used_twice_is_named(tmp_path: Path) -> None:
    first = put("J-1", n=1, **{"from": "k3f9x7q2m4ab"})
    second = {"set": "member", "id": "J-1", "path": ["spacing"], "data": "16 in", "n": 2, "from": "k3f9x7q2m4ab"}
    other = second | {"data": "24 in"}
    state = fold(read_session(str(write(tmp_path, first, second, first, second, other))).lines)
    assert state.members["J-1"]["spacing"] == "16 in"
    assert [(p.line, p.field) for p in state.problems] == [(6, "n")]


def test_a_line_too_long_in_the_middle_is_one_bad_line(tmp_path: Path) -> None:
    path = write(tmp_path, put("J-1"))
    with path.open("ab") as file:
        file.write(b"x" * 1_000_001 + b"\n" + encode(put("J-2")))
    read = read_session(str(path))
    assert list(fold(read.lines).members) == ["J-1", "J-2"]
    assert [(p.line, "1,000,000" in p.message) for p in read.problems] == [(3, True)]


@pytest.mark.parametrize(
    "bad", [b'{"put": "note", "id": "\xff", "data": {"text": "x"}}', b"\x00" * 50, b"{}\r{}", b"[1]"]
)
def test_one_bad_line_is_one_bad_line(tmp_path: Path, bad: bytes) -> None:
    path = write(tmp_path, put("J-1"))
    with path.open("ab") as file:
        file.write(bad + b"\n\n" + encode(put("J-2")))
    read = read_session(str(path))
    state = fold(read.lines)
    assert list(state.members) == ["J-1", "J-2"]
    assert [p.line for p in (*read.problems, *state.problems)] == [3]


def test_only_a_newline_ends_a_line(tmp_path: Path) -> None:
    text = "one\u2028two\u2029three\u0085four"
    path = write(tmp_path, {"put": "note", "id": "n", "data": {"text": text}})
    assert fold(read_session(str(path)).lines).records["note"]["n"]["text"] == text


def test_every_line_twice_is_every_line_once(tmp_path: Path) -> None:
    stamp = {"from": "k3f9x7q2m4ab"}
    events = [
        {"set": "member", "id": "J-1", "path": ["where"], "data": "before it is there", "n": 1} | stamp,
        put("J-1", n=2, **stamp),
        {"set": "member", "id": "J-1", "path": ["alike"], "data": 0, "n": 3} | stamp,
        {"put": "note", "id": "stair", "data": {"text": "dark"}, "n": 4} | stamp,
    ]
    once = fold(read_session(str(write(tmp_path, *events))).lines)
    assert [(p.line, p.field) for p in once.problems] == [(2, "id"), (4, "alike")]
    doubled = fold(read_session(str(write(tmp_path, *(e for event in events for e in (event, event))))).lines)
    assert doubled.records == once.records
    assert [p.field for p in doubled.problems] == ["id", "alike"]
    assert [len(lines) for lines in doubled.history.values()] == [len(lines) for lines in once.history.values()]


def test_a_line_met_too_early_counts_where_it_is_met_again() -> None:
    early = {"set": "member", "id": "J-1", "path": ["where"], "data": "hall", "n": 1, "from": "k3f9x7q2m4ab"}
    state = fold([_line(early, 2), _line(put("J-1"), 3), _line(early, 4)])
    assert state.members["J-1"]["where"] == "hall"
    assert [p.line for p in state.problems] == [2]


@pytest.mark.parametrize(("first", "second"), [(1, True), (0, False), (1, 1.0), ("a", "b"), ({"x": 1}, {"x": True})])
def test_one_number_for_two_contents_is_named(first: Any, second: Any) -> None:
    stamp = {"n": 1, "from": "k3f9x7q2m4ab"}
    lines = [_line({"put": "finding", "id": "J-1", "data": {"v": value}} | stamp) for value in (first, second)]
    state = fold(lines)
    assert [p.field for p in state.problems] == ["n"]
    assert state.records["finding"]["J-1"]["v"] is first


def test_two_sessions_joined_are_refused(tmp_path: Path) -> None:
    path = write(tmp_path, put("J-1"))
    path.write_bytes(path.read_bytes() * 2)
    with pytest.raises(SessionError, match="second header in line 3"):
        read_session(str(path))


def test_the_line_that_gave_a_field_is_known() -> None:
    state = fold(
        [
            _line(put("J-1"), 2),
            _line({"set": "member", "id": "J-1", "path": ["size", "depth"], "data": "7 1/2 in"}, 3),
            _line({"set": "member", "id": "J-1", "path": ["where"], "data": "hall"}, 4),
            _line({"set": "member", "id": "J-1", "path": ["sizes"], "data": "hall"}, 5),
        ]
    )
    fields = {"size.depth": 3, "size": 3, "size.width": 2, "where": 4, "condition.0.depth": 2, "": 4}
    assert {name: state.line_of("member", "J-1", name) for name in fields} == fields
    assert state.line_of("member", "nobody") == 0


def test_a_conflict_is_kept_with_a_path_that_could_be_set() -> None:
    conflict = {"conflict": "member", "id": "J-1", "path": ["size", "depth"], "data": "7 in", "other": "8 in"}
    bad = [
        conflict | {"path": path}
        for path in (["depht"], ["__class__"], "size.depth", ["size.depth"], [1], [[]], [], None)
    ]
    state = fold([_line(put("J-1")), _line(conflict), *(_line(event, 9) for event in bad)])
    assert [line.event for line in state.conflicts] == [conflict]
    assert [p.field for p in state.problems] == ["path"] * len(bad)
    assert state.members["J-1"] == JOIST


@pytest.mark.parametrize(
    "path",
    [
        ["..", "x"],
        [-1],
        [1000000000],
        ["__proto__"],
        ["size", "__class__"],
        ["size"] * 50,
        [],
        [None],
        "size",
        {"a": 1},
        None,
    ],
)
def test_a_path_leads_only_to_known_fields(path: Any) -> None:
    state = fold([_line(put("J-1")), _line({"set": "member", "id": "J-1", "path": path, "data": "x"}, 3)])
    assert state.members["J-1"] == JOIST
    assert [(p.line, p.field) for p in state.problems] == [(3, "path")]


@pytest.mark.parametrize(
    ("event", "field"),
    [
        ({"put": "member", "data": {}}, "id"),
        ({"put": "member", "id": "J-1"}, "data"),
        ({"put": "wall", "id": "J-1", "data": {}}, "put"),
        ({"put": ["member"], "id": "J-1", "data": {}}, "put"),
        ({"set": "finding", "id": "J-1", "path": ["x"], "data": 1}, "set"),
        ({"put": "finding", "id": "J-1", "data": [1]}, "data"),
        ({"put": "member", "drop": "member", "id": "J-1", "data": {}}, ""),
        ({"undo": "member", "id": "J-1"}, ""),
        ({}, ""),
        ({"drop": "member", "id": "J-1", "data": {}}, "data"),
        (put() | {"n": -1}, "n"),
        (put() | {"n": True}, "n"),
        (put() | {"n": "1"}, "n"),
        (put() | {"from": 5}, "from"),
        (put() | {"at": ["now"]}, "at"),
        (put() | {"by": "x" * 201}, "by"),
        (put() | {"note": "x"}, "note"),
    ],
)
def test_a_line_of_the_wrong_form_is_named_and_changes_nothing(event: dict[str, Any], field: str) -> None:
    state = fold([_line(event, 7)])
    assert [(p.line, p.field) for p in state.problems] == [(7, field)]
    assert not any(state.records.values())


def test_sets_drops_and_dangling_ids(tmp_path: Path) -> None:
    events = [
        put("J-1"),
        {"set": "member", "id": "J-1", "path": ["size", "depth"], "data": "7 1/2 in ± 1/8"},
        {"set": "member", "id": "nobody", "path": ["where"], "data": "x"},
        {"set": "member", "id": "J-1", "path": ["size", "depth"], "data": "40 psf"},
        {"set": "member", "id": "J-1", "path": ["__class__"], "data": "x"},
        {"set": "member", "id": "J-1", "path": ["size", "depth", "x"], "data": "x"},
        {"set": "member", "id": "J-1", "path": [-1], "data": "x"},
        {"put": "note", "id": "stair", "data": {"text": "dark"}},
        {"drop": "note", "id": "stair"},
        {"drop": "note", "id": "stair"},
    ]
    state = fold(read_session(str(write(tmp_path, *events))).lines)
    assert state.members["J-1"]["size"]["depth"] == "7 1/2 in ± 1/8"
    assert [p.line for p in state.problems] == [4, 5, 6, 7, 8, 11]
    assert state.records["note"] == {}
    assert [line.number for line in state.history["member", "J-1"]] == [2, 3]


@pytest.mark.parametrize("name", ["", "  ", "a\nb", "x" * 101, "a\x1b[2J", "a\u202eb", "a\u200bb", 5, None, ["a"]])
def test_an_id_that_cannot_stand_is_refused(name: Any) -> None:
    state = fold([_line({"put": "member", "id": name, "data": {}})])
    assert state.members == {}
    assert state.problems[0].field == "id"


def test_ids_that_look_alike_are_both_kept_and_said() -> None:
    lines = [_line(put(name)) for name in ("A-1", "\u0410-1", "J1", "j1 ", "../../x")]
    state = fold(lines)
    assert list(state.members) == ["A-1", "\u0410-1", "J1", "j1 ", "../../x"]
    assert len(state.notices) == 2


@pytest.mark.parametrize(
    "at",
    [
        "9999-12-31T23:59:60", "0000-01-01", "yesterday", "", "2026-03-02T08:52:11", "2026-03-02T08:52:11+01:00",
        "2026-02-30T08:52:11Z", "1970-01-01T00:00:00Z", "9999-01-01T00:00:00Z", "２０２６-03-02T08:52:11Z",
    ],
)  # fmt: skip
def test_a_time_no_clock_gives_is_kept_as_text_and_said(at: str) -> None:
    state = fold([_line(put(at="2026-03-02T08:52:11Z"), 2), _line(put("J-2", at=at), 3)])
    assert state.problems == []
    assert list(state.members) == ["J-1", "J-2"]
    assert state.history["member", "J-2"][0].event["at"] == at
    assert [("line 3" in notice, "kept as text" in notice) for notice in state.notices] == [(True, True)]


def test_a_clock_that_ran_backwards_is_said_and_orders_nothing() -> None:
    def line(number: int, writer: str, at: str, where: str) -> Line:
        event = {"set": "member", "id": "J-1", "path": ["where"], "data": where, "at": f"2026-03-02T{at}Z"}
        return Line(number, event | {"n": number, "from": writer})

    steady = [line(3, "k3f9x7q2m4ab", "09:00:00", "a"), line(4, "another1writ", "08:00:00", "b")]
    assert fold([_line(put()), *steady, steady[0]]).notices == []
    state = fold(
        [_line(put()), *steady, line(5, "k3f9x7q2m4ab", "08:30:00", "c"), line(6, "k3f9x7q2m4ab", "08:00:00", "d")]
    )
    assert state.members["J-1"]["where"] == "d"
    assert state.notices == ["line 5: the clock ran backwards; the order is the log's (and 1 more such lines)"]


def test_check_counts_and_names_each_problem_in_the_order_of_the_file(tmp_path: Path) -> None:
    path = write(tmp_path, put("J-1"), put("J-2"), {"put": "bay", "id": "nb", "data": {"spacing": "16 in"}})
    assert check_lines(str(path)) == (["sound: 4 lines, 2 members, 1 bay"], 0)
    with path.open("ab") as file:
        file.write(b'{"set": "member", "id": "J\\u001b[2J", "path": ["where"], "data": "x"}\nnonsense\n')
        file.write(encode(put("J-3", {"size": {"depth": "40 psf"}})))
    lines, status = check_lines(str(path))
    assert status == 2
    assert [re.search(r"line (\d+)", line) for line in lines[3:]] == [None]
    assert [f"line {number}" in line for number, line in zip((5, 6, 7), lines, strict=False)] == [True] * 3
    assert "size.depth" in lines[2]
    assert lines[-1] == "not sound: 7 lines, 2 members, 1 bay"
    assert "\x1b" not in "".join(lines)


def test_check_calls_a_torn_end_not_sound_and_says_what_cannot_be_opened(tmp_path: Path) -> None:
    path = write(tmp_path, put("J-1"), tail=b'{"put": "mem')
    lines, status = check_lines(str(path))
    assert status == 2
    assert "torn (12 bytes)" in lines[0]
    assert check_lines(str(write(tmp_path))) == (["sound: 1 line, no records"], 0)
    lines, status = check_lines(str(tmp_path / "no\x1bwhere"))
    assert status == 2
    assert len(lines) == 1
    assert "\x1b" not in lines[0]


def test_the_demo_survey_is_sound() -> None:
    path = Path(__file__).resolve().parent.parent / "tui" / "data" / "demo.survey"
    file = read_session(str(path))
    state = fold(file.lines)
    assert not file.problems
    assert not state.problems
    assert len(state.members) >= 10
    for line in path.read_text(encoding="utf-8").splitlines():
        json.loads(line)
