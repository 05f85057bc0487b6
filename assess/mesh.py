"""Stations along the member: supports, load edges, both ends of every loss, and a grid between."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise

import numpy as np
from numpy.typing import NDArray

from assess.scenario import Scenario
from assess.trace import Array
from assess.variants import Rows

Index = NDArray[np.intp]

# 40 to a span: a peak of the moment between two stations is missed by at most w h^2/8, 0.06 % of w L^2/8.
GRID = 40
RELIEF_LIMIT = 0.25  # of the loaded length; ours, stricter than the clause
FRACTIONS = np.linspace(0.0, 1.0, GRID + 1)
PATCHES = 12  # places of the concentrated load in a span of a member that is not one simple span


@dataclass(frozen=True)
class Zone:
    """The stretch from a support to d beyond its face, where shear may be relieved (NDS 3.4.3.1)."""

    support: int
    side: int  # +1 to the right of the support, -1 to the left
    face: Index  # [K] station at the face
    end: Index  # [K] station at d from the face


@dataclass(frozen=True)
class Mesh:
    """Stations x [K, N] in increasing order and where the things that matter stand among them.

    mid           [K, N-1] middle of each segment
    supports      [K, S] station of each support; supports_in its place [in]
    segment       [K, N-1] number of the loaded length (left overhang, spans, right overhang) of each segment
    points        station of each point load, [K] each
    patches       (left, right) stations of each place of the concentrated load, [K] each
    """

    x: Array
    mid: Array
    supports: Index
    supports_in: Array
    lengths: int
    segment: Index
    zones: tuple[Zone, ...]
    points: tuple[Index, ...]
    patches: tuple[tuple[Index, Index], ...]


def mesh(scenario: Scenario, rows: Rows) -> Mesh:
    """Stations of every row, with the same count and meaning in each row.

    scenario, rows   the member and its K rows [in]
    returns          Mesh; stations may coincide (segments of no length carry nothing)
    """
    K = rows.count
    supports = np.concatenate([np.zeros((K, 1)), np.cumsum(rows.spans_in, axis=1)], axis=1)
    left = -rows.overhang_left_in[:, None]
    right = supports[:, -1:] + rows.overhang_right_in[:, None]
    depth = rows.parts[0].depth_in[:, None]
    columns: list[Array] = [supports]
    S = supports.shape[1]

    bounds = [supports[:, i : i + 1] for i in range(S)]
    if scenario.overhang_left_in > 0:
        bounds.insert(0, left)
    if scenario.overhang_right_in > 0:
        bounds.append(right)
    placed = not scenario.simple and bool(rows.concentrated_lb.any())
    # The edges of the patch's places are stations too, and as close as the grid they then stand in for.
    fractions = FRACTIONS[:: 2 if placed else 1]
    for start, end in pairwise(bounds):
        columns.append(start + (end - start) * fractions)
    place = sum(column.shape[1] for column in columns)

    zone_places: list[tuple[int, int, int, int]] = []
    for support in range(S):
        for side in (-1, 1):
            neighbour = bounds_beyond(bounds, supports[:, support : support + 1], side)
            if neighbour is None:
                continue
            length = np.abs(neighbour - supports[:, support : support + 1])
            face = np.minimum(rows.face_in[:, support : support + 1], 0.25 * length)
            # On stubby spans the clause would leave next to no shear; relief stops at a quarter of the length.
            end = np.minimum(face + depth, RELIEF_LIMIT * length)
            columns += [
                supports[:, support : support + 1] + side * face,
                supports[:, support : support + 1] + side * end,
            ]
            zone_places.append((support, side, place, place + 1))
            place += 2

    point_places: list[int] = []
    for point in scenario.point_loads:
        columns.append(np.full((K, 1), point.at_in))
        point_places.append(place)
        place += 1
    for line in scenario.line_loads:
        columns.append(np.tile(np.array([line.from_in, line.to_in]), (K, 1)))
        place += 2
    for loss in scenario.losses:
        columns.append(np.tile(np.array([loss.from_in, loss.to_in]), (K, 1)))
        place += 2
    patch_places: list[int] = []
    if placed:
        for edges in patch_edges(bounds, supports, rows.patch_along_in[:, None]):
            columns.append(edges)
            patch_places.append(place)
            place += 2

    keys = np.clip(np.concatenate(columns, axis=1), left, right)
    order = np.argsort(keys, axis=1, kind="stable")
    k = np.arange(K)[:, None]
    x = keys[k, order]
    rank = np.empty_like(order)
    rank[k, order] = np.arange(order.shape[1])
    mid = 0.5 * (x[:, 1:] + x[:, :-1])
    segment = np.zeros(mid.shape, dtype=np.intp)
    for inner in bounds[1:-1]:
        segment += mid > inner
    return Mesh(
        x=x,
        mid=mid,
        supports=rank[:, :S],
        supports_in=supports,
        lengths=len(bounds) - 1,
        segment=segment,
        zones=tuple(Zone(s, side, rank[:, a], rank[:, b]) for s, side, a, b in zone_places),
        points=tuple(rank[:, i] for i in point_places),
        patches=tuple((rank[:, i], rank[:, i + 1]) for i in patch_places),
    )


def bounds_beyond(bounds: list[Array], at: Array, side: int) -> Array | None:
    """The next bound of a loaded length beyond a support on one side; None where the member ends there."""
    for bound in bounds if side > 0 else reversed(bounds):
        if float(side * (bound[0, 0] - at[0, 0])) > 0.0:
            return bound
    return None


def patch_edges(bounds: list[Array], supports: Array, along_in: Array) -> list[Array]:
    """Edges [K, 2] of the concentrated load's patch at the places tried on a continuous or overhanging member.

    In each loaded length the patch's own place runs from end to end with the section it is worst for, as in a
    simple span; it also stands over each inner support.
    """
    edges: list[Array] = []
    width = np.minimum(along_in, bounds[-1] - bounds[0])
    fractions = np.linspace(0.0, 1.0, PATCHES + 1)
    for start, end in pairwise(bounds):
        # A patch longer than the length it stands on reaches over the support, never off the member.
        left = np.clip(start + fractions * (end - start - along_in), bounds[0], bounds[-1] - width)
        edges += [np.stack([a, a + width[:, 0]], axis=1) for a in left.T]
    for i in range(supports.shape[1]):
        at = supports[:, i : i + 1]
        if at[0, 0] > bounds[0][0, 0] and at[0, 0] < bounds[-1][0, 0]:
            a = np.clip(at - width / 2, bounds[0], bounds[-1] - width)
            edges.append(np.concatenate([a, a + width], axis=1))
    return edges
