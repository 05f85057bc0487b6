"""Shear along the member (NDS 3.4)."""

from __future__ import annotations

import numpy as np
from numpy import maximum

from assess import adjust
from assess.adjust import Factors
from assess.checks import Checked, finish, names
from assess.envelope import Envelope, note_sum
from assess.mesh import Mesh
from assess.relief import relief_allowed
from assess.scenario import Scenario
from assess.section import Section
from assess.shear_depth import shear_depth
from assess.trace import Array, Trace, formula
from assess.variants import PartRows, Rows


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
        clause = "NDS 3.4.2"
    else:
        b = _both_ends(section.b_net)
        d = _both_ends(section.d_net)
        clause = "NDS 3.4.2"
        if scenario.full_shear:
            depth = shear_depth(scenario, env, mesh, section, part, trace)
            d = np.concatenate([depth, depth], axis=2)
            clause = "NDS 3.4.3.2" if scenario.hung_de_in is None else "NDS 3.4.3.2, 3.4.3.3"
        with np.errstate(divide="ignore", invalid="ignore"):
            demand = shear_stress.on(trace, force, b, d)
        capacity = value * b * d / 1.5
    ratio = demand / value
    # Both signs have their own room; the lesser greatest load of the two stands.
    room = np.concatenate([capacity - env.base_high[:, :, V], capacity + env.base_low[:, :, V]], axis=2)
    per_unit = np.concatenate([env.unit_high[:, :, V], env.unit_low[:, :, V]], axis=2)
    factors = {"CD": env.CD, "CM": f.CM_Fv, "Ct": f.Ct, "Ci": f.Ci}
    at = np.concatenate([mesh.x[:, :-1], mesh.x[:, 1:]], axis=1)
    return finish(
        "shear", "psi", f"{clause}, 3.4.3.1" if relief else clause, "shear", names(env),
        ratio, room, per_unit, demand, value, at, factors, f.none,
    )  # fmt: skip


def _both_ends(values: Array) -> Array:
    """Values of segments at both ends of each [K, 1, 2(N-1)], or [K, 1, 1] where they are the same all along."""
    return (np.concatenate([values, values], axis=1) if values.shape[1] > 1 else values)[:, None, :]
