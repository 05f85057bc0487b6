"""Effects summed into combinations and enveloped over patterns, kept linear in the load that is asked for."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from assess.combinations import CONCENTRATED, Combination, combinations
from assess.effects import Effects
from assess.layout import Layout
from assess.scenario import Scenario
from assess.trace import Array, Trace
from assess.variants import Rows

SYMBOLS = {
    "dead": "D",
    "live": "L",
    "other live": "Lo",
    CONCENTRATED: "Lc",
    "roof live": "Lr",
    "snow": "S",
    "construction": "C",
    "wind": "W",
}


@dataclass(frozen=True)
class Envelope:
    """Highest and lowest effect of each combination, base + size x unit, arrays [K, C, Q].

    asked    the load type whose greatest size is solved for: 'live', or 'snow' or 'roof live' on a roof
    size     its size at the readings [K, 1, 1] [lb/in]
    """

    layout: Layout
    combinations: tuple[Combination, ...]
    CD: Array
    asked: str
    size: Array
    base_high: Array
    base_low: Array
    unit_high: Array
    unit_low: Array
    effects: Effects

    def high(self, part: slice) -> Array:
        """Highest effect at the readings [K, C, n]."""
        return self.base_high[:, :, part] + self.size * self.unit_high[:, :, part]

    def low(self, part: slice) -> Array:
        """Lowest effect at the readings [K, C, n]."""
        return self.base_low[:, :, part] + self.size * self.unit_low[:, :, part]


def load_types(scenario: Scenario) -> frozenset[str]:
    """Load types that stand on the member; any live load counts as 'live'.

    >>> sorted(SYMBOLS)[0]
    'concentrated'
    """
    present = {"dead"} | scenario.typed_loads
    if scenario.live is not None:
        present.add("live")
        if scenario.live.concentrated_lb or (scenario.present is not None and scenario.present.concentrated_lb):
            present.add(CONCENTRATED)
    if scenario.snow_psf:
        present.add("snow")
    if scenario.roof_live_psf:
        present.add("roof live")
    return frozenset(present)


def coefficient(combination: Combination, load_type: str) -> float:
    """Coefficient of a load type; live loads beside the use's uniform one stay under the concentrated load too."""
    if load_type == "other live":
        return combination.of("live") + combination.of(CONCENTRATED)
    return combination.of(load_type)


def envelope(scenario: Scenario, rows: Rows, effects: Effects) -> Envelope:
    """Sum the effects into the combinations of ASCE 7-16 2.4.1.

    returns   Envelope over K rows and C combinations
    """
    listed = combinations(load_types(scenario))
    asked, psf = asked_load(scenario, rows)
    K, Q = effects.unit[0].shape
    C = len(listed)
    base_high, base_low = np.zeros((K, C, Q)), np.zeros((K, C, Q))
    for load_type, (high, low) in effects.sums.items():
        if load_type == asked and load_type != "live":
            continue
        factors = np.array([coefficient(c, load_type) for c in listed])[:, None]
        base_high += factors * high[:, None, :]
        base_low += factors * low[:, None, :]
    factors = np.array([c.of(asked) for c in listed])[:, None]
    return Envelope(
        layout=effects.layout,
        combinations=listed,
        CD=np.array([c.CD for c in listed]).reshape(1, C, 1),
        asked=asked,
        size=(psf * rows.tributary_in / 144.0)[:, None, None],
        base_high=base_high,
        base_low=base_low,
        unit_high=factors * effects.unit[0][:, None, :],
        unit_low=factors * effects.unit[1][:, None, :],
        effects=effects,
    )


def asked_load(scenario: Scenario, rows: Rows) -> tuple[str, Array]:
    """The load whose greatest size is reported, and its size at the readings [K] [psf].

    A floor: the use's uniform live load. A roof: snow, or roof live load where that is the greater.
    """
    if scenario.live is not None:
        return "live", rows.live_psf
    if scenario.roof_live_psf > scenario.snow_psf:
        return "roof live", np.full(rows.count, scenario.roof_live_psf)
    return "snow", np.full(rows.count, scenario.snow_psf)


def note_sum(
    trace: Trace | None, envelope: Envelope, symbol: str, unit: str, part: slice, high: bool, meaning: str
) -> None:
    """Leave the sum of one effect in the trace, term by term as `envelope` adds it."""
    if trace is None:
        return
    side = 0 if high else 1
    inputs: dict[str, Array | float] = {}
    terms = []
    for load_type, pair in envelope.effects.sums.items():
        if load_type == envelope.asked and load_type != "live":
            continue
        name = SYMBOLS[load_type]
        inputs[f"c_{name}"] = np.array([coefficient(c, load_type) for c in envelope.combinations]).reshape(1, -1, 1)
        inputs[f"{symbol}_{name}"] = pair[side][:, None, part]
        terms.append(f"c_{name} * {symbol}_{name}")
    name = SYMBOLS[envelope.asked]
    inputs[f"c_{name}"] = np.array([c.of(envelope.asked) for c in envelope.combinations]).reshape(1, -1, 1)
    inputs[f"w_{name}"] = envelope.size
    inputs[f"{symbol.lower()}_{name}"] = envelope.effects.unit[side][:, None, part]
    terms.append(f"c_{name} * w_{name} * {symbol.lower()}_{name}")
    total = envelope.high(part) if high else envelope.low(part)
    trace.note(symbol, " + ".join(terms), unit, "ASCE 7-16 2.4.1; statics", inputs, total, meaning)
