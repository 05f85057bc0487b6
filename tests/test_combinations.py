"""Load combinations and their duration factors, against a table worked by hand from the clauses, and on a member."""

from __future__ import annotations

from itertools import combinations as subsets

import pytest

from assess.combinations import CONCENTRATED, TYPES, combinations
from assess.engine import Computed, compute
from assess.judge import judge
from assess.scenario import Edge, LineLoad, PointLoad, Scenario
from tests.scenarios import OFFICES, PLAIN, scenario

D, L, LC, LR, S, C, W = "dead", "live", CONCENTRATED, "roof live", "snow", "construction", "wind"
Row = tuple[str, dict[str, float], float]

# ASCE 7-16 2.4.1 by number, with CD of the shortest load in it (NDS 2018 2.3.2.2, Table 2.3.2: permanent 0.9,
# ten years 1.0, two months 1.15, seven days 1.25, ten minutes 1.6).
ONE: Row = ("D", {D: 1.0}, 0.9)
TWO: Row = ("D+L", {D: 1.0, L: 1.0}, 1.0)
TWO_C: Row = ("D+L (concentrated)", {D: 1.0, LC: 1.0}, 1.0)
THREE_LR: Row = ("D+Lr", {D: 1.0, LR: 1.0}, 1.25)
THREE_S: Row = ("D+S", {D: 1.0, S: 1.0}, 1.15)
FOUR_LR: Row = ("D+0.75L+0.75Lr", {D: 1.0, L: 0.75, LR: 0.75}, 1.25)
FOUR_S: Row = ("D+0.75L+0.75S", {D: 1.0, L: 0.75, S: 0.75}, 1.15)
FOUR_LR_C: Row = ("D+0.75L+0.75Lr (concentrated)", {D: 1.0, LC: 0.75, LR: 0.75}, 1.25)
FOUR_S_C: Row = ("D+0.75L+0.75S (concentrated)", {D: 1.0, LC: 0.75, S: 0.75}, 1.15)
FIVE: Row = ("D+0.6W", {D: 1.0, W: 0.6}, 1.6)
SIX: Row = ("D+0.75L+0.75(0.6W)", {D: 1.0, L: 0.75, W: 0.45}, 1.6)
SIX_C: Row = ("D+0.75L+0.75(0.6W) (concentrated)", {D: 1.0, LC: 0.75, W: 0.45}, 1.6)
SIX_L_LR: Row = ("D+0.75L+0.75(0.6W)+0.75Lr", {D: 1.0, L: 0.75, W: 0.45, LR: 0.75}, 1.6)
SIX_L_S: Row = ("D+0.75L+0.75(0.6W)+0.75S", {D: 1.0, L: 0.75, W: 0.45, S: 0.75}, 1.6)
SIX_LR: Row = ("D+0.75(0.6W)+0.75Lr", {D: 1.0, W: 0.45, LR: 0.75}, 1.6)
SIX_S: Row = ("D+0.75(0.6W)+0.75S", {D: 1.0, W: 0.45, S: 0.75}, 1.6)
SEVEN: Row = ("0.6D+0.6W", {D: 0.6, W: 0.6}, 1.6)
# Construction load is not in 2.4.1; with dead load alone, seven days (NDS Table 2.3.2).
BUILDING: Row = ("D+C", {D: 1.0, C: 1.0}, 1.25)

BY_HAND: dict[str, tuple[set[str], list[Row]]] = {
    "dead alone": ({D}, [ONE]),
    "floor": ({D, L}, [ONE, TWO]),
    "floor with a concentrated load": ({D, L, LC}, [ONE, TWO, TWO_C]),
    "rafter, snow": ({D, S}, [ONE, THREE_S]),
    "rafter, roof live load": ({D, LR}, [ONE, THREE_LR]),
    "rafter, both": ({D, S, LR}, [ONE, THREE_LR, THREE_S]),
    "floor and snow": ({D, L, S}, [ONE, TWO, THREE_S, FOUR_S]),
    "floor, snow, roof live load": ({D, L, S, LR}, [ONE, TWO, THREE_LR, THREE_S, FOUR_LR, FOUR_S]),
    "floor with a concentrated load, snow, roof live load": (
        {D, L, LC, S, LR},
        [ONE, TWO, TWO_C, THREE_LR, THREE_S, FOUR_LR, FOUR_LR_C, FOUR_S, FOUR_S_C],
    ),
    "wind": ({D, W}, [ONE, FIVE, SEVEN]),
    "floor and wind": ({D, L, W}, [ONE, TWO, FIVE, SIX, SEVEN]),
    "floor with a concentrated load and wind": ({D, L, LC, W}, [ONE, TWO, TWO_C, FIVE, SIX, SIX_C, SEVEN]),
    "roof in snow and wind": ({D, S, W}, [ONE, THREE_S, FIVE, SIX_S, SEVEN]),
    "roof under workers and wind": ({D, LR, W}, [ONE, THREE_LR, FIVE, SIX_LR, SEVEN]),
    "all but construction": (
        {D, L, LR, S, W},
        [ONE, TWO, THREE_LR, THREE_S, FOUR_LR, FOUR_S, FIVE, SIX, SIX_L_LR, SIX_L_S, SIX_LR, SIX_S, SEVEN],
    ),
    "construction": ({D, C}, [ONE, BUILDING]),
    "floor and construction": ({D, L, C}, [ONE, TWO, BUILDING]),
}


@pytest.mark.parametrize(("present", "rows"), BY_HAND.values(), ids=BY_HAND)
def test_combinations_are_those_of_the_clauses(present: set[str], rows: list[Row]) -> None:
    found = [(c.name, dict(c.coefficients), c.CD) for c in combinations(frozenset(present))]
    assert found == rows


def test_every_set_of_loads_keeps_the_rules_of_the_clauses() -> None:
    duration = {D: 0.9, L: 1.0, LC: 1.0, S: 1.15, C: 1.25, LR: 1.25, W: 1.6}  # NDS Table 2.3.2
    others = [t for t in TYPES if t != D]
    for count in range(len(others) + 1):
        for chosen in subsets(others, count):
            for present in ({D, *chosen}, {D, LC, *chosen}) if L in chosen else ({D, *chosen},):
                found = combinations(frozenset(present))
                assert (found[0].name, found[0].CD) == ("D", 0.9)  # dead alone always
                assert len({c.name for c in found}) == len(found)
                for c in found:
                    acting = dict(c.coefficients)
                    assert set(acting) <= present
                    assert max(duration[t] for t in acting) == c.CD
                    assert acting[D] == (0.6 if c.name.startswith("0.6D") else 1.0)
                    assert not (L in acting and LC in acting)  # ASCE 7-16 4.4: one instead of the other
                    assert not (LR in acting and S in acting)  # (Lr or S)
                    assert not (C in acting and len(acting) > 2)
                # each load stands in full in some row: alone with dead load (0.6 of it for wind, 2.4.1 5)
                for load in present - {D}:
                    whole = 0.6 if load == W else 1.0
                    assert any(dict(c.coefficients) == {D: 1.0, load: whole} for c in found), (present, load)


# One station by hand. Simple span of 200 in, everything symmetrical, so that mid-span governs bending. Sagging
# moments at mid-span [lb-in]: D 10 psf at 16 in: 1.1111 x 200^2/8; L 40 psf: 4.4444 x 200^2/8; S 9 plf = 0.75 lb/in
# over the middle 100 in: 37.5 (100 - 25) = 2,812.5; Lr 180 lb at mid-span: 180 x 200/4; W 150 lb upward there.
M_D, M_L = 10 * 16 / 144 * 5000.0, 40 * 16 / 144 * 5000.0
M_S, M_LR, M_W = 0.75 * 50 * (100 - 25), 180 * 50.0, -150 * 50.0
MOMENTS = {
    "D": M_D,
    "D+L": M_D + M_L,
    "D+Lr": M_D + M_LR,
    "D+S": M_D + M_S,
    "D+0.75L+0.75Lr": M_D + 0.75 * (M_L + M_LR),
    "D+0.75L+0.75S": M_D + 0.75 * (M_L + M_S),
    "D+0.6W": M_D + 0.6 * M_W,
    "D+0.75L+0.75(0.6W)": M_D + 0.75 * M_L + 0.45 * M_W,
    "D+0.75L+0.75(0.6W)+0.75Lr": M_D + 0.75 * (M_L + M_LR) + 0.45 * M_W,
    "D+0.75L+0.75(0.6W)+0.75S": M_D + 0.75 * (M_L + M_S) + 0.45 * M_W,
    "D+0.75(0.6W)+0.75Lr": M_D + 0.75 * M_LR + 0.45 * M_W,
    "D+0.75(0.6W)+0.75S": M_D + 0.75 * M_S + 0.45 * M_W,
    "0.6D+0.6W": 0.6 * M_D + 0.6 * M_W,
}


def loaded(wind_lb: float = -150.0) -> Scenario:
    return scenario(
        spans_in=(200.0,),
        bottom=Edge(held=True),
        line_loads=(LineLoad("drift", "snow", 0.75, 50.0, 150.0),),
        point_loads=(
            PointLoad("workers", "roof live", 180.0, 100.0),
            PointLoad("gust", "wind", wind_lb, 100.0),
        ),
    )


def at_mid_span(computed: Computed, name: str) -> tuple[float, float]:
    """Highest and lowest moment at 100 in under a combination."""
    env = computed.envelope
    i = [c.name for c in env.combinations].index(name)
    station = int(abs(computed.mesh.x[0] - 100.0).argmin())
    assert computed.mesh.x[0, station] == pytest.approx(100.0, abs=1e-9)
    return env.high(env.layout.M)[0, i, station], env.low(env.layout.M)[0, i, station]


def test_the_member_has_all_thirteen_combinations() -> None:
    assert [c.name for c in compute(loaded()).envelope.combinations] == list(MOMENTS)


@pytest.mark.parametrize("name", MOMENTS)
def test_a_station_by_hand(name: str) -> None:
    # The highest moment has every live, snow and roof live load on; the lowest has them off (ASCE 7-16 4.3.3, 7.5).
    computed = compute(loaded())
    high, low = at_mid_span(computed, name)
    assert high == pytest.approx(MOMENTS[name], rel=1e-12)
    always = (0.6 if name.startswith("0.6D") else 1.0) * M_D
    always += M_W * (0.6 if name in ("D+0.6W", "0.6D+0.6W") else 0.45 if "W" in name else 0.0)
    assert low == pytest.approx(always, rel=1e-12)


@pytest.mark.parametrize("name", [name for name in MOMENTS if MOMENTS[name] > 0.0 and "W" not in name])
def test_bending_of_the_combination_by_hand(name: str) -> None:
    # M over S = 21.390625 in3; Fb' = 850 (1.1)(1.15) CD (NDS 4.3)
    made = loaded()
    duration = {row[0]: row[2] for _, rows in BY_HAND.values() for row in rows}[name]
    check = {(c.check, c.combination): c for c in judge(made, compute(made)).checks}["bending", name]
    assert check.at_in == pytest.approx(100.0)
    assert check.factors["CD"] == duration
    assert check.demand == pytest.approx(MOMENTS[name] / 21.390625, rel=1e-12)
    assert check.ratio == pytest.approx(MOMENTS[name] / 21.390625 / (850 * 1.1 * 1.15 * duration), rel=1e-12)


def test_uplift_by_wind_bends_the_member_the_other_way() -> None:
    # W 1,500 lb upward at mid-span: 0.6 (5,555.6 - 75,000) = -41,666.7 lb-in; bottom edge held, CD 1.6
    made = loaded(-1500.0)
    check = {(c.check, c.combination): c for c in judge(made, compute(made)).checks}["bending", "0.6D+0.6W"]
    M = 0.6 * (1500 * 50.0 - M_D)
    assert check.demand == pytest.approx(M / 21.390625, rel=1e-12)
    assert check.ratio == pytest.approx(M / 21.390625 / (850 * 1.1 * 1.15 * 1.6), rel=1e-12)
    # and lifts each support: 0.6 x 750 - 0.6 x 111.1 held: over 1 (2.4.1 7)
    lift = {c.combination: c for c in judge(made, compute(made)).checks if c.check == "uplift"}
    assert lift["0.6D+0.6W"].demand == pytest.approx(0.6 * 750.0, rel=1e-12)
    assert lift["0.6D+0.6W"].capacity == pytest.approx(0.6 * 10 * 16 / 144 * 100.0, rel=1e-12)


def test_wind_downward_takes_no_live_load_away() -> None:
    # 5 against 6: D + 0.6W = 5,555.6 + 4,500; with 0.75L it is 5,555.6 + 16,666.7 + 3,375
    made = loaded(150.0)
    assert at_mid_span(compute(made), "D+0.6W")[0] == pytest.approx(M_D + 0.6 * 7500.0, rel=1e-12)
    assert at_mid_span(compute(made), "D+0.75L+0.75(0.6W)")[0] == pytest.approx(M_D + 0.75 * M_L + 0.45 * 7500.0)


def test_the_concentrated_load_stands_in_for_the_uniform_one_in_every_combination() -> None:
    # 2,000 lb on 30 in, a joist at 16 in takes 16/30 of it: M = P/4 (200 - 15) = 49,333.3 lb-in at mid-span; the
    # partition allowance of 15 psf, a live load beside it (ASCE 7-16 4.3.2), stays, at the coefficient of live load.
    made = scenario(spans_in=(200.0,), live=OFFICES, snow_psf=30.0)
    M_P, M_partition = 2000 * 16 / 30 / 4 * 185, 15 * 16 / 144 * 5000
    M_snow, M_uniform = 30 * 16 / 144 * 5000, 50 * 16 / 144 * 5000
    computed = compute(made)
    by_hand = {
        "D+L": M_D + M_uniform + M_partition,
        "D+L (concentrated)": M_D + M_P + M_partition,
        "D+S": M_D + M_snow,
        "D+0.75L+0.75S": M_D + 0.75 * (M_uniform + M_partition + M_snow),
        "D+0.75L+0.75S (concentrated)": M_D + 0.75 * (M_P + M_partition + M_snow),
    }
    for name, moment in by_hand.items():
        assert at_mid_span(computed, name)[0] == pytest.approx(moment, rel=1e-12), name


def test_a_typed_live_load_brings_live_combinations_to_a_roof() -> None:
    # A rafter under snow with a typed live load: D+L at CD 1.0 is there too, the live load alone in it.
    made = scenario(
        live=None, snow_psf=20.0, spans_in=(200.0,), point_loads=(PointLoad("hoist", "live", 300.0, 100.0),)
    )
    computed = compute(made)
    M_snow, M_hoist = 20 * 16 / 144 * 5000, 300 * 50.0
    assert [c.name for c in computed.envelope.combinations] == ["D", "D+L", "D+S", "D+0.75L+0.75S"]
    assert at_mid_span(computed, "D+L")[0] == pytest.approx(M_D + M_hoist, rel=1e-12)
    assert at_mid_span(computed, "D+0.75L+0.75S")[0] == pytest.approx(M_D + 0.75 * (M_hoist + M_snow), rel=1e-12)


def test_construction_load_never_meets_live_load() -> None:
    made = scenario(spans_in=(200.0,), live=PLAIN, point_loads=(PointLoad("pallet", "construction", 900.0, 100.0),))
    computed = compute(made)
    assert [c.name for c in computed.envelope.combinations] == ["D", "D+L", "D+C"]
    assert at_mid_span(computed, "D+L")[0] == pytest.approx(M_D + M_L, rel=1e-12)
    assert at_mid_span(computed, "D+C")[0] == pytest.approx(M_D + 900 * 50.0, rel=1e-12)
