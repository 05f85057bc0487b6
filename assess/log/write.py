"""Writing a session: one whole line at a time, flushed before it counts as saved; nothing entered is ever lost."""

from __future__ import annotations

import contextlib
import fcntl
import os
import secrets
from collections.abc import Callable
from dataclasses import replace
from datetime import UTC, datetime
from typing import Any

from assess.log.fold import State, check_event, fold
from assess.log.lines import VERSION, encode
from assess.log.read import Line, SessionError, SessionFile, parse_session, read_bytes

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
        self._size = 0
        self._torn = b""
        self._lost: str | None = None  # why this file will never take a line again
        self._kept: list[bytes] = []  # what is on disk, should the file be taken away

    @classmethod
    def create(
        cls, path: str, site: str = "", units: str = "US", inspector: str = "", by: str = "",
        clock: Callable[[], str] = utc_now,
    ) -> SessionLog:  # fmt: skip
        """Make a new session file with its header, flushed with its folder.

        raises   SessionError where the file exists or cannot be made
        """
        header = {"willcarry": VERSION, "site": site, "inspector": inspector, "opened": clock(), "units": units}
        line = encode(header)
        try:
            descriptor = os.open(path, os.O_RDWR | os.O_CREAT | os.O_EXCL | os.O_APPEND | os.O_CLOEXEC, 0o644)
        except (OSError, ValueError) as error:
            reason = error.strerror if isinstance(error, OSError) and error.strerror else str(error)
            raise SessionError(f"{path!r} cannot be made: {reason}") from None
        try:
            written = os.write(descriptor, line)
            os.fsync(descriptor)
            if written != len(line):
                raise OSError(28, "the header was written short")
            _flush_folder(path)
        except OSError as error:
            with contextlib.suppress(OSError):
                os.unlink(path)
            raise SessionError(f"{path!r} cannot be made: {error.strerror}") from None
        finally:
            os.close(descriptor)
        return cls.open(path, by, clock)

    @classmethod
    def open(cls, path: str, by: str = "", clock: Callable[[], str] = utc_now) -> SessionLog:
        """Open a session file; read-only where another holds its lock or it may not be written.

        raises   SessionError where it cannot be read
        """
        log = cls(path, by, clock)
        log.read_only = log._take()
        log._load()
        return log

    def _take(self) -> str | None:
        """Open for appending and take the advisory lock; why that is not possible, or None."""
        try:
            descriptor = os.open(self.path, os.O_RDWR | os.O_APPEND | os.O_NONBLOCK | os.O_CLOEXEC)
        except (OSError, ValueError) as error:
            return f"the file cannot be written: {getattr(error, 'strerror', None) or error}"
        try:
            fcntl.flock(descriptor, fcntl.LOCK_EX | fcntl.LOCK_NB)
        except OSError:
            os.close(descriptor)
            return "another copy has the session open for writing"
        self._descriptor = descriptor
        return None

    def _load(self) -> None:
        data = read_bytes(self.path)
        self.file = parse_session(self.path, data)
        self._kept = [data[: self.file.size]]
        self.state = fold(self.file.lines, self.file.units)
        self._size = self.file.size
        self._torn = self.file.torn
        self.notices = [*self.file.notices, *self.state.notices]

    def append(self, event: dict[str, Any]) -> None:
        """Apply a change and write it, flushed, as one line.

        event    {'put'|'set'|'drop': kind, 'id': ..., ...}; the stamp is added here
        raises   ReadingError where the change is refused (nothing is kept of it);
                 WriteError where it is accepted but not on disk: it is kept in `pending`, see `retry`
        """
        if self.read_only is not None:
            raise WriteError(f"not saved: {self.read_only}")
        check_event(event)
        self.count += 1
        stamped = event | {"n": self.count, "from": self.source, "at": self.clock(), "by": self.by}
        line = encode(stamped)
        with contextlib.suppress(OSError):  # what is wrong with the file is said when the line is written
            if self._descriptor is not None:
                self._meet(self._descriptor)
        self.state.change(Line(0, stamped))
        self.pending.append(line)
        self.retry()

    def retry(self) -> None:
        """Write what waits, in order; raises WriteError, and keeps it, where that fails."""
        while self.pending:
            try:
                self._write(self.pending[0])
            except OSError as error:
                reason = error.strerror or str(error)
                raise WriteError(
                    f"not saved yet: {reason}; {len(self.pending)} change(s) kept here until they can be written"
                ) from None
            self.pending.pop(0)

    def _write(self, line: bytes) -> None:
        if self._descriptor is None:
            reason = self._lost or self._take()
            if reason is not None:
                raise OSError(5, reason)
        descriptor = self._descriptor
        assert descriptor is not None
        self._meet(descriptor)
        if self._torn:
            self._set_aside(descriptor)
        if not self.file.ended:
            # A whole last line without its newline gets it first, or ours would run into it.
            line = b"\n" + line
        try:
            written = os.write(descriptor, line)
            if written != len(line):
                raise OSError(28, "the line was written short")
        except OSError:
            with contextlib.suppress(OSError):
                os.ftruncate(descriptor, self._size)
            raise
        try:
            os.fsync(descriptor)
        except OSError:
            # After a failed flush this descriptor's pages may be lost while it reports success: never trust it again.
            with contextlib.suppress(OSError):
                os.ftruncate(descriptor, self._size)
            self.close()
            raise
        self._size += len(line)
        self._kept.append(line)
        if not self.file.ended:
            self.file = replace(self.file, ended=True)

    def _meet(self, descriptor: int) -> None:
        """Compare the file with what is expected; fold in and say what another has added."""
        status = os.fstat(descriptor)
        if status.st_nlink == 0:
            self.close()
            self._lost = "the session file was removed or replaced; save to another place"
            raise OSError(2, self._lost)
        here = self._size + len(self._torn)
        if status.st_size == here:
            return
        if status.st_size < here:
            raise OSError(5, "the session file was cut by another program; save to another place")
        data = read_bytes(self.path)
        file = parse_session(self.path, data)
        known = sum(1 for line in self.file.lines)
        added = [line for line in file.lines[known:] if line.event.get("from") != self.source]
        for line in added:
            self.state.apply(line)
        if added:
            self.notices.append(f"{len(added)} line(s) added by another program are folded in")
        self.file, self._size, self._torn = file, file.size, file.torn
        self._kept = [data[: file.size]]

    def _set_aside(self, descriptor: int) -> None:
        """Keep a torn end beside the file, then cut the log back to its last whole line."""
        stamp = self.clock().replace(":", "").replace("-", "")
        place = f"{self.path}.torn-{stamp}"
        number = 1
        while True:
            try:
                aside = os.open(place, os.O_WRONLY | os.O_CREAT | os.O_EXCL | os.O_CLOEXEC, 0o644)
                break
            except FileExistsError:
                number += 1
                place = f"{self.path}.torn-{stamp}-{number}"
        try:
            if os.write(aside, self._torn) != len(self._torn):
                raise OSError(28, "the torn end could not be kept")
            os.fsync(aside)
        finally:
            os.close(aside)
        _flush_folder(self.path)
        os.ftruncate(descriptor, self._size)
        self._torn = b""
        self.notices.append(f"the torn end is kept in {place}")

    def save_elsewhere(self, path: str) -> None:
        """Write everything, what waits included, to a new file and go on there.

        raises   SessionError where that file exists or cannot be made
        """
        kept = b"".join(self._kept)
        data = kept + (b"" if kept.endswith(b"\n") else b"\n") + b"".join(self.pending)
        try:
            descriptor = os.open(path, os.O_WRONLY | os.O_CREAT | os.O_EXCL | os.O_CLOEXEC, 0o644)
            try:
                if os.write(descriptor, data) != len(data):
                    raise OSError(28, "written short")
                os.fsync(descriptor)
            finally:
                os.close(descriptor)
            _flush_folder(path)
        except OSError as error:
            raise SessionError(f"{path!r} cannot be made: {error.strerror}") from None
        self.close()
        self.path, self.pending, self._torn, self._lost = path, [], b"", None
        self.read_only = self._take()
        self.file = parse_session(path, data)
        self._size, self._kept = self.file.size, [data]

    def close(self) -> None:
        """Let go of the file and its lock; what is on disk stays, what waits stays in `pending`."""
        if self._descriptor is not None:
            with contextlib.suppress(OSError):
                os.close(self._descriptor)
            self._descriptor = None


def _flush_folder(path: str) -> None:
    folder = os.open(os.path.dirname(os.path.abspath(path)), os.O_RDONLY | os.O_DIRECTORY | os.O_CLOEXEC)
    try:
        os.fsync(folder)
    finally:
        os.close(folder)
