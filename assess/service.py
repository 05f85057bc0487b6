"""Deflection limits and bounce: whether the floor is pleasant, answered apart from whether it is strong."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy import exp, minimum, pi, sqrt

from assess.checks import Checked, finish
from assess.combinations import CONCENTRATED
from assess.envelope import Envelope
from assess.factors import KCR_DRY, KCR_WET
from assess.mesh import Mesh
from assess.scenario import Scenario
from assess.trace import Array, Trace, formula
from assess.variants import Rows

# IBC Table 1604.3 practice: the live sets whose deflection is limited, and what stands in each.
LIVE_SETS = (
    ("L", {"live": 1.0}),
    ("S", {"snow": 1.0}),
    ("Lr", {"roof live": 1.0}),
    ("0.75L+0.75S", {"live": 0.75, "snow": 0.75}),
    ("0.75L+0.75Lr", {"live": 0.75, "roof live": 0.75}),
)
LEAST_FREQUENCY_HZ = 8.0  # EN 1995-1-1 7.3.3 threshold, recalled


@formula("total", "in", "NDS 3.5.2 (3.5-1)")
def long_term(K_cr: float, y_dead: Array, y_live: Array) -> Array:
    """Deflection under long-continued and short-term load.

    >>> float(long_term(1.5, 0.2, 0.3))
    0.6
    """
    return K_cr * y_dead + y_live


@formula("limit", "in", "IBC Table 1604.3, L over the limit chosen")
def deflection_limit(L: Array, divisor: float) -> Array:
    """Greatest deflection allowed; an overhang counts twice its length.

    >>> float(deflection_limit(180.0, 360.0))
    0.5
    """
    return L / divisor


@formula("f", "Hz", "mechanics: simple span of uniform mass")
def frequency(E_prime: Array, I: Array, w: Array, L: Array) -> Array:  # noqa: E741
    """First natural frequency of one member with the floor's dead weight.

    Worked in practice: 2x8 at 16 in, 12 ft, 10 psf, E 1.4e6 psi gives 11.5 Hz.

    >>> round(float(frequency(1.4e6, 47.63, 13.33 / 12, 144.0)), 1)
    11.5
    """
    return (pi / 2) * sqrt(386.4 * E_prime * I / (w * L**4))


@formula("y1", "in", "mechanics: point load at mid-span")
def point_deflection(E_prime: Array, I: Array, L: Array) -> Array:  # noqa: E741
    """Deflection of one member alone under 1 kN (225 lb) at mid-span.

    >>> round(float(point_deflection(1.4e6, 47.63, 144.0)), 4)
    0.2099
    """
    return 225.0 * L**3 / (48 * E_prime * I)


@formula("limit", "in", "ATC Design Guide 1 (1999), recalled; agrees with the NBC Canada limit within 6 %")
def point_limit(L: Array) -> Array:
    """Greatest deflection under 1 kN that people found acceptable, by span.

    >>> round(float(point_limit(168.0)), 4)
    0.0494
    """
    return minimum(0.024 + 0.1 * exp(-0.18 * (L / 12 - 6.4)), 0.080)


def deflection(
    scenario: Scenario, rows: Rows, env: Envelope, mesh: Mesh, trace: Trace | None = None
) -> tuple[Checked, Checked]:
    """Live and total deflection at every station against their limits, downward and upward.

    returns   (live deflection, total deflection), in inches, the combinations being the live sets present
    """
    y = env.layout.y
    effects = env.effects
    sets = [(name, row) for name, row in LIVE_SETS if all(t == env.asked or _stands(effects.sums, t) for t in row)]
    if not sets:
        sets = [(env.asked, {env.asked: 1.0})]
    base_high = np.stack([_sum(effects.sums, row, env.asked, y, 0) for _, row in sets], axis=1)
    base_low = np.stack([_sum(effects.sums, row, env.asked, y, 1) for _, row in sets], axis=1)
    factor = np.array([row.get(env.asked, 0.0) for _, row in sets])[:, None]
    unit_high = factor * effects.unit[0][:, None, y]
    unit_low = factor * effects.unit[1][:, None, y]
    rises = bool((base_low < 0.0).any() or (unit_low < 0.0).any() or (effects.sums["dead"][0][:, y] < 0.0).any())
    K_cr = KCR_WET if scenario.wet else KCR_DRY
    dead = effects.sums["dead"][0][:, None, y]
    length = _reference_length(mesh)[:, None, :]
    found = []
    for name, divisor, clause in (
        ("live deflection", scenario.limit_live, "IBC Table 1604.3"),
        ("total deflection", scenario.limit_total, "IBC Table 1604.3; NDS 3.5.2"),
    ):
        if trace is not None:
            trace.scope = name
        high = base_high + env.size * unit_high
        low = base_low + env.size * unit_low if rises else high
        limit = deflection_limit.on(trace, length, divisor)
        at_base_high, at_base_low = base_high, base_low
        if trace is not None:
            trace.value("y_live", high, "in", "statics", "deflection under the live set")
        if name == "total deflection":
            high = long_term.on(trace, K_cr, dead, high)
            at_base_high = base_high + K_cr * dead
            if rises:
                low = long_term(K_cr, dead, low)
                at_base_low = base_low + K_cr * dead
        demand = np.maximum(high, -low) if rises else high
        room, per_unit = limit - at_base_high, unit_high
        if rises:
            room = np.concatenate([room, limit + at_base_low], axis=2)
            per_unit = np.concatenate([per_unit, -unit_low], axis=2)
        prefix = "" if name == "live deflection" else f"{K_cr:g}D+"
        names = tuple(prefix + label for label, _ in sets)
        found.append(
            finish(
                name, "in", clause, name, names, demand / limit, room, per_unit, demand,
                limit, mesh.x, {},
            )
        )  # fmt: skip
    return found[0], found[1]


def _stands(sums: dict[str, tuple[Array, Array]], load_type: str) -> bool:
    return load_type in sums or (load_type == "live" and "other live" in sums)


def _sum(sums: dict[str, tuple[Array, Array]], row: dict[str, float], asked: str, y: slice, side: int) -> Array:
    total = 0.0 * sums["dead"][0][:, y]
    for load_type, factor in row.items():
        if load_type == "live" and "other live" in sums:
            total = total + factor * sums["other live"][side][:, y]
        if load_type in sums and load_type not in (asked, CONCENTRATED):
            total = total + factor * sums[load_type][side][:, y]
    return total


def _reference_length(mesh: Mesh) -> Array:
    """Length each station's deflection is compared with: its span, or twice its overhang [K, N] or [K, 1] [in]."""
    K = mesh.x.shape[0]
    supports = mesh.supports_in
    if mesh.lengths == 1:
        return supports[:, 1:] - supports[:, :1]
    left, right = supports[:, :1] - mesh.x[:, :1], mesh.x[:, -1:] - supports[:, -1:]
    lengths = supports[:, 1:] - supports[:, :-1]
    if bool((left > 0).all()):
        lengths = np.concatenate([2 * left, lengths], axis=1)
    if bool((right > 0).all()):
        lengths = np.concatenate([lengths, 2 * right], axis=1)
    by_segment = lengths[np.arange(K)[:, None], mesh.segment]
    # A station belongs to the segment on its left, the first one to its right; supports do not move.
    result = np.empty((K, mesh.x.shape[1]))
    result[:, 0], result[:, 1:] = by_segment[:, 0], by_segment
    return result


@dataclass(frozen=True)
class Bounce:
    """Two criteria side by side, advice only: frequency [Hz] and deflection under 1 kN [in], each [K]."""

    frequency_Hz: Array
    point_in: Array
    limit_in: Array


def bounce(rows: Rows, E_prime: Array, I: Array, dead_pli: Array, trace: Trace | None = None) -> Bounce:  # noqa: E741
    """Frequency and 1 kN deflection of the longest span as a simple span, the member alone.

    E_prime, I   [K] [psi], [in4] of the whole section; dead_pli   dead weight [K] [lb/in]
    returns      Bounce; the two disagree by nature and neither enters a verdict
    """
    L = rows.spans_in.max(axis=1)
    if trace is not None:
        trace.scope = "bounce"
    with np.errstate(divide="ignore"):  # nothing to carry has no frequency
        hertz = frequency.on(trace, E_prime, I, dead_pli, L)
    return Bounce(
        hertz,
        point_deflection.on(trace, E_prime, I, L),
        point_limit.on(trace, L),
    )
