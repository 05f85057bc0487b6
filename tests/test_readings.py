"""Readings: every spelling the interface names, what must be refused and why, and how they are shown."""

from __future__ import annotations

import math

import pytest

from assess import quantities as q
from assess.errors import ReadingError
from assess.quantities import ALL, Quantity
from assess.reading import parse


def refused(typed: object, quantity: Quantity, units: str = "US") -> ReadingError:
    with pytest.raises(ReadingError) as caught:
        parse(typed, quantity, units, "size.depth")
    error = caught.value
    assert error.field == "size.depth"
    assert error.accepted
    assert "\n" not in error.line()
    assert len(error.line()) < 400
    return error


@pytest.mark.parametrize(
    ("typed", "quantity", "value"),
    [
        # interface, Readings
        ("7 1/2 in ± 1/8", q.SIZE, 7.5),
        ('7-1/2"', q.SIZE, 7.5),
        ("13'4\"", q.SPAN, 160.0),
        ("13 ft 4 in", q.SPAN, 160.0),
        ("190 mm", q.SIZE, 190 / 25.4),
        ("40 psf", q.AREA_LOAD, 40.0),
        ("1.9 kPa", q.AREA_LOAD, 1.9 * 1000 / 47.88025898),
        ("22 %", q.MOISTURE, 22.0),
        # more spellings of lengths
        ("7 1/2", q.SIZE, 7.5),
        ("7½", q.SIZE, 7.5),
        ("7 ½ in", q.SIZE, 7.5),
        ("7-½″", q.SIZE, 7.5),
        ("⅝", q.SIZE, 0.625),
        ("7⁄8 in", q.SIZE, 0.875),
        ("7.5", q.SIZE, 7.5),
        (".5 in", q.SIZE, 0.5),
        (7.5, q.SIZE, 7.5),
        (7, q.SIZE, 7.0),
        ("0.19 m", q.SIZE, 190 / 25.4),
        ("19 cm", q.SIZE, 190 / 25.4),
        ("１２ mm", q.SIZE, 12 / 25.4),
        ("3 1/2 in", q.SIZE, 3.5),
        ("  7 1/2  in ", q.SIZE, 7.5),
        ("13' 4 1/2\"", q.SPAN, 160.5),
        ("13'-4\"", q.SPAN, 160.0),
        ("13' - 4\"", q.SPAN, 160.0),
        ("13′4″", q.SPAN, 160.0),
        ("13’ 4½”", q.SPAN, 160.5),
        ("13' 4.5''", q.SPAN, 160.5),
        ("13'4", q.SPAN, 160.0),
        ("13ft4", q.SPAN, 160.0),
        ("13 FT 4 IN", q.SPAN, 160.0),
        ("13 ft. 4 in.", q.SPAN, 160.0),
        ("13-4", q.SPAN, 160.0),
        ("13-4 1/2", q.SPAN, 160.5),
        ("13-4-1/2", q.SPAN, 160.5),
        ("13", q.SPAN, 156.0),
        ("13 1/2", q.SPAN, 162.0),
        ("13 1/2'", q.SPAN, 162.0),
        ("160 in", q.SPAN, 160.0),
        ("12' 6\"", q.SPAN, 150.0),
        ("3 yd", q.SPAN, 108.0),
        ("-2'6\"", q.POSITION, -30.0),
        ("−2' 6\"", q.POSITION, -30.0),
        ("-½ ft", q.POSITION, -6.0),
        ("0", q.POSITION, 0.0),
        ("-0.0", q.POSITION, 0.0),
        # loads, stresses, the rest; 47.88025898 Pa a psf, 14.59390294 N/m a plf, 6894.757293 Pa a psi (NIST SP 811)
        ("40 lb/ft²", q.AREA_LOAD, 40.0),
        ("120 plf", q.LINE_LOAD, 120.0),
        ("-50 plf", q.LINE_LOAD, -50.0),
        ("1.2 kN/m", q.LINE_LOAD, 1200 / 14.59390294),
        ("420 lb", q.FORCE, 420.0),
        ("420 lbs", q.FORCE, 420.0),
        ("420 lbf", q.FORCE, 420.0),
        ("1.9 kN", q.FORCE, 1900 / 4.4482216152605),
        ("2 kips", q.FORCE, 2000.0),
        ("100 kg", q.FORCE, 100 * 9.80665 / 4.4482216152605),
        ("1200 psi", q.STRESS, 1200.0),
        ("1.4e6", q.MODULUS, 1.4e6),
        ("1400 ksi", q.MODULUS, 1.4e6),
        ("8.3 MPa", q.STRESS, 8.3e6 / 6894.757293),
        ("8.3 N/mm²", q.STRESS, 8.3e6 / 6894.757293),
        ("22%", q.MOISTURE, 22.0),
        ("70 F", q.TEMPERATURE, 70.0),
        ("70 °F", q.TEMPERATURE, 70.0),
        ("21 C", q.TEMPERATURE, 69.8),
        ("-40 °C", q.TEMPERATURE, -40.0),
        ("6:12", q.SLOPE, math.degrees(math.atan(0.5))),
        ("6/12", q.SLOPE, math.degrees(math.atan(0.5))),
        ("6 in 12", q.SLOPE, math.degrees(math.atan(0.5))),
        ("6 1/2:12", q.SLOPE, math.degrees(math.atan(6.5 / 12))),
        ("30 deg", q.SLOPE, 30.0),
        ("30°", q.SLOPE, 30.0),
        ("400 ft2", q.AREA, 400.0),
        ("37.16 m²", q.AREA, 37.16 / 0.09290304),
    ],
)
def test_a_reading_is_understood(typed: str | float, quantity: Quantity, value: float) -> None:
    reading = parse(typed, quantity)
    assert reading.value == pytest.approx(value, rel=1e-9, abs=1e-12)
    assert reading.typed == typed
    assert reading.spread == 0.0


@pytest.mark.parametrize(
    ("typed", "quantity", "units", "value"),
    [
        (190, q.SIZE, "SI", 190 / 25.4),
        ("4.06", q.SPAN, "SI", 4.06 / 0.0254),
        ("400", q.SPACING, "SI", 400 / 25.4),
        ("1.9", q.AREA_LOAD, "SI", 1900 / 47.88025898),
        (1.2, q.LINE_LOAD, "SI", 1200 / 14.59390294),
        (1.9, q.FORCE, "SI", 1900 / 4.4482216152605),
        (9650, q.MODULUS, "SI", 9650e6 / 6894.757293),
        (21, q.TEMPERATURE, "SI", 69.8),
        (6, q.POSITION, "US", 72.0),
        (16, q.SPACING, "US", 16.0),
        (8, q.TRIBUTARY, "US", 96.0),
        (1.5, q.BEARING, "US", 1.5),
    ],
)
def test_a_bare_number_takes_the_sessions_units(typed: object, quantity: Quantity, units: str, value: float) -> None:
    assert parse(typed, quantity, units).value == pytest.approx(value, rel=1e-9)


@pytest.mark.parametrize(
    ("typed", "quantity", "tolerance"),
    [
        ("7 1/2 in ± 1/8", q.SIZE, 0.125),
        ("7 1/2 in ± 1/8 in", q.SIZE, 0.125),
        ("7 1/2 +- 1/8", q.SIZE, 0.125),
        ("7 1/2 +/- 1/8", q.SIZE, 0.125),
        ("7½±⅛", q.SIZE, 0.125),
        ("190 mm ± 2", q.SIZE, 2 / 25.4),
        ("190 mm ± 1/16 in", q.SIZE, 0.0625),
        ("13'4\" ± 1/2", q.SPAN, 0.5),
        ("13 ft 4 in ± 1/2", q.SPAN, 0.5),
        ("13-4 ± 1/2", q.SPAN, 0.5),
        ("13.5 ft ± 1/4", q.SPAN, 3.0),
        ("22 % ± 2", q.MOISTURE, 2.0),
        ("21 C ± 2", q.TEMPERATURE, 3.6),
        ("70 F ± 1 C", q.TEMPERATURE, 1.8),
        ("7 1/2 in ± 0", q.SIZE, 0.0),
    ],
)
def test_a_typed_tolerance_takes_the_readings_last_unit(typed: str, quantity: Quantity, tolerance: float) -> None:
    assert parse(typed, quantity).tolerance == pytest.approx(tolerance, rel=1e-9)


def test_no_typed_tolerance_leaves_the_instruments_own() -> None:
    assert parse("7 1/2 in", q.SIZE).tolerance is None


def test_several_readings_give_their_mean_and_half_their_range() -> None:
    reading = parse(["7 3/8 in", "7 1/2 in ± 1/16", "7 1/2 in ± 1/8"], q.SIZE)
    assert reading.value == pytest.approx((7.375 + 7.5 + 7.5) / 3)
    assert reading.spread == 0.0625
    assert reading.tolerance == 0.125
    assert reading.typed == ("7 3/8 in", "7 1/2 in ± 1/16", "7 1/2 in ± 1/8")
    assert parse(["7 3/8 in"], q.SIZE).spread == 0.0


@pytest.mark.parametrize(
    ("typed", "quantity", "problem"),
    [
        # hostile inputs N1 to N5
        ("3,5 m", q.SPAN, "comma"),
        ("1,200 psi", q.STRESS, "comma"),
        ("1 mm; 2", q.SIZE, "not understood"),
        ("9**9**9", q.SIZE, "not understood"),
        ("5 in in", q.SIZE, "unknown unit"),
        ("−5 mm", q.SIZE, "out of range"),
        ("5 in 3 mm", q.SIZE, "not understood"),
        ("", q.SIZE, "empty"),
        ("  ", q.SIZE, "empty"),
        ("mm", q.SIZE, "not understood"),
        ("0x10 mm", q.SIZE, "not understood"),
        ("1e3 mm", q.SIZE, "out of range"),
        ("5 psf", q.SPAN, "wrong kind of unit"),
        ("40 psf", q.SIZE, "wrong kind of unit"),
        ("40 plf", q.AREA_LOAD, "wrong kind of unit"),
        ("70 in", q.TEMPERATURE, "wrong kind of unit"),
        ("7 °C", q.SIZE, "wrong kind of unit"),
        ("5 furlong", q.SIZE, "unknown unit"),
        ("NaN", q.SIZE, "not understood"),
        ("Infinity", q.AREA_LOAD, "not understood"),
        ("1e999", q.AREA_LOAD, "out of range"),
        (float("nan"), q.SIZE, "out of range"),
        (float("inf"), q.AREA_LOAD, "out of range"),
        (10**400, q.AREA_LOAD, "out of range"),
        ("9" * 400, q.AREA_LOAD, "too long"),
        ("1e308", q.SIZE, "out of range"),
        ("5e-324", q.SIZE, "out of range"),
        ("5e-324", q.AREA_LOAD, "out of range"),
        (5e-324, q.POSITION, "out of range"),
        (True, q.SIZE, "not understood"),
        (None, q.SIZE, "not understood"),
        ({}, q.SIZE, "not understood"),
        ([[7.5]], q.SIZE, "not understood"),
        ([7.5, True], q.SIZE, "not understood"),
        ([], q.SIZE, "cannot be used"),
        ([7.5] * 51, q.SIZE, "cannot be used"),
        # a size no framing has: depth over 36 in, span over 60 ft; zero and negative where they mean nothing
        ("36 1/16 in", q.SIZE, "out of range"),
        ("60' 1\"", q.SPAN, "out of range"),
        ("0", q.SIZE, "out of range"),
        ("-3 ft", q.SPAN, "out of range"),
        ("0 ft", q.SPAN, "out of range"),
        ("-1 psf", q.AREA_LOAD, "out of range"),
        ("900 %", q.MOISTURE, "out of range"),
        # what two people would read differently
        ("13-4", q.SIZE, "range"),
        ("13-1/2", q.SPAN, "feet or inches"),
        ("11/2", q.SIZE, "fraction of one or more"),
        ("7 3/2", q.SIZE, "fraction of one or more"),
        ("7 1/0", q.SIZE, "fraction of one or more"),
        ("13 ft 14 in", q.SPAN, "not understood"),
        ("13 4", q.SPAN, "not understood"),
        ("13-14", q.SPAN, "not understood"),
        ("7 - 1/2", q.SIZE, "not understood"),
        ("7--1/2", q.SIZE, "not understood"),
        ("½2", q.SIZE, "not understood"),
        ("7½½", q.SIZE, "not understood"),
        ("5²", q.SIZE, "unknown unit"),
        ("٣ in", q.SIZE, "not understood"),
        ("7 to 8 in", q.SIZE, "not understood"),
        ("6:0", q.SLOPE, "not understood"),
        # tolerances
        ("7 ±", q.SIZE, "not understood"),
        ("± 1/8", q.SIZE, "not understood"),
        ("7 ± 1 ± 1", q.SIZE, "not understood"),
        ("7 ± -1/8", q.SIZE, "tolerance"),
        ("7 ± 7", q.SIZE, "tolerance"),
        ("7 ± 1 psf", q.SIZE, "wrong kind of unit"),
    ],
)  # fmt: skip
def test_what_is_not_surely_one_value_is_refused_with_its_reason(
    typed: object, quantity: Quantity, problem: str
) -> None:
    assert problem in refused(typed, quantity).problem


def test_a_number_too_long_to_print_is_refused_in_one_line() -> None:
    assert "very many digits" in refused(10**5000, q.AREA_LOAD).line()


def test_a_bare_feet_and_inches_means_nothing_in_a_metric_session() -> None:
    refused("13-4", q.SPAN, "SI")


def test_a_refusal_names_field_value_and_what_is_accepted() -> None:
    assert refused("40 psf", q.SIZE).line() == (
        "size.depth: '40 psf' has the wrong kind of unit; accepted: a size of 1/64 to 36 in, e.g. 7 1/2 in or 190 mm"
    )


@pytest.mark.parametrize("quantity", ALL, ids=lambda quantity: quantity.name)
def test_the_example_in_each_refusal_is_itself_accepted(quantity: Quantity) -> None:
    examples = quantity.accepted.split("e.g. ")[1].replace(" or ", ", ").split(", ")
    for example in examples:
        assert parse(example, quantity).typed == example


@pytest.mark.parametrize(
    ("typed", "quantity", "shown", "for_us", "for_si"),
    [
        ("13'4", q.SPAN, "13 ft 4 in", "13 ft 4 in", "13 ft 4 in (4.064 m)"),
        ("7.5", q.SIZE, "7 1/2 in", "7 1/2 in", "7 1/2 in (190.5 mm)"),
        ("7.45", q.SIZE, "7.45 in", "7.45 in", "7.45 in (189.2 mm)"),
        ("190 mm", q.SIZE, "190 mm", "190 mm (7.48 in)", "190 mm"),
        ("190 mm ± 2", q.SIZE, "190 mm ± 2 mm", "190 mm ± 2 mm (7.48 in)", "190 mm ± 2 mm"),
        ("4.06 m", q.SPAN, "4.06 m", "4.06 m (159.8 in)", "4.06 m"),
        ("-2'6", q.POSITION, "-2 ft 6 in", "-2 ft 6 in", "-2 ft 6 in (-0.762 m)"),
        ("12.9999999999999", q.SPAN, "13 ft", "13 ft", "13 ft (3.962 m)"),
        ("40", q.AREA_LOAD, "40 psf", "40 psf", "40 psf (1.915 kPa)"),
        ("1400000", q.MODULUS, "1400000 psi", "1400000 psi", "1400000 psi (9653 MPa)"),
        ("21 C", q.TEMPERATURE, "21 °C", "21 °C (69.8 °F)", "21 °C"),
        ("22", q.MOISTURE, "22 %", "22 %", "22 %"),
        (["7 3/8", "7 1/2"], q.SIZE, "7 7/16 in", "7 7/16 in", "7 7/16 in (188.9 mm)"),
    ],
)
def test_a_reading_is_shown_as_it_was_understood(
    typed: object, quantity: Quantity, shown: str, for_us: str, for_si: str
) -> None:
    reading = parse(typed, quantity)
    assert (reading.shown(), reading.shown("US"), reading.shown("SI")) == (shown, for_us, for_si)
