"""The member record of a session file: every field of the interface, as it was read."""

from __future__ import annotations

from typing import Annotated, Any, Self, TypeVar

from pydantic import ValidationError, model_validator

from assess import quantities as q
from assess.errors import ReadingError
from assess.kinds import KINDS
from assess.reading import Reading
from assess.record_added import Added, NewSupport
from assess.record_condition import Defect, condition_field
from assess.record_errors import SeveralReadingsError, listed, problems
from assess.record_fields import Record, choice, measured, text, whole, words_or_reading, written, yes_no
from assess.record_lists import check_plain, free_data, record_of, records, several, texts
from assess.record_loads import Layer, Limits, LineLoad, PointLoad, dead_field, edge_field, partitions_field
from assess.record_parts import Hanger, Size, StandsFor, TypedUse, Wood, use_field
from assess.record_seen import Graded, Levels, StiffnessTest, sag_field
from assess.record_survey import Survey

MOST_SPANS = 5
LONGEST_NOTE = 50_000
R = TypeVar("R", bound=Record)


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
    overhang_left: Annotated[Reading | None, measured(q.OVERHANG)] = None
    overhang_right: Annotated[Reading | None, measured(q.OVERHANG)] = None
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
    concentrated_on: Annotated[tuple[Reading, ...] | None, several(q.LENGTH, 2, 2)] = None
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
    identified: Annotated[dict[str, Any] | None, free_data("object")] = None
    graded: Annotated[Graded | None, record_of(Graded)] = None
    added: Annotated[tuple[Added, ...] | None, records(Added, 20)] = None
    new_supports: Annotated[tuple[NewSupport, ...] | None, records(NewSupport, 5)] = None

    @model_validator(mode="after")
    def _one_width(self) -> Self:
        if self.spacing is not None and self.tributary is not None:
            raise ReadingError(
                "tributary", written(self.tributary), "spacing or tributary, not both", "and spacing are both given"
            )
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
        if self.hanger is not None and self.hanger.kind == "fasteners" and self.hanger.de is None:
            lacking.append("hanger.de")
        return lacking


class Note(Record):
    """A note about anything."""

    text: Annotated[str, text(LONGEST_NOTE)]


KINDS_OF_RECORD: dict[str, type[Record]] = {"member": Member, "bay": Bay, "note": Note, "survey": Survey}


def record_problems(kind: str, data: object, units: str = "US") -> list[ReadingError]:
    """Every problem of a record, in the order of its fields; empty where it can be kept.

    kind    'member', 'bay', 'note' or 'survey'
    data    as the session file has it
    units   units of bare numbers, 'US' or 'SI'

    >>> [error.field for error in record_problems("member", {"kind": "joyst", "alike": 0})]
    ['kind', 'alike']
    """
    try:
        _read(KINDS_OF_RECORD[kind], data, units)
    except ReadingError as error:
        return listed(error)
    return []


def read_member(data: object, units: str = "US") -> Member:
    """A member from its data; raises what is wrong with it as ReadingError.

    >>> read_member({"size": {"width": "1 5/8", "depth": "7 1/2 in"}}).size.depth.value
    7.5
    """
    return _read(Member, data, units)


def read_bay(data: object, units: str = "US") -> Bay:
    """A bay from its data; raises what is wrong with it as ReadingError."""
    return _read(Bay, data, units)


def read_note(data: object) -> Note:
    """A note from its data; raises what is wrong with it as ReadingError."""
    return _read(Note, data, "US")


def read_survey(data: object, units: str = "US") -> Survey:
    """What holds for the whole survey from its data; raises what is wrong with it as ReadingError."""
    return _read(Survey, data, units)


def _read(model: type[R], data: object, units: str) -> R:
    from assess.record_consistency import consistency_problems

    if not isinstance(data, dict):
        raise ReadingError("", data if isinstance(data, str) else type(data).__name__, "an object")
    check_plain(data)
    try:
        record = model.model_validate(data, context={"units": units})
    except ValidationError as error:
        raise SeveralReadingsError(problems(error, model)) from None
    found = consistency_problems(record) if isinstance(record, Fields) else []
    if found:
        raise SeveralReadingsError(found)
    return record


def to_json(record: Record) -> dict[str, Any]:
    """The record as the session file has it: readings as typed, only what was given."""
    return record.model_dump(by_alias=True, exclude_unset=True)
