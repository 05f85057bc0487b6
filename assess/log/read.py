"""Reading a session file: by descriptor, within limits, line by line; torn and bad lines set aside, never applied."""

from __future__ import annotations

import os
import stat
from dataclasses import dataclass
from typing import Any

from assess.errors import ReadingError
from assess.log.lines import LARGEST_FILE, MOST_LINES, VERSION, LineError, decode

BOM = b"\xef\xbb\xbf"


class SessionError(Exception):
    """A session file that cannot be opened at all; str() is one line."""


@dataclass(frozen=True)
class Problem:
    """Something in a file that is not applied: line number (from 1), record, field, and why."""

    line: int
    id: str
    field: str
    message: str


@dataclass(frozen=True)
class Line:
    """A sound line: its number in the file and what it holds."""

    number: int
    event: dict[str, Any]


@dataclass(frozen=True)
class SessionFile:
    """What stands in a file.

    size    bytes up to and with the last whole line; what follows is `torn`
    torn    bytes after the last whole line that are no sound line
    ended   whether the last whole line has its newline
    """

    path: str
    header: dict[str, Any]
    lines: tuple[Line, ...]
    problems: tuple[Problem, ...]
    notices: tuple[str, ...]
    size: int
    torn: bytes
    ended: bool

    @property
    def units(self) -> str:
        """Units of bare numbers, 'US' or 'SI'."""
        return str(self.header.get("units", "US"))


def read_bytes(path: str) -> bytes:
    """The bytes of a regular file, read by descriptor, at most the largest size allowed.

    raises   SessionError for anything that is no readable regular file; never hangs on a FIFO or a device
    """
    try:
        descriptor = os.open(path, os.O_RDONLY | os.O_NONBLOCK | os.O_NOCTTY | os.O_CLOEXEC)
    except (OSError, ValueError) as error:
        reason = error.strerror if isinstance(error, OSError) and error.strerror else str(error)
        raise SessionError(f"{path!r} cannot be opened: {reason}") from None
    try:
        return read_descriptor(path, descriptor)
    finally:
        os.close(descriptor)


def read_descriptor(path: str, descriptor: int) -> bytes:
    """The bytes of an open file from its start; `read_bytes` for one who holds it already. Raises SessionError."""
    try:
        status = os.fstat(descriptor)
        if not stat.S_ISREG(status.st_mode):
            raise SessionError(f"{path!r} is not a regular file; accepted: a session file")
        if status.st_size > LARGEST_FILE:
            raise SessionError(f"{path!r} is {status.st_size:,} bytes; a session holds at most {LARGEST_FILE:,}")
        os.lseek(descriptor, 0, os.SEEK_SET)
        with os.fdopen(descriptor, "rb", closefd=False) as file:
            data = file.read(LARGEST_FILE + 1)
    except OSError as error:
        raise SessionError(f"{path!r} cannot be read: {error.strerror}") from None
    if len(data) > LARGEST_FILE:
        raise SessionError(f"{path!r} grows past {LARGEST_FILE:,} bytes; a session holds no more")
    return data


def read_session(path: str) -> SessionFile:
    """Read a session file.

    path      a regular file, or a link to one
    returns   SessionFile; bad lines in the middle are problems, a torn end is set aside
    raises    SessionError in one line: not a regular file, too large, UTF-16, no header, a second header, newer version
    """
    return parse_session(path, read_bytes(path))


def parse_session(path: str, data: bytes) -> SessionFile:
    """`read_session` on bytes already read."""
    notices: list[str] = []
    start = 0
    if data[:2] in (b"\xff\xfe", b"\xfe\xff"):
        raise SessionError(f"{path!r} is UTF-16; accepted: UTF-8")
    if data.startswith(BOM):
        start = len(BOM)
        notices.append("a byte order mark at the start is tolerated")
    if data.count(b"\n") > MOST_LINES:
        raise SessionError(f"{path!r} has more than {MOST_LINES:,} lines")
    whole = data.rfind(b"\n") + 1
    pieces = data[start:whole].split(b"\n")[:-1] if whole > start else []
    tail, torn, size, ended = data[max(whole, start) :], b"", max(whole, start if whole else 0), True
    lines: list[Line] = []
    problems: list[Problem] = []
    if tail:
        try:
            decode(tail.rstrip(b"\r"))
        except LineError:
            torn = tail
            notices.append(f"the last line is torn ({len(torn)} bytes) and set aside; everything before it stands")
        else:
            pieces.append(tail)
            size, ended = len(data), False
    carriage = False
    for number, piece in enumerate(pieces, 1):
        if piece.endswith(b"\r"):
            piece, carriage = piece[:-1], True
        if not piece.strip():
            continue
        try:
            lines.append(Line(number, decode(piece)))
        except LineError as error:
            problems.append(Problem(number, "", "", f"line {error}"))
    if carriage:
        notices.append("lines that end in CR LF are tolerated")
    header, rest = _header(path, lines, problems)
    return SessionFile(path, header, rest, tuple(problems), tuple(notices), size, torn, ended)


def _header(path: str, lines: list[Line], problems: list[Problem]) -> tuple[dict[str, Any], tuple[Line, ...]]:
    if problems and problems[0].line == 1:
        reason = problems[0].message.removeprefix("line ")
        raise SessionError(f"{path!r} has no header that can be used: its first line {reason}")
    if not lines or "willcarry" not in lines[0].event or lines[0].number != 1:
        raise SessionError(f'{path!r} has no header; accepted: a first line such as {{"willcarry": 1, "units": "US"}}')
    header = lines[0].event
    version = header["willcarry"]
    if isinstance(version, bool) or not isinstance(version, int) or version < 1:
        raise SessionError(f"{path!r} names version {version!r}; accepted: {VERSION}")
    if version > VERSION:
        raise SessionError(f"{path!r} is of version {version}; this program reads version {VERSION}")
    second = next((line for line in lines[1:] if "willcarry" in line.event), None)
    if second is not None:
        raise SessionError(f"{path!r} has a second header in line {second.number}")
    known = {"willcarry", "site", "inspector", "opened", "units"}
    unknown = sorted(set(header) - known)
    if unknown:
        raise SessionError(
            f"{path!r}: header has an unknown field {unknown[0][:40]!r}; accepted: {', '.join(sorted(known))}"
        )
    if header.get("units", "US") not in ("US", "SI"):
        raise SessionError(f"{path!r}: header units {header['units']!r:.40}; accepted: US or SI")
    for name in ("site", "inspector", "opened"):
        if not isinstance(header.get(name, ""), str):
            raise SessionError(f"{path!r}: header {name} is not text")
    return header, tuple(lines[1:])


def problem_of(line: int, record_id: str, error: ReadingError) -> Problem:
    """A reading error as a problem of a line."""
    text = error.line()
    prefix = f"{error.field}: "
    return Problem(line, record_id, error.field, text.removeprefix(prefix) if error.field else text)
