"""Each adjustment factor against a value worked by hand from its clause of NDS 2018 (tables as recalled)."""

from __future__ import annotations

import math
from dataclasses import replace
from typing import Any

import numpy as np
import pytest

from assess import adjust, stability
from assess.engine import compute, stiffness
from assess.factors import flat_use_factor, size_factor, temperature_factor
from assess.judge import judge
from assess.scenario import Edge
from assess.variants import variants
from tests.scenarios import HEM_FIR_2, scenario


@pytest.mark.parametrize(
    ("rule", "thickness", "width", "depth", "flat", "by_hand"),
    [
        # Supplement Table 4A, size factors: 2x4, 2x6, 2x8, 2x10, 2x12, 2x14; then 4x8, 4x12, 4x14.
        ("dimension", 2, 4, 3.5, False, 1.5),
        ("dimension", 2, 6, 5.5, False, 1.3),
        ("dimension", 2, 8, 7.25, False, 1.2),
        ("dimension", 2, 10, 9.25, False, 1.1),
        ("dimension", 2, 12, 11.25, False, 1.0),
        ("dimension", 2, 14, 13.25, False, 0.9),
        ("dimension", 4, 8, 7.25, False, 1.3),
        ("dimension", 4, 12, 11.25, False, 1.1),
        ("dimension", 4, 14, 13.25, False, 1.0),
        ("stud", 2, 4, 3.5, False, 1.1),
        ("stud", 2, 6, 5.5, False, 1.0),
        ("utility", 2, 3, 2.5, False, 0.4),
        # Table 4B: by width already; 4 in thick and 8 in or wider; wider than 12 in.
        ("southern pine", 2, 10, 9.25, False, 1.0),
        ("southern pine", 4, 8, 7.25, False, 1.1),
        ("southern pine", 2, 14, 13.25, False, 0.9),
        # Table 4D: (12/d)^(1/9) beyond 12 in: 15.5 in -> 0.97196; none to 12 in; none on the wide face.
        ("timber", 8, 16, 15.5, False, (12 / 15.5) ** (1 / 9)),
        ("timber", 8, 12, 11.5, False, 1.0),
        ("timber", 8, 16, 15.5, True, 1.0),
        ("none", 2, 14, 13.25, False, 1.0),
    ],
)
def test_size_factor(rule: str, thickness: int, width: int, depth: float, flat: bool, by_hand: float) -> None:
    assert size_factor(rule, thickness, width, depth, flat) == pytest.approx(by_hand, rel=1e-12)


def test_flat_use_factor() -> None:
    assert flat_use_factor("dimension", "", "No. 2", 2, 4) == (1.1, 1.0)  # Table 4A
    assert flat_use_factor("dimension", "", "No. 2", 4, 10) == (1.1, 1.0)
    assert flat_use_factor("southern pine", "", "No. 2", 2, 8) == (1.15, 1.0)  # Table 4B
    assert flat_use_factor("timber", "beams and stringers", "No. 1", 6, 10) == (0.74, 0.90)  # Table 4D
    assert flat_use_factor("timber", "posts and timbers", "No. 1", 6, 6) == (1.0, 1.0)


def test_temperature_factor() -> None:
    # NDS Table 2.3.3
    assert temperature_factor(None, wet=True) == (1.0, 1.0)
    assert temperature_factor(100.0, wet=False) == (1.0, 1.0)
    assert temperature_factor(120.0, wet=False) == (0.9, 0.8)
    assert temperature_factor(120.0, wet=True) == (0.9, 0.7)
    assert temperature_factor(150.0, wet=True) == (0.9, 0.5)
    assert temperature_factor(150.1, wet=False) is None


def test_wet_service_step() -> None:
    # Table 4A: CM on Fb is 0.85, but 1.0 where Fb CF <= 1150 psi: 900 x 1.2 = 1080 and 958.33 x 1.2 = 1150 are under.
    values = adjust.CM_bending(np.array([900.0, 958.3333333, 975.0]), 1.2, 0.85, 1150.0)
    assert list(values) == [1.0, 1.0, 0.85]


def test_stability_factor_by_hand() -> None:
    # NDS 3.3.3, 2x10 Hem-Fir No. 2, unbraced 8 ft, uniform load: lu/d = 10.378 so le = 1.63(96) + 3(9.25) = 184.23;
    # RB = sqrt(184.23 x 9.25 / 2.25) = 27.521; FbE = 1.2(470000)/757.39 = 744.66; Fb* = 850(1.1)(1.15) = 1075.25;
    # alpha = 0.69255; CL = 0.890816 - sqrt(0.793553 - 0.729) = 0.63675
    le = stability.le_uniform(96.0, 9.25)
    assert float(le) == pytest.approx(184.23, abs=1e-9)
    RB = stability.RB(le, 9.25, 1.5)
    assert float(RB) == pytest.approx(27.5208, abs=1e-3)
    FbE = stability.FbE(470000.0, RB)
    assert float(FbE) == pytest.approx(744.66, abs=0.05)
    Fb_star = adjust.Fb_star(850.0, 1.0, 1.0, 1.0, 1.1, 1.0, 1.15)
    assert float(Fb_star) == pytest.approx(1075.25, abs=1e-9)
    alpha = stability.alpha(FbE, Fb_star)
    CL = float(stability.CL(alpha))
    a = 744.66 / 1075.25
    by_hand = (1 + a) / 1.9 - math.sqrt(((1 + a) / 1.9) ** 2 - a / 0.95)
    assert pytest.approx(by_hand, abs=1e-4) == CL
    assert pytest.approx(0.6367, abs=5e-4) == CL


@pytest.mark.parametrize(
    ("row", "lu", "d", "by_hand"),
    [
        # NDS Table 3.3.3 and its note 1
        (stability.le_uniform, 60.0, 10.0, 2.06 * 60),
        (stability.le_uniform, 70.0, 10.0, 1.63 * 70 + 30),
        (stability.le_general, 60.0, 10.0, 2.06 * 60),
        (stability.le_general, 143.0, 10.0, 1.63 * 143 + 30),
        (stability.le_general, 144.0, 10.0, 1.84 * 144),
        (stability.le_cantilever_uniform, 60.0, 10.0, 1.33 * 60),
        (stability.le_cantilever_uniform, 100.0, 10.0, 0.90 * 100 + 30),
    ],
)
def test_effective_length(row: stability.Formula, lu: float, d: float, by_hand: float) -> None:  # type: ignore[type-arg]
    assert float(row(lu, d)) == pytest.approx(by_hand, rel=1e-12)


def test_unbraced_length_between_held_points() -> None:
    x = np.array([[0.0, 30.0, 48.0, 100.0, 160.0]])
    ends = np.array([[0.0, 160.0]])
    assert list(stability.unbraced_length(x, Edge(), ends, True)[0]) == [160.0] * 5
    assert list(stability.unbraced_length(x, Edge(held=True), ends, True)[0]) == [0.0] * 5
    # braces at 48 and 120 in: the brace itself belongs to the longer of its two fields
    at_places = stability.unbraced_length(x, Edge(places_in=(48.0, 120.0)), ends, True)[0]
    assert list(at_places) == [48.0, 48.0, 72.0, 72.0, 40.0]
    every = stability.unbraced_length(x, Edge(every_in=60.0), ends, True)[0]
    assert list(every) == [60.0, 60.0, 60.0, 60.0, 40.0]


@pytest.mark.parametrize(
    ("changes", "applies"),
    [
        # NDS 4.3.9: three or more, spacing known and to 24 in, joined by flooring that shares; dimension lumber only
        ({}, True),
        ({"spacing_in": 24.0, "tributary_in": 24.0}, True),
        ({"spacing_in": 24.1, "tributary_in": 24.1}, False),
        ({"alike": 2}, False),
        ({"spacing_in": None}, False),
        ({"top": Edge(every_in=24.0)}, False),
        ({"timber": True}, False),
    ],
)
def test_repetitive_member_factor(changes: dict[str, Any], applies: bool) -> None:
    wood = replace(HEM_FIR_2, timber=changes.pop("timber", False))
    made = scenario(woods=(wood,), **changes)
    rows = variants(made)
    factor = float(adjust.factors(made, rows, rows.parts[0]).Cr[0, 0, 0])
    assert factor == (1.15 if applies else 1.0)


def test_wet_incised_and_hot_together() -> None:
    # Fb 850 x 1.1 = 935 <= 1150: CM 1.0; Ci 0.80; Ct 0.7 wet at 110 F: Fb* = 850(1.1)(1.15)(0.80)(0.70) = 602.14 psi;
    # E' = 1.3e6 (0.9)(0.9)(0.95) = 1,000,350 psi; Fv' = 150(0.97)(0.8)(0.7) = 81.48; Fc_perp' = 405(0.67)(0.7)(1.0)
    made = scenario(wet=True, incised=True, temperature_F=110.0)
    found = judge(made, compute(made))
    by_name = {(c.check, c.combination): c.capacity for c in found.checks}
    assert by_name["bending", "D+L"] == pytest.approx(602.14, abs=1e-6)
    assert by_name["shear", "D+L"] == pytest.approx(81.48, abs=1e-9)
    assert by_name["bearing", "D+L"] == pytest.approx(405 * 0.67 * 0.7, rel=1e-12)
    rows = variants(made)
    f = adjust.factors(made, rows, rows.parts[0])
    assert float(stiffness(rows.parts[0], f)[0]) == pytest.approx(1_000_350.0, rel=1e-12)


def test_timbers_take_no_lumber_factors() -> None:
    # Table 4D: CM on Fb, Fv and E is 1.0, on Fc_perp 0.67 but 1.0 for Southern Pine; no Cr; incising only a caution
    timber = replace(HEM_FIR_2, lumber=False, timber=True, cf_rules=("timber",), size_class="beams and stringers")
    for species, on_bearing in (("Hem-Fir", 0.67), ("Southern Pine", 1.0)):
        made = scenario(woods=(replace(timber, species=species),), width_in=7.5, depth_in=11.5, wet=True, incised=True)
        rows = variants(made)
        f = adjust.factors(made, rows, rows.parts[0])
        got = [float(v[0, 0, 0]) for v in (f.CM_Fb, f.CM_Fv, f.CM_E, f.CM_Fc, f.Cr, f.Ci, f.CF)]
        assert got == [1.0, 1.0, 1.0, on_bearing, 1.0, 1.0, 1.0]


def test_a_plank_on_the_flat_takes_the_flat_use_factor() -> None:
    # 2x10 on the flat: CF 1.1 of its wide face, Cfu 1.2 (Table 4A), no CL: 850(1.1)(1.2)(1.15) = 1290.3 psi
    made = scenario(width_in=9.25, depth_in=1.5, on_flat=True, spans_in=(48.0,))
    found = judge(made, compute(made))
    capacity = next(c.capacity for c in found.checks if (c.check, c.combination) == ("bending", "D+L"))
    assert capacity == pytest.approx(1290.3, abs=1e-6)
