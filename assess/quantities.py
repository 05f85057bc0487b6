"""What can be read: each quantity's unit, what a bare number means, and which values make sense. One table of facts."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Quantity:
    """A kind of reading.

    unit                 the engine's unit, in which values and limits stand
    bare_us, bare_si     unit of a bare number in a session of US or SI units
    low, high            limits in the engine's unit; low itself is refused where low_open
    default_tolerance    half width of the instrument's tolerance in the engine's unit (practice, editable)
    accepted             what is accepted, in words, for the error line
    """

    name: str
    unit: str
    bare_us: str
    bare_si: str
    low: float
    high: float
    low_open: bool
    default_tolerance: float
    accepted: str


SIZE = Quantity("size", "in", "in", "mm", 0.0, 36.0, True, 1 / 16, "a size over 0 to 36 in, e.g. 7 1/2 in or 190 mm")
LENGTH = Quantity("length", "in", "in", "mm", 0.0, 720.0, True, 1 / 8, "a length over 0 to 60 ft, e.g. 4 in")
HEIGHT = Quantity("height", "in", "in", "mm", 0.0, 36.0, False, 1 / 16, "a height of 0 to 36 in, e.g. 3 in")
MARGIN = Quantity("margin", "in", "in", "mm", 0.0, 36.0, False, 1 / 8, "a margin of 0 to 36 in, e.g. 1/4 in")
SAG = Quantity("sag", "in", "in", "mm", -36.0, 36.0, False, 1 / 16, "a sag to 36 in, e.g. 5/8 in")
SPAN = Quantity("span", "in", "ft", "m", 0.0, 720.0, True, 0.5, "a span over 0 to 60 ft, e.g. 13'4\" or 4.06 m")
POSITION = Quantity(
    "position", "in", "ft", "m", -720.0, 3600.0, False, 0.5, "a place along the member, e.g. 6 ft or 1.8 m"
)
SPACING = Quantity("spacing", "in", "in", "mm", 0.0, 120.0, True, 0.5, "a spacing over 0 to 120 in, e.g. 16 in")
TRIBUTARY = Quantity(
    "tributary width", "in", "ft", "m", 0.0, 720.0, True, 0.5, "a width over 0 to 60 ft, e.g. 8 ft or 2.4 m"
)
BEARING = Quantity("bearing", "in", "in", "mm", 0.0, 36.0, True, 1 / 8, "a bearing over 0 to 36 in, e.g. 1 1/2 in")
AREA_LOAD = Quantity("area load", "psf", "psf", "kPa", 0.0, 2000.0, False, 0.0, "a load of 0 to 2,000 psf, e.g. 40 psf")
LINE_LOAD = Quantity("line load", "plf", "plf", "kN/m", 0.0, 1e5, False, 0.0, "a line load of 0 or more, e.g. 120 plf")
FORCE = Quantity("force", "lb", "lb", "kN", 0.0, 1e6, False, 0.0, "a force of 0 or more, e.g. 420 lb or 1.9 kN")
STRESS = Quantity("stress", "psi", "psi", "MPa", 0.0, 1e5, True, 0.0, "a stress over 0, e.g. 1200 psi or 8.3 MPa")
MODULUS = Quantity("modulus", "psi", "psi", "MPa", 0.0, 5e7, True, 0.0, "a modulus over 0, e.g. 1400000 psi")
MOISTURE = Quantity("moisture", "%", "%", "%", 0.0, 200.0, False, 2.0, "moisture of 0 to 200 %, e.g. 14 %")
TEMPERATURE = Quantity(
    "temperature", "degF", "degF", "degC", -60.0, 500.0, False, 5.0, "a temperature of -60 to 500 °F, e.g. 110 °F"
)
SLOPE = Quantity("slope", "deg", "deg", "deg", 0.0, 75.0, False, 1.0, "a slope of 0 to 75 degrees, e.g. 6:12 or 26 deg")
AREA = Quantity("area", "ft2", "ft2", "m2", 0.0, 1e6, True, 0.0, "an area over 0, e.g. 400 ft2")
DEFLECTION = Quantity("deflection", "in", "in", "mm", 0.0, 36.0, True, 0.005, "a deflection over 0, e.g. 0.11 in")

ALL = (
    SIZE, LENGTH, HEIGHT, MARGIN, SAG, SPAN, POSITION, SPACING, TRIBUTARY, BEARING, AREA_LOAD, LINE_LOAD, FORCE,
    STRESS, MODULUS, MOISTURE, TEMPERATURE, SLOPE, AREA, DEFLECTION,
)  # fmt: skip
