"""Writing a session: what was acknowledged survives kills, full disks, failed flushes, other writers."""

from __future__ import annotations

import os
import random
import signal
import subprocess
import sys
import time
from pathlib import Path
from typing import Any

import pytest

from assess.errors import ReadingError
from assess.log import write as writing
from assess.log.fold import fold
from assess.log.read import SessionError, read_session
from assess.log.write import SessionLog, WriteError

JOIST = {"kind": "joist", "size": {"width": "1 1/2 in", "depth": "7 1/4 in"}}


def clock() -> str:
    return "2026-03-02T08:52:11Z"


def made(folder: Path, name: str = "s.survey") -> SessionLog:
    return SessionLog.create(str(folder / name), site="Sluice cottage", by="T2", clock=clock)


def put(name: str) -> dict[str, Any]:
    return {"put": "member", "id": name, "data": JOIST}


def members(path: str) -> list[str]:
    file = read_session(path)
    state = fold(file.lines)
    assert not file.problems
    assert not state.problems
    return list(state.members)


def test_a_change_is_on_disk_when_append_returns(tmp_path: Path) -> None:
    log = made(tmp_path)
    log.append(put("J-1"))
    log.append({"set": "member", "id": "J-1", "path": ["size", "depth"], "data": "7 1/2 in"})
    assert members(log.path) == ["J-1"]
    file = read_session(log.path)
    assert file.lines[1].event["data"] == "7 1/2 in"
    assert [line.event["n"] for line in file.lines] == [1, 2]
    assert len({line.event["from"] for line in file.lines}) == 1
    assert len(file.lines[0].event["from"]) == 12
    assert file.lines[0].event["at"] == clock()
    assert file.lines[0].event["by"] == "T2"


def test_a_refused_change_leaves_nothing(tmp_path: Path) -> None:
    log = made(tmp_path)
    log.append(put("J-1"))
    before = Path(log.path).read_bytes()
    for event in (
        {"set": "member", "id": "J-1", "path": ["size", "depth"], "data": "40 psf"},
        {"set": "member", "id": "nobody", "path": ["where"], "data": "x"},
        {"put": "member", "id": "a\nb", "data": {}},
    ):
        with pytest.raises(ReadingError):
            log.append(event)
    assert Path(log.path).read_bytes() == before
    assert log.pending == []
    log.append(put("J-2"))
    assert members(log.path) == ["J-1", "J-2"]


def test_a_new_session_never_replaces_a_file(tmp_path: Path) -> None:
    made(tmp_path)
    with pytest.raises(SessionError, match="exists"):
        made(tmp_path)
    with pytest.raises(SessionError):
        SessionLog.create(str(tmp_path / "missing" / "x.survey"))


def test_a_second_copy_reads_only(tmp_path: Path) -> None:
    first = made(tmp_path)
    second = SessionLog.open(first.path)
    assert second.read_only == "another copy has the session open for writing"
    with pytest.raises(WriteError, match="another copy"):
        second.append(put("J-1"))
    first.close()
    assert SessionLog.open(first.path).read_only is None


def test_a_torn_end_is_kept_beside_before_the_first_write(tmp_path: Path) -> None:
    log = made(tmp_path)
    log.append(put("J-1"))
    log.close()
    with open(log.path, "ab") as file:
        file.write(b'{"put": "member", "id": "J-2", "da')
    again = SessionLog.open(log.path, clock=clock)
    assert any("torn" in notice for notice in again.notices)
    again.append(put("J-3"))
    assert members(log.path) == ["J-1", "J-3"]
    kept = list(tmp_path.glob("s.survey.torn-*"))
    assert [path.read_bytes() for path in kept] == [b'{"put": "member", "id": "J-2", "da']


def test_a_last_line_without_its_newline_gets_it(tmp_path: Path) -> None:
    log = made(tmp_path)
    log.append(put("J-1"))
    log.close()
    path = Path(log.path)
    path.write_bytes(path.read_bytes().rstrip(b"\n"))
    again = SessionLog.open(log.path)
    again.append(put("J-2"))
    again.append(put("J-3"))
    assert members(log.path) == ["J-1", "J-2", "J-3"]


@pytest.mark.parametrize("fault", ["write", "short", "fsync"])
def test_a_failed_write_is_kept_and_written_later(tmp_path: Path, monkeypatch: pytest.MonkeyPatch, fault: str) -> None:
    log = made(tmp_path)
    log.append(put("J-1"))
    real_write, real_fsync = os.write, os.fsync
    before = Path(log.path).read_bytes()

    def full(descriptor: int, data: bytes) -> int:
        if fault == "short":
            real_write(descriptor, data[:10])
            return 10
        raise OSError(28, "No space left on device")

    def broken(descriptor: int) -> None:
        raise OSError(5, "Input/output error")

    if fault == "fsync":
        monkeypatch.setattr(writing.os, "fsync", broken)
    else:
        monkeypatch.setattr(writing.os, "write", full)
    with pytest.raises(WriteError, match="not saved yet"):
        log.append(put("J-2"))
    with pytest.raises(WriteError, match="2 change"):
        log.append(put("J-3"))
    assert Path(log.path).read_bytes() == before
    assert list(log.state.members) == ["J-1", "J-2", "J-3"]
    monkeypatch.setattr(writing.os, "write", real_write)
    monkeypatch.setattr(writing.os, "fsync", real_fsync)
    log.retry()
    assert members(log.path) == ["J-1", "J-2", "J-3"]
    assert log.pending == []


def test_lines_added_by_another_are_folded_in_and_said(tmp_path: Path) -> None:
    log = made(tmp_path)
    log.append(put("J-1"))
    with open(log.path, "ab") as file:
        file.write(b'{"put": "member", "id": "H-1", "data": {"kind": "header"}}\n')
    log.append(put("J-2"))
    assert list(log.state.members) == ["J-1", "H-1", "J-2"]
    assert any("folded in" in notice for notice in log.notices)
    assert members(log.path) == ["J-1", "H-1", "J-2"]


@pytest.mark.parametrize("fault", ["removed", "cut", "replaced"])
def test_a_file_changed_underneath_loses_nothing(tmp_path: Path, fault: str) -> None:
    log = made(tmp_path)
    log.append(put("J-1"))
    path = Path(log.path)
    if fault == "removed":
        path.unlink()
    elif fault == "cut":
        path.write_bytes(path.read_bytes()[:20])
    else:
        other = tmp_path / "other"
        other.write_bytes(b"not ours")
        other.replace(path)
    with pytest.raises(WriteError, match="save to another place"):
        log.append(put("J-2"))
    assert list(log.state.members) == ["J-1", "J-2"]
    log.save_elsewhere(str(tmp_path / "kept.survey"))
    log.append(put("J-3"))
    assert members(str(tmp_path / "kept.survey"))[-2:] == ["J-2", "J-3"]


def test_read_only_file_says_so(tmp_path: Path) -> None:
    log = made(tmp_path)
    log.close()
    os.chmod(log.path, 0o444)
    if os.access(log.path, os.W_OK):
        # The superuser writes whatever the mode says; the lock test above covers refusing to write.
        assert SessionLog.open(log.path).read_only is None
    else:
        assert "cannot be written" in str(SessionLog.open(log.path).read_only)


WRITER = """
import sys
from assess.log.write import SessionLog
log = SessionLog.open(sys.argv[1])
for i in range(100000):
    log.append({"put": "member", "id": f"J-{sys.argv[2]}-{i}", "data": {"kind": "joist", "remarks": "x" * 300}})
    sys.stdout.write(f"J-{sys.argv[2]}-{i}\\n")
    sys.stdout.flush()
"""


def test_a_killed_writer_loses_no_acknowledged_change(tmp_path: Path) -> None:
    log = made(tmp_path)
    log.close()
    acknowledged: list[str] = []
    moment = random.Random(7)
    for turn in range(6):
        process = subprocess.Popen(
            [sys.executable, "-c", WRITER, log.path, str(turn)], stdout=subprocess.PIPE, text=True
        )
        assert process.stdout is not None
        acknowledged.append(process.stdout.readline().strip())
        time.sleep(moment.uniform(0.0, 0.05))
        process.send_signal(signal.SIGKILL)
        acknowledged += [line for line in process.stdout.read().split("\n")[:-1] if line]
        process.stdout.close()
        process.wait()
    kept = set(fold(read_session(log.path).lines).members)
    assert len(acknowledged) > 6
    assert set(acknowledged) <= kept
