"""Beam statics: moments, shears, reactions and deflections of many load cases and variants at once, exactly."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from assess.trace import Array


@dataclass(frozen=True)
class Statics:
    """Effects of C load cases on K variants of a member with N stations and S supports.

    M         moment [K, C, N] [lb-in], sagging positive
    V_left    shear just left of each station [K, C, N] [lb], the sum of upward forces to the left
    V_right   the same just right of each station
    R         reaction of each support [K, C, S] [lb], upward positive
    y         deflection [K, C, N] [in], downward positive
    """

    M: Array
    V_left: Array
    V_right: Array
    R: Array
    y: Array


def solve(x: Array, EI: Array, supports: NDArray[np.intp], w: Array, P: Array) -> Statics:
    """Solve a straight member on two or more unyielding supports, for every variant and load case.

    Moments of a member held nowhere (a cantilever from the left end) are added up segment by segment; each support
    then adds a kink. Moments over inner supports follow from the slope being continuous there, which is the
    three-moment equation with the stiffness of each segment: the integral of M h/EI is zero for each hat function
    h, 1 at that support and 0 at its neighbours. The equations are diagonally strong at any span ratio. Within a
    segment M is a parabola, so Simpson's rule is exact for every integral taken and so are the deflections.

    x          stations from left end to right end, both included, never decreasing [K, N] [in]
    EI         stiffness of each segment between stations, above zero [K or 1, N-1] [lb-in2]
    supports   station numbers of the supports from left to right, S >= 2 [S] or [K, S]; ends beyond them overhang
    w          load over each segment, downward [K or 1, C, N-1] [lb/in]
    P          load at each station, downward [K or 1, C, N] [lb]
    returns    Statics; where stations coincide, loads and supports act in the order of their numbers
    raises     ValueError where a stiffness is not above zero or two supports stand at one place
    source     statics; Clapeyron's theorem of three moments; Simpson's rule

    A simple span: w L^2/8 = 18,000 lb-in and 5 w L^4/(384 E I) = 0.054 in.

    >>> x = np.array([[0.0, 60.0, 120.0]])
    >>> beam = solve(x, np.full((1, 2), 5.0e8), np.array([0, 2]), np.full((1, 1, 2), 10.0), np.zeros((1, 1, 3)))
    >>> round(float(beam.M[0, 0, 1]), 6), round(float(beam.y[0, 0, 1]), 9), beam.R[0, 0].tolist()
    (18000.0, 0.054, [600.0, 600.0])
    """
    K, N = x.shape
    C = P.shape[1]
    at = supports if supports.ndim == 1 else supports[0] if len(supports) == 1 else supports
    rows = np.arange(K)[:, None]
    x_s = x[:, at] if at.ndim == 1 else x[rows, at]
    L = x_s[:, 1:] - x_s[:, :-1]
    if not (EI.min() > 0.0 and L.min() > 0.0):
        raise ValueError("statics: every stiffness and every distance between supports must be above zero")

    # Segment n ends at station n and segment 0 has no length: arrays are all N long and can be run through flat.
    dx = np.zeros((K, 1, N))
    np.subtract(x[:, 1:], x[:, :-1], out=dx[:, 0, 1:])
    give = np.zeros((K, 1, N))
    np.divide(dx[:, 0, 1:], EI, out=give[:, 0, 1:])
    # One block for all: taking and giving back many large arrays costs more than the arithmetic.
    M, Q, T, y, W, bow = np.empty((6, K, C, N))
    W[:, :, 0] = 0.0
    np.multiply(w, dx[:, :, 1:], out=W[:, :, 1:])

    # Held nowhere: Q is the load to the left of a point, T its moment about that point (M = -T).
    np.add(P, W, out=Q)
    np.add.accumulate(Q, axis=2, out=Q)
    np.multiply(W, -0.5, out=T)
    T += Q
    T -= P
    T *= dx
    np.add.accumulate(T, axis=2, out=T)
    np.multiply(W, dx * (1.0 / 12.0), out=bow)

    # Each support kinks the moment: M = b h - T, with h a hat function for each support after the first (where b
    # is zero) and, beyond the last, for the right end, where M is zero and so b = T.
    total, tail = Q[:, :, -1].copy(), x[:, -1] - x_s[:, -1]
    chords = _chords(x, x_s, L)
    overhangs = tail.any() or (x_s[:, 0] > x[:, 0]).any()
    h = _hats(x, x_s, L, tail) if overhangs else chords[:, 1:]
    S, J = x_s.shape[1], h.shape[1]
    b = np.empty((K, J, C))
    b[:, -1] = T[:, :, -1]
    if J == S:
        b[:, -2] = T[:, :, -1] - total * tail[:, None]
    if S > 2:
        _three_moments(b, h, T, bow, give, S - 2)
    np.matmul(b.swapaxes(1, 2), h, out=M)
    M -= T

    # The slope of b h between two supports is the sum of the reactions to the left.
    held = (b[:, : S - 1] / L[:, :, None]).swapaxes(1, 2)
    if S > 2:
        held[:, :, 1:] -= (b[:, : S - 2] / L[:, 1:, None]).swapaxes(1, 2)
    R = np.empty((K, C, S))
    R[:, :, -1] = total
    R[:, :, :-1] = held
    R[:, :, 1:] -= held
    passed = (at[..., None] <= np.arange(N)).astype(np.float64)
    V_right = np.matmul(R, passed, out=T)
    V_right -= Q
    V_left = Q
    np.subtract(V_right.reshape(-1)[:-1], W.reshape(-1)[1:], out=V_left.reshape(-1)[1:])
    V_left[:, :, 0] = 0.0

    # Chords from support to support take the place of the slope at the left end; supports do not move.
    rise = _rise(M, bow, dx, give, W)
    held_at = rise[:, :, at] if at.ndim == 1 else rise[rows, :, at].swapaxes(1, 2)
    np.matmul(held_at, chords, out=y)
    y -= rise
    return Statics(M, V_left, V_right, R, y)


def _chords(x: Array, x_s: Array, L: Array) -> Array:
    """Hat functions of all supports [K, S, N], the outer spans' lines carried on over the overhangs."""
    t = x[:, None, :] - x_s[:, :-1, None]
    t /= L[:, :, None]
    np.maximum(t[:, 1:], 0.0, out=t[:, 1:])
    np.minimum(t[:, :-1], 1.0, out=t[:, :-1])
    chords = np.empty((len(x), x_s.shape[1], x.shape[1]))
    np.subtract(1.0, t[:, 0], out=chords[:, 0])
    chords[:, 1:] = t
    chords[:, 1:-1] -= t[:, 1:]
    return chords


def _hats(x: Array, x_s: Array, L: Array, tail: Array) -> Array:
    """Hat functions at the stations [K, J, N]: of each support after the first and, with an overhang, the right end."""
    start = x_s[:, :-1]
    if tail.any():
        # Where one variant has no overhang its hat is zero everywhere; any length will do.
        start, L = x_s, np.concatenate([L, np.where(tail > 0.0, tail, 1.0)[:, None]], axis=1)
    h: Array = x[:, None, :] - start[:, :, None]
    h /= L[:, :, None]
    np.maximum(h, 0.0, out=h)
    np.minimum(h, 1.0, out=h)
    if h.shape[1] > 1:
        h[:, :-1] -= h[:, 1:]
    return h


def _three_moments(b: Array, h: Array, T: Array, bow: Array, give: Array, inner: int) -> None:
    """Fill in b of the inner supports, in place; those of the last support and the right end are known.

    b      kinks [K, J, C]; h hat functions [K, J, N]; T moment of the loads alone [K, C, N]
    bow    w dx^2/12 [K, C, N]; give dx/(E I) [K, 1, N]
    """
    left = np.empty_like(h)
    left.reshape(-1)[0], left.reshape(-1)[1:] = 0.0, h.reshape(-1)[:-1]
    both = left + h
    sixth = give * (1.0 / 6.0)
    at_left, at_right = sixth * (both + left), sixth * (both + h)
    at_right.reshape(-1)[:-1] += at_left.reshape(-1)[1:]
    weight = at_right[:, :inner]
    both *= 0.5 * give
    known = np.matmul(weight, T.swapaxes(1, 2))
    known -= np.matmul(both[:, :inner], bow.swapaxes(1, 2))
    matrix = np.matmul(weight, h[:, : inner + 1].swapaxes(1, 2))
    known -= matrix[:, :, inner:] * b[:, inner : inner + 1]
    b[:, :inner] = known / matrix[:, :, :1] if inner == 1 else np.linalg.solve(matrix[:, :, :inner], known)


def _rise(M: Array, bow: Array, dx: Array, give: Array, room: Array) -> Array:
    """M/EI integrated twice from a level left end, upward [K, C, N], written into `room`; `bow` is used up.

    bow    w dx^2/12 [K, C, N]; dx, give   length and dx/(E I) of each segment [K, 1, N]
    """
    # At the first station of a row M of the row before comes in, and the segment of no length cancels it.
    room.reshape(-1)[0] = 0.0
    np.add(bow.reshape(-1)[1:], M.reshape(-1)[:-1], out=room.reshape(-1)[1:])
    outer, turn = np.add(bow, M, out=bow), room
    turn += outer
    outer += turn
    turn *= 0.5 * give
    outer *= give * (1.0 / 6.0)
    # From its right end, where the slope is the sum of the turns so far, a segment falls short by its own bend.
    rise = np.add.accumulate(turn, axis=2, out=turn)
    rise -= outer
    rise *= dx
    return np.add.accumulate(rise, axis=2, out=rise)
