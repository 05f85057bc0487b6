"""Field types of the record: readings, choices, texts; each refuses with one clear error and keeps what was typed."""

from __future__ import annotations

import copy
from collections.abc import Callable
from typing import Any

from pydantic import BaseModel, ConfigDict, GetCoreSchemaHandler, GetJsonSchemaHandler, ValidationInfo
from pydantic_core import CoreSchema, core_schema

from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.reading import LONGEST, MOST_READINGS, Reading, parse
from assess.record_errors import nearest_first

LONGEST_TEXT = 10_000
READING_SCHEMA: dict[str, Any] = {
    "anyOf": [
        {"type": "string", "minLength": 1, "maxLength": LONGEST},
        {"type": "number"},
        {"type": "array", "items": {"type": ["string", "number"]}, "minItems": 1, "maxItems": MOST_READINGS},
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


def choice(*options: str) -> Typed:
    """A field that holds one of a few words, in any case."""

    def read(value: Any, info: ValidationInfo) -> str:
        if isinstance(value, str) and len(value) <= LONGEST:
            folded = " ".join(value.lower().split())
            for option in options:
                if option.lower() == folded:
                    return option
        raise ReadingError("", value, nearest_first(value, options))

    return Typed(read, written, {"type": "string", "enum": list(options)})


def words_or_reading(quantity: Quantity, *options: str) -> Typed:
    """A field that holds one of a few words or a reading."""
    words = choice(*options)

    def read(value: Any, info: ValidationInfo) -> str | Reading:
        if isinstance(value, str) and not any(char.isdigit() for char in value):
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
            raise ReadingError("", value[:LONGEST], f"text of at most {longest} characters", "is too long")
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
