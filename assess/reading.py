"""Readings: text as typed, understood by a strict grammar of our own, kept verbatim, shown back as understood."""

from __future__ import annotations

import math
from dataclasses import dataclass

from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.reading_grammar import measure, plain, rounded, split_tolerance
from assess.reading_shown import as_text
from assess.units import METRIC

LONGEST = 200  # characters; no reading people take is longer
MOST_READINGS = 50
_LARGEST = 1e15  # no number of the record is near it; beyond, digits are lost
_SMALLEST = 1e-6  # engine units; nothing measured is smaller, and noughts with an exponent would only break the statics
_CONVERTED = 1e-9  # of a limit: 25.4 mm must be read where 1 in is, though its conversion falls a hair short
_MANY_DIGITS = 10**40

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

    def shown(self, units: str | None = None) -> str:
        """As understood, in the units it was read in.

        units     'US' or 'SI': units the reader thinks in; where they are others, the value in them is added
        returns   text; without `units` it reads back to the same value and tolerance

        >>> from assess.quantities import SIZE, SPAN
        >>> parse("13'4", SPAN).shown(), parse("190 mm ± 2", SIZE).shown("US")
        ('13 ft 4 in', '190 mm ± 2 mm (7.48 in)')
        """
        text = as_text(self.value, self.quantity, self.metric)
        if self.tolerance is not None:
            text += " ± " + as_text(self.tolerance, self.quantity, self.metric, is_tolerance=True)
        if units is not None and self.metric != (units == "SI"):
            other = as_text(self.value, self.quantity, not self.metric, digits=4)
            text += f" ({other})" if other.split()[-1] != text.split()[-1] else ""
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
               for quantities read in inches it is refused, since it might be a range or a slip of the pen. A bare
               `13-1/2` in feet is refused: it may be 13 1/2 ft or 13 ft 0 1/2 in. A tolerance without a unit has the
               last one of its reading: inches behind feet and inches.

    >>> from assess.quantities import SIZE, SPAN
    >>> parse("7-1/2\\" ± 1/8", SIZE).value, parse("13-4", SPAN).value, parse(["7 3/8", "7 5/8"], SIZE).spread
    (7.5, 160.0, 0.125)
    """
    if not isinstance(typed, list | tuple):
        return _one(typed, quantity, units, field)
    if not 1 <= len(typed) <= MOST_READINGS:
        raise ReadingError(
            field, f"{len(typed)} readings", f"1 to {MOST_READINGS} readings of one thing", "cannot be used"
        )
    parts = [_one(item, quantity, units, field) for item in typed]
    values = [part.value for part in parts]
    return Reading(
        typed=tuple(typed),
        value=rounded(math.fsum(values) / len(values)),
        tolerance=max((part.tolerance for part in parts if part.tolerance is not None), default=None),
        spread=(max(values) - min(values)) / 2,
        quantity=quantity,
        metric=parts[0].metric,
    )


def _one(typed: object, quantity: Quantity, units: str, field: str) -> Reading:
    text = _text(typed, quantity, field)
    main, rest = split_tolerance(plain(text))
    if not main:
        problem = "is not understood" if text.strip() else "is empty"
        raise ReadingError(field, typed, quantity.accepted, problem)
    tolerance = None
    try:
        value, unit = measure(main, quantity, quantity.bare_us if units == "US" else quantity.bare_si)
        if rest is not None:
            tolerance, _ = measure(rest, quantity, unit, is_tolerance=True)
    except ReadingError as error:
        raise ReadingError(field, typed, quantity.accepted, error.problem) from None
    if _outside(value, quantity):
        raise ReadingError(field, typed, quantity.accepted, "is out of range")
    positive = quantity.low > 0.0 or quantity.low_open
    if tolerance is not None and (tolerance < 0.0 or tolerance > quantity.high or (positive and tolerance >= value)):
        raise ReadingError(field, typed, quantity.accepted, "has a tolerance that makes no sense")
    return Reading(typed, value + 0.0, tolerance, 0.0, quantity, unit in METRIC)  # type: ignore[arg-type]


def _text(typed: object, quantity: Quantity, field: str) -> str:
    if isinstance(typed, bool) or not isinstance(typed, str | int | float):
        raise ReadingError(field, typed, quantity.accepted)
    if isinstance(typed, str):
        if len(typed) > LONGEST:
            raise ReadingError(field, typed[:LONGEST], f"at most {LONGEST} characters", "is too long")
        return typed
    if not abs(typed) < _LARGEST:  # also refuses NaN
        said = typed if abs(typed) < _MANY_DIGITS or isinstance(typed, float) else "a number of very many digits"
        raise ReadingError(field, said, quantity.accepted, "is out of range")
    return repr(typed)


def _outside(value: float, quantity: Quantity) -> bool:
    low = quantity.low - _CONVERTED * abs(quantity.low)
    high = quantity.high + _CONVERTED * abs(quantity.high)
    below = value <= low if quantity.low_open else value < low
    # A degree has no smallness: 0 °F is -17.7778 °C.
    tiny = quantity.unit != "degF" and 0.0 < abs(value) < _SMALLEST
    return below or not value <= high or tiny
