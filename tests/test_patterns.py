"""Patterned loads against every subset of loaded lengths and items; what loads, mirrors and units must not change."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass, replace
from itertools import pairwise, product
from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from assess.engine import Computed, compute
from assess.finding import Finding
from assess.judge import judge
from assess.record import read_member
from assess.resolve import resolve
from assess.scenario import LineLoad, PointLoad, Scenario, UseLoad
from assess.statics import Statics, solve
from assess.trace import Array
from tests.scenarios import PLAIN, scenario

PSF_TO_PLI = 16.0 / 144.0  # at 16 in
EI = 1.3e6 * 1.5 * 9.25**3 / 12

SUPPORTED: dict[str, dict[str, Any]] = {
    "one span": {"spans_in": (150.0,)},
    "one span, left overhang": {"spans_in": (120.0,), "overhang_left_in": 30.0},
    "one span, both overhangs": {"spans_in": (120.0,), "overhang_left_in": 20.0, "overhang_right_in": 45.0},
    "two equal spans": {"spans_in": (120.0, 120.0)},
    "two unequal spans, right overhang": {"spans_in": (90.0, 160.0), "overhang_right_in": 36.0},
    "two spans, both overhangs": {"spans_in": (130.0, 110.0), "overhang_left_in": 24.0, "overhang_right_in": 36.0},
    "three spans": {"spans_in": (100.0, 140.0, 90.0)},
    "three spans, left overhang": {"spans_in": (144.0, 72.0, 144.0), "overhang_left_in": 40.0},
    "four spans": {"spans_in": (96.0, 96.0, 120.0, 84.0)},
    "five spans": {"spans_in": (90.0, 110.0, 100.0, 120.0, 80.0)},
    "five spans, both overhangs": {
        "spans_in": (60.0, 130.0, 75.0, 120.0, 95.0), "overhang_left_in": 18.0, "overhang_right_in": 30.0,
    },
}  # fmt: skip
POINTS = (PointLoad("stove", "live", 300.0, 50.0), PointLoad("post", "dead", 250.0, 77.0))
GUST = PointLoad("gust", "wind", -200.0, 30.0)
LINES = (LineLoad("books", "live", 5.0, 20.0, 61.0), LineLoad("drift", "snow", 4.0, 10.0, 55.0))


@dataclass(frozen=True)
class Item:
    """A load of our own reckoning: what it is, how much of it, where, and whether it may be absent."""

    amount: float
    low: float
    high: float
    may_go: bool
    point: bool = False


def bounds(made: Scenario) -> list[float]:
    """Ends of the loaded lengths: overhangs and spans."""
    places = list(made.supports_in)
    if made.overhang_left_in:
        places.insert(0, -made.overhang_left_in)
    if made.overhang_right_in:
        places.append(places[-1] + made.overhang_right_in)
    return places


def items(made: Scenario, coefficients: dict[str, float]) -> list[Item]:
    """Every load of a combination, one item for each length that a patterned load may leave bare."""
    ends = bounds(made)
    assert made.live is not None
    found = [Item(coefficients["dead"] * made.dead_psf * PSF_TO_PLI, ends[0], ends[-1], False)]
    patterned = {
        "live": made.live.live_psf + made.live.partition_psf, "snow": made.snow_psf, "roof live": made.roof_live_psf,
    }  # fmt: skip
    for kind, psf in patterned.items():
        amount = coefficients.get(kind, 0.0) * psf * PSF_TO_PLI
        if amount:
            found += [Item(amount, a, b, True) for a, b in pairwise(ends)]
    for point in made.point_loads:
        amount = coefficients.get(point.load_type, 0.0) * point.load_lb
        found.append(Item(amount, point.at_in, point.at_in, point.load_type not in ("dead", "wind"), True))
    for line in made.line_loads:
        amount = coefficients.get(line.load_type, 0.0) * line.load_pli
        found.append(Item(amount, line.from_in, line.to_in, line.load_type not in ("dead", "wind")))
    return [item for item in found if item.amount]


def all_subsets(made: Scenario, x: Array, coefficients: dict[str, float]) -> Statics:
    """The statics of the whole member under every subset of what may be absent, each solved for itself."""
    loads = items(made, coefficients)
    free = [i for i, item in enumerate(loads) if item.may_go]
    on = np.ones((2 ** len(free), len(loads)))
    on[:, free] = list(product((0.0, 1.0), repeat=len(free)))
    mid = 0.5 * (x[:-1] + x[1:])
    w, P = np.zeros((len(loads), len(mid))), np.zeros((len(loads), len(x)))
    for i, item in enumerate(loads):
        if item.point:
            P[i, int(np.abs(x - item.low).argmin())] = item.amount
        else:
            w[i, (mid > item.low) & (mid < item.high)] = item.amount
    supports = np.array([int(np.abs(x - place).argmin()) for place in made.supports_in])
    return solve(x[None], np.full((1, len(mid)), EI), supports, (on @ w)[None], (on @ P)[None])


def compare(made: Scenario, name: str, coefficients: dict[str, float]) -> int:
    """Hold moment, shear, reactions and deflection at every station, both signs, against all subsets."""
    computed = compute(made)
    env, x = computed.envelope, computed.mesh.x[0]
    i = [c.name for c in env.combinations].index(name)
    beam = all_subsets(made, x, coefficients)
    solid = np.concatenate([np.diff(x) > 0.0] * 2)  # shear jumps where stations coincide; nothing is checked there
    V = np.concatenate([beam.V_right[0, :, :-1], beam.V_left[0, :, 1:]], axis=1)[:, solid]
    for part, values, ours in (
        (env.layout.M, beam.M[0], slice(None)),
        (env.layout.V, V, solid),
        (env.layout.R, beam.R[0], slice(None)),
        (env.layout.y, beam.y[0], slice(None)),
    ):
        scale = np.abs(values).max()
        high, low = env.high(part)[0, i][ours], env.low(part)[0, i][ours]
        assert np.allclose(high, values.max(axis=0), rtol=0.0, atol=1e-9 * scale)
        assert np.allclose(low, values.min(axis=0), rtol=0.0, atol=1e-9 * scale)
    return int(beam.M.shape[1])


@pytest.mark.parametrize("supported", SUPPORTED.values(), ids=SUPPORTED)
def test_every_subset_of_loaded_lengths(supported: dict[str, Any]) -> None:
    # ASCE 7-16 4.3.3: live load on any of the spans, for the worst effect at each section. Dead load always stands.
    made = scenario(**supported, loaded_on_top=False)
    lengths = len(bounds(made)) - 1
    assert compare(made, "D+L", {"dead": 1.0, "live": 1.0}) == 2**lengths


@pytest.mark.parametrize("supported", SUPPORTED.values(), ids=SUPPORTED)
def test_every_subset_with_typed_loads(supported: dict[str, Any]) -> None:
    # Typed live loads come and go one by one; a typed dead load stays; the partition allowance is a live load.
    use = replace(PLAIN, partition_psf=15.0)
    made = scenario(**supported, loaded_on_top=False, live=use, point_loads=POINTS, line_loads=LINES[:1])
    lengths = len(bounds(made)) - 1
    assert compare(made, "D+L", {"dead": 1.0, "live": 1.0}) == 2 ** (lengths + 2)


@pytest.mark.parametrize("name", ["two unequal spans, right overhang", "three spans"])
def test_every_subset_of_snow_and_live_load_together(name: str) -> None:
    # ASCE 7-16 7.5 and 4.3.3: each of the two comes and goes by itself
    made = scenario(**SUPPORTED[name], loaded_on_top=False, snow_psf=30.0, point_loads=POINTS[:1], line_loads=LINES[1:])
    lengths = len(bounds(made)) - 1
    count = compare(made, "D+0.75L+0.75S", {"dead": 1.0, "live": 0.75, "snow": 0.75})
    assert count == 2 ** (2 * lengths + 2)


def test_every_subset_of_roof_live_load() -> None:
    made = scenario(**SUPPORTED["three spans, left overhang"], loaded_on_top=False, roof_live_psf=20.0)
    compare(made, "D+Lr", {"dead": 1.0, "roof live": 1.0})


@pytest.mark.parametrize("name", ["two spans, both overhangs", "four spans"])
def test_wind_is_never_left_out(name: str) -> None:
    # Wind stands in every pattern, up or down, as dead load does; the live loads beside it come and go.
    made = scenario(**SUPPORTED[name], loaded_on_top=False, point_loads=(*POINTS, GUST))
    lengths = len(bounds(made)) - 1
    assert compare(made, "D+0.75L+0.75(0.6W)", {"dead": 1.0, "live": 0.75, "wind": 0.45}) == 2 ** (lengths + 1)
    assert compare(made, "0.6D+0.6W", {"dead": 0.6, "wind": 0.6}) == 1


@pytest.mark.parametrize("supported", SUPPORTED.values(), ids=SUPPORTED)
def test_shear_is_relieved_near_supports_only_and_by_whole_patterns(supported: dict[str, Any]) -> None:
    # NDS 3.4.3.1(a): uniform load within d of a support's face is left out, so that shear there is the shear at d.
    full, relieved = scenario(**supported, loaded_on_top=False), scenario(**supported)
    a, b = compute(full), compute(relieved)
    x, V = a.mesh.x[0], a.envelope.layout.V
    assert np.array_equal(x, b.mesh.x[0])
    i = [c.name for c in a.envelope.combinations].index("D+L")
    ends = np.concatenate([x[:-1], x[1:]])
    mid = np.tile(0.5 * (x[:-1] + x[1:]), 2)
    beam = all_subsets(full, x, {"dead": 1.0, "live": 1.0})
    every = np.concatenate([beam.V_right[0, :, :-1], beam.V_left[0, :, 1:]], axis=1)
    high, low = every.max(axis=0), every.min(axis=0)
    solid = np.tile(np.diff(x) > 0.0, 2)
    places = bounds(full)
    for at in full.supports_in:
        for side in (-1.0, 1.0):
            beyond = [place for place in places if (place - at) * side > 0.0]
            if not beyond:
                continue
            # d is 9.25 in from the face, 0.75 in from the design point; never over a quarter of the length
            end = at + side * min(0.75 + 9.25, 0.25 * min(abs(place - at) for place in beyond))
            zone = (mid > min(at, end)) & (mid < max(at, end))
            station = int(np.abs(ends - end).argmin())
            high[zone], low[zone] = high[station], low[station]
    scale = np.abs(every).max()
    assert np.allclose(b.envelope.high(V)[0, i][solid], high[solid], rtol=0.0, atol=1e-9 * scale)
    assert np.allclose(b.envelope.low(V)[0, i][solid], low[solid], rtol=0.0, atol=1e-9 * scale)


@pytest.mark.parametrize("at", [0.0, 90.0, 250.0])
def test_a_load_right_over_a_support_makes_no_shear(at: float) -> None:
    # It goes straight into the bearing. It was once counted over the left end and not over the right one.
    made = scenario(spans_in=(90.0, 160.0), loaded_on_top=False)
    loaded = replace(made, point_loads=(PointLoad("post", "dead", 5000.0, at),))
    key = ("shear", "D+L")
    assert ratios(find(loaded))[key] == pytest.approx(ratios(find(made))[key], rel=1e-12)
    assert ratios(find(loaded))["bearing", "D+L"] > ratios(find(made))["bearing", "D+L"] + 2.0


# -- what must hold for any member ---------------------------------------------------------------------------------

TYPES = ("dead", "live", "snow", "roof live", "construction", "wind")
HOURS = settings(derandomize=True, max_examples=40, deadline=None, database=None)


@st.composite
def members(draw: Callable[[st.SearchStrategy[Any]], Any]) -> Scenario:
    """A member of one to five spans with overhangs and typed loads, in eighths of an inch."""

    def eighths(low: int, high: int) -> float:
        return float(draw(st.integers(low * 8, high * 8))) / 8

    spans = tuple(eighths(40, 200) for _ in range(draw(st.integers(1, 5))))
    left, right = (draw(st.one_of(st.just(0.0), st.builds(eighths, st.just(6), st.just(40)))) for _ in range(2))
    end = sum(spans) + right

    def place() -> float:
        return float(draw(st.integers(int(-left * 8), int(end * 8)))) / 8

    points = tuple(
        PointLoad(f"p{i}", draw(st.sampled_from(TYPES)), eighths(20, 600), place())
        for i in range(draw(st.integers(0, 3)))
    )
    lines = []
    for i in range(draw(st.integers(0, 2))):
        a, b = sorted((place(), place()))
        if b - a > 4.0:
            lines.append(LineLoad(f"l{i}", draw(st.sampled_from(TYPES)), eighths(1, 12), a, b))
    use = UseLoad("use", eighths(10, 100), draw(st.sampled_from((0.0, 15.0))), None, 30.0, 30.0, "typed")
    return scenario(
        spans_in=spans,
        overhang_left_in=left,
        overhang_right_in=right,
        live=use,
        dead_psf=eighths(5, 30),
        snow_psf=draw(st.sampled_from((0.0, 25.0))),
        own_weight=draw(st.booleans()),
        loaded_on_top=draw(st.booleans()),
        depth_in=draw(st.sampled_from((5.5, 9.25, 11.25))),
        point_loads=points,
        line_loads=tuple(lines),
    )


def find(made: Scenario) -> Finding:
    return judge(made, compute(made))


def number(ratio: float | None) -> float:
    return math.inf if ratio is None else ratio


def ratios(found: Finding) -> dict[tuple[str, str], float]:
    return {(c.check, c.combination): number(c.ratio) for c in found.checks if c.check != "bounce"}


def same(one: Finding, other: Finding, rel: float) -> None:
    """The same answer, check by check; both ways of saying that none exists count as the same."""
    assert one.verdict == other.verdict
    a, b = ratios(one), ratios(other)
    assert a.keys() == b.keys()
    for key, ratio in a.items():
        # a ratio of next to nothing is what is left of sums that cancel
        assert ratio == pytest.approx(b[key], rel=rel, abs=1e-9), key
    for name in ("strength_psf", "service_psf"):
        psf, again = getattr(one.live_load, name), getattr(other.live_load, name)
        assert (psf is None) == (again is None)
        if psf is not None:
            assert psf == pytest.approx(again, rel=rel, abs=1e-6)


@HOURS
@given(members(), st.integers(1, 200), st.floats(0.0, 1.0), st.sampled_from(["use", "point", "line"]))
def test_more_live_load_never_helps(made: Scenario, more: int, along: float, how: str) -> None:
    assert made.live is not None
    first, last = bounds(made)[0], bounds(made)[-1]
    at = first + along * (last - first)
    if how == "use":
        heavier = replace(made, live=replace(made.live, live_psf=made.live.live_psf + more))
    elif how == "point":
        heavier = replace(made, point_loads=(*made.point_loads, PointLoad("more", "live", float(more), at)))
    else:
        line = LineLoad("more", "live", more / 10, first, max(at, first + 1.0))
        heavier = replace(made, line_loads=(*made.line_loads, line))
    a, b = compute(made), compute(heavier)
    narrower, wider = stations_of(a), stations_of(b)
    shared = [place for place in narrower if place in wider]
    assert len(shared) > len(made.spans_in)
    names = [c.name for c in a.envelope.combinations]
    assert names == [c.name for c in b.envelope.combinations]
    for part in ("M", "y"):
        for side in ("high", "low"):
            before, after = (effect(computed, side, part) for computed in (a, b))
            scale = np.abs(after).max()
            rise = after[:, [wider[p] for p in shared]] - before[:, [narrower[p] for p in shared]]
            assert ((rise if side == "high" else -rise) >= -1e-9 * scale).all(), (part, side)
    before, after = effect(a, "high", "R"), effect(b, "high", "R")
    assert (after >= before - 1e-9 * np.abs(after).max()).all()
    light, heavy = ratios(judge(made, a)), ratios(judge(heavier, b))
    for key, ratio in light.items():
        assert heavy[key] >= ratio * (1 - 1e-9) - 1e-9, key


def stations_of(computed: Computed) -> dict[float, int]:
    return {float(place): i for i, place in enumerate(computed.mesh.x[0])}


def effect(computed: Computed, side: str, part: str) -> Array:
    """Highest or lowest effect of every combination at every station [C, n]."""
    env = computed.envelope
    values: Array = getattr(env, side)(getattr(env.layout, part))[0]
    return values


@HOURS
@given(members(), st.floats(0.05, 0.95), st.sampled_from(TYPES[:2]), st.floats(0.0, 1.0))
def test_a_load_split_in_two_changes_nothing(made: Scenario, share: float, kind: str, along: float) -> None:
    first, last = bounds(made)[0], bounds(made)[-1]
    at = first + along * (last - first)
    whole = replace(made, point_loads=(*made.point_loads, PointLoad("a", kind, 400.0, at)))
    parts = (PointLoad("a", kind, 400.0 * share, at), PointLoad("b", kind, 400.0 * (1 - share), at))
    same(find(whole), find(replace(made, point_loads=made.point_loads + parts)), 1e-9)
    whole = replace(made, line_loads=(*made.line_loads, LineLoad("a", kind, 8.0, first, last)))
    lines = (LineLoad("a", kind, 8.0 * share, first, last), LineLoad("b", kind, 8.0 * (1 - share), first, last))
    same(find(whole), find(replace(made, line_loads=made.line_loads + lines)), 1e-9)


@HOURS
@given(members(), st.floats(0.05, 0.95))
def test_a_dead_line_load_cut_in_two_lengths_changes_nothing(made: Scenario, share: float) -> None:
    # Only a load that never goes: the halves of a live one may come and go by themselves. The cut adds stations,
    # which can find a peak 3.4e-4 higher at most: w h^2/8 over w L^2/8 with h = L/40 or less (see the mesh).
    first, last = bounds(made)[0], bounds(made)[-1]
    cut = first + share * (last - first)
    whole = replace(made, line_loads=(*made.line_loads, LineLoad("a", "dead", 8.0, first, last)))
    lines = (LineLoad("a", "dead", 8.0, first, cut), LineLoad("b", "dead", 8.0, cut, last))
    cut_up = replace(made, line_loads=made.line_loads + lines)
    a, b = compute(whole), compute(cut_up)
    wider = stations_of(b)
    shared = {place: i for place, i in stations_of(a).items() if place in wider}
    for part in ("M", "y"):
        for side in ("high", "low"):
            before, after = effect(a, side, part), effect(b, side, part)
            close = np.allclose(
                before[:, list(shared.values())], after[:, [wider[p] for p in shared]],
                rtol=0.0, atol=1e-9 * np.abs(before).max(),
            )  # fmt: skip
            assert close, (part, side)
    assert effect(b, "high", "R") == pytest.approx(effect(a, "high", "R"), rel=1e-9, abs=1e-6)


def mirrored(made: Scenario) -> Scenario:
    end = sum(made.spans_in)
    return replace(
        made,
        spans_in=made.spans_in[::-1],
        overhang_left_in=made.overhang_right_in,
        overhang_right_in=made.overhang_left_in,
        face_in=made.face_in[::-1],
        bearing_in=made.bearing_in[::-1],
        point_loads=tuple(replace(p, at_in=end - p.at_in) for p in made.point_loads),
        line_loads=tuple(replace(n, from_in=end - n.to_in, to_in=end - n.from_in) for n in made.line_loads),
        hold_down=tuple(len(made.spans_in) - support for support in made.hold_down),
    )


@HOURS
@given(members(), st.integers(0, 5))
def test_the_mirror_image_has_the_mirrored_answer(made: Scenario, longer: int) -> None:
    seats = list(made.bearing_in)
    seats[longer % len(seats)] = 3.5
    made = replace(made, bearing_in=tuple(seats), hold_down=(longer % len(seats),))
    image = mirrored(made)
    a, b = compute(made), compute(image)
    for part, turned in (("M", 1.0), ("y", 1.0), ("R", 1.0)):
        for side in ("high", "low"):
            one, other = effect(a, side, part), effect(b, side, part)[:, ::-1]
            assert np.allclose(one, turned * other, rtol=0.0, atol=1e-8 * max(np.abs(one).max(), 1e-9)), (part, side)
    same(judge(made, a), judge(image, b), 1e-7)


FT, PSF, PLF, LB, PSI = 0.3048, 0.04788025898033584, 0.014593902937206365, 4.4482216152605e-3, 6.894757293168361e-3


@HOURS
@given(
    st.lists(st.integers(40, 200), min_size=1, max_size=3),
    st.integers(0, 40),
    st.integers(5, 30),
    st.integers(10, 100),
    st.integers(50, 800),
    st.booleans(),
)
def test_units_do_not_matter(spans: list[int], over: int, dead: int, live: int, post: int, bare: bool) -> None:
    # Exact: 25.4 mm an inch, 4.4482216152605 N a pound. The same member in inches and pounds, and in metric, either
    # with units or bare in a session of SI units.
    def record(metric: bool) -> dict[str, Any]:
        def said(value: float, factor: float, unit: str, us: str) -> str | float:
            if not metric:
                return f"{value!r} {us}"
            return value * factor if bare else f"{value * factor!r} {unit}"

        return {
            "kind": "joist",
            "size": {"width": said(1.5, 25.4, "mm", "in"), "depth": said(9.25, 25.4, "mm", "in")},
            "wood": {
                "values": {
                    "Fb": said(900.0, PSI, "MPa", "psi"), "Fv": said(150.0, PSI, "MPa", "psi"),
                    "Fc_perp": said(405.0, PSI, "MPa", "psi"), "E": said(1.3e6, PSI, "MPa", "psi"),
                    "Emin": said(4.7e5, PSI, "MPa", "psi"), "G": 0.43,
                },
                "source": "invented",
            },
            "spans": [said(span / 12, FT, "m", "ft") for span in spans],
            "overhang_right": said(over / 12, FT, "m", "ft"),
            "bearing": [said(3.5, 25.4, "mm", "in")] * (len(spans) + 1),
            "spacing": said(16.0, 25.4, "mm", "in"),
            "moisture": said(12.0, 1.0, "%", "%"),
            "dead": said(float(dead), PSF, "kPa", "psf"),
            "proposed_use": {"live": said(float(live), PSF, "kPa", "psf")},
            "point_loads": [
                {"load": said(float(post), LB, "kN", "lb"), "at": said(2.5, FT, "m", "ft"), "type": "live"}
            ],
            "line_loads": [
                {"load": said(40.0, PLF, "kN/m", "plf"), "from": said(0.5, FT, "m", "ft"),
                 "to": said(3.0, FT, "m", "ft"), "type": "dead"}
            ],
        }  # fmt: skip

    same(
        find(resolve(read_member(record(False)))),
        find(resolve(read_member(record(True), units="SI" if bare else "US"))),
        1e-9,
    )
