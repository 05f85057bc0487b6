"""Parts side by side deflect together: each takes force as its share of EI, and stages add up."""

from __future__ import annotations

from functools import reduce

import numpy as np

from assess.effects import Effects
from assess.layout import Pair
from assess.trace import Array


def shares(EI_parts: list[Array]) -> list[Array]:
    """Share of each part in every segment, EI over the sum of EI; one part has all of it.

    EI_parts   stiffness of each part [K, N-1] [lb-in2], 0 where the part is absent
    returns    shares [K, N-1], adding up to 1
    source     engineering basis section 8: side-by-side plies share in proportion to EI

    >>> [float(s[0, 0]) for s in shares([np.array([[3.0]]), np.array([[1.0]])])]
    [0.75, 0.25]
    """
    total = reduce(np.add, EI_parts)
    return [EI / total for EI in EI_parts]


def taken(effects: Effects, share: Array) -> Effects:
    """What a part takes of the effects on all: moment and shear by its share, deflection whole.

    effects   effects on all parts together
    share     of the part in every segment [K, N-1]; a station takes the greater of its two sides
    returns   Effects of the part; reactions stay whole, a bearing belongs to the member
    """
    layout = effects.layout
    at_station = np.maximum(
        np.concatenate([share[:, :1], share], axis=1), np.concatenate([share, share[:, -1:]], axis=1)
    )
    both_ends = np.concatenate([share, share], axis=1)
    K, S = share.shape[0], layout.supports
    factor = np.concatenate([at_station, both_ends, np.ones((K, S)), np.ones_like(at_station)], axis=1)

    def scaled(pair: Pair) -> Pair:
        return pair[0] * factor, pair[1] * factor

    return Effects(layout, {kind: scaled(pair) for kind, pair in effects.sums.items()}, scaled(effects.unit))


def added(stages: list[Effects]) -> Effects:
    """Effects of several stages on one part, added load type by load type."""
    first, *rest = stages
    if not rest:
        return first
    sums = dict(first.sums)
    unit = first.unit
    for stage in rest:
        for kind, pair in stage.sums.items():
            held = sums.get(kind)
            sums[kind] = pair if held is None else (held[0] + pair[0], held[1] + pair[1])
        unit = (unit[0] + stage.unit[0], unit[1] + stage.unit[1])
    return Effects(first.layout, sums, unit)
