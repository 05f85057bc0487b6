"""From pydantic's errors to ours: dotted field, value, what is accepted, and the nearest known name."""

from __future__ import annotations

from collections.abc import Sequence

from pydantic import BaseModel, ValidationError

from assess.errors import ReadingError
from assess.record_fields import field_names, nearest_first


def problems(error: ValidationError, model: type[BaseModel]) -> list[ReadingError]:
    """Every problem of a record as ReadingErrors, in the order of its fields.

    error   what pydantic raised
    model   the record that was read; names the known fields
    """
    return [_problem(dict(item), model) for item in error.errors(include_url=False)]


def _problem(item: dict[str, object], model: type[BaseModel]) -> ReadingError:
    place = item["loc"]
    assert isinstance(place, Sequence)
    path = ".".join(str(part) for part in place)
    context = item.get("ctx")
    inner = context.get("error") if isinstance(context, dict) else None
    if isinstance(inner, ReadingError):
        return inner.at(".".join(part for part in (path, inner.field) if part))
    if item["type"] == "extra_forbidden":
        name = str(place[-1])
        return ReadingError(path, name, nearest_first(name, field_names(model)), "is not a known field")
    if item["type"] == "missing":
        return ReadingError(path, None, "a value", "is missing")
    return ReadingError(path, item.get("input"), "an object with " + ", ".join(field_names(model)))
