"""Laws of readings: shown and read back the same, limits and units exact, any text understood or refused at once."""

from __future__ import annotations

import contextlib
import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from assess import quantities as q
from assess.errors import ReadingError
from assess.quantities import ALL, Quantity
from assess.reading import Reading, parse
from assess.units import canonical, factor
from tests.hostile_texts import HOSTILE, bad_texts
from tests.stopwatch import within

SHOWN = 1e-9  # relative: a converted or averaged value is shown with ten digits
SHOWN_DEGREES = 1e-8  # °F: ten digits of a temperature that stands far from its other scale's zero
LIMIT_S = 0.05  # hostile inputs N4: value or a clear refusal in 50 ms; processor time, whatever else runs


def _refused(typed: str, quantity: Quantity) -> None:
    with pytest.raises(ReadingError):
        parse(typed, quantity)


def same(a: Reading, b: Reading) -> bool:
    near = SHOWN_DEGREES if a.quantity.unit == "degF" else SHOWN
    close = math.isclose(a.value, b.value, rel_tol=SHOWN, abs_tol=near)
    if a.tolerance is None or b.tolerance is None:
        return close and a.tolerance is b.tolerance
    return close and math.isclose(a.tolerance, b.tolerance, rel_tol=SHOWN, abs_tol=near)


@settings(max_examples=400, derandomize=True, deadline=None)
@given(
    quantity=st.sampled_from(ALL), at=st.floats(0, 1), half=st.floats(0, 0.9), metric=st.booleans(),
    with_tolerance=st.booleans(), sixteenths=st.booleans(), units=st.sampled_from(("US", "SI")),
)  # fmt: skip
def test_what_is_shown_reads_back_to_the_same_value(
    quantity: Quantity, at: float, half: float, metric: bool, with_tolerance: bool, sixteenths: bool, units: str
) -> None:
    value = quantity.low + at * (quantity.high - quantity.low)
    value = round(value * 16) / 16 if sixteenths else value
    value = min(max(value, quantity.low), quantity.high)
    if abs(value) < 1e-3:
        value = 1e-3
    tolerance = min(abs(value), quantity.high) * half if with_tolerance else None
    reading = Reading("", value, tolerance, 0.0, quantity, metric)
    assert same(parse(reading.shown(), quantity, units), reading)


@pytest.mark.parametrize("metric", [False, True])
@pytest.mark.parametrize("quantity", ALL, ids=lambda quantity: quantity.name)
def test_a_limit_is_read_in_either_units_and_what_lies_past_it_in_neither(quantity: Quantity, metric: bool) -> None:
    for limit, past in ((quantity.low, -1), (quantity.high, 1)):
        beyond = limit + past * max(abs(limit) * 1e-4, 1e-3)
        _refused(Reading("", beyond, None, 0.0, quantity, metric).shown(), quantity)
        shown = Reading("", limit, None, 0.0, quantity, metric).shown()
        if past < 0 and quantity.low_open:
            _refused(shown, quantity)
        else:
            assert parse(shown, quantity).value == pytest.approx(limit, rel=SHOWN)


@pytest.mark.parametrize(
    ("typed", "quantity", "value"),
    [
        # 0.0254 m an inch, exact: a rule that stops at a size stops at the same one in metric (NDS 4.3.9: Cr, 24 in)
        ("0.6096 m", q.SPACING, 24.0),
        ("609.6 mm", q.SPACING, 24.0),
        ("60.96 cm", q.SPACING, 24.0),
        (["0.6096 m", "609.6 mm", "2 ft"], q.SPACING, 24.0),
        (["24.1", "23.8", "24.1"], q.SPACING, 24.0),
        ("139.7 mm", q.SIZE, 5.5),
        ("38.1 mm", q.SIZE, 1.5),
        ("0.0381 m", q.SIZE, 1.5),
        ("114.3 mm", q.SIZE, 4.5),
        ("1.1 ft", q.SPAN, 13.2),
        ("37.8 C", q.TEMPERATURE, 100.04),
        ("65.6 C", q.TEMPERATURE, 150.08),
    ],
)  # fmt: skip
def test_an_exact_conversion_or_mean_meets_a_limit_exactly(typed: object, quantity: Quantity, value: float) -> None:
    assert parse(typed, quantity).value == value


@settings(max_examples=200, derandomize=True, deadline=None)
@given(sixteenths=st.integers(16, 36 * 16))
def test_every_tape_reading_typed_in_millimetres_or_metres_is_the_same_number(sixteenths: int) -> None:
    inches = sixteenths / 16
    for text in (f"{inches * 25.4!r} mm", f"{inches * 0.0254!r} m", f"{sixteenths * 254 / 160:.5f} mm"):
        assert parse(text, q.SIZE).value == inches


def test_nought_degrees_is_read_in_celsius() -> None:
    assert parse("-17.77777778 C", q.TEMPERATURE).value == pytest.approx(0.0, abs=SHOWN_DEGREES)


@settings(max_examples=400, derandomize=True, deadline=None)
@given(typed=bad_texts(), quantity=st.sampled_from(ALL), units=st.sampled_from(("US", "SI")))
def test_any_text_is_understood_and_shown_back_or_refused(typed: str, quantity: Quantity, units: str) -> None:
    parse("1 m", q.SPAN)  # pint loads once, before the clock starts
    reading: Reading | None = None
    with within(LIMIT_S):
        try:
            reading = parse(typed, quantity, units)
            said = reading.shown()
        except ReadingError as error:
            said = error.line()
    assert "\n" not in said
    if reading is not None:
        assert quantity.low <= reading.value <= quantity.high
        assert same(parse(said, quantity, units), reading)


@pytest.mark.parametrize("quantity", ALL, ids=lambda quantity: quantity.name)
def test_no_hostile_text_takes_long_or_escapes(quantity: Quantity) -> None:
    parse("1 m", q.SPAN)
    for typed in HOSTILE:
        with within(LIMIT_S), contextlib.suppress(ReadingError):
            parse(typed, quantity)


def test_every_length_and_load_unit_converts_exactly() -> None:
    # 25.4 mm an inch and 4.4482216152605 N a pound are exact by definition (NIST SP 811).
    assert factor("mm", "in") == pytest.approx(1 / 25.4, rel=1e-12)
    assert factor("yd", "in") == 36.0
    assert factor("kPa", "psf") == pytest.approx(1000 * 0.3048**2 / 4.4482216152605, rel=1e-12)
    assert factor("kN/m", "plf") == pytest.approx(1000 * 0.3048 / 4.4482216152605, rel=1e-12)
    assert factor("GPa", "psi") == pytest.approx(1e9 * 0.0254**2 / 4.4482216152605, rel=1e-12)
    assert factor("m2", "ft2") == pytest.approx(1 / 0.3048**2, rel=1e-12)


def test_a_unit_of_another_kind_has_no_factor() -> None:
    with pytest.raises(ReadingError, match="wrong kind of unit"):
        factor("psf", "plf")


def test_unknown_units_have_no_name() -> None:
    assert [canonical(text) for text in ("furlong", "in in", "", "2", "mm; rm", "__class__")] == [None] * 6
