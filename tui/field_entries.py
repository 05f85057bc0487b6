"""Entries of several parts typed on one line: defects, point and line loads, an engineer's values."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Any

from assess.errors import ReadingError
from assess.record_condition import DEFECTS
from assess.record_loads import LOAD_TYPES


@dataclass(frozen=True)
class Condition:
    """Defects: a kind, its edge, face or end, then names with their readings; several with ;."""

    example: str = "notch bottom at 2 ft length 4 in depth 1 in"

    def raw(self, typed: str, label: str) -> list[dict[str, Any]]:
        """The list of the record; raises ReadingError where a part cannot be taken apart."""
        return [self._one(part.strip(), label) for part in typed.split(";") if part.strip()]

    def _one(self, part: str, label: str) -> dict[str, Any]:
        kind = next((k for k in sorted(DEFECTS, key=len, reverse=True) if part.lower().startswith(k)), None)
        if kind is None:
            raise ReadingError(label, part, f"one of {', '.join(DEFECTS)}, then its readings, e.g. {self.example}")
        names = list(DEFECTS[kind].model_fields)
        sides = [name for name in names if name in ("edge", "face", "end", "faces")]
        pairs = [name for name in names if name not in ("defect", "new_work", "remarks", *sides)]
        rest = part[len(kind) :].strip()
        made: dict[str, Any] = {"defect": kind}
        if rest.lower().endswith("new work"):
            made["new_work"], rest = True, rest[: -len("new work")].strip()
        pieces = re.split(rf"\b({'|'.join(pairs)})\b", rest, flags=re.I)
        lead = pieces[0].strip()
        if lead and not sides:
            raise ReadingError(label, part, f"{kind}, then {' and '.join(pairs)} with their readings")
        if lead:
            made[sides[0]] = lead.split() if sides[0] == "faces" else lead
        for name, value in zip(pieces[1::2], pieces[2::2], strict=True):
            text = value.strip()
            made[name.lower()] = int(text) if name.lower() == "support" and text.isdecimal() else text
        return made

    def text(self, raw: Any) -> str:
        """The list as one types it."""
        return "; ".join(_defect_text(item) for item in raw) if isinstance(raw, list) else str(raw)


def _defect_text(item: Any) -> str:
    if not isinstance(item, dict):
        return str(item)
    parts = [str(item.get("defect"))]
    for side in ("edge", "face", "end", "faces"):
        if side in item:
            parts.append(" ".join(item[side]) if isinstance(item[side], list) else str(item[side]))
    hidden = ("defect", "new_work", "remarks", "edge", "face", "end", "faces")
    parts += [f"{name} {value}" for name, value in item.items() if name not in hidden]
    return " ".join([*parts, *(["new work"] if item.get("new_work") else [])])


_AMOUNT = r"(?P<load>[-−]?[\d.,]+\s*[a-z]+(?:/[a-z]+)?)"
_TYPE = f"(?P<type>{'|'.join(sorted(LOAD_TYPES, key=len, reverse=True))})"


@dataclass(frozen=True)
class Loads:
    """Loads: a name, an amount, its place, its type; several with ;."""

    pattern: str
    places: tuple[str, ...]
    example: str

    def raw(self, typed: str, label: str) -> list[dict[str, Any]]:
        """The list of the record; raises ReadingError where a part cannot be taken apart."""
        return [self._one(part.strip(), label) for part in typed.split(";") if part.strip()]

    def _one(self, part: str, label: str) -> dict[str, Any]:
        found = re.fullmatch(rf"(?:(?P<name>\D*?)\s+)?{_AMOUNT}\s+{self.pattern}\s+{_TYPE}", part, re.I)
        if not found:
            raise ReadingError(label, part, f"a name, a load, its place and type, e.g. {self.example}")
        made = {"name": found["name"]} if found["name"] else {}
        return made | {name: found[name].strip() for name in ("load", *self.places)} | {"type": found["type"].lower()}

    def text(self, raw: Any) -> str:
        """The list as one types it."""
        return "; ".join(self._text(item) for item in raw) if isinstance(raw, list) else str(raw)

    def _text(self, item: Any) -> str:
        if not isinstance(item, dict):
            return str(item)
        name = f"{item['name']} " if item.get("name") else ""
        places = " ".join(f"{place} {item.get(place)}" for place in self.places)
        return f"{name}{item.get('load')} {places} {item.get('type')}"


@dataclass(frozen=True)
class Values:
    """An engineer's design values: symbols with their stresses, commas between."""

    symbols: tuple[str, ...] = ("Fb", "Fv", "Fc_perp", "E", "Emin", "G")

    def raw(self, typed: str, label: str) -> dict[str, Any]:
        """The object of the record; raises ReadingError where a part cannot be taken apart."""
        made: dict[str, Any] = {}
        known = {symbol.lower(): symbol for symbol in self.symbols}
        for part in re.split(r"[,;]", typed):
            name, _, value = part.strip().partition(" ")
            symbol = known.get(name.lower())
            if symbol is None or not value.strip() or symbol in made:
                raise ReadingError(label, part.strip(), f"each once, with its value: {', '.join(self.symbols)}")
            made[symbol] = value.strip()
            if symbol == "G":
                if not re.fullmatch(r"\d?\.?\d{1,4}", value.strip()):
                    raise ReadingError(label, part.strip(), "G as a plain number, e.g. G 0.45")
                made[symbol] = float(value)
        return made

    def text(self, raw: Any) -> str:
        """The object as one types it."""
        return ", ".join(f"{name} {value}" for name, value in raw.items()) if isinstance(raw, dict) else str(raw)


CONDITION = Condition()
POINTS = Loads(r"at\s+(?P<at>.+?)", ("at",), "stove 300 lb at 4 ft live")
LINES = Loads(r"from\s+(?P<from>.+?)\s+to\s+(?P<to>.+?)", ("from", "to"), "wall 120 plf from 0 ft to 4 ft dead")
VALUES = Values()
