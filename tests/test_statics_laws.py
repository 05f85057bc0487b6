"""Laws that every beam obeys, over generated members: superposition, mirror, equilibrium, reciprocity, refinement."""

from __future__ import annotations

import numpy as np
from hypothesis import given, settings
from hypothesis import strategies as st

from assess.statics import Statics, solve


@st.composite
def members(draw: st.DrawFn) -> tuple[np.ndarray, np.ndarray, np.ndarray, np.ndarray, np.ndarray]:
    """One variant, two load cases, two to five supports, stepped stiffness, overhangs, stations that may coincide."""
    N = draw(st.integers(5, 14))
    number = st.floats(0.0, 1.0)
    lengths = draw(st.lists(st.sampled_from([0.0, 3.0, 17.5, 48.0, 130.0]), min_size=N - 1, max_size=N - 1))
    count = draw(st.integers(2, min(5, N)))
    supports = sorted(draw(st.lists(st.integers(0, N - 1), min_size=count, max_size=count, unique=True)))
    for s in supports[1:]:
        lengths[s - 1] = max(lengths[s - 1], 24.0)
    EI = [1e7 * 10 ** (2 * draw(number)) for _ in lengths]
    w = [[10 * draw(number) - 2 for _ in lengths] for _ in range(2)]
    P = [[2000 * draw(number) * draw(st.sampled_from([0, 0, 1, -1])) for _ in range(N)] for _ in range(2)]
    x = np.concatenate([[0.0], np.cumsum(lengths)])
    return x[None], np.array(EI)[None], np.array(supports), np.array(w)[None], np.array(P)[None]


laws = settings(derandomize=True, max_examples=50, deadline=None)
Member = tuple[np.ndarray, np.ndarray, np.ndarray, np.ndarray, np.ndarray]


def close(a: np.ndarray, b: np.ndarray, scale: float) -> bool:
    return bool((np.abs(a - b) <= 1e-10 * scale).all())


def scales(s: Statics, x: np.ndarray, w: np.ndarray, P: np.ndarray) -> dict[str, float]:
    """Size of the loads' effects, so that what cancels to nothing (a member held at every station) passes."""
    force = float((np.abs(w) * np.diff(x)[:, None, :]).sum(axis=-1).max() + np.abs(P).sum(axis=-1).max()) + 1e-9
    length = float(x[0, -1] - x[0, 0])
    return {"M": force * length, "V_left": force, "V_right": force, "R": force, "y": float(np.abs(s.y).max()) + 0.01}


@laws
@given(members())
def test_superposition(member: Member) -> None:
    x, EI, supports, w, P = member
    w = np.concatenate([w, w[:, :1] + 2 * w[:, 1:]], axis=1)
    P = np.concatenate([P, P[:, :1] + 2 * P[:, 1:]], axis=1)
    s = solve(x, EI, supports, w, P)
    for name, scale in scales(s, x, w, P).items():
        value = getattr(s, name)
        assert close(value[:, 2], value[:, 0] + 2 * value[:, 1], scale), name


@laws
@given(members())
def test_mirror_image(member: Member) -> None:
    x, EI, supports, w, P = member
    s = solve(x, EI, supports, w, P)
    mirrored = (x[:, -1:] - x[:, ::-1], EI[:, ::-1], (x.shape[1] - 1 - supports)[::-1], w[:, :, ::-1], P[:, :, ::-1])
    m = solve(*mirrored)
    size = scales(s, x, w, P)
    for name in ("M", "R", "y"):
        assert close(getattr(m, name)[:, :, ::-1], getattr(s, name), size[name]), name
    assert close(m.V_left[:, :, ::-1], -s.V_right, size["R"])
    assert close(m.V_right[:, :, ::-1], -s.V_left, size["R"])


@laws
@given(members(), st.data())
def test_load_split_in_two_changes_nothing(member: Member, data: st.DataObject) -> None:
    """Part of a load on a second station at the same place."""
    x, EI, supports, w, P = member
    n = data.draw(st.integers(0, x.shape[1] - 1))
    part = data.draw(st.floats(0.0, 1.0))
    at_end = min(n, EI.shape[1] - 1)
    twice = np.repeat(np.arange(x.shape[1]), np.where(np.arange(x.shape[1]) == n, 2, 1))
    split = P[:, :, twice].copy()
    split[:, :, n] *= part
    split[:, :, n + 1] *= 1 - part
    wide, stiff = np.insert(w, n, w[:, :, at_end], axis=2), np.insert(EI, n, EI[:, at_end], axis=1)
    s = solve(x, EI, supports, w, P)
    t = solve(x[:, twice], stiff, supports + (supports > n), wide, split)
    size = scales(s, x, w, P)
    for name in ("M", "y"):
        value = getattr(t, name)
        assert close(value[:, :, n], value[:, :, n + 1], size[name]), name
        assert close(np.delete(value, n, axis=2), getattr(s, name), size[name]), name
    assert close(t.R, s.R, size["R"])
    assert close(np.delete(t.V_left, n + 1, axis=2), s.V_left, size["R"])
    assert close(np.delete(t.V_right, n, axis=2), s.V_right, size["R"])


@laws
@given(members(), st.data())
def test_one_more_station_changes_nothing(member: Member, data: st.DataObject) -> None:
    x, EI, supports, w, P = member
    n = data.draw(st.integers(1, x.shape[1] - 1))
    place = x[0, n - 1] + data.draw(st.floats(0.0, 1.0)) * (x[0, n] - x[0, n - 1])
    s = solve(x, EI, supports, w, P)
    t = solve(
        np.insert(x, n, place, axis=1),
        np.insert(EI, n, EI[:, n - 1], axis=1),
        supports + (supports >= n),
        np.insert(w, n, w[:, :, n - 1], axis=2),
        np.insert(P, n, 0.0, axis=2),
    )
    for name, scale in scales(s, x, w, P).items():
        value = getattr(t, name)
        assert close(value if name == "R" else np.delete(value, n, axis=2), getattr(s, name), scale), name


@laws
@given(members())
def test_equilibrium(member: Member) -> None:
    x, EI, supports, w, P = member
    s = solve(x, EI, supports, w, P)
    size = scales(s, x, w, P)
    dx, mid = np.diff(x)[:, None, :], 0.5 * (x[:, 1:] + x[:, :-1])[:, None, :]
    load = (w * dx).sum(axis=-1) + P.sum(axis=-1)
    turning = (w * dx * mid).sum(axis=-1) + (P * x[:, None, :]).sum(axis=-1)
    assert close(s.R.sum(axis=-1), load, size["R"])
    assert close((s.R * x[:, None, supports]).sum(axis=-1), turning, size["M"])
    # Along each segment moment gains the mean shear times length; across each station shear falls by its load.
    gained = 0.5 * (s.V_right[:, :, :-1] + s.V_left[:, :, 1:]) * dx
    assert close(np.diff(s.M), gained, size["M"])
    fall = P.copy()
    fall[:, :, supports] -= s.R
    assert close(s.V_left - s.V_right, fall, size["R"])
    assert close(s.M[:, :, [0, -1]], np.zeros(()), size["M"])
    assert close(s.V_left[:, :, 0], np.zeros(()), size["R"])
    assert close(s.V_right[:, :, -1], np.zeros(()), size["R"])
    assert (s.y[:, :, supports] == 0.0).all(), "supports do not move"


@laws
@given(members())
def test_reciprocal_deflections(member: Member) -> None:
    """Maxwell: station i sinks as much under a pound at j as j does under a pound at i."""
    x, EI, supports, _, _ = member
    N = x.shape[1]
    s = solve(x, EI, supports, np.zeros((1, N, N - 1)), np.eye(N)[None])
    assert close(s.y[0], s.y[0].T, float(np.abs(s.y).max()) + 1e-6)
