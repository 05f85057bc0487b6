"""Field types that hold other fields: lists, records inside a record, free data within a size."""

from __future__ import annotations

import math
from collections.abc import Callable
from typing import Any, TypeVar

from pydantic import BaseModel, ValidationError, ValidationInfo

from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.reading import parse
from assess.record_errors import SeveralReadingsError, field_names, problems, under
from assess.record_fields import READING_SCHEMA, Record, Typed, session_units, written

DEEPEST = 12  # brackets within brackets; the record itself goes 5 deep
MOST_VALUES = 20_000
LARGEST = 10**15
LONGEST_OF_ALL = 100_000  # characters; single fields have their own, shorter limits
T = TypeVar("T")


def each(value: Any, most: int, read: Callable[[Any], T], what: str = "entries") -> tuple[T, ...]:
    """Every entry of a list, read.

    value, most   raw list, and how many entries it may have
    read          reads one entry
    raises        ReadingError for no list or too long a one; SeveralReadingsError with what is wrong in any entry
    """
    if not isinstance(value, list | tuple):
        raise ReadingError("", value, f"a list of {what}")
    if len(value) > most:
        raise ReadingError("", f"{len(value)} {what}", f"at most {most} {what}", "is too long")
    found, wrong = [], []
    for index, item in enumerate(value):
        try:
            found.append(read(item))
        except ReadingError as error:
            wrong.append(under(str(index), error))
    if wrong:
        raise SeveralReadingsError(wrong)
    return tuple(found)


def several(quantity: Quantity, most: int, least: int = 1) -> Typed:
    """A field that holds a list of readings, one for each place."""

    def read(value: Any, info: ValidationInfo) -> tuple[Any, ...]:
        if not isinstance(value, list | tuple) or not least <= len(value) <= most:
            many = f"{least} to {most} readings" if least < most else f"{most} readings"
            raise ReadingError("", value, f"a list of {many}; each {quantity.accepted}")
        return each(value, most, lambda item: parse(item, quantity, session_units(info)), "readings")

    return Typed(read, written, {"type": "array", "items": READING_SCHEMA, "minItems": least, "maxItems": most})


def texts(most: int, of: Typed) -> Typed:
    """A field that holds a list of simple values, each read as `of` says."""
    return Typed(
        lambda value, info: each(value, most, lambda item: of.read(item, info)),
        written,
        {"type": "array", "items": of.schema, "maxItems": most},
    )


def records(model: type[Record], most: int) -> Typed:
    """A field that holds a list of records."""
    return Typed(
        lambda value, info: each(value, most, lambda item: nested(model, item, info)),
        written,
        {"type": "array", "items": inlined(model), "maxItems": most},
    )


def record_of(model: type[Record]) -> Typed:
    """A field that holds one record."""
    return Typed(lambda value, info: nested(model, value, info), written, inlined(model))


def nested(model: type[Record], value: Any, info: ValidationInfo) -> Record:
    """Read a record inside a record; its problems are raised with their fields."""
    if not isinstance(value, dict):
        raise ReadingError("", value, "an object with " + ", ".join(field_names(model)))
    try:
        return model.model_validate(value, context=info.context)
    except ValidationError as error:
        raise SeveralReadingsError(problems(error, model)) from None


def inlined(model: type[BaseModel]) -> dict[str, Any]:
    """JSON Schema of a record, in place."""
    return model.model_json_schema(by_alias=True)


def free_data(*types: str) -> Typed:
    """A field whose inner form comes with the work that reads it: kept verbatim.

    types   JSON types it may be, e.g. 'object'
    """
    python = {"object": dict, "array": list | tuple, "string": str, "number": int | float}
    accepted = " or ".join({"object": "an object", "array": "a list", "string": "text"}.get(t, f"a {t}") for t in types)

    def read(value: Any, info: ValidationInfo) -> Any:
        if isinstance(value, bool) or not any(isinstance(value, python[name]) for name in types):
            raise ReadingError("", value, accepted)
        return value

    return Typed(read, lambda value: value, {"type": list(types)})


def check_plain(data: object) -> None:
    """Refuse what JSON could not hold or no record needs: odd types, numbers that are none, deep or endless nesting.

    >>> check_plain({"a": [1, "b", None]})
    >>> check_plain({"a": [float("nan")]})
    Traceback (most recent call last):
    assess.errors.ReadingError: a.0: nan is no number; accepted: a finite number
    """
    left = [("", data, 0)]
    count = 0
    while left:
        place, value, depth = left.pop()
        count += 1
        if count > MOST_VALUES or depth > DEEPEST:
            raise ReadingError(
                place.split(".")[0], "too much", f"at most {MOST_VALUES} values, {DEEPEST} deep", "is too large"
            )
        if isinstance(value, dict):
            for name, item in value.items():
                if not isinstance(name, str):
                    raise ReadingError(place, name, "names as text", "is no name of a field")
                left.append((f"{place}.{name[:60]}".lstrip("."), item, depth + 1))
        elif isinstance(value, list | tuple):
            left += [(f"{place}.{index}".lstrip("."), item, depth + 1) for index, item in enumerate(value)]
        elif isinstance(value, int | float):
            if isinstance(value, float) and not math.isfinite(value):
                raise ReadingError(place, value, "a finite number", "is no number")
            if abs(value) >= LARGEST:
                raise ReadingError(
                    place, "a number of very many digits", "a number a person would read", "is too large"
                )
        elif isinstance(value, str):
            if len(value) > LONGEST_OF_ALL:
                raise ReadingError(place, value[:60], f"text of at most {LONGEST_OF_ALL} characters", "is too long")
            if not value.isascii() and any("\ud800" <= char <= "\udfff" for char in value):
                raise ReadingError(place, ascii(value), "text that UTF-8 can hold", "holds half a character")
        elif value is not None:
            raise ReadingError(place, type(value).__name__, "what JSON can hold", "is no JSON value")
