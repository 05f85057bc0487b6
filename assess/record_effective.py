"""A member with its bay's fields filled in where it says nothing itself."""

from __future__ import annotations

from typing import Any

from assess.record import Bay, Member
from assess.record_consistency import consistency_problems
from assess.record_errors import SeveralReadingsError
from assess.record_parts import Size, Wood

WIDTHS = ("spacing", "tributary")  # of which a member has one


def effective(member: Member, bay: Bay | None) -> Member:
    """The member as it is assessed: its own fields, then its bay's.

    member, bay   records; None where the member names no bay
    returns       Member. Of spacing and tributary the member's own one stands. A size or wood of which the member
                  gives only a part takes what is missing of the same form from the bay; a complete one takes nothing,
                  and what a wood is known by (stamp, certificate) is never taken over
    raises        ReadingError where the two cannot stand together, e.g. a defect off the bay's span

    >>> from assess.record import read_bay
    >>> bay = read_bay({"spacing": "16 in", "size": {"width": "1 5/8 in", "depth": "9 in"}})
    >>> effective(Member.of(tributary="4 ft", size={"depth": "7 in"}), bay).size.width.value
    1.625
    """
    if bay is None:
        return member
    own, given = _given(member), _given(bay)
    if any(name in own for name in WIDTHS):
        for name in WIDTHS:
            given.pop(name, None)
    made = given | own
    if member.size is not None and bay.size is not None:
        made["size"] = _size(member.size, bay.size)
    if member.wood is not None and bay.wood is not None:
        made["wood"] = _wood(member.wood, bay.wood)
    whole = Member.model_construct(**made)
    found = consistency_problems(whole)
    if found:
        raise SeveralReadingsError(found)
    return whole


def _given(record: Member | Bay) -> dict[str, Any]:
    return {name: getattr(record, name) for name in record.model_fields_set if getattr(record, name) is not None}


def _size(own: Size, bays: Size) -> Size:
    same_form = (own.width is not None or own.depth is not None) and (bays.width is not None or bays.depth is not None)
    if own.complete or not same_form:
        return own
    return Size.model_construct(**(_set(bays) | _set(own)))


def _wood(own: Wood, bays: Wood) -> Wood:
    same_form = (own.species is not None or own.grade is not None) and (
        bays.species is not None or bays.grade is not None
    )
    if own.complete or not same_form:
        return own
    names = {name: value for name, value in _set(bays).items() if name in ("species", "grade")}
    return Wood.model_construct(**(names | _set(own)))


def _set(record: Size | Wood) -> dict[str, Any]:
    return {name: getattr(record, name) for name in record.model_fields_set}
