"""The spine: a scenario goes through variants, mesh, section, statics, envelope and checks, once, over all rows."""

from __future__ import annotations

from dataclasses import dataclass, replace

import numpy as np

from assess import adjust, check_shear, check_supports, checks, service
from assess.checks import Checked
from assess.effects import Effects, effects
from assess.envelope import Envelope, envelope
from assess.mesh import Mesh, mesh
from assess.scenario import Scenario
from assess.section import Section, area, circle, net_rectangle, second_moment, section_modulus
from assess.share import added, shares, taken
from assess.trace import Array, Trace
from assess.variants import PartRows, Rows, variants
from assess.weight import density_pcf, own_weight_pli

LEAST_I = 1e-6  # of the whole section's


@dataclass(frozen=True)
class Computed:
    """Everything the checks found, over K rows; `judge` makes a finding of it.

    gone   where nothing is left of the section, in words; None where something is left everywhere
    """

    rows: Rows
    mesh: Mesh
    envelope: Envelope
    strength: tuple[Checked, ...]
    gone: str | None
    live_deflection: Checked
    total_deflection: Checked
    bounce: service.Bounce


def compute(scenario: Scenario, trace: Trace | None = None) -> Computed:
    """Assess every row of a scenario.

    scenario   the member as floats
    trace      where given, every step is noted in it
    returns    Computed
    """
    rows = variants(scenario)
    stations = mesh(scenario, rows)
    part = rows.parts[0]
    if trace is not None:
        trace.scope = "section"
    whole = gross(part, trace)
    left = [net(scenario if index == 0 else None, piece, stations) for index, piece in enumerate(rows.parts)]
    if trace is not None:
        trace.scope = "weight and stiffness"
    own = own_pli(scenario, rows, part, whole, trace)
    f = adjust.factors(scenario, rows, part, trace)
    gone = nothing_left(left[0], stations, scenario.origin_in)
    if gone is not None:
        f = replace(f, none=f.none or gone)
    E = [stiffness(part, f, trace)]
    E += [stiffness(piece, adjust.factors(scenario, rows, piece)) for piece in rows.parts[1:]]
    shape = stations.mid.shape
    # Where nothing is left the member is broken, and said to be; a trace of stiffness keeps the statics finite.
    EI = [
        np.broadcast_to(E[index][:, None] * np.maximum(section.I, LEAST_I * whole.I), shape)
        for index, section in enumerate(left)
    ]
    loads = on_part(0, scenario, rows, stations, EI, own)
    env = envelope(scenario, rows, loads)
    strength = [
        *checks.bending(scenario, rows, env, stations, left[0], part, f, trace),
        check_shear.shear(scenario, rows, env, stations, left[0], part, f, trace),
        check_supports.bearing(scenario, rows, env, stations, left[0], part, f, trace),
    ]
    lift = check_supports.uplift(scenario, rows, env, stations, trace)
    if lift is not None:
        strength.append(lift)
    live, total = service.deflection(scenario, rows, env, stations, trace)
    dead_pli = rows.dead_psf * rows.tributary_in / 144.0 + own
    bounce = service.bounce(rows, E[0], stiff_I(scenario, rows, loads, E[0], whole), dead_pli, trace)
    return Computed(rows, stations, env, tuple(strength), gone, live, total, bounce)


def nothing_left(section: Section, stations: Mesh, origin_in: float) -> str | None:
    """Where the section has nothing left, in words, or None."""
    empty = section.A <= 0.0
    if not bool(empty.any()):
        return None
    at = float(stations.mid[np.broadcast_to(empty, stations.mid.shape)].min())
    return f"nothing is left of the section at {(at + origin_in) / 12:.1f} ft: the member is broken there"


def stiff_I(scenario: Scenario, rows: Rows, loads: Effects, E: Array, whole: Section) -> Array:
    """Moment of inertia of the whole section, or the even one that would bend as far as the weakened span [K] [in4].

    source   mechanics: a simple span under 1 lb/in bends 5 L^4/(384 E I)
    """
    if not scenario.losses or not scenario.simple:
        return whole.I[:, 0]
    y = loads.unit[0][:, loads.layout.y].max(axis=1)
    I: Array = np.minimum(5.0 * rows.spans_in[:, 0] ** 4 / (384.0 * E * y), whole.I[:, 0])  # noqa: E741
    return I


def on_part(index: int, scenario: Scenario, rows: Rows, stations: Mesh, EI: list[Array], own: Array) -> Effects:
    """Effects on one part over all stages: in each, its EI share of what came while the parts stood so."""
    found = []
    for stage in scenario.stages:
        together = sum((EI[i] for i in stage.parts[1:]), EI[stage.parts[0]])
        came = effects(scenario, rows, stations, stage, together, own)
        if len(stage.parts) > 1:
            came = taken(came, shares([EI[i] for i in stage.parts])[stage.parts.index(index)])
        found.append(came)
    return added(found)


def stiffness(part: PartRows, f: adjust.Factors, trace: Trace | None = None) -> Array:
    """E' of a part [K] [psi]."""
    E = adjust.E_prime.on(trace, part.wood("E")[:, None, None], f.CM_E, f.Ct_E, f.Ci_E, f.Cfu_E)
    return E[:, 0, 0]


def gross(part: PartRows, trace: Trace | None = None) -> Section:
    """The whole section of a part [K, 1]."""
    b, d = part.breadth_in[:, None], part.depth_in[:, None]
    if trace is not None:
        trace.value("b", b, "in", "readings", "diameter" if part.round else "breadth of all plies")
        trace.value("d", d, "in", "readings", "depth in the direction of load")
    if part.round:
        return circle(d)
    if trace is not None:
        area.on(trace, b, d)
        section_modulus.on(trace, b, d)
        second_moment.on(trace, b, d)
    return net_rectangle(b, d, np.zeros_like(b), np.zeros_like(b), np.zeros_like(b), ())


def net(scenario: Scenario | None, part: PartRows, stations: Mesh) -> Section:
    """What is left of a part in each segment [K, N-1]; a loss counts where the segment lies inside it.

    scenario   whose losses the part has; None for a part that has none
    """
    if scenario is None or not scenario.losses:
        return gross(part)  # one value for all segments
    b, d = part.breadth_in[:, None], part.depth_in[:, None]
    shape = stations.mid.shape
    top, bottom, side = np.zeros(shape), np.zeros(shape), np.zeros(shape)
    holes = []
    for loss in scenario.losses:
        inside = (stations.mid > loss.from_in) & (stations.mid < loss.to_in)
        top = np.maximum(top, inside * loss.top_in)
        bottom = np.maximum(bottom, inside * loss.bottom_in)
        # Sides of several defects add up: which flank each is on is not recorded.
        side = side + inside * loss.side_in
        if loss.diameter_in > 0.0:
            holes.append((np.full_like(d, loss.diameter_in), np.full_like(d, loss.height_in), inside))
    return net_rectangle(b, d, top, bottom, np.minimum(side, b), tuple(holes))


def own_pli(scenario: Scenario, rows: Rows, part: PartRows, whole: Section, trace: Trace | None = None) -> Array:
    """Own weight [K] [lb/in]; nothing where the dead load reading holds it already."""
    if not scenario.own_weight:
        return np.zeros(rows.count)
    density = density_pcf.on(trace, part.wood("G"), rows.moisture_percent)
    return own_weight_pli.on(trace, density, whole.A[:, 0]) / scenario.slope_cos
