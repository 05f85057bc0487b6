"""The use's concentrated load on its patch, moved to the worst place for every effect (ASCE 7-16 4.4)."""

from __future__ import annotations

import numpy as np

from assess.layout import Layout, Pair
from assess.mesh import Mesh
from assess.relief import Relief
from assess.scenario import Scenario
from assess.statics import Statics
from assess.trace import Array
from assess.variants import Rows


def concentrated_share(scenario: Scenario, rows: Rows) -> Array:
    """The part of the use's concentrated load that one member takes [K] [lb].

    A member at a spacing takes what lies on its own strip, P min(1, spacing/patch width); a beam takes all.
    Sharing beyond that is not counted. Source: engineering basis section 3; ASCE 7-16 4.4 (footprint 2.5 ft square).
    """
    if scenario.spacing_in is None:
        return rows.concentrated_lb
    return rows.concentrated_lb * np.minimum(1.0, scenario.spacing_in / rows.patch_across_in)


def patch_placed(statics: Statics, first: int, relief: Relief, P_lb: Array) -> Pair:
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


def patch_on_simple_span(mesh: Mesh, layout: Layout, relief: Relief, P_lb: Array, along_in: Array) -> Pair:
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
