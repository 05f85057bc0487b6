"""Which table and row a piece takes, on what assumptions, and what is refused."""

from __future__ import annotations

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from species import ReferenceValues, WoodError, reference_values
from species.grades import ORDER
from species.tables import grade_names, index, species_names

SPECIES = st.sampled_from(species_names())
GRADES = st.sampled_from(grade_names())
SIZES = st.floats(0.75, 24.0)


def refused(species: str, grade: str, thickness_in: float, width_in: float, rules: str = "current") -> WoodError:
    with pytest.raises(WoodError) as caught:
        reference_values(species, grade, thickness_in, width_in, rules)
    return caught.value


def values_or_refusal(species: str, grade: str, a: float, b: float) -> ReferenceValues | WoodError:
    try:
        return reference_values(species, grade, a, b)
    except WoodError as error:
        return error


# Lumber: Tables 4A and 4B


def test_lumber_row_and_the_assumption_an_odd_width_makes() -> None:
    values = reference_values("Douglas Fir-Larch", "No. 2", 1.625, 7.5)
    assert (values.table, values.size_class, values.Fb, values.Emin) == ("4A", "8 in wide", 900.0, 580_000.0)
    assert values.notes == ("width 7 1/2 in is no standard dressed size: taken as class 8",)
    assert "Recalled" in values.source
    assert reference_values("Douglas Fir-Larch", "No. 2", 1.5, 7.25).notes == ()


def test_which_dimension_comes_first_does_not_matter() -> None:
    assert reference_values("HF", "#2", 9.25, 1.5) == reference_values("HF", "#2", 1.5, 9.25)


@pytest.mark.parametrize(
    ("width_in", "Fb"),
    [
        (1.5, 1100),
        (3.5, 1100),
        (4.5, 1000),
        (5.5, 1000),
        (7.25, 925),
        (9.25, 800),
        (11.25, 750),
        (13.25, 750),
    ],
)
def test_southern_pine_No_2_goes_by_width(width_in: float, Fb: float) -> None:
    # NDS Supplement 2018 Table 4B as carried: 4 covers 2-4 in, 6 covers 5-6, 12 serves beyond.
    values = reference_values("SYP", "No. 2", 1.5, width_in)
    assert (values.table, values.Fb) == ("4B", Fb)
    assert any("12 in row" in note for note in values.notes) == (width_in > 12)


def test_four_inch_lumber_reaches_to_four_and_an_eighth() -> None:
    values = reference_values("DF-L", "No. 2", 4.125, 8.0)
    assert (values.table, values.tables, values.thickness_class, values.Fb) == ("4A", ("4A",), 4, 900.0)


def test_thinner_than_any_2_in_lumber_is_said() -> None:
    assert any("where the table begins" in note for note in reference_values("DF-L", "No. 2", 1.25, 7.25).notes)


def test_reading_a_name_by_default_is_said() -> None:
    values = reference_values("douglas fir", "No. 1/No. 2", 1.5, 7.25)
    assert (values.species, values.grade) == ("Douglas Fir-Larch", "No. 2")
    assert any("N (North) or S (South)" in note for note in values.notes)
    assert any("No. 2 row is taken" in note for note in values.notes)


# Widths a grade exists in, and rows that do not


@pytest.mark.parametrize(
    ("grade", "widest_in", "wider_in"),
    [("Stud", 6.125, 6.2), ("Construction", 4.125, 4.2), ("Standard", 3.5, 5.5), ("Utility", 3.5, 4.5)],
)
def test_light_grades_stop_at_their_width_and_name_what_applies(grade: str, widest_in: float, wider_in: float) -> None:
    assert reference_values("DF-L", grade, 1.5, widest_in).grade == grade
    error = refused("DF-L", grade, 1.5, wider_in)
    assert error.field == "grade"
    assert "No. 3" in str(error)
    # No. 3 lies above Standard and Utility: it is never offered in their place.
    assert error.suggestions == (("No. 3",) if grade in ("Stud", "Construction") else ())


@pytest.mark.parametrize(
    ("species", "grade", "nearest"),
    [
        ("SPF", "1&BTR", ("No. 1",)),
        ("SYP", "Stud", ("No. 3",)),
        ("SYP", "Construction", ("No. 3",)),
        ("SYP", "Utility", ()),
        ("Redwood", "Construction", ("No. 3",)),
        ("DF-L", "Dense Select Structural", ("Select Structural",)),
        ("Aspen", "Utility", ()),
    ],
)
def test_a_grade_without_a_row_is_refused_with_the_nearest_lower(
    species: str, grade: str, nearest: tuple[str, ...]
) -> None:
    error = refused(species, grade, 1.5, 3.5)
    assert error.field == "grade"
    assert error.suggestions == nearest
    assert "No. 3" in error.accepted
    assert ("no substitute" in error.accepted) == (nearest == ())


def test_timber_of_a_species_without_timber_rows_is_refused_not_given_another_table() -> None:
    error = refused("Western Woods", "No. 2", 7.5, 9.5)
    assert error.field == "species"
    assert "Table 4D" in str(error)
    assert refused("DF-L", "No. 3", 7.5, 9.5).suggestions == ()
    assert "no substitute" in refused("DF-L", "No. 3", 7.5, 9.5).accepted


# Timbers: Table 4D


@pytest.mark.parametrize(
    ("thickness_in", "width_in", "size"),
    [
        (5.5, 9.5, "beams and stringers"),
        (5.5, 7.5, "posts and timbers"),
        (7.5, 9.5, "posts and timbers"),
        (6.0, 10.0, "beams and stringers"),
        (6.0, 8.0, "posts and timbers"),
        (4.5, 7.5, "beams and stringers"),
        (13.5, 15.5, "posts and timbers"),
        (13.5, 17.5, "beams and stringers"),
        (5.5, 7.75, "posts and timbers"),
        (10.0, 10.0, "posts and timbers"),
    ],
)
def test_timber_size_class_goes_by_nominal_dimensions(thickness_in: float, width_in: float, size: str) -> None:
    values = reference_values("DF-L", "No. 1", thickness_in, width_in)
    assert (values.table, values.size_class) == ("4D", size)
    assert values.Fb == {"beams and stringers": 1350.0, "posts and timbers": 1200.0}[size]


def test_southern_pine_and_redwood_timbers_are_of_one_class() -> None:
    for species, Fb in (("Southern Pine", 1350.0), ("Redwood", 1200.0)):
        for width_in in (5.5, 11.5):
            values = reference_values(species, "No. 1", 5.5, width_in)
            assert (values.size_class, values.Fb, values.notes) == ("5x5 and larger", Fb, ())


def test_odd_timber_says_what_it_was_taken_as_and_where_the_measure_disagrees() -> None:
    assert reference_values("DF-L", "No. 1", 7.5, 9.5).notes == ()
    notes = reference_values("DF-L", "No. 1", 5.5, 7.75).notes
    assert any("nominal 6x8, posts and timbers" in note for note in notes)
    assert any("other size class" in note for note in notes)


def test_dense_No_1_is_one_grade_however_its_table_prints_it() -> None:
    assert reference_values("SYP", "No. 1 Dense", 5.5, 9.5).Fb == reference_values("SYP", "Dense No. 1", 5.5, 9.5).Fb
    assert reference_values("SYP", "Dense No. 1", 1.5, 9.25).Fb == 1200.0


@pytest.mark.parametrize("thickness_in", [4.13, 4.25, 4.49])
def test_between_lumber_and_timber_the_lower_of_both_tables_for_each_property(thickness_in: float) -> None:
    values = reference_values("Hem-Fir", "No. 1", thickness_in, 9.5)
    lumber = index("4A")["Hem-Fir", "No. 1", "2-4 in thick"]
    timber = index("4D")["Hem-Fir", "No. 1", "beams and stringers"]
    assert lumber.Fb < timber.Fb  # so that the lower comes now from one table,
    assert timber.Fv < lumber.Fv  # now from the other
    assert (values.Fb, values.Fv, values.E) == (lumber.Fb, timber.Fv, timber.E)
    assert (values.table, values.tables) == ("4D", ("4A", "4D"))
    assert any("the lower of Tables 4A and 4D" in note for note in values.notes)


def test_between_lumber_and_timber_both_tables_must_have_the_row() -> None:
    assert "Table 4D" in str(refused("DF-L", "No. 3", 4.25, 9.5))
    assert "Table 4A" in str(refused("DF-L", "Dense No. 1", 4.25, 9.5))
    assert "Table 4D" in str(refused("SPF-S", "No. 2", 4.25, 9.5))


@given(species=SPECIES, grade=GRADES, a=SIZES, b=SIZES)
@settings(derandomize=True, max_examples=400)
def test_any_piece_gets_the_values_of_printed_rows_or_a_refusal(species: str, grade: str, a: float, b: float) -> None:
    values = values_or_refusal(species, grade, a, b)
    if isinstance(values, WoodError):
        assert values.field in ("species", "grade")
        assert str(values).isprintable()
        return
    for name in ("Fb", "Fv", "Fc_perp", "E", "Emin", "G"):
        printed = {
            getattr(row, name)
            for table in values.tables
            for row in index(table).values()
            if row.species == species and row.grade in (grade, "Dense No. 1", "No. 1 Dense")
        }
        assert getattr(values, name) in printed
    thickness = min(a, b)
    assert ("4D" in values.tables) == (thickness > 4.125)
    assert (values.tables != ("4D",)) == (thickness < 4.5)


@given(species=SPECIES, grade=GRADES, thickness=SIZES, width=SIZES, wider=SIZES)
@settings(derandomize=True, max_examples=200)
def test_southern_pine_and_all_lumber_take_no_higher_row_when_wider(
    species: str, grade: str, thickness: float, width: float, wider: float
) -> None:
    assume(thickness <= 4.0 and thickness <= width <= wider)
    try:
        narrow, wide = (reference_values(species, grade, thickness, w) for w in (width, wider))
    except WoodError:
        return
    assert wide.Fb <= narrow.Fb


# Earlier sets


def test_earlier_southern_pine_is_used_only_when_asked_for_and_named() -> None:
    now, then = (reference_values("SYP", "No. 2", 1.5, 9.25, rules) for rules in ("current", "1991-2013"))
    assert (now.Fb, then.Fb) == (800.0, 1050.0)
    assert "1991 NDS to May 2013" in then.source
    assert any("it was 90 psi before" in note for note in then.notes)


def test_earlier_western_rows_replace_Fb_only_and_say_so() -> None:
    now, then = (reference_values("DF-L", "No. 2", 1.5, 9.25, rules) for rules in ("current", "1991-2013"))
    assert (now.Fb, then.Fb) == (900.0, 875.0)
    assert (now.Fv, now.E, now.Fc_perp) == (then.Fv, then.E, then.Fc_perp)
    assert "1991-2004 NDS" in then.source
    assert any("only Fb is on file" in note for note in then.notes)


@pytest.mark.parametrize(
    ("species", "grade", "thickness_in", "rules", "field"),
    [
        ("DF-L", "No. 1", 1.5, "1991-2013", "grade"),
        ("SYP", "No. 2 Dense", 1.5, "1991-2013", "grade"),
        ("SPF", "No. 2", 1.5, "1991-2013", "rules"),
        ("SYP", "No. 2", 5.5, "1991-2013", "rules"),
        ("SYP", "No. 2", 4.25, "1991-2013", "rules"),
        ("SYP", "No. 2", 1.5, "railway 1911", "rules"),
        ("SYP", "No. 2", 1.5, "1905", "rules"),
    ],
)
def test_a_set_without_the_row_is_an_error(
    species: str, grade: str, thickness_in: float, rules: str, field: str
) -> None:
    assert refused(species, grade, thickness_in, 9.5, rules).field == field


def test_grade_order_covers_every_grade() -> None:
    assert sorted(ORDER) == sorted(grade_names())
