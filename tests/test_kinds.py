"""What each kind of member takes for granted, that the finding says so, and the cautions a kind brings."""

from __future__ import annotations

from typing import Any

import pytest

from assess import assess
from assess.errors import ReadingError
from assess.finding import Finding
from assess.kinds import KINDS
from assess.record import Member, read_member
from assess.resolve import resolve
from assess.scenario import Edge, Scenario
from species.sizes import nominal_size

# The member record's table of defaults: sharing, top edge, loaded face, service; and the deflection limits of IBC
# Table 1604.3 and IRC R301.7, recalled (floors L/360 and L/240; roofs and ceilings of plaster board L/240 and L/180).
BY_KIND: dict[str, tuple[int, bool, bool, bool, float, float]] = {
    # kind: (alike, top edge held, loaded on top, wet, live limit, total limit)
    "joist": (3, True, True, False, 360.0, 240.0),
    "beam": (1, False, False, False, 360.0, 240.0),
    "header": (1, False, False, False, 360.0, 240.0),
    "rafter": (3, True, True, False, 240.0, 180.0),
    "ceiling joist": (3, False, True, False, 240.0, 180.0),
    "deck joist": (3, True, True, True, 360.0, 240.0),
}
FLOORS = [kind for kind in BY_KIND if kind != "rafter"]
SHARED = "three or more alike share the floor (default for this kind)"
HELD, ENDS = "top edge held along its length (default)", "top edge held at the ends only (default)"
WET, DRY = "wet service taken (no moisture reading)", "dry service taken (no moisture reading)"
UNMEASURED = "bearing of 1 1/2 in taken where it was not measured"
CLEAR = "spans are clear; half of 1 1/2 in of bearing, or of a shorter measured one, is added at each end"
THRUST = "a rafter pushes its wall outward where nothing ties it: thrust and ties are not assessed"
TIE = "this member also ties rafters: its tension is not assessed"


def data(kind: str, **changes: Any) -> dict[str, Any]:
    record: dict[str, Any] = {
        "kind": kind,
        "size": {"width": "1 1/2 in", "depth": "9 1/4 in"},
        "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp"},
        "spans": ["8 ft"],
        "spacing": "16 in",
        "dead": "10 psf",
    }
    record |= {"snow": "25 psf"} if kind == "rafter" else {"proposed_use": {"live": "20 psf", "name": "typed"}}
    return {k: v for k, v in (record | changes).items() if v is not None}


def made(kind: str, **changes: Any) -> Scenario:
    return resolve(read_member(data(kind, **changes)))


def found(kind: str, **changes: Any) -> Finding:
    return assess(read_member(data(kind, **changes)))


def check(finding: Finding, name: str) -> Any:
    return next(c for c in finding.checks if c.check == name)


def test_every_kind_of_the_record_has_its_defaults() -> None:
    assert list(KINDS) == list(BY_KIND)
    for kind in KINDS.values():
        assert kind.limits_source.endswith("recalled")
    assert [name for name, kind in KINDS.items() if kind.roof] == ["rafter"]


@pytest.mark.parametrize("kind", BY_KIND)
def test_defaults_of_a_kind(kind: str) -> None:
    alike, held, on_top, wet, live, total = BY_KIND[kind]
    scenario = made(kind)
    assert scenario.alike == alike
    assert scenario.top == Edge(held=held)
    assert scenario.bottom == Edge(held=False)
    assert scenario.loaded_on_top is on_top
    assert scenario.wet is wet
    assert scenario.moisture_percent == (30.0 if wet else 19.0)
    assert (scenario.limit_live, scenario.limit_total) == (live, total)
    assert scenario.ends_held
    assert scenario.own_weight
    assert scenario.bearing_in == (1.5, 1.5)
    assert scenario.bearing_measured == (False, False)
    assert scenario.spans_in == (97.5,)


@pytest.mark.parametrize("kind", BY_KIND)
def test_each_default_taken_is_said(kind: str) -> None:
    alike, held, _, wet, live, total = BY_KIND[kind]
    said = found(kind).assumptions
    assert (SHARED in said) is (alike == 3)
    assert (HELD in said, ENDS in said) == (held, not held)
    assert (WET in said, DRY in said) == (wet, not wet)
    assert f"deflection limits L/{live:g} live, L/{total:g} total ({KINDS[kind].limits_source})" in said
    assert UNMEASURED in said
    assert CLEAR in said
    assert "ends held against rotation (default)" in said
    assert f"own weight added at {30 if wet else 19} % moisture" in said


@pytest.mark.parametrize("kind", BY_KIND)
def test_a_reading_takes_the_place_of_the_default_and_of_its_words(kind: str) -> None:
    alike, held, on_top, wet, _, _ = BY_KIND[kind]
    changes = {
        "alike": 4 - alike,
        "top_edge": "ends only" if held else "held",
        "loaded_on": "side" if on_top else "top",
        "moisture": "12 %" if wet else "25 %",
        "limits": {"live": "L/480", "total": "L/300"},
        "ends_held": True,
        "own_weight": "included",
        "bearing": ["2 in", "2 in"],
        "span_basis": "design",
    }
    scenario = made(kind, **changes)
    assert scenario.alike == 4 - alike
    assert scenario.top == Edge(held=not held)
    assert scenario.loaded_on_top is not on_top
    assert (scenario.wet, scenario.moisture_percent) == ((False, 12.0) if wet else (True, 25.0))
    assert (scenario.limit_live, scenario.limit_total) == (480.0, 300.0)
    assert not scenario.own_weight
    assert scenario.spans_in == (96.0,)
    said = found(kind, **changes).assumptions
    for words in (SHARED, HELD, ENDS, WET, DRY, UNMEASURED, CLEAR, "ends held against rotation (default)"):
        assert words not in said
    assert not any(words.startswith(("deflection limits", "own weight")) for words in said)


def test_one_limit_typed_leaves_the_other_to_the_kind() -> None:
    scenario = made("rafter", limits={"live": "L/360"})
    assert (scenario.limit_live, scenario.limit_total) == (360.0, 180.0)
    said = f"deflection limits L/360 live, L/180 total ({KINDS['rafter'].limits_source})"
    assert said in scenario.assumptions


def test_moisture_decides_wet_service_above_19_percent() -> None:
    # NDS Supplement, Table 4A: over 19 % for an extended time; a deck joist that reads dry is not wet
    assert [made("joist", moisture=m).wet for m in ("19 %", "19.1 %", "wet", "dry")] == [False, True, True, False]
    assert not made("deck joist", moisture="14 %").wet


# -- what the defaults do ------------------------------------------------------------------------------------------


def test_repetitive_use_goes_to_held_and_shared_members_only() -> None:
    # NDS 4.3.9: three or more at 24 in or less, joined by what shares the load. Held on top: joists, deck joists,
    # rafters. A ceiling joist has nothing on its top edge, a beam stands alone.
    given = {kind: check(found(kind), "bending").factors["Cr"] for kind in BY_KIND}
    assert given == {
        "joist": 1.15, "beam": 1.0, "header": 1.0, "rafter": 1.15, "ceiling joist": 1.0, "deck joist": 1.15,
    }  # fmt: skip
    assert check(found("ceiling joist", top_edge="held"), "bending").factors["Cr"] == 1.15
    assert check(found("joist", alike=2), "bending").factors["Cr"] == 1.0
    assert check(found("joist", spacing="24 in"), "bending").factors["Cr"] == 1.15
    assert check(found("joist", spacing="24 1/8 in"), "bending").factors["Cr"] == 1.0
    assert check(found("joist", spacing=None, tributary="16 in"), "bending").factors["Cr"] == 1.0


def test_an_edge_that_is_not_held_is_checked_for_buckling() -> None:
    # NDS 3.3.3: CL below 1 for beams, headers and ceiling joists, deeper than broad and free between their ends
    for kind, (_, held, *_) in BY_KIND.items():
        CL = check(found(kind), "bending").factors["CL"]
        assert (CL == 1.0) is held, kind


def test_loads_near_supports_are_left_out_only_where_they_stand_on_top() -> None:
    # NDS 3.4.3.1 asks for loads on the face opposite the bearing
    for kind, (_, _, on_top, *_) in BY_KIND.items():
        assert check(found(kind), "shear").clause == ("NDS 3.4.2, 3.4.3.1" if on_top else "NDS 3.4.2"), kind
    assert check(found("beam", loaded_on="top"), "shear").clause == "NDS 3.4.2, 3.4.3.1"
    assert check(found("joist", bearing_on="hanger"), "shear").clause == "NDS 3.4.2"


def test_deck_joists_have_wet_factors() -> None:
    # NDS Supplement Table 4A: Fb 1.0 (850 x 1.1 = 935 psi, at or under 1,150), Fv 0.97, Fc_perp 0.67; E 0.9; KCR 2.0
    # (NDS 3.5.2) in wet service
    dry, wet = found("joist"), found("deck joist")
    assert check(wet, "bending").factors["CM"] == 1.0
    assert check(wet, "shear").factors["CM"] == 0.97
    assert check(wet, "bearing").factors["CM"] == 0.67
    assert check(wet, "bearing").capacity == pytest.approx(405 * 0.67, rel=1e-12)
    assert check(wet, "live deflection").demand == pytest.approx(check(dry, "live deflection").demand / 0.9, rel=1e-9)
    assert check(wet, "total deflection").combination == "2D+L"
    assert check(dry, "total deflection").combination == "1.5D+L"


@pytest.mark.parametrize("kind", FLOORS)
def test_a_member_without_use_or_roof_load_is_incomplete(kind: str) -> None:
    record = data(kind, proposed_use=None)
    assert read_member(record).missing() == ["proposed_use"]
    with pytest.raises(ReadingError, match="proposed_use"):
        assess(read_member(record))


def test_the_proposed_use_is_judged_before_the_present_one() -> None:
    uses = {"present_use": {"live": "30 psf", "name": "now"}, "proposed_use": {"live": "55 psf", "name": "then"}}
    assert found("joist", **uses).use == "then (55 psf)"
    assert found("joist", present_use=uses["present_use"], proposed_use=None).use == "now (30 psf)"


# -- cautions ------------------------------------------------------------------------------------------------------


def test_a_rafter_says_that_it_pushes() -> None:
    assert THRUST in found("rafter").cautions
    for kind in FLOORS:
        assert THRUST not in found(kind).cautions


def test_a_ceiling_joist_that_ties_rafters_is_never_adequate() -> None:
    free, tie = found("ceiling joist"), found("ceiling joist", ties_rafters=True)
    assert free.verdict == "adequate"
    assert free.ratio is not None
    assert free.ratio < 1.0
    assert tie.ratio == free.ratio
    assert tie.verdict == "undetermined"
    assert TIE in tie.cautions
    assert "recorded, not yet assessed: tension from the rafters it ties" in tie.cautions
    assert TIE not in free.cautions
    assert found("ceiling joist", ties_rafters=False) == free
    # what fails in bending fails all the same
    heavy = {"live": "300 psf", "name": "typed"}
    assert found("ceiling joist", ties_rafters=True, proposed_use=heavy).verdict == "inadequate"


def hanger_words(finding: Finding) -> list[str]:
    return [words for words in finding.cautions if words.startswith("the hanger's own capacity is its maker's")]


def test_a_hanger_is_its_maker_s() -> None:
    for kind in BY_KIND:
        assert len(hanger_words(found(kind, bearing_on="hanger"))) == 1
        assert hanger_words(found(kind)) == []


def test_masonry_wants_three_inches() -> None:
    # IRC R502.6: 3 in on masonry, 1 1/2 in on wood or metal
    measure = "on masonry the usual least bearing is 3 in (IRC R502.6): measure it at every support"
    assert measure in found("joist", bearing_on="masonry").cautions
    assert measure in found("joist", bearing_on="masonry", bearing=["4 in"]).cautions
    assert measure not in found("joist", bearing_on="masonry", bearing=["4 in", "3 in"]).cautions
    assert measure not in found("joist").cautions
    short = "bearing at support 2 is 2 1/2 in, under the usual 3 in (IRC R502.6)"
    assert short in found("joist", bearing_on="masonry", bearing=["3 in", "2 1/2 in"]).cautions
    assert short not in found("joist", bearing=["3 in", "2 1/2 in"]).cautions
    on_wood = "bearing at support 1 is 1 1/4 in, under the usual 1.5 in (IRC R502.6)"
    assert on_wood in found("joist", bearing=["1 1/4 in"]).cautions
    assert on_wood in found("joist", bearing=["1 1/4 in"], bearing_on="hanger").cautions


def test_one_that_speaks_for_many_says_how_many_were_measured() -> None:
    said = "speaks for 22 like members, of which 5 were measured"
    assert said in found("joist", stands_for={"count": 22, "measured": 5}).cautions
    assert not any("speaks for" in words for words in found("joist").cautions)


def test_what_was_not_seen_travels_word_for_word() -> None:
    hidden = ["top edge, under the boards", "north end, in the wall"]
    cautions = found("joist", not_seen=hidden).cautions
    assert [words for words in cautions if words.startswith("not seen: ")] == [f"not seen: {text}" for text in hidden]


@pytest.mark.parametrize(
    ("depth", "ratio", "asked"),
    [
        # NDS 4.4.1.2, by nominal depth over breadth, tiers recalled
        ("3 1/2 in", 2, "no bracing is asked for"),
        ("7 1/4 in", 4, "ends held against rotation"),
        ("9 1/4 in", 5, "ends held, compression edge held along its length"),
        ("11 1/4 in", 6, "ends held, compression edge held, and bridging or blocking at 8 ft or less"),
    ],
)
def test_the_depth_to_breadth_rules_are_information(depth: str, ratio: int, asked: str) -> None:
    size = {"width": "1 1/2 in", "depth": depth}
    words = f"NDS 4.4.1.2, nominal depth over breadth {ratio}: {asked} (information; 3.3.3 governs the ratio)"
    assert words in made("joist", size=size, spans=["4 ft"]).assumptions
    assert nominal_size(float(made("joist", size=size).parts[0].depth_in)) == 2 * ratio


def test_a_basis_that_is_not_a_stamp_stands_first() -> None:
    # without a stamp the assumed wood matters most, and stands beside the verdict
    wood = {"species": "Hem-Fir", "grade": "No. 2"}
    assumed = "wood species and grade are assumed, not read from a stamp: this decides the answer"
    assert found("joist", wood=wood).leading == assumed
    for basis, start in (
        ("stamp", "the stamp is of the piece as graded"),
        ("certificate", "the certificate is of the piece as graded"),
        ("graded in place", "graded in place: faces that were hidden are not graded"),
    ):
        finding = found("joist", wood=wood | {"basis": basis})
        assert any(words.startswith(start) for words in finding.cautions)
        assert assumed not in finding.cautions


@pytest.mark.parametrize("kind", BY_KIND)
def test_the_standing_cautions_travel_with_every_kind(kind: str) -> None:
    cautions = " ".join(found(kind).cautions)
    for words in ("not a stamped design", "licensed engineer decides", "shore before cutting", "asbestos"):
        assert words in cautions


def test_a_kind_that_is_not_known_is_refused_with_the_nearest() -> None:
    with pytest.raises(ReadingError, match="rafter"):
        Member.of(kind="raftr")
