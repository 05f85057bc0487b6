"""Lists what the tables hold: rows by species, grade and set of rules, each with its source."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from functools import cache

from species.datafile import read
from species.errors import WoodError
from species.grades import SAME
from species.names import grade_note, match_grade, match_species, species_key, species_note
from species.tables import RULES, TABLES
from species.tables import rows as table_rows

RAILWAY = "railway 1911"
RAILWAY_FILE = "railway_1911.csv"
RAILWAY_WARNING = "for reconstructing what an old floor was designed for only: never to judge what it may carry today"
LISTS = (*RULES, RAILWAY)


@dataclass(frozen=True)
class CatalogueRow:
    """One listed row (psi; G oven-dry); None where the set prints no such value.

    warning  what forbids using the row, where something does
    notes    what must be said of the row, and of how the names asked for were read
    """

    rules: str
    table: str
    species: str
    grade: str
    size: str
    Fb: float
    Ft: float | None
    Fv: float | None
    Fc_perp: float | None
    Fc: float | None
    E: float
    Emin: float | None
    G: float | None
    source: str
    warning: str
    notes: tuple[str, ...]


@cache
def _railway() -> tuple[CatalogueRow, ...]:
    source, listed = read(RAILWAY_FILE)
    return tuple(
        CatalogueRow(
            rules=RAILWAY,
            table="AREA 1911",
            species=row["species"],
            grade="",
            size="structural timber",
            Fb=float(row["Fb"]),
            Ft=None,
            Fv=float(row["Fv"]) if row["Fv"] else None,
            Fc_perp=float(row["Fc_perp"]) if row["Fc_perp"] else None,
            Fc=None,
            E=float(row["E"]),
            Emin=None,
            G=None,
            source=source,
            warning=RAILWAY_WARNING,
            notes=(),
        )
        for row in listed
    )


def _railway_rows(species: str | None, grade: str | None) -> list[CatalogueRow]:
    if grade is not None:
        raise WoodError("grade", grade, "no grade: that set has none", problem=f"is not in the {RAILWAY} set")
    if species is None:
        return list(_railway())
    found = [row for row in _railway() if species_key(row.species) == species_key(species)]
    if not found:
        names = ", ".join(row.species for row in _railway())
        raise WoodError("species", species, names, problem=f"is not in the {RAILWAY} set")
    return found


def _listed(rules: str, notes: tuple[str, ...]) -> Iterable[CatalogueRow]:
    for table in TABLES:
        for row in table_rows(table, rules):
            yield CatalogueRow(**{**vars(row), "notes": (*notes, *row.notes)}, warning="")


def rows(species: str | None = None, grade: str | None = None, rules: str = "current") -> list[CatalogueRow]:
    """The rows of every table, or those of one species, or of one grade of it.

    species  group, in any common writing; None for all
    grade    in any common writing; None for all
    rules    'current', '1991-2013' or 'railway 1911'
    returns  rows, table by table in printed order
    raises   WoodError for a name that is not known or has no row in that set

    >>> [(row.size, row.Fb) for row in rows("hem-fir", "no 2")][:2]
    [('2-4 in thick', 850.0), ('beams and stringers', 675.0)]
    """
    if rules == RAILWAY:
        return _railway_rows(species, grade)
    if rules not in LISTS:
        raise WoodError("rules", rules, ", ".join(LISTS))
    notes: list[str] = []
    wanted, graded = None, None
    if species is not None:
        wanted, notes = match_species(species), [species_note(species)]
    if grade is not None:
        graded = match_grade(grade)
        notes.append(grade_note(grade))
    found = [
        row
        for row in _listed(rules, tuple(note for note in notes if note))
        if wanted in (None, row.species) and (graded is None or row.grade in (graded, SAME.get(graded)))
    ]
    if not found:
        raise _nothing(wanted, graded, rules)
    return found


def _nothing(species: str | None, grade: str | None, rules: str) -> WoodError:
    """Why a listing is empty: the set lacks the species, or the species lacks the grade."""
    every = [row for table in TABLES for row in table_rows(table, rules)]
    grades = dict.fromkeys(row.grade for row in every if species in (None, row.species))
    if grades:
        return WoodError("grade", grade, ", ".join(grades), problem=f"has no {rules} values{_of(species)}")
    names = ", ".join(dict.fromkeys(row.species for row in every))
    return WoodError("species", species, names, problem=f"has no {rules} values")


def _of(species: str | None) -> str:
    return f" for {species}" if species else ""
