"""From pydantic's errors to ours: dotted field, value, what is accepted, and the nearest known name."""

from __future__ import annotations

import difflib
from collections.abc import Iterable, Sequence

from pydantic import BaseModel, ValidationError

from assess.errors import ReadingError

MANY = 12  # options; of more, the nearest alone is named, or the first ones


class SeveralReadingsError(ReadingError):
    """Several bad readings at once; where only one is shown it is the first.

    errors   all of them, in the order of their fields
    """

    def __init__(self, errors: Iterable[ReadingError]) -> None:
        self.errors = tuple(one for error in errors for one in listed(error))
        first = self.errors[0]
        super().__init__(first.field, first.value, first.accepted, first.problem)


def under(place: str, error: ReadingError) -> ReadingError:
    """The same error or errors, said of fields inside the named place.

    >>> under("condition.0", ReadingError("depth", "x", "a size")).field
    'condition.0.depth'
    """
    if isinstance(error, SeveralReadingsError):
        return SeveralReadingsError(under(place, one) for one in error.errors)
    return error.at(".".join(part for part in (place, error.field) if part))


def listed(error: ReadingError) -> list[ReadingError]:
    """The errors one by one."""
    return list(error.errors) if isinstance(error, SeveralReadingsError) else [error]


def problems(error: ValidationError, model: type[BaseModel]) -> list[ReadingError]:
    """Every problem of a record as ReadingError, in the order of its fields.

    error   what pydantic raised
    model   the record that was read; names the known fields
    """
    return [one for item in error.errors(include_url=False) for one in _problems(dict(item), model)]


def _problems(item: dict[str, object], model: type[BaseModel]) -> list[ReadingError]:
    place = item["loc"]
    assert isinstance(place, Sequence)
    path = ".".join(str(part) for part in place)
    context = item.get("ctx")
    inner = context.get("error") if isinstance(context, dict) else None
    if isinstance(inner, ReadingError):
        return listed(under(path, inner))
    if item["type"] == "extra_forbidden":
        name = str(place[-1])
        return [ReadingError(path, name, nearest_first(name, field_names(model)), "is not a known field")]
    if item["type"] == "missing":
        return [ReadingError(path, None, "a value", "is missing")]
    return [ReadingError(path, item.get("input"), "an object with " + ", ".join(field_names(model)))]


def field_names(model: type[BaseModel]) -> tuple[str, ...]:
    """Names of a record's fields as they stand in the file."""
    return tuple(field.alias or name for name, field in model.model_fields.items())


def nearest_first(value: object, options: tuple[str, ...]) -> str:
    """The options in words, the nearest to what was typed named first.

    >>> nearest_first("joyst", ("beam", "joist"))
    'joist (nearest); one of beam, joist'
    """
    near = difflib.get_close_matches(str(value).lower()[:60], options, 1, 0.5) if isinstance(value, str) else []
    if near and len(options) > MANY:
        return f"{near[0]} (nearest)"
    words = ("one of " if len(options) > 1 else "") + ", ".join(options[:MANY])
    if len(options) > MANY:
        words += f" and {len(options) - MANY} more"
    return f"{near[0]} (nearest); {words}" if near else words
