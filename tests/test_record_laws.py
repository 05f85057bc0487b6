"""Laws an assessment keeps for every member that can be drawn, from readings to finding."""

from __future__ import annotations

import json
import math
from typing import Any

import pytest
from hypothesis import Phase, given, settings
from hypothesis import strategies as st

from assess import assess
from assess.finding import Finding
from assess.reading import Reading
from assess.record import read_member, to_json
from assess.record_fields import Record
from tests.strategies import members, sites

DRAWN = settings(max_examples=40, derandomize=True, database=None, deadline=None, phases=[Phase.generate])
VERDICTS = {"adequate", "inadequate", "undetermined"}

# 25.4 mm an inch and 4.4482216152605 N a pound, exact by definition (NIST SP 811); never by the program's own factors.
N_LB, MM_IN = 4.4482216152605, 25.4
METRIC = {
    "in": (MM_IN, "mm"),
    "psf": (N_LB / 0.3048**2 / 1000, "kPa"),
    "plf": (N_LB / 0.3048 / 1000, "kN/m"),
    "lb": (N_LB / 1000, "kN"),
    "psi": (N_LB / MM_IN**2, "MPa"),
    "ft2": (0.3048**2, "m2"),
    "deg": (1.0, "deg"),
    "%": (1.0, "%"),
}


def found(data: dict[str, Any], units: str = "US") -> Finding:
    return assess(read_member(data, units))


def size(ratio: float | None) -> float:
    """A number, endless where it does not exist: a ratio without a capacity is worse than any."""
    return math.inf if ratio is None else ratio


def metric(value: Any, written: Any) -> Any:
    """What was read, beside how it was written, written anew in metric units."""
    if isinstance(value, Reading):
        if value.quantity.unit == "degF":
            return f"{(value.value - 32) / 1.8!r} °C"
        scale, unit = METRIC[value.quantity.unit]
        return f"{value.value * scale!r} {unit}"
    if isinstance(value, Record):
        names = {field.alias or name: name for name, field in type(value).model_fields.items()}
        return {alias: metric(getattr(value, names[alias]), item) for alias, item in written.items()}
    if isinstance(value, tuple) and isinstance(written, list):
        return [metric(inner, item) for inner, item in zip(value, written, strict=True)]
    return written


@settings(DRAWN, max_examples=60)
@given(units=st.sampled_from(("US", "SI")), data=st.data())
def test_a_member_that_lacks_nothing_gets_a_finding_that_json_can_hold(units: str, data: st.DataObject) -> None:
    finding = found(data.draw(sites(units=units)), units)
    assert finding.verdict in VERDICTS
    assert json.loads(json.dumps(finding.to_json(), allow_nan=False))["verdict"] == finding.verdict
    # hostile inputs N6: never adequate with a ratio over one or without one
    assert finding.verdict != "adequate" or size(finding.ratio) <= 1.0


@DRAWN
@given(data=members())
def test_the_same_member_read_in_metric_units_has_the_same_ratio(data: dict[str, Any]) -> None:
    member = read_member(data)
    other = read_member(metric(member, to_json(member)))
    assert_same(assess(member), assess(other))


def assert_same(one: Finding, other: Finding) -> None:
    for name in ("ratio", "service_ratio"):
        assert size(getattr(other, name)) == pytest.approx(size(getattr(one, name)), rel=1e-6)
    for name in ("strength_psf", "service_psf"):
        carried = size(getattr(one.live_load, name))
        assert size(getattr(other.live_load, name)) == pytest.approx(carried, rel=1e-6, abs=1e-6)


@DRAWN
@given(data=members(), live_psf=st.integers(10, 150), more_psf=st.integers(1, 100), concentrated=st.booleans())
def test_more_live_load_never_lowers_the_ratio(
    data: dict[str, Any], live_psf: int, more_psf: int, concentrated: bool
) -> None:
    patch = {"concentrated": "1000 lb"} if concentrated else {}
    less, more = ({"live": f"{psf} psf"} | patch for psf in (live_psf, live_psf + more_psf))
    before, after = (size(found(data | {"proposed_use": use}).ratio) for use in (less, more))
    assert after >= before * (1 - 1e-9)


# Widths of one size class of dimension lumber, 2 in thick (NDS Supplement 2018 Table 4A: one CF for each class).
SAME_CLASS = ((7.25, 7.5), (9.25, 9.5), (9.25, 10.0), (11.25, 11.75))
# A place on the face means another thing in a deeper piece, and its own weight takes from what it can carry.
SOUND = {"condition": [], "own_weight": "included"}


@DRAWN
@given(data=members(), depths=st.sampled_from(SAME_CLASS))
def test_a_deeper_member_of_the_same_size_class_never_carries_less(
    data: dict[str, Any], depths: tuple[float, float]
) -> None:
    sound = {name: item for name, item in data.items() if name != "hanger"} | SOUND
    less, more = (
        found(sound | {"size": {"width": "1 1/2 in", "depth": f"{depth} in"}}).live_load.strength_psf
        for depth in depths
    )
    if less is not None:
        assert more is not None
        assert more >= less * (1 - 1e-9)
