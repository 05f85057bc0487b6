"""The event that takes a change back: one line of the log, as small as the change itself."""

from __future__ import annotations

import copy
from typing import Any

from assess.errors import ReadingError
from assess.record_set import apply_set


def inverse(event: dict[str, Any], before: dict[str, Any] | None) -> dict[str, Any]:
    """The event that leads back to the record as it was.

    event    the change: put, set or drop of a record
    before   the record as it was, None where there was none

    >>> inverse({"set": "member", "id": "J", "path": ["spacing"], "data": "16 in"}, {"tributary": "8 ft"})
    {'set': 'member', 'id': 'J', 'path': ['tributary'], 'data': '8 ft'}
    """
    operation = next(name for name in ("put", "set", "drop") if name in event)
    kind, name = event[operation], event["id"]
    if before is None:
        return {"drop": kind, "id": name}
    if operation == "set":
        after = apply_set(kind, before, event["path"], event["data"])
        for path in _paths(event["path"], before, after):
            old = _at(before, path)
            try:
                back = apply_set(kind, after, path, old)
            except ReadingError:
                continue
            if back == before:
                return {"set": kind, "id": name, "path": path, "data": copy.deepcopy(old)}
    return {"put": kind, "id": name, "data": copy.deepcopy(before)}


def _paths(path: list[str], before: dict[str, Any], after: dict[str, Any]) -> list[list[str]]:
    """Fields that could be set to lead back: the one that was set, then whole fields that changed."""
    tops = [[key] for key in {**before, **after} if before.get(key) != after.get(key)]
    return [path, *tops]


def _at(data: dict[str, Any], path: list[str]) -> Any:
    value: Any = data
    for name in path:
        value = value.get(name) if isinstance(value, dict) else None
    return value
