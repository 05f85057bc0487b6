"""Size classes of measured pieces, and dressed sizes by period."""

from __future__ import annotations

from math import inf, nan

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from species import WoodError, dressed_size, reference_values, size_class
from species.datafile import read
from species.dressing import DRESSINGS, dressed_note
from species.inches import from_mixed, to_mixed
from species.sizes import is_standard_dressed, nominal_size, thickness_class

SIZES = st.floats(0.75, 24.0)


@pytest.mark.parametrize(
    ("width_in", "nominal"),
    [
        *((w, 8) for w in (6.126, 7.25, 7.5, 8.0, 8.125)),
        *((w, 10) for w in (8.126, 8.25, 9.25, 9.5, 10.0)),
        *((w, 2) for w in (1.5, 1.625, 2.0, 2.125)),
        (2.25, 3),
        (3.5, 4),
        (4.125, 4),
        (4.5, 5),
        (5.125, 5),
        (5.5, 6),
        (11.25, 12),
        (12.125, 12),
        (12.2, 14),
        (13.25, 14),
        (16.2, 14),
        (24.0, 14),
    ],
)
def test_size_class_is_the_least_nominal_with_an_eighth_to_spare(width_in: float, nominal: int) -> None:
    assert size_class(width_in) == nominal
    assert thickness_class(width_in) == nominal


def test_a_size_converted_from_millimetres_does_not_cross_a_limit_by_its_last_digit() -> None:
    assert size_class(8.125 * 25.4 / 25.4) == size_class(206.375 / 25.4) == 8


@given(a=SIZES, b=SIZES)
@settings(derandomize=True, max_examples=100)
def test_a_wider_piece_is_of_no_lower_class(a: float, b: float) -> None:
    assert nominal_size(min(a, b)) <= nominal_size(max(a, b))


@pytest.mark.parametrize("size_in", [0.0, -1.0, nan, inf, -inf])
def test_what_is_no_size_is_refused(size_in: float) -> None:
    for ask in (size_class, thickness_class, is_standard_dressed, nominal_size):
        with pytest.raises(WoodError, match="size: "):
            ask(size_in)
    for pair in ((size_in, 7.25), (1.5, size_in)):
        with pytest.raises(WoodError, match="size: "):
            reference_values("DF-L", "No. 2", *pair)


def test_standard_dressed_widths_are_todays() -> None:
    # PS 20, dry; a tape reads to 1/16 in.
    assert all(is_standard_dressed(w) for w in (3.5, 5.5, 7.25, 9.25, 11.25, 13.25, 7.3, 7.2))
    assert not any(is_standard_dressed(w) for w in (3.625, 7.5, 9.5, 11.5, 8.0, 2.0))


@pytest.mark.parametrize(
    ("nominal", "dressing", "size"),
    [
        ("2x4", "current", (1.5, 3.5)),  # PS 20-70 and later, dry: seen in print
        ("2x8", "current", (1.5, 7.25)),
        ("2x14", "current", (1.5, 13.25)),
        ("4x10", "current", (3.5, 9.25)),
        ("3x8", "current", (2.5, 7.25)),
        ("2x8", "1925-1969", (1.625, 7.5)),  # American Lumber Standards: recalled
        ("2x10", "1925-1969", (1.625, 9.5)),
        ("2x6", "1925-1969", (1.625, 5.5)),
        ("4x12", "1925-1969", (3.625, 11.5)),
        ("2x8", "full sawn", (2.0, 8.0)),
        ("3x14", "full sawn", (3.0, 14.0)),
        ("6x10", "current", (5.5, 9.5)),
        ("8x8", "1925-1969", (7.5, 7.5)),
        ("10x14", "full sawn", (10.0, 14.0)),
        ("8 x 2", "current", (1.5, 7.25)),
        ("2X8", "current", (1.5, 7.25)),
        ("2×8", "current", (1.5, 7.25)),
        ('2" x 8"', "current", (1.5, 7.25)),
        ("2 by 8", "current", (1.5, 7.25)),
    ],
)
def test_dressed_size(nominal: str, dressing: str, size: tuple[float, float]) -> None:
    assert dressed_size(nominal, dressing) == size


@pytest.mark.parametrize(
    "nominal",
    ["2x7", "1x6", "7x9", "2x16", "8", "2x", "2x8x10", "2.5x8", "0x0", "-2x8", "", "x" * 500, "2x8\n3"],
)
def test_an_unknown_nominal_size_is_refused(nominal: str) -> None:
    for dressing in DRESSINGS:
        with pytest.raises(WoodError) as caught:
            dressed_size(nominal, dressing)
        assert caught.value.field == "nominal"


def test_an_unknown_nominal_size_names_its_neighbours() -> None:
    with pytest.raises(WoodError) as caught:
        dressed_size("2x7", "current")
    assert caught.value.suggestions == ("2x6", "2x8")


def test_a_dressing_without_the_size_on_file_asks_for_a_measurement() -> None:
    with pytest.raises(WoodError, match="measured size"):
        dressed_size("2x14", "1925-1969")
    with pytest.raises(WoodError, match="dressing: "):
        dressed_size("2x8", "current, surfaced green")


def test_dressed_note_says_what_is_recalled_and_where_the_size_changed() -> None:
    assert "5 5/8 in before 1953, 5 1/2 in from then: the lesser is taken" in dressed_note("2x6", "1925-1969")
    assert "recalled" in dressed_note("6x10", "current")
    assert "seen in print" in dressed_note("2x8", "current")
    assert "no source" in dressed_note("2x8", "full sawn")


def test_every_printed_size_of_a_period_is_read() -> None:
    for row in read("sizes_by_period.csv")[1]:
        if row["dressing"] in ("current", "1925-1969"):
            printed = row["widths_of_4_6_8_10_12_14"].replace(" from 1953)", "").split(";")
            for nominal, text in zip((4, 6, 8, 10, 12, 14), printed, strict=False):
                least = min(from_mixed(part) for part in text.split(" ("))
                assert dressed_size(f"2x{nominal}", row["dressing"]) == (from_mixed(row["thickness_of_2x"]), least)


@pytest.mark.parametrize("nominal", [4, 6, 8, 10, 12, 14])
def test_full_sawn_lumber_measures_its_nominal_size(nominal: int) -> None:
    # The printed row is shifted against its column head (2;4;6;8;10;12): read by place, a 2x8 would measure 6 in.
    assert dressed_size(f"2x{nominal}", "full sawn") == (2.0, float(nominal))


@given(sixteenths=st.integers(1, 16 * 36))
@settings(derandomize=True, max_examples=100)
def test_inches_are_written_as_they_are_read(sixteenths: int) -> None:
    assert from_mixed(to_mixed(sixteenths / 16)) == sixteenths / 16
