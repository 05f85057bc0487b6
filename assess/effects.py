"""What each load does along the member: unit cases through the statics, summed and patterned by load type."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from assess.combinations import CONCENTRATED
from assess.mesh import Index, Mesh
from assess.scenario import Scenario, Stage
from assess.statics import Statics, solve
from assess.trace import Array
from assess.variants import Rows

Pair = tuple[Array, Array]  # the highest and the lowest over patterns


@dataclass(frozen=True)
class Layout:
    """Where each effect stands in the last axis: moment, shear, reaction, deflection.

    Shear is given at both ends of each segment: first all left ends, then all right ends.
    """

    stations: int
    supports: int

    @property
    def M(self) -> slice:
        """Moment at each station [lb-in], sagging positive."""
        return slice(0, self.stations)

    @property
    def V(self) -> slice:
        """Shear at the ends of each segment [lb], relieved near supports where NDS 3.4.3.1 allows it."""
        return slice(self.stations, 3 * self.stations - 2)

    @property
    def R(self) -> slice:
        """Reaction at each support [lb], upward positive."""
        start = 3 * self.stations - 2
        return slice(start, start + self.supports)

    @property
    def y(self) -> slice:
        """Deflection at each station [in], downward positive."""
        start = 3 * self.stations - 2 + self.supports
        return slice(start, start + self.stations)


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
    relief = _relief(mesh, relief_allowed(scenario))
    # The places of the concentrated load come last; they are enveloped at once and need no deflection.
    few = w.shape[1] - len(mesh.patches)
    V = np.concatenate([statics.V_right[:, :few, :-1], statics.V_left[:, :few, 1:]], axis=2)
    V_relieved = relief.apply(V)
    if relief.allowed:
        for number, point in enumerate(scenario.point_loads):
            case = mesh.lengths + number
            V_relieved[:, case] = V[:, case] * _point_relief(mesh, rows, point.at_in) * relief.solid
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
            sums[CONCENTRATED] = _patch_on_simple_span(mesh, layout, relief, P_member, rows.patch_along_in[:, None])
        else:
            sums[CONCENTRATED] = _patch_placed(statics, few, relief, P_member)
    return Effects(layout, sums, unit)


def concentrated_share(scenario: Scenario, rows: Rows) -> Array:
    """The part of the use's concentrated load that one member takes [K] [lb].

    A member at a spacing takes what lies on its own strip, P min(1, spacing/patch width); a beam takes all.
    Sharing beyond that is not counted. Source: engineering basis section 3; ASCE 7-16 4.4 (footprint 2.5 ft square).
    """
    if scenario.spacing_in is None:
        return rows.concentrated_lb
    return rows.concentrated_lb * np.minimum(1.0, scenario.spacing_in / rows.patch_across_in)


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


@dataclass(frozen=True)
class Relief:
    """Shear near supports with distributed loads within d of the face left out (NDS 3.4.3.1).

    source   for each shear entry [K, 2(N-1)], the entry it takes its value from: the far end of its zone
    solid    1 for entries of segments that have a length, 0 for the rest: where stations coincide nothing is checked
    allowed  False where the clause does not apply: then every load is counted
    """

    source: Index
    solid: Array
    allowed: bool

    def apply(self, V: Array) -> Array:
        """Relieved shear of [K, C, 2(N-1)] or [K, 2(N-1)]; as it is where no relief is allowed."""
        if not self.allowed:
            return V
        k = np.arange(len(self.source))[:, None]
        if V.ndim == 2:
            taken: Array = V[k, self.source] * self.solid
            return taken
        cases = np.arange(V.shape[1])[:, None]
        return V[k[:, :, None], cases, self.source[:, None, :]] * self.solid[:, None, :]


def relief_allowed(scenario: Scenario) -> bool:
    """Whether the member bears on its bottom and is loaded on its top (NDS 3.4.3.1)."""
    return scenario.loaded_on_top and scenario.bearing_on != "hanger"


def _relief(mesh: Mesh, allowed: bool) -> Relief:
    K, N1 = mesh.mid.shape
    if not allowed:
        return Relief(np.zeros((K, 0), dtype=np.intp), np.ones((K, 1)), False)
    source = np.empty((K, 2 * N1), dtype=np.intp)
    source[:] = np.arange(2 * N1)
    k = np.arange(K)
    for zone in mesh.zones:
        at, end = mesh.x[k, mesh.supports[:, zone.support]], mesh.x[k, zone.end]
        low, high = np.minimum(at, end)[:, None], np.maximum(at, end)[:, None]
        inside = (mesh.mid > low) & (mesh.mid < high)
        # Just before the far end, coming from the support: a load standing at d itself is outside the zone.
        entry = (N1 + zone.end - 1 if zone.side > 0 else zone.end)[:, None]
        for half in (source[:, :N1], source[:, N1:]):
            np.copyto(half, entry, where=inside)
    solid = (mesh.x[:, 1:] > mesh.x[:, :-1]).astype(float)
    return Relief(source, np.concatenate([solid, solid], axis=1), True)


def _point_relief(mesh: Mesh, rows: Rows, at_in: float) -> Array:
    """Factor x/d on the shear of a point load within d of a support's face, between face and load [K, 2(N-1)]."""
    K, N1 = mesh.mid.shape
    factor = np.ones((K, N1))
    k = np.arange(K)
    depth = rows.parts[0].depth_in
    for zone in mesh.zones:
        face, end = mesh.x[k, zone.face], mesh.x[k, zone.end]
        support = mesh.x[k, mesh.supports[:, zone.support]]
        reach = (at_in - face) * zone.side
        within = ((at_in - support) * zone.side >= 0.0) & ((end - at_in) * zone.side >= 0.0)
        low, high = np.minimum(support, at_in)[:, None], np.maximum(support, at_in)[:, None]
        between = (mesh.mid > low) & (mesh.mid < high) & within[:, None]
        factor = np.where(between, np.clip(reach / depth, 0.0, 1.0)[:, None], factor)
    return np.concatenate([factor, factor], axis=1)


def _patch_placed(statics: Statics, first: int, relief: Relief, P_lb: Array) -> Pair:
    """Worst effects of a load P on its patch over all the places tried, each a case of the statics from `first` on."""

    def worst(high: bool) -> Array:
        reduce, clip = (np.max, np.maximum) if high else (np.min, np.minimum)
        M, R = reduce(statics.M[:, first:], axis=1), reduce(statics.R[:, first:], axis=1)
        right, left = reduce(statics.V_right[:, first:], axis=1), reduce(statics.V_left[:, first:], axis=1)
        V = np.concatenate([right[:, :-1], left[:, 1:]], axis=1)
        # Relief follows the shear at the end of the zone, where the patch stands at d from the face.
        parts = [M, relief.apply(V), R, np.zeros_like(M)]
        clipped: Array = clip(np.concatenate(parts, axis=1), 0.0) * P_lb
        return clipped

    return worst(True), worst(False)


def _patch_on_simple_span(mesh: Mesh, layout: Layout, relief: Relief, P_lb: Array, along_in: Array) -> Pair:
    """Worst effects of a load P on a patch of length c moved along one simple span, by influence lines.

    M(x) = P x (L - x)/L^2 (L - c/2), the patch standing at the place that is to its own free run as x is to L;
    V(x) with the patch starting at x; R with the patch at the support. Source: influence lines, statics.
    """
    K = mesh.x.shape[0]
    x = mesh.x
    L = x[np.arange(K), mesh.supports[:, 1]][:, None]
    c = np.minimum(along_in, L)
    M = P_lb * x * (L - x) / L**2 * (L - c / 2)
    ends = np.concatenate([x[:, :-1], x[:, 1:]], axis=1)
    # Deflection limits are checked under the uniform load: y stays nought.
    high, low = np.zeros((2, K, layout.y.stop))
    high[:, layout.M] = M
    high[:, layout.R] = P_lb * (1.0 - c / (2 * L))
    high[:, layout.V] = relief.apply(np.maximum(_patch_shear(ends, L, c, P_lb), 0.0))
    low[:, layout.V] = relief.apply(np.minimum(-_patch_shear(L - ends, L, c, P_lb), 0.0))
    return high, low


def _patch_shear(x: Array, L: Array, c: Array, P_lb: Array) -> Array:
    """Largest shear at x on a simple span under a load P on a patch of length c that stays on the span [lb]."""
    start = np.minimum(x, L - c)
    return P_lb * (1.0 - (start + c / 2) / L) - P_lb * (x - start) / c
