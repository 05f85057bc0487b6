"""Defects as they were seen: a kind, a place, an extent and a size."""

from __future__ import annotations

from typing import Annotated, Any

from pydantic import ValidationInfo

from assess import quantities as q
from assess.errors import ReadingError
from assess.reading import Reading
from assess.record_fields import Record, Typed, choice, measured, text, whole, written, yes_no
from assess.record_lists import each, inlined, nested, texts

MOST_DEFECTS = 100
FACES = ("top", "bottom", "left", "right", "side", "all")


def _faces() -> Typed:
    faces = texts(4, choice(*FACES))

    def read(value: Any, info: ValidationInfo) -> Any:
        if value in ([], ()):
            raise ReadingError("", value, "1 to 4 faces of " + ", ".join(FACES), "is empty")
        return faces.read(value, info)

    return Typed(read, written, faces.schema | {"minItems": 1})


class _Defect(Record):
    defect: Annotated[str, text(40)]
    new_work: Annotated[bool | None, yes_no()] = None
    remarks: Annotated[str | None, text()] = None


class Notch(_Defect):
    """Wood cut out of an edge."""

    edge: Annotated[str, choice("top", "bottom")]
    at: Annotated[Reading, measured(q.POSITION)]
    length: Annotated[Reading, measured(q.LENGTH)]
    depth: Annotated[Reading, measured(q.SIZE)]


class Hole(_Defect):
    """A bore through the breadth; `at` and `height` are of its centre."""

    at: Annotated[Reading, measured(q.POSITION)]
    diameter: Annotated[Reading, measured(q.SIZE)]
    height: Annotated[Reading, measured(q.HEIGHT)]


class Decay(_Defect):
    """Soft or eaten wood on a face, probed to a depth."""

    face: Annotated[str, choice("top", "bottom", "side", "all")]
    at: Annotated[Reading, measured(q.POSITION)]
    length: Annotated[Reading, measured(q.LENGTH)]
    depth: Annotated[Reading, measured(q.SIZE)]
    margin: Annotated[Reading | None, measured(q.MARGIN)] = None


class EndSplit(_Defect):
    """A through split at an end; `remaining` is the depth that still carries."""

    end: Annotated[str, choice("left", "right")]
    remaining: Annotated[Reading, measured(q.SIZE)]
    length: Annotated[Reading, measured(q.LENGTH)]


class Checking(_Defect):
    """Ordinary seasoning checks: recorded, no penalty and no bonus."""

    at: Annotated[Reading | None, measured(q.POSITION)] = None
    length: Annotated[Reading | None, measured(q.LENGTH)] = None
    depth: Annotated[Reading | None, measured(q.SIZE)] = None


class Char(_Defect):
    """Charred faces, scraped to a depth."""

    faces: Annotated[tuple[str, ...], _faces()]
    at: Annotated[Reading, measured(q.POSITION)]
    length: Annotated[Reading, measured(q.LENGTH)]
    depth: Annotated[Reading, measured(q.SIZE)]


class Remaining(_Defect):
    """A measured remaining section, used as given."""

    at: Annotated[Reading, measured(q.POSITION)]
    length: Annotated[Reading, measured(q.LENGTH)]
    width: Annotated[Reading, measured(q.SIZE)]
    depth: Annotated[Reading, measured(q.SIZE)]


class HangerCorrosion(_Defect):
    """A hanger whose bearing is not relied on."""

    support: Annotated[int, whole(1, 6)]


DEFECTS: dict[str, type[_Defect]] = {
    "notch": Notch,
    "hole": Hole,
    "decay": Decay,
    "insects": Decay,
    "end split": EndSplit,
    "check": Checking,
    "char": Char,
    "remaining": Remaining,
    "hanger corrosion": HangerCorrosion,
}

Defect = _Defect


def condition_field() -> Typed:
    """A field that holds the list of defects."""
    kind = choice(*DEFECTS)

    def one(item: Any, info: ValidationInfo) -> Record:
        if not isinstance(item, dict):
            raise ReadingError("", item, "a defect: an object with `defect` and its fields")
        try:
            name = kind.read(item.get("defect"), info)
        except ReadingError as error:
            raise error.at("defect") from None
        return nested(DEFECTS[name], item | {"defect": name}, info)

    def read(value: Any, info: ValidationInfo) -> tuple[Record, ...]:
        return each(value, MOST_DEFECTS, lambda item: one(item, info), "defects")

    models = list(dict.fromkeys(DEFECTS.values()))
    return Typed(
        read, written, {"type": "array", "items": {"anyOf": [_schema(m) for m in models]}, "maxItems": MOST_DEFECTS}
    )


def _schema(model: type[_Defect]) -> dict[str, Any]:
    schema = inlined(model)
    schema["properties"]["defect"] = {"enum": [name for name, known in DEFECTS.items() if known is model]}
    return schema
