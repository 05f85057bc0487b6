"""Rafters and headers, from the record to the finding: worked by hand, and rafter rows of a span table."""

from __future__ import annotations

from math import cos, radians, sqrt
from typing import Any

import pytest

from assess import assess
from assess.finding import Check, Finding
from assess.record import read_member

# -- a snow rafter -------------------------------------------------------------------------------------------------
# 2x8 Hem-Fir No. 2 at 24 in, 12 ft clear on the horizontal projection, 8:12, 10 psf of roofing along the slope, snow
# 25 psf on the projection. Hem-Fir No. 2 (NDS Supplement 2018 Table 4A): Fb 850, Fv 150, Fc_perp 405, E 1.3e6, G 0.43.
RAFTER: dict[str, Any] = {
    "kind": "rafter",
    "size": {"width": "1 1/2 in", "depth": "7 1/4 in"},
    "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp"},
    "spans": ["12 ft"],
    "bearing": ["1 1/2 in", "1 1/2 in"],
    "spacing": "24 in",
    "slope": "8:12",
    "dead": "10 psf",
    "snow": "25 psf",
}
COS = 12 / sqrt(8**2 + 12**2)  # 0.83205
SPAN = 144 + 1.5  # half of 1 1/2 in at each end
OWN = 62.4 * 0.43 / (1 + 0.009 * 0.43 * 19) * 1.19 * 1.5 * 7.25 / 1728  # NDS Supplement 3.1.3, 19 %: 0.1872 lb/in
W_D = (10 * 24 / 144 + OWN) / COS  # along the slope: over its cosine on the projection, 2.2281 lb/in
W_S = 25 * 24 / 144  # 4.1667 lb/in
S_IN3, I_IN4 = 1.5 * 7.25**2 / 6, 1.5 * 7.25**3 / 12  # 13.1406, 47.635


def finding(record: dict[str, Any], **changes: Any) -> Finding:
    return assess(read_member({k: v for k, v in (record | changes).items() if v is not None}))


def checks(found: Finding) -> dict[tuple[str, str], Check]:
    return {(c.check, c.combination): c for c in found.checks}


def test_the_hand_numbers_of_the_rafter() -> None:
    assert pytest.approx(0.83205, abs=1e-5) == COS
    assert pytest.approx(0.1872, abs=1e-4) == OWN
    assert pytest.approx(2.2281, abs=1e-4) == W_D


def test_snow_rafter_in_bending_by_hand() -> None:
    # D+S: M = (2.2281 + 4.1667) x 145.5^2/8 = 16,922 lb-in, fb = 1,287.8 psi; Fb' = 850 x 1.15 (CD, snow) x 1.2 (CF)
    # x 1.15 (Cr, at 24 in under sheathing) = 1,348.95 psi (NDS 4.3, Table 2.3.2): 0.9547
    found = checks(finding(RAFTER))
    bending = found["bending", "D+S"]
    assert bending.factors == {
        "CD": 1.15,
        "CM": 1.0,
        "Ct": 1.0,
        "CL": 1.0,
        "CF": 1.2,
        "Cfu": 1.0,
        "Ci": 1.0,
        "Cr": 1.15,
    }
    assert bending.at_in == pytest.approx(SPAN / 2)
    assert bending.demand == pytest.approx((W_D + W_S) * SPAN**2 / 8 / S_IN3, rel=1e-12)
    assert bending.demand == pytest.approx(1287.8, abs=0.1)
    assert bending.capacity == pytest.approx(850 * 1.15 * 1.2 * 1.15, rel=1e-12)
    assert bending.ratio == pytest.approx(0.9547, abs=1e-4)
    # D alone at CD 0.9: 448.7 psi of 1,055.7
    assert found["bending", "D"].ratio == pytest.approx(W_D * SPAN**2 / 8 / S_IN3 / (850 * 0.9 * 1.2 * 1.15), rel=1e-12)
    assert ("bending", "D+L") not in found


def test_snow_rafter_in_shear_and_bearing_by_hand() -> None:
    found = checks(finding(RAFTER))
    # NDS 3.4.3.1: d = 7.25 in from the face, 8 in from the design point; Fv' = 150 x 1.15
    V = (W_D + W_S) * (SPAN / 2 - 8.0)
    assert found["shear", "D+S"].ratio == pytest.approx(1.5 * V / (1.5 * 7.25) / (150 * 1.15), rel=1e-12)
    # NDS 3.10.2, Cb 1.0 at the member's end, and no duration factor (2.3.2.1): 465 lb over 2.25 in2 of 405 psi
    R = (W_D + W_S) * SPAN / 2
    assert found["bearing", "D+S"].ratio == pytest.approx(R / 2.25 / 405, rel=1e-12)


def test_snow_rafter_deflection_by_hand() -> None:
    # IBC Table 1604.3, roof over a ceiling that is not plaster, recalled: L/240 under snow, L/180 under dead and
    # snow; KCR 1.5 on dead load (NDS 3.5.2). 5 w L^4/(384 E I): 0.3928 in under snow, 0.2100 in under dead load.
    found = finding(RAFTER)
    each = checks(found)
    y_S, y_D = (5 * w * SPAN**4 / (384 * 1.3e6 * I_IN4) for w in (W_S, W_D))
    assert (y_S, y_D) == pytest.approx((0.3928, 0.2100), abs=1e-3)
    assert each["live deflection", "S"].ratio == pytest.approx(y_S / (SPAN / 240), rel=1e-9)
    assert each["total deflection", "1.5D+S"].ratio == pytest.approx((1.5 * y_D + y_S) / (SPAN / 180), rel=1e-9)
    assert found.service_ratio == pytest.approx(max(y_S / (SPAN / 240), (1.5 * y_D + y_S) / (SPAN / 180)), rel=1e-9)


def test_the_snow_it_can_carry_by_hand() -> None:
    # bending: (Fb' S 8/L^2 - w_D) over 24 in; 26.8 psf, posted as 25
    found = finding(RAFTER).live_load
    w = 850 * 1.15 * 1.2 * 1.15 * S_IN3 * 8 / SPAN**2 - W_D
    assert (found.of, found.strength_governs) == ("snow", "bending")
    assert found.strength_psf == pytest.approx(w * 144 / 24, rel=1e-9)
    assert found.strength_psf == pytest.approx(26.82, abs=0.005)
    assert found.posting_psf == 25.0
    # live deflection L/240: 384 E I/(5 L^3 240)
    assert found.service_psf == pytest.approx(384 * 1.3e6 * I_IN4 / (5 * SPAN**3 * 240) * 144 / 24, rel=1e-9)


def test_a_degree_and_a_ratio_are_the_same_slope() -> None:
    # 8:12 is 33.690 degrees; snow, on the projection, does not change with the slope, dead load does
    steep = finding(RAFTER, slope="60 deg")
    M = ((10 * 24 / 144 + OWN) / cos(radians(60)) + W_S) * SPAN**2 / 8
    assert checks(steep)["bending", "D+S"].demand == pytest.approx(M / S_IN3, rel=1e-12)
    flat = finding(RAFTER, slope=None)
    assert checks(flat)["bending", "D+S"].demand == pytest.approx((W_D * COS + W_S) * SPAN**2 / 8 / S_IN3, rel=1e-12)
    said = "dead load lies along the slope; snow and roof live load are on the horizontal projection"
    assert said in steep.assumptions
    assert said not in flat.assumptions


def test_roof_live_load_has_seven_days() -> None:
    # Lr 20 psf alone: CD 1.25 (NDS Table 2.3.2, construction load); with snow, both combinations stand apart and
    # snow at 1.15 governs where S/1.15 > Lr/1.25 (ASCE 7-16 2.4.1: Lr or S, never both)
    found = finding(RAFTER, snow=None, roof_live="20 psf")
    bending = checks(found)["bending", "D+Lr"]
    assert bending.factors["CD"] == 1.25
    assert bending.ratio == pytest.approx(
        (W_D + 20 * 24 / 144) * SPAN**2 / 8 / S_IN3 / (850 * 1.25 * 1.2 * 1.15), rel=1e-12
    )
    assert found.live_load.of == "roof live"
    both = finding(RAFTER, roof_live="20 psf")
    assert both.governs is not None
    assert (both.governs.check, both.governs.combination) == ("bending", "D+S")
    assert both.ratio == finding(RAFTER).ratio
    names = {c.combination for c in both.checks if c.check == "bending"}
    assert names == {"D", "D+Lr", "D+S"}


def test_an_eave_by_hand() -> None:
    # 24 in of eave: over its support M = -w 24^2/2, the bottom edge in compression and held at the supports only:
    # there lu is the span's 145.5 in, lu/d 20.07: le = 1.84 lu = 267.7 (NDS Table 3.3.3 note 1), RB = sqrt(267.7 x
    # 7.25)/1.5 = 29.37 ; FbE = 1.2 x 470,000/862.6 = 653.8 psi; Fb* = 1,348.95; alpha 0.4847; CL 0.4645
    found = checks(finding(RAFTER, overhang_right="2 ft"))
    RB2 = 1.84 * SPAN * 7.25 / 1.5**2
    star = 850 * 1.15 * 1.2 * 1.15
    alpha = 1.2 * 470000 / RB2 / star
    CL = (1 + alpha) / 1.9 - sqrt(((1 + alpha) / 1.9) ** 2 - alpha / 0.95)
    assert pytest.approx(0.4645, abs=2e-4) == CL
    hogging = (W_D + W_S) * 24**2 / 2 / S_IN3 / (star * CL)
    # the span, with no snow on the eave (ASCE 7-16 7.5): M at x under w, less the eave's dead moment
    M_e = W_D * 24**2 / 2
    R = (W_D + W_S) * SPAN / 2 - M_e / SPAN
    sagging = R**2 / 2 / (W_D + W_S) / S_IN3 / star
    assert sagging > hogging
    # the peak may fall between two stations 1/40 of the span apart: 6e-4 of w L^2/8 at most
    assert found["bending", "D+S"].ratio == pytest.approx(sagging, rel=6e-4)
    # bearing under the eave's support, both loaded: (w)(span + eave)^2/(2 span); Cb 1.25, 23 1/4 in from the end
    R = (W_D + W_S) * (SPAN + 24) ** 2 / 2 / SPAN
    assert found["bearing", "D+S"].ratio == pytest.approx(R / 2.25 / (405 * 1.25), rel=1e-9)


# -- rafter rows of a span table -----------------------------------------------------------------------------------
# IRC 2018 Tables R802.4.1(1) (roof live load 20 psf) and R802.4.1(3), (5) (ground snow 30 and 50 psf), ceiling not
# attached, L/180, dead load 10 psf, No. 2 of the species: rows recalled, and each re-derived here: spans are on the
# horizontal projection, bending governs, Cr 1.15, CD 1.25 for roof live load and 1.15 for snow, CF by width.
ROWS = (
    # species, spacing [in], load, spans of 2x6, 2x8, 2x10, 2x12 [ft-in]
    ("Hem-Fir", 16, ("roof_live", 20), ("14-2", "17-11", "21-11", "25-5")),
    ("Hem-Fir", 24, ("roof_live", 20), ("11-7", "14-8", "17-10", "20-9")),
    ("Spruce-Pine-Fir", 16, ("roof_live", 20), ("14-4", "18-2", "22-3", "25-9")),
    ("Hem-Fir", 16, ("snow", 30), ("11-9", "14-11", "18-2", "21-1")),
    ("Spruce-Pine-Fir", 16, ("snow", 30), ("11-11", "15-1", "18-5", "21-5")),
    ("Spruce-Pine-Fir", 16, ("snow", 50), ("9-9", "12-4", "15-1", "17-6")),
)
DEPTHS = (5.5, 7.25, 9.25, 11.25)
CELLS = [
    pytest.param(species, spacing, kind, psf, depth, span, id=f"{species}-{depth}@{spacing}-{kind}-{psf}")
    for species, spacing, (kind, psf), spans in ROWS
    for depth, span in zip(DEPTHS, spans, strict=True)
]


@pytest.mark.parametrize(("species", "spacing", "kind", "psf", "depth", "printed"), CELLS)
def test_rafter_span_table(species: str, spacing: int, kind: str, psf: int, depth: float, printed: str) -> None:
    feet, inches = printed.split("-")
    span = int(feet) * 12 + int(inches)
    found = assess(
        read_member(
            {
                "kind": "rafter",
                "size": {"width": "1 1/2 in", "depth": f"{depth} in"},
                "wood": {"species": species, "grade": "No. 2", "basis": "stamp"},
                "spans": [f"{span} in"],
                "span_basis": "design",
                "bearing": ["3 in", "3 in"],  # the tables do not let bearing decide
                "spacing": f"{spacing} in",
                "dead": "10 psf",
                "own_weight": "included",
                kind: f"{psf} psf",
                "limits": {"live": "L/180", "total": "L/1"},
            }
        )
    )
    assert found.governs is not None
    assert (found.governs.check, found.governs.combination) == ("bending", "D+S" if kind == "snow" else "D+Lr")
    assert found.ratio is not None
    assert found.service_ratio is not None
    # M is as the square of the span, deflection as the cube over L/180
    assert span / sqrt(found.ratio) < span / found.service_ratio ** (1 / 3)
    # the tables round to the inch
    assert span / sqrt(found.ratio) == pytest.approx(span, abs=0.5 + 1e-6)


# -- a header ------------------------------------------------------------------------------------------------------
# Two plies of 2x10 Douglas Fir-Larch No. 2 over a 5 ft opening, clear, on 3 in bearings. Floor: half of a 14 ft joist
# span, 7 ft, dead 12 psf and bedrooms 30 psf. Roof, on the wall above: dead 150 plf, snow 240 plf.
# Douglas Fir-Larch No. 2 (NDS Supplement 2018 Table 4A): Fb 900, Fv 180, Fc_perp 625, Emin 580,000, E 1.6e6.
HEADER: dict[str, Any] = {
    "kind": "header",
    "size": {"width": "1 1/2 in", "depth": "9 1/4 in", "plies": 2},
    "wood": {"species": "Douglas Fir-Larch", "grade": "No. 2", "basis": "stamp"},
    "spans": ["5 ft"],
    "bearing": ["3 in", "3 in"],
    "tributary": "7 ft",
    "dead": "12 psf",
    "own_weight": "included",
    "proposed_use": "dwelling, sleeping rooms",
    "line_loads": [
        {"name": "roof", "load": "150 plf", "from": "0 in", "to": "61.5 in", "type": "dead"},
        {"name": "snow", "load": "240 plf", "from": "0 in", "to": "61.5 in", "type": "snow"},
    ],
}
H_SPAN = 61.5  # 60 in clear, 3/4 in more at each end
H_D, H_L, H_S = 12 * 84 / 144 + 150 / 12, 30 * 84 / 144, 240 / 12  # 19.5, 17.5, 20 lb/in
H_SECTION = 2 * 1.5 * 9.25**2 / 6  # 42.78 in3
SUMS = {
    "D": (H_D, 0.9),
    "D+L": (H_D + H_L, 1.0),
    "D+S": (H_D + H_S, 1.15),
    "D+0.75L+0.75S": (H_D + 0.75 * (H_L + H_S), 1.15),  # ASCE 7-16 2.4.1 4: 47.625 lb/in
}


@pytest.mark.parametrize("name", SUMS)
def test_header_in_bending_by_hand(name: str) -> None:
    # Not joined to a spacing: no Cr. The top edge is held at the ends only, plies not fastened to act as one: b is 1.5
    # in. lu 61.5 in, lu/d 6.65 < 7: le = 2.06 lu = 126.7; RB = sqrt(126.7 x 9.25)/1.5 = 22.82; FbE = 1.2 x 580,000/
    # 520.8 = 1,336 psi. At CD 1.15: Fb* = 900 x 1.15 x 1.1 = 1,138.5; alpha 1.174; CL 0.8732.
    w, CD = SUMS[name]
    star = 900 * CD * 1.1
    alpha = 1.2 * 580000 / (2.06 * H_SPAN * 9.25 / 1.5**2) / star
    CL = (1 + alpha) / 1.9 - sqrt(((1 + alpha) / 1.9) ** 2 - alpha / 0.95)
    found = checks(finding(HEADER))["bending", name]
    assert found.factors["CL"] == pytest.approx(CL, rel=1e-9)
    assert found.factors["Cr"] == 1.0
    assert found.demand == pytest.approx(w * H_SPAN**2 / 8 / H_SECTION, rel=1e-9)
    assert found.ratio == pytest.approx(w * H_SPAN**2 / 8 / H_SECTION / (star * CL), rel=1e-9)


def test_header_governs_with_three_quarters_of_floor_and_snow() -> None:
    found = finding(HEADER)
    assert found.governs is not None
    assert (found.governs.check, found.governs.combination) == ("bending", "D+0.75L+0.75S")
    # 47.625 x 61.5^2/8 = 22,516 lb-in; 526.3 psi over 994.1
    assert found.ratio == pytest.approx(526.3 / 994.1, abs=5e-4)
    assert found.verdict == "adequate"


def test_header_in_shear_and_bearing_by_hand() -> None:
    found = checks(finding(HEADER))
    for name, (w, CD) in SUMS.items():
        R = w * H_SPAN / 2
        # loaded on its side, so that no load is left out near supports (NDS 3.4.3.1): V = R
        assert found["shear", name].ratio == pytest.approx(1.5 * R / (3 * 9.25) / (180 * CD), rel=1e-9)
        assert found["bearing", name].ratio == pytest.approx(R / (3 * 3.0) / 625, rel=1e-9)
    # on its top: 3/4 + 9 1/4 in from the design point
    on_top = checks(finding(HEADER, loaded_on="top"))
    V = SUMS["D+L"][0] * (H_SPAN / 2 - 10.0)
    assert on_top["shear", "D+L"].ratio == pytest.approx(1.5 * V / (3 * 9.25) / 180, rel=1e-9)


def test_header_deflection_by_hand() -> None:
    # E 1.6e6, I = 3 x 9.25^3/12 = 197.9 in4; live sets L, S, 0.75L + 0.75S (IBC Table 1604.3); KCR 1.5
    found = checks(finding(HEADER))
    per_pli = 5 * H_SPAN**4 / (384 * 1.6e6 * 3 * 9.25**3 / 12)
    for name, w in {"L": H_L, "S": H_S, "0.75L+0.75S": 0.75 * (H_L + H_S)}.items():
        assert found["live deflection", name].ratio == pytest.approx(w * per_pli / (H_SPAN / 360), rel=1e-9)
        total = (1.5 * H_D + w) * per_pli
        assert found["total deflection", f"1.5D+{name}"].ratio == pytest.approx(total / (H_SPAN / 240), rel=1e-9)


def test_plies_fastened_to_act_as_one_resist_buckling_together() -> None:
    # b = 3 in: RB falls to half, FbE to four times as much: alpha 4.694, CL 0.9869 at CD 1.15
    size = {"width": "1 1/2 in", "depth": "9 1/4 in", "plies": 2, "plies_fastened": True}
    found = checks(finding(HEADER, size=size))["bending", "D+0.75L+0.75S"]
    star = 900 * 1.15 * 1.1
    alpha = 1.2 * 580000 / (2.06 * H_SPAN * 9.25 / 3.0**2) / star
    assert found.factors["CL"] == pytest.approx(
        (1 + alpha) / 1.9 - sqrt(((1 + alpha) / 1.9) ** 2 - alpha / 0.95), rel=1e-9
    )


def test_the_floor_load_a_header_can_carry_by_hand() -> None:
    # The greatest L: D+L gives w_L = Fb' S 8/L^2 - 19.5; D+0.75L+0.75S gives (Fb' S 8/L^2 - 19.5 - 15)/0.75
    greatest = []
    for CD, other, share in ((1.0, 0.0, 1.0), (1.15, 0.75 * H_S, 0.75)):
        star = 900 * CD * 1.1
        alpha = 1.2 * 580000 / (2.06 * H_SPAN * 9.25 / 1.5**2) / star
        CL = (1 + alpha) / 1.9 - sqrt(((1 + alpha) / 1.9) ** 2 - alpha / 0.95)
        greatest.append((star * CL * H_SECTION * 8 / H_SPAN**2 - H_D - other) / share)
    found = finding(HEADER).live_load
    assert found.of == "use"
    assert found.strength_psf == pytest.approx(min(greatest) * 144 / 84, rel=1e-9)
