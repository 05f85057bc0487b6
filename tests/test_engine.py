"""The spine on whole members: against closed forms, published coefficients, and its own two ways of one thing."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from assess.engine import compute
from assess.finding import Finding
from assess.judge import judge
from assess.pieces import split, worst
from assess.reduction import reduction
from assess.scenario import Edge, LineLoad, Loss, PointLoad, Scenario, UseLoad
from assess.trace import Trace
from assess.working import working
from tests.scenarios import HEM_FIR_2, OFFICES, PLAIN, scenario


def check(made: Scenario, name: str, combination: str) -> float:
    """Ratio of one check in one combination."""
    found = [c for c in find(made).checks if c.check == name and c.combination == combination]
    assert len(found) == 1
    assert found[0].ratio is not None
    return found[0].ratio


def find(made: Scenario) -> Finding:
    """The finding of a scenario."""
    return judge(made, compute(made))


def test_simple_joist_by_hand() -> None:
    # wL^2/8 with w = 50 x 16/144 = 5.5556 lb/in: 17,777.8 lb-in over S = 21.390625 in3 is 831.1 psi;
    # Fb' = 850 x 1.1 x 1.15 = 1,075.25 psi (NDS 4.3); ratio 0.77293
    made = scenario()
    assert check(made, "bending", "D+L") == pytest.approx(50 * 16 / 144 * 160**2 / 8 / 21.390625 / 1075.25, rel=1e-12)
    # V at d from the face, 3.4.3.1: 5.5556 (80 - 0.75 - 9.25) = 388.9 lb; fv = 1.5 V/(bd) = 42.04 psi; Fv' = 150
    assert check(made, "shear", "D+L") == pytest.approx(1.5 * (50 * 16 / 144) * 70.0 / 13.875 / 150, rel=1e-12)
    # reaction 444.4 lb on 1.5 x 1.5 in: 197.5 psi of 405 (3.10.2; Cb 1.0 at a joist's end)
    assert check(made, "bearing", "D+L") == pytest.approx(50 * 16 / 144 * 80 / 2.25 / 405, rel=1e-12)
    # 5wL^4/384EI under 40 psf: limit 160/360 = 0.4444 in
    live = 5 * (40 * 16 / 144) * 160**4 / (384 * 1.3e6 * 98.931640625)
    assert check(made, "live deflection", "L") == pytest.approx(live / (160 / 360), rel=1e-9)
    # KCR 1.5 on dead, limit L/240 (NDS 3.5.2)
    total = 1.5 * live * 10 / 40 + live
    assert check(made, "total deflection", "1.5D+L") == pytest.approx(total / (160 / 240), rel=1e-9)
    # dead alone carries its own CD 0.9
    assert check(made, "bending", "D") == pytest.approx(
        10 * 16 / 144 * 160**2 / 8 / 21.390625 / (0.9 * 1075.25), rel=1e-12
    )


def test_shear_is_not_relieved_where_loads_hang_on_the_side() -> None:
    made = scenario(loaded_on_top=False)
    assert check(made, "shear", "D+L") == pytest.approx(1.5 * (50 * 16 / 144) * 80.0 / 13.875 / 150, rel=1e-12)
    assert check(replace(made, loaded_on_top=True, bearing_on="hanger"), "shear", "D+L") == check(made, "shear", "D+L")


def test_concentrated_load_by_hand() -> None:
    # 2,000 lb on 30 x 30 in; a joist at 16 in takes 16/30 of it, 1,066.7 lb over 30 in, instead of the 50 psf.
    # M = P/4 (L - c/2) = 38,666.7 lb-in at mid-span; the partition allowance of 15 psf stays.
    made = scenario(live=OFFICES, own_weight=False)
    P = 2000 * 16 / 30
    M = P / 4 * (160 - 15) + 25 * 16 / 144 * 160**2 / 8
    assert check(made, "bending", "D+L (concentrated)") == pytest.approx(M / 21.390625 / 1075.25, rel=1e-12)
    # patch at d from the face (3.4.3.1(b)): V = P (L - 10 - 15)/L; uniform part at d
    V = P * (160 - 10 - 15) / 160 + 25 * 16 / 144 * 70
    assert check(made, "shear", "D+L (concentrated)") == pytest.approx(1.5 * V / 13.875 / 150, rel=1e-12)
    R = P * (160 - 15) / 160 + 25 * 16 / 144 * 80
    assert check(made, "bearing", "D+L (concentrated)") == pytest.approx(R / 2.25 / 405, rel=1e-12)
    # a beam, whose spacing is not known, takes all of it
    beam = scenario(live=OFFICES, spacing_in=None, tributary_in=16.0)
    M = 2000 / 4 * (160 - 15) + 25 * 16 / 144 * 160**2 / 8
    assert check(beam, "bending", "D+L (concentrated)") == pytest.approx(M / 21.390625 / (850 * 1.1), rel=1e-12)


def test_the_patch_moved_step_by_step_agrees_with_the_closed_form() -> None:
    # An overhang of next to nothing sends a simple span down the general way, where the patch is placed case by case.
    closed = scenario(live=OFFICES)
    placed = replace(closed, overhang_right_in=1e-6)
    for name in ("bending", "bearing"):
        assert check(placed, name, "D+L (concentrated)") == pytest.approx(
            check(closed, name, "D+L (concentrated)"), rel=1e-6
        )
    # shear at d is met only where a place happens to start there: never above the closed form, and close below it
    ratio = check(placed, "shear", "D+L (concentrated)") / check(closed, "shear", "D+L (concentrated)")
    assert 0.97 < ratio <= 1.0 + 1e-9


def test_two_equal_spans_against_tabled_coefficients() -> None:
    # Two equal spans, one or both loaded (beam tables, e.g. AISC Manual Table 3-22c): both loaded M- = wl^2/8 and
    # R = 1.25 wl; one loaded M+ = 0.0957 wl^2 (0.095703 exactly 49/512).
    made = scenario(spans_in=(120.0, 120.0), dead_psf=0.0, bottom=Edge(held=True))
    w = 40 * 16 / 144
    env = compute(made).envelope
    M, R = env.layout.M, env.layout.R
    i = [c.name for c in env.combinations].index("D+L")
    assert env.low(M)[0, i].min() == pytest.approx(-w * 120**2 / 8, rel=1e-9)
    # the peak of a parabola may fall between two stations: short by w h^2/8 at most, h = 3 in
    peak = 49 / 512 * w * 120**2
    assert peak - w * 3**2 / 8 - 1e-9 <= env.high(M)[0, i].max() <= peak * (1 + 1e-12)
    assert env.high(R)[0, i, 1] == pytest.approx(1.25 * w * 120, rel=1e-9)
    # uplift at the far end when one span is loaded: 0.0625 wl
    assert env.low(R)[0, i, 2] == pytest.approx(-w * 120 / 16, rel=1e-9)


def test_uplift_is_held_by_six_tenths_of_the_dead_load() -> None:
    made = scenario(spans_in=(120.0, 120.0), dead_psf=10.0, bottom=Edge(held=True))
    # lift w_L l/16 against 0.6 (3/8 w_D l): (40/16)/(0.6 x 0.375 x 10) = 1.111
    assert check(made, "uplift", "0.6D+L") == pytest.approx((40 / 16) / (0.6 * 0.375 * 10), rel=1e-9)
    assert find(made).verdict == "inadequate"


def many() -> list[Scenario]:
    """Members of many kinds."""
    typed = (PointLoad("stove", "live", 300.0, 50.0), PointLoad("post", "dead", 420.0, 100.0))
    lines = (LineLoad("partition", "dead", 6.0, 20.0, 90.0),)
    return [
        scenario(),
        scenario(live=OFFICES, own_weight=True),
        scenario(top=Edge(), alike=1),
        scenario(top=Edge(every_in=48.0), wet=True),
        scenario(point_loads=typed, line_loads=lines),
        scenario(spans_in=(120.0, 150.0, 100.0), overhang_right_in=30.0, live=OFFICES),
        scenario(spans_in=(96.0, 140.0), overhang_left_in=24.0, top=Edge(places_in=(40.0, 90.0))),
        scenario(width_in=9.25, depth_in=1.5, on_flat=True, spans_in=(48.0,)),
        scenario(live=None, snow_psf=30.0, roof_live_psf=20.0),
        scenario(incised=True, temperature_F=110.0, width_in=1.5, plies=3, plies_fastened=True),
    ]


@pytest.mark.parametrize("made", many(), ids=range(len(many())))
def test_greatest_live_load_against_bisection(made: Scenario) -> None:
    """The load solved for is the load at which the worst ratio reaches 1 (to 1e-6), the concentrated load apart."""
    found = find(made).live_load

    def worst(psf: float) -> float:
        if made.live is not None:
            trial = replace(made, live=replace(made.live, live_psf=psf, concentrated_lb=None))
        elif made.roof_live_psf > made.snow_psf:
            trial = replace(made, roof_live_psf=psf)
        else:
            trial = replace(made, snow_psf=psf)
        ratio = find(trial).ratio
        return float("inf") if ratio is None else ratio

    assert found.strength_psf is not None
    if found.strength_psf == 0.0:
        assert worst(1e-9) >= 1.0 - 1e-6
        return
    low, high = 0.0, 4 * found.strength_psf + 10
    for _ in range(60):
        middle = 0.5 * (low + high)
        low, high = (middle, high) if worst(middle) <= 1.0 else (low, middle)
    assert found.strength_psf == pytest.approx(low, rel=1e-6)


@pytest.mark.parametrize("made", many(), ids=range(len(many())))
def test_every_printed_formula_gives_its_printed_result(made: Scenario) -> None:
    trace = Trace()
    lines = working(compute(made, trace), trace)
    assert len(lines) > 20
    evaluated = 0
    for line in lines:
        if line.formula is None or line.result is None:
            continue
        printed = {name: float(f"{value:.8g}") for name, value in line.numbers}
        words = {name: getattr(np, name) for name in ("sqrt", "where", "minimum", "maximum", "exp", "pi")}
        again = float(eval(line.formula, {"__builtins__": {}}, words | printed))
        assert again == pytest.approx(float(f"{line.result:.8g}"), rel=1e-5, abs=1e-9), line.text()
        evaluated += 1
    assert evaluated > 15


def test_mirror_image_gives_the_mirrored_answer() -> None:
    loads = (PointLoad("stove", "live", 300.0, 50.0),)
    one = scenario(spans_in=(120.0, 150.0), overhang_left_in=20.0, point_loads=loads, dead_psf=20.0)
    other = replace(
        one,
        spans_in=(150.0, 120.0),
        overhang_left_in=0.0,
        overhang_right_in=20.0,
        point_loads=(replace(loads[0], at_in=270.0 - 50.0),),
    )
    a, b = find(one), find(other)
    assert a.ratio == pytest.approx(b.ratio, rel=1e-9)
    assert a.service_ratio == pytest.approx(b.service_ratio, rel=1e-9)
    assert a.live_load.strength_psf == pytest.approx(b.live_load.strength_psf, rel=1e-9)


def test_no_ratio_where_the_ends_are_not_held() -> None:
    found = find(scenario(ends_held=False))
    assert found.verdict == "inadequate"
    assert found.ratio is None
    assert found.live_load.strength_psf == 0.0
    assert any("ends are not held" in caution for caution in found.cautions)


def test_no_ratio_over_fifty() -> None:
    # lu 160 in: le = 1.63 x 160 + 3 x 20 = 320.8; RB = sqrt(320.8 x 20)/1.5 = 53.4 (NDS 3.3.3.7)
    found = find(scenario(top=Edge(), depth_in=20.0))
    assert found.verdict == "inadequate"
    assert found.ratio is None
    assert any("RB" in caution for caution in found.cautions)


def test_change_of_use_compares_both_ratios() -> None:
    made = scenario(present=UseLoad("bedrooms", 30.0, 0.0, None, 30.0, 30.0, ""))
    change = find(made).change_of_use
    assert change is not None
    # bending governs both: (10 + 40)/(10 + 30) - 1 = 25 %
    assert change.increase == pytest.approx(0.25, rel=1e-9)
    assert change.excused is False
    # by load type: 40 over 30 psf
    assert change.live_increase == pytest.approx(1 / 3, rel=1e-9)
    assert change.alteration is True
    same = scenario(present=replace(PLAIN, name="other", live_psf=38.5))
    change = find(same).change_of_use
    assert change is not None
    assert change.increase == pytest.approx(50 / 48.5 - 1, rel=1e-9)
    assert change.excused is True
    assert change.alteration is False
    # a cut that the work makes has no 5 % tolerance (IEBC 503.3)
    change = find(replace(same, new_work=True)).change_of_use
    assert change is not None
    assert (change.excused, change.alteration) == (False, True)


def test_candidates_disagreeing_leave_it_undetermined() -> None:
    weak = replace(HEM_FIR_2, label="weak", Fb=500.0)
    made = scenario(woods=(HEM_FIR_2, weak))
    found = find(made)
    assert found.verdict == "undetermined"
    assert found.wood == "weak"
    assert find(scenario(woods=(weak, weak))).verdict == "inadequate"


def test_what_is_not_assessed_is_never_adequate() -> None:
    made = scenario(pending=("condition: notch",))
    found = find(made)
    assert found.ratio is not None
    assert found.ratio < 1.0
    assert found.verdict == "undetermined"
    assert any("recorded, not yet assessed: condition: notch" in caution for caution in found.cautions)


def test_dead_load_alone_too_much_is_urgent() -> None:
    found = find(scenario(dead_psf=80.0))
    assert found.shore_now
    assert found.live_load.strength_psf == 0.0
    assert any("overloaded as it stands" in caution for caution in found.cautions)


def test_pieces_over_supports_are_simple_spans() -> None:
    # 150 + 110 in, butted: the longer piece decides, exactly as that simple span alone does
    loads = (PointLoad("stove", "live", 300.0, 200.0),)
    both = scenario(spans_in=(150.0, 110.0), separate=True, point_loads=loads)
    both = replace(both, bearing_measured=(False,) * 3)
    pieces = [find(piece) for _, piece in split(both)]
    merged = worst(list(zip((0.0, 150.0), pieces, strict=True)))
    short = scenario(spans_in=(110.0,), point_loads=(replace(loads[0], at_in=50.0),))
    alone = [find(scenario(spans_in=(150.0,))), find(short)]
    ratios = [f.ratio for f in alone if f.ratio is not None]
    loads_psf = [f.live_load.strength_psf for f in alone if f.live_load.strength_psf is not None]
    assert merged.ratio == pytest.approx(max(ratios), rel=1e-12)
    assert merged.live_load.strength_psf == pytest.approx(min(loads_psf), rel=1e-12)
    assert merged.governs is not None
    assert merged.governs.at_in == pytest.approx(75.0 if ratios[0] == merged.ratio else 200.0, abs=4.0)


def test_a_measured_inner_bearing_is_shared_by_butted_pieces() -> None:
    made = scenario(spans_in=(150.0, 110.0), separate=True, face_in=(0.75,) * 3, bearing_in=(3.0, 4.0, 3.0))
    made = replace(made, bearing_measured=(True,) * 3)
    assert [piece.bearing_in for _, piece in split(made)] == [(3.0, 2.0), (2.0, 3.0)]


def test_a_recorded_hold_down_answers_uplift() -> None:
    loose = scenario(spans_in=(120.0, 120.0), bottom=Edge(held=True), dead_psf=5.0)
    assert find(loose).verdict == "inadequate"
    held = replace(loose, hold_down=(0, 2))
    assert not [c for c in find(held).checks if c.check == "uplift" and c.ratio]
    assert find(held).verdict == "adequate"


def test_live_load_reduction_by_hand() -> None:
    # ASCE 7-16 (4.7-1): interior beam, KLL 2, AT 400 ft2: 0.25 + 15/sqrt(800) = 0.7803; the floor is 0.5 Lo
    assert reduction("beam", 50.0, True, 400.0)[0] == pytest.approx(0.25 + 15 / 800**0.5)
    assert reduction("beam", 50.0, True, 199.0)[0] == 1.0
    assert reduction("beam", 50.0, True, 1e5)[0] == 0.5
    assert reduction("beam", 125.0, True, 400.0)[0] == 1.0
    assert reduction("beam", 50.0, False, 400.0)[0] == 1.0
    assert reduction("joist", 50.0, True, 399.0)[0] == 1.0
    reduced, whole = find(scenario(live=replace(PLAIN, reduction=0.78))), find(scenario())
    assert whole.ratio is not None
    assert whole.live_load.strength_psf is not None
    assert reduced.ratio == pytest.approx(whole.ratio * (10 + 0.78 * 40) / 50, rel=1e-9)
    # the load it can carry is told unreduced
    assert reduced.live_load.strength_psf == pytest.approx(whole.live_load.strength_psf / 0.78, rel=1e-9)


def gone(side_in: float, start: float = 0.0, end: float = 160.0) -> Loss:
    return Loss("char", "char", start, end, side_in=side_in)


def test_sides_lost_to_several_defects_add_up() -> None:
    one, two = scenario(losses=(gone(0.6),)), scenario(losses=(gone(0.3), gone(0.3)))
    assert find(two).ratio == pytest.approx(find(one).ratio, rel=1e-12)


def test_wood_gone_from_the_sides_does_not_bear() -> None:
    # half the breadth gone over the bearings: twice the stress, 2 x 0.48773
    assert check(scenario(losses=(gone(0.75),)), "bearing", "D+L") == pytest.approx(
        2 * check(scenario(), "bearing", "D+L"), rel=1e-12
    )
    assert check(scenario(losses=(gone(0.75, 20.0, 140.0),)), "bearing", "D+L") == check(scenario(), "bearing", "D+L")


def test_pieces_name_supports_and_places_of_the_whole_member() -> None:
    lost = scenario(spans_in=(100.0, 90.0, 110.0), separate=True, lost_bearings=((2, "its hanger is corroded"),))
    merged = worst([(start, find(piece)) for start, piece in split(lost)])
    said = [caution for caution in merged.cautions if "is not relied on" in caution]
    assert said == ["bearing at support 3 is not relied on: its hanger is corroded"]
    through = Loss("decay 1", "decay", 130.0, 150.0, bottom_in=9.25)
    broken = scenario(
        spans_in=(100.0, 90.0), separate=True, losses=(through,), lost_bearings=((0, "decay reaches it"),)
    )
    cautions = worst([(start, find(piece)) for start, piece in split(broken)]).cautions
    # the loss begins 130 in, 10.8 ft, from the first support; the middle of its first stretch is named
    assert any("nothing is left of the section at 10.9 ft" in caution for caution in cautions)
    assert any("support 1 is not relied on" in caution for caution in cautions)
