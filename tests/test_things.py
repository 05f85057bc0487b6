"""The list of heavy things: complete rows, weights within their ranges, and entries the form can read."""

from __future__ import annotations

import csv
from pathlib import Path

import pytest

import assess.things
from assess import assess as assess_member
from assess.errors import ReadingError
from assess.finding import Finding
from assess.materials import all_materials
from assess.record import read_member, record_problems
from assess.things import BY_HEIGHT, Run, Thing, all_runs, all_things, thing_named
from tui.field_shown import choices
from tui.field_text import to_raw
from tui.fields import BY_KEY

TABLE = Path(assess.things.__file__).parent / "data" / "heavy_things.csv"
EVERY: tuple[Thing | Run, ...] = (*all_things(), *all_runs())


def rows() -> list[dict[str, str]]:
    lines = TABLE.read_text(encoding="utf-8").splitlines()
    return list(csv.DictReader(line for line in lines if not line.startswith("#")))


@pytest.mark.parametrize("row", rows(), ids=lambda row: row["thing"])
def test_every_row_is_complete(row: dict[str, str]) -> None:
    assert None not in row  # no column too many
    for column, text in row.items():
        assert text == text.strip()
        assert text or (column == "footprint_in" and row["unit"] != "lb"), column
    assert row["unit"] in ("lb", "plf", BY_HEIGHT)
    assert 0.0 < float(row["low"]) <= float(row["load"]) <= float(row["high"])
    assert row["permanent"] in ("yes", "no")
    if row["unit"] == "lb":
        along, across = (float(side) for side in row["footprint_in"].split(" x "))
        assert 10.0 <= along <= across <= 96.0
    else:
        assert row["footprint_in"] == ""
    # every weight says where it comes from, in the words of the head of the table
    assert any(word in row["source"] for word in ("recalled", "derived", "in print", "common practice, no source"))


def test_permanent_things_say_why_they_are() -> None:
    # NDS 2.3.2: ten years or more at full load is permanent; its D-only check has CD 0.9
    reasons = {
        True: {"a fixture that stays", "stands filled for years", "stays where it is put", "a wall stays"},
        False: {"moved from time to time"},
    }
    for thing in EVERY:
        assert thing.why in reasons[thing.permanent], thing.name
        assert thing.load_type == ("dead" if thing.permanent else "live")
    # tanks, fixtures, safes and walls; what people move about is none of these
    permanent = {thing.name.split(",")[0].split(" of ")[0].split(" with ")[0] for thing in EVERY if thing.permanent}
    assert permanent == {
        "soaking tub", "hot tub", "aquarium", "kitchen island", "safe", "brick partition", "hollow block partition",
        "hollow clay tile partition",
    }  # fmt: skip


def test_what_people_bring_in_is_there() -> None:
    names = [thing.name for thing in EVERY]
    assert len(set(names)) == len(names) == len(rows())
    for word in ("tub, filled", "hot tub", "kitchen island with stone top", "upright piano", "grand piano", "safe"):
        assert any(word in name for name in names), word
    for word in (
        "waterbed",
        "file cabinet, four drawers",
        "bookshelves",
        "brick partition",
        "aquarium of fifty-five gallons",
    ):
        assert any(word in name for name in names), word


def test_a_thing_at_one_place_covers_its_footprint() -> None:
    # as published or recalled for the whole thing: waterbed 47 to 60 psf, soaking tub 70 to 110, kitchen island about
    # 40, four-drawer file 100 to 150, aquarium of 90 gal about 150, hot tub 100 and more
    said = {
        "waterbed": (47.0, 60.0),
        "soaking tub, filled, with bather": (70.0, 110.0),
        "kitchen island with stone top": (39.0, 41.0),
        "file cabinet, four drawers, full": (100.0, 150.0),
        "aquarium of ninety gallons with stand": (145.0, 155.0),
        "hot tub, filled, with bathers": (100.0, 120.0),
    }
    for name, (low, high) in said.items():
        thing = thing_named(name)
        assert isinstance(thing, Thing)
        along, across = thing.footprint_in
        assert thing.psf == pytest.approx(thing.load_lb / (along / 12 * across / 12), rel=1e-12)
        assert low <= thing.psf <= high, name


def test_water_weighs_what_it_must() -> None:
    # 8.34 lb/gal is the least that a filled tank can weigh
    gallons = {
        "aquarium of fifty-five gallons with stand": 55,
        "aquarium of ninety gallons with stand": 90,
        "aquarium of a hundred and twenty-five gallons with stand": 125,
        "aquarium of two hundred and twenty-five gallons with stand": 225,
        "soaking tub, filled, with bather": 60,
        "hot tub, filled, with bathers": 300,
    }
    for name, least in gallons.items():
        thing = thing_named(name)
        assert isinstance(thing, Thing)
        assert thing.low_lb > 8.34 * least, name


def test_a_wall_weighs_by_its_height() -> None:
    brick = thing_named("Brick partition - 4 in")
    assert isinstance(brick, Run)
    assert brick.by_height
    assert brick.at_height(9.5) == pytest.approx(39.0 * 9.5)
    shelves = thing_named("bookshelves along a wall, full, 7 ft high")
    assert isinstance(shelves, Run)
    assert not shelves.by_height
    assert shelves.at_height(7.0) == shelves.load_plf
    # masonry is far heavier than the stud partitions of the table of materials
    stud = max(m.psf for m in all_materials() if "partition" in m.name)
    assert all(run.load_plf > 3 * stud for run in all_runs() if run.by_height)


def test_names_are_known_in_any_case_and_punctuation() -> None:
    for thing in EVERY:
        assert thing_named(thing.name.upper()) is thing
        assert thing_named(f"  {thing.name.replace(',', ' -')} ") is thing


@pytest.mark.parametrize(
    ("typed", "offered"),
    [
        ("uprigth piano", ["upright piano"]),
        ("piano", ["upright piano", "grand piano"]),
        (
            "aquarium",
            ["aquarium of fifty-five gallons with stand", "aquarium of two hundred and twenty-five gallons with stand"],
        ),
        ("partition", ["brick partition, 4 in", "hollow block partition, 8 in"]),
        ("file cabnet", ["file cabinet, four drawers, full"]),
    ],
)
def test_an_unknown_thing_is_refused_with_the_nearest(typed: str, offered: list[str]) -> None:
    with pytest.raises(ReadingError) as error:
        thing_named(typed)
    assert (error.value.field, error.value.value) == ("name", typed)
    for name in offered:
        assert name in error.value.accepted


@pytest.mark.parametrize("typed", ["", "  ", "сейф", "¼", "[/]", "\ud800", "x" * 100_000])
def test_any_text_at_all_is_refused_in_one_line(typed: str) -> None:
    with pytest.raises(ReadingError) as error:
        thing_named(typed)
    assert "\n" not in error.value.line()
    assert len(error.value.line()) < 600


def test_every_suggested_load_reads_once_its_place_is_typed() -> None:
    field = BY_KEY["point_loads"]
    suggested = choices(field, {})
    assert len(suggested) == len(all_things())
    for text, thing in zip(suggested, all_things(), strict=True):
        raw = to_raw(text.replace("?", "5 ft"), field)
        assert raw == [{"name": thing.name, "load": f"{thing.load_lb:g} lb", "at": "5 ft", "type": thing.load_type}]
        assert record_problems("member", {"spans": ["12 ft"], "point_loads": raw}) == []
        with pytest.raises(ReadingError):
            _all(text, field)


def _all(text: str, field: object) -> None:
    """Read the text as the form does, its place still open."""
    raw = to_raw(text, field)  # type: ignore[arg-type]
    found = record_problems("member", {"spans": ["12 ft"], "point_loads": raw})
    if found:
        raise found[0]


@pytest.mark.parametrize("thing", EVERY, ids=lambda thing: thing.name)
def test_each_is_a_load_the_assessment_takes(thing: Thing | Run) -> None:
    # 12 ft of 2x10 at 16 in: the thing's load type decides which combinations it enters
    record = {
        "kind": "joist",
        "size": {"width": "1 1/2 in", "depth": "9 1/4 in"},
        "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp"},
        "spans": ["12 ft"],
        "spacing": "16 in",
        "dead": "10 psf",
        "proposed_use": "dwelling, living areas",
    }
    if isinstance(thing, Thing):
        loads = {"point_loads": [{"load": f"{thing.load_lb} lb", "at": "6 ft", "type": thing.load_type}]}
    else:
        load = f"{thing.at_height(8.0)} plf"
        loads = {"line_loads": [{"load": load, "from": "0 ft", "to": "12 ft", "type": thing.load_type}]}
    bare, loaded = assess_member(read_member(record)), assess_member(read_member(record | loads))

    def dead_alone(found: Finding) -> float | None:
        return next(c.ratio for c in found.checks if (c.check, c.combination) == ("bending", "D"))

    one, other = dead_alone(bare), dead_alone(loaded)
    assert one is not None
    assert other is not None
    assert (other > one * 1.01) is thing.permanent
    assert loaded.ratio is not None
    assert bare.ratio is not None
    assert loaded.ratio > bare.ratio
