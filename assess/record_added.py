"""The records of repairs as built or planned: parts put beside the member, supports put under it."""

from __future__ import annotations

from typing import Annotated, Any, Self

from pydantic import Field, ValidationInfo, model_validator

from assess import quantities as q
from assess.errors import ReadingError
from assess.reading import Reading
from assess.record_fields import Record, Typed, measured, number, text, whole, written
from assess.record_lists import record_of
from assess.record_parts import Size, Wood


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


def _bears() -> Typed:
    def read(value: Any, info: ValidationInfo) -> tuple[bool, bool]:
        if not isinstance(value, list | tuple) or len(value) != 2 or not all(isinstance(item, bool) for item in value):
            raise ReadingError("", value, "two of true or false, left and right")
        return value[0], value[1]

    return Typed(read, written, {"type": "array", "items": {"type": "boolean"}, "minItems": 2, "maxItems": 2})


class Added(Record):
    """A part put beside the member."""

    part: Annotated[str, text(50)]
    size: Annotated[Size | None, record_of(Size)] = None
    wood: Annotated[Wood | None, record_of(Wood)] = None
    steel: Annotated[Steel | None, record_of(Steel)] = None
    from_: Annotated[Reading | None, measured(q.POSITION)] = Field(default=None, alias="from")
    to: Annotated[Reading | None, measured(q.POSITION)] = None
    bears: Annotated[tuple[bool, bool] | None, _bears()] = None
    jacked: Annotated[float | None, number(0.0, 1.0)] = None
    fasteners: Annotated[Fasteners | None, record_of(Fasteners)] = None

    @model_validator(mode="after")
    def _makes_sense(self) -> Self:
        if self.steel is not None and (self.wood is not None or self.size is not None):
            raise ReadingError("steel", "steel", "steel alone, or size and wood", "is given beside wood or its size")
        if self.from_ is not None and self.to is not None and self.to.value <= self.from_.value:
            raise ReadingError("to", written(self.to), "a place beyond `from`", "is not beyond `from`")
        return self


class NewSupport(Record):
    """A support put under the member."""

    at: Annotated[Reading, measured(q.POSITION)]
    bearing: Annotated[Reading | None, measured(q.BEARING)] = None
    jacked: Annotated[float | None, number(0.0, 1.0)] = None
