"""What the engine works on: the member as floats in pounds and inches, resolved from the record."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True)
class WoodValues:
    """Values one candidate wood may be trusted with (psi; G oven-dry), before adjustment.

    lumber     True where the rules of dimension lumber apply (to 4 in thick); with `timber` False, Cr may apply
    timber     True where the rules of timbers apply; between 4 1/8 and 4 1/2 in thick both do, the lower governing
    cf_rules   which size-factor rules apply: 'dimension', 'stud', 'light framing', 'utility', 'southern pine',
               'timber', or 'none' (typed values are taken after CF and Cfu); of two, the lower factor governs
    """

    label: str
    species: str
    grade: str
    size_class: str
    lumber: bool
    timber: bool
    cf_rules: tuple[str, ...]
    Fb: float
    Fv: float
    Fc_perp: float
    E: float
    Emin: float
    G: float
    source: str


@dataclass(frozen=True)
class Edge:
    """How an edge is held against moving sideways: along its length, at the ends, or at places (in)."""

    held: bool = False
    every_in: float | None = None
    places_in: tuple[float, ...] = ()


@dataclass(frozen=True)
class Loss:
    """Wood that is gone over a length: depth off top and bottom, breadth off the sides, or a bore (in).

    kind   'notch', 'hole', 'decay', 'insects', 'char' or 'remaining'
    A bore has diameter_in and height_in (of its centre above the bottom edge); the rest are zero for it.
    """

    name: str
    kind: str
    from_in: float
    to_in: float
    top_in: float = 0.0
    bottom_in: float = 0.0
    side_in: float = 0.0
    diameter_in: float = 0.0
    height_in: float = 0.0


@dataclass(frozen=True)
class Split:
    """A through split at an end: the depth that still carries there, and how far it runs (in)."""

    name: str
    end: str
    remaining_in: float
    length_in: float


@dataclass(frozen=True)
class PointLoad:
    """A load at one place, lb, downward, of one load type."""

    name: str
    load_type: str
    load_lb: float
    at_in: float


@dataclass(frozen=True)
class LineLoad:
    """A load along part of the member, lb/in, downward, of one load type."""

    name: str
    load_type: str
    load_pli: float
    from_in: float
    to_in: float


@dataclass(frozen=True)
class UseLoad:
    """What a use puts on the floor: psf, the partition allowance beside it, and the concentrated load.

    reduction   factor on live_psf by ASCE 7-16 4.7, 1.0 where none is asked for or allowed
    """

    name: str
    live_psf: float
    partition_psf: float
    concentrated_lb: float | None
    patch_along_in: float
    patch_across_in: float
    source: str
    reduction: float = 1.0


@dataclass(frozen=True)
class Part:
    """A piece that carries: breadth of one ply and depth (in), plies, and its candidate woods."""

    name: str
    width_in: float
    depth_in: float
    plies: int
    plies_fastened: bool
    round: bool
    woods: tuple[WoodValues, ...]


@dataclass(frozen=True)
class Stage:
    """A state of the structure: which parts work in it, and what came onto the member while it stood so.

    parts   indices into Scenario.parts
    dead    fraction of the dead load that came in this stage
    later   True where live, snow and other later loads come in this stage
    """

    parts: tuple[int, ...]
    dead: float = 1.0
    later: bool = True


@dataclass(frozen=True)
class Scenario:
    """One member ready to be computed; positions in inches from the first support's design point.

    separate     True where each span is a piece of its own, lapped or butted over the supports
    hold_down    supports (from 0) recorded as held against uplift
    face_in      distance from each support's design point to its face (0 where spans were given as design)
    bearing_in   length of bearing at each support, along the member
    live         the use that is judged; None for a roof member
    present      the use the building has now, for the change-of-use ratios; None where not given
    snow_psf, roof_live_psf on the horizontal projection; dead_psf on the projection too
    first_support, origin_in   where a piece of a member over several supports begins, for words that name a place
    new_work     True where the planned work itself cuts the member
    lost_bearings  (support from 0, why) for each bearing that is not relied on
    hung_de_in   depth from the unloaded edge to the nearest fastener that hangs the member; None where none does
    pending      what is recorded but not yet assessed: such a member is never called adequate
    """

    kind: str
    parts: tuple[Part, ...]
    stages: tuple[Stage, ...]
    spans_in: tuple[float, ...]
    overhang_left_in: float
    overhang_right_in: float
    face_in: tuple[float, ...]
    bearing_in: tuple[float, ...]
    bearing_measured: tuple[bool, ...]
    bearing_on: str
    separate: bool
    hold_down: tuple[int, ...]
    loaded_on_top: bool
    spacing_in: float | None
    tributary_in: float
    alike: int
    top: Edge
    bottom: Edge
    ends_held: bool
    wet: bool
    moisture_percent: float
    temperature_F: float | None
    incised: bool
    on_flat: bool
    dead_psf: float
    own_weight: bool
    slope_cos: float
    live: UseLoad | None
    present: UseLoad | None
    snow_psf: float
    roof_live_psf: float
    point_loads: tuple[PointLoad, ...]
    line_loads: tuple[LineLoad, ...]
    limit_live: float
    limit_total: float
    losses: tuple[Loss, ...]
    splits: tuple[Split, ...]
    lost_bearings: tuple[tuple[int, str], ...]
    hung_de_in: float | None
    assumptions: tuple[str, ...]
    cautions: tuple[str, ...]
    pending: tuple[str, ...]
    new_work: bool = False
    first_support: int = 0
    origin_in: float = 0.0

    @property
    def supports_in(self) -> tuple[float, ...]:
        """Places of the supports' design points."""
        places = [0.0]
        for span in self.spans_in:
            places.append(places[-1] + span)
        return tuple(places)

    @property
    def full_shear(self) -> bool:
        """Whether a notch, a split or fasteners rule the shear: then it is never relieved (NDS 3.4.3.2)."""
        notched = any(loss.kind == "notch" for loss in self.losses)
        return notched or bool(self.splits) or self.hung_de_in is not None

    @property
    def typed_loads(self) -> frozenset[str]:
        """Load types of the point and line loads."""
        return frozenset([p.load_type for p in self.point_loads] + [n.load_type for n in self.line_loads])

    @property
    def simple(self) -> bool:
        """One span, no overhang."""
        return len(self.spans_in) == 1 and self.overhang_left_in == 0.0 == self.overhang_right_in
