"""From the loads and uses as recorded to what stands on the member, in psf, lb and lb/in."""

from __future__ import annotations

from dataclasses import dataclass
from math import cos, radians

from assess.errors import ReadingError
from assess.materials import layer_psf
from assess.record import Member
from assess.record_parts import TypedUse
from assess.reduction import reduction
from assess.scenario import LineLoad, PointLoad, UseLoad
from assess.uses import Use, use_named

PATCH_IN = 30.0  # ASCE 7-16 4.4: 2.5 ft square where no other footprint is stated


@dataclass(frozen=True)
class ResolvedLoads:
    """Loads of a member, and what was taken for granted about them."""

    dead_psf: float
    slope_cos: float
    live: UseLoad | None
    present: UseLoad | None
    points: tuple[PointLoad, ...]
    lines: tuple[LineLoad, ...]
    assumptions: tuple[str, ...]


def resolve_loads(member: Member) -> ResolvedLoads:
    """Loads that stand on a member.

    member    the record, with `dead` given
    returns   ResolvedLoads; dead_psf on the horizontal projection
    raises    ReadingError for an unknown use or layer
    """
    notes: list[str] = []
    slope_cos = cos(radians(member.slope.value)) if member.slope is not None else 1.0
    dead = _dead(member, notes) / slope_cos
    if slope_cos < 1.0:
        notes.append("dead load lies along the slope; snow and roof live load are on the horizontal projection")
    judged, field = (
        (member.proposed_use, "proposed_use")
        if member.proposed_use is not None
        else (member.present_use, "present_use")
    )
    live = _use(member, judged, field, notes) if judged is not None else None
    present = _use(member, member.present_use, "present_use", []) if member.present_use is not None else None
    points = tuple(
        PointLoad(p.name or f"point load {i + 1}", p.type, p.load.value, p.at.value)
        for i, p in enumerate(member.point_loads or ())
    )
    lines = tuple(
        LineLoad(n.name or f"line load {i + 1}", n.type, n.load.value / 12.0, n.from_.value, n.to.value)
        for i, n in enumerate(member.line_loads or ())
    )
    return ResolvedLoads(dead, slope_cos, live, present, points, lines, tuple(notes))


def _dead(member: Member, notes: list[str]) -> float:
    dead = member.dead
    if dead is None:
        raise ReadingError("dead", None, "a reading such as 12 psf, or layers", "is missing")
    if not isinstance(dead, tuple | list):
        return dead.value
    total = 0.0
    for layer in dead:
        if layer.load is not None:
            psf, source = layer.load.value, "as read"
        else:
            psf, source, note = layer_psf(layer.layer, layer.thickness.value if layer.thickness is not None else None)
            if note:
                notes.append(note)
        notes.append(f"{layer.layer}: {psf:g} psf ({source})")
        total += psf
    return total


def _use(member: Member, use: str | TypedUse, field: str, notes: list[str]) -> UseLoad:
    patch = [reading.value for reading in member.concentrated_on] if member.concentrated_on else None
    if not isinstance(use, str):
        concentrated = use.concentrated.value if use.concentrated is not None else None
        along, across = patch or (PATCH_IN, PATCH_IN)
        partition = _partition(member, 0.0, notes)
        if member.reduce:
            notes.append("no live-load reduction: it comes with a named use only")
        return UseLoad(use.name or "typed use", use.live.value, partition, concentrated, along, across, "as typed")
    named = use_named(use)
    along, across = patch or named.concentrated_patch_in
    partition = _partition(member, named.partition_psf, notes)
    notes.append(f"{named.name}: {named.uniform_psf:g} psf ({named.source})")
    if named.concentrated_lb:
        notes.append(
            f"concentrated load {named.concentrated_lb:,.0f} lb on {along:g} x {across:g} in, instead of the uniform "
            "live load; the partition allowance stays; a member at a spacing takes what lies on its own strip"
        )
    factor = _reduction(member, named, notes) if member.reduce else 1.0
    return UseLoad(named.name, named.uniform_psf, partition, named.concentrated_lb, along, across, named.source, factor)


def _reduction(member: Member, use: Use, notes: list[str]) -> float:
    if member.supported_area is None:
        raise ReadingError("supported_area", None, "the area the member supports, e.g. 400 ft2", "is missing")
    assert member.kind is not None
    factor, words = reduction(member.kind, use.uniform_psf, use.reducible, member.supported_area.value)
    notes.append(words)
    return factor


def _partition(member: Member, by_use: float, notes: list[str]) -> float:
    """Partition allowance [psf]: the record's own word first, else the use's (ASCE 7-16 4.3.2)."""
    said = member.partitions
    if said is None:
        if by_use:
            notes.append(f"partition allowance {by_use:g} psf beside the live load (ASCE 7-16 4.3.2)")
        return by_use
    if said is False:
        notes.append("no partition allowance: recorded that partitions will not be moved")
        return 0.0
    return 15.0 if said is True else said.value
