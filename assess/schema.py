"""JSON Schema of one line of a session file, made from the record's own models."""

from __future__ import annotations

from typing import Any

from assess.log.fold import ALLOWED, KINDS, LONGEST_ID, SET_KINDS
from assess.log.lines import VERSION
from assess.record import KINDS_OF_RECORD
from assess.record_fields import READING_SCHEMA
from assess.record_set import allowed_paths

_SHORT = {"type": "string", "maxLength": 200}
_STAMP: dict[str, Any] = {
    "n": {"type": "integer", "minimum": 0, "description": "counter of the writer named in `from`"},
    "from": _SHORT | {"description": "random id of one opening for writing, 12 characters or more"},
    "at": _SHORT | {"description": "UTC time; never decides order"},
    "by": _SHORT | {"description": "initials"},
    "crc": {
        "type": "string",
        "pattern": "^[0-9a-f]{8}$",
        "description": 'CRC-32 of the line as it reads without `, "crc": "..."`; the last key',
    },
}
_WORDS = {
    "put": "gives a whole record",
    "set": "sets one field by its path; null restores the default, lists are set whole",
    "drop": "removes a record",
    "conflict": "a path set differently in two merged files: `data` stands until a person chooses",
}


def session_line_schema() -> dict[str, Any]:
    """JSON Schema (draft 2020-12) of one session line: the header, or put, set, drop, conflict.

    returns   schema, with the records under `$defs`. Choices are listed as they are written; they are read in any
              case. What no schema can say (a bad reading, a defect off the member) is found by reading the record.
    source    interface, Session file and Member record

    >>> sorted(session_line_schema()["$defs"])
    ['bay', 'conflict', 'drop', 'finding', 'header', 'id', 'member', 'note', 'put', 'reading', 'set', 'survey']
    """
    lines = ("header", "put", "set", "drop", "conflict")
    records = {name: _tidy(model.model_json_schema(by_alias=True)) for name, model in KINDS_OF_RECORD.items()}
    return {
        "$schema": "https://json-schema.org/draft/2020-12/schema",
        "title": "one line of a willcarry session",
        "oneOf": [_ref(name) for name in lines],
        "$defs": {
            "header": _header(),
            "put": {"oneOf": [_line("put", kind, data=_ref(kind)) for kind in KINDS]},
            "set": {"oneOf": [_line("set", kind, path=_paths(kind), data={}) for kind in SET_KINDS]},
            "drop": {"oneOf": [_line("drop", kind) for kind in KINDS]},
            "conflict": {
                "oneOf": [_line("conflict", kind, path=_paths(kind), data={}, other={}) for kind in SET_KINDS]
            },
            "id": {"type": "string", "minLength": 1, "maxLength": LONGEST_ID, "pattern": r"\S"},
            "reading": READING_SCHEMA | {"description": "as read: text with or without its unit, or several of these"},
            "finding": {"type": "object", "description": "summary of an assessment"},
            **records,
        },
    }


def _ref(name: str) -> dict[str, Any]:
    return {"$ref": f"#/$defs/{name}"}


def _header() -> dict[str, Any]:
    text = {"type": "string"}
    return {
        "type": "object",
        "description": "the first line of a file, and only that",
        "properties": {
            "willcarry": {"const": VERSION},
            "site": text,
            "inspector": text,
            "opened": text,
            "units": {"enum": ["US", "SI"], "description": "units of bare numbers; US where not given"},
            "crc": _STAMP["crc"],
        },
        "required": ["willcarry"],
        "additionalProperties": False,
    }


def _line(operation: str, kind: str, **fields: Any) -> dict[str, Any]:
    properties = {operation: {"const": kind}, "id": _ref("id")} | fields
    return {
        "type": "object",
        "description": _WORDS[operation],
        "properties": properties | _STAMP,
        "required": sorted(ALLOWED[operation] - {"other"}),
        "additionalProperties": False,
    }


def _paths(kind: str) -> dict[str, Any]:
    return {"enum": [dotted.split(".") for dotted in sorted(allowed_paths(kind))]}


def _tidy(schema: Any) -> Any:
    """The models' schema without what says nothing: titles, null defaults; readings by reference."""
    if isinstance(schema, list):
        return [_tidy(item) for item in schema]
    if not isinstance(schema, dict):
        return schema
    if schema.get("anyOf") == READING_SCHEMA["anyOf"]:
        return _ref("reading")
    found = {}
    for key, value in schema.items():
        if key == "properties":
            found[key] = {name: _tidy(inner) for name, inner in value.items()}
        elif key not in ("title", "default"):
            found[key] = _tidy(value)
    return found
