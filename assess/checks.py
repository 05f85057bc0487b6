"""A check reduced to its worst place and greatest load, and bending along the member (NDS 3.3)."""

from __future__ import annotations

from dataclasses import dataclass, replace

import numpy as np
from numpy.typing import NDArray

from assess import adjust
from assess.adjust import Factors
from assess.combinations import CONCENTRATED
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
    with np.errstate(divide="ignore", invalid="ignore", over="ignore"):
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
    if trace is not None and scenario.losses:
        trace.value("S", S, "in3", "what is left of the section here", "section modulus at the weaker extreme fibre")
    M = env.layout.M
    # Buckling sideways is resisted by the least breadth anywhere; the standard is silent on weakened sections.
    held = part
    if scenario.losses:
        share = (section.b_net.min(axis=1) / part.breadth_in).clip(1e-6, 1.0)
        held = replace(part, stability_in=part.stability_in * share)
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
        value = adjust.bending_value(scenario, held, f, star, sagging, uniform, mesh.x, mesh.supports_in, trace)
        moment = base + env.size * unit
        with np.errstate(divide="ignore", invalid="ignore"):  # nothing may be left of the section
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
