"""Utilisation along the member: how much of its bending and shear strength each stretch uses, for the drawing."""

from __future__ import annotations

import numpy as np

from assess.engine import Computed
from assess.judge import worst_row

MOST = 9.99  # shown for a ratio beyond it, and where no capacity exists


def profile(computed: Computed, stretches: int) -> tuple[float, ...]:
    """Worst bending or shear ratio in each of a number of equal stretches from end to end.

    computed     what the checks found
    stretches    how many
    returns      ratios of the governing candidate, at most 9.99 each; 9.99 where no capacity exists
    """
    row = worst_row(computed)
    x = computed.mesh.x[row]
    edges = np.linspace(x[0], x[-1], stretches + 1)
    middles = 0.5 * (edges[1:] + edges[:-1])
    worst = np.zeros(stretches)
    for checked in computed.strength:
        if checked.name not in ("bending", "shear"):
            continue
        if checked.governs_none is not None:
            return (MOST,) * stretches
        demand = checked.demand[min(row, checked.demand.shape[0] - 1)]
        capacity = checked.capacity[min(row, checked.capacity.shape[0] - 1)]
        # Shear stands twice in the list, for both sides of each station: the greater counts.
        at, station = np.unique(checked.at_in[row], return_inverse=True)
        ratio = np.zeros(len(at))
        np.maximum.at(ratio, station.ravel(), (demand / capacity).max(axis=0))
        # A station on the border of two stretches counts in both; a stretch without one takes what lies between.
        inside = (at[None, :] >= edges[:-1, None] - 1e-9) & (at[None, :] <= edges[1:, None] + 1e-9)
        at_stations = np.where(inside, ratio[None, :], 0.0).max(axis=1)
        worst = np.maximum(worst, np.where(inside.any(axis=1), at_stations, np.interp(middles, at, ratio)))
    return tuple(float(value) for value in np.minimum(worst, MOST))
