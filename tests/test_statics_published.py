"""Statics against published beam formulas and hand-worked three-moment equations.

Source: AISC Steel Construction Manual, Tables 3-22c and 3-23; case numbers and formulas recalled from memory, each
following from statics and double integration.
"""

from __future__ import annotations

import numpy as np
import pytest

from assess.statics import Statics, solve

w, P, EI = 7.0, 1100.0, 3.1e8


def beam(
    bounds: list[float], held: list[int], loads: list[float], points: dict[float, float], EI_of: list[float]
) -> tuple[Statics, np.ndarray]:
    """One load case on lengths between bounds, 48 segments to each, with a load per length and point loads."""
    x = [bounds[0]]
    wide, stiff = [], []
    for a, b, load, each in zip(bounds[:-1], bounds[1:], loads, EI_of, strict=True):
        x += [a + (b - a) * i / 48 for i in range(1, 49)]
        wide += [load] * 48
        stiff += [each] * 48
    at = np.array(x)
    force = np.zeros(len(x))
    for place, size in points.items():
        force[int(np.abs(at - place).argmin())] += size
    supports = np.array([48 * i for i in held])
    result = solve(at[None], np.array(stiff)[None], supports, np.array(wide)[None, None], force[None, None])
    return result, at


def at(values: np.ndarray, x: np.ndarray, place: float) -> float:
    found = np.flatnonzero(np.abs(x - place) < 1e-9)
    assert found.size, f"no station at {place}"
    return float(values[0, 0, found[0]])


def test_aisc_table_3_23_case_1_simple_span_uniform_load() -> None:
    s, x = beam([0, 160], [0, 1], [w], {}, [EI])
    assert at(s.M, x, 80) == pytest.approx(w * 160**2 / 8)
    assert at(s.y, x, 80) == pytest.approx(5 * w * 160**4 / (384 * EI))
    assert at(s.y, x, 40) == pytest.approx(w * 40 / (24 * EI) * (160**3 - 2 * 160 * 40**2 + 40**3))
    assert s.V_right[0, 0, 0] == pytest.approx(w * 80)


def test_aisc_table_3_23_cases_7_and_8_point_loads() -> None:
    s, x = beam([0, 160], [0, 1], [0], {80: P}, [EI])
    assert at(s.M, x, 80) == pytest.approx(P * 160 / 4)
    assert at(s.y, x, 80) == pytest.approx(P * 160**3 / (48 * EI))
    s, x = beam([0, 160], [0, 1], [0], {50: P}, [EI])
    assert at(s.M, x, 50) == pytest.approx(P * 50 * 110 / 160)
    assert at(s.y, x, 50) == pytest.approx(P * 50**2 * 110**2 / (3 * EI * 160))
    assert s.R[0, 0].tolist() == pytest.approx([P * 110 / 160, P * 50 / 160])
    assert at(s.V_left, x, 50) - at(s.V_right, x, 50) == pytest.approx(P)


def test_aisc_table_3_23_case_24_overhang_uniform_load() -> None:
    span, a = 144.0, 36.0
    s, x = beam([0, span, span + a], [0, 1], [w, w], {}, [EI, EI])
    assert s.R[0, 0].tolist() == pytest.approx([w / (2 * span) * (span**2 - a**2), w / (2 * span) * (span + a) ** 2])
    assert at(s.M, x, span) == pytest.approx(-w * a**2 / 2)
    assert at(s.y, x, span + a) == pytest.approx(w * a / (24 * EI) * (4 * a**2 * span - span**3 + 3 * a**3))


def test_aisc_table_3_23_case_26_overhang_load_at_end() -> None:
    span, a = 144.0, 36.0
    s, x = beam([0, span, span + a], [0, 1], [0, 0], {span + a: P}, [EI, EI])
    assert s.R[0, 0].tolist() == pytest.approx([-P * a / span, P * (span + a) / span])
    assert at(s.y, x, span + a) == pytest.approx(P * a**2 / (3 * EI) * (span + a))
    # Largest uplift at span/sqrt(3), between stations: 0.06415 P a l^2/EI.
    assert s.y.min() == pytest.approx(-0.06415 * P * a * span**2 / EI, rel=3e-4)


def test_overhang_of_other_stiffness_by_virtual_work() -> None:
    """Tip under P: the span turns by P a l/(3 EI1) at the support, the overhang bends by P a^3/(3 EI2)."""
    span, a = 144.0, 36.0
    s, x = beam([-a, 0, span], [1, 2], [0, 0], {-a: P}, [EI / 5, EI])
    assert at(s.y, x, -a) == pytest.approx(P * a**2 * span / (3 * EI) + P * a**3 / (3 * EI / 5))


def test_aisc_table_3_23_cases_29_and_30_two_spans_one_loaded() -> None:
    l_ = 144.0
    s, x = beam([0, l_, 2 * l_], [0, 1, 2], [w, 0], {}, [EI, EI])
    assert (s.R[0, 0] / (w * l_)).tolist() == pytest.approx([7 / 16, 5 / 8, -1 / 16])
    assert at(s.M, x, l_) == pytest.approx(-w * l_**2 / 16)
    s, x = beam([0, l_, 2 * l_], [0, 1, 2], [0, 0], {l_ / 2: P}, [EI, EI])
    assert (s.R[0, 0] / P).tolist() == pytest.approx([13 / 32, 11 / 16, -3 / 32])
    assert at(s.M, x, l_ / 2) == pytest.approx(13 / 64 * P * l_)
    assert at(s.M, x, l_) == pytest.approx(-3 / 32 * P * l_)


def test_two_equal_spans_uniform_load() -> None:
    """Middle reaction 1.25 w l, moments w l^2/8 over it and 9 w l^2/128 at 3/8 l; half-way down w l^4/192 EI."""
    l_ = 144.0
    s, x = beam([0, l_, 2 * l_], [0, 1, 2], [w, w], {}, [EI, EI])
    assert (s.R[0, 0] / (w * l_)).tolist() == pytest.approx([0.375, 1.25, 0.375])
    assert at(s.M, x, l_) == pytest.approx(-w * l_**2 / 8)
    assert at(s.M, x, 0.375 * l_) == pytest.approx(9 / 128 * w * l_**2)
    assert s.M.max() == pytest.approx(9 / 128 * w * l_**2)
    assert at(s.y, x, l_ / 2) == pytest.approx(w * l_**4 / (192 * EI))
    assert s.y.max() == pytest.approx(w * l_**4 / (184.6 * EI), rel=1e-3)


@pytest.mark.parametrize(
    ("reactions", "over_supports"),
    [
        ([4 / 10, 11 / 10, 11 / 10, 4 / 10], [1 / 10, 1 / 10]),
        ([11 / 28, 32 / 28, 26 / 28, 32 / 28, 11 / 28], [3 / 28, 2 / 28, 3 / 28]),
        ([15 / 38, 43 / 38, 37 / 38, 37 / 38, 43 / 38, 15 / 38], [4 / 38, 3 / 38, 3 / 38, 4 / 38]),
    ],
    ids=["three spans", "four spans", "five spans"],
)
def test_equal_spans_uniform_load(reactions: list[float], over_supports: list[float]) -> None:
    """Three-moment equation in fractions, as in the tables of continuous beams (AISC Manual, Table 3-22c)."""
    l_, S = 120.0, len(reactions)
    s, x = beam([l_ * i for i in range(S)], list(range(S)), [w] * (S - 1), {}, [EI] * (S - 1))
    assert (s.R[0, 0] / (w * l_)).tolist() == pytest.approx(reactions)
    for i, part in enumerate(over_supports, start=1):
        assert at(s.M, x, i * l_) == pytest.approx(-part * w * l_**2)


@pytest.mark.parametrize(
    ("loaded", "first", "second"),
    [((1, 0, 1), -1 / 20, -1 / 20), ((0, 1, 0), -1 / 20, -1 / 20), ((1, 1, 0), -7 / 60, -1 / 30)],
)
def test_three_spans_patterned(loaded: tuple[int, int, int], first: float, second: float) -> None:
    """Support moments over w l^2 of three equal spans partly loaded (AISC Manual, Table 3-22c)."""
    l_ = 120.0
    s, x = beam([0, l_, 2 * l_, 3 * l_], [0, 1, 2, 3], [w * on for on in loaded], {}, [EI] * 3)
    assert at(s.M, x, l_) / (w * l_**2) == pytest.approx(first)
    assert at(s.M, x, 2 * l_) / (w * l_**2) == pytest.approx(second)


def test_three_moment_equation_unequal_spans_and_stiffness() -> None:
    """2 M (l1/I1 + l2/I2) = -(w1 l1^3/I1 + w2 l2^3/I2)/4."""
    l1, l2, w1, w2, EI1, EI2 = 96.0, 192.0, 5.0, 9.0, 2e8, 7e8
    s, x = beam([0, l1, l1 + l2], [0, 1, 2], [w1, w2], {}, [EI1, EI2])
    M = -(w1 * l1**3 / EI1 + w2 * l2**3 / EI2) / 4 / (2 * (l1 / EI1 + l2 / EI2))
    assert at(s.M, x, l1) == pytest.approx(M)
    assert s.R[0, 0, 0] == pytest.approx(w1 * l1 / 2 + M / l1)
