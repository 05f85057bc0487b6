"""What each load does along the member: unit cases through the statics, summed and patterned by load type."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from assess.combinations import CONCENTRATED
from assess.concentrated import concentrated_share, patch_on_simple_span, patch_placed
from assess.layout import Layout, Pair
from assess.mesh import Mesh
from assess.relief import point_relief, relief_allowed, relief_of
from assess.scenario import Scenario, Stage
from assess.statics import solve
from assess.trace import Array
from assess.variants import Rows


@dataclass(frozen=True)
class Effects:
    """Effects by load type, arrays [K, Q] laid out by `layout` (lb, lb-in, in).

    sums   load type -> (highest, lowest) over patterns at full size; the use's uniform load is not among them
    unit   (highest, lowest) under a uniform load of 1 lb/in, each loaded length on or off
    """

    layout: Layout
    sums: dict[str, Pair]
    unit: Pair


def effects(scenario: Scenario, rows: Rows, mesh: Mesh, stage: Stage, EI: Array, own_pli: Array) -> Effects:
    """Effects of every load that comes in a stage, each load type on its own.

    scenario, rows, mesh   the member, its K rows and their stations
    stage                  which loads come in it
    EI                     stiffness of all its parts in each segment [K, N-1] [lb-in2]
    own_pli                own weight [K] [lb/in]
    returns                Effects; live, roof live, snow and construction loads are on or off by loaded length and
                           item (ASCE 7-16 4.3.3), dead and wind loads are always on
    """
    K, N1 = mesh.mid.shape
    N = N1 + 1
    w, P = _cases(scenario, mesh, K, N)
    statics = solve(mesh.x, EI, mesh.supports, w, P)
    layout = Layout(N, mesh.supports.shape[1])
    relief = relief_of(mesh, relief_allowed(scenario))
    # The places of the concentrated load come last; they are enveloped at once and need no deflection.
    few = w.shape[1] - len(mesh.patches)
    V = np.concatenate([statics.V_right[:, :few, :-1], statics.V_left[:, :few, 1:]], axis=2)
    V_relieved = relief.apply(V)
    if relief.allowed:
        for number, point in enumerate(scenario.point_loads):
            case = mesh.lengths + number
            V_relieved[:, case] = V[:, case] * point_relief(mesh, rows, point.at_in) * relief.solid
    elif scenario.point_loads:
        # A load right over a support goes straight into it: between stations at one place there is no shear.
        solid = mesh.x[:, 1:] > mesh.x[:, :-1]
        V_relieved = V * np.concatenate([solid, solid], axis=1)[:, None, :]
    unit_effects = np.concatenate([statics.M[:, :few], V_relieved, statics.R[:, :few], statics.y[:, :few]], axis=2)

    lengths = unit_effects[:, : mesh.lengths]
    together = lengths.sum(axis=1) if mesh.lengths > 1 else lengths[:, 0]
    unit = (np.maximum(lengths, 0.0).sum(axis=1), np.minimum(lengths, 0.0).sum(axis=1))
    if not stage.later:
        unit = (0.0 * unit[0], 0.0 * unit[1])
    sums: dict[str, Pair] = {}
    width = rows.tributary_in[:, None] / 144.0  # psf -> lb/in of member
    dead = together * (rows.dead_psf[:, None] * width + own_pli[:, None])
    if stage.dead != 1.0:
        dead = dead * stage.dead
    sums["dead"] = (dead, dead)
    for load_type, psf in (
        ("other live", rows.partition_psf),
        ("snow", np.full(K, scenario.snow_psf)),
        ("roof live", np.full(K, scenario.roof_live_psf)),
    ):
        if stage.later and bool(psf.any()):
            size = psf[:, None] * width
            _add(sums, load_type, (unit[0] * size, unit[1] * size))
    items = [(p.load_type, p.load_lb) for p in scenario.point_loads]
    items += [(line.load_type, line.load_pli) for line in scenario.line_loads]
    for number, (load_type, amount) in enumerate(items):
        came = stage.dead if load_type == "dead" else float(stage.later)
        effect = unit_effects[:, mesh.lengths + number] * (amount * came)
        pair = (effect, effect) if load_type in ("dead", "wind") else (np.maximum(effect, 0.0), np.minimum(effect, 0.0))
        _add(sums, "other live" if load_type == "live" else load_type, pair)
    if stage.later and bool(rows.concentrated_lb.any()):
        P_member = concentrated_share(scenario, rows)[:, None]
        if scenario.simple:
            sums[CONCENTRATED] = patch_on_simple_span(mesh, layout, relief, P_member, rows.patch_along_in[:, None])
        else:
            sums[CONCENTRATED] = patch_placed(statics, few, relief, P_member)
    return Effects(layout, sums, unit)


def _add(sums: dict[str, Pair], load_type: str, pair: Pair) -> None:
    held = sums.get(load_type)
    sums[load_type] = pair if held is None else (held[0] + pair[0], held[1] + pair[1])


def _cases(scenario: Scenario, mesh: Mesh, K: int, N: int) -> Pair:
    """Unit cases: loaded lengths at 1 lb/in, point loads at 1 lb, line loads at 1 lb/in, patches at 1 lb."""
    lines = scenario.line_loads
    C = mesh.lengths + len(scenario.point_loads) + len(lines) + len(mesh.patches)
    w = np.zeros((K, C, N - 1))
    P = np.zeros((K, C, N))
    for number in range(mesh.lengths):
        w[:, number] = mesh.segment == number
    case = mesh.lengths
    k = np.arange(K)
    for station in mesh.points:
        P[k, case, station] = 1.0
        case += 1
    for line in lines:
        w[:, case] = (mesh.mid > line.from_in) & (mesh.mid < line.to_in)
        case += 1
    for a, b in mesh.patches:
        low, high = mesh.x[k, a], mesh.x[k, b]
        on = (mesh.mid > low[:, None]) & (mesh.mid < high[:, None])
        w[:, case] = on / (high - low)[:, None]
        case += 1
    return w, P
