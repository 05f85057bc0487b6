"""Readings typed in the many ways people type them: with a unit or bare, metric, with ±, several of one thing."""

from __future__ import annotations

from collections.abc import Callable
from fractions import Fraction
from typing import Any

from hypothesis import strategies as st

from assess.quantities import Quantity

Draw = Callable[[st.SearchStrategy[Any]], Any]


def mixed(value: float) -> str:
    """A length as a tape gives it, to a sixteenth: 7 1/2."""
    whole, part = divmod(Fraction(round(value * 16), 16), 1)
    return str(whole) if not part else f"{whole} {part}" if whole else str(part)


def _length_texts(value_in: float, quantity: Quantity, units: str) -> list[Any]:
    sign, size = ("-", -value_in) if value_in < 0 else ("", value_in)
    feet, inches = divmod(round(size * 16) / 16, 12)
    texts: list[Any] = [f"{sign}{mixed(size)} in", f'{sign}{mixed(size)}"', f"{value_in * 25.4:.1f} mm"]
    texts.append(f"{value_in * 0.0254:.4f} m")
    if quantity.bare_us == "ft":
        texts += [f"{sign}{feet:.0f}'{mixed(inches)}\"", f"{sign}{feet:.0f} ft {mixed(inches)} in"]
    if units == "US":
        texts.append(round(value_in / (12 if quantity.bare_us == "ft" else 1), 3))
    else:
        texts.append(round(value_in * (0.0254 if quantity.bare_si == "m" else 25.4), 4))
    return texts


_OTHER = {
    "psf": ("kPa", 0.04788026),
    "plf": ("kN/m", 0.01459390),
    "lb": ("kN", 0.004448222),
    "psi": ("MPa", 0.006894757),
}


def _texts(value: float, quantity: Quantity, units: str) -> list[Any]:
    if quantity.unit == "in":
        return _length_texts(value, quantity, units)
    if quantity.unit == "degF":
        return [f"{value:.0f} F", f"{value:.0f} °F", f"{(value - 32) / 1.8:.1f} C"]
    if quantity.unit == "deg":
        return [f"{value:.1f} deg", f"{value:.1f}°", f"{value:.1f}"]
    if quantity.unit == "%":
        return [f"{value:.0f} %", f"{value:.0f}%", round(value, 1)]
    if quantity.unit == "ft2":
        return [f"{value:.0f} ft2", f"{value * 0.09290304:.2f} m2"]
    metric, scale = _OTHER[quantity.unit]
    bare = value if units == "US" else value * scale
    return [f"{value:.1f} {quantity.unit}", f"{value * scale:.4f} {metric}", round(bare, 3)]


def typed(draw: Draw, value: float, quantity: Quantity, units: str, exact: bool = False) -> Any:
    """A reading near the value [quantity.unit], typed in one of many ways: bare, metric, with ±, several of it.

    exact   True where neither a tolerance nor several readings belong
    """
    text = draw(st.sampled_from(_texts(value, quantity, units)))
    how = 0 if exact else draw(st.integers(0, 5))
    positive = quantity.low > 0 or quantity.low_open
    if how == 1 and isinstance(text, str) and (not positive or value > 1) and quantity.unit in ("in", "%"):
        if text.endswith("m"):
            return text + draw(st.sampled_from((" ± 2 mm", " +/- 0.1 in")))
        return text + draw(st.sampled_from((" ± 1/8", " +/- 1/8", " +- 0.1")))
    if how == 2:
        return [text, draw(st.sampled_from(_texts(value, quantity, units)))]
    return text
