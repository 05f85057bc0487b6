"""The text being typed, kept in a side file so that a kill loses no word of it."""

from __future__ import annotations

import contextlib
import json
import os
from dataclasses import asdict, dataclass


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
    with open(temporary, "w", encoding="utf-8", errors="replace") as file:
        json.dump([asdict(draft) for draft in drafts], file, ensure_ascii=False)
        file.flush()
        os.fsync(file.fileno())
    os.replace(temporary, target)


def load(path: str) -> list[Draft]:
    """Drafts kept for a session; none where there is no side file or it cannot be understood."""
    try:
        descriptor = os.open(place(path), os.O_RDONLY | os.O_NONBLOCK | os.O_CLOEXEC)
    except (OSError, ValueError):
        return []
    with os.fdopen(descriptor, "rb") as file:
        try:
            data = json.loads(file.read(1_000_000).decode("utf-8"))
            return [Draft(**{name: str(item[name]) for name in ("kind", "id", "field", "text")}) for item in data]
        except (OSError, ValueError, TypeError, KeyError, RecursionError):
            return []
