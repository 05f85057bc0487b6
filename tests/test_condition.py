"""Defects from the record to the finding: what each takes away, by hand; and what must hold for every defect."""

from __future__ import annotations

import json
from dataclasses import replace
from pathlib import Path
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from assess.engine import compute, net
from assess.errors import ReadingError
from assess.finding import Check, Finding
from assess.judge import judge
from assess.record import read_member
from assess.resolve import resolve
from assess.scenario import Loss, Scenario, Split
from assess.whole import assess
from tests.scenarios import HEM_FIR_2, OFFICES, scenario
from tui import command, exits

DEMO = Path(__file__).resolve().parent.parent / "tui" / "data" / "demo.survey"
EVENTS = [json.loads(line) for line in DEMO.read_text(encoding="utf-8").splitlines()]
MEMBERS: dict[str, dict[str, Any]] = {e["id"]: e["data"] for e in EVENTS if e.get("put") == "member"}
JOIST: dict[str, Any] = {
    "kind": "joist",
    "size": {"width": "1 1/2 in", "depth": "9 1/4 in"},
    "spans": ["160 in"],
    "span_basis": "design",
    "spacing": "16 in",
    "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp"},
    "dead": "10 psf",
    "own_weight": "included",
    "proposed_use": "dwelling, living areas",
}
SPAN = {"at": "60 in", "length": "20 in"}


def joist(*defects: dict[str, Any], **changes: Any) -> Finding:
    """The finding of a joist with defects."""
    return assess(read_member(JOIST | changes | {"condition": list(defects)}))


def resolved(*defects: dict[str, Any], **changes: Any) -> Scenario:
    return resolve(read_member(JOIST | changes | {"condition": list(defects)}))


def one(found: Finding, name: str, combination: str = "D+L") -> Check:
    """One check in one combination."""
    (check,) = [c for c in found.checks if c.check == name and c.combination == combination]
    return check


def find(made: Scenario) -> Finding:
    return judge(made, compute(made))


def sections(made: Scenario, at_in: float) -> tuple[float, float]:
    """Breadth and depth left at a place between stations [in]."""
    computed = compute(made)
    section = net(made, computed.rows.parts[0], computed.mesh)
    i = int((computed.mesh.x[0] < at_in).sum()) - 1
    return float(section.b_net[0, i]), float(section.d_net[0, i])


# What each defect takes away (engineering basis 5).


@pytest.mark.parametrize(
    ("face", "left"),
    [
        ("bottom", (1.5, 8.5)),  # 1/2 in probed and 1/4 in more off the depth
        ("top", (1.5, 8.5)),
        ("side", (0.75, 9.25)),
        ("all", (0.0, 0.0)),  # 3/4 in off both sides of 1 1/2 in leaves nothing
    ],
)
@pytest.mark.parametrize("kind", ["decay", "insects"])
def test_decay_with_its_margin(kind: str, face: str, left: tuple[float, float]) -> None:
    made = resolved({"defect": kind, "face": face, "depth": "1/2 in"} | SPAN)
    assert sections(made, 70.0) == pytest.approx(left)
    # and 12 in more each way along the grain: 48 to 92 in
    assert (made.losses[0].from_in, made.losses[0].to_in) == (48.0, 92.0)
    assert sections(made, 47.9) == (1.5, 9.25)
    assert sections(made, 92.1) == (1.5, 9.25)
    assert any("0.25 in more" in note for note in made.assumptions)


def test_decay_margin_may_be_typed() -> None:
    made = resolved({"defect": "decay", "face": "bottom", "depth": "1/2 in", "margin": "1 in"} | SPAN)
    assert sections(made, 70.0) == (1.5, 7.75)
    assert any("1 in more" in note for note in made.assumptions)


def test_decay_on_four_faces_of_a_timber() -> None:
    # 7 1/2 x 11 1/2, 1 1/4 + 1/4 in off each face: 4 1/2 x 8 1/2
    size = {"width": "7 1/2 in", "depth": "11 1/2 in"}
    made = resolved({"defect": "decay", "face": "all", "depth": "1 1/4 in"} | SPAN, size=size)
    assert sections(made, 70.0) == pytest.approx((4.5, 8.5))


@pytest.mark.parametrize(
    ("faces", "left"),
    [
        (["top"], (7.5, 10.2)),  # 1 in scraped and 0.3 in more
        (["bottom"], (7.5, 10.2)),
        (["top", "bottom"], (7.5, 8.9)),
        (["left"], (6.2, 11.5)),
        (["side"], (6.2, 11.5)),
        (["left", "right"], (4.9, 11.5)),
        (["bottom", "left", "right"], (4.9, 10.2)),
        (["all"], (4.9, 8.9)),
    ],
)
def test_char_takes_three_tenths_more_off_each_exposed_face(faces: list[str], left: tuple[float, float]) -> None:
    size = {"width": "7 1/2 in", "depth": "11 1/2 in"}
    made = resolved({"defect": "char", "faces": faces, "depth": "1 in"} | SPAN, size=size)
    assert sections(made, 70.0) == pytest.approx(left)
    assert sections(made, 59.9) == sections(made, 80.1) == (7.5, 11.5)


def test_measured_remaining_section_is_used_as_given() -> None:
    made = resolved({"defect": "remaining", "width": "1 1/4 in", "depth": "7 in"} | SPAN)
    assert sections(made, 70.0) == pytest.approx((1.25, 7.0))
    found = find(made)
    # M at 80 in over 1.25 x 7^2/6 = 10.208 in3
    assert one(found, "bending").ratio == pytest.approx(50 * 16 / 144 * 160**2 / 8 / (1.25 * 49 / 6) / 1075.25)
    # swollen wood, larger than it was, is the whole section and no more
    larger = resolved({"defect": "remaining", "width": "1 5/8 in", "depth": "9 1/2 in"} | SPAN)
    assert sections(larger, 70.0) == (1.5, 9.25)


def test_notch_and_hole_stand_where_they_were_measured() -> None:
    made = resolved(
        {"defect": "notch", "edge": "top", "depth": "2 in"} | SPAN,
        {"defect": "hole", "at": "100 in", "diameter": "2 in", "height": "3 in"},
    )
    assert sections(made, 60.1) == sections(made, 79.9) == (1.5, 7.25)
    assert sections(made, 99.1) == sections(made, 100.9) == (1.5, 7.25)
    assert sections(made, 98.9) == sections(made, 101.1) == (1.5, 9.25)


def test_several_defects_at_one_place() -> None:
    # char 1.3 in off the bottom (50-90), a notch 2 in off the top (60-80), a hole of 1 1/2 in at 70: in turn
    made = resolved(
        {"defect": "char", "faces": ["bottom"], "at": "50 in", "length": "40 in", "depth": "1 in"},
        {"defect": "notch", "edge": "top", "depth": "2 in"} | SPAN,
        {"defect": "hole", "at": "70 in", "diameter": "1 1/2 in", "height": "4 1/2 in"},
    )
    assert sections(made, 55.0) == pytest.approx((1.5, 7.95))
    assert sections(made, 65.0) == pytest.approx((1.5, 5.95))
    assert sections(made, 70.0) == pytest.approx((1.5, 4.45))
    # two on one face: the deeper counts, not their sum
    made = resolved(
        {"defect": "char", "faces": ["bottom"], "depth": "1 in"} | SPAN,
        {"defect": "notch", "edge": "bottom", "depth": "2 in"} | SPAN,
    )
    assert sections(made, 70.0) == pytest.approx((1.5, 7.25))


def test_end_split_and_ordinary_checks() -> None:
    made = resolved({"defect": "end split", "end": "right", "remaining": "6 in", "length": "10 in"})
    assert made.splits == (Split("end split 1", "right", 6.0, 10.0),)
    assert made.full_shear
    whole, checked = joist(), joist({"defect": "check", "depth": "1/2 in"} | SPAN)
    assert checked.checks == whole.checks
    assert any("no penalty and no bonus" in note for note in checked.assumptions)


def test_wood_is_said_to_rot_for_a_cause() -> None:
    found = joist({"defect": "decay", "face": "bottom", "depth": "1/4 in"} | SPAN)
    assert any("water" in caution for caution in found.cautions)
    found = joist({"defect": "insects", "face": "bottom", "depth": "1/4 in"} | SPAN)
    assert any("active" in caution for caution in found.cautions)
    found = joist({"defect": "char", "faces": ["bottom"], "depth": "1/4 in"} | SPAN)
    assert any("engineer" in caution for caution in found.cautions if caution.startswith("char 1"))


def test_a_defect_in_a_round_member_is_told_as_not_assessed() -> None:
    log = {"kind": "beam", "size": {"diameter": "10 in"}, "spacing": None, "tributary": "2 ft"}
    made = {k: v for k, v in (JOIST | log).items() if v is not None}
    notch = {"defect": "notch", "edge": "top", "depth": "1 in"} | SPAN
    found = assess(read_member(made | {"condition": [notch]}))
    assert found.verdict != "adequate"
    assert any("round member" in caution for caution in found.cautions)


# Nothing left; bearings that are lost.


def broken(found: Finding, why: str) -> None:
    """A member that cannot be given a ratio says why, carries nothing and is to be shored."""
    assert found.verdict == "inadequate"
    assert found.ratio is None
    assert found.shore_now
    assert found.live_load.strength_psf == 0.0
    assert found.live_load.posting_psf == 0.0
    assert any(why in caution for caution in found.cautions)
    assert any("shore now" in caution for caution in found.cautions)
    json.dumps(found.to_json(), allow_nan=False)


def test_nothing_left_has_no_ratio() -> None:
    found = joist({"defect": "decay", "face": "all", "depth": "1/2 in"} | SPAN)
    broken(found, "nothing is left of the section at 4.")
    found = joist({"defect": "decay", "face": "side", "depth": "1 1/4 in"} | SPAN)
    broken(found, "nothing is left")
    # two cuts that meet: 5 in off the top and 4 1/4 in off the bottom
    found = joist(
        {"defect": "notch", "edge": "top", "depth": "5 in"} | SPAN,
        {"defect": "notch", "edge": "bottom", "depth": "4 1/4 in"} | SPAN,
    )
    broken(found, "nothing is left")


def test_a_lost_bearing_has_no_ratio() -> None:
    hung = {"bearing_on": "hanger"}
    broken(joist({"defect": "hanger corrosion", "support": 2}, **hung), "support 2 is not relied on: its hanger")
    assert not joist(**hung).shore_now
    spans = {"spans": ["10 ft", "12 ft"]}
    found = joist({"defect": "decay", "face": "top", "at": "118 in", "length": "4 in", "depth": "1/8 in"}, **spans)
    broken(found, "support 2 is not relied on: decay reaches it")
    apart = joist({"defect": "hanger corrosion", "support": 2}, over_supports="separate", **hung, **spans)
    broken(apart, "is not relied on: its hanger")


@pytest.mark.parametrize(("at", "lost"), [("12 3/4 in", False), ("12 5/8 in", True), ("0 in", True), ("-1 in", True)])
def test_decay_condemns_a_bearing_as_far_as_it_reaches(at: str, lost: bool) -> None:
    # 12 in along the grain short of the bearing's edge, 3/4 in from its middle
    found = joist({"defect": "decay", "face": "bottom", "at": at, "length": "3 in", "depth": "1/8 in"})
    assert (found.ratio is None) is lost
    assert found.shore_now is lost


def test_a_notch_over_a_bearing_does_not_condemn_it() -> None:
    found = joist({"defect": "notch", "edge": "bottom", "at": "-1 in", "length": "3 in", "depth": "1 in"})
    assert found.ratio is not None


# The demo's four members as they were found, by hand. Own weight: NDS Supplement 3.1.3 density.


def density(G: float, moisture: float) -> float:
    """62.4 G/(1 + G 0.009 mc) (1 + mc/100) [lb/ft3]."""
    return 62.4 * G / (1 + G * 0.009 * moisture) * (1 + moisture / 100)


def test_demo_joist_notched_at_the_washroom_pipe() -> None:
    # N-11: 1 5/8 x 9 1/2, 11 ft 2 in clear + 1 1/2 = 135.5; bottom notch 4 in deep, 24 to 29 in
    found = assess(read_member(MEMBERS["N-11"]))
    w = (12 + 40) * 16 / 144 + density(0.43, 19) * 1.625 * 9.5 / 1728  # 6.0435 lb/in
    M = w * 29 * (135.5 - 29) / 2  # 9,332.7 lb-in at the notch's far end
    S = 1.625 * 5.5**2 / 6  # 8.193 in3
    assert pytest.approx(1.05942, abs=1e-5) == M / S / (850 * 1.1 * 1.15)
    assert found.ratio == pytest.approx(M / S / (850 * 1.1 * 1.15), rel=1e-9)
    assert found.verdict == "inadequate"
    assert found.governs is not None
    assert found.governs.check == "bending"
    assert found.governs.at_in == pytest.approx(29.0)
    # shear, NDS 3.4.3.2(a): V at 24 in 264.4 lb of 2/3 x 150 x 1.625 x 5.5 x (5.5/9.5)^2 = 299.6
    V = w * (135.5 / 2 - 24)
    allowed = 2 / 3 * 150 * 1.625 * 5.5 * (5.5 / 9.5) ** 2
    assert one(found, "shear").ratio == pytest.approx(V / allowed, rel=1e-9)
    # load it carries: 52 psf of load in all gives 1.0594 with the own weight
    own = w - 52 * 16 / 144
    most = 850 * 1.1 * 1.15 * S * 2 / (29 * 106.5)
    assert found.live_load.strength_psf == pytest.approx((most - own) * 9 - 12, rel=1e-9)
    assert found.live_load.posting_psf == 35.0
    # midspan, whole, is fine
    whole = MEMBERS["N-11"] | {"condition": []}
    assert assess(read_member(whole)).verdict == "adequate"


def test_demo_joist_decayed_at_the_wall() -> None:
    # N-13: 1/2 in soft at the wall reaches the bearing: no ratio. The rest is told: wet (23 %)
    found = assess(read_member(MEMBERS["N-13"]))
    broken(found, "bearing at support 1 is not relied on: decay reaches it")
    assert found.governs is not None
    assert found.governs.check == "bearing"
    w = (12 + 40) * 16 / 144 + density(0.43, 23) * 1.625 * 9.5 / 1728  # 6.0485 lb/in
    # bending at midspan, whole there: CM 1.0 as Fb CF = 935 <= 1,150 psi (NDS Supplement)
    ratio = w * 135.5**2 / 8 / (1.625 * 9.5**2 / 6) / (850 * 1.1 * 1.15)
    assert one(found, "bending").ratio == pytest.approx(ratio, rel=1e-9)
    # shear at d from the face, 0.75 + 9.5, on 9.5 - 0.75 = 8.75 in; CM 0.97
    V = w * (135.5 / 2 - 10.25)
    assert one(found, "shear").ratio == pytest.approx(1.5 * V / (1.625 * 8.75) / (150 * 0.97), rel=1e-9)


def test_demo_joist_bored_for_cable() -> None:
    # S-05: 1 1/2 x 7 1/4 over 144 + 1.5; hole 1 1/2 in centred 5 3/4 in up, 59 1/4 to 60 3/4 in
    found = assess(read_member(MEMBERS["S-05"]))
    w = (8 + 20) * 24 / 144 + density(0.55, 19) * 1.5 * 7.25 / 1728  # 4.9016 lb/in
    M = w * 60.75 * (145.5 - 60.75) / 2
    # strips 0 to 5 and 6 1/2 to 7 1/4
    y = (5 * 2.5 + 0.75 * 6.875) / 5.75  # 3.0707 in
    I = 1.5 * (5**3 / 12 + 5 * (y - 2.5) ** 2 + 0.75**3 / 12 + 0.75 * (6.875 - y) ** 2)  # noqa: E741  34.40 in4
    S = I / (7.25 - y)  # 8.231 in3, the top fibre
    assert pytest.approx(1.44104, abs=1e-5) == M / S / (925 * 1.15)
    assert found.ratio == pytest.approx(M / S / (925 * 1.15), rel=1e-9)
    assert found.verdict == "inadequate"
    assert found.governs is not None
    assert found.governs.check == "bending"
    assert found.governs.at_in == pytest.approx(60.75)
    # 3/4 in of wood above the hole where 2 in are wanted (IRC R502.8.1)
    (edge,) = [c for c in found.checks if c.combination == "hole 1: clear of the edges"]
    assert (edge.demand, edge.capacity) == (2.0, 0.75)


def test_demo_beam_charred_by_the_old_stove() -> None:
    # B-03: 7 1/2 x 11 1/2 over 108 + 1.5; 1 1/2 + 0.3 in off the bottom and both sides, 24 to 84 in: 3.9 x 9.7
    found = assess(read_member(MEMBERS["B-03"]))
    w = (14 + 50 + 15) * 120 / 144 + density(0.55, 16) * 7.5 * 11.5 / 1728  # 67.675 lb/in
    M = w * 109.5**2 / 8  # 101,430 lb-in
    S = 3.9 * 9.7**2 / 6  # 61.16 in3
    assert pytest.approx(1658.47, abs=0.01) == M / S
    check = one(found, "bending")
    assert check.demand == pytest.approx(M / S, rel=1e-9)
    assert found.ratio == pytest.approx(M / S / (1350 * check.factors["CL"]), rel=1e-9)
    assert 0.95 < check.factors["CL"] < 1.0  # held at the ends only, NDS 3.3.3
    assert found.verdict == "inadequate"
    assert found.governs is not None
    assert found.governs.check == "bending"
    assert found.governs.at_in == pytest.approx(54.75)
    # shear where the char begins, 30 3/4 in from midspan, beyond d from the face
    V = w * (54.75 - 24)
    assert one(found, "shear").ratio == pytest.approx(1.5 * V / (3.9 * 9.7) / 165, rel=1e-9)


# What holds for every defect of a statically determinate member.


@st.composite
def losses(draw: st.DrawFn) -> Loss:
    """A loss somewhere on the joist; its sizes leave something."""
    kind = draw(st.sampled_from(("notch", "hole", "char", "decay", "remaining")))
    start = draw(st.floats(-12, 190))
    end = start + draw(st.floats(0.25, 90))
    depth = draw(st.floats(0.01, 4.0))
    if kind == "hole":
        return Loss("hole", kind, start, start + depth, diameter_in=depth, height_in=draw(st.floats(2.1, 7.0)))
    edge = draw(st.sampled_from(("top_in", "bottom_in")))
    side = draw(st.floats(0, 1.2)) if kind != "notch" else 0.0
    return Loss(kind, kind, start, end, side_in=side, **{edge: depth})


def determinate(loss_list: list[Loss], overhang: float) -> Scenario:
    """A joist over one span, with or without an overhang, and with the concentrated load or without."""
    named = tuple(replace(loss, name=f"{loss.name} {n}") for n, loss in enumerate(loss_list, 1))
    return scenario(losses=named, overhang_right_in=overhang, live=OFFICES if len(loss_list) % 2 else scenario().live)


def number(ratio: float | None) -> float:
    """A ratio that does not exist is beyond any other."""
    return float("inf") if ratio is None else ratio


ANY = st.lists(losses(), min_size=1, max_size=4)


@settings(max_examples=80, deadline=None, derandomize=True)
@given(ANY, st.sampled_from((0.0, 30.0)), st.data())
def test_taking_a_defect_away_never_raises_the_ratio(found: list[Loss], overhang: float, data: st.DataObject) -> None:
    made = determinate(found, overhang)
    gone = data.draw(st.integers(0, len(found) - 1))
    fewer = replace(made, losses=tuple(loss for n, loss in enumerate(made.losses) if n != gone))
    assert number(find(fewer).ratio) <= number(find(made).ratio) * (1 + 1e-9)
    if overhang == 0.0:
        before, after = find(made).service_ratio, find(fewer).service_ratio
        assert number(after) <= number(before) * (1 + 1e-9)
        assert (find(fewer).live_load.strength_psf or 0.0) >= (find(made).live_load.strength_psf or 0.0) - 1e-9


@settings(max_examples=60, deadline=None, derandomize=True)
@given(ANY, st.sampled_from((0.0, 30.0)), st.floats(0.01, 5.0), st.sampled_from(("top_in", "bottom_in", "side_in")))
def test_a_deeper_cut_never_lowers_the_ratio(found: list[Loss], overhang: float, more: float, face: str) -> None:
    made = determinate(found, overhang)
    first = made.losses[0]
    if first.kind == "hole":
        deeper = replace(first, diameter_in=first.diameter_in + more)
    else:
        # a notch is in one edge
        face = face if first.kind != "notch" else ("top_in" if first.top_in else "bottom_in")
        deeper = replace(first, **{face: getattr(first, face) + more})
    again = replace(made, losses=(deeper, *made.losses[1:]))
    assert number(find(again).ratio) >= number(find(made).ratio) * (1 - 1e-9)


@settings(max_examples=30, deadline=None, derandomize=True)
@given(st.floats(0.5, 9.0), st.floats(0.0, 3.0), st.sampled_from(("left", "right")))
def test_a_worse_split_never_lowers_the_ratio(remaining: float, less: float, end: str) -> None:
    def ratio(left: float) -> float:
        return number(find(scenario(splits=(Split("end split 1", end, max(left, 0.1), 12.0),))).ratio)

    assert ratio(remaining - less) >= ratio(remaining) * (1 - 1e-12)


@settings(max_examples=30, deadline=None, derandomize=True)
@given(st.floats(80, 150), st.floats(0, 60), st.floats(0.5, 3.0), st.floats(2.5, 6.5))
def test_a_hole_moved_towards_the_support_never_raises_bending(at: float, by: float, size: float, up: float) -> None:
    def ratio(centre: float) -> float:
        hole = Loss("hole 1", "hole", centre - size / 2, centre + size / 2, diameter_in=size, height_in=up)
        return number(one(find(scenario(losses=(hole,))), "bending").ratio)

    assert ratio(at + by) <= ratio(at) * (1 + 1e-12)


def test_wood_gone_beyond_the_member_costs_nothing() -> None:
    whole = find(scenario())
    found = find(scenario(losses=(Loss("decay 1", "decay", -20.0, -1.0, bottom_in=4.0),)))
    assert found.ratio == whole.ratio
    assert one(found, "shear").ratio == one(whole, "shear").ratio


@settings(max_examples=60, deadline=None, derandomize=True)
@given(
    st.floats(0, 1e4) | st.sampled_from((9.25, 9.25 - 1e-9, 1e-300, 1e300)),
    st.floats(0, 1e4) | st.sampled_from((1.5, 1.5 - 1e-12, 1e300)),
    st.floats(1e-9, 400),
    st.sampled_from((0.0, 30.0)),
)
def test_hostile_sizes_are_never_a_pass(deep: float, side: float, length: float, overhang: float) -> None:
    loss = Loss("char 1", "char", 80.0 - length / 2, 80.0 + length / 2, bottom_in=deep, side_in=side)
    found = find(scenario(losses=(loss,), overhang_right_in=overhang))
    json.dumps(found.to_json(), allow_nan=False)
    S = max(1.5 - side, 0.0) * max(9.25 - deep, 0.0) ** 2 / 6
    moment = 50 * 16 / 144 * 160**2 / 8 if overhang == 0.0 else 40 * 16 / 144 * 160**2 / 8
    if S == 0.0:
        broken(found, "nothing is left")
    elif moment * 0.99 / S > 850 * 1.1 * 1.15:
        assert found.verdict == "inadequate"
        assert number(found.ratio) > 1.0


@pytest.mark.parametrize("remaining", ["1/64 in", "1/32 in"])
def test_a_sliver_left_is_never_a_pass(remaining: str) -> None:
    for width, depth in ((remaining, "9 in"), ("1 1/2 in", remaining), (remaining, remaining)):
        found = joist({"defect": "remaining", "width": width, "depth": depth} | SPAN)
        assert found.verdict == "inadequate"
        assert number(found.ratio) > 10.0
        assert found.live_load.posting_psf == 0.0
        json.dumps(found.to_json(), allow_nan=False)
    found = joist({"defect": "end split", "end": "left", "remaining": remaining, "length": "6 in"})
    assert found.verdict == "inadequate"


def test_each_candidate_wood_is_weakened() -> None:
    weak = replace(HEM_FIR_2, label="weak", Fb=500.0)
    loss = Loss("notch 1", "notch", 78.0, 82.0, top_in=2.0)
    alone = find(scenario(losses=(loss,), woods=(weak,)))
    both = find(scenario(losses=(loss,), woods=(HEM_FIR_2, weak)))
    assert both.wood == "weak"
    assert both.ratio == pytest.approx(alone.ratio, rel=1e-12)


# The record refuses what cannot be.

REFUSED = [
    ({"defect": "notch", "edge": "top", "at": "14 ft", "length": "4 in", "depth": "1 in"}, "condition.0.at"),
    ({"defect": "notch", "edge": "top", "at": "13 ft", "length": "2 ft", "depth": "1 in"}, "condition.0.at"),
    ({"defect": "notch", "edge": "bottom", "at": "2 ft", "length": "4 in", "depth": "9 1/2 in"}, "condition.0.depth"),
    ({"defect": "notch", "edge": "bottom", "at": "2 ft", "length": "4 in", "depth": "9 1/4 in"}, "condition.0.depth"),
    ({"defect": "decay", "face": "side", "at": "2 ft", "length": "4 in", "depth": "1 5/8 in"}, "condition.0.depth"),
    ({"defect": "char", "faces": ["top"], "at": "2 ft", "length": "4 in", "depth": "10 in"}, "condition.0.depth"),
    ({"defect": "hole", "at": "2 ft", "diameter": "2 in", "height": "1 in"}, "condition.0.height"),
    ({"defect": "hole", "at": "2 ft", "diameter": "2 in", "height": "8 1/4 in"}, "condition.0.height"),
    ({"defect": "hole", "at": "-2 ft", "diameter": "2 in", "height": "4 in"}, "condition.0.at"),
    ({"defect": "end split", "end": "left", "remaining": "10 in", "length": "4 in"}, "condition.0.remaining"),
    ({"defect": "hanger corrosion", "support": 3}, "condition.0.support"),
]


@pytest.mark.parametrize(("defect", "field"), REFUSED, ids=range(len(REFUSED)))
def test_impossible_defects_are_refused_in_one_line(
    tmp_path: Path, capsys: pytest.CaptureFixture[str], defect: dict[str, Any], field: str
) -> None:
    with pytest.raises(ReadingError) as caught:
        read_member(JOIST | {"condition": [defect]})
    assert caught.value.field == field
    path = tmp_path / "s.survey"
    events = [
        {"willcarry": 1, "site": "Sluice cottage", "units": "US"},
        {"put": "member", "id": "J-1", "data": JOIST | {"condition": [defect]}},
        {"put": "member", "id": "J-2", "data": JOIST},
    ]
    path.write_text("".join(json.dumps(event) + "\n" for event in events), encoding="utf-8")
    assert command.main(["assess", str(path)]) == exits.BAD_INPUT == 2
    out, err = capsys.readouterr()
    lines = [line for line in err.splitlines() if field in line]
    assert len(lines) == 1
    assert "J-1" in lines[0]
    assert "Traceback" not in err
    assert "J-2" in out  # the usable record is still assessed
