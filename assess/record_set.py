"""One field of a record set by its path: paths come from a fixed list, and nothing else is reachable."""

from __future__ import annotations

import copy
import functools
from typing import Any

from pydantic import BaseModel

from assess.errors import ReadingError
from assess.record import KINDS_OF_RECORD
from assess.record_fields import field_names, nearest_first
from assess.record_parts import (
    Graded,
    Hanger,
    Levels,
    Limits,
    Size,
    StandsFor,
    StiffnessTest,
    TypedUse,
    TypedValues,
    Wood,
)

# Records inside a record whose fields can be set one by one; lists are set whole.
NESTED: dict[str, type[BaseModel]] = {
    "size": Size,
    "wood": Wood,
    "wood.values": TypedValues,
    "limits": Limits,
    "hanger": Hanger,
    "stands_for": StandsFor,
    "sag": Levels,
    "stiffness_test": StiffnessTest,
    "graded": Graded,
    "present_use": TypedUse,
    "proposed_use": TypedUse,
}

# Setting a field of one form takes away the fields of the others, in the same record.
EXCLUSIVE: tuple[tuple[tuple[str, ...], ...], ...] = (
    (("spacing",), ("tributary",)),
    (("size.width", "size.depth"), ("size.diameter",), ("size.nominal", "size.dressing")),
    (
        ("wood.species", "wood.grade", "wood.basis", "wood.stamp", "wood.rules"),
        ("wood.candidates",),
        ("wood.values", "wood.source"),
    ),
)


@functools.cache
def allowed_paths(kind: str) -> frozenset[str]:
    """Every path of a kind of record that can be set, dotted.

    >>> "size.depth" in allowed_paths("member"), "size.depth" in allowed_paths("note")
    (True, False)
    """
    top = field_names(KINDS_OF_RECORD[kind])
    paths = set(top)
    for outer, model in NESTED.items():
        if outer.split(".")[0] in top:
            paths |= {f"{outer}.{name}" for name in field_names(model)}
    return frozenset(paths)


def apply_set(kind: str, data: dict[str, Any], path: object, value: Any) -> dict[str, Any]:
    """The record with one field set; the record given is left as it is.

    kind    'member', 'bay', 'note' or 'survey'
    data    raw record, as the session file has it
    path    list of names, e.g. ['size', 'depth']
    value   raw value; None restores the default
    returns a new raw record, whose readings the caller still has to check
    raises  ReadingError for a path that is not one of `allowed_paths`

    >>> apply_set("member", {"spacing": "16 in"}, ["tributary"], "4 ft")
    {'tributary': '4 ft'}
    """
    dotted = _dotted(kind, path)
    made = copy.deepcopy(data)
    if value is not None:
        for rival in _rivals(dotted):
            _remove(made, rival.split("."))
    *outer, last = dotted.split(".")
    if value is None:
        _remove(made, dotted.split("."))
        return made
    place = made
    for name in outer:
        inner = place.setdefault(name, {})
        if not isinstance(inner, dict):
            # A use by name, or one sag reading, gives way to the object whose field is set.
            inner = place[name] = {}
        place = inner
    place[last] = copy.deepcopy(value)
    return made


def _dotted(kind: str, path: object) -> str:
    if not isinstance(path, list) or not path or len(path) > 3 or not all(isinstance(name, str) for name in path):
        raise ReadingError("path", path, "a list of field names, e.g. size, depth")
    dotted = ".".join(path)
    allowed = allowed_paths(kind)
    if dotted not in allowed or any("." in name for name in path):
        raise ReadingError(
            "path", dotted[:80], nearest_first(dotted[:80], tuple(sorted(allowed))), "is not a known field"
        )
    return dotted


def _rivals(dotted: str) -> list[str]:
    found = []
    for forms in EXCLUSIVE:
        if any(dotted == name or dotted.startswith(name + ".") for form in forms for name in form):
            mine = next(f for f in forms if any(dotted == name or dotted.startswith(name + ".") for name in f))
            found += [name for form in forms if form is not mine for name in form]
    return found


def _remove(data: dict[str, Any], names: list[str]) -> None:
    """Take a field away, and an object that it leaves empty."""
    first, *rest = names
    if not rest:
        data.pop(first, None)
        return
    inner = data.get(first)
    if isinstance(inner, dict):
        _remove(inner, rest)
        if not inner:
            del data[first]
