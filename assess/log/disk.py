"""The file under a session: taken under a lock, appended one flushed line at a time, cut back only over own bytes."""

from __future__ import annotations

import contextlib
import errno
import fcntl
import os
import stat

# Some file systems cannot flush a folder and say so; the file itself is flushed all the same.
_NO_FOLDER_FLUSH = (errno.EINVAL, errno.ENOTSUP)
_FLAGS = os.O_NONBLOCK | os.O_NOCTTY | os.O_CLOEXEC


class FlushError(OSError):
    """What was written may not be on disk: the descriptor must not be trusted again."""


def take(path: str) -> int:
    """Open a regular file for appending and take its advisory lock.

    returns   descriptor, whose closing lets go of the lock
    raises    OSError with a reason a person can read
    """
    try:
        descriptor = os.open(path, os.O_RDWR | os.O_APPEND | _FLAGS)
    except ValueError as error:
        raise OSError(errno.EINVAL, f"the file cannot be written: {error}") from None
    except FileNotFoundError:
        raise OSError(errno.ENOENT, "the session file was moved or removed; save to another place") from None
    except OSError as error:
        raise OSError(error.errno, f"the file cannot be written: {error.strerror}") from None
    try:
        if not stat.S_ISREG(os.fstat(descriptor).st_mode):
            raise OSError(errno.EINVAL, "it is not a regular file")
        _lock(descriptor)
    except OSError:
        os.close(descriptor)
        raise
    return descriptor


def _lock(descriptor: int) -> None:
    try:
        fcntl.flock(descriptor, fcntl.LOCK_EX | fcntl.LOCK_NB)
    except BlockingIOError:
        raise OSError(errno.EWOULDBLOCK, "another copy has the session open for writing") from None
    except OSError as error:
        raise OSError(error.errno, f"the file cannot be locked: {error.strerror}") from None


def is_at(path: str, descriptor: int) -> bool:
    """Whether the open file is still the one that stands at the path."""
    held = os.fstat(descriptor)
    try:
        there = os.stat(path)
    except OSError:
        return False
    return (held.st_dev, held.st_ino) == (there.st_dev, there.st_ino)


def append_line(descriptor: int, line: bytes, size: int) -> None:
    """Append one whole line and flush it; where that fails, the file is cut back to what it was.

    size     bytes in the file before
    raises   FlushError where the flush failed, OSError where the write did
    """
    written = os.write(descriptor, line)
    if written != len(line):
        _cut_back(descriptor, size, written)
        raise OSError(errno.ENOSPC, "the line was written short")
    try:
        os.fsync(descriptor)
    except OSError as error:
        _cut_back(descriptor, size, written)
        raise FlushError(error.errno, error.strerror) from None


def _cut_back(descriptor: int, size: int, written: int) -> None:
    """Take off what was just written, unless another program has added to it since."""
    # Where cutting fails too, what stands there is met before the next append: as a torn end, or as a repeated line.
    with contextlib.suppress(OSError):
        if os.fstat(descriptor).st_size == size + written:
            os.ftruncate(descriptor, size)


def write_new(path: str, data: bytes) -> None:
    """Make a file that was not there, flushed with its folder; nothing is left of it where that fails.

    raises   OSError, FileExistsError among them
    """
    try:
        descriptor = os.open(path, os.O_WRONLY | os.O_CREAT | os.O_EXCL | os.O_CLOEXEC, 0o644)
    except ValueError as error:
        raise OSError(errno.EINVAL, str(error)) from None
    try:
        try:
            if os.write(descriptor, data) != len(data):
                raise OSError(errno.ENOSPC, "it was written short")
            os.fsync(descriptor)
        finally:
            os.close(descriptor)
        flush_folder(path)
    except OSError:
        with contextlib.suppress(OSError):
            os.unlink(path)
        raise


def keep_aside(path: str, torn: bytes, stamp: str) -> str:
    """Keep a torn end beside the session.

    stamp     time, a part of the name
    returns   where it is kept
    raises    OSError where it cannot be
    """
    plain = f"{path}.torn-{stamp}"
    place, number = plain, 1
    while True:
        try:
            write_new(place, torn)
        except FileExistsError:
            number += 1
            place = f"{plain}-{number}"
        except OSError as error:
            raise OSError(error.errno, f"the torn end cannot be kept beside it: {error.strerror}") from None
        else:
            return place


def flush_folder(path: str) -> None:
    """Flush the folder of a file, so that its name is on disk too."""
    folder = os.open(os.path.dirname(os.path.abspath(path)), os.O_RDONLY | os.O_DIRECTORY | os.O_CLOEXEC)
    try:
        os.fsync(folder)
    except OSError as error:
        if error.errno not in _NO_FOLDER_FLUSH:
            raise
    finally:
        os.close(folder)
