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


# No tape reads less than 1/64 in; a smaller size, span or stress is a slip that would only break the statics.
_SIXTY_FOURTH = 1 / 64

SIZE = Quantity(
    "size", "in", "in", "mm", _SIXTY_FOURTH, 36.0, False, 1 / 16, "a size of 1/64 to 36 in, e.g. 7 1/2 in or 190 mm"
)
LENGTH = Quantity(
    "length", "in", "in", "mm", _SIXTY_FOURTH, 720.0, False, 1 / 8, "a length of 1/64 in to 60 ft, e.g. 4 in or 100 mm"
)
HEIGHT = Quantity(
    "height", "in", "in", "mm", 0.0, 36.0, False, 1 / 16, "a height of 0 to 36 in, e.g. 3 3/4 in or 95 mm"
)
MARGIN = Quantity("margin", "in", "in", "mm", 0.0, 36.0, False, 1 / 8, "a margin of 0 to 36 in, e.g. 1/4 in or 6 mm")
SAG = Quantity("sag", "in", "in", "mm", -36.0, 36.0, False, 1 / 16, "a sag of -36 to 36 in, e.g. 5/8 in or 16 mm")
LEVEL = Quantity(
    "level",
    "in",
    "in",
    "mm",
    -240.0,
    240.0,
    False,
    1 / 16,
    "a distance below one level line, e.g. 40 1/8 in or 1019 mm",
)
SPAN = Quantity("span", "in", "ft", "m", 1.0, 720.0, False, 0.5, "a span of 1 in to 60 ft, e.g. 13'4\" or 4.06 m")
OVERHANG = Quantity(
    "overhang", "in", "ft", "m", 0.0, 720.0, False, 0.5, "an overhang of 0 to 60 ft, e.g. 2'6\" or 0.76 m"
)
POSITION = Quantity(
    "position", "in", "ft", "m", -720.0, 3600.0, False, 0.5, "a place along the member, e.g. 6 ft, 4'2\" or 1.8 m"
)
SPACING = Quantity(
    "spacing", "in", "in", "mm", 1.0, 120.0, False, 0.5, "a spacing of 1 to 120 in, e.g. 16 in or 400 mm"
)
TRIBUTARY = Quantity(
    "tributary width", "in", "ft", "m", 1.0, 720.0, False, 0.5, "a width of 1 in to 60 ft, e.g. 8 ft or 2.4 m"
)
BEARING = Quantity(
    "bearing", "in", "in", "mm", _SIXTY_FOURTH, 36.0, False, 1 / 8, "a bearing of 1/64 to 36 in, e.g. 1 1/2 in or 38 mm"
)
AREA_LOAD = Quantity(
    "area load", "psf", "psf", "kPa", 0.0, 2000.0, False, 0.0, "a load of 0 to 2,000 psf, e.g. 40 psf or 1.9 kPa"
)
# Wind may lift: the record refuses a negative load of any other type.
LINE_LOAD = Quantity(
    "line load", "plf", "plf", "kN/m", -1e5, 1e5, False, 0.0, "a load to 100,000 plf, e.g. 120 plf or 1.8 kN/m"
)
FORCE = Quantity("force", "lb", "lb", "kN", -1e6, 1e6, False, 0.0, "a force to 1,000,000 lb, e.g. 420 lb or 1.9 kN")
CONCENTRATED = Quantity(
    "concentrated load", "lb", "lb", "kN", 0.0, 1e6, False, 0.0, "a load of 0 to 1,000,000 lb, e.g. 2000 lb or 8.9 kN"
)
WEIGHT = Quantity(
    "weight", "lb", "lb", "kN", 0.0, 1e6, True, 0.0, "a weight over 0 to 1,000,000 lb, e.g. 400 lb or 1.8 kN"
)
STRESS = Quantity(
    "stress", "psi", "psi", "MPa", 1.0, 1e5, False, 0.0, "a stress of 1 to 100,000 psi, e.g. 1200 psi or 8.3 MPa"
)
MODULUS = Quantity(
    "modulus", "psi", "psi", "MPa", 1000.0, 5e7, False, 0.0,
    "a modulus of 1,000 to 50,000,000 psi, e.g. 1400000 psi or 9650 MPa",
)  # fmt: skip
MOISTURE = Quantity("moisture", "%", "%", "%", 0.0, 200.0, False, 2.0, "moisture of 0 to 200 %, e.g. 14 %")
TEMPERATURE = Quantity(
    "temperature", "degF", "degF", "degC", -60.0, 500.0, False, 5.0,
    "a temperature of -60 to 500 °F, e.g. 110 °F or 43 °C",
)  # fmt: skip
SLOPE = Quantity("slope", "deg", "deg", "deg", 0.0, 75.0, False, 1.0, "a slope of 0 to 75 degrees, e.g. 6:12 or 26 deg")
AREA = Quantity("area", "ft2", "ft2", "m2", 0.0, 1e6, True, 0.0, "an area over 0 to 1,000,000 ft2, e.g. 400 ft2")
DEFLECTION = Quantity(
    "deflection", "in", "in", "mm", 0.0, 36.0, True, 0.005, "a deflection over 0 to 36 in, e.g. 0.11 in or 2.8 mm"
)

ALL = (
    SIZE, LENGTH, HEIGHT, MARGIN, SAG, LEVEL, SPAN, OVERHANG, POSITION, SPACING, TRIBUTARY, BEARING, AREA_LOAD,
    LINE_LOAD, FORCE, CONCENTRATED, WEIGHT, STRESS, MODULUS, MOISTURE, TEMPERATURE, SLOPE, AREA, DEFLECTION,
)  # fmt: skip
