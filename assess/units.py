"""The one room where pint lives: factors between the units people write and the engine's own, cached."""

from __future__ import annotations

import functools
from typing import TYPE_CHECKING

from assess.errors import ReadingError

if TYPE_CHECKING:
    import pint

# A short definition list of our own: pint's full registry costs some 200 ms to build.
_DEFINITIONS = """\
inch = [length] = in = inches
foot = 12 * inch = ft = feet
yard = 36 * inch = yd
meter = inch / 0.0254 = m = metre = meters = metres
millimeter = 0.001 * meter = mm = millimetre
centimeter = 0.01 * meter = cm = centimetre
pound_force = [force] = lbf = lb = lbs
kip = 1000 * pound_force = kips
newton = pound_force / 4.4482216152605 = N
kilonewton = 1000 * newton = kN
kilogram_force = 9.80665 * newton = kgf
psi = pound_force / inch ** 2
ksi = 1000 * psi
psf = pound_force / foot ** 2
plf = pound_force / foot
pascal = newton / meter ** 2 = Pa
kilopascal = 1000 * pascal = kPa
megapascal = 1000000 * pascal = MPa
gigapascal = 1000000000 * pascal = GPa
ft2 = foot ** 2 = sqft
m2 = meter ** 2 = sqm
percent = [ratio] = pct
degree = [angle] = deg = degrees
"""

# Spellings people use that are no names of ours; looked up as typed, then in lower case, squares written as 2.
_SPELLINGS = {
    '"': "in", "'": "ft", "in.": "in", "ft.": "ft", "lb.": "lb", "lbs.": "lb", "pound": "lb", "pounds": "lb",
    "lb/ft2": "psf", "lbs/ft2": "psf", "lbf/ft2": "psf", "lb/sqft": "psf", "lb/sq ft": "psf", "lbs/sq ft": "psf",
    "lb/ft": "plf", "lbs/ft": "plf", "lbf/ft": "plf", "lb/in2": "psi", "lbs/in2": "psi", "lbf/in2": "psi",
    "kn": "kN", "n": "N", "kn/m": "kN/m", "n/m": "N/m", "kn/m2": "kPa", "n/m2": "Pa", "n/mm2": "MPa", "kpa": "kPa",
    "pa": "Pa", "mpa": "MPa", "gpa": "GPa", "kg": "kgf", "sq ft": "ft2", "sq. ft.": "ft2", "sf": "ft2", "sq m": "m2",
    "°": "deg",
}  # fmt: skip
_TEMPERATURES = {"f": "degF", "°f": "degF", "degf": "degF", "c": "degC", "°c": "degC", "degc": "degC"}
# Units by which a reading counts as read in metric.
METRIC = frozenset({"m", "mm", "cm", "kPa", "Pa", "kN", "N", "kgf", "MPa", "GPa", "kN/m", "N/m", "m2", "degC"})


@functools.cache
def _registry() -> pint.UnitRegistry[float]:
    import pint

    registry: pint.UnitRegistry[float] = pint.UnitRegistry(None, on_redefinition="ignore")
    registry.load_definitions(_DEFINITIONS.splitlines())
    return registry


def canonical(unit: str) -> str | None:
    """The name we know a typed unit by, or None where we do not.

    >>> canonical('"'), canonical("KPA"), canonical("lbs"), canonical("furlong")
    ('in', 'kPa', 'lb', None)
    """
    text = unit.strip().replace("²", "2").replace("^2", "2")
    folded = text.lower()
    if folded in _TEMPERATURES:
        return _TEMPERATURES[folded]
    if text in _SPELLINGS or folded in _SPELLINGS:
        return _SPELLINGS.get(text) or _SPELLINGS[folded]
    for name in (text, folded):
        if name in _KNOWN:
            return _KNOWN[name]
    return None


_KNOWN = {
    "in": "in", "inch": "in", "inches": "in", "ft": "ft", "foot": "ft", "feet": "ft", "yd": "yd", "yard": "yd",
    "m": "m", "metre": "m", "meter": "m", "metres": "m", "meters": "m", "mm": "mm", "millimetre": "mm",
    "millimeter": "mm", "cm": "cm", "lb": "lb", "lbs": "lb", "lbf": "lb", "kip": "kip", "kips": "kip", "N": "N",
    "kN": "kN", "kgf": "kgf", "psi": "psi", "ksi": "ksi", "psf": "psf", "plf": "plf", "Pa": "Pa", "kPa": "kPa",
    "MPa": "MPa", "GPa": "GPa", "kN/m": "kN/m", "N/m": "N/m", "ft2": "ft2", "sqft": "ft2", "m2": "m2", "sqm": "m2",
    "%": "%", "percent": "%", "pct": "%", "deg": "deg", "degrees": "deg", "degree": "deg",
}  # fmt: skip


@functools.cache
def factor(unit: str, engine_unit: str) -> float:
    """How many of the engine's unit one of the unit is.

    unit, engine_unit   names as `canonical` gives them
    returns             factor [-]
    raises              ReadingError where the two measure different things
    source              exact definitions: 25.4 mm an inch, 4.4482216152605 N a pound

    >>> factor("ft", "in"), round(factor("kPa", "psf"), 4), round(factor("kN", "lb"), 3)
    (12.0, 20.8854, 224.809)
    """
    if unit == engine_unit:
        return 1.0
    import pint

    registry = _registry()
    try:
        given = registry.parse_units(_pint_name(unit))
        wanted = registry.parse_units(_pint_name(engine_unit))
        return float(registry.convert(1.0, given, wanted))
    except (pint.DimensionalityError, pint.UndefinedUnitError):
        raise ReadingError(
            "", unit, f"a unit that measures what {engine_unit} does", "has the wrong kind of unit"
        ) from None


def _pint_name(unit: str) -> str:
    return {"%": "percent", "kN/m": "kilonewton / meter", "N/m": "newton / meter"}.get(unit, unit)
