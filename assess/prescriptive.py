"""Prescriptive limits on notches and holes, on the actual depth: reported beside the ratios, never a verdict."""

from __future__ import annotations

from itertools import pairwise
from math import hypot

from assess.finding import Check
from assess.scenario import Loss, Scenario
from assess.shear_depth import end_reach

CLAUSE = "IRC R502.8.1; NDS 4.4.3"
CLEAR_IN = 2.0  # between a hole and an edge, another hole or a notch
THICK_IN = 3.5  # at least as thick: no notch on the tension face but at the ends


def prescriptive(scenario: Scenario) -> tuple[Check, ...]:
    """Every limit that applies to a notch or hole of the member, measured value beside the limit.

    returns   Checks named 'prescriptive'; ratio above 1, or none where nothing is allowed, is a breach
    source    IRC R502.8.1, NDS 2018 4.4.3: end notch d/4; other notches d/6 deep, d/3 long, none in the middle third;
              holes d/3, 2 in clear of edges and of other cuts; actual depth
    """
    part = scenario.parts[0]
    found: list[Check] = []
    for loss in scenario.losses:
        if loss.kind == "notch":
            found += _notch(scenario, loss, part.depth_in, part.width_in)
        elif loss.kind == "hole":
            found += _hole(scenario, loss, part.depth_in)
    return tuple(found)


def _notch(scenario: Scenario, loss: Loss, d: float, b: float) -> list[Check]:
    depth, length = max(loss.top_in, loss.bottom_in), loss.to_in - loss.from_in
    at_end = end_reach(scenario, loss) is not None
    if at_end:
        found = [_most(f"{loss.name}: end notch depth", depth, d / 4, loss.from_in)]
    else:
        found = [
            _most(f"{loss.name}: depth", depth, d / 6, loss.from_in),
            _most(f"{loss.name}: length", length, d / 3, loss.from_in),
        ]
    for start, end in pairwise(scenario.supports_in):
        third = (end - start) / 3
        if loss.to_in > start + third and loss.from_in < end - third:
            found.append(_never(f"{loss.name}: in the middle third", depth, loss.from_in))
    if not at_end and b >= THICK_IN and _tension_face(scenario, loss):
        found.append(_never(f"{loss.name}: on the tension face", depth, loss.from_in))
    return found


def _tension_face(scenario: Scenario, loss: Loss) -> bool:
    """Whether a notch is on the face that loads pull: the bottom in spans, the top over inner supports and outside."""
    supports = scenario.supports_in
    if loss.bottom_in > 0.0:
        return loss.to_in > 0.0 and loss.from_in < supports[-1]
    outside = (loss.from_in < 0.0 and scenario.overhang_left_in > 0.0) or (
        loss.to_in > supports[-1] and scenario.overhang_right_in > 0.0
    )
    return outside or any(loss.from_in < support < loss.to_in for support in supports[1:-1])


def _hole(scenario: Scenario, loss: Loss, d: float) -> list[Check]:
    radius, centre = loss.diameter_in / 2, (loss.from_in + loss.to_in) / 2
    to_edge = min(loss.height_in - radius, d - loss.height_in - radius)
    found = [
        _most(f"{loss.name}: diameter", loss.diameter_in, d / 3, centre),
        _least(f"{loss.name}: clear of the edges", to_edge, CLEAR_IN, centre),
    ]
    for other in scenario.losses:
        if other is not loss and other.kind in ("hole", "notch"):
            gap = _gap(loss, other, d)
            if gap < CLEAR_IN:
                found.append(_least(f"{loss.name}: clear of {other.name}", max(gap, 0.0), CLEAR_IN, centre))
    return found


def _gap(hole: Loss, other: Loss, d: float) -> float:
    """Wood between a hole and another hole or a notch, the shortest way [in]; below 0 where they meet."""
    centre = (hole.from_in + hole.to_in) / 2
    if other.kind == "hole":
        along, across = centre - (other.from_in + other.to_in) / 2, hole.height_in - other.height_in
        return hypot(along, across) - (hole.diameter_in + other.diameter_in) / 2
    along = max(other.from_in - centre, centre - other.to_in, 0.0)
    floor, roof = (0.0, other.bottom_in) if other.bottom_in > 0.0 else (d - other.top_in, d)
    across = max(floor - hole.height_in, hole.height_in - roof, 0.0)
    return hypot(along, across) - hole.diameter_in / 2


def _most(what: str, measured: float, limit: float, at_in: float) -> Check:
    return Check("prescriptive", what, at_in, measured, limit, "in", measured / limit, CLAUSE, {})


def _least(what: str, measured: float, limit: float, at_in: float) -> Check:
    return Check(
        "prescriptive", what, at_in, limit, measured, "in", limit / measured if measured > 0 else None, CLAUSE, {}
    )


def _never(what: str, depth: float, at_in: float) -> Check:
    return Check("prescriptive", what, at_in, depth, 0.0, "in", None, CLAUSE, {})
