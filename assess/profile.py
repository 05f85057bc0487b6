"""Utilisation along the member: how much of its bending and shear strength each stretch uses, for the drawing."""

from __future__ import annotations

import numpy as np

from assess.engine import Computed
from assess.judge import worst_row


def profile(computed: Computed, stretches: int) -> tuple[float, ...]:
    """Worst bending or shear ratio in each of a number of equal stretches from end to end.

    computed     what the checks found
    stretches    how many
    returns      ratios of the governing candidate, at most 9.99 each; 9.99 where no capacity exists
    """
    row = worst_row(computed)
    x = computed.mesh.x[row]
    edges = np.linspace(x[0], x[-1], stretches + 1)
    worst = np.zeros(stretches)
    for checked in computed.strength:
        if checked.name not in ("bending", "shear"):
            continue
        if checked.governs_none is not None:
            return (9.99,) * stretches
        k = min(row, checked.demand.shape[0] - 1)
        ratio = (checked.demand[k] / checked.capacity[min(k, checked.capacity.shape[0] - 1)]).max(axis=0)
        at = checked.at_in[row]
        # A station on the border of two stretches counts in both; a stretch without one takes what lies next to it.
        inside = (at[None, :] >= edges[:-1, None] - 1e-9) & (at[None, :] <= edges[1:, None] + 1e-9)
        between = np.interp(0.5 * (edges[1:] + edges[:-1]), at[: len(x)], ratio[: len(x)]) if len(at) == len(x) else 0.0
        worst = np.maximum(worst, np.maximum(np.where(inside, ratio[None, :], 0.0).max(axis=1), between))
    return tuple(float(value) for value in np.minimum(worst, 9.99))
