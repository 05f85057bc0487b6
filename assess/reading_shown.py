"""A value shown as it was understood, in text that the grammar reads back to the same value."""

from __future__ import annotations

from fractions import Fraction

from assess.quantities import Quantity
from assess.units import factor

_METRIC = {"in": "mm", "psf": "kPa", "plf": "kN/m", "lb": "kN", "psi": "MPa", "ft2": "m2"}
_DIGITS = 10  # significant; a reading has four at most, a mean of several or a converted one has more
_NEAR = 1e-9


def as_text(value: float, quantity: Quantity, metric: bool, is_tolerance: bool = False, digits: int = _DIGITS) -> str:
    """The value [quantity.unit] in words, in US or metric units; a tolerance always in inches or millimetres.

    >>> from assess.quantities import SPAN, SIZE, AREA_LOAD
    >>> as_text(160.0, SPAN, False), as_text(7.5, SIZE, False), as_text(190 / 25.4, SIZE, True)
    ('13 ft 4 in', '7 1/2 in', '190 mm')
    """
    if quantity.unit == "degF":
        scale = value * 5 / 9 if is_tolerance else (value - 32) * 5 / 9
        return f"{_decimal(scale, digits)} °C" if metric else f"{_decimal(value, digits)} °F"
    if metric and quantity.unit in _METRIC:
        unit = "m" if quantity.bare_si == "m" and not is_tolerance else _METRIC[quantity.unit]
        return f"{_decimal(value / factor(unit, quantity.unit), digits)} {unit}"
    if quantity.unit != "in":
        return f"{_decimal(value, digits)} {quantity.unit}"
    sixteenths = round(value * 16)
    if abs(value * 16 - sixteenths) > 16 * _NEAR:
        return f"{_decimal(value, digits)} in"
    if quantity.bare_us == "ft" and abs(value) >= 12 and not is_tolerance:
        feet, over = divmod(abs(sixteenths), 12 * 16)
        sign = "-" if value < 0 else ""
        return f"{sign}{feet} ft" + (f" {_mixed(over)} in" if over else "")
    return f"{'-' if sixteenths < 0 else ''}{_mixed(abs(sixteenths))} in"


def _mixed(sixteenths: int) -> str:
    """Sixteenths as a whole number and a fraction.

    >>> _mixed(120), _mixed(2), _mixed(32)
    ('7 1/2', '1/8', '2')
    """
    whole, part = divmod(Fraction(sixteenths, 16), 1)
    if not part:
        return str(whole)
    return f"{whole} {part}" if whole else str(part)


def _decimal(value: float, digits: int) -> str:
    """Significant digits without an exponent and without trailing noughts."""
    short = f"{value:.{digits}g}"
    if "e" in short:
        short = f"{float(short):.12f}".rstrip("0").rstrip(".")
    return "0" if short in ("-0", "") else short
