"""The records of tests and looks at a member: sag, a stiffness test, what was measured in grading."""

from __future__ import annotations

from typing import Annotated, Any

from pydantic import ValidationInfo

from assess import quantities as q
from assess.reading import Reading
from assess.record_fields import READING_SCHEMA, Record, Typed, measured, whole, written
from assess.record_lists import free_data, inlined, nested


class Levels(Record):
    """Readings below one level line."""

    left: Annotated[Reading, measured(q.LEVEL)]
    middle: Annotated[Reading, measured(q.LEVEL)]
    right: Annotated[Reading, measured(q.LEVEL)]


def sag_field() -> Typed:
    """A field that holds one sag reading, or three below one level line."""
    one = measured(q.SAG)

    def read(value: Any, info: ValidationInfo) -> Any:
        return nested(Levels, value, info) if isinstance(value, dict) else one.read(value, info)

    return Typed(read, written, {"anyOf": [READING_SCHEMA, inlined(Levels)]})


class StiffnessTest(Record):
    """A known weight at a place and the deflection it made."""

    load: Annotated[Reading, measured(q.WEIGHT)]
    at: Annotated[Reading, measured(q.POSITION)]
    deflection: Annotated[Reading, measured(q.DEFLECTION)]
    carried_by: Annotated[int | None, whole(1, 20)] = None


class Graded(Record):
    """Characteristics measured in grading, stored as they were seen."""

    knots: Annotated[list[Any] | None, free_data("array")] = None
    slope_of_grain: Annotated[Any, free_data("string", "number", "object", "array")] = None
    wane: Annotated[Any, free_data("string", "number", "object", "array")] = None
    splits: Annotated[Any, free_data("string", "number", "object", "array")] = None
    shake: Annotated[Any, free_data("string", "number", "object", "array")] = None
    holes: Annotated[Any, free_data("string", "number", "object", "array")] = None
    faces_seen: Annotated[int | None, whole(0, 4)] = None
    rings_per_inch: Annotated[Any, free_data("string", "number", "object", "array")] = None
    latewood: Annotated[Any, free_data("string", "number", "object", "array")] = None
