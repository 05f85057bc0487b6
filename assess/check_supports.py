"""What happens at the supports: bearing (NDS 3.10) and uplift."""

from __future__ import annotations

import numpy as np
from numpy import maximum

from assess import adjust
from assess.adjust import Factors
from assess.checks import Checked, finish, names
from assess.envelope import Envelope, note_sum
from assess.mesh import Mesh
from assess.scenario import Scenario
from assess.section import Section
from assess.trace import Array, Trace, formula
from assess.variants import PartRows, Rows


@formula("fc_perp", "psi", "NDS 3.10.2")
def bearing_stress(R: Array, b: Array, lb: Array) -> Array:
    """Compression perpendicular to grain at a support.

    >>> float(bearing_stress(900.0, 1.5, 1.5))
    400.0
    """
    return R / (b * lb)


@formula("Cb", "", "NDS 3.10.4 (3.10-2)")
def bearing_area_factor(lb: Array) -> Array:
    """Bearing area factor, for bearings under 6 in long and 3 in or more from the member's end.

    >>> round(float(bearing_area_factor(1.5)), 2)
    1.25
    """
    return (lb + 0.375) / lb


def bearing(
    scenario: Scenario,
    rows: Rows,
    env: Envelope,
    mesh: Mesh,
    section: Section,
    part: PartRows,
    f: Factors,
    trace: Trace | None = None,
) -> Checked:
    """Compression perpendicular to grain at each support (NDS 3.10.2); no load-duration factor."""
    if trace is not None:
        trace.scope = "bearing"
        note_sum(trace, env, "R", "lb", env.layout.R, True, "reaction at this support")
    R = env.layout.R
    lb = rows.bearing_in[:, None, :]
    supports = mesh.supports_in
    to_end = np.minimum(supports - mesh.x[:, :1], mesh.x[:, -1:] - supports)[:, None, :]
    # 3.10.4: only under 6 in long and 3 in or more between the bearing and the member's end.
    inner = (lb < 6.0) & (to_end - lb / 2 >= 3.0)
    Cb = np.where(inner, bearing_area_factor(lb), 1.0)
    shape = (rows.count, 1, 1)
    value = adjust.Fc_perp_prime.on(trace, part.wood("Fc_perp").reshape(shape), f.CM_Fc, f.Ct, f.Ci_c, Cb)
    b = seat_breadth(rows, mesh, section, part)[:, None, :] if scenario.losses else part.breadth_in.reshape(shape)
    with np.errstate(divide="ignore"):  # nothing may be left over a bearing; that is said as such
        demand = bearing_stress.on(trace, env.high(R), b, lb)
    ratio = demand / value
    factors = {"CM": f.CM_Fc, "Ct": f.Ct, "Ci": f.Ci_c, "Cb": Cb}
    first = scenario.first_support + 1
    reasons = [f.none] if f.none is not None else []
    reasons += [
        f"bearing at support {support + first} is not relied on: {why}" for support, why in scenario.lost_bearings
    ]
    none = "; ".join(reasons) or None
    return finish(
        "bearing", "psi", "NDS 3.10.2", "bearing", names(env), ratio,
        value * b * lb - env.base_high[:, :, R], env.unit_high[:, :, R], demand, value, supports, factors, none,
    )  # fmt: skip


def seat_breadth(rows: Rows, mesh: Mesh, section: Section, part: PartRows) -> Array:
    """Least breadth left over each bearing [K, S] [in]: wood gone from the sides there does not bear."""
    b = np.broadcast_to(section.b_net, mesh.mid.shape)[:, None, :]
    half = np.maximum(rows.bearing_in / 2, 0.75)[:, :, None]
    at = mesh.supports_in[:, :, None]
    over = (mesh.x[:, None, 1:] > at - half) & (mesh.x[:, None, :-1] < at + half)
    least: Array = np.minimum(np.where(over, b, np.inf).min(axis=2), part.breadth_in[:, None])
    return least


@formula("lift", "lb", "ASCE 7-16 2.4.1: 0.6D holds down")
def lifting(R_lift: Array) -> Array:
    """Upward force that the loads put on a support."""
    return -R_lift


@formula("held", "lb", "ASCE 7-16 2.4.1")
def holding(R_D: Array) -> Array:
    """Dead load that may be counted against uplift."""
    return maximum(0.6 * R_D, 0.0)


def uplift(scenario: Scenario, rows: Rows, env: Envelope, mesh: Mesh, trace: Trace | None = None) -> Checked | None:
    """Lifting at a support against 0.6 of its dead reaction; None where nothing lifts.

    source   engineering basis section 3; ASCE 7-16 2.4.1
    """
    R = env.layout.R
    dead = env.effects.sums["dead"][0][:, None, R]
    factors_dead = np.array([c.of("dead") for c in env.combinations]).reshape(1, -1, 1)
    low = env.low(R) - factors_dead * dead
    if not bool((low < 0.0).any()):
        return None
    low[:, :, scenario.hold_down] = 0.0  # held down by what is recorded there
    if not bool((low < 0.0).any()):
        return None
    if trace is not None:
        trace.scope = "uplift"
        trace.value("R_lift", low, "lb", "statics, worst pattern", "reaction of the loads without dead load")
        trace.value("R_D", dead, "lb", "statics", "reaction of the dead load")
    demand = np.maximum(lifting.on(trace, low), 0.0)
    capacity = holding.on(trace, dead)
    with np.errstate(divide="ignore", invalid="ignore"):
        ratio = np.where(demand > 0.0, demand / capacity, 0.0)
    base = env.base_low[:, :, R] - factors_dead * dead
    unit = env.unit_low[:, :, R].copy()
    base[:, :, scenario.hold_down] = unit[:, :, scenario.hold_down] = 0.0
    supports = mesh.supports_in
    labels = tuple(c.name.replace("D+", "0.6D+", 1) if c.name.startswith("D+") else c.name for c in env.combinations)
    return finish(
        "uplift", "lb", "ASCE 7-16 2.4.1", "uplift", labels, ratio, capacity + base, -unit,
        demand, np.broadcast_to(capacity, demand.shape), supports, {},
    )  # fmt: skip
