"""Field types of the record: readings, choices, texts; each refuses with one clear error and keeps what was typed."""

from __future__ import annotations

import copy
import difflib
from collections.abc import Callable
from typing import Any

from pydantic import BaseModel, ConfigDict, GetCoreSchemaHandler, GetJsonSchemaHandler, ValidationInfo
from pydantic_core import CoreSchema, core_schema

from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.reading import Reading, parse

LONGEST_TEXT = 10_000
MANY = 12  # options; more are not listed beside the nearest
READING_SCHEMA: dict[str, Any] = {
    "anyOf": [
        {"type": "string", "minLength": 1, "maxLength": 200},
        {"type": "number"},
        {"type": "array", "items": {"type": ["string", "number"]}, "minItems": 1, "maxItems": 50},
    ]
}


class Record(BaseModel):
    """A part of the record: frozen, and nothing misspelt is ever silently ignored."""

    model_config = ConfigDict(extra="forbid", frozen=True, populate_by_name=False, arbitrary_types_allowed=True)


def session_units(info: ValidationInfo) -> str:
    """Units of bare numbers in the session, 'US' or 'SI'."""
    context = info.context
    return str(context.get("units", "US")) if isinstance(context, dict) else "US"


class Typed:
    """A pydantic type made of one reading function; the value goes back to JSON as `written` gives it."""

    def __init__(
        self,
        read: Callable[[Any, ValidationInfo], Any],
        written: Callable[[Any], Any],
        schema: dict[str, Any],
    ) -> None:
        self.read, self.written, self.schema = read, written, schema

    def __get_pydantic_core_schema__(self, source: Any, handler: GetCoreSchemaHandler) -> CoreSchema:
        return core_schema.with_info_plain_validator_function(
            self.read, serialization=core_schema.plain_serializer_function_ser_schema(self.written)
        )

    def __get_pydantic_json_schema__(self, schema: CoreSchema, handler: GetJsonSchemaHandler) -> dict[str, Any]:
        return copy.deepcopy(self.schema)  # pydantic writes titles and defaults into what it is given


def written(value: Any) -> Any:
    """A field as it goes to JSON: readings as typed, nested records as plain data."""
    if isinstance(value, Reading):
        return list(value.typed) if isinstance(value.typed, tuple) else value.typed
    if isinstance(value, Record):
        return value.model_dump(by_alias=True, exclude_unset=True)
    if isinstance(value, tuple):
        return [written(item) for item in value]
    return value


def measured(quantity: Quantity) -> Typed:
    """A field that holds a reading of the quantity."""
    return Typed(lambda value, info: parse(value, quantity, session_units(info)), written, READING_SCHEMA)


def several(quantity: Quantity, most: int) -> Typed:
    """A field that holds a list of readings, one for each place."""

    def read(value: Any, info: ValidationInfo) -> tuple[Reading, ...]:
        if not isinstance(value, list | tuple) or not 1 <= len(value) <= most:
            raise ReadingError("", value, f"a list of 1 to {most} readings; each {quantity.accepted}")
        found = []
        for index, item in enumerate(value):
            try:
                found.append(parse(item, quantity, session_units(info)))
            except ReadingError as error:
                raise error.at(str(index)) from None
        return tuple(found)

    schema = {"type": "array", "items": READING_SCHEMA, "minItems": 1, "maxItems": most}
    return Typed(read, written, schema)


def choice(*options: str) -> Typed:
    """A field that holds one of a few words, in any case."""

    def read(value: Any, info: ValidationInfo) -> str:
        if isinstance(value, str):
            folded = " ".join(value.lower().split())
            for option in options:
                if option.lower() == folded:
                    return option
        raise ReadingError("", value, nearest_first(value, options))

    return Typed(read, written, {"type": "string", "enum": list(options)})


def nearest_first(value: object, options: tuple[str, ...]) -> str:
    """The options in words, the nearest to what was typed named first.

    >>> nearest_first("joyst", ("beam", "joist"))
    'joist (nearest); one of beam, joist'
    """
    listed = "one of " + ", ".join(options) if len(options) > 1 else (options[0] if options else "nothing")
    near = difflib.get_close_matches(str(value).lower()[:60], options, 1, 0.5) if isinstance(value, str) else []
    if near and len(options) > MANY:
        return f"{near[0]}"
    return f"{near[0]} (nearest); {listed}" if near else listed


def words_or_reading(quantity: Quantity, *options: str) -> Typed:
    """A field that holds one of a few words or a reading."""
    words = choice(*options)

    def read(value: Any, info: ValidationInfo) -> str | Reading:
        if isinstance(value, str) and any(char.isdigit() for char in value):
            return parse(value, quantity, session_units(info))
        if isinstance(value, str):
            try:
                found: str = words.read(value, info)
                return found
            except ReadingError as error:
                raise ReadingError("", value, f"{error.accepted}; or {quantity.accepted}") from None
        return parse(value, quantity, session_units(info))

    return Typed(read, written, {"anyOf": [{"type": "string", "enum": list(options)}, READING_SCHEMA]})


def text(longest: int = LONGEST_TEXT) -> Typed:
    """A field of free text, kept verbatim."""

    def read(value: Any, info: ValidationInfo) -> str:
        if not isinstance(value, str):
            raise ReadingError("", value, "text")
        if len(value) > longest:
            raise ReadingError("", value, f"text of at most {longest} characters", "is too long")
        if any("\ud800" <= char <= "\udfff" for char in value):
            raise ReadingError("", ascii(value), "text that can be written as UTF-8", "holds half a character")
        return value

    return Typed(read, written, {"type": "string", "maxLength": longest})


def whole(low: int, high: int) -> Typed:
    """A field that holds a whole number."""

    def read(value: Any, info: ValidationInfo) -> int:
        if isinstance(value, bool) or not isinstance(value, int) or not low <= value <= high:
            raise ReadingError("", value, f"a whole number from {low} to {high}")
        return value

    return Typed(read, written, {"type": "integer", "minimum": low, "maximum": high})


def number(low: float, high: float) -> Typed:
    """A field that holds a plain number without a unit."""

    def read(value: Any, info: ValidationInfo) -> float:
        if isinstance(value, bool) or not isinstance(value, int | float) or not low <= value <= high:
            raise ReadingError("", value, f"a number from {low:g} to {high:g}")
        return value

    return Typed(read, written, {"type": "number", "minimum": low, "maximum": high})


def yes_no() -> Typed:
    """A field that holds true or false."""

    def read(value: Any, info: ValidationInfo) -> bool:
        if not isinstance(value, bool):
            raise ReadingError("", value, "true or false")
        return value

    return Typed(read, written, {"type": "boolean"})


def records(model: type[Record], most: int) -> Typed:
    """A field that holds a list of records."""

    def read(value: Any, info: ValidationInfo) -> tuple[Record, ...]:
        if not isinstance(value, list | tuple):
            raise ReadingError("", value, "a list")
        if len(value) > most:
            raise ReadingError("", f"{len(value)} entries", f"at most {most} entries", "is too long")
        return tuple(nested(model, item, info, str(index)) for index, item in enumerate(value))

    return Typed(read, written, {"type": "array", "items": inlined(model), "maxItems": most})


def inlined(model: type[BaseModel]) -> dict[str, Any]:
    """JSON Schema of a record, in place."""
    return model.model_json_schema(by_alias=True)


def nested(model: type[Record], value: Any, info: ValidationInfo, at: str = "") -> Record:
    """Read a record inside a record; its first problem is raised with its place."""
    from pydantic import ValidationError

    from assess.record_errors import problems

    if not isinstance(value, dict):
        raise ReadingError(at, value, "an object with " + ", ".join(field_names(model)))
    try:
        return model.model_validate(value, context=info.context)
    except ValidationError as error:
        first = problems(error, model)[0]
        raise first.at(".".join(part for part in (at, first.field) if part)) from None


def field_names(model: type[BaseModel]) -> tuple[str, ...]:
    """Names of a record's fields as they stand in the file."""
    return tuple(field.alias or name for name, field in model.model_fields.items())
