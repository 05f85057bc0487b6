"""The grammar of one reading: typed text split into number and unit by strict rules of our own, never guessed."""

from __future__ import annotations

import math
import re
import unicodedata
from fractions import Fraction

from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.units import canonical, factor

# Only plain digits: what looks like one in another script is refused, except full width, which `plain` writes plain.
_NUMBER = re.compile(
    r"(?P<sign>-)?(?:"
    r"(?P<whole>[0-9]+)[ -](?P<over>[0-9]+)/(?P<under>[0-9]+)"  # 7 1/2, 7-1/2
    r"|(?P<only_over>[0-9]+)/(?P<only_under>[0-9]+)"  # 1/2
    r"|(?P<decimal>[0-9]+\.?[0-9]*|\.[0-9]+)(?P<power>[eE][+-]?[0-9]{1,3})?"  # 7.5, 7, 1.4e6
    r")"
)
_FEET_INCHES = re.compile(
    r"-?(?P<feet>[0-9]+) ?(?:'|ft\.?|feet|foot) ?(?:- ?)?(?P<inches>[0-9][0-9 /-]*|[0-9]*\.[0-9]+)"
    r" ?(?:\"|in\.?|inch|inches)?",
    re.IGNORECASE,
)
_BARE_FEET_INCHES = re.compile(r"(?P<feet>[0-9]+)-(?P<inches>[0-9]+(?:[ -][0-9]+/[0-9]+|\.[0-9]+)?)")
_BARE_FEET_FRACTION = re.compile(r"-?[0-9]+-[0-9]+/[0-9]+")
_RISE = re.compile(
    r"(?P<rise>[0-9]+(?:\.[0-9]+| [0-9]+/[0-9]+)?)(?: ?[:/] ?| in )(?P<run>[0-9]+(?:\.[0-9]+)?)", re.IGNORECASE
)
_VULGAR = re.compile(r"([0-9])?([ -]*)([¼½¾⅐-⅞])(?=([0-9/])?)")
_PLAIN = str.maketrans(
    {"−": "-", "–": "-", "‐": "-", "‑": "-", "′": "'", "’": "'", "‘": "'", "″": '"', "”": '"', "“": '"', "⁄": "/"}
    | {chr(0xFF10 + digit): str(digit) for digit in range(10)}
)
_SURE_DIGITS = 14  # significant digits that a conversion or a mean leaves right
_MARKS = ("±", "+/-", "+-")


def plain(text: str) -> str:
    """The text in plain characters: one hyphen, one foot mark, fractions spelled out; nothing is dropped.

    >>> plain("7½″"), plain("13′ 4½"), plain("−½ in")
    ('7 1/2"', "13' 4 1/2", '-1/2 in')
    """
    text = _VULGAR.sub(_spelled, text.translate(_PLAIN)).replace("''", '"')
    return re.sub(r"[ \u00a0\u2009\u202f]+", " ", text).strip(" \t\r\n")


def _spelled(found: re.Match[str]) -> str:
    fraction = unicodedata.normalize("NFKC", found[3]).replace("⁄", "/")
    joint = found[2] if found[1] is None else found[1] + (found[2] or " ")
    # A figure right behind must not run into the denominator.
    return joint + fraction + (" " if found[4] else "")


def split_tolerance(text: str) -> tuple[str, str | None]:
    """The reading and the text of its tolerance, None where it has none.

    >>> split_tolerance("7 1/2 in +/- 1/8"), split_tolerance("40 psf")
    (('7 1/2 in', '1/8'), ('40 psf', None))
    """
    for mark in _MARKS:
        if mark in text:
            main, rest = text.split(mark, 1)
            return main.strip(), rest.strip()
    return text, None


def measure(text: str, quantity: Quantity, bare: str, is_tolerance: bool = False) -> tuple[float, str]:
    """Value in the quantity's own unit, and the unit it was read in (of feet and inches: inches).

    text           plain text without a tolerance, e.g. `13'4`, `7 1/2 in`, `190 mm`, `6:12`
    bare           unit of a number without one
    is_tolerance   True for a half width: a difference of temperature has no zero point
    returns        (value [quantity.unit], unit)
    raises         ReadingError whose `problem` says why; the caller names field and value

    >>> from assess.quantities import SPAN, SIZE
    >>> measure("13'4", SPAN, "ft"), measure("7 1/2", SIZE, "in")
    ((160.0, 'in'), (7.5, 'in'))
    """
    if "," in text:
        raise refused("has a comma (write 3.5, not 3,5)")
    if quantity.unit == "in":
        found = _FEET_INCHES.fullmatch(text)
        if found is None and bare == "ft" and not is_tolerance:
            if _BARE_FEET_FRACTION.fullmatch(text):
                raise refused("may be feet or inches (write 13 1/2 ft, or 13' 0 1/2\")")
            found = _BARE_FEET_INCHES.fullmatch(text)
        if found is not None:
            inches = 12 * int(found["feet"]) + _inches(found["inches"])
            return (-inches if text.startswith("-") else inches), "in"
        if found is None and _BARE_FEET_INCHES.fullmatch(text):
            raise refused("may be feet and inches, or a range")
    if quantity.unit == "deg":
        found = _RISE.fullmatch(text)
        if found is not None:
            rise, run = _number(found["rise"]), _number(found["run"])
            if run == 0.0:
                raise refused()
            return math.degrees(math.atan2(rise, run)), "deg"
    found = _NUMBER.match(text)
    if found is None:
        raise refused()
    unit_text = text[found.end() :].strip()
    unit = canonical(unit_text) if unit_text else bare
    if unit is None:
        raise refused("is not understood" if re.search(r"[0-9]", unit_text) else "has an unknown unit")
    value = _in_engine_unit(_number(found[0]), unit, quantity, is_tolerance)
    if not math.isfinite(value):
        raise refused("is out of range")
    return value, unit


def _in_engine_unit(number: float, unit: str, quantity: Quantity, is_tolerance: bool) -> float:
    if unit not in ("degF", "degC") and quantity.unit != "degF":
        return rounded(number * factor(unit, quantity.unit)) if unit != quantity.unit else number
    if quantity.unit != "degF" or unit not in ("degF", "degC"):
        raise refused("has the wrong kind of unit")
    if unit == "degF":
        return number
    return rounded(number * 9 / 5 + (0.0 if is_tolerance else 32.0))


def rounded(value: float) -> float:
    """A computed value without the dust of computing, so that 0.6096 m is 24 in where a rule stops at 24 in.

    >>> rounded(24.000000000000004), rounded(7.480314960629921)
    (24.0, 7.4803149606299)
    """
    return float(f"{value:.{_SURE_DIGITS}g}")


def _inches(text: str) -> float:
    """Inches behind feet: under 12, or the feet are wrong too."""
    inches = _number(text.strip())
    if not 0.0 <= inches < 12.0:
        raise refused()
    return inches


def _number(text: str) -> float:
    found = _NUMBER.fullmatch(text)
    if found is None:
        raise refused()
    sign = -1.0 if found["sign"] else 1.0
    if found["decimal"]:
        return sign * float(found["decimal"] + (found["power"] or ""))
    over, under = int(found["over"] or found["only_over"]), int(found["under"] or found["only_under"])
    if over >= under:
        # 11/2 may stand for 1 1/2 with its space lost, and 7 3/2 is a slip of the pen.
        raise refused("has a fraction of one or more (write 1 1/2, not 3/2)")
    return sign * float(int(found["whole"] or 0) + Fraction(over, under))


def refused(problem: str = "is not understood") -> ReadingError:
    """A refusal with its reason; the caller puts field, value and what is accepted."""
    return ReadingError("", "", "", problem)
