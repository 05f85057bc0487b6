"""Shear near supports, relieved of loads within d of the face where NDS 3.4.3.1 allows it."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from assess.mesh import Index, Mesh
from assess.scenario import Scenario
from assess.trace import Array
from assess.variants import Rows


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
    """Whether the member bears on its bottom, is loaded on its top, and no rule asks for full shear (NDS 3.4.3.1)."""
    return scenario.loaded_on_top and scenario.bearing_on != "hanger" and not scenario.full_shear


def relief_of(mesh: Mesh, allowed: bool) -> Relief:
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


def point_relief(mesh: Mesh, rows: Rows, at_in: float) -> Array:
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
