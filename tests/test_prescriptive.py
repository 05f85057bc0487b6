"""Prescriptive limits on cuts at and just past each threshold (IRC R502.8.1; NDS 2018 4.4.3), on actual depth."""

from __future__ import annotations

from typing import Any

import pytest

from assess.engine import compute
from assess.judge import judge
from assess.prescriptive import prescriptive
from assess.scenario import Loss, Scenario
from tests.scenarios import scenario

D, L = 9.0, 180.0  # thirds of the depth 3, sixths 1.5, quarters 2.25; thirds of the span 60


def member(*losses: Loss, **changes: Any) -> Scenario:
    """A 1 1/2 x 9 over 180 in."""
    return scenario(depth_in=D, **({"spans_in": (L,)} | changes), losses=losses)


def notch(at: float, length: float, **cut: float) -> Loss:
    return Loss("notch 1", "notch", at, at + length, **cut)


def bore(at: float, diameter: float, height: float, name: str = "hole 1") -> Loss:
    return Loss(name, "hole", at - diameter / 2, at + diameter / 2, diameter_in=diameter, height_in=height)


def breaches(made: Scenario) -> list[str]:
    """What is beyond its limit."""
    return [c.combination for c in prescriptive(made) if c.ratio is None or c.ratio > 1.0]


LIMITS = [
    # end notch d/4 = 2 1/4 in
    (member(notch(-0.75, 4.0, bottom_in=2.25)), member(notch(-0.75, 4.0, bottom_in=2.2501)), "end notch depth"),
    (member(notch(176.0, 4.75, top_in=2.25)), member(notch(176.0, 4.75, top_in=2.2501)), "end notch depth"),
    # other notches d/6 = 1 1/2 in deep, d/3 = 3 in long
    (member(notch(20.0, 3.0, bottom_in=1.5)), member(notch(20.0, 3.0, bottom_in=1.5001)), ": depth"),
    (member(notch(20.0, 3.0, top_in=1.5)), member(notch(20.0, 3.0, top_in=1.5001)), ": depth"),
    (member(notch(20.0, 3.0, top_in=1.0)), member(notch(20.0, 3.0001, top_in=1.0)), "length"),
    # none in the middle third, 60 to 120 in
    (member(notch(57.0, 3.0, top_in=1.0)), member(notch(57.01, 3.0, top_in=1.0)), "middle third"),
    (member(notch(120.0, 3.0, top_in=1.0)), member(notch(119.99, 3.0, top_in=1.0)), "middle third"),
    (member(notch(-0.75, 60.75, top_in=1.0)), member(notch(-0.75, 60.76, top_in=1.0)), "middle third"),
    # holes d/3 = 3 in
    (member(bore(90.0, 3.0, 4.5)), member(bore(90.0, 3.0001, 4.5)), "diameter"),
    # 2 in clear of either edge
    (member(bore(30.0, 2.0, 3.0)), member(bore(30.0, 2.0, 2.999)), "clear of the edges"),
    (member(bore(30.0, 2.0, 6.0)), member(bore(30.0, 2.0, 6.001)), "clear of the edges"),
    # 2 in clear of another hole: centres 4 in apart, along or slantwise (3.2, 2.4)
    (member(bore(30.0, 2.0, 4.5), bore(34.0, 2.0, 4.5, "hole 2")),
     member(bore(30.0, 2.0, 4.5), bore(33.999, 2.0, 4.5, "hole 2")), "clear of hole 2"),
    (member(bore(30.0, 2.0, 3.2), bore(33.2001, 2.0, 5.6, "hole 2")),
     member(bore(30.0, 2.0, 3.2), bore(33.199, 2.0, 5.6, "hole 2")), "clear of hole 2"),
    # 2 in clear of a notch: beside one, or over a bottom notch 1 1/2 in deep, or under a top one
    (member(bore(30.0, 2.0, 4.5), notch(33.0, 3.0, bottom_in=4.6)),
     member(bore(30.0, 2.0, 4.5), notch(32.999, 3.0, bottom_in=4.6)), "clear of notch 1"),
    (member(bore(30.0, 2.0, 4.5), notch(29.0, 2.0, bottom_in=1.5)),
     member(bore(30.0, 2.0, 4.499), notch(29.0, 2.0, bottom_in=1.5)), "clear of notch 1"),
    (member(bore(30.0, 2.0, 4.5), notch(29.0, 2.0, top_in=1.5)),
     member(bore(30.0, 2.0, 4.501), notch(29.0, 2.0, top_in=1.5)), "clear of notch 1"),
]  # fmt: skip


@pytest.mark.parametrize(("at", "past", "what"), LIMITS, ids=range(len(LIMITS)))
def test_at_the_limit_and_just_past_it(at: Scenario, past: Scenario, what: str) -> None:
    assert not [text for text in breaches(at) if text.endswith(what)]
    assert [text for text in breaches(past) if text.endswith(what)]


def test_tension_face_of_thick_members_is_never_notched_but_at_ends() -> None:
    def said(width: float, **cut: Any) -> bool:
        loss = notch(cut.pop("at", 20.0), 3.0, **cut)
        return any("tension face" in text for text in breaches(member(loss, width_in=width)))

    assert said(3.5, bottom_in=0.5)
    assert not said(3.49, bottom_in=0.5)
    assert not said(3.5, top_in=0.5)
    assert not said(3.5, bottom_in=0.5, at=-0.75)


def test_top_is_the_tension_face_over_inner_supports_and_on_overhangs() -> None:
    spans = {"spans_in": (120.0, 120.0), "width_in": 3.5}
    assert any("tension face" in text for text in breaches(member(notch(119.0, 2.0, top_in=0.5), **spans)))
    assert not any("tension face" in text for text in breaches(member(notch(20.0, 2.0, top_in=0.5), **spans)))
    out = {"overhang_right_in": 40.0, "width_in": 3.5}
    assert any("tension face" in text for text in breaches(member(notch(190.0, 2.0, top_in=0.5), **out)))
    assert not any("tension face" in text for text in breaches(member(notch(190.0, 2.0, bottom_in=0.5), **out)))


def test_the_actual_depth_counts() -> None:
    # d/6 of 9 1/4 is 1.5417, of the nominal 10 1.6667: 1.6 in is beyond
    made = scenario(losses=(notch(20.0, 3.0, top_in=1.6),))
    (depth, _) = prescriptive(made)
    assert depth.capacity == pytest.approx(9.25 / 6)
    assert depth.ratio == pytest.approx(1.6 / (9.25 / 6))
    assert breaches(made)


def test_numbers_stand_beside_their_limit() -> None:
    # a hole of 2 in centred 2 1/2 in up: 1 1/2 in clear of 2
    diameter, edge = prescriptive(member(bore(30.0, 2.0, 2.5)))
    assert (diameter.demand, diameter.capacity, diameter.unit) == (2.0, 3.0, "in")
    assert diameter.ratio == pytest.approx(2 / 3)
    assert (edge.demand, edge.capacity) == (2.0, 1.5)
    assert edge.ratio == pytest.approx(4 / 3)
    # holes that meet have no wood between them: no ratio, a breach
    meeting = member(bore(30.0, 2.0, 4.5), bore(31.0, 2.0, 4.5, "hole 2"))
    (between,) = [c for c in prescriptive(meeting) if c.combination == "hole 1: clear of hole 2"]
    assert (between.capacity, between.ratio) == (0.0, None)


def test_holes_are_allowed_in_the_middle_third() -> None:
    assert breaches(member(bore(90.0, 2.0, 4.5))) == []


def test_decay_and_char_have_no_prescriptive_limit() -> None:
    assert prescriptive(member(Loss("decay 1", "decay", 20.0, 60.0, bottom_in=4.0))) == ()
    assert prescriptive(member()) == ()


@pytest.mark.parametrize(
    "loss", [notch(88.0, 4.0, top_in=0.5), bore(5.0, 1.0, 1.0), notch(20.0, 9.0, top_in=1.6)], ids=range(3)
)
def test_a_breach_is_told_and_changes_no_verdict(loss: Loss) -> None:
    made = member(loss, spans_in=(120.0,))
    found = judge(made, compute(made))
    assert breaches(made)
    assert found.verdict == "adequate"
    assert found.ratio is not None
    assert found.ratio == max(c.ratio or 0.0 for c in found.checks if c.check in ("bending", "shear", "bearing"))
    assert found.governs is not None
    assert found.governs.check != "prescriptive"
    assert any("beyond the prescriptive limits" in caution for caution in found.cautions)
    assert any(c.check == "prescriptive" for c in found.checks)


def test_within_the_limits_can_still_be_inadequate() -> None:
    # a quarter notch at the end is allowed, and leaves 0.42 of the shear: not enough for 130 psf
    made = member(notch(-0.75, 4.0, bottom_in=2.25), dead_psf=90.0)
    found = judge(made, compute(made))
    assert breaches(made) == []
    assert found.verdict == "inadequate"
    assert not any("prescriptive" in caution for caution in found.cautions)
