"""The records of what stands on a member: layers of the floor, point and line loads, limits, bracing."""

from __future__ import annotations

import re
from typing import Annotated, Any, Self

from pydantic import Field, ValidationInfo, model_validator

from assess import quantities as q
from assess.errors import ReadingError
from assess.reading import Reading
from assess.record_fields import READING_SCHEMA, Record, Typed, choice, measured, text, words_or_reading, written
from assess.record_lists import records, several

LOAD_TYPES = ("dead", "live", "snow", "roof live", "construction", "wind")


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
    """A field that holds a dead load, or the layers it is made of."""
    layers = records(Layer, 30)
    reading = measured(q.AREA_LOAD)

    def read(value: Any, info: ValidationInfo) -> Any:
        is_layers = isinstance(value, list | tuple) and any(isinstance(item, dict) for item in value)
        return layers.read(value, info) if is_layers else reading.read(value, info)

    return Typed(read, written, {"anyOf": [READING_SCHEMA, layers.schema]})


def _only_wind_lifts(load: Reading, load_type: str) -> None:
    if load.value < 0.0 and load_type != "wind":
        raise ReadingError("load", written(load), "a load of 0 or more; only wind may lift", "is negative")


class PointLoad(Record):
    """A load at one place."""

    name: Annotated[str | None, text(200)] = None
    load: Annotated[Reading, measured(q.FORCE)]
    at: Annotated[Reading, measured(q.POSITION)]
    type: Annotated[str, choice(*LOAD_TYPES)]

    @model_validator(mode="after")
    def _downward(self) -> Self:
        _only_wind_lifts(self.load, self.type)
        return self


class LineLoad(Record):
    """A load along a length."""

    name: Annotated[str | None, text(200)] = None
    load: Annotated[Reading, measured(q.LINE_LOAD)]
    from_: Annotated[Reading, measured(q.POSITION)] = Field(alias="from")
    to: Annotated[Reading, measured(q.POSITION)]
    type: Annotated[str, choice(*LOAD_TYPES)]

    @model_validator(mode="after")
    def _has_length(self) -> Self:
        _only_wind_lifts(self.load, self.type)
        if self.to.value <= self.from_.value:
            raise ReadingError("to", written(self.to), "a place beyond `from`", "is not beyond `from`")
        return self


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


def _limit() -> Typed:
    def read(value: Any, info: ValidationInfo) -> float:
        found = re.fullmatch(r"\s*[lL]\s*/\s*([0-9]{1,4})\s*", value) if isinstance(value, str) else None
        if not found or not 1 <= int(found[1]) <= 2000:
            raise ReadingError("", value, "a limit from L/1 to L/2000, e.g. L/360")
        return float(found[1])

    return Typed(read, lambda value: f"L/{value:g}", {"type": "string", "pattern": r"^\s*[lL]\s*/\s*[0-9]{1,4}\s*$"})


class Limits(Record):
    """Deflection limits, as L over a number."""

    live: Annotated[float | None, _limit()] = None
    total: Annotated[float | None, _limit()] = None
