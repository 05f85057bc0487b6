"""Uses and materials against their published rows; names as people type them; refusals that name the nearest."""

from __future__ import annotations

import csv
import re
from pathlib import Path

import pytest

from assess.errors import ReadingError
from assess.materials import all_materials, layer_psf
from assess.offers import offers
from assess.uses import all_uses, use_named

PUBLISHED = Path(__file__).parent / "published"
ROOF = "roof, ordinary flat, pitched or curved"  # a roof live load is typed as `roof_live`, never a use of a floor
DECK = "dwelling deck"  # published in words: 1.5 x the area served


def rows(name: str) -> list[dict[str, str]]:
    lines = (PUBLISHED / name).read_text(encoding="utf-8").splitlines()
    return list(csv.DictReader(line for line in lines if not line.startswith("#")))


@pytest.mark.parametrize("row", [row for row in rows("live_loads.csv") if row["use"] not in (ROOF, DECK)])
def test_every_published_use_has_its_loads(row: dict[str, str]) -> None:
    # ASCE 7-16 Table 4.3-1, IRC Table R301.5, as published
    use = use_named(row["use"])
    assert use.name == row["use"]
    assert use.uniform_psf == float(row["uniform_psf"])
    assert use.concentrated_lb == (float(row["concentrated_lb"]) if row["concentrated_lb"] else None)


def test_there_is_no_use_beyond_the_published_ones() -> None:
    assert [use.name for use in all_uses()] == [row["use"] for row in rows("live_loads.csv") if row["use"] != ROOF]


def test_a_deck_has_one_and_a_half_times_the_dwelling_it_serves() -> None:
    # ASCE 7-16 Table 4.3-1: 1.5 x the live load of the area served, at most 100 psf; the IRC's 40 psf is the lower
    dwelling = use_named("dwelling, living areas").uniform_psf
    assert use_named(DECK).uniform_psf == min(1.5 * dwelling, 100.0)
    assert "IRC has 40" in use_named(DECK).source


def test_footprints_of_the_concentrated_load() -> None:
    # ASCE 7-16 4.4: 2.5 ft square unless stated; Table 4.3-1 notes: stair treads 2 x 2 in, garage 4.5 x 4.5 in
    stated = {"dwelling stairs": 2.0, "stairs and exits, not dwelling": 2.0, "passenger garage": 4.5}
    for use in all_uses():
        side = stated.get(use.name, 30.0)
        assert use.concentrated_patch_in == (side, side), use.name


def test_partitions_come_with_uses_under_80_psf_that_rearrange_them() -> None:
    # ASCE 7-16 4.3.2: 15 psf where partitions are erected or rearranged; none where the live load is 80 psf or more
    allowed = {use.name for use in all_uses() if use.partition_psf}
    assert {use.partition_psf for use in all_uses()} == {0.0, 15.0}
    assert allowed == {
        "offices",
        "access floor, office",
        "classrooms",
        "library reading rooms",
        "hospital patient rooms",
        "hospital operating rooms and laboratories",
        "retail, upper floors",
    }
    assert all(use_named(name).uniform_psf < 80.0 for name in allowed)


def test_no_reduction_above_100_psf_for_assembly_or_a_garage() -> None:
    # ASCE 7-16 4.7.3 (over 100 psf), 4.7.4 (garages), 4.7.5 (assembly)
    assembly = ("assembly", "stage", "dining", "dance", "gymnasiums", "public rooms", "passenger garage")
    for use in all_uses():
        barred = use.uniform_psf > 100.0 or use.name.startswith(assembly)
        assert use.reducible is not barred, use.name


def test_what_was_recalled_says_so() -> None:
    # the published table: office rows, dwelling rows, attics and stairs were seen in print, the rest recalled
    seen = re.compile(r"dwelling, |attic|habitable attic|dwelling stairs|office")
    for use in all_uses():
        assert seen.match(use.name) or "recalled" in use.source, use.name


@pytest.mark.parametrize(
    ("typed", "name"),
    [
        ("OFFICES", "offices"),
        ("office", "offices"),
        ("  Dwelling - living areas ", "dwelling, living areas"),
        ("dwelling/living areas", "dwelling, living areas"),
        ("bedrooms", "dwelling, sleeping rooms"),
        ("classroom", "classrooms"),
        ("Garage", "passenger garage"),
        ("assembly; fixed seats", "assembly, fixed seats"),
    ],
)
def test_a_use_is_known_in_any_case_and_punctuation(typed: str, name: str) -> None:
    assert use_named(typed).name == name


@pytest.mark.parametrize(
    ("typed", "offered"),
    [
        ("retail", ["retail, first floor", "retail, upper floors"]),
        ("dwelling", ["dwelling, living areas", "dwelling, sleeping rooms"]),
        ("attic", ["attic without storage", "attic with limited storage", "habitable attic"]),
        ("school corridor", ["school corridors above first floor", "school first-floor corridors"]),
        ("ofices", ["offices"]),
        ("class rooms", ["classrooms"]),
    ],
)
def test_a_name_that_fits_none_or_two_is_refused_with_the_nearest(typed: str, offered: list[str]) -> None:
    with pytest.raises(ReadingError) as error:
        use_named(typed)
    assert (error.value.field, error.value.value) == ("use", typed)
    for name in offered:
        assert name in error.value.accepted


@pytest.mark.parametrize("typed", ["", "  ", "склад", "¼", "x" * 100_000, "[/]", "\ud800"])
def test_any_text_at_all_is_refused_in_one_line(typed: str) -> None:
    for ask in (use_named, layer_psf):
        with pytest.raises(ReadingError) as error:
            ask(typed)
        assert "\n" not in error.value.line()
        assert len(error.value.line()) < 400


@pytest.mark.parametrize("row", rows("dead_loads.csv"))
def test_every_published_material_has_its_weight(row: dict[str, str]) -> None:
    # ASCE 7-16 Table C3.1-1 and the others each row names, as published
    per = re.search(r", per (1/8 in|inch)$", row["material"])
    name = row["material"][: per.start()] if per else row["material"]
    thickness = {"1/8 in": 0.125, "inch": 1.0}[per[1]] if per else None
    assert layer_psf(name, thickness) == (float(row["psf"]), row["source"], None)


def test_there_is_no_material_beyond_the_published_ones() -> None:
    assert len(all_materials()) == len(rows("dead_loads.csv"))


def test_weights_agree_with_the_kilopascals_printed_beside_them() -> None:
    # ASCE 7 Table C3 prints both units, kPa to two places: 1 psf = 0.04788 kPa
    printed = [(one, re.search(r"\(([0-9.]+) kPa\)", one.source)) for one in all_materials()]
    checked = [(one.psf * 0.0478803, float(found[1])) for one, found in printed if found]
    assert len(checked) >= 9
    for psf_in_kpa, kpa in checked:
        assert psf_in_kpa == pytest.approx(kpa, abs=0.0051)  # half of the last place printed


@pytest.mark.parametrize(
    ("layer", "thickness_in", "psf"),
    [
        ("plywood", 0.75, 2.4),  # 6 x 0.4
        ("OSB", 0.5, 1.6),
        ("Gypsum Board", 0.625, 2.75),  # 5 x 0.55
        ("lightweight concrete fill", 1.5, 12.0),
        ("sand pugging", 2.0, 16.0),
        ("wood sheathing", 0.75, 2.25),
    ],
)
def test_what_is_weighed_by_thickness_scales(layer: str, thickness_in: float, psf: float) -> None:
    found, _, note = layer_psf(layer, thickness_in)
    assert found == pytest.approx(psf, rel=1e-12)
    assert note is None


def test_another_thickness_than_the_row_s_is_scaled_and_said() -> None:
    psf, _, note = layer_psf("hardwood flooring", 0.75)
    assert psf == pytest.approx(4.0 * 0.75 / 0.875, rel=1e-12)
    assert note == "hardwood flooring 7/8 in: weight of 0.875 in scaled to 0.75 in"
    assert layer_psf("hardwood flooring", 0.875)[2] is None
    assert layer_psf("hardwood flooring 7/8 in")[2] is None


def test_a_thickness_taken_for_granted_is_said() -> None:
    assert layer_psf("hardwood flooring")[::2] == (4.0, "hardwood flooring 7/8 in: taken, no thickness read")
    assert "one weight for any thickness" in str(layer_psf("plaster on wood lath", 0.75)[2])


@pytest.mark.parametrize("thickness_in", [0.0, -0.5, float("nan"), float("inf")])
def test_a_thickness_that_is_none_is_refused(thickness_in: float) -> None:
    for layer in ("gypsum board", "hardwood flooring", "plaster on wood lath"):
        with pytest.raises(ReadingError) as error:
            layer_psf(layer, thickness_in)
        assert error.value.field == "thickness"


def test_a_thickness_that_is_needed_is_asked_for() -> None:
    with pytest.raises(ReadingError, match="is missing") as error:
        layer_psf("gypsum board")
    assert error.value.field == "thickness"


@pytest.mark.parametrize(
    ("typed", "offered"),
    [
        ("tile", "ceramic or quarry tile 3/4 in on 1 in mortar bed"),
        ("plaster", "plaster on wood lath"),
        ("gipsum", "gypsum board"),
    ],
)
def test_an_unknown_material_is_refused_with_the_nearest(typed: str, offered: str) -> None:
    with pytest.raises(ReadingError) as error:
        layer_psf(typed)
    assert error.value.field == "layer"
    assert offered in error.value.accepted


def test_offers_are_few_and_in_the_table_s_order() -> None:
    names = [f"room {i}" for i in range(20)]
    assert offers("room", names) == names[:5]
    assert offers("quay", names) == []
