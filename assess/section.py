"""What is left of a part's section at each place along it: area, second moment, section moduli, neutral axis."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from math import pi

import numpy as np
from numpy.typing import NDArray

from assess.trace import Array, formula

Hole = tuple[Array, Array, NDArray[np.bool_]]

SLIVER = 1e-9  # in; thinner strips between holes are rounding of the holes' edges


@dataclass(frozen=True)
class Section:
    """Section properties, arrays of one shape [..., J]; all are zero where nothing is left.

    A       area [in2]
    I       second moment of area about the neutral axis of what is left [in4]
    S_top   section modulus of the highest fibre left [in3]
    S_bot   section modulus of the lowest fibre left [in3]
    y_bar   height of the neutral axis above the bottom edge of the whole section [in]
    b_net   breadth left [in]
    d_net   depth left, heights of holes taken off, so that shear has the area b_net d_net [in]
    """

    A: Array
    I: Array  # noqa: E741
    S_top: Array
    S_bot: Array
    y_bar: Array
    b_net: Array
    d_net: Array


def net_rectangle(b: Array, d: Array, top: Array, bottom: Array, side: Array, holes: Sequence[Hole]) -> Section:
    """Section left of a rectangle that has lost wood at its edges and sides and has holes through its breadth.

    A hole takes a strip of its full diameter over the whole breadth; holes that overlap, or run out at an edge, take
    their common strip once. The neutral axis is that of what is left. Rule: engineering basis 4 and 5, mechanics.

    b, d       breadth and depth of the whole part, all plies [K, 1] [in]
    top        depth lost from the top edge [K, J] [in]
    bottom     depth lost from the bottom edge [K, J] [in]
    side       breadth lost from the sides in total [K, J] [in]
    holes      for each hole its diameter [K, 1] [in], height of its centre above the bottom edge of the whole
               section [K, 1] [in], and where it is [K, J]
    returns    Section, arrays [K, J]

    A notch d/6 deep leaves b(d - n)^2/6, (5/6)^2 = 0.694 of the whole.

    >>> zero, notch = np.zeros((1, 2)), np.array([[0.0, 1.5]])
    >>> left = net_rectangle(np.array([[1.5]]), np.array([[9.0]]), zero, notch, zero, ())
    >>> left.S_bot[0].tolist(), round(float(left.S_bot[0, 1] / left.S_bot[0, 0]), 3)
    ([20.25, 14.0625], 0.694)
    """
    holes = [hole for hole in holes if hole[2].any()]
    if not (holes or top.any() or bottom.any() or side.any()):
        return _whole(b, d, top.shape)
    low = np.minimum(np.maximum(bottom, 0.0), d)
    high = np.maximum(d - np.maximum(top, 0.0), low)
    breadth = np.maximum(b - np.maximum(side, 0.0), 0.0)
    depth = high - low
    A = breadth * depth
    S = A * depth / 6.0
    there = A > 0.0
    left = Section(A, S * depth / 2.0, S, S.copy(), 0.5 * (low + high) * there, breadth * there, depth * there)
    if holes:
        _pierce(left, low, high, holes)
    return left


def _pierce(left: Section, low: Array, high: Array, holes: Sequence[Hole]) -> None:
    """Take the holes out of a section, in place, at the places that have any.

    Every property is a sum over the strips left, never a difference: a sliver cannot come out below nothing.
    """
    at = np.nonzero(np.logical_or.reduce([present for _, _, present in holes]))
    low, high, breadth = low[at], high[at], left.b_net[at]
    floor, height = _strips(low, high, at, holes)
    middle, ceiling = floor + 0.5 * height, floor + height
    d_net = height.sum(axis=0)
    there = d_net * breadth > 0.0
    y_bar = (height * middle).sum(axis=0) / np.where(there, d_net, 1.0)
    I = breadth * (height * (height**2 / 12.0 + (middle - y_bar) ** 2)).sum(axis=0)  # noqa: E741
    highest = np.where(height > 0.0, ceiling, low).max(axis=0)
    lowest = np.where(height > 0.0, floor, high).min(axis=0)
    left.A[at], left.I[at] = breadth * d_net, I
    left.S_top[at] = I / np.where(there, highest - y_bar, 1.0)
    left.S_bot[at] = I / np.where(there, y_bar - lowest, 1.0)
    left.y_bar[at], left.b_net[at], left.d_net[at] = y_bar * there, breadth * there, d_net * there


def _strips(low: Array, high: Array, at: tuple[NDArray[np.intp], ...], holes: Sequence[Hole]) -> tuple[Array, Array]:
    """Lower edge and height of the strips left between holes, from low to high, one more than holes [H + 1, n].

    Where a hole is not, or runs into the one below, the strip under it has no height.
    """
    starts, ends = np.empty((2, len(holes), len(low)))
    for number, (diameter, height, present) in enumerate(holes):
        centre, radius = height[at[0], 0], 0.5 * diameter[at[0], 0]
        starts[number] = np.where(present[at], centre - radius, low)
        ends[number] = np.where(present[at], centre + radius, low)
    for edges in (starts, ends):
        np.minimum(np.maximum(edges, low, out=edges), high, out=edges)
    if len(holes) > 1:
        order = np.argsort(starts, axis=0, kind="stable")
        starts, ends = np.take_along_axis(starts, order, axis=0), np.take_along_axis(ends, order, axis=0)
    floor = np.maximum.accumulate(np.concatenate([low[None], ends]), axis=0)
    left = np.concatenate([starts, high[None]]) - floor
    left[left < SLIVER] = 0.0
    return floor, left


@formula("A", "in2", "engineering basis 1")
def area(b: Array, d: Array) -> Array:
    """Area of the whole rectangle."""
    return b * d


@formula("S", "in3", "engineering basis 1")
def section_modulus(b: Array, d: Array) -> Array:
    """Section modulus of the whole rectangle."""
    return b * d**2 / 6


@formula("I", "in4", "engineering basis 1")
def second_moment(b: Array, d: Array) -> Array:
    """Moment of inertia of the whole rectangle."""
    return b * d**3 / 12


def _whole(b: Array, d: Array, shape: tuple[int, ...]) -> Section:
    """The rectangle that has lost nothing, at every place."""
    S = section_modulus(b, d)
    values = np.empty((7, *shape))
    for row, value in zip(values, (area(b, d), second_moment(b, d), S, S, d / 2.0, b, d), strict=True):
        row[:] = value
    return Section(*values)


def circle(D: Array) -> Section:
    """Section of a round member, whole: A = pi D^2/4, S = pi D^3/32, I = pi D^4/64 (engineering basis 1).

    D          diameter, any shape [in]
    returns    Section of the same shape; b_net is the breadth of a rectangle of the same depth and area, pi D/4

    >>> log = circle(np.array([[8.0]]))
    >>> round(float(log.A[0, 0]), 2), round(float(log.S_bot[0, 0]), 2), round(float(log.I[0, 0]), 2)
    (50.27, 50.27, 201.06)
    """
    A = pi * D**2 / 4.0
    S = A * D / 8.0
    return Section(A, S * D / 2.0, S, S, D / 2.0, pi * D / 4.0, D)
