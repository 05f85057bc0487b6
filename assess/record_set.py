"""One field of a record set by its path: paths come from a fixed list, and nothing else is reachable."""

from __future__ import annotations

import copy
import functools
from typing import Any

from pydantic import BaseModel

from assess.errors import ReadingError
from assess.record import KINDS_OF_RECORD
from assess.record_errors import field_names, nearest_first
from assess.record_lists import check_plain
from assess.record_loads import Limits
from assess.record_parts import Hanger, Size, StandsFor, TypedUse, TypedValues, Wood
from assess.record_seen import Graded, Levels, StiffnessTest
from assess.record_survey import Codes, SiteLimits, Tolerances

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
    "tolerances": Tolerances,
    "site_limits": SiteLimits,
    "codes": Codes,
}

# Forms of which one excludes the others: setting a field that makes a form takes away all that belongs to its rivals.
# Each is (fields that make it, fields that only go with it).
EXCLUSIVE: tuple[tuple[tuple[tuple[str, ...], tuple[str, ...]], ...], ...] = (
    ((("spacing",), ()), (("tributary",), ())),
    (
        (("size.width", "size.depth"), ()),
        (("size.diameter",), ()),
        (("size.nominal",), ("size.dressing",)),
    ),
    (
        (("wood.species", "wood.grade"), ("wood.basis", "wood.rules")),
        (("wood.candidates",), ()),
        (("wood.values",), ("wood.source",)),
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
    raises  ReadingError for a path that is not one of `allowed_paths`, or leads through a single value

    >>> apply_set("member", {"spacing": "16 in"}, ["tributary"], "4 ft")
    {'tributary': '4 ft'}
    """
    dotted = _dotted(kind, path)
    check_plain(value)
    made = copy.deepcopy(data)
    if value is not None:
        for rival in _rivals(dotted):
            _remove(made, rival)
    *outer, last = dotted.split(".")
    if value is None:
        _remove(made, dotted)
        return made
    place = made
    for name in outer:
        place = place.setdefault(name, {})
        if not isinstance(place, dict):
            raise _through(dotted, name)
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
    """What goes when a field is set."""
    for forms in EXCLUSIVE:
        for form in forms:
            if any(dotted == name or dotted.startswith(name + ".") for name in form[0]):
                return [name for makes, goes in forms if makes != form[0] for name in (*makes, *goes)]
    return []


def _remove(data: dict[str, Any], dotted: str) -> None:
    """Take a field away, and the objects that it leaves empty."""
    *outer, last = dotted.split(".")
    places = [data]
    for name in outer:
        inner = places[-1].get(name, {})
        if not isinstance(inner, dict):
            raise _through(dotted, name)
        places.append(inner)
    places[-1].pop(last, None)
    for place, name, inner in reversed(list(zip(places, outer, places[1:], strict=False))):
        if not inner:
            place.pop(name, None)


def _through(dotted: str, name: str) -> ReadingError:
    return ReadingError("path", dotted, f"{name} set whole, which is no object here", "leads through a single value")
