"""The text being typed, kept in a side file so that a kill loses no word of it."""

from __future__ import annotations

import contextlib
import json
import os
import stat
from dataclasses import asdict, dataclass
from typing import Any

from assess.log.disk import flush_folder

LARGEST = 20_000_000  # bytes read back; far beyond what is typed between two changes


@dataclass(frozen=True)
class Draft:
    """A text not accepted yet: which record and field it was typed into."""

    kind: str
    id: str
    field: str
    text: str


def place(path: str) -> str:
    """Where the drafts of a session are kept."""
    return f"{path}.draft"


def save(path: str, drafts: list[Draft]) -> None:
    """Keep the drafts of a session, replacing those before; an empty list removes the file.

    raises   OSError where the side file cannot be written
    """
    target = place(path)
    if not drafts:
        with contextlib.suppress(FileNotFoundError):
            os.unlink(target)
        return
    temporary = f"{target}.{os.getpid()}"
    # Not through a link: the name can be guessed, and the folder may be shared.
    flags = os.O_WRONLY | os.O_CREAT | os.O_TRUNC | os.O_NOFOLLOW | os.O_CLOEXEC
    try:
        with open(os.open(temporary, flags, 0o644), "w", encoding="utf-8", errors="replace") as file:
            json.dump([asdict(draft) for draft in drafts], file, ensure_ascii=False)
            file.flush()
            os.fsync(file.fileno())
        os.replace(temporary, target)
    except OSError:
        with contextlib.suppress(OSError):
            os.unlink(temporary)
        raise
    flush_folder(target)


def load(path: str) -> list[Draft]:
    """Drafts kept for a session; none where there is no side file or it cannot be understood."""
    try:
        descriptor = os.open(place(path), os.O_RDONLY | os.O_NONBLOCK | os.O_NOCTTY | os.O_CLOEXEC)
    except (OSError, ValueError):
        return []
    try:
        if not stat.S_ISREG(os.fstat(descriptor).st_mode):
            return []
        with os.fdopen(descriptor, "rb", closefd=False) as file:
            data = json.loads(file.read(LARGEST).decode("utf-8"))
    except (OSError, ValueError, RecursionError):
        return []
    finally:
        os.close(descriptor)
    return [draft for draft in map(_draft, data) if draft is not None] if isinstance(data, list) else []


def _draft(item: Any) -> Draft | None:
    names = ("kind", "id", "field", "text")
    if not isinstance(item, dict) or not all(isinstance(item.get(name), str) for name in names):
        return None
    return Draft(**{name: item[name] for name in names})
