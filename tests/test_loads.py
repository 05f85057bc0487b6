"""Combinations against a table worked by hand; patterned live load against every subset of loaded lengths."""

from __future__ import annotations

from itertools import product
from typing import Any

import numpy as np
import pytest

from assess.combinations import combinations
from assess.engine import compute
from assess.finding import Finding
from assess.judge import judge
from assess.scenario import Edge, LineLoad, PointLoad, Scenario
from assess.statics import solve
from tests.scenarios import PLAIN, scenario


def listed(*present: str) -> list[tuple[str, float]]:
    return [(c.name, c.CD) for c in combinations(frozenset({"dead", *present}))]


def test_combinations_by_clause() -> None:
    # ASCE 7-16 2.4.1: 1 D; 2 D+L; 3 D+(Lr or S); 4 D+0.75L+0.75(Lr or S); 5 D+0.6W; 6 D+0.75L+0.75(0.6W)+0.75(Lr or S);
    # 7 0.6D+0.6W. CD by the shortest load in each, NDS Table 2.3.2: D 0.9, L 1.0, S 1.15, Lr and C 1.25, W 1.6.
    assert listed() == [("D", 0.9)]
    assert listed("live") == [("D", 0.9), ("D+L", 1.0)]
    assert listed("snow") == [("D", 0.9), ("D+S", 1.15)]
    assert listed("roof live") == [("D", 0.9), ("D+Lr", 1.25)]
    assert listed("live", "snow") == [("D", 0.9), ("D+L", 1.0), ("D+S", 1.15), ("D+0.75L+0.75S", 1.15)]
    assert listed("construction") == [("D", 0.9), ("D+C", 1.25)]
    assert listed("snow", "wind") == [
        ("D", 0.9), ("D+S", 1.15), ("D+0.6W", 1.6), ("D+0.75(0.6W)+0.75S", 1.6), ("0.6D+0.6W", 1.6),
    ]  # fmt: skip
    both = dict(listed("live", "snow", "wind"))
    assert both["D+0.75L+0.75(0.6W)+0.75S"] == 1.6
    assert both["D+0.75L+0.75(0.6W)"] == 1.6
    assert both["D+L"] == 1.0  # a load taken away takes its CD with it
    assert dict(listed("live", "concentrated"))["D+L (concentrated)"] == 1.0
    row = next(c for c in combinations(frozenset({"dead", "live", "wind", "snow"})) if c.name.endswith("0.75S"))
    assert {kind: row.of(kind) for kind in ("dead", "live", "snow")} == {"dead": 1.0, "live": 0.75, "snow": 0.75}


def test_every_combination_keeps_its_own_duration_factor() -> None:
    # D 40 psf, S 10 psf: D alone at 0.9 governs over D+S at 1.15 where D/(D+S) > 0.9/1.15
    made = scenario(live=None, dead_psf=40.0, snow_psf=10.0)
    checks = {(c.check, c.combination): c for c in judge(made, compute(made)).checks}
    dead, snow = checks["bending", "D"], checks["bending", "D+S"]
    assert dead.ratio is not None
    assert snow.ratio is not None
    assert dead.ratio / snow.ratio == pytest.approx((40 / 0.9) / (50 / 1.15), rel=1e-12)
    assert snow.factors["CD"] == 1.15
    bearing = checks["bearing", "D+S"]
    assert "CD" not in bearing.factors  # never on compression perpendicular to grain


SUPPORTED = [
    {"spans_in": (120.0, 150.0)},
    {"spans_in": (100.0, 140.0, 90.0)},
    {"spans_in": (96.0, 96.0, 120.0, 84.0)},
    {"spans_in": (90.0, 110.0, 100.0, 120.0, 80.0)},
    {"spans_in": (120.0,), "overhang_left_in": 30.0},
    {"spans_in": (130.0, 110.0), "overhang_left_in": 24.0, "overhang_right_in": 36.0},
]


@pytest.mark.parametrize("supported", SUPPORTED, ids=[str(len(s["spans_in"])) + "-" + str(len(s)) for s in SUPPORTED])
def test_patterns_against_every_subset(supported: dict[str, object]) -> None:
    made = scenario(**supported, point_loads=(PointLoad("stove", "live", 300.0, 50.0),), loaded_on_top=False)
    computed = compute(made)
    env, mesh = computed.envelope, computed.mesh
    i = [c.name for c in env.combinations].index("D+L")
    lengths, N = mesh.lengths, mesh.x.shape[1]
    width = 16.0 / 144.0
    EI = np.full((1, N - 1), 1.3e6 * 1.5 * 9.25**3 / 12)
    best: dict[str, tuple[Any, Any] | None] = dict.fromkeys(("M", "R", "y"))
    for on in product((0.0, 1.0), repeat=lengths + 1):
        w = np.full((1, 1, N - 1), 10.0 * width)
        for number in range(lengths):
            w[0, 0, mesh.segment[0] == number] += 40.0 * width * on[number]
        P = np.zeros((1, 1, N))
        P[0, 0, mesh.points[0][0]] = 300.0 * on[-1]
        beam = solve(mesh.x, EI, mesh.supports, w, P)
        for name in best:
            values = getattr(beam, name)[0, 0]
            high, low = best[name] or (values, values)
            best[name] = (np.maximum(high, values), np.minimum(low, values))
    for name, part in (("M", env.layout.M), ("R", env.layout.R), ("y", env.layout.y)):
        pair = best[name]
        assert pair is not None
        scale = max(np.abs(pair[0]).max(), np.abs(pair[1]).max())
        assert np.allclose(env.high(part)[0, i], pair[0], rtol=0, atol=1e-9 * scale)
        assert np.allclose(env.low(part)[0, i], pair[1], rtol=0, atol=1e-9 * scale)


def find(made: Scenario) -> Finding:
    return judge(made, compute(made))


def test_splitting_a_load_in_two_changes_nothing() -> None:
    whole = scenario(
        spans_in=(120.0, 150.0),
        point_loads=(PointLoad("a", "dead", 400.0, 60.0),),
        line_loads=(LineLoad("b", "dead", 6.0, 20.0, 200.0),),
    )
    parts = scenario(
        spans_in=(120.0, 150.0),
        point_loads=(PointLoad("a", "dead", 150.0, 60.0), PointLoad("a", "dead", 250.0, 60.0)),
        line_loads=(LineLoad("b", "dead", 6.0, 20.0, 90.0), LineLoad("b", "dead", 6.0, 90.0, 200.0)),
    )
    assert find(whole).ratio == pytest.approx(find(parts).ratio, rel=1e-9)
    assert find(whole).service_ratio == pytest.approx(find(parts).service_ratio, rel=1e-6)


def test_snow_rafter_by_hand() -> None:
    # Span 126 in on the projection, at 24 in, slope 8:12 (cos 0.83205), dead 10 psf along the slope = 12.0185
    # psf, snow 25:
    # M = 37.0185 x 24/144 x 126^2/8 = 12,243.9 lb-in; S = 1.5 x 5.5^2/6 = 7.5625; fb 1619.0; Hem-Fir No. 2 2x6:
    # Fb' = 850 (1.15)(1.3)(1.15) = 1461.4 psi -> 1.1079
    made = scenario(
        kind="rafter", width_in=1.5, depth_in=5.5, spans_in=(126.0,), spacing_in=24.0, tributary_in=24.0,
        live=None, snow_psf=25.0, dead_psf=10.0 / 0.8320502943,
    )  # fmt: skip
    found = find(made)
    checks = {(c.check, c.combination): c.ratio for c in found.checks}
    assert checks["bending", "D+S"] == pytest.approx(12243.9 / 7.5625 / (850 * 1.15 * 1.3 * 1.15), rel=1e-4)
    assert found.live_load.of == "snow"
    # the snow it can carry: fb = Fb' at D + S -> S = 37.0185/1.1079 - 12.0185 = 21.4 psf
    assert found.live_load.strength_psf == pytest.approx(37.0185 / 1.1079 - 12.0185, abs=0.05)


def test_header_with_a_post_by_hand() -> None:
    # Three 2x10 Hem-Fir No. 2 over 60 in, top edge held, a post of 1,500 lb dead at 24 in, floor 10 + 40 psf over
    # 72 in:
    # w = 25 lb/in; R = 750 + 900 = 1650 lb; M at the post = 1650(24) - 25(24^2)/2 = 32,400 lb-in over 64.17 in3, that
    # is 504.9 psi; no Cr (spacing not known): Fb' = 850(1.1) = 935 psi; ratio 0.5400
    made = scenario(
        kind="header", width_in=1.5, depth_in=9.25, plies=3, plies_fastened=True, spans_in=(60.0,), spacing_in=None,
        tributary_in=72.0, alike=1, top=Edge(held=True), loaded_on_top=False, live=PLAIN,
        point_loads=(PointLoad("post", "dead", 1500.0, 24.0),),
    )  # fmt: skip
    checks = {(c.check, c.combination): c for c in find(made).checks}
    found = checks["bending", "D+L"]
    assert found.at_in == pytest.approx(24.0)
    assert found.ratio == pytest.approx((1650 * 24 - 25 * 24**2 / 2) / (3 * 1.5 * 9.25**2 / 6) / 935, rel=1e-9)
    # hung on its side: full shear, 1650 lb: 1.5 x 1650/(4.5 x 9.25)/150 = 0.3964
    assert checks["shear", "D+L"].ratio == pytest.approx(1.5 * 1650 / (4.5 * 9.25) / 150, rel=1e-9)


def _CL(alpha: float) -> float:
    """NDS (3.3-6), written out once more."""
    return float((1 + alpha) / 1.9 - (((1 + alpha) / 1.9) ** 2 - alpha / 0.95) ** 0.5)


def test_cantilever_bends_its_bottom_edge_unbraced() -> None:
    # Overhang 40 in beyond an 80 in back span, uniform load, bottom edge held at the supports only. Over the
    # support the
    # back span's field is the longer: lu 80, le = 1.63(80) + 3(9.25) = 158.15, RB = sqrt(158.15 x 9.25)/1.5 = 25.498,
    # FbE = 1.2(470000)/650.2 = 867.5, alpha = 867.5/1075.25 = 0.8068, CL = 0.7163
    made = scenario(spans_in=(80.0,), overhang_right_in=40.0)
    found = {(c.check, c.combination): c for c in find(made).checks}["bending", "D+L"]
    assert found.at_in == pytest.approx(80.0)
    assert found.factors["CL"] == pytest.approx(0.7163, abs=2e-4)
    # Within the overhang lu is 40: lu/d 4.32 < 7, le = 1.33(40) = 53.2 (cantilever row), RB 14.79, FbE 2579, CL 0.9670
    computed = compute(made)
    hogging = next(c for c in computed.strength if c.scope == "bending, hogging")
    station = int(np.abs(computed.mesh.x[0] - 100.0).argmin())
    assert hogging.factors["CL"][0, 1, station] == pytest.approx(_CL(1.2 * 470000 / (53.2 * 9.25 / 2.25) / 1075.25))
    w = 50 * 16 / 144
    assert found.demand == pytest.approx(w * 40**2 / 2 / 21.390625, rel=1e-9)
