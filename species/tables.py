"""The tables of reference values, as rows: Supplement Tables 4A, 4B and 4D, and the sets in force before."""

from __future__ import annotations

from dataclasses import dataclass, replace
from functools import cache

from species.datafile import read
from species.errors import WoodError

RULES = ("current", "1991-2013")  # sets a member may be assessed by
TABLES = ("4A", "4B", "4D")
LUMBER = "2-4 in thick"
LARGE = "5x5 and larger"
WIDTHS_4B = {4: "2 to 4 in wide", 6: "5 and 6 in wide", 8: "8 in wide", 10: "10 in wide", 12: "12 in wide"}
FILES = {
    "4A": "nds2018_4a_dimension.csv",
    "4B": "nds2018_4b_southern_pine.csv",
    "4D": "nds2018_4d_timbers.csv",
}
PINE_1991 = "southern_pine_1991_2013.csv"
WEST_1991 = "nds1991_west_and_north.csv"


@dataclass(frozen=True)
class Row:
    """One row of a table of reference values: psi, G oven-dry; Ft and Fc are None where a set has none.

    size    '2-4 in thick' (4A), a width (4B), or the size class of timbers (4D)
    notes   what must be said wherever the row is used
    """

    rules: str
    table: str
    species: str
    grade: str
    size: str
    Fb: float
    Ft: float | None
    Fv: float
    Fc_perp: float
    Fc: float | None
    E: float
    Emin: float
    G: float
    source: str
    notes: tuple[str, ...] = ()


def _optional(row: dict[str, str], column: str) -> float | None:
    return float(row[column]) if column in row else None


def _size(table: str, row: dict[str, str]) -> str:
    if table == "4A":
        return LUMBER
    return WIDTHS_4B[int(row["width"])] if table == "4B" else row["class"]


def _from_file(rules: str, table: str, file: str, notes: tuple[str, ...] = ()) -> tuple[Row, ...]:
    source, rows = read(file)
    return tuple(
        Row(
            rules=rules,
            table=table,
            species=row["species"],
            grade=row["grade"],
            size=_size(table, row),
            Fb=float(row["Fb"]),
            Ft=_optional(row, "Ft"),
            Fv=float(row["Fv"]),
            Fc_perp=float(row["Fc_perp"]),
            Fc=_optional(row, "Fc"),
            E=float(row["E"]),
            Emin=float(row["Emin"]),
            G=float(row["G"]),
            source=source,
            notes=notes,
        )
        for row in rows
    )


def _west_1991() -> tuple[Row, ...]:
    """Rows of Table 4A whose Fb the earlier set printed otherwise; its list names no other column."""
    source, listed = read(WEST_1991)
    now = {(row.species, row.grade): row for row in rows("4A")}
    old = []
    for row in listed:
        current = now[row["species"], row["grade"]]
        note = (
            "1991-2013 set: only Fb is on file for it; Fv, Fc_perp, E, Emin and G are those of the 2018 "
            "table (editions before 2001 printed a lower Fv: recalled)"
        )
        old.append(
            replace(
                current,
                rules="1991-2013",
                Fb=float(row["Fb"]),
                Ft=None,
                Fc=None,
                source=f"Fb: {source} Other values: {current.source}",
                notes=(note,),
            )
        )
    return tuple(old)


@cache
def rows(table: str, rules: str = "current") -> tuple[Row, ...]:
    """Every row of a table under a set of rules, in printed order.

    table    '4A', '4B' or '4D'
    rules    'current' or '1991-2013'
    returns  rows; none where the set has no such table
    raises   WoodError for other rules

    >>> len(rows("4A")), len(rows("4B")), len(rows("4D")), len(rows("4D", "1991-2013"))
    (153, 35, 60, 0)
    """
    if rules == "current":
        return _from_file(rules, table, FILES[table])
    if rules != "1991-2013":
        raise WoodError("rules", rules, " or ".join(RULES))
    if table == "4A":
        return _west_1991()
    if table == "4B":
        return _from_file(
            rules,
            table,
            PINE_1991,
            ("1991-2013 set: Fv 175 psi is that of the 2001 edition and later; it was 90 psi before",),
        )
    return ()


@cache
def index(table: str, rules: str = "current") -> dict[tuple[str, str, str], Row]:
    """The rows of a table by species, grade and size.

    table    '4A', '4B' or '4D'
    rules    'current' or '1991-2013'
    returns  rows by (species, grade, size)
    raises   WoodError for other rules

    >>> index("4D")["Hem-Fir", "No. 1", "beams and stringers"].Fb
    1050.0
    """
    return {(row.species, row.grade, row.size): row for row in rows(table, rules)}


@cache
def species_names() -> tuple[str, ...]:
    """Every species group that has a row in some table, in printed order.

    >>> species_names()[:2]
    ('Douglas Fir-Larch', 'Douglas Fir-Larch (North)')
    """
    return tuple(dict.fromkeys(row.species for table in TABLES for row in rows(table)))


@cache
def grade_names() -> tuple[str, ...]:
    """Every grade that has a row in some table, in printed order.

    >>> grade_names()[3]
    'No. 2'
    """
    return tuple(dict.fromkeys(row.grade for table in TABLES for row in rows(table)))
