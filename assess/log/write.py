"""Writing a session: one whole line at a time, flushed before it counts as saved; nothing entered is ever lost."""

from __future__ import annotations

import contextlib
import errno
import os
import secrets
from collections.abc import Callable
from dataclasses import replace
from datetime import UTC, datetime
from typing import Any

from assess.log.disk import FlushError, append_line, is_at, keep_aside, take, write_new
from assess.log.fold import State, check_event, fold
from assess.log.lines import VERSION, LineError, decode, encode
from assess.log.read import Line, SessionError, SessionFile, parse_session, read_bytes, read_descriptor

CROCKFORD = "0123456789abcdefghjkmnpqrstvwxyz"


class WriteError(Exception):
    """A change that is not on disk yet; it is kept and written with the next that can be. str() is one line."""


def utc_now() -> str:
    """The time now, as lines carry it; it never decides order."""
    return datetime.now(UTC).strftime("%Y-%m-%dT%H:%M:%SZ")


class SessionLog:
    """An open session: its file, the records as they stand, and changes that wait to be written.

    read_only   why nothing can be written, or None
    pending     lines accepted but not on disk
    notices     what was found in the file and what happened to it, in the order it was met
    """

    def __init__(self, path: str, by: str, clock: Callable[[], str]) -> None:
        self.path, self.by, self.clock = path, by, clock
        self.source = "".join(secrets.choice(CROCKFORD) for _ in range(12))
        self.count = 0
        self.read_only: str | None = None
        self.pending: list[bytes] = []
        self.notices: list[str] = []
        self.file: SessionFile
        self.state: State
        self._descriptor: int | None = None
        self._kept: list[bytes] = []  # whole lines on disk: what the file must begin with to be this session
        self._size = 0  # bytes of them
        self._lines = 0  # how many
        self._torn = b""
        self._told = 0  # of the state's notices

    @classmethod
    def create(
        cls, path: str, site: str = "", units: str = "US", inspector: str = "", by: str = "",
        clock: Callable[[], str] = utc_now,
    ) -> SessionLog:  # fmt: skip
        """Make a new session file with its header, flushed with its folder.

        raises   SessionError where the file exists or cannot be made
        """
        header = {"willcarry": VERSION, "site": site, "inspector": inspector, "opened": clock(), "units": units}
        try:
            write_new(path, encode(header))
        except (OSError, LineError) as error:
            raise SessionError(f"{path!r} cannot be made: {_reason(error)}") from None
        return cls.open(path, by, clock)

    @classmethod
    def open(cls, path: str, by: str = "", clock: Callable[[], str] = utc_now) -> SessionLog:
        """Open a session file; read-only where another holds its lock or it may not be written.

        raises   SessionError where it cannot be read
        """
        log = cls(path, by, clock)
        log.read_only = log._take()
        try:
            data = read_bytes(path) if log._descriptor is None else read_descriptor(path, log._descriptor)
            log._know(parse_session(path, data), data)
        except SessionError:
            log.close()
            raise
        log.state = fold(log.file.lines, log.file.units)
        log.notices += log.file.notices
        log._tell()
        return log

    def _take(self) -> str | None:
        """Take the file for writing; why that is not possible, or None."""
        try:
            self._descriptor = take(self.path)
        except OSError as error:
            return _reason(error)
        return None

    def _know(self, file: SessionFile, data: bytes) -> None:
        """Hold on to what stands on disk."""
        whole = data[: file.size]
        self.file, self._kept, self._size, self._torn = file, [whole], file.size, file.torn
        self._lines = whole.count(b"\n") + (0 if file.ended else 1)

    def _tell(self) -> None:
        self.notices += self.state.notices[self._told :]
        self._told = len(self.state.notices)

    def append(self, event: dict[str, Any]) -> None:
        """Apply a change and write it, flushed, as one line.

        event    {'put'|'set'|'drop': kind, 'id': ..., ...}; the stamp is added here
        raises   ReadingError or LineError where the change is refused (nothing is kept of it);
                 WriteError where it is accepted but not on disk: it is kept in `pending`, see `retry`
        """
        if self.read_only is not None:
            raise WriteError(f"not saved: {self.read_only}")
        check_event(event)
        self.count += 1
        line = encode(event | {"n": self.count, "from": self.source, "at": self.clock(), "by": self.by})
        with contextlib.suppress(OSError):  # what is wrong with the file is said when the line is written
            self._meet()
        # Applied as it will be read back, so that state and file cannot differ.
        self.state.change(Line(self._lines + len(self.pending) + 1, decode(line[:-1])))
        self._tell()
        self.pending.append(line)
        self.retry()

    def retry(self) -> None:
        """Write what waits, in order; raises WriteError, and keeps it, where that fails."""
        while self.pending:
            try:
                self._write(self.pending[0])
            except OSError as error:
                waiting = f"{len(self.pending)} change(s) kept here until they can be written"
                raise WriteError(f"not saved yet: {_reason(error)}; {waiting}") from None
            self.pending.pop(0)

    def _write(self, line: bytes) -> None:
        descriptor = self._meet()
        if self._torn:
            place = keep_aside(self.path, self._torn, self._stamp())
            os.ftruncate(descriptor, self._size)
            self._torn = b""
            self.notices.append(f"the torn end is kept in {place}")
        if not self.file.ended:
            # A whole last line without its newline gets it first, or ours would run into it.
            line = b"\n" + line
        try:
            append_line(descriptor, line, self._size)
        except FlushError:
            self.close()
            raise
        self._size += len(line)
        self._lines += 1
        self._kept.append(line)
        if not self.file.ended:
            self.file = replace(self.file, ended=True)

    def _meet(self) -> int:
        """The descriptor to append to, once what stands at the path is known to be this session still.

        Lines another program added are folded in and said. raises OSError where the file is not this session any more
        """
        if self._descriptor is not None and not is_at(self.path, self._descriptor):
            self.close()
        if self._descriptor is not None:
            if os.fstat(self._descriptor).st_size == self._size + len(self._torn):
                return self._descriptor
        else:
            self._descriptor = take(self.path)
        try:
            self._reread(self._descriptor)
        except OSError:
            # Whatever comes to stand there next is read whole again before a byte is added to it.
            self.close()
            raise
        return self._descriptor

    def _reread(self, descriptor: int) -> None:
        try:
            data = read_descriptor(self.path, descriptor)
            kept = b"".join(self._kept)
            if not data.startswith(kept):
                how = "cut" if kept.startswith(data) else "changed or replaced"
                raise SessionError(f"the session file was {how} by another program")
            if not self.file.ended and data[len(kept) : len(kept) + 1] not in (b"", b"\r", b"\n"):
                raise SessionError("the last line of the session file was changed by another program")
            file = parse_session(self.path, data)
        except SessionError as error:
            raise OSError(errno.EIO, f"{error}; save to another place") from None
        added = [line for line in file.lines if line.number > self._lines]
        for line in added:
            self.state.apply(line)  # one of ours, whose cutting back failed, is known as a repeat
        others = sum(line.event.get("from") != self.source for line in added)
        if others:
            self.notices.append(f"{others} line(s) added by another program are folded in")
        self._tell()
        self._know(file, data)

    def save_elsewhere(self, path: str) -> None:
        """Write everything, what waits included, to a new file and go on there.

        raises   SessionError where that file exists or cannot be made
        """
        kept = b"".join(self._kept)
        data = kept + (b"" if kept.endswith(b"\n") else b"\n") + b"".join(self.pending)
        try:
            write_new(path, data)
        except OSError as error:
            raise SessionError(f"{path!r} cannot be made: {_reason(error)}") from None
        if self._torn:
            try:
                self.notices.append(f"the torn end is kept in {keep_aside(path, self._torn, self._stamp())}")
            except OSError as error:
                self.notices.append(_reason(error))
        self.close()
        self.path, self.pending = path, []
        self.read_only = self._take()
        self._know(parse_session(path, data), data)

    def _stamp(self) -> str:
        return self.clock().replace(":", "").replace("-", "")

    def close(self) -> None:
        """Let go of the file and its lock; what is on disk stays, what waits stays in `pending`."""
        if self._descriptor is not None:
            with contextlib.suppress(OSError):
                os.close(self._descriptor)
            self._descriptor = None


def _reason(error: Exception) -> str:
    return (error.strerror if isinstance(error, OSError) else None) or str(error)
