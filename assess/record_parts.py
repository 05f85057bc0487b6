"""The records inside a member that say what it is: size, wood, how it is borne, how it is used."""

from __future__ import annotations

from typing import Annotated, Any, Self

from pydantic import ValidationInfo, model_validator

from assess import quantities as q
from assess.errors import ReadingError
from assess.reading import Reading
from assess.record_fields import Record, Typed, choice, measured, number, text, whole, written, yes_no
from assess.record_lists import inlined, nested, record_of, records


class Size(Record):
    """Measured width and depth of one ply, or a diameter, or a nominal size with its dressing."""

    width: Annotated[Reading | None, measured(q.SIZE)] = None
    depth: Annotated[Reading | None, measured(q.SIZE)] = None
    diameter: Annotated[Reading | None, measured(q.SIZE)] = None
    nominal: Annotated[str | None, text(20)] = None
    dressing: Annotated[str | None, choice("current", "1925-1969", "full sawn")] = None
    plies: Annotated[int | None, whole(1, 8)] = None
    plies_fastened: Annotated[bool | None, yes_no()] = None
    surface: Annotated[str | None, choice("dressed", "rough")] = None

    @model_validator(mode="after")
    def _one_form(self) -> Self:
        _only_one(self, (("width", "depth"), ("diameter",), ("nominal", "dressing")))
        if self.nominal is not None:
            section_by_name(self.nominal, self.dressing)
        if self.dressing is not None and self.nominal is None:
            raise ReadingError("nominal", None, "a nominal size such as 2x8 beside its dressing", "is missing")
        return self

    @property
    def complete(self) -> bool:
        """Whether a section can be made of it."""
        return (
            self.diameter is not None or self.nominal is not None or (self.width is not None and self.depth is not None)
        )


def section_by_name(nominal: str, dressing: str | None) -> tuple[float, float]:
    """Thickness and width [in] of a nominal size as it was dressed; raises ReadingError of its field."""
    from species import WoodError, dressed_size

    try:
        return dressed_size(nominal, dressing or "current")
    except WoodError as error:
        raise ReadingError(error.field, error.value, error.accepted, error.problem) from None


def _only_one(record: Record, forms: tuple[tuple[str, ...], ...]) -> None:
    """Refuse a record that mixes forms of which one excludes the other."""
    given = [name for form in forms for name in form[:2] if getattr(record, name) is not None]
    first = next((form for form in forms if given and given[0] in form), ())
    rival = next((name for name in given if name not in first), None)
    if rival is not None:
        raise ReadingError(rival, given[0], f"one of {given[0]} and {rival}", "is given beside another form")


def _wood_name(kind: str) -> Typed:
    """A species or grade, kept as typed, refused where the tables know nothing like it."""

    def read(value: Any, info: ValidationInfo) -> str:
        from species import WoodError, match_grade, match_species

        if not isinstance(value, str):
            raise ReadingError("", value, f"a {kind} as text")
        if len(value) > 200:
            raise ReadingError("", value, "at most 200 characters", "is too long")
        try:
            (match_species if kind == "species" else match_grade)(value)
        except WoodError as error:
            raise ReadingError("", value, error.accepted, error.problem) from None
        return value

    return Typed(read, written, {"type": "string", "maxLength": 200})


class Candidate(Record):
    """One wood the piece could be."""

    species: Annotated[str, _wood_name("species")]
    grade: Annotated[str, _wood_name("grade")]


class TypedValues(Record):
    """Design values given by an engineer."""

    Fb: Annotated[Reading, measured(q.STRESS)]
    Fv: Annotated[Reading, measured(q.STRESS)]
    Fc_perp: Annotated[Reading, measured(q.STRESS)]
    E: Annotated[Reading, measured(q.MODULUS)]
    Emin: Annotated[Reading | None, measured(q.MODULUS)] = None
    G: Annotated[float | None, number(0.1, 1.3)] = None


class Wood(Record):
    """What the piece is, on what basis; or candidates; or typed values with their source."""

    species: Annotated[str | None, _wood_name("species")] = None
    grade: Annotated[str | None, _wood_name("grade")] = None
    basis: Annotated[str | None, choice("stamp", "certificate", "graded in place", "assumed")] = None
    stamp: Annotated[str | None, text(200)] = None
    rules: Annotated[str | None, choice("current", "1991-2013")] = None
    candidates: Annotated[tuple[Candidate, ...] | None, records(Candidate, 12)] = None
    values: Annotated[TypedValues | None, record_of(TypedValues)] = None
    source: Annotated[str | None, text(500)] = None

    @model_validator(mode="after")
    def _one_form(self) -> Self:
        _only_one(self, (("species", "grade"), ("candidates",), ("values",)))
        if self.values is not None and not (self.source or "").strip():
            raise ReadingError("source", self.source, "who gave the values and when, as text", "is missing")
        return self

    @property
    def complete(self) -> bool:
        """Whether values can be found for it."""
        return bool(self.candidates) or self.values is not None or (self.species is not None and self.grade is not None)


class TypedUse(Record):
    """A use given by its loads."""

    live: Annotated[Reading, measured(q.AREA_LOAD)]
    concentrated: Annotated[Reading | None, measured(q.CONCENTRATED)] = None
    name: Annotated[str | None, text(200)] = None


def use_field() -> Typed:
    """A field that holds a use by its name, or by its loads."""

    def read(value: Any, info: ValidationInfo) -> str | Record:
        if isinstance(value, dict):
            return nested(TypedUse, value, info)
        if not isinstance(value, str):
            raise ReadingError("", value, "a use by its name, or its loads")
        if len(value) > 200:
            raise ReadingError("", value, "at most 200 characters", "is too long")
        from assess.uses import use_named

        try:
            use_named(value)
        except ReadingError as error:
            raise error.at("") from None
        return value

    return Typed(read, written, {"anyOf": [{"type": "string", "maxLength": 200}, inlined(TypedUse)]})


class Hanger(Record):
    """How a hanger carries: on its seat, or by fasteners at `de` from the unloaded edge."""

    kind: Annotated[str, choice("seat", "fasteners")]
    de: Annotated[Reading | None, measured(q.SIZE)] = None


class StandsFor(Record):
    """How many like members the finding speaks for, and how many were measured."""

    count: Annotated[int, whole(1, 100_000)]
    measured: Annotated[int, whole(0, 100_000)]

    @model_validator(mode="after")
    def _no_more_than_all(self) -> Self:
        if self.measured > self.count:
            raise ReadingError("measured", self.measured, f"at most the count, {self.count}", "is too many")
        return self
