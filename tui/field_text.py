"""Text typed into a line of the form to the raw record, and back."""

from __future__ import annotations

import re
from typing import Any

from assess.errors import ReadingError
from assess.quantities import AREA_LOAD
from assess.reading import parse
from tui.clean import clean
from tui.field_entries import CONDITION, LINES, POINTS, VALUES
from tui.fields import Field

ENTRIES = {"condition": CONDITION, "points": POINTS, "lines": LINES, "values": VALUES}


def raw_of(data: dict[str, Any], field: Field) -> Any:
    """What stands in a raw record for a line, or None."""
    value: Any = data
    for name in field.path:
        value = value.get(name) if isinstance(value, dict) else None
    return value


def to_text(raw: Any, field: Field) -> str:
    """The raw value as the line shows it for typing."""
    return clean(_to_text(raw, field), lines=field.form == "note", longest=10_000)


def _to_text(raw: Any, field: Field) -> str:
    if raw is None:
        return ""
    if isinstance(raw, bool):
        return "yes" if raw else "no"
    if field.form in ENTRIES:
        return ENTRIES[field.form].text(raw)
    if field.form == "use" and isinstance(raw, dict):
        loads = ", ".join(str(raw[name]) for name in ("live", "concentrated") if raw.get(name) is not None)
        return f"{raw['name']}: {loads}" if raw.get("name") else loads
    if field.form == "of" and isinstance(raw, dict):
        return f"{raw.get('measured')} of {raw.get('count')}"
    if field.form == "dead" and isinstance(raw, list) and any(isinstance(item, dict) for item in raw):
        return " + ".join(_layer_text(layer) for layer in raw)
    if field.form == "candidates" and isinstance(raw, list):
        return "; ".join(f"{c.get('species')}, {c.get('grade')}" if isinstance(c, dict) else str(c) for c in raw)
    if isinstance(raw, list):
        return "; ".join(str(item) for item in raw)
    return str(raw)


def whole(raw: Any, field: Field) -> bool:
    """Whether the line's text says all that the record holds, so that typing on loses nothing."""
    if field.form in ("text", "note") or raw is None:
        return True
    try:
        return _same(to_raw(_to_text(raw, field), field), raw)
    except ReadingError:
        return False


def _same(a: Any, b: Any) -> bool:
    """Equal but for a number given as a number, and for one reading given as a list."""
    if isinstance(a, list) and isinstance(b, list):
        return len(a) == len(b) and all(_same(x, y) for x, y in zip(a, b, strict=True))
    if isinstance(a, list | dict) or isinstance(b, list | dict) or isinstance(a, bool) or isinstance(b, bool):
        return bool(a == b)
    return str(a) == str(b)


def to_raw(text: str, field: Field) -> Any:
    """Typed text as the record keeps it; None for an empty line, which restores the default.

    raises   ReadingError where the text cannot be taken apart; what its parts say is for the record to judge
    """
    typed = text.strip()
    if not typed:
        return None
    if field.form in ENTRIES:
        return ENTRIES[field.form].raw(typed, field.label)
    if field.form in ("text", "note"):
        return text if field.form == "note" else typed
    parts = [part.strip() for part in typed.split(";") if part.strip()]
    if field.form in ("list", "texts"):
        return parts or None
    if field.form == "reading":
        return parts[0] if len(parts) == 1 else parts or None
    if field.form == "edge":
        return parts if ";" in typed else typed
    if field.form == "whole":
        return _whole(typed, field)
    if field.form == "wholes":
        return [_whole(part, field) for part in parts] or None
    if field.form == "of":
        return _of(typed, field)
    if field.form in ("yes", "partitions"):
        word = typed.lower()
        if word in ("yes", "y", "no", "n"):
            return word.startswith("y")
        if field.form == "yes":
            raise ReadingError(field.label, typed, "yes or no")
        return typed
    if field.form == "candidates":
        return [_candidate(part, field) for part in parts] or None
    if field.form == "dead":
        return _dead(typed)
    return _use(typed) if field.form == "use" else typed


def _whole(typed: str, field: Field) -> int:
    if not re.fullmatch(r"[0-9]{1,9}", typed):
        raise ReadingError(field.label, typed, "a whole number")
    return int(typed)


def _of(typed: str, field: Field) -> dict[str, int]:
    found = re.fullmatch(r"([0-9]{1,6})\s+of\s+([0-9]{1,6})", typed)
    if not found:
        raise ReadingError(field.label, typed, "how many were measured of how many alike, e.g. 5 of 22")
    return {"count": int(found[2]), "measured": int(found[1])}


def _candidate(part: str, field: Field) -> dict[str, str]:
    species, comma, grade = part.partition(",")
    if not comma or not species.strip() or not grade.strip():
        raise ReadingError(field.label, part, "species, grade; species, grade, e.g. hem-fir, no 2; spf, no 2")
    return {"species": species.strip(), "grade": grade.strip()}


def _is_load(text: str) -> bool:
    try:
        parse(text, AREA_LOAD)
    except ReadingError:
        return False
    return True


def _dead(typed: str) -> Any:
    """One load, several readings of it with ;, or layers with +; what is neither is left for the record to refuse."""
    parts = [part.strip() for part in typed.split(";") if part.strip()]
    if len(parts) > 1:
        return parts
    # A part with letters beyond those of a unit names a material.
    if "+" not in typed.replace("+-", "") and not re.search(r"[a-z]{4}", typed, re.I):
        return typed
    return typed if _is_load(typed) else [_layer(part.strip()) for part in re.split(r"\+(?!-)", typed) if part.strip()]


_THICKNESS = re.compile(r"^(.*?\S)\s+(\d[\d ./-]*\s*(?:in|mm|\")?)$")
_LOAD = re.compile(r"^(.*?\S)\s+(\d[\d.]*\s*(?:psf|kPa))$")


def _layer(part: str) -> dict[str, Any]:
    from assess.materials import layer_psf

    if _is_load(part):
        return {"layer": "as read", "load": part}
    loaded = _LOAD.match(part)
    if loaded:
        return {"layer": loaded[1], "load": loaded[2]}
    try:
        layer_psf(part)  # a row whose own name ends in its thickness
    except ReadingError:
        found = _THICKNESS.match(part)
        return {"layer": found[1], "thickness": found[2]} if found else {"layer": part}
    return {"layer": part}


def _layer_text(layer: Any) -> str:
    if not isinstance(layer, dict):
        return str(layer)
    name = "" if layer.get("layer") == "as read" else str(layer.get("layer", ""))
    return " ".join([name, *(str(layer[key]) for key in ("thickness", "load") if layer.get(key) is not None)]).strip()


def _use(typed: str) -> Any:
    """A use by its name; or its loads, the first over the area, the second concentrated, a name and a colon before."""
    name, _, loads = typed.rpartition(":")
    first, _, second = loads.partition(",")
    if not _is_load(first):
        return typed
    use = {"live": first.strip()}
    if second.strip():
        use["concentrated"] = second.strip()
    return use | {"name": name.strip()} if name.strip() else use
