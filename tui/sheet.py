"""What the form of a member says, line by line: text as typed, how it was understood, what is taken or refused."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

from assess.errors import ReadingError
from assess.record import Member, record_problems
from assess.record_set import apply_set
from tui.clean import clean
from tui.field_shown import refusal, understood
from tui.field_text import raw_of, to_raw, to_text
from tui.fields import BY_KEY, FORM, ROOF, Field, taken


@dataclass(frozen=True)
class SheetLine:
    """One line of the form.

    state   'read'; 'draft' for a text not kept yet; 'refused' for one that is not understood; 'bay' for a reading of
            the bay; 'taken' for a default; 'needed' for what is still to be read; 'none'
    echo    how it was understood, or what is taken, or in short why it is refused
    why     of a refused text the whole reason, with what is accepted
    """

    field: Field
    text: str
    echo: str
    state: str
    why: str = ""


def lines(
    data: dict[str, Any],
    member: Member | None,
    drafts: dict[str, str],
    units: str,
    more: bool,
    also: tuple[str, ...] = (),
) -> list[SheetLine]:
    """The lines of a member's form.

    data      raw record
    member    the same as understood, its bay's readings filled in; None where it cannot be read
    drafts    texts not kept yet, by line
    units     of the session
    more      show the lines seldom used as well
    also      lines to show though they hold nothing
    """
    needed = _needed(member)
    found = []
    for field in FORM:
        line = _line(field, data, member, drafts, units, needed)
        roof = field.key in ROOF and member is not None and member.kind == "rafter"
        if (
            more
            or field.main
            or roof
            or field.key in also
            or line.state in ("read", "draft", "refused", "bay", "needed")
        ):
            found.append(line)
    return found


def line_of(field: Field, data: dict[str, Any], member: Member | None, units: str) -> SheetLine:
    """One line of the form, without drafts."""
    return _line(field, data, member, {}, units, _needed(member))


def blocked_by(data: dict[str, Any], drafts: dict[str, str], units: str) -> str | None:
    """Label of the first line whose text, typed but not kept, is not understood; while it stands there is no answer."""
    wrong = (key for key, text in drafts.items() if problem_of(data, BY_KEY[key], text, units) is not None)
    return next((BY_KEY[key].label for key in wrong), None)


def _needed(member: Member | None) -> set[str]:
    """Lines that must still be read, by the record's own list of what it lacks."""
    if member is None:
        return set()
    whole_part = {
        "size": ("size.width", "size.depth"),
        "wood": ("wood.species", "wood.grade"),
        "spacing or tributary": ("spacing",),
    }
    return {key for name in member.missing() for key in whole_part.get(name, (name,))}


def _line(
    field: Field, data: dict[str, Any], member: Member | None, drafts: dict[str, str], units: str, needed: set[str]
) -> SheetLine:
    if field.key in drafts:
        text = drafts[field.key]
        problem = problem_of(data, field, text, units)
        if problem is not None:
            return SheetLine(field, clean(text), clean(problem.problem), "refused", refusal(problem, field))
        return SheetLine(field, clean(text), "not kept yet: Enter, Enter", "draft")
    raw = raw_of(data, field)
    if raw is not None:
        text = clean(to_text(raw, field))
        echo = understood(member, field, units) if member is not None else ""
        return SheetLine(field, text, "" if echo == text else echo, "read")
    if member is not None and _given(member, field):
        return SheetLine(field, "", f"{understood(member, field, units) or _words(member, field)} (bay)", "bay")
    if field.key in needed:
        return SheetLine(field, "", "to be read", "needed")
    words = taken(field.key, member.kind if member is not None else None)
    if field.key == "size.dressing" and not _given_path(member, "size", "nominal"):
        words = ""
    if field.key == "wood.basis" and not _given_path(member, "wood", "species"):
        words = ""
    return SheetLine(field, "", f"({words})" if words else "", "taken" if words else "none")


def _given(member: Member, field: Field) -> bool:
    return _given_path(member, *field.path)


def _given_path(member: Member | None, *path: str) -> bool:
    value: Any = member
    for name in path:
        value = getattr(value, name, None)
    return value is not None


def _words(member: Member, field: Field) -> str:
    value: Any = member
    for name in field.path:
        value = getattr(value, name, None)
    return clean(to_text(value, field), longest=200)


def changed(data: dict[str, Any], field: Field, text: str) -> dict[str, Any]:
    """The raw record as it would be with a text in one line.

    raises   ReadingError where the text cannot be taken apart
    """
    return apply_set("member", data, list(field.path), to_raw(text, field))


def problem_of(data: dict[str, Any], field: Field, text: str, units: str) -> ReadingError | None:
    """Why a text cannot be kept in a line; None where it can."""
    try:
        problems = record_problems("member", changed(data, field, text), units)
    except ReadingError as error:
        return error
    return problems[0] if problems else None
