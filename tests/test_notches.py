"""Notches, splits, fasteners and holes in shear and bending, by hand (NDS 2018 3.4.3, 3.2.3)."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

import pytest

from assess.engine import compute
from assess.finding import Check, Finding
from assess.judge import judge
from assess.scenario import Loss, Part, PointLoad, Scenario, Split
from tests.scenarios import scenario

W_PLI = 50 * 16 / 144  # 10 + 40 psf on 16 in
B, D, L = 1.5, 9.25, 160.0
FV, FB = 150.0, 850 * 1.1 * 1.15  # Fv' and Fb' of the joist of tests.scenarios, dry, CD 1.0


def find(made: Scenario) -> Finding:
    """The finding of a scenario."""
    return judge(made, compute(made))


def check(made: Scenario, name: str, combination: str = "D+L") -> Check:
    """One check in one combination; it has a ratio."""
    (found,) = [c for c in find(made).checks if c.check == name and c.combination == combination]
    return found


def ratio(made: Scenario, name: str) -> float:
    """Its ratio under dead and live load."""
    found = check(made, name).ratio
    assert found is not None
    return found


def notch(at: float, length: float, **cut: float) -> Loss:
    """A notch from its left edge [in]."""
    return Loss("notch 1", "notch", at, at + length, **cut)


def bore(at: float, diameter: float, height: float) -> Loss:
    """A hole by its centre [in]."""
    radius = diameter / 2
    return Loss("hole 1", "hole", at - radius, at + radius, diameter_in=diameter, height_in=height)


def force(x_in: float) -> float:
    """Shear of the uniformly loaded joist at a place [lb]."""
    return abs(W_PLI * (L / 2 - x_in))


def moment(x_in: float) -> float:
    """Moment of the uniformly loaded joist at a place [lb-in]."""
    return W_PLI * x_in * (L - x_in) / 2


# A notch on the tension face: V <= (2/3 Fv' b dn)(dn/d)^2, NDS 3.4.3.2(a), full V (no 3.4.3.1).


def test_end_notch_on_the_tension_face() -> None:
    # 2 in deep to 4 in past the design point: dn 7.25; 2/3 x 150 x 1.5 x 7.25 x (7.25/9.25)^2 = 668.07 lb
    made = scenario(losses=(notch(-0.75, 4.75, bottom_in=2.0),))
    allowed = 2 / 3 * FV * B * 7.25 * (7.25 / 9.25) ** 2
    assert allowed == pytest.approx(668.070, abs=1e-3)
    found = check(made, "shear")
    assert found.ratio == pytest.approx(444.444444 / allowed, rel=1e-8)
    assert found.at_in == 0.0
    assert "3.4.3.2" in found.clause
    assert "3.4.3.1" not in found.clause


def test_quarter_notch_leaves_042_of_the_shear() -> None:
    # d/4 at the end: (3/4)^3 = 0.4219 of the whole depth's shear under the same full V
    cut = ratio(scenario(losses=(notch(-0.75, 4.75, bottom_in=D / 4),)), "shear")
    whole = ratio(scenario(loaded_on_top=False), "shear")  # no relief: the same V
    assert whole / cut == pytest.approx(0.421875, rel=1e-9)


def test_interior_notch_on_the_tension_face() -> None:
    # 4 in deep at 24 to 29 in: V at its near end 5.5556 (80 - 24) = 311.1 lb; dn 5.25:
    # 2/3 x 150 x 1.5 x 5.25 x (5.25/9.25)^2 = 253.7 lb; ratio 1.226
    made = scenario(losses=(notch(24.0, 5.0, bottom_in=4.0),))
    found = check(made, "shear")
    assert found.ratio == pytest.approx(force(24) / (2 / 3 * FV * B * 5.25 * (5.25 / 9.25) ** 2), rel=1e-9)
    assert found.ratio == pytest.approx(1.2265, abs=1e-3)
    assert found.at_in == pytest.approx(24.0)


def test_right_end_notch_mirrors_the_left() -> None:
    left = scenario(losses=(notch(-0.75, 5.0, bottom_in=2.0),))
    right = scenario(losses=(notch(160.75 - 5.0, 5.0, bottom_in=2.0),))
    assert check(right, "shear").ratio == pytest.approx(check(left, "shear").ratio, rel=1e-12)
    assert check(right, "shear").at_in == 160.0
    for top in (5.0, 20.0):  # e within dn and beyond
        left = scenario(losses=(notch(-0.75, top, top_in=4.0),))
        right = scenario(losses=(notch(160.75 - top, top, top_in=4.0),))
        assert check(right, "shear").ratio == pytest.approx(check(left, "shear").ratio, rel=1e-12)


# End notch on the compression face: V <= 2/3 Fv' b [d - ((d - dn)/dn) e], NDS 3.4.3.2(e).


def test_end_notch_on_the_compression_face() -> None:
    # 3 in off the top to 5 in past the face: dn 6.25, e 5: 9.25 - 3/6.25 x 5 = 6.85 in
    made = scenario(losses=(notch(-0.75, 6.5, top_in=3.0),))
    assert check(made, "shear").ratio == pytest.approx(444.444444 / (2 / 3 * FV * B * 6.85), rel=1e-8)
    # at e = dn both rules give dn
    made = scenario(losses=(notch(-0.75, 0.75 + 0.75 + 6.25, top_in=3.0),))
    assert check(made, "shear").ratio == pytest.approx(444.444444 / (2 / 3 * FV * B * 6.25), rel=1e-8)


@pytest.mark.parametrize("e", [6.5, 8.0, 12.0])
def test_long_end_notch_on_the_compression_face_has_only_its_own_depth(e: float) -> None:
    # e over dn 6.25: use dn as the depth
    made = scenario(losses=(notch(-0.75, 1.5 + e, top_in=3.0),))
    assert check(made, "shear").ratio == pytest.approx(444.444444 / (2 / 3 * FV * B * 6.25), rel=1e-8)


def test_end_notch_that_stops_at_the_face_costs_no_shear() -> None:
    # e 0: the whole depth, but full V; dn inside the support does not count
    made = scenario(losses=(notch(-0.75, 1.5, top_in=3.0),))
    assert check(made, "shear").ratio == pytest.approx(444.444444 / (2 / 3 * FV * B * 9.25), rel=1e-8)


@pytest.mark.parametrize("turned", [False, True])
def test_a_compression_notch_gives_nothing_back_of_another_cut(turned: bool) -> None:
    # 2 in off the bottom and 1 in off the top over the same end: dn 6.25 on the tension face, whichever came first
    both = (notch(-0.75, 4.75, bottom_in=2.0), replace(notch(-0.75, 4.75, top_in=1.0), name="notch 2"))
    made = scenario(losses=both[::-1] if turned else both)
    allowed = 2 / 3 * FV * B * 6.25 * (6.25 / 9.25) ** 2
    assert check(made, "shear").ratio == pytest.approx(444.444444 / allowed, rel=1e-8)


def test_a_compression_notch_gives_nothing_back_of_char() -> None:
    # e 0 would give the whole 9.25 in; the 3 in charred off the bottom stay gone: 9.25 - 2 - 3 = 4.25 in
    char = Loss("char 1", "char", -0.75, 40.0, bottom_in=3.0)
    made = scenario(losses=(char, notch(-0.75, 1.5, top_in=2.0)))
    assert check(made, "shear").ratio == pytest.approx(444.444444 / (2 / 3 * FV * B * 4.25), rel=1e-8)


# Which face is in tension follows the sign of the moment.


def test_top_notch_over_an_inner_support_is_on_the_tension_face() -> None:
    # two spans of 120: V = 5/8 wL = 0.625 x 5.5556 x 120 = 416.7 lb, patterns do not raise it; dn 7.25
    spans: dict[str, Any] = {"spans_in": (120.0, 120.0), "losses": (notch(116.0, 8.0, top_in=2.0),)}
    found = check(scenario(**spans), "shear")
    env = compute(scenario(**spans)).envelope
    i = [c.name for c in env.combinations].index("D+L")
    V = max(env.high(env.layout.V)[0, i].max(), -env.low(env.layout.V)[0, i].min())
    assert pytest.approx(0.625 * W_PLI * 120, rel=0.03) == V  # the notch softens the support a little
    assert found.at_in == 120.0
    assert found.ratio == pytest.approx(V / (2 / 3 * FV * B * 7.25 * (7.25 / 9.25) ** 2), rel=1e-9)


def test_bottom_notch_over_an_inner_support_is_not() -> None:
    # dn as depth, no square: the bottom is in compression in every pattern there
    made = scenario(spans_in=(120.0, 120.0), losses=(notch(116.0, 8.0, bottom_in=2.0),))
    env = compute(made).envelope
    i = [c.name for c in env.combinations].index("D+L")
    V = max(env.high(env.layout.V)[0, i].max(), -env.low(env.layout.V)[0, i].min())
    assert check(made, "shear").ratio == pytest.approx(V / (2 / 3 * FV * B * 7.25), rel=1e-9)


def test_the_same_top_notch_at_midspan_is_in_compression() -> None:
    # a point load makes shear there: a simple span, 700 lb at 80 in; V is 350 + w x from the middle
    load = (PointLoad("stove", "live", 700.0, 80.0),)
    made = scenario(losses=(notch(76.0, 8.0, top_in=2.0),), point_loads=load)
    bottom = replace(made, losses=(notch(76.0, 8.0, bottom_in=4.0),))
    top = replace(made, losses=(notch(76.0, 8.0, top_in=4.0),))
    V = 350 + force(76)
    end = (350 + force(0)) / (2 / 3 * FV * B * 9.25)  # full V everywhere, with any notch
    assert check(top, "shear").ratio == pytest.approx(max(V / (2 / 3 * FV * B * 5.25), end), rel=1e-9)
    assert check(bottom, "shear").ratio == pytest.approx(V / (2 / 3 * FV * B * 5.25 * (5.25 / 9.25) ** 2), rel=1e-9)
    assert check(bottom, "shear").at_in == pytest.approx(80.0, abs=4.0)


def test_top_notch_on_an_overhang_is_on_the_tension_face() -> None:
    # 40 in overhang: V = 5.5556 x 40 = 222.2 lb at its root, within the notch; dn 5.25
    made = scenario(spans_in=(60.0,), overhang_right_in=40.0, losses=(notch(60.0, 6.0, top_in=4.0),))
    allowed = 2 / 3 * FV * B * 5.25 * (5.25 / 9.25) ** 2
    assert check(made, "shear").ratio == pytest.approx(W_PLI * 40 / allowed, rel=1e-9)


# Full V wherever a rule of 3.4.3.2 or 3.4.3.3 applies; relief of 3.4.3.1 elsewhere.


@pytest.mark.parametrize(
    "cut",
    [
        {"losses": (notch(80.0, 1.0, top_in=0.01),)},
        {"splits": (Split("end split 1", "right", D, 1.0),)},
        {"hung_de_in": D},
    ],
)
def test_a_notch_a_split_or_fasteners_take_the_relief_away(cut: dict[str, Any]) -> None:
    assert check(scenario(), "shear").ratio == pytest.approx(1.5 * W_PLI * 70 / (B * D) / FV, rel=1e-9)
    found = check(scenario(**cut), "shear")
    assert found.ratio == pytest.approx(1.5 * W_PLI * 80 / (B * D) / FV, rel=1e-9)
    assert "3.4.3.1" not in found.clause


def test_a_hole_keeps_the_relief() -> None:
    found = check(scenario(losses=(bore(80.0, 1.0, 4.625),)), "shear")
    assert found.ratio == pytest.approx(1.5 * W_PLI * 70 / (B * D) / FV, rel=1e-9)


# Fasteners that hang the member, NDS 3.4.3.3.


def test_hung_by_fasteners_at_the_ends() -> None:
    # de 6: 2/3 x 150 x 1.5 x 6 x (6/9.25)^2 = 378.7 lb against 444.4
    allowed = 2 / 3 * FV * B * 6.0 * (6.0 / 9.25) ** 2
    found = check(scenario(hung_de_in=6.0), "shear")
    assert found.ratio == pytest.approx(444.444444 / allowed, rel=1e-8)
    assert "3.4.3.3" in found.clause


def test_hung_within_five_depths_of_the_end_and_beyond() -> None:
    # An overhang of 30 in is within 5 x 9.25 = 46.25 in of the end, one of 60 in is not: de alone, no square.
    for overhang, factor in ((30.0, (8.9 / 9.25) ** 2), (60.0, 1.0)):
        made = scenario(spans_in=(80.0,), overhang_left_in=overhang, hung_de_in=8.9)
        env = compute(made).envelope
        i = [c.name for c in env.combinations].index("D+L")
        V = greatest(env.high(env.layout.V)[0, i], env.low(env.layout.V)[0, i])
        at_left = check(made, "shear")
        assert at_left.at_in == 0.0
        assert at_left.ratio == pytest.approx(V / (2 / 3 * FV * B * 8.9 * factor), rel=1e-9)


def test_hung_at_an_inner_support() -> None:
    # 120 in from either end: 2/3 Fv' b de with V = 5/8 wL; de 8.9 keeps the ends (V <= 0.4375 wL, squared) below it
    made = scenario(spans_in=(120.0, 120.0), hung_de_in=8.9)
    found = check(made, "shear")
    assert found.at_in == 120.0
    assert found.ratio == pytest.approx(0.625 * W_PLI * 120 / (2 / 3 * FV * B * 8.9), rel=1e-9)


def greatest(high: Any, low: Any) -> float:
    """Greatest shear of either sign."""
    return max(float(high.max()), -float(low.min()))


# End split: what remains stands as dn of a tension-side notch.


def test_end_split() -> None:
    made = scenario(splits=(Split("end split 1", "left", 6.0, 10.0),))
    allowed = 2 / 3 * FV * B * 6.0 * (6.0 / 9.25) ** 2
    assert check(made, "shear").ratio == pytest.approx(444.444444 / allowed, rel=1e-8)
    right = scenario(splits=(Split("end split 1", "right", 6.0, 10.0),))
    assert check(right, "shear").ratio == pytest.approx(444.444444 / allowed, rel=1e-8)
    assert (check(made, "shear").at_in, check(right, "shear").at_in) == (0.0, 160.0)


def test_split_of_an_overhang_counts_to_its_inner_end() -> None:
    # 5.1 in from the tip of a 24 in overhang: shear grows inward, w x 5.1 at the least; 0.5 in of depth left
    made = scenario(spans_in=(60.0,), overhang_left_in=24.0, splits=(Split("end split 1", "left", 0.5, 5.1),))
    allowed = 2 / 3 * FV * B * 0.5 * (0.5 / 9.25) ** 2
    assert ratio(made, "shear") >= W_PLI * 5.1 / allowed
    assert ratio(made, "shear") <= W_PLI * (5.1 + 24.0 / 40 + 1e-9) / allowed


def test_split_in_charred_wood_keeps_the_lesser() -> None:
    char = Loss("char 1", "char", -0.75, 30.0, bottom_in=5.0)
    made = scenario(losses=(char,), splits=(Split("end split 1", "left", 6.0, 10.0),))
    allowed = 2 / 3 * FV * B * 4.25 * (4.25 / 9.25) ** 2
    assert check(made, "shear").ratio == pytest.approx(444.444444 / allowed, rel=1e-8)


# Holes, and bending at cuts.


def test_hole_takes_shear_on_what_is_left_of_the_depth() -> None:
    # phi 3 at 20 in: V at 18.5 in 341.7 lb on 1.5 x 6.25 in (engineering basis 5)
    made = scenario(losses=(bore(20.0, 3.0, 4.625),))
    assert check(made, "shear").ratio == pytest.approx(1.5 * force(18.5) / (B * 6.25) / FV, rel=1e-9)
    assert check(made, "shear").at_in == 18.5


def test_hole_in_bending_is_two_strips() -> None:
    # phi 3 at mid-depth at midspan: S (1 - (3/9.25)^3)
    made = scenario(losses=(bore(80.0, 3.0, 4.625),))
    S = B * D**2 / 6 * (1 - (3 / 9.25) ** 3)
    assert check(made, "bending").ratio == pytest.approx(moment(80) / S / FB, rel=1e-9)


def test_notch_in_bending_is_the_depth_left() -> None:
    # b (d - n)^2/6 with n 2 at midspan: 13.14 in3
    for edge in ("top_in", "bottom_in"):
        made = scenario(losses=(notch(78.0, 4.0, **{edge: 2.0}),))
        assert check(made, "bending").ratio == pytest.approx(moment(80) / (B * 7.25**2 / 6) / FB, rel=1e-9)


def test_interior_notch_near_the_wall_governs_while_midspan_is_fine() -> None:
    # 4 1/2 in off the bottom, 24 to 29 in from the support: S 1.5 x 4.75^2/6 = 5.641 in3 under M(29) = 10,552 lb-in
    whole = scenario()
    assert check(whole, "bending").ratio == pytest.approx(0.77293, abs=1e-4)
    assert check(whole, "bending").at_in == 80.0
    made = scenario(losses=(notch(24.0, 5.0, top_in=4.5),))
    found = find(made)
    assert found.verdict == "inadequate"
    assert found.governs is not None
    assert (found.governs.check, found.governs.combination, found.governs.at_in) == ("bending", "D+L", 29.0)
    assert found.ratio == pytest.approx(moment(29) / (B * 4.75**2 / 6) / FB, rel=1e-9)


def test_a_narrow_notch_between_grid_stations_governs() -> None:
    # The grid stands every 4 in; half an inch from 41.3 to 41.8 in is between two stations of it.
    made = scenario(losses=(notch(41.3, 0.5, top_in=4.0),))
    found = find(made)
    assert found.governs is not None
    assert found.governs.at_in == pytest.approx(41.8)
    assert found.ratio == pytest.approx(moment(41.8) / (B * 5.25**2 / 6) / FB, rel=1e-9)
    # and in shear on the tension face
    cut = check(scenario(losses=(notch(41.3, 0.5, bottom_in=5.0),)), "shear")
    assert cut.ratio == pytest.approx(force(41.3) / (2 / 3 * FV * B * 4.25 * (4.25 / 9.25) ** 2), rel=1e-9)


def test_plies_share_a_notch_by_their_whole_breadth() -> None:
    part = Part("member", 1.5, 9.25, 2, True, False, scenario().parts[0].woods)
    made = replace(scenario(losses=(notch(-0.75, 4.75, bottom_in=2.0),)), parts=(part,))
    allowed = 2 / 3 * FV * 3.0 * 7.25 * (7.25 / 9.25) ** 2
    assert check(made, "shear").ratio == pytest.approx(444.444444 / allowed, rel=1e-8)
