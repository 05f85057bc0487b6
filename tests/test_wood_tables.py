"""The data files of wood values: no row lost, no digit slipped, every row bound by the Emin relation."""

from __future__ import annotations

import csv
import hashlib
from pathlib import Path

import pytest

import species
from species.datafile import read, source
from species.tables import RULES, TABLES, grade_names, index, rows, species_names

DATA = Path(species.__file__).parent / "data"

# Rows, SHA-256 and column sums of the source tables, taken by other means than this program's reader.
CARRIED = {
    "nds2018_4a_dimension.csv": (153, "0301b53d64c2d875311db47210b9358bde4e2de31107c6bfac994760ba97b65a"),
    "nds2018_4b_southern_pine.csv": (35, "87817ffc7b7157fda4614e403243fe443d5c299ef4c8c3eb22853bc841b86e9c"),
    "nds2018_4d_timbers.csv": (60, "1707a75f8843d7fe2093019bfe8dd09cb34b862d13b4b55a8b6117b8ddcbe42c"),
    "southern_pine_1991_2013.csv": (20, "a4af9c6e2f008b3074808f41683ff39a0ed2fd217e7dced6f7575ddd8fe4b823"),
    "nds1991_west_and_north.csv": (4, "54c927f0abe8fbd175266e4a761695c29779a56c15f0544ccb1ff7e7e370356b"),
    "railway_1911.csv": (9, "14be3a1499e0877bb0fd89d583296c382ce6d91cd33adba41157adb9f791ddc8"),
    "sizes_by_period.csv": (4, "cae829b7915ee3c6249c62a3a0ea97399b5bb9a1c81b227e6eb1a8f46199fad7"),
}
SUMS = {
    "nds2018_4a_dimension.csv": {
        "Fb": 113425,
        "Ft": 63500,
        "Fv": 24275,
        "Fc_perp": 76290,
        "Fc": 144775,
        "E": 183200000,
        "Emin": 66880000,
        "G": 69.8,
    },
    "nds2018_4b_southern_pine.csv": {
        "width": 280,
        "Fb": 45825,
        "Ft": 30300,
        "Fv": 6125,
        "Fc_perp": 21200,
        "Fc": 51300,
        "E": 57000000,
        "Emin": 20750000,
        "G": 19.25,
    },
    "nds2018_4d_timbers.csv": {
        "Fb": 64550,
        "Ft": 39175,
        "Fv": 9290,
        "Fc_perp": 33095,
        "Fc": 47450,
        "E": 72500000,
        "Emin": 26460000,
        "G": 29.65,
    },
    "southern_pine_1991_2013.csv": {
        "width": 160,
        "Fb": 28650,
        "Fv": 3500,
        "Fc_perp": 11300,
        "E": 32500000,
        "Emin": 11850000,
        "G": 11.0,
    },
}
WITH_EMIN = sorted(SUMS)


def lines(name: str) -> list[str]:
    return (DATA / name).read_text(encoding="utf-8").splitlines()


@pytest.mark.parametrize("name", sorted(CARRIED))
def test_data_file_is_the_published_table_row_for_row(name: str) -> None:
    count, digest = CARRIED[name]
    text = "\n".join(lines(name)) + "\n"
    assert hashlib.sha256(text.encode()).hexdigest() == digest
    assert len(read(name)[1]) == count


@pytest.mark.parametrize("name", sorted(SUMS))
def test_column_sums(name: str) -> None:
    for column, total in SUMS[name].items():
        assert sum(float(row[column]) for row in read(name)[1]) == pytest.approx(total, abs=1e-6)


@pytest.mark.parametrize("name", sorted(path.name for path in DATA.glob("*.csv")))
def test_every_data_file_says_its_source_first(name: str) -> None:
    first, header = lines(name)[:2]
    assert first.startswith("# ")
    assert len(source(name)) > 40
    assert all(len(row) == len(next(csv.reader([header]))) for row in csv.reader(lines(name)[2:]))


@pytest.mark.parametrize("name", [*WITH_EMIN, "nds1991_west_and_north.csv"])
def test_recalled_values_say_so(name: str) -> None:
    assert "ecalled" in source(name)


@pytest.mark.parametrize("name", WITH_EMIN)
def test_Emin_relation_of_NDS_2018_Appendix_D_holds_in_every_row(name: str) -> None:
    # COV_E 0.25, visually graded. The table prints Emin to 10,000 psi: half a step is the tolerance.
    for row in read(name)[1]:
        Emin = 1.03 * float(row["E"]) * (1 - 1.645 * 0.25) / 1.66
        assert float(row["Emin"]) == pytest.approx(Emin, abs=5000), row


@pytest.mark.parametrize("name", WITH_EMIN)
def test_values_fall_with_the_grade(name: str) -> None:
    # A swapped pair of rows keeps every sum; within one species, size and density a lower grade is no higher.
    ladder = ["Select Structural", "No. 1 and Btr", "No. 1", "No. 2", "No. 3"]
    light = ["Construction", "Standard", "Utility"]
    kinds = {(row["species"], row.get("class", row.get("width", ""))) for row in read(name)[1]}
    for kind in kinds:
        found = {
            row["grade"]: row
            for row in read(name)[1]
            if (row["species"], row.get("class", row.get("width", ""))) == kind
        }
        for names in (ladder, light, ["Dense Select Structural", "No. 1 Dense", "No. 2 Dense"]):
            present = [found[grade] for grade in names if grade in found]
            for column in ("Fb", "E"):
                values = [float(row[column]) for row in present]
                assert values == sorted(values, reverse=True), (kind, column)


def test_no_row_stands_twice() -> None:
    for rules in RULES:
        for table in TABLES:
            assert len(index(table, rules)) == len(rows(table, rules))


def test_rows_are_the_file_values() -> None:
    # NDS Supplement 2018 Table 4A, Douglas Fir-Larch No. 2, as carried (recalled).
    row = index("4A")["Douglas Fir-Larch", "No. 2", "2-4 in thick"]
    assert (row.Fb, row.Ft, row.Fv, row.Fc_perp, row.Fc) == (900, 575, 180, 625, 1350)
    assert (row.E, row.Emin, row.G) == (1_600_000, 580_000, 0.5)
    # Southern Pine 1991 set has no Ft and Fc: they are absent, not zero.
    assert index("4B", "1991-2013")["Southern Pine", "No. 2", "8 in wide"].Ft is None


def test_names_come_from_the_tables() -> None:
    assert len(species_names()) == 24 + 1  # Table 4A's groups, and Southern Pine
    assert "Southern Pine" in species_names()
    assert {"Clear Structural", "Dense No. 1", "No. 1 Dense", "Utility"} <= set(grade_names())
