"""Strength checks along the member: bending, shear, bearing, uplift; each linear in the load that is asked for."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy import maximum
from numpy.typing import NDArray

from assess import adjust
from assess.adjust import Factors
from assess.combinations import CONCENTRATED
from assess.effects import relief_allowed
from assess.envelope import Envelope, note_sum
from assess.mesh import Mesh
from assess.scenario import Scenario
from assess.section import Section
from assess.trace import Array, Trace, formula
from assess.variants import PartRows, Rows


@formula("fb", "psi", "NDS 3.3.2")
def bending_stress(M: Array, S: Array) -> Array:
    """Bending stress at the extreme fibre of what is left of the section.

    >>> round(float(bending_stress(21262.5, 21.390625)), 1)
    994.0
    """
    return M / S


@formula("V", "lb", "statics")
def shear_force(V_max: Array, V_min: Array) -> Array:
    """Shear force, the greater of the two directions."""
    return maximum(V_max, -V_min)


@formula("fv", "psi", "NDS 3.4.2")
def shear_stress(V: Array, b: Array, d: Array) -> Array:
    """Shear stress parallel to grain at mid-depth of a rectangle.

    >>> float(shear_stress(900.0, 1.5, 9.0))
    100.0
    """
    return 1.5 * V / (b * d)


@formula("fv", "psi", "mechanics: circle, 4V/3A")
def shear_stress_round(V: Array, A: Array) -> Array:
    """Shear stress parallel to grain at mid-depth of a circle."""
    return 4 * V / (3 * A)


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


@dataclass(frozen=True)
class Checked:
    """One check over K rows, C combinations and its places: demand over capacity and the load that uses it up.

    ratio      [K, C] worst over the places; inf where no capacity exists
    worst      [K, C] number of the worst place
    greatest   [K, C] greatest size of the asked load [lb/in], inf where it does not act on this check
    demand, capacity   [K, C, J] or less; at_in [K, J]
    factors    name -> [K, C, J] or less
    """

    name: str
    unit: str
    clause: str
    scope: str
    combinations: tuple[str, ...]
    ratio: Array
    worst: NDArray[np.intp]
    greatest: Array
    demand: Array
    capacity: Array
    at_in: Array
    factors: dict[str, Array]
    governs_none: str | None = None


def finish(
    name: str,
    unit: str,
    clause: str,
    scope: str,
    names: tuple[str, ...],
    ratio: Array,
    room: Array,
    per_unit: Array,
    demand: Array,
    capacity: Array,
    at_in: Array,
    factors: dict[str, Array],
    none: str | None = None,
) -> Checked:
    """Reduce a check to its worst place and its greatest load.

    room       capacity - base, in any unit [K, C, J]
    per_unit   effect of a unit of the asked load, same unit [K, C, J]
    """
    worst = ratio.argmax(axis=2)
    high = ratio.max(axis=2)
    # Where the load does nothing, room over nought is endless, or, overused already, minus endless; 0/0 says nothing.
    with np.errstate(divide="ignore", invalid="ignore"):
        greatest = np.maximum(np.fmin.reduce(room / np.abs(per_unit), axis=2), 0.0)
    greatest[np.isnan(greatest)] = np.inf
    if none is not None:
        high, greatest = np.full_like(high, np.inf), np.zeros_like(greatest)
    return Checked(name, unit, clause, scope, names, high, worst, greatest, demand, capacity, at_in, factors, none)


def bending(
    scenario: Scenario,
    rows: Rows,
    env: Envelope,
    mesh: Mesh,
    section: Section,
    part: PartRows,
    f: Factors,
    trace: Trace | None = None,
) -> list[Checked]:
    """Bending at every station, sagging and, where there is any, hogging (NDS 3.3).

    section    what is left of the part in each segment [K, N-1]
    returns    one Checked for each sign of moment that occurs
    """
    if trace is not None:
        trace.scope = "bending"
    CF, shape = f.CF, (rows.count, 1, 1)
    star = adjust.Fb_star.on(trace, part.wood("Fb").reshape(shape), env.CD, f.CM_Fb, f.Ct, CF, f.Ci, f.Cr)
    # A station between two segments is checked with the lesser of their sections.
    S_segment = np.minimum(section.S_top, section.S_bot)
    if S_segment.shape[1] > 1:
        first, last = S_segment[:, :1], S_segment[:, -1:]
        S_segment = np.minimum(np.concatenate([first, S_segment], axis=1), np.concatenate([S_segment, last], axis=1))
    S = S_segment[:, None, :]
    M = env.layout.M
    found = []
    uniform = uniform_only(scenario, env)
    for sagging in (True, False):
        base, unit = (env.base_high, env.unit_high) if sagging else (env.base_low, env.unit_low)
        base, unit = base[:, :, M], unit[:, :, M]
        if not sagging:
            base, unit = -base, -unit
            if not bool((base > 0.0).any() or (unit > 0.0).any()):
                continue
        scope = "bending" if sagging else "bending, hogging"
        if trace is not None:
            trace.scope = scope
            sign = "sagging" if sagging else "hogging (negative)"
            note_sum(trace, env, "M", "lb-in", M, sagging, f"{sign} moment at this place")
        value = adjust.bending_value(scenario, part, f, star, sagging, uniform, mesh.x, mesh.supports_in, trace)
        moment = base + env.size * unit
        demand = bending_stress.on(trace, moment, S)
        ratio = demand / value.value
        none = f.none or no_bending_value(scenario, part)
        if none is None and bool(value.slender.any()):
            over = value.slender & (moment > 0.0)
            if bool(over.any()):
                ratio = np.where(over, np.inf, ratio)
                none = "slenderness RB is over 50 (NDS 3.3.3.7): no bending value exists"
        factors = {
            "CD": env.CD, "CM": f.CM_Fb, "Ct": f.Ct, "CL": value.CL,
            "CF": CF, "Cfu": f.Cfu, "Ci": f.Ci, "Cr": f.Cr,
        }  # fmt: skip
        found.append(
            finish(
                "bending", "psi", "NDS 3.3.1", scope, names(env), ratio, value.value * S - base, unit,
                demand, value.value, mesh.x, factors, none,
            )
        )  # fmt: skip
    return found


def no_bending_value(scenario: Scenario, part: PartRows) -> str | None:
    """Why no bending value exists for want of held ends (NDS 3.3.3.4), or None."""
    if not scenario.ends_held and not part.round and bool((part.depth_in > part.stability_in).any()):
        return "ends are not held against rotation and the member is deeper than broad: no bending value exists"
    return None


def uniform_only(scenario: Scenario, env: Envelope) -> NDArray[np.bool_]:
    """[1, C, 1] True where a combination holds nothing but uniform load over the whole of one simple span."""
    typed = scenario.typed_loads
    flags = [not c.of(CONCENTRATED) and not any(c.of(load_type) for load_type in typed) for c in env.combinations]
    return np.array(flags).reshape(1, -1, 1)


def names(env: Envelope) -> tuple[str, ...]:
    """Names of the combinations, in order."""
    return tuple(c.name for c in env.combinations)


def shear(
    scenario: Scenario,
    rows: Rows,
    env: Envelope,
    mesh: Mesh,
    section: Section,
    part: PartRows,
    f: Factors,
    trace: Trace | None = None,
) -> Checked:
    """Shear at both ends of every segment (NDS 3.4), relieved near supports where 3.4.3.1 allows it."""
    relief = relief_allowed(scenario)
    V = env.layout.V
    if trace is not None:
        trace.scope = "shear"
        where = "loads within d of a support's face left out (3.4.3.1)" if relief else "every load counted"
        note_sum(trace, env, "V_max", "lb", V, True, f"highest shear at this place, {where}")
        note_sum(trace, env, "V_min", "lb", V, False, f"lowest shear at this place, {where}")
    force = shear_force.on(trace, env.high(V), env.low(V))
    shape = (rows.count, 1, 1)
    value = adjust.Fv_prime.on(trace, part.wood("Fv").reshape(shape), env.CD, f.CM_Fv, f.Ct, f.Ci)
    if part.round:
        area = _both_ends(section.A)
        demand = shear_stress_round.on(trace, force, area)
        capacity = value * area * 0.75
    else:
        b, d = _both_ends(section.b_net), _both_ends(section.d_net)
        demand = shear_stress.on(trace, force, b, d)
        capacity = value * b * d / 1.5
    ratio = demand / value
    # Both signs have their own room; the lesser greatest load of the two stands.
    room = np.concatenate([capacity - env.base_high[:, :, V], capacity + env.base_low[:, :, V]], axis=2)
    per_unit = np.concatenate([env.unit_high[:, :, V], env.unit_low[:, :, V]], axis=2)
    factors = {"CD": env.CD, "CM": f.CM_Fv, "Ct": f.Ct, "Ci": f.Ci}
    at = np.concatenate([mesh.x[:, :-1], mesh.x[:, 1:]], axis=1)
    return finish(
        "shear", "psi", "NDS 3.4.2, 3.4.3.1" if relief else "NDS 3.4.2", "shear", names(env),
        ratio, room, per_unit, demand, value, at, factors, f.none,
    )  # fmt: skip


def _both_ends(values: Array) -> Array:
    """Values of segments at both ends of each [K, 1, 2(N-1)], or [K, 1, 1] where they are the same all along."""
    return (np.concatenate([values, values], axis=1) if values.shape[1] > 1 else values)[:, None, :]


def bearing(
    scenario: Scenario,
    rows: Rows,
    env: Envelope,
    mesh: Mesh,
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
    b = part.breadth_in.reshape(shape)
    demand = bearing_stress.on(trace, env.high(R), b, lb)
    ratio = demand / value
    factors = {"CM": f.CM_Fc, "Ct": f.Ct, "Ci": f.Ci_c, "Cb": Cb}
    return finish(
        "bearing", "psi", "NDS 3.10.2", "bearing", names(env), ratio,
        value * b * lb - env.base_high[:, :, R], env.unit_high[:, :, R], demand, value, supports, factors, f.none,
    )  # fmt: skip


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
