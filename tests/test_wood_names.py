"""Names of species and grades: read however they are written, never one group for another, or refused."""

from __future__ import annotations

import random

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from species import WoodError, match_grade, match_species
from species.datafile import read
from species.names import KEYS, LONGEST, grade_note, known, nearest_names, species_note
from species.tables import grade_names, species_names

MATCH = {"species": match_species, "grade": match_grade}
NAMES = {"species": species_names(), "grade": grade_names()}
ALIASES = [row for row in read("aliases.csv")[1] if row["kind"] != "several"]
SEVERAL = [row for row in read("aliases.csv")[1] if row["kind"] == "several"]
EVERY = [(field, name, name) for field, names in NAMES.items() for name in names] + [
    (row["field"], row["alias"], row["name"]) for row in ALIASES
]


@pytest.mark.parametrize(
    ("text", "name"),
    [
        ("DF-L", "Douglas Fir-Larch"),
        ("DFL", "Douglas Fir-Larch"),
        ("df l", "Douglas Fir-Larch"),
        ("D FIR-L", "Douglas Fir-Larch"),
        ("D. Fir - L.", "Douglas Fir-Larch"),
        ("doug fir", "Douglas Fir-Larch"),
        ("Douglas-fir", "Douglas Fir-Larch"),
        ("DF(N)", "Douglas Fir-Larch (North)"),
        ("D FIR-L (N)", "Douglas Fir-Larch (North)"),
        ("DF-L N", "Douglas Fir-Larch (North)"),
        ("DF-S", "Douglas Fir-South"),
        ("Douglas Fir (South)", "Douglas Fir-South"),
        ("HF", "Hem-Fir"),
        ("hem fir", "Hem-Fir"),
        ("H-F", "Hem-Fir"),
        ("Hem-Fir (N)", "Hem-Fir (North)"),
        ("SPF", "Spruce-Pine-Fir"),
        ("S-P-F", "Spruce-Pine-Fir"),
        ("s.p.f.", "Spruce-Pine-Fir"),
        ("SPF-S", "Spruce-Pine-Fir (South)"),
        ("SPFs", "Spruce-Pine-Fir (South)"),
        ("S-P-F s", "Spruce-Pine-Fir (South)"),
        ("spruce pine fir south", "Spruce-Pine-Fir (South)"),
        ("SYP", "Southern Pine"),
        ("SP", "Southern Pine"),
        ("S.PINE", "Southern Pine"),
        ("southern yellow pine", "Southern Pine"),
        ("WW", "Western Woods"),
        ("EWP", "Eastern White Pine"),
        ("R CEDAR", "Western Cedars"),
        ("E HEM-TAM", "Eastern Hemlock-Tamarack"),
        ("E SFTWD", "Eastern Softwoods"),
        ("redwood open grain", "Redwood, open grain"),
    ],
)
def test_species_as_people_and_stamps_write_them(text: str, name: str) -> None:
    assert match_species(text) == name


@pytest.mark.parametrize(
    ("text", "name"),
    [
        *((text, "No. 2") for text in ("#2", "No2", "no 2", "NO. 2", "2", "No.2", "number 2", "№ 2", "No. #2")),
        *((text, "Select Structural") for text in ("SS", "sel str", "SEL. STR.", "select structural", "S.S.")),
        ("1&BTR", "No. 1 and Btr"),
        ("No. 1 & Btr", "No. 1 and Btr"),
        ("#1 and better", "No. 1 and Btr"),
        ("No. 1/No. 2", "No. 2"),
        ("#1/#2", "No. 2"),
        ("No.1/2", "No. 2"),
        ("2&BTR", "No. 2"),
        ("STAND&BTR", "Standard"),
        ("stud grade", "Stud"),
        ("CONST", "Construction"),
        ("UTIL", "Utility"),
        ("dense no 1", "Dense No. 1"),
        ("1 dense", "No. 1 Dense"),
        ("DSS", "Dense Select Structural"),
    ],
)
def test_grades_as_people_and_stamps_write_them(text: str, name: str) -> None:
    assert match_grade(text) == name


@pytest.mark.parametrize(("field", "text", "name"), EVERY, ids=lambda v: str(v))
def test_every_name_and_alias_is_read_under_any_case_and_gaps(field: str, text: str, name: str) -> None:
    noise = random.Random(f"{field} {text}")
    for _ in range(40):
        written = "".join(noise.choice((letter.upper(), letter.lower())) for letter in text)
        for gap in (" ", "-", "."):
            written = written.replace(gap, noise.choice((" ", "-", ".", " - ", "  ", ". ", "\t")))
        written = noise.choice(("", " ", ". ")) + written + noise.choice(("", " ", ".", " . "))
        assert MATCH[field](written) == name, written


def test_no_way_of_writing_is_claimed_by_two_groups() -> None:
    claims: dict[tuple[str, str], set[str]] = {}
    for field, text, name in EVERY + [(row["field"], row["alias"], "several") for row in SEVERAL]:
        claims.setdefault((field, KEYS[field](text)), set()).add(name)
    assert {key: names for key, names in claims.items() if len(names) > 1} == {}


def test_aliases_name_only_what_a_table_has_and_say_their_basis() -> None:
    for row in (*ALIASES, *SEVERAL):
        assert set(row["name"].split(";")) <= set(NAMES[row["field"]]), row
        assert row["basis"] in ("seen in print", "recalled"), row
        assert row["kind"] in ("same", "default", "member", "mix", "several"), row
        # Whatever is more than another spelling must be said.
        assert bool(row["note"]) == (row["kind"] in ("default", "member", "mix")), row


@pytest.mark.parametrize("name", NAMES["species"])
@pytest.mark.parametrize("mark", ["(N)", "(S)", "-N", "-S", " n", " s", " North", " (South)"])
def test_an_origin_mark_never_falls_silently_to_the_group_without_it(name: str, mark: str) -> None:
    bare = name.partition(" (")[0]
    if bare == "Douglas Fir-South":
        return
    side = "North" if "n" in mark.lower() else "South"
    expected = f"{bare} ({side})"
    if expected in NAMES["species"]:
        assert match_species(bare + mark) == expected
    else:
        with pytest.raises(WoodError) as refused:
            match_species(bare + mark)
        assert refused.value.field == "species"


@pytest.mark.parametrize(
    "text",
    ["Douglas Firs", "SPF (N)", "DF-L (S)", "Hem-Firs", "HF-S", "SYP-N", "spfn", "hfs", "dfls", "WW-S"],
)
def test_one_letter_more_is_refused_with_the_nearest(text: str) -> None:
    with pytest.raises(WoodError) as refused:
        match_species(text)
    assert refused.value.suggestions
    assert set(refused.value.suggestions) <= set(NAMES["species"])


@pytest.mark.parametrize("row", SEVERAL, ids=lambda row: row["alias"])
def test_a_name_of_several_groups_is_refused_naming_them(row: dict[str, str]) -> None:
    with pytest.raises(WoodError) as refused:
        match_species(row["alias"].lower())
    assert refused.value.suggestions == tuple(row["name"].split(";"))
    assert "may be more than one group" in str(refused.value)


@pytest.mark.parametrize(
    "text",
    [
        "No. 2?",
        "<No. 2",
        "not No. 2",
        "No. 12",
        "1-2",
        "2.5",
        "½",
        "No. 2 Non-Dense",
        "No. 4",
        "Economy",
        "",
        "grade",
        "no",
    ],
)
def test_what_is_doubtful_or_no_grade_is_not_read_as_one(text: str) -> None:
    with pytest.raises(WoodError) as refused:
        match_grade(text)
    assert (refused.value.field, refused.value.value) == ("grade", text)


def test_plain_douglas_fir_says_that_a_mark_of_origin_changes_the_table() -> None:
    for text in ("douglas fir", "Doug Fir", "DF", "D FIR"):
        assert match_species(text) == "Douglas Fir-Larch"
        assert "N (North) or S (South)" in species_note(text)
    assert species_note("DF-L") == species_note("Douglas Fir-Larch") == ""
    assert "the No. 2 row is taken" in grade_note("No. 1/No. 2")
    assert grade_note("#2") == ""


def test_a_misspelling_is_refused_with_its_likeliest_names() -> None:
    with pytest.raises(WoodError) as refused:
        match_species("douglass fir larch")
    assert refused.value.suggestions[0] == "Douglas Fir-Larch"
    with pytest.raises(WoodError) as refused:
        match_grade("selct structural")
    assert refused.value.suggestions[0] == "Select Structural"
    assert nearest_names("species", "qqqq") == ()


@pytest.mark.parametrize("field", ["species", "grade"])
@given(text=st.text(max_size=40) | st.text(alphabet="DFLHSPNYWEdflhspn#.-&/() 0123NoSselstrBTR", max_size=14))
@settings(derandomize=True, max_examples=300, deadline=None)
def test_any_text_is_a_known_name_or_refused_in_one_line(field: str, text: str) -> None:
    key = KEYS[field](text)
    meaning = known(field).get(key)
    if meaning is not None and meaning.certain:
        assert MATCH[field](text) in NAMES[field]
        return
    with pytest.raises(WoodError) as caught:
        MATCH[field](text)
    refused = caught.value
    assert (refused.field, refused.value) == (field, text)
    assert str(refused).isprintable()
    assert len(str(refused)) < 400


@pytest.mark.parametrize("text", ["x" * (LONGEST + 1), "DF-L" + " " * 1_000_000, "\x1b]0;x\x07", "[/]", "\ud800"])
def test_hostile_text_is_refused_in_a_short_printable_line(text: str) -> None:
    for match in MATCH.values():
        with pytest.raises(WoodError) as refused:
            match(text)
        assert len(str(refused.value)) < 400
        assert str(refused.value).isascii()
        assert str(refused.value).isprintable()


@pytest.mark.parametrize("value", [None, 2, 2.0, True, ["No. 2"], b"No. 2"])
def test_what_is_no_text_is_refused(value: object) -> None:
    with pytest.raises(WoodError, match="grade: "):
        match_grade(value)  # type: ignore[arg-type]
