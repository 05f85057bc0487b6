"""From the record of what was read to a scenario in pounds and inches; every default taken is said."""

from __future__ import annotations

from assess.errors import ReadingError
from assess.kinds import KINDS, Kind
from assess.reading import Reading
from assess.record import Member
from assess.record_parts import Size
from assess.resolve_condition import resolve_condition
from assess.resolve_loads import resolve_loads
from assess.resolve_wood import resolve_wood
from assess.scenario import Edge, Part, Scenario, Stage
from assess.weight import DRY_PERCENT, WET_PERCENT
from species import WoodError, dressed_size
from species.sizes import nominal_size

SEAT_HALF_IN = 0.75  # half of 1 1/2 in of bearing, added to a clear span at each end
LEAST_BEARING_IN = {"wood": 1.5, "hanger": 1.5, "masonry": 3.0}  # IRC R502.6
# NDS 4.4.1.2, tiers recalled: greatest nominal depth over breadth, and how such a member is to be held.
DEPTH_RULES = (
    (2.0, "no bracing is asked for"),
    (4.0, "ends held against rotation"),
    (5.0, "ends held, compression edge held along its length"),
    (6.0, "ends held, compression edge held, and bridging or blocking at 8 ft or less"),
    (7.0, "ends held, both edges held along their length"),
    (float("inf"), "no rule covers it"),
)
# The record has no field for it, and bearing on the whole diameter would flatter the member.
ROUND_SEAT = ("the width of a round member's flat seat: bearing is computed on the whole diameter",)
BEARING_IN = 1.5  # taken where no bearing was measured
WET_ABOVE_PERCENT = 19.0  # NDS Supplement: wet service above 19 % for an extended time


def resolve(member: Member) -> Scenario:
    """The scenario of a member that has all it needs to be assessed.

    member    the record; its bay's fields already filled in
    returns   Scenario
    raises    ReadingError naming the field that is missing or cannot be used
    """
    missing = member.missing()
    if missing:
        raise ReadingError(missing[0], None, "a reading; the member is incomplete: " + ", ".join(missing), "is missing")
    assert member.kind is not None
    assert member.size is not None
    assert member.spans is not None
    kind = KINDS[member.kind]
    notes: list[str] = []
    ply_in, depth_in, is_round = section_of(member.size, member.orientation, notes)
    plies = member.size.plies or 1
    wood = resolve_wood(member, ply_in, depth_in)
    loads = resolve_loads(member)
    spans_in, face_in, bearing_in, measured = _supports(member, notes)
    supports_in = tuple(sum(spans_in[:i]) for i in range(len(spans_in) + 1))
    condition = resolve_condition(member, ply_in * plies, depth_in, is_round, supports_in, bearing_in)
    wet, moisture = _moisture(member, kind, notes)
    spacing = member.spacing.value if member.spacing is not None else None
    tributary = spacing if spacing is not None else (member.tributary.value if member.tributary is not None else 0.0)
    alike = member.alike if member.alike is not None else kind.alike
    if member.alike is None and spacing is not None and alike > 1:
        notes.append("three or more alike share the floor (default for this kind)")
    top = _edge(member.top_edge, kind.top_held, "top", notes)
    bottom = _edge(member.bottom_edge, False, "bottom", notes)
    if not is_round and depth_in > ply_in:
        notes.append(_depth_rule(ply_in, depth_in))
    if member.ends_held is None:
        notes.append("ends held against rotation (default)")
    on_top = kind.loaded_on_top if member.loaded_on is None else member.loaded_on == "top"
    separate = len(spans_in) > 1 and member.over_supports == "separate"
    if len(spans_in) > 1 and member.over_supports is None:
        notes.append("continuous over the inner supports (default)")
    if separate:
        notes.append("each span is a piece of its own; a measured inner bearing is shared half and half, as if butted")
    limits = member.limits
    limit_live = limits.live if limits is not None and limits.live is not None else kind.limit_live
    limit_total = limits.total if limits is not None and limits.total is not None else kind.limit_total
    if limits is None or limits.live is None or limits.total is None:
        notes.append(f"deflection limits L/{limit_live:g} live, L/{limit_total:g} total ({kind.limits_source})")
    notes.append("total deflection counts KCR times all dead load (NDS 3.5.2), stricter than the code's creep footnote")
    own = member.own_weight != "included"
    if own:
        notes.append(f"own weight added at {moisture:g} % moisture")
    return Scenario(
        kind=member.kind,
        parts=(Part("member", ply_in, depth_in, plies, bool(member.size.plies_fastened), is_round, wood.woods),),
        stages=(Stage(parts=(0,)),),
        spans_in=spans_in,
        overhang_left_in=member.overhang_left.value if member.overhang_left is not None else 0.0,
        overhang_right_in=member.overhang_right.value if member.overhang_right is not None else 0.0,
        face_in=face_in,
        bearing_in=bearing_in,
        bearing_measured=measured,
        bearing_on=member.bearing_on or "wood",
        separate=separate,
        hold_down=tuple(support - 1 for support in member.hold_down or ()),
        loaded_on_top=on_top,
        spacing_in=spacing,
        tributary_in=tributary,
        alike=alike,
        top=top,
        bottom=bottom,
        ends_held=member.ends_held is not False,
        wet=wet,
        moisture_percent=moisture,
        temperature_F=member.temperature.value if member.temperature is not None else None,
        incised=bool(member.incised),
        on_flat=ply_in > depth_in,
        dead_psf=loads.dead_psf,
        own_weight=own,
        slope_cos=loads.slope_cos,
        live=loads.live,
        present=loads.present,
        snow_psf=member.snow.value if member.snow is not None else 0.0,
        roof_live_psf=member.roof_live.value if member.roof_live is not None else 0.0,
        point_loads=loads.points,
        line_loads=loads.lines,
        limit_live=limit_live,
        limit_total=limit_total,
        losses=condition.losses,
        splits=condition.splits,
        lost_bearings=condition.lost,
        hung_de_in=_hung(member),
        assumptions=(*wood.assumptions, *notes, *loads.assumptions, *condition.assumptions),
        cautions=(*wood.cautions, *condition.cautions, *_kind_cautions(member, wood.woods[0].timber)),
        pending=(*condition.pending, *pending(member), *(ROUND_SEAT if is_round else ())),
        new_work=any(defect.new_work for defect in member.condition or ()),
    )


def section_of(size: Size, orientation: str | None, notes: list[str]) -> tuple[float, float, bool]:
    """Breadth of one ply and depth [in], and whether round, from readings or a nominal size."""
    if size.diameter is not None:
        return size.diameter.value, size.diameter.value, True
    if size.nominal is not None:
        try:
            thickness, width = dressed_size(size.nominal, size.dressing or "current")
        except WoodError as error:
            raise ReadingError(f"size.{error.field}", error.value, error.accepted) from None
        notes.append(
            f"size taken from the name {size.nominal} ({size.dressing or 'current'}), {thickness:g} x {width:g} in: "
            "measure it"
        )
        return (width, thickness, False) if orientation == "flat" else (thickness, width, False)
    assert size.width is not None
    assert size.depth is not None
    return size.width.value, size.depth.value, False


def _supports(
    member: Member, notes: list[str]
) -> tuple[tuple[float, ...], tuple[float, ...], tuple[float, ...], tuple[bool, ...]]:
    """Design spans, distance from design point to face, bearing lengths [in], and which of those were measured."""
    assert member.spans is not None
    count = len(member.spans) + 1
    given = [reading.value for reading in member.bearing or ()]
    measured = tuple(i < len(given) for i in range(count))
    bearing = tuple(given[i] if i < len(given) else BEARING_IN for i in range(count))
    if not all(measured):
        notes.append("bearing of 1 1/2 in taken where it was not measured")
    if member.span_basis == "design":
        notes.append("spans as given are design spans; shear is relieved from the design point")
        return tuple(span.value for span in member.spans), (0.0,) * count, bearing, measured
    face = tuple(min(SEAT_HALF_IN, length / 2) for length in bearing)
    spans = tuple(span.value + face[i] + face[i + 1] for i, span in enumerate(member.spans))
    notes.append("spans are clear; half of 1 1/2 in of bearing, or of a shorter measured one, is added at each end")
    return spans, face, bearing, measured


def _moisture(member: Member, kind: Kind, notes: list[str]) -> tuple[bool, float]:
    """Whether wet service applies, and the moisture percent the own weight is taken at."""
    read = member.moisture
    if isinstance(read, Reading):
        return read.value > WET_ABOVE_PERCENT, read.value
    wet = kind.wet if read is None else read == "wet"
    if read is None:
        notes.append(f"{'wet' if wet else 'dry'} service taken (no moisture reading)")
    return wet, WET_PERCENT if wet else DRY_PERCENT


def _edge(said: object, held: bool, name: str, notes: list[str]) -> Edge:
    """How an edge is held, from the record or the kind's default."""
    if said is None:
        if name == "top":
            notes.append(
                "top edge held along its length (default)" if held else "top edge held at the ends only (default)"
            )
        return Edge(held=held)
    if isinstance(said, Reading):
        return Edge(every_in=said.value)
    if isinstance(said, tuple | list):
        return Edge(places_in=tuple(reading.value for reading in said))
    return Edge(held=said == "held")


def _kind_cautions(member: Member, timber: bool) -> tuple[str, ...]:
    said = []
    if member.bearing_on == "hanger":
        said.append("the hanger's own capacity is its maker's: nails, gauge and fit are to be checked against it")
    least = LEAST_BEARING_IN[member.bearing_on or "wood"]
    for number, reading in enumerate(member.bearing or (), 1):
        if reading.value < least:
            said.append(f"bearing at support {number} is {reading.shown()}, under the usual {least:g} in (IRC R502.6)")
    if member.bearing_on == "masonry" and len(member.bearing or ()) <= len(member.spans or ()):
        said.append("on masonry the usual least bearing is 3 in (IRC R502.6): measure it at every support")
    if member.incised and timber:
        said.append("incised timber: the standard gives no factor; its values are not reduced")
    if member.ties_rafters:
        said.append("this member also ties rafters: its tension is not assessed")
    if member.kind == "rafter" and not member.ties_rafters:
        said.append("a rafter pushes its wall outward where nothing ties it: thrust and ties are not assessed")
    if member.stands_for is not None:
        like = member.stands_for
        said.append(f"speaks for {like.count} like members, of which {like.measured} were measured")
    said += [f"not seen: {text}" for text in member.not_seen or ()]
    return tuple(said)


def _depth_rule(ply_in: float, depth_in: float) -> str:
    """What the depth-to-breadth rules of NDS 4.4.1.2 would ask for; information, 3.3.3 governs the ratio."""
    ratio = nominal_size(depth_in) / nominal_size(ply_in)
    asked = next(words for most, words in DEPTH_RULES if ratio <= most)
    return f"NDS 4.4.1.2, nominal depth over breadth {ratio:.2g}: {asked} (information; 3.3.3 governs the ratio)"


def _hung(member: Member) -> float | None:
    """Depth to the fasteners that hang the member, where that is how it is hung and it was measured [in]."""
    hanger = member.hanger
    if hanger is None or hanger.kind != "fasteners" or hanger.de is None:
        return None
    return hanger.de.value


def pending(member: Member) -> tuple[str, ...]:
    """What is recorded but not yet assessed; such a member is never called adequate."""
    found = []
    if member.ties_rafters:
        found.append("tension from the rafters it ties")
    if member.hanger is not None and member.hanger.kind == "fasteners" and member.hanger.de is None:
        found.append("hung by fasteners, their depth de not measured")
    words = {
        "added": "added parts",
        "new_supports": "new supports",
        "sag": "sag",
        "stiffness_test": "stiffness test",
        "identified": "identification of the wood",
        "graded": "characteristics measured in grading",
    }
    return (*found, *(text for name, text in words.items() if getattr(member, name)))
