"""The records inside a member: size, wood, uses, loads, defects, tests, added parts."""

from __future__ import annotations

import re
from typing import Annotated, Any, Self

from pydantic import Field, ValidationInfo, model_validator

from assess import quantities as q
from assess.errors import ReadingError
from assess.reading import Reading
from assess.record_fields import (
    READING_SCHEMA,
    Record,
    Typed,
    choice,
    inlined,
    measured,
    nested,
    number,
    records,
    several,
    text,
    whole,
    words_or_reading,
    written,
    yes_no,
)

LOAD_TYPES = ("dead", "live", "snow", "roof live", "construction", "wind")


def _wood_name(kind: str) -> Typed:
    """A species or grade, kept as typed, refused where the tables know nothing like it."""

    def read(value: Any, info: ValidationInfo) -> str:
        from species import WoodError, match_grade, match_species

        if not isinstance(value, str):
            raise ReadingError("", value, f"a {kind}")
        if len(value) > 200:
            raise ReadingError("", value, "at most 200 characters", "is too long")
        try:
            (match_species if kind == "species" else match_grade)(value)
        except WoodError as error:
            raise ReadingError("", value, error.accepted, error.problem) from None
        return value

    return Typed(read, written, {"type": "string", "maxLength": 200})


def _only_one(record: Record, forms: tuple[tuple[str, ...], ...], field: str) -> None:
    """Refuse a record that mixes forms of which one excludes the other."""
    given = [form for form in forms if any(getattr(record, name) is not None for name in form)]
    if len(given) > 1:
        names = " and ".join(next(n for n in form if getattr(record, n) is not None) for form in given)
        raise ReadingError(field, names, "one of them", "exclude each other")


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
        _only_one(self, (("width", "depth"), ("diameter",), ("nominal",)), "")
        return self

    @property
    def complete(self) -> bool:
        """Whether a section can be made of it."""
        return (
            self.diameter is not None or self.nominal is not None or (self.width is not None and self.depth is not None)
        )


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


def record_of(model: type[Record]) -> Typed:
    """A field that holds one record."""
    return Typed(lambda value, info: nested(model, value, info), written, inlined(model))


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
        _only_one(self, (("species", "grade"), ("candidates",), ("values",)), "")
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
    concentrated: Annotated[Reading | None, measured(q.FORCE)] = None
    name: Annotated[str | None, text(200)] = None


def use_field() -> Typed:
    def read(value: Any, info: ValidationInfo) -> str | Record:
        if isinstance(value, dict):
            return nested(TypedUse, value, info)
        if not isinstance(value, str):
            raise ReadingError("", value, "a use by its name, or its loads")
        from assess.uses import use_named

        try:
            use_named(value)
        except ReadingError as error:
            raise error.at("") from None
        return value

    return Typed(read, written, {"anyOf": [{"type": "string"}, inlined(TypedUse)]})


class Layer(Record):
    """One layer of the floor: a material of the table with its thickness, or a typed load."""

    layer: Annotated[str, text(200)]
    thickness: Annotated[Reading | None, measured(q.SIZE)] = None
    load: Annotated[Reading | None, measured(q.AREA_LOAD)] = None

    @model_validator(mode="after")
    def _known(self) -> Self:
        if self.load is None:
            from assess.materials import layer_psf

            layer_psf(self.layer, self.thickness.value if self.thickness is not None else None)
        return self


def dead_field() -> Typed:
    layers = records(Layer, 30)
    reading = measured(q.AREA_LOAD)

    def read(value: Any, info: ValidationInfo) -> Any:
        is_layers = isinstance(value, list) and any(isinstance(item, dict) for item in value)
        return layers.read(value, info) if is_layers else reading.read(value, info)

    return Typed(read, written, {"anyOf": [READING_SCHEMA, layers.schema]})


class PointLoad(Record):
    """A load at one place."""

    name: Annotated[str | None, text(200)] = None
    load: Annotated[Reading, measured(q.FORCE)]
    at: Annotated[Reading, measured(q.POSITION)]
    type: Annotated[str, choice(*LOAD_TYPES)]


class LineLoad(Record):
    """A load along a length."""

    name: Annotated[str | None, text(200)] = None
    load: Annotated[Reading, measured(q.LINE_LOAD)]
    from_: Annotated[Reading, measured(q.POSITION)] = Field(alias="from")
    to: Annotated[Reading, measured(q.POSITION)]
    type: Annotated[str, choice(*LOAD_TYPES)]

    @model_validator(mode="after")
    def _has_length(self) -> Self:
        if self.to.value <= self.from_.value:
            raise ReadingError("to", self.to.typed, "a place beyond `from`", "is not beyond `from`")
        return self


def _limit() -> Typed:
    def read(value: Any, info: ValidationInfo) -> float:
        found = re.fullmatch(r"\s*[lL]\s*/\s*(\d{1,4})\s*", value) if isinstance(value, str) else None
        if not found or not 1 <= int(found[1]) <= 2000:
            raise ReadingError("", value, "a limit from L/1 to L/2000, e.g. L/360")
        return float(found[1])

    return Typed(read, lambda value: f"L/{value:g}", {"type": "string", "pattern": r"^\s*[lL]\s*/\s*\d{1,4}\s*$"})


class Limits(Record):
    """Deflection limits, as L over a number."""

    live: Annotated[float | None, _limit()] = None
    total: Annotated[float | None, _limit()] = None


class Hanger(Record):
    """How a hanger carries: on its seat, or by fasteners at `de` from the unloaded edge."""

    kind: Annotated[str, choice("seat", "fasteners")]
    de: Annotated[Reading | None, measured(q.SIZE)] = None


class StandsFor(Record):
    """How many like members the finding speaks for, and how many were measured."""

    count: Annotated[int, whole(1, 100_000)]
    measured: Annotated[int, whole(0, 100_000)]


class Levels(Record):
    """Readings below one level line."""

    left: Annotated[Reading, measured(q.SAG)]
    middle: Annotated[Reading, measured(q.SAG)]
    right: Annotated[Reading, measured(q.SAG)]


class StiffnessTest(Record):
    """A known weight at a place and the deflection it made."""

    load: Annotated[Reading, measured(q.FORCE)]
    at: Annotated[Reading, measured(q.POSITION)]
    deflection: Annotated[Reading, measured(q.DEFLECTION)]
    carried_by: Annotated[int | None, whole(1, 20)] = None


def texts(most: int, of: Typed) -> Typed:
    """A field that holds a list of simple values, each read as `of` says."""

    def read(value: Any, info: ValidationInfo) -> tuple[Any, ...]:
        if not isinstance(value, list | tuple):
            raise ReadingError("", value, "a list")
        if len(value) > most:
            raise ReadingError("", f"{len(value)} entries", f"at most {most} entries", "is too long")
        found = []
        for index, item in enumerate(value):
            try:
                found.append(of.read(item, info))
            except ReadingError as error:
                raise error.at(str(index)) from None
        return tuple(found)

    return Typed(read, written, {"type": "array", "items": of.schema, "maxItems": most})


def free_object() -> Typed:
    """A field whose inner form comes with the work that reads it: kept verbatim, within a size."""

    def read(value: Any, info: ValidationInfo) -> Any:
        if not isinstance(value, dict | list):
            raise ReadingError("", value, "an object or a list")
        if len(str(value)) > 100_000:
            raise ReadingError("", "too much", "at most 100,000 characters", "is too long")
        return value

    return Typed(read, lambda value: value, {"type": ["object", "array"]})


def sag_field() -> Typed:
    """A field that holds one sag reading, or three below one level line."""
    one = measured(q.SAG)

    def read(value: Any, info: ValidationInfo) -> Any:
        return nested(Levels, value, info) if isinstance(value, dict) else one.read(value, info)

    return Typed(read, written, {"anyOf": [READING_SCHEMA, inlined(Levels)]})


def partitions_field() -> Typed:
    """A field that holds true, false or a partition load."""
    load = measured(q.AREA_LOAD)

    def read(value: Any, info: ValidationInfo) -> Any:
        return value if isinstance(value, bool) else load.read(value, info)

    return Typed(read, written, {"anyOf": [{"type": "boolean"}, READING_SCHEMA]})


def edge_field() -> Typed:
    """A field that says how an edge is held: a word, a distance between braces, or their places."""
    word = words_or_reading(q.SPAN, "held", "ends only")
    places = several(q.POSITION, 100)

    def read(value: Any, info: ValidationInfo) -> Any:
        return places.read(value, info) if isinstance(value, list | tuple) else word.read(value, info)

    return Typed(read, written, {"anyOf": [word.schema, places.schema]})


class Graded(Record):
    """Characteristics measured in grading, stored as they were seen."""

    knots: Annotated[tuple[str, ...] | None, texts(100, text(200))] = None
    slope_of_grain: Annotated[str | None, text(50)] = None
    wane: Annotated[str | None, text(200)] = None
    splits: Annotated[str | None, text(200)] = None
    shake: Annotated[str | None, text(200)] = None
    holes: Annotated[str | None, text(200)] = None
    faces_seen: Annotated[int | None, whole(1, 4)] = None
    rings_per_inch: Annotated[float | None, number(0.1, 200)] = None
    latewood: Annotated[str | None, text(50)] = None


class Fasteners(Record):
    """Fasteners of an added part."""

    kind: Annotated[str, text(100)]
    rows: Annotated[int | None, whole(1, 10)] = None
    spacing: Annotated[Reading | None, measured(q.SPACING)] = None
    at_ends: Annotated[int | None, whole(0, 100)] = None


class Steel(Record):
    """A steel plate or channel."""

    thickness: Annotated[Reading, measured(q.SIZE)]
    depth: Annotated[Reading, measured(q.SIZE)]
    Fy: Annotated[Reading | None, measured(q.STRESS)] = None


class Added(Record):
    """A part put beside the member."""

    part: Annotated[str, text(50)]
    size: Annotated[Size | None, record_of(Size)] = None
    wood: Annotated[Wood | None, record_of(Wood)] = None
    steel: Annotated[Steel | None, record_of(Steel)] = None
    from_: Annotated[Reading | None, measured(q.POSITION)] = Field(default=None, alias="from")
    to: Annotated[Reading | None, measured(q.POSITION)] = None
    bears: Annotated[tuple[bool, bool] | None, Typed(lambda v, i: _two_flags(v), written, {"type": "array"})] = None
    jacked: Annotated[float | None, number(0.0, 1.0)] = None
    fasteners: Annotated[Fasteners | None, record_of(Fasteners)] = None


def _two_flags(value: Any) -> tuple[bool, bool]:
    if not isinstance(value, list | tuple) or len(value) != 2 or not all(isinstance(item, bool) for item in value):
        raise ReadingError("", value, "two of true or false, left and right")
    return value[0], value[1]


class NewSupport(Record):
    """A support put under the member."""

    at: Annotated[Reading, measured(q.POSITION)]
    bearing: Annotated[Reading | None, measured(q.BEARING)] = None
    jacked: Annotated[float | None, number(0.0, 1.0)] = None
