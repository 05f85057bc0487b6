"""Every member of a session assessed: findings, what is incomplete, and what could not be used."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from importlib.metadata import version
from typing import Any

from assess.errors import ReadingError
from assess.finding import BASIS, Finding
from assess.log.fold import State, fold
from assess.log.read import Problem, SessionFile, problem_of
from assess.record import Member, read_bay, read_member
from assess.record_effective import effective
from assess.whole import assess
from assess.working import Line as Step


@dataclass(frozen=True)
class Assessed:
    """A member of a session with its finding, or why it has none.

    problem      what cannot be used, or what is missing
    incomplete   True where readings are merely missing: stored, not bad, but not adequate either
    """

    id: str
    member: Member | None
    finding: Finding | None
    problem: Problem | None
    incomplete: bool


def assessed(state: State, member_id: str) -> Assessed:
    """Assess one member of a session, its bay's fields filled in.

    state       records as they stand
    member_id   id of a member that is there
    returns     Assessed
    """
    line = state.touched.get(("member", member_id), 0)
    try:
        member = whole_member(state, member_id)
    except ReadingError as error:
        return Assessed(member_id, None, None, problem_of(line, member_id, error), False)
    missing = member.missing()
    if missing:
        message = "incomplete: still to be read: " + ", ".join(missing)
        return Assessed(member_id, member, None, Problem(line, member_id, missing[0], message), True)
    try:
        return Assessed(member_id, member, assess(member), None, False)
    except ReadingError as error:
        return Assessed(member_id, member, None, problem_of(line, member_id, error), False)


def whole_member(state: State, member_id: str) -> Member:
    """A member with its bay's fields filled in; raises ReadingError where either cannot be read."""
    member = read_member(state.members[member_id], state.units)
    if member.bay is None:
        return member
    bay = state.records["bay"].get(member.bay)
    if bay is None:
        raise ReadingError("bay", member.bay, "the id of a bay that is there", "is not there")
    return effective(member, read_bay(bay, state.units))


def survey(file: SessionFile, only: str | None = None) -> tuple[State, Iterator[Assessed]]:
    """Fold a session and assess its members in order.

    file     as read
    only     assess this member alone
    returns  (State, members as they are assessed)
    """
    state = fold(file.lines, file.units)
    ids = [only] if only is not None else list(state.members)
    return state, (assessed(state, member_id) for member_id in ids)


def as_json(
    sessions: list[tuple[SessionFile, State, list[Assessed]]], steps: dict[tuple[str, str], list[Step]] | None = None
) -> dict[str, Any]:
    """Findings of sessions as `assess --json` prints them (interface, `assess --json`).

    steps   (file, id) -> working, where asked for
    """
    members, problems = [], []
    for file, state, found in sessions:
        for item in found:
            if item.finding is None or item.member is None:
                continue
            entry: dict[str, Any] = {"id": item.id, "file": printable(file.path), "where": item.member.where}
            entry |= item.finding.to_json()
            if steps is not None:
                entry["working"] = [step_json(step) for step in steps.get((file.path, item.id), [])]
            members.append(entry)
        for problem in (*file.problems, *state.problems, *(i.problem for i in found if i.problem is not None)):
            where = {"file": printable(file.path), "line": problem.line, "id": problem.id or None}
            problems.append(where | {"field": problem.field or None, "message": problem.message})
    return {
        "willcarry": version("willcarry"),
        "basis": BASIS,
        "sessions": [{"file": printable(file.path), "site": file.header.get("site")} for file, _, _ in sessions],
        "members": members,
        "problems": problems,
    }


def printable(path: str) -> str:
    """A file's name as text that can be written: bytes that are no UTF-8 become replacement marks.

    >>> printable("a\\udcffb.survey")
    'a\ufffdb.survey'
    """
    return path.encode("utf-8", "surrogateescape").decode("utf-8", "replace")


def step_json(step: Step) -> dict[str, Any]:
    """One step of working as JSON."""
    return {
        "scope": step.scope,
        "symbol": step.symbol,
        "formula": step.formula,
        "numbers": dict(step.numbers),
        "result": step.result,
        "unit": step.unit,
        "clause": step.clause,
        "meaning": step.meaning,
    }
