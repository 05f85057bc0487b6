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

NEAR_END = 5.0  # depths from the member's end within which fasteners count as at it
ROUNDING_IN = 1e-9


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
              (beside every support where fasteners hang the member)
    source    NDS 2018 3.4.3.2, 3.4.3.3; which face is in tension follows the sign of the moment in the combination
    """
    K, N1 = mesh.mid.shape
    d = part.depth_in[:, None, None]
    dn = np.broadcast_to(section.d_net, (K, N1))[:, None, :]
    depth = np.broadcast_to(dn, (K, len(env.combinations), N1))
    notches = [loss for loss in scenario.losses if loss.kind == "notch"]
    # What a compression notch gives back comes first: every other rule then takes off what it must.
    for loss in notches:
        reach = end_reach(scenario, loss)
        if reach is None or loss.top_in == 0.0:
            continue
        # The equation is for a notch and nothing else: where more is gone, no depth is given back.
        alone = np.abs(dn - (d - loss.top_in)) < ROUNDING_IN
        given = _inside(mesh, loss) & ~_in_tension(env, bottom=False) & alone
        allowed = compression_notch.on(trace, d, dn, np.full((1, 1, 1), reach))
        depth = where(given, allowed, depth)
    for loss in notches:
        pulled = _inside(mesh, loss) & _in_tension(env, bottom=loss.bottom_in > 0.0)
        depth = where(pulled, minimum(depth, tension_notch.on(trace, dn, d)), depth)
    start, end = mesh.x[:, :1], mesh.x[:, -1:]
    for split in scenario.splits:
        # A segment the split reaches into at all is split: the split's end need not be a station.
        if split.end == "left":
            near = mesh.x[:, :-1] < start + split.length_in
        else:
            near = mesh.x[:, 1:] > end - split.length_in
        left = minimum(split.remaining_in, dn)
        depth = where(near[:, None, :], minimum(depth, tension_notch.on(trace, left, d)), depth)
    if scenario.hung_de_in is not None:
        de = minimum(scenario.hung_de_in, dn)
        hung = hung_by_fasteners.on(trace, de, d)
        for support in mesh.supports_in.T[:, :, None]:
            beside = np.abs(mesh.mid - support) < part.depth_in[:, None]
            at_end = np.minimum(support - start, end - support) < NEAR_END * part.depth_in[:, None]
            depth = where(beside[:, None, :], minimum(depth, where(at_end[:, None, :], hung, de)), depth)
    return depth


def end_reach(scenario: Scenario, loss: Loss) -> float | None:
    """How far a notch at a member's end reaches past the face of the support [in]; None where it is not at one."""
    supports = scenario.supports_in
    if scenario.overhang_left_in == 0.0 and loss.from_in <= scenario.face_in[0]:
        return max(loss.to_in - scenario.face_in[0], 0.0)
    if scenario.overhang_right_in == 0.0 and loss.to_in >= supports[-1] - scenario.face_in[-1]:
        return max(supports[-1] - scenario.face_in[-1] - loss.from_in, 0.0)
    return None


def _inside(mesh: Mesh, loss: Loss) -> NDArray[np.bool_]:
    """Segments that lie in a loss [K, 1, N-1]."""
    inside: NDArray[np.bool_] = (mesh.mid > loss.from_in) & (mesh.mid < loss.to_in)
    return inside[:, None, :]


def _in_tension(env: Envelope, bottom: bool) -> NDArray[np.bool_]:
    """Where a face is or can be in tension, at either end of each segment [K, C, N-1]."""
    M = env.layout.M
    if bottom:
        pulled = (env.base_high[:, :, M] > 0.0) | (env.unit_high[:, :, M] > 0.0)
    else:
        pulled = (env.base_low[:, :, M] < 0.0) | (env.unit_low[:, :, M] < 0.0)
    both: NDArray[np.bool_] = pulled[:, :, :-1] | pulled[:, :, 1:]
    return both
