"""The member record of a session file: every field of the interface, as it was read."""

from __future__ import annotations

from typing import Annotated, Any, Self, TypeVar

from pydantic import ValidationError, model_validator

from assess import quantities as q
from assess.errors import ReadingError
from assess.kinds import KINDS
from assess.reading import Reading
from assess.record_condition import Defect, condition_field
from assess.record_errors import problems
from assess.record_fields import (
    Record,
    choice,
    measured,
    records,
    several,
    text,
    whole,
    words_or_reading,
    written,
    yes_no,
)
from assess.record_parts import (
    Added,
    Graded,
    Hanger,
    Layer,
    Levels,
    Limits,
    LineLoad,
    NewSupport,
    PointLoad,
    Size,
    StandsFor,
    StiffnessTest,
    TypedUse,
    Wood,
    dead_field,
    edge_field,
    free_object,
    partitions_field,
    record_of,
    sag_field,
    texts,
    use_field,
)

MOST_SPANS = 5
M = TypeVar("M", bound="Fields")


class Fields(Record):
    """Fields a bay and a member share: a bay gives its members what they do not say themselves."""

    kind: Annotated[str | None, choice(*KINDS)] = None
    where: Annotated[str | None, text()] = None
    stands_for: Annotated[StandsFor | None, record_of(StandsFor)] = None
    ties_rafters: Annotated[bool | None, yes_no()] = None
    size: Annotated[Size | None, record_of(Size)] = None
    orientation: Annotated[str | None, choice("edge", "flat")] = None
    wood: Annotated[Wood | None, record_of(Wood)] = None
    spans: Annotated[tuple[Reading, ...] | None, several(q.SPAN, MOST_SPANS)] = None
    overhang_left: Annotated[Reading | None, measured(q.SPAN)] = None
    overhang_right: Annotated[Reading | None, measured(q.SPAN)] = None
    span_basis: Annotated[str | None, choice("clear", "design")] = None
    over_supports: Annotated[str | None, choice("continuous", "separate")] = None
    bearing: Annotated[tuple[Reading, ...] | None, several(q.BEARING, MOST_SPANS + 1)] = None
    bearing_on: Annotated[str | None, choice("wood", "masonry", "hanger")] = None
    hanger: Annotated[Hanger | None, record_of(Hanger)] = None
    loaded_on: Annotated[str | None, choice("top", "side")] = None
    spacing: Annotated[Reading | None, measured(q.SPACING)] = None
    tributary: Annotated[Reading | None, measured(q.TRIBUTARY)] = None
    alike: Annotated[int | None, whole(1, 1000)] = None
    top_edge: Annotated[str | Reading | tuple[Reading, ...] | None, edge_field()] = None
    bottom_edge: Annotated[str | Reading | tuple[Reading, ...] | None, edge_field()] = None
    ends_held: Annotated[bool | None, yes_no()] = None
    moisture: Annotated[str | Reading | None, words_or_reading(q.MOISTURE, "dry", "wet")] = None
    temperature: Annotated[Reading | None, measured(q.TEMPERATURE)] = None
    incised: Annotated[bool | None, yes_no()] = None
    dead: Annotated[Reading | tuple[Layer, ...] | None, dead_field()] = None
    own_weight: Annotated[str | None, choice("add", "included")] = None
    present_use: Annotated[str | TypedUse | None, use_field()] = None
    proposed_use: Annotated[str | TypedUse | None, use_field()] = None
    partitions: Annotated[bool | Reading | None, partitions_field()] = None
    reduce: Annotated[bool | None, yes_no()] = None
    supported_area: Annotated[Reading | None, measured(q.AREA)] = None
    concentrated_on: Annotated[tuple[Reading, ...] | None, several(q.LENGTH, 2)] = None
    snow: Annotated[Reading | None, measured(q.AREA_LOAD)] = None
    roof_live: Annotated[Reading | None, measured(q.AREA_LOAD)] = None
    slope: Annotated[Reading | None, measured(q.SLOPE)] = None
    point_loads: Annotated[tuple[PointLoad, ...] | None, records(PointLoad, 100)] = None
    line_loads: Annotated[tuple[LineLoad, ...] | None, records(LineLoad, 100)] = None
    limits: Annotated[Limits | None, record_of(Limits)] = None
    condition: Annotated[tuple[Defect, ...] | None, condition_field()] = None
    sag: Annotated[Reading | Levels | None, sag_field()] = None
    stiffness_test: Annotated[StiffnessTest | None, record_of(StiffnessTest)] = None
    hold_down: Annotated[tuple[int, ...] | None, texts(6, whole(1, 6))] = None
    photos: Annotated[tuple[str, ...] | None, texts(200, text(255))] = None
    remarks: Annotated[str | None, text()] = None
    not_seen: Annotated[tuple[str, ...] | None, texts(100, text(500))] = None
    identified: Annotated[dict[str, Any] | None, free_object()] = None
    graded: Annotated[Graded | None, record_of(Graded)] = None
    added: Annotated[tuple[Added, ...] | None, records(Added, 20)] = None
    new_supports: Annotated[tuple[NewSupport, ...] | None, records(NewSupport, 5)] = None

    @model_validator(mode="after")
    def _one_width(self) -> Self:
        if self.spacing is not None and self.tributary is not None:
            raise ReadingError(
                "tributary", written(self.tributary), "spacing or tributary, not both", "and spacing are both given"
            )
        if self.concentrated_on is not None and len(self.concentrated_on) != 2:
            raise ReadingError("concentrated_on", written(self.concentrated_on), "two lengths, along and across")
        return self


class Bay(Fields):
    """What a bay gives the members that name it."""


class Member(Fields):
    """A member as it was read; all fields may be missing, and a member that lacks some is stored all the same."""

    bay: Annotated[str | None, text(100)] = None

    @classmethod
    def of(cls, units: str = "US", **fields: Any) -> Member:
        """A member from its fields as the session file has them; raises ReadingError.

        >>> Member.of(kind="joist", spans=["13'4"]).spans[0].value
        160.0
        """
        return read_member(fields, units)

    def missing(self) -> list[str]:
        """Names of what must still be read before the member can be assessed.

        >>> Member().missing()[:3]
        ['kind', 'size', 'spans']
        """
        lacking = [name for name in ("kind", "size", "spans", "wood", "dead") if getattr(self, name) is None]
        if self.size is not None and not self.size.complete:
            lacking.append("size.depth" if self.size.width is not None else "size.width")
        if self.wood is not None and not self.wood.complete:
            lacking.append("wood.grade" if self.wood.species is not None else "wood.species")
        roof = (self.snow is not None and self.snow.value > 0) or (
            self.roof_live is not None and self.roof_live.value > 0
        )
        if self.present_use is None and self.proposed_use is None and not roof:
            lacking.append("proposed_use")
        if self.spacing is None and self.tributary is None:
            lacking.append("spacing or tributary")
        return lacking


class Note(Record):
    """A note about anything."""

    text: Annotated[str, text(100_000)]


class Survey(Record):
    """What holds for the whole survey: tolerances of instruments, stock and site limits for repairs, code editions."""

    tolerances: Annotated[dict[str, Any] | None, free_object()] = None
    stock: Annotated[list[Any] | None, free_object()] = None
    site_limits: Annotated[dict[str, Any] | None, free_object()] = None
    codes: Annotated[dict[str, Any] | None, free_object()] = None


KINDS_OF_RECORD: dict[str, type[Record]] = {"member": Member, "bay": Bay, "note": Note, "survey": Survey}


def record_problems(kind: str, data: object, units: str = "US") -> list[ReadingError]:
    """Every problem of a record, in the order of its fields; empty where it can be kept.

    kind    'member', 'bay', 'note' or 'survey'
    data    as the session file has it
    """
    from assess.record_consistency import consistency_problems

    model = KINDS_OF_RECORD[kind]
    if not isinstance(data, dict):
        return [ReadingError("", data, "an object")]
    try:
        record = model.model_validate(data, context={"units": units})
    except ValidationError as error:
        return problems(error, model)
    return consistency_problems(record) if isinstance(record, Fields) else []


def read_member(data: object, units: str = "US") -> Member:
    """A member from its data; raises the first problem as ReadingError.

    >>> read_member({"size": {"width": "1 5/8", "depth": "7 1/2 in"}}).size.depth.value
    7.5
    """
    return _read(Member, data, units)


def read_bay(data: object, units: str = "US") -> Bay:
    """A bay from its data; raises the first problem as ReadingError."""
    return _read(Bay, data, units)


def _read(model: type[M], data: object, units: str) -> M:
    from assess.record_consistency import consistency_problems

    if not isinstance(data, dict):
        raise ReadingError("", data, "an object")
    try:
        record = model.model_validate(data, context={"units": units})
    except ValidationError as error:
        raise problems(error, model)[0] from None
    found = consistency_problems(record)
    if found:
        raise found[0]
    return record


def effective(member: Member, bay: Bay | None) -> Member:
    """The member with its bay's fields filled in where it says nothing itself.

    member, bay   records; None where the member names no bay
    returns       Member; of spacing and tributary the member's own one stands
    """
    if bay is None:
        return member
    own = {name: getattr(member, name) for name in member.model_fields_set if getattr(member, name) is not None}
    given = {name: getattr(bay, name) for name in bay.model_fields_set if getattr(bay, name) is not None}
    if "spacing" in own or "tributary" in own:
        given.pop("spacing", None)
        given.pop("tributary", None)
    return Member.model_construct(**(given | own))


def to_json(record: Record) -> dict[str, Any]:
    """The record as the session file has it: readings as typed, only what was given."""
    return record.model_dump(by_alias=True, exclude_unset=True)
