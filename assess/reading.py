"""Readings: text as typed, understood by a strict grammar of our own, kept verbatim, shown back as understood."""

from __future__ import annotations

import math
import re
import unicodedata
from dataclasses import dataclass
from fractions import Fraction

from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.units import canonical, factor

LONGEST = 200  # characters; no reading people take is longer
MOST_READINGS = 50

Typed = str | int | float | tuple[str | int | float, ...]


@dataclass(frozen=True, slots=True)
class Reading:
    """A measured quantity as it was read.

    typed       as read, kept verbatim for the file
    value       in the quantity's engine unit; the mean of several readings
    tolerance   typed half width in the same unit; None where the instrument's default applies
    spread      half range of several readings, 0 for one
    metric      whether it was read in metric units
    """

    typed: Typed
    value: float
    tolerance: float | None
    spread: float
    quantity: Quantity
    metric: bool

    def shown(self) -> str:
        """As understood, in the inspector's units; parses back to the same value.

        >>> from assess.quantities import SPAN
        >>> parse("13'4", SPAN).shown()
        '13 ft 4 in'
        """
        text = _shown(self.value, self.quantity, self.metric)
        if self.tolerance is not None:
            text += " ± " + _shown(self.tolerance, self.quantity, self.metric, small=True)
        return text


def parse(typed: object, quantity: Quantity, units: str = "US", field: str = "") -> Reading:
    """Understand one reading, or several of one thing.

    typed      text such as `7 1/2 in ± 1/8`, `13'4"`, `190 mm`; a number; or a list of such
    quantity   what is measured
    units      'US' or 'SI': what a bare number means
    field      path named in an error
    returns    Reading; of a list the mean, with half its range as spread
    raises     ReadingError naming field, value and what is accepted
    source     interface, Readings. A bare `13-4` is feet and inches for quantities read in feet (spans, places);
               for quantities read in inches it is refused, since it might be a range or a slip of the pen.

    >>> from assess.quantities import SIZE, SPAN
    >>> parse("7-1/2\\" ± 1/8", SIZE).value, parse("13-4", SPAN).value, parse(["7 3/8", "7 5/8"], SIZE).spread
    (7.5, 160.0, 0.125)
    """
    if isinstance(typed, list | tuple):
        if not 1 <= len(typed) <= MOST_READINGS:
            raise ReadingError(field, list(typed), f"1 to {MOST_READINGS} readings of one thing")
        parts = [_one(item, quantity, units, field) for item in typed]
        values = [part.value for part in parts]
        tolerances = [part.tolerance for part in parts if part.tolerance is not None]
        spread = (max(values) - min(values)) / 2
        if len(parts) == 1:
            spread = 0.0
        return Reading(
            tuple(typed),
            math.fsum(values) / len(values),
            max(tolerances, default=None),
            spread,
            quantity,
            parts[0].metric,
        )
    return _one(typed, quantity, units, field)


_NUMBER = re.compile(
    r"(?P<sign>-)?(?:"
    r"(?P<whole>\d+)[ -]+(?P<over>\d+)/(?P<under>\d+)"  # 7 1/2, 7-1/2
    r"|(?P<only_over>\d+)/(?P<only_under>\d+)"  # 1/2
    r"|(?P<decimal>\d+\.\d*|\.\d+|\d+)(?P<power>[eE][+-]?\d{1,3})?"  # 7.5, 7, 1.4e6
    r")"
)
_FEET_INCHES = re.compile(r"(?P<feet>\d+)\s*(?:'|ft\.?)\s*-?\s*(?P<inches>[\d. /-]+?)\s*(?:\"|in\.?|inches|inch)?")
_BARE_FEET_INCHES = re.compile(r"(?P<feet>\d+)-(?P<inches>\d+(?:[ -]\d+/\d+|\.\d+)?)")
_RISE = re.compile(r"(?P<rise>\d+(?:\.\d+)?)\s*[:/]\s*(?P<run>\d+(?:\.\d+)?)")
_METRIC = {"m", "mm", "cm", "kPa", "Pa", "kN", "N", "kgf", "MPa", "GPa", "kN/m", "N/m", "m2", "degC"}


def _one(typed: object, quantity: Quantity, units: str, field: str) -> Reading:
    if isinstance(typed, bool) or not isinstance(typed, str | int | float):
        raise ReadingError(field, typed, quantity.accepted)
    if isinstance(typed, int | float):
        if not abs(typed) < 1e15:  # also refuses NaN
            raise ReadingError(field, typed, quantity.accepted, "is out of range")
        text = repr(typed)
    else:
        text = typed
    if len(text) > LONGEST:
        raise ReadingError(field, text, f"at most {LONGEST} characters", "is too long")
    main, mark, rest = _split_tolerance(_plain(text))
    if not main:
        raise ReadingError(field, typed, quantity.accepted, "is empty" if not text.strip() else "is not understood")
    try:
        value, unit = _measure(main, quantity, units)
        tolerance = None
        if mark:
            tolerance, _ = _measure(rest, quantity, units, default=unit)
            if quantity.unit == "degF" and tolerance is not None:
                tolerance = _degrees(rest, unit)
    except ReadingError as error:
        raise ReadingError(field, typed, quantity.accepted, error.problem) from None
    if tolerance is not None and not 0.0 <= tolerance <= quantity.high:
        raise ReadingError(field, typed, quantity.accepted, "has a tolerance that makes no sense")
    low = value <= quantity.low if quantity.low_open else value < quantity.low
    if low or not value <= quantity.high:
        raise ReadingError(field, typed, quantity.accepted, "is out of range")
    return Reading(typed, value, tolerance, 0.0, quantity, unit in _METRIC)


_VULGAR = re.compile(r"(\d)?([¼½¾⅐-⅞])")


def _plain(text: str) -> str:
    """The text in plain characters: one hyphen, one foot mark, fractions spelled out; nothing else is changed."""
    text = _VULGAR.sub(lambda m: f"{m[1] or ''} {unicodedata.normalize('NFKC', m[2])} ".replace("⁄", "/"), text)
    for odd, plain in (("−", "-"), ("–", "-"), ("′", "'"), ("’", "'"), ("″", '"'), ("”", '"'), ("“", '"'), ("''", '"')):
        text = text.replace(odd, plain)
    return re.sub(r"[ \u00a0\u2009]+", " ", text).strip()


def _split_tolerance(text: str) -> tuple[str, bool, str]:
    for mark in ("±", "+/-", "+-"):
        if mark in text:
            main, rest = text.split(mark, 1)
            return main.strip(), True, rest.strip()
    return text, False, ""


def _measure(text: str, quantity: Quantity, units: str, default: str | None = None) -> tuple[float, str]:
    """Value in the engine's unit, and the unit it was read in (of feet and inches: inches)."""
    bare = default or (quantity.bare_us if units == "US" else quantity.bare_si)
    if quantity.unit == "in":
        found = _FEET_INCHES.fullmatch(text)
        if found:
            return int(found["feet"]) * 12 + _inches(found["inches"]), "in"
        if default is None and bare == "ft":
            found = _BARE_FEET_INCHES.fullmatch(text)
            if found:
                return int(found["feet"]) * 12 + _inches(found["inches"]), "in"
    if quantity.unit == "deg":
        found = _RISE.fullmatch(text)
        if found:
            if float(found["run"]) == 0:
                raise _not_understood()
            return math.degrees(math.atan2(float(found["rise"]), float(found["run"]))), "deg"
    found = _NUMBER.match(text)
    if not found:
        raise _not_understood()
    number = _number(found)
    unit_text = text[found.end() :].strip()
    unit = canonical(unit_text) if unit_text else bare
    if unit is None:
        raise _not_understood()
    if quantity.unit == "degF":
        if unit == "degC":
            return number * 9 / 5 + 32, unit
        if unit != "degF":
            raise ReadingError("", unit_text, quantity.accepted, "is the wrong kind of unit")
        return number, unit
    if unit in ("degF", "degC"):
        raise ReadingError("", unit_text, quantity.accepted, "is the wrong kind of unit")
    value = number * factor(unit, quantity.unit)
    if not math.isfinite(value):
        raise ReadingError("", text, quantity.accepted, "is out of range")
    return value, unit


def _degrees(text: str, unit: str) -> float:
    """A tolerance on a temperature: a difference, so no zero point enters."""
    found = _NUMBER.match(text)
    if not found:
        raise _not_understood()
    scale = canonical(text[found.end() :]) or unit
    return _number(found) * (9 / 5 if scale == "degC" else 1.0)


def _inches(text: str) -> float:
    found = _NUMBER.fullmatch(text.strip())
    if not found or found["sign"]:
        raise _not_understood()
    inches = _number(found)
    if inches >= 12:
        raise _not_understood()
    return inches


def _number(found: re.Match[str]) -> float:
    sign = -1.0 if found["sign"] else 1.0
    if found["under"] or found["only_under"]:
        under = int(found["under"] or found["only_under"])
        if under == 0:
            raise _not_understood()
        over = int(found["over"] or found["only_over"])
        if found["whole"] and over >= under:
            raise _not_understood()  # 7 3/2 is a slip of the pen
        return sign * float(int(found["whole"] or 0) + Fraction(over, under))
    return sign * float(found["decimal"] + (found["power"] or ""))


def _not_understood() -> ReadingError:
    return ReadingError("", "", "")


_METRIC_SHOWN = {"in": "mm", "psf": "kPa", "plf": "kN/m", "lb": "kN", "psi": "MPa", "ft2": "m2"}


def _shown(value: float, quantity: Quantity, metric: bool, small: bool = False) -> str:
    if quantity.unit == "degF":
        if metric:
            return f"{_digits(value * 5 / 9 if small else (value - 32) * 5 / 9)} °C"
        return f"{_digits(value)} °F"
    if metric and quantity.unit in _METRIC_SHOWN:
        unit = "m" if quantity.unit == "in" and quantity.bare_si == "m" and not small else _METRIC_SHOWN[quantity.unit]
        return f"{_digits(value / factor(unit, quantity.unit))} {unit}"
    if quantity.unit != "in":
        return f"{_digits(value)} {quantity.unit}"
    if quantity.bare_us == "ft" and value >= 12 and not small:
        feet, inches = divmod(value, 12.0)
        if _sixteenths(inches) is not None:
            return f"{feet:.0f} ft" + (f" {_inches_shown(inches)} in" if inches else "")
    return f"{_inches_shown(value)} in"


def _sixteenths(inches: float) -> Fraction | None:
    """The inches as sixteenths or coarser, where they are that to 1e-9."""
    near = Fraction(round(inches * 16), 16)
    return near if abs(float(near) - inches) <= 1e-9 else None


def _inches_shown(inches: float) -> str:
    near = _sixteenths(inches)
    if near is None:
        return _digits(inches)
    sign, near = ("-", -near) if near < 0 else ("", near)
    whole, part = divmod(near, 1)
    if not part:
        return f"{sign}{whole}"
    return f"{sign}{whole} {part}" if whole else f"{sign}{part}"


def _digits(value: float) -> str:
    """Enough digits to parse back to the same value, few where few do."""
    short = f"{value:.10g}"
    if "e" in short:
        short = f"{value:.12f}".rstrip("0").rstrip(".")
    return short or "0"
