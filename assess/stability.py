"""Beam stability factor CL (NDS 3.3.3): effective length, slenderness, Euler stress, each a line of the clause."""

from __future__ import annotations

import numpy as np
from numpy import sqrt, where

from assess.scenario import Edge
from assess.trace import Array, formula

RB_LIMIT = 50.0  # NDS 2018 3.3.3.7
EPSILON_IN = 1e-9


@formula("le", "in", "NDS Table 3.3.3, one span, uniform load, unbraced from end to end")
def le_uniform(lu: Array, d: Array) -> Array:
    """Effective length of a single span under uniform load.

    >>> float(le_uniform(120.0, 10.0))
    225.6
    """
    return where(lu / d < 7, 2.06 * lu, 1.63 * lu + 3 * d)


@formula("le", "in", "NDS Table 3.3.3, cantilever, uniform load")
def le_cantilever_uniform(lu: Array, d: Array) -> Array:
    """Effective length of a cantilever under uniform load.

    >>> float(le_cantilever_uniform(120.0, 10.0))
    138.0
    """
    return where(lu / d < 7, 1.33 * lu, 0.90 * lu + 3 * d)


@formula("le", "in", "NDS Table 3.3.3, note 1: any other loading or bracing")
def le_general(lu: Array, d: Array) -> Array:
    """Effective length for any other case; own weight beside a point load makes it one.

    >>> float(le_general(120.0, 10.0))
    225.6
    >>> float(le_general(160.0, 10.0))
    294.4
    """
    return where(lu / d < 7, 2.06 * lu, where(lu / d <= 14.3, 1.63 * lu + 3 * d, 1.84 * lu))


@formula("RB", "", "NDS 3.3.3.6 (3.3-5)")
def RB(le: Array, d: Array, b: Array) -> Array:
    """Slenderness ratio of a bending member.

    >>> float(RB(225.0, 9.0, 1.5))
    30.0
    """
    return sqrt(le * d / b**2)


@formula("FbE", "psi", "NDS 3.3.3.8")
def FbE(Emin_prime: Array, RB: Array) -> Array:
    """Critical buckling design value for bending.

    >>> float(FbE(600000.0, 30.0))
    800.0
    """
    return 1.20 * Emin_prime / RB**2


@formula("alpha", "", "NDS 3.3.3.8")
def alpha(FbE: Array, Fb_star: Array) -> Array:
    """Ratio of the buckling value to the bending value before CL and Cfu.

    >>> float(alpha(800.0, 1000.0))
    0.8
    """
    return FbE / Fb_star


@formula("CL", "", "NDS 3.3.3.8 (3.3-6)")
def CL(alpha: Array) -> Array:
    """Beam stability factor.

    Checked by hand: alpha 1 gives 2/1.9 - sqrt((2/1.9)^2 - 1/0.95) = 0.8173.

    >>> round(float(CL(1.0)), 4)
    0.8173
    """
    return (1 + alpha) / 1.9 - sqrt(((1 + alpha) / 1.9) ** 2 - alpha / 0.95)


def unbraced_length(x: Array, edge: Edge, supports: Array, ends_held: bool) -> Array:
    """Distance between the points that hold an edge, around each station; 0 where it is held along its length.

    x          stations [K, N] [in], the first and last the member's ends
    edge       how that edge is held
    supports   places of the supports [K, S] [in]; they hold both edges where the ends are held against rotation
    returns    lu [K, N] [in]; at a point that holds, the longer of its two neighbours
    source     NDS 2018 3.3.3.3-3.3.3.5; a free tip of an overhang is not a held point, so lu runs to the tip
    """
    if edge.held:
        return np.zeros_like(x)
    K = x.shape[0]
    first, last = x[:, :1], x[:, -1:]
    points = [supports] if ends_held else []
    if edge.every_in is not None:
        # Braces are taken from the first support on; the last field may be shorter.
        count = int((float(last.max()) - float(first.min())) // edge.every_in) + 1
        points.append(np.arange(1, count + 1) * edge.every_in + supports[:, :1])
        points.append(supports[:, :1] - np.arange(1, count + 1) * edge.every_in)
    if edge.places_in:
        points.append(np.tile(np.array(edge.places_in), (K, 1)))
    if not points:
        return np.broadcast_to(last - first, x.shape)
    held = np.concatenate([first, *[np.clip(p, first, last) for p in points], last], axis=1)[:, None, :]
    at = x[:, :, None]
    low = np.where(held < at - EPSILON_IN, held, -np.inf).max(axis=2)
    high = np.where(held > at + EPSILON_IN, held, np.inf).min(axis=2)
    low, high = np.maximum(low, first), np.minimum(high, last)
    held_here = (np.abs(held - at) <= EPSILON_IN).any(axis=2)
    lu: Array = np.where(held_here, np.maximum(x - low, high - x), high - low)
    return lu
