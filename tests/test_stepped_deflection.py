"""Deflection where stiffness varies along the member: unit loads by exact integration, and exact direct stiffness."""

from __future__ import annotations

from fractions import Fraction
from itertools import pairwise

import pytest

from assess.engine import compute
from assess.judge import judge
from assess.scenario import Loss, Scenario
from tests.scenarios import scenario
from tests.statics_reference import Case, stiffness_answer

E_PSI = Fraction(1_300_000)
B, D = Fraction(3, 2), Fraction(37, 4)
DEAD, LIVE = Fraction(160, 144), Fraction(640, 144)  # 10 and 40 psf on 16 in [lb/in]

CHAR = Loss("char 1", "char", 20.0, 100.0, bottom_in=2.0, side_in=0.5)
NOTCH = Loss("notch 1", "notch", 60.0, 64.0, top_in=3.0)
HOLE = Loss("hole 1", "hole", 30.0, 33.0, diameter_in=3.0, height_in=4.625)
ROT = Loss("decay 1", "decay", -12.0, 15.0, bottom_in=0.75)
SETS = [(), (NOTCH,), (HOLE,), (CHAR,), (ROT,), (CHAR, NOTCH), (ROT, HOLE, NOTCH), (HOLE, CHAR)]


def I_left(losses: tuple[Loss, ...], at: Fraction) -> Fraction:
    """Second moment of what is left at a place, by strips: parallel axes about the neutral axis."""
    here = [loss for loss in losses if loss.from_in < at < loss.to_in]
    low = max([Fraction(loss.bottom_in) for loss in here], default=Fraction(0))
    high = D - max([Fraction(loss.top_in) for loss in here], default=Fraction(0))
    b: Fraction = B - max([Fraction(loss.side_in) for loss in here], default=Fraction(0))
    strips = [(low, high)]
    for loss in here:
        if loss.diameter_in:
            centre, radius = Fraction(loss.height_in), Fraction(loss.diameter_in) / 2
            strips = [(low, centre - radius), (centre + radius, high)]
    area = sum((e - s) * b for s, e in strips)
    axis = Fraction(sum((e - s) * b * (e + s) / 2 for s, e in strips) / area)
    total = Fraction(0)
    for s, e in strips:
        height, arm = e - s, (e + s) / 2 - axis
        total += b * height * (height * height / 12 + arm * arm)
    return total


def by_unit_load(losses: tuple[Loss, ...], w: Fraction, L: Fraction, at: Fraction) -> Fraction:
    """y = integral of M m/(EI) over a simple span; Simpson's rule is exact for the cubic in each stretch."""
    edges = {Fraction(0), L, at}
    for loss in losses:
        edges |= {min(max(Fraction(x), Fraction(0)), L) for x in (loss.from_in, loss.to_in)}
    total = Fraction(0)
    for a, b in pairwise(sorted(edges)):
        middle = (a + b) / 2

        def product(x: Fraction) -> Fraction:
            unit = x * (L - at) / L if x <= at else at * (L - x) / L
            return w * x * (L - x) / 2 * unit

        area = (b - a) / 6 * (product(a) + 4 * product(middle) + product(b))
        total += area / (E_PSI * I_left(losses, middle))
    return total


def dead_deflections(made: Scenario) -> dict[float, float]:
    """Deflection of the dead load at each station, from the engine."""
    computed = compute(made)
    env = computed.envelope
    y = env.effects.sums["dead"][0][0, env.layout.y]
    return {round(float(x), 6): float(v) for x, v in zip(computed.mesh.x[0], y, strict=True)}


@pytest.mark.parametrize("losses", SETS, ids=range(len(SETS)))
def test_simple_span_by_unit_loads(losses: tuple[Loss, ...]) -> None:
    found = dead_deflections(scenario(losses=losses))
    assert len(found) >= 41
    for at in (8, 20, 60, 80, 100, 152):
        expected = by_unit_load(losses, DEAD, Fraction(160), Fraction(at))
        assert found[float(at)] == pytest.approx(float(expected), rel=1e-9)


@pytest.mark.parametrize("losses", SETS, ids=range(len(SETS)))
def test_live_and_total_deflection_are_told_from_it(losses: tuple[Loss, ...]) -> None:
    made = scenario(losses=losses)
    found = {c.check: c for c in judge(made, compute(made)).checks if "deflection" in c.check}
    live = found["live deflection"]
    assert live.at_in is not None
    at = Fraction(live.at_in).limit_denominator(1000)
    y = by_unit_load(losses, LIVE, Fraction(160), at)
    assert live.demand == pytest.approx(float(y), rel=1e-9)
    assert live.ratio == pytest.approx(float(y / (Fraction(160) / 360)), rel=1e-9)
    # no place bends farther than the one that is told, to the grid's step
    most = max(by_unit_load(losses, LIVE, Fraction(160), Fraction(x)) for x in range(60, 101))
    assert float(y) <= float(most) * (1 + 1e-12)
    assert float(y) == pytest.approx(float(most), rel=2e-3)
    # KCR 1.5 on the dead load, L/240 (NDS 3.5.2)
    total = found["total deflection"]
    assert total.ratio == pytest.approx(float((y * DEAD / LIVE * Fraction(3, 2) + y) / (Fraction(160) / 240)), rel=1e-9)


def test_a_half_depth_char_by_a_closed_form() -> None:
    # I2 over the middle half, I1 outside, from M = w x (L - x)/2:
    # y = w L^4/E (5/384/I2 + (1/I1 - 1/I2) k), k = 2 integral_0^(1/4) xi^2 (1 - xi)/4 = 13/6144
    char = Loss("char 1", "char", 40.0, 120.0, bottom_in=4.625)
    I1 = B * D * D * D / 12
    I2 = I1 / 8
    y = DEAD * 160**4 / E_PSI * (Fraction(5, 384) / I2 + (1 / I1 - 1 / I2) * Fraction(13, 6144))
    assert dead_deflections(scenario(losses=(char,)))[80.0] == pytest.approx(float(y), rel=1e-9)
    assert float(by_unit_load((char,), DEAD, Fraction(160), Fraction(80))) == pytest.approx(float(y), rel=1e-12)


MEMBERS = [
    ((160.0, 120.0), 0.0, 0.0),
    ((120.0, 160.0, 80.0), 0.0, 0.0),
    ((160.0,), 0.0, 40.0),
    ((80.0, 120.0), 40.0, 40.0),
]


@pytest.mark.parametrize("losses", SETS[1:], ids=range(len(SETS) - 1))
@pytest.mark.parametrize(("spans", "left", "right"), MEMBERS, ids=range(len(MEMBERS)))
def test_continuous_and_overhanging_members_by_direct_stiffness(
    spans: tuple[float, ...], left: float, right: float, losses: tuple[Loss, ...]
) -> None:
    made = scenario(spans_in=spans, overhang_left_in=left, overhang_right_in=right, losses=losses)
    supports = [Fraction(int(x)) for x in made.supports_in]
    ends = (-Fraction(int(left)), supports[-1] + Fraction(int(right)))
    edges = {*supports, *ends, *(Fraction(x) for x in range(int(ends[0]), int(ends[1]) + 1, 20))}
    for loss in losses:
        edges |= {min(max(Fraction(x), ends[0]), ends[1]) for x in (loss.from_in, loss.to_in)}
    x = tuple(sorted(edges))
    EI = tuple(E_PSI * I_left(losses, (a + b) / 2) for a, b in pairwise(x))
    held = tuple(x.index(s) for s in supports)
    case = Case(x, EI, held, ((DEAD,) * (len(x) - 1),), ((Fraction(0),) * len(x),))
    answer = stiffness_answer(case)
    computed = compute(made)
    env = computed.envelope
    sums = env.effects.sums["dead"][0][0]
    places = [round(float(v), 6) for v in computed.mesh.x[0]]
    y, M, R = sums[env.layout.y], sums[env.layout.M], sums[env.layout.R]
    scale = max(abs(v) for v in answer.y[0])
    compared = 0
    for n, place in enumerate(x):
        if float(place) not in places:
            continue
        i = places.index(float(place))
        compared += 1
        assert float(y[i]) == pytest.approx(answer.y[0][n], abs=1e-9 * scale)
        assert float(M[i]) == pytest.approx(answer.M[0][n], abs=1e-6)
    assert compared >= 8
    assert list(map(float, R)) == pytest.approx(answer.R[0], rel=1e-9)


def test_bounce_takes_the_even_stiffness_that_bends_as_far() -> None:
    # advice: 225 L^3/(48 E I) with I = 5 w L^4/(384 E y)
    y = max(by_unit_load((CHAR,), LIVE, Fraction(160), Fraction(x)) for x in range(60, 101, 4))
    I = 5 * LIVE * 160**4 / (384 * E_PSI * y)  # noqa: E741
    made = scenario(losses=(CHAR,))
    (point,) = [c for c in judge(made, compute(made)).checks if c.combination == "1 kN"]
    assert point.demand == pytest.approx(float(225 * Fraction(160) ** 3 / (48 * E_PSI * I)), rel=1e-9)
