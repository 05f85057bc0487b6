"""The session file read back: limits, checksums, torn ends, bad lines, hostile bytes; each with its line number."""

from __future__ import annotations

import json
import os
import time
import tracemalloc
from pathlib import Path
from typing import Any

import pytest

from assess.log.fold import fold
from assess.log.lines import LineError, decode, encode
from assess.log.read import SessionError, read_session

HEADER = {"willcarry": 1, "site": "Sluice cottage", "units": "US"}
JOIST = {"kind": "joist", "size": {"width": "1 1/2 in", "depth": "7 1/4 in"}, "spans": ["10 ft"]}


def put(name: str = "J-1", data: dict[str, Any] | None = None, **stamp: Any) -> dict[str, Any]:
    return {"put": "member", "id": name, "data": JOIST if data is None else data} | stamp


def write(folder: Path, *events: dict[str, Any], tail: bytes = b"") -> Path:
    path = folder / "s.survey"
    path.write_bytes(b"".join(encode(event) for event in (HEADER, *events)) + tail)
    return path


def test_a_line_comes_back_as_it_was_written() -> None:
    for event in (HEADER, put(data={"remarks": 'é "crc": \\u2028 ½'})):
        assert decode(encode(event).rstrip(b"\n")) == event


def test_checksum_is_the_crc32_of_the_line_without_it() -> None:
    # interface: CRC-32 (zlib) of the line as it reads without `, "crc": "..."`; the figure by Python's own binascii
    import binascii

    line = encode({"willcarry": 1}).decode().rstrip("\n")
    crc = binascii.crc32(b'{"willcarry": 1}')
    assert line == f'{{"willcarry": 1, "crc": "{crc:08x}"}}'


@pytest.mark.parametrize(
    "line",
    [
        b'{"willcarry": 1, "crc": "0443B9BB"}',
        b'{"willcarry": 1, "crc": "0443b9bc"}',
        b'{"crc": "0443b9bb", "willcarry": 1}',
        b'{"a": NaN}',
        b'{"a": -Infinity}',
        b'{"a": 1e999}',
        b'{"a": ' + b"9" * 5000 + b"}",
        b'{"a": 1, "a": 2}',
        b'{"a": "\\ud800"}',
        b"[1]",
        b"true",
        b"\xff\xfe",
        b"[" * 100_000,
        b'{"a":' * 100_000,
        b"x" * 1_000_001,
        b"\x00\x00",
        b"",
    ],
)
def test_a_malformed_line_is_refused(line: bytes) -> None:
    start = time.perf_counter()
    with pytest.raises(LineError):
        decode(line)
    assert time.perf_counter() - start < 2.0


def test_every_flipped_bit_is_caught() -> None:
    line = bytearray(encode(put()).rstrip(b"\n"))
    for place in range(len(line)):
        for bit in range(8):
            line[place] ^= 1 << bit
            if bytes(line) != encode(put()).rstrip(b"\n"):
                try:
                    event = decode(bytes(line))
                except LineError:
                    pass
                else:
                    # only a flip that takes the checksum's own name away may decode; it is then an unknown field
                    assert fold([_line(event)]).problems
            line[place] ^= 1 << bit


def _line(event: dict[str, Any]) -> Any:
    from assess.log.read import Line

    return Line(2, event)


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


@pytest.mark.parametrize("kind", ["folder", "fifo", "zero", "missing", "dangling", "newline"])
def test_what_is_no_regular_file_is_refused_at_once(tmp_path: Path, kind: str) -> None:
    path = tmp_path / kind
    if kind == "folder":
        path.mkdir()
    elif kind == "fifo":
        os.mkfifo(path)
    elif kind == "zero":
        path = Path("/dev/zero")
    elif kind == "dangling":
        path.symlink_to(tmp_path / "nowhere")
    elif kind == "newline":
        path = Path(str(tmp_path / "a\nb"))
    start = time.perf_counter()
    with pytest.raises(SessionError) as error:
        read_session(str(path))
    assert time.perf_counter() - start < 1.0
    assert "\n" not in str(error.value)


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


@pytest.mark.parametrize("at", ["9999-12-31T23:59:60", "0000-01-01", "yesterday", ""])
def test_time_is_text_and_decides_nothing(at: str) -> None:
    assert fold([_line(put(at=at))]).problems == []


def test_the_demo_survey_is_sound() -> None:
    path = Path(__file__).resolve().parent.parent / "tui" / "data" / "demo.survey"
    file = read_session(str(path))
    state = fold(file.lines)
    assert not file.problems
    assert not state.problems
    assert len(state.members) >= 10
    for line in path.read_text(encoding="utf-8").splitlines():
        json.loads(line)
