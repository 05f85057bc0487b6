"""Lines folded in order into the records as they stand; repeated lines count once, bad ones are reported."""

from __future__ import annotations

import json
import unicodedata
from collections.abc import Iterable
from dataclasses import dataclass, field
from typing import Any

from assess.errors import ReadingError
from assess.log.read import Line, Problem, problem_of
from assess.log.times import time_notices
from assess.record import record_problems
from assess.record_set import allowed_paths, apply_set

OPERATIONS = ("put", "set", "drop", "conflict")
SET_KINDS = ("member", "bay", "note", "survey")
KINDS = (*SET_KINDS, "finding")
ALLOWED = {
    "put": {"put", "id", "data"},
    "set": {"set", "id", "path", "data"},
    "drop": {"drop", "id"},
    "conflict": {"conflict", "id", "path", "data", "other"},
}
STAMP = {"n", "from", "at", "by"}
LONGEST_ID = 100


@dataclass
class State:
    """Records as they stand, by kind and id, and where each was last touched.

    touched   (kind, id) -> number of the last line that changed it
    history   (kind, id) -> the lines that changed it, in order
    """

    units: str
    records: dict[str, dict[str, dict[str, Any]]] = field(default_factory=lambda: {kind: {} for kind in KINDS})
    conflicts: list[Line] = field(default_factory=list)
    touched: dict[tuple[str, str], int] = field(default_factory=dict)
    history: dict[tuple[str, str], list[Line]] = field(default_factory=dict)
    problems: list[Problem] = field(default_factory=list)
    notices: list[str] = field(default_factory=list)
    _seen: dict[tuple[str, int], dict[str, Any]] = field(default_factory=dict)
    _refused: set[tuple[str, int]] = field(default_factory=set)
    _alike: dict[tuple[str, str], str] = field(default_factory=dict)

    @property
    def members(self) -> dict[str, dict[str, Any]]:
        """Raw member records by id, in the order they were first put."""
        return self.records["member"]

    def apply(self, line: Line) -> bool:
        """Apply one line; False where it is a repeat or a problem, which is noted once."""
        try:
            return self.change(line)
        except ReadingError as error:
            key = _key(line.event)
            if key is not None and _same(self._seen.setdefault(key, line.event), line.event):
                if key in self._refused:
                    return False
                self._refused.add(key)
            name = line.event.get("id")
            self.problems.append(problem_of(line.number, name if isinstance(name, str) else "", error))
            return False

    def change(self, line: Line) -> bool:
        """Apply one line; False where it repeats one already applied.

        raises   ReadingError where it is refused; nothing of it is kept
        """
        event = line.event
        operation = check_event(event)
        key = _key(event)
        if key is not None and key in self._seen:
            if not _same(self._seen[key], event):
                raise ReadingError("n", event["n"], "one content for each from and n", "is another line's number")
            if key not in self._refused:
                return False
        if operation == "conflict":
            self.conflicts.append(line)
        else:
            self._fold(operation, line)
        if key is not None:
            self._seen[key] = event
            self._refused.discard(key)
        return True

    def line_of(self, kind: str, name: str, field: str = "") -> int:
        """Number of the line that gave a field of a record its value.

        field     dotted path, e.g. 'size.depth'; empty: the line that touched the record last
        returns   0 where no line did
        """
        for line in reversed(self.history.get((kind, name), ())):
            given = ".".join(line.event.get("path", ()))
            if not field or not given or given == field or _inside(given, field) or _inside(field, given):
                return line.number
        return 0

    def _fold(self, operation: str, line: Line) -> None:
        event = line.event
        kind, name = event[operation], event["id"]
        held = self.records[kind]
        if operation == "drop":
            if name not in held:
                raise ReadingError("id", name, f"the id of a {kind} that is there", "is not there")
            del held[name]
        elif operation == "put":
            if kind in SET_KINDS:
                _refuse(record_problems(kind, event["data"], self.units))
            elif not isinstance(event["data"], dict):
                raise ReadingError("data", event["data"], "an object")
            self._warn_alike(kind, name)
            held[name] = event["data"]
        else:
            if name not in held:
                raise ReadingError("id", name, f"the id of a {kind} that is there", "is not there")
            changed = apply_set(kind, held[name], event["path"], event["data"])
            _refuse(record_problems(kind, changed, self.units))
            held[name] = changed
        self.touched[kind, name] = line.number
        self.history.setdefault((kind, name), []).append(line)

    def _warn_alike(self, kind: str, name: str) -> None:
        """Ids that look alike are both kept, and said."""
        key = (kind, "".join(unicodedata.normalize("NFKC", name).casefold().split()).translate(_LOOKALIKE))
        other = self._alike.setdefault(key, name)
        if other != name:
            self.notices.append(f"{kind} ids {other!r} and {name!r} look alike; both are kept")


# Letters of other scripts that print like Latin ones; enough to warn by.
_LOOKALIKE = str.maketrans("авекмнорстухіјѕ", "abekmhopctyxijs")


def _key(event: dict[str, Any]) -> tuple[str, int] | None:
    """What identifies a line, where it says so: its writer and the writer's number for it."""
    writer, number = event.get("from"), event.get("n")
    return (writer, number) if isinstance(writer, str) and type(number) is int else None


def _same(one: dict[str, Any], other: dict[str, Any]) -> bool:
    """Whether two lines say the same; in Python alone 1 and true would."""
    return one is other or (one == other and json.dumps(one, sort_keys=True) == json.dumps(other, sort_keys=True))


def _inside(inner: str, outer: str) -> bool:
    return inner.startswith(outer + ".")


def _refuse(errors: list[ReadingError]) -> None:
    if errors:
        raise errors[0]


def check_event(event: dict[str, Any]) -> str:
    """The operation of a line whose form is right; raises ReadingError naming what is not."""
    found = [name for name in OPERATIONS if name in event]
    if len(found) != 1:
        raise ReadingError("", "/".join(found) or sorted(event)[:3], "one of put, set, drop", "is no operation")
    operation = found[0]
    known = ALLOWED[operation] | STAMP
    unknown = sorted(event.keys() - known)
    if unknown:
        raise ReadingError(unknown[0][:40], unknown[0], ", ".join(sorted(known)), "is not a known field")
    needed = ALLOWED[operation] - {"other"}
    absent = sorted(needed - event.keys())
    if absent:
        raise ReadingError(absent[0], None, "a value", "is missing")
    kinds = KINDS if operation in ("put", "drop") else SET_KINDS
    if event[operation] not in kinds:
        raise ReadingError(operation, event[operation], "one of " + ", ".join(kinds), "is no kind of record")
    check_id(event["id"])
    if operation == "conflict":
        _check_path(event["conflict"], event["path"])
    stamped = event.get("n", 0)
    if isinstance(stamped, bool) or not isinstance(stamped, int) or stamped < 0:
        raise ReadingError("n", stamped, "a whole number from 0")
    for name in ("from", "at", "by"):
        if not isinstance(event.get(name, ""), str) or len(event.get(name, "")) > 200:
            raise ReadingError(name, event[name], "text of at most 200 characters")
    return operation


def _check_path(kind: str, path: object) -> None:
    """A conflict's path is stored, not applied: it must be one that could be set all the same."""
    names = path if isinstance(path, list) else [""]
    if not all(isinstance(name, str) and "." not in name for name in names) or ".".join(names) not in allowed_paths(
        kind
    ):
        raise ReadingError("path", path, "a list of field names, e.g. size, depth", "is not a known field")


def check_id(name: object) -> str:
    """An id as it may stand: text of 1 to 100 characters, not blank, without control characters."""
    if not isinstance(name, str) or not name.strip() or len(name) > LONGEST_ID:
        raise ReadingError("id", name, f"text of 1 to {LONGEST_ID} characters, not only spaces")
    if any(unicodedata.category(char) in ("Cc", "Cf", "Cs", "Zl", "Zp") for char in name):
        raise ReadingError("id", name, "text on one line without control or invisible characters")
    return name


def fold(lines: Iterable[Line], units: str = "US") -> State:
    """Fold lines in order.

    lines     sound lines of a session, without the header
    units     units of bare numbers
    returns   State; a line that cannot be applied is among its problems
    """
    state = State(units)
    held = list(lines)
    for line in held:
        state.apply(line)
    state.notices += time_notices(held)
    return state
