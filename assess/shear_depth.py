"""Effective depth in shear where a notch, a split or fasteners cut the member down (NDS 3.4.3.2, 3.4.3.3)."""

from __future__ import annotations

import numpy as np
from numpy import minimum, where
from numpy.typing import NDArray

from assess.envelope import Envelope
from assess.mesh import Mesh
from assess.scenario import Loss, Scenario
from assess.section import Section
from assess.trace import Array, Trace, formula
from assess.variants import PartRows


@formula("dv", "in", "NDS 3.4.3.2(a) (3.4-3)")
def tension_notch(dn: Array, d: Array) -> Array:
    """Effective depth at a notch on the tension face.

    A notch of d/4 leaves 0.75 x 0.75^2 = 0.42 of the shear of the whole depth.

    >>> float(tension_notch(7.5, 10.0))
    4.21875
    """
    return dn * (dn / d) ** 2


@formula("dv", "in", "NDS 3.4.3.2(e) (3.4-5)")
def compression_notch(d: Array, dn: Array, e: Array) -> Array:
    """Effective depth at an end notch on the compression face that reaches e past the face of the support.

    >>> float(compression_notch(10.0, 8.0, 4.0)), float(compression_notch(10.0, 8.0, 9.0))
    (9.0, 8.0)
    """
    return where(e <= dn, d - (d - dn) / dn * e, dn)


@formula("dv", "in", "NDS 3.4.3.3(a) (3.4-6)")
def hung_by_fasteners(de: Array, d: Array) -> Array:
    """Effective depth where fasteners hang the member within 5d of its end; de from the unloaded edge.

    >>> float(hung_by_fasteners(8.0, 10.0))
    5.12
    """
    return de * (de / d) ** 2


def shear_depth(
    scenario: Scenario, env: Envelope, mesh: Mesh, section: Section, part: PartRows, trace: Trace | None = None
) -> Array:
    """Effective depth in shear of each segment in each combination [K, C, N-1] [in].

    section   what is left in each segment [K, N-1] or [K, 1]
    returns   depth with which 2/3 Fv' b dv is the shear the segment carries
    source    NDS 2018 3.4.3.2, 3.4.3.3; which face is in tension follows the sign of the moment in the combination
    """
    K, N1 = mesh.mid.shape
    d = part.depth_in[:, None, None]
    dn = np.broadcast_to(section.d_net, (K, N1))[:, None, :]
    depth = np.broadcast_to(dn, (K, len(env.combinations), N1))
    for loss in scenario.losses:
        if loss.kind != "notch":
            continue
        inside = ((mesh.mid > loss.from_in) & (mesh.mid < loss.to_in))[:, None, :]
        tension = _in_tension(env, bottom=loss.bottom_in > 0.0)
        reach = end_reach(scenario, loss)
        if reach is not None and loss.top_in > 0.0:
            allowed = compression_notch.on(trace, d, dn, np.full((1, 1, 1), reach))
            depth = where(inside & ~tension, allowed, depth)
        depth = where(inside & tension, minimum(depth, tension_notch.on(trace, dn, d)), depth)
    start, end = mesh.x[:, :1], mesh.x[:, -1:]
    for split in scenario.splits:
        near = mesh.mid < start + split.length_in if split.end == "left" else mesh.mid > end - split.length_in
        left = np.minimum(split.remaining_in, d)
        depth = where(near[:, None, :], minimum(depth, tension_notch.on(trace, left, d)), depth)
    if scenario.hung_de_in is not None:
        hung = hung_by_fasteners.on(trace, np.minimum(scenario.hung_de_in, d), d)
        for at in (start, end):
            near = np.abs(mesh.mid - at) < part.depth_in[:, None]
            depth = where(near[:, None, :], minimum(depth, hung), depth)
    return depth


def end_reach(scenario: Scenario, loss: Loss) -> float | None:
    """How far a notch at a member's end reaches past the face of the support [in]; None where it is not at one."""
    supports = scenario.supports_in
    if scenario.overhang_left_in == 0.0 and loss.from_in <= scenario.face_in[0]:
        return max(loss.to_in - scenario.face_in[0], 0.0)
    if scenario.overhang_right_in == 0.0 and loss.to_in >= supports[-1] - scenario.face_in[-1]:
        return max(supports[-1] - scenario.face_in[-1] - loss.from_in, 0.0)
    return None


def _in_tension(env: Envelope, bottom: bool) -> NDArray[np.bool_]:
    """Where a face is or can be in tension, at either end of each segment [K, C, N-1]."""
    M = env.layout.M
    if bottom:
        pulled = (env.base_high[:, :, M] > 0.0) | (env.unit_high[:, :, M] > 0.0)
    else:
        pulled = (env.base_low[:, :, M] < 0.0) | (env.unit_low[:, :, M] < 0.0)
    both: NDArray[np.bool_] = pulled[:, :, :-1] | pulled[:, :, 1:]
    return both
