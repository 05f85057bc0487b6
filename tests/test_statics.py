"""Statics against exact direct stiffness and sympy's Beam, one variant and many."""

from __future__ import annotations

from fractions import Fraction

import numpy as np
import pytest

from assess.statics import Statics, solve
from tests.statics_reference import Answer, Case, generate, stiffness_answer, sympy_answer

# Of the case's peak. Rounding of forces is some hundred additions of doubles. Deflections are integrated from end
# to end before they are tied to the supports: where only a short part of a long member is loaded, digits go.
FORCE_SHARE, DEFLECTION_SHARE = 1e-10, 1e-9


def arrays(case: Case) -> tuple[np.ndarray, np.ndarray, np.ndarray, np.ndarray, np.ndarray]:
    """A case as one variant of float arrays."""
    x, EI, w, P = (np.array(a, dtype=float)[None] for a in (case.x, case.EI, case.w, case.P))
    return x, EI, np.array(case.supports), w, P


def assert_equal(found: Statics, expected: Answer | Statics) -> None:
    for name in ("M", "V_left", "V_right", "R", "y"):
        share = DEFLECTION_SHARE if name == "y" else FORCE_SHARE
        is_value = getattr(found, name)
        should = np.broadcast_to(np.array(getattr(expected, name)), is_value.shape)
        peak = np.abs(should).max(axis=-1, keepdims=True)
        assert np.isfinite(is_value).all(), name
        assert (np.abs(is_value - should) <= share * peak).all(), (name, np.abs((is_value - should) / peak).max())


def kinds(number: int) -> dict[str, bool]:
    return {"several": number % 2 == 1, "stepped": number // 2 % 2 == 1, "overhang": number % 3 == 0}


@pytest.mark.parametrize("block", range(10))
def test_exact_direct_stiffness(block: int) -> None:
    """240 members of 3 load cases: half of several spans, half of stepped stiffness, a third with overhangs."""
    for number in range(24 * block, 24 * block + 24):
        case = generate(number, **kinds(number))
        assert_equal(solve(*arrays(case)), stiffness_answer(case))


@pytest.mark.parametrize("number", range(26))
def test_sympy_beam(number: int) -> None:
    """sympy's own Beam, of one stiffness: half of several spans, a third with overhangs."""
    kind = kinds(number) | {"stepped": False}
    case = generate(1000 + number, **kind, load_cases=1, spans=3, extra=2)
    assert_equal(solve(*arrays(case)), sympy_answer(case))


@pytest.mark.parametrize("several", [False, True])
@pytest.mark.parametrize("overhang", [False, True])
def test_variants_together_as_one_by_one(several: bool, overhang: bool) -> None:
    """Nine members padded to one number of stations, with supports at different stations, solved together."""
    members = []
    for number in range(2000, 2200):
        case = generate(number, several=several, stepped=True, overhang=overhang)
        if len(case.supports) == (3 if several else 2):
            members.append(arrays(case))
    members = members[:9]
    assert len(members) == 9
    N = max(m[0].shape[1] for m in members)
    padded = [pad(m, N) for m in members]
    x, EI, supports, w, P = (np.concatenate([m[i] for m in padded]) for i in range(5))
    together = solve(x, EI, supports, w, P)
    for k, member in enumerate(members):
        alone = solve(*member)
        n = member[0].shape[1]
        for name in ("M", "V_left", "R", "y"):
            got, want = getattr(together, name)[k], getattr(alone, name)[0]
            got = got if name == "R" else got[:, :n]
            assert np.abs(got - want).max() <= FORCE_SHARE * np.abs(want).max(), name


def pad(member: tuple[np.ndarray, ...], N: int) -> tuple[np.ndarray, ...]:
    """The same member with stations repeated at its right end, segments of no length between them."""
    x, EI, supports, w, P = member
    more = N - x.shape[1]
    wide = [(0, 0), (0, 0), (0, more)]
    return (
        np.pad(x, wide[1:], mode="edge"),
        np.pad(EI, wide[1:], mode="edge"),
        supports[None],
        np.pad(w, wide, mode="edge"),
        np.pad(P, wide),
    )


def test_loads_of_one_variant_serve_all() -> None:
    x = np.array([[0.0, 50.0, 120.0], [0.0, 60.0, 144.0]])
    w, P = np.full((1, 2, 2), 3.0), np.array([[[0.0, 9.0, 0.0], [0.0, 0.0, 5.0]]])
    EI = np.array([[1e8, 2e8], [3e8, 1e8]])
    shared = solve(x, EI, np.array([0, 2]), w, P)
    repeated = solve(x, EI, np.array([[0, 2], [0, 2]]), np.repeat(w, 2, axis=0), np.repeat(P, 2, axis=0))
    assert_equal(shared, repeated)


def test_very_unequal_spans() -> None:
    """A 1 ft span between spans of 60 ft, with stiffness stepped 1 to 1000: no digits lost in the equations."""
    x = tuple(Fraction(v) for v in (0, 300, 720, 726, 732, 1000, 1452))
    EI = tuple(Fraction(v) for v in (10**9, 10**6, 10**9, 10**6, 10**9, 10**8))
    loads = (tuple(Fraction(v) for v in (9, 9, 9, 9, 9, 9)), tuple(Fraction(v) for v in (0, 0, 1, 1, 0, 0)))
    case = Case(x, EI, (0, 2, 4, 6), loads, ((Fraction(0),) * 7,) * 2)
    assert_equal(solve(*arrays(case)), stiffness_answer(case))


def test_no_stiffness_or_no_span_is_refused() -> None:
    x, ones = np.array([[0.0, 60.0, 60.0, 120.0]]), np.ones((1, 1, 3))
    force = np.zeros((1, 1, 4))
    for bad in (0.0, -1.0, float("nan")):
        with pytest.raises(ValueError, match="above zero"):
            solve(x, np.array([[1e8, bad, 1e8]]), np.array([0, 3]), ones, force)
    with pytest.raises(ValueError, match="above zero"):
        solve(x, np.full((1, 3), 1e8), np.array([0, 1, 2, 3]), ones, force)


def test_inputs_are_left_as_they_were() -> None:
    given_arrays = arrays(generate(7, several=True, stepped=True, overhang=True))
    before = [a.copy() for a in given_arrays]
    solve(*given_arrays)
    assert all((a == b).all() for a, b in zip(given_arrays, before, strict=True))
