"""Reference design values of a piece: which table, which row, on what assumptions (NDS Supplement 2018)."""

from __future__ import annotations

from dataclasses import dataclass

from species.errors import WoodError
from species.grades import SAME, TO_WIDTH, WIDER, WIDER_TAKES, nearest
from species.inches import to_mixed
from species.names import grade_note, match_grade, match_species, species_note
from species.sizes import (
    SLACK_IN,
    checked,
    is_standard_dressed,
    is_standard_timber,
    nominal_size,
    size_class,
    thickness_class,
)
from species.tables import LARGE, LUMBER, RULES, TABLES, WIDTHS_4B, Row, index, rows

LUMBER_TO_IN = 4.125  # thickness up to this: Tables 4A and 4B
TIMBERS_FROM_IN = 4.5  # both dimensions from this: Table 4D
THINNEST_IN = 1.4375  # 1 1/2 in less a tape reading; no 2 in lumber of any period was dressed thinner
BEAMS = "beams and stringers"
POSTS = "posts and timbers"
ONE_CLASS = ("Southern Pine", "Redwood")  # their timbers are '5x5 and larger', of one class


@dataclass(frozen=True)
class ReferenceValues:
    """What a piece may be trusted with before adjustment (psi; G oven-dry), and on what basis.

    table            '4A', '4B' or '4D': whose adjustment factors apply
    tables           both tables where the lower value of two was taken, else that one
    size_class       '8 in wide', 'beams and stringers', 'posts and timbers' or '5x5 and larger'
    thickness_class  nominal thickness [in]
    width_class      nominal width [in]; 14 stands for 14 and wider
    notes            assumptions to be repeated beside any result
    """

    species: str
    grade: str
    table: str
    size_class: str
    Fb: float
    Fv: float
    Fc_perp: float
    E: float
    Emin: float
    G: float
    source: str
    notes: tuple[str, ...]
    tables: tuple[str, ...]
    rules: str
    thickness_class: int
    width_class: int


def timber_class(species: str, thickness_in: float, width_in: float) -> str:
    """The size class of a timber: by how far its nominal width exceeds its nominal thickness.

    species       canonical name
    thickness_in  lesser dimension [in]
    width_in      greater dimension [in]
    returns       'beams and stringers', 'posts and timbers' or '5x5 and larger'
    source        NDS Supplement 2018 Table 4D, size classification

    >>> timber_class("Hem-Fir", 5.5, 9.5), timber_class("Hem-Fir", 7.5, 9.5)
    ('beams and stringers', 'posts and timbers')
    """
    if species in ONE_CLASS:
        return LARGE
    return BEAMS if nominal_size(width_in) - nominal_size(thickness_in) > 2 else POSTS


def _row(table: str, rules: str, species: str, grade: str, size: str) -> Row:
    """The row itself, or a refusal that names the nearest there is."""
    found = index(table, rules)
    row = found.get((species, grade, size)) or found.get((species, SAME.get(grade, grade), size))
    if row is not None:
        return row
    where = f"Table {table}" if rules == "current" else f"the {rules} set (Table {table})"
    of_species = [r for r in rows(table, rules) if r.species == species]
    if not of_species:
        names = sorted({r.species for r in rows(table, rules)})
        raise WoodError(
            "species" if rules == "current" else "rules",
            species if rules == "current" else rules,
            f"a species with rows there: {', '.join(names)}"
            if names
            else "the current values (no such table is on file)",
            problem=f"has no values in {where}"
            if rules == "current"
            else f"has no values for {species} in Table {table}",
        )
    grades = tuple(dict.fromkeys(r.grade for r in of_species))
    lower, higher = nearest(grade, grades)
    near = f"nearest lower: {lower}" if lower else f"nearest: {higher}, a higher grade and no substitute"
    raise WoodError(
        "grade",
        grade,
        f"for {species}: {', '.join(grades)}; {near}",
        (lower,) if lower else (),
        f"has no row in {where} for {species}",
    )


def _lumber_row(species: str, grade: str, width_in: float, rules: str) -> Row:
    """The row of Table 4A, or of Table 4B by width."""
    width = size_class(width_in)
    if species == "Southern Pine":
        return _row("4B", rules, species, grade, WIDTHS_4B[min(n for n in WIDTHS_4B if n >= min(width, 12))])
    row = _row("4A", rules, species, grade, LUMBER)
    if width > TO_WIDTH.get(grade, width):
        problem = f"has values to {TO_WIDTH[grade]} in wide only, and {to_mixed(width_in)} in is wider"
        raise WoodError("grade", grade, WIDER[grade], WIDER_TAKES.get(grade, ()), problem)
    return row


def _lumber_notes(species: str, thickness_in: float, width_in: float) -> tuple[str, ...]:
    notes = []
    width, thickness = size_class(width_in), thickness_class(thickness_in)
    if not is_standard_dressed(width_in):
        wide = "14 and wider" if width == 14 else str(width)
        notes.append(f"width {to_mixed(width_in)} in is no standard dressed size: taken as class {wide}")
    if 2 < thickness <= 4 and not is_standard_dressed(thickness_in):
        notes.append(f"thickness {to_mixed(thickness_in)} in is no standard dressed size: taken as class {thickness}")
    if thickness_in < THINNEST_IN - SLACK_IN:
        notes.append(
            f"thickness {to_mixed(thickness_in)} in is under that of 2 in lumber, where the table begins: "
            "taken as class 2"
        )
    if species == "Southern Pine" and width > 12:
        notes.append("Southern Pine wider than 12 in: values of the 12 in row, with its factor for wider pieces")
    return tuple(notes)


def _timber_notes(species: str, thickness_in: float, width_in: float) -> tuple[str, ...]:
    """What the choice of size class rests on, for timbers of sizes that no table lists."""
    if species in ONE_CLASS or (is_standard_timber(thickness_in) and is_standard_timber(width_in)):
        return ()
    size = f"{to_mixed(thickness_in)} x {to_mixed(width_in)} in"
    nominal = f"{nominal_size(thickness_in)}x{nominal_size(width_in)}"
    chosen = timber_class(species, thickness_in, width_in)
    notes = [f"{size} is no standard dressed size: taken as nominal {nominal}, {chosen}"]
    if (width_in - thickness_in > 2 + SLACK_IN) != (chosen == BEAMS):
        notes.append(
            f"by its measured difference of {to_mixed(width_in - thickness_in)} in it would be of the other size class"
        )
    return tuple(notes)


def reference_values(
    species: str, grade: str, thickness_in: float, width_in: float, rules: str = "current"
) -> ReferenceValues:
    """Reference design values of a piece, before adjustment (NDS Supplement 2018 Tables 4A, 4B and 4D).

    Thickness is the lesser dimension and width the greater, whichever way the piece lies and whichever is
    given first. Between 4 1/8 and 4 1/2 in thick the tables leave a gap: the lower of both for each property.

    species       group, in any common writing
    grade         in any common writing
    thickness_in  one dimension of the piece [in]; a round member gives its diameter for both
    width_in      the other [in]
    rules         'current', or '1991-2013' where that set has a row
    returns       ReferenceValues [psi]
    raises        WoodError where a name is not known or no row exists: no other row is put in its place

    >>> values = reference_values("DF-L", "#2", 1.625, 7.5)
    >>> values.Fb, values.Fv, values.size_class, values.notes
    (900.0, 180.0, '8 in wide', ('width 7 1/2 in is no standard dressed size: taken as class 8',))
    """
    if rules not in RULES:
        raise WoodError("rules", rules, " or ".join(RULES), problem="is no set that a member may be assessed by")
    read_as = [note for note in (species_note(species), grade_note(grade)) if note]
    species, grade = match_species(species), match_grade(grade)
    thickness, width = sorted((checked(thickness_in), checked(width_in)))
    lumber = thickness < TIMBERS_FROM_IN - SLACK_IN
    timber = thickness > LUMBER_TO_IN + SLACK_IN
    found: list[Row] = []
    notes: list[str] = read_as
    size = f"{size_class(width)} in wide" if size_class(width) < 14 else "14 in and wider"
    if lumber:
        found.append(_lumber_row(species, grade, width, rules))
        notes += _lumber_notes(species, thickness, width)
    if timber:
        size = timber_class(species, thickness, width)
        found.append(_row("4D", rules, species, grade, size))
        notes += _timber_notes(species, thickness, width)
    tables = tuple(row.table for row in found)
    if lumber and timber:
        notes.append(
            f"thickness {to_mixed(thickness)} in lies between lumber and timbers: the lower of "
            f"Tables {' and '.join(tables)} is taken for each property"
        )
    notes += [note for row in found for note in row.notes]
    return ReferenceValues(
        species=species,
        grade=grade,
        table=TABLES[-1] if timber else tables[0],
        size_class=size,
        Fb=min(row.Fb for row in found),
        Fv=min(row.Fv for row in found),
        Fc_perp=min(row.Fc_perp for row in found),
        E=min(row.E for row in found),
        Emin=min(row.Emin for row in found),
        G=min(row.G for row in found),
        source=" | ".join(row.source for row in found),
        notes=tuple(dict.fromkeys(notes)),
        tables=tables,
        rules=rules,
        thickness_class=thickness_class(thickness),
        width_class=size_class(width),
    )
