"""Reads a species group or a grade however it is written, or refuses it: never one group for another."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache, lru_cache
from unicodedata import normalize

from species.datafile import read
from species.errors import WoodError
from species.tables import grade_names, species_names

LONGEST = 120  # characters; no name or stamp wording is near it
DASHES = "\\-\u2010\u2011\u2012\u2013\u2014\u2212"
# What may stand between the parts of a name. Any other mark ('?', '<', '~') says something and is kept.
SPECIES_GAP = re.compile(rf"[{DASHES}\s.,_/()]+")
GRADE_GAP = re.compile(rf"[{DASHES}\s.,_()]+")
SIDE = {"n": "north", "s": "south"}


@dataclass(frozen=True)
class Meaning:
    """What a way of writing stands for.

    names    the canonical names it may mean
    note     what must be said of having read it so; empty for a plain spelling
    certain  False where the words name several groups, of which some may have no table
    """

    names: tuple[str, ...]
    note: str = ""
    certain: bool = True


def species_key(text: str) -> str:
    """What is left of a species name when case and gaps are taken out; a last N or S apart is North or South.

    text     as typed
    returns  the key names are compared by

    >>> species_key("S-P-F s"), species_key("D FIR-L(N)"), species_key("Douglas Firs")
    ('spfsouth', 'dfirlnorth', 'douglasfirs')
    """
    plain = normalize("NFKC", text).casefold().replace("'", "").replace("\u2019", "").replace("&", " and ")
    parts = [part for part in SPECIES_GAP.split(plain) if part]
    if len(parts) > 1:
        # Only where it stands apart: "Douglas Firs" is a plural, not a mark of origin.
        parts[-1] = SIDE.get(parts[-1], parts[-1])
    return "".join(parts)


def grade_key(text: str) -> str:
    """What is left of a grade when case, gaps and the ways of writing 'No.' are taken out.

    text     as typed
    returns  the key names are compared by

    >>> grade_key("#2"), grade_key("No.2"), grade_key("1&BTR"), grade_key("Sel. Str.")
    ('no2', 'no2', 'no1andbtr', 'selstr')
    """
    plain = normalize("NFKC", text).casefold().replace("&", " and ").replace("#", " no ")
    words = {"number": "no", "better": "btr", "grade": ""}
    key = "".join(words.get(part, part) for part in GRADE_GAP.split(plain)).replace("nono", "no")
    return "no" + key if key[:1].isdigit() else key


KEYS = {"species": species_key, "grade": grade_key}


@cache
def known(field: str) -> dict[str, Meaning]:
    """Every key that is read, and what it stands for.

    field    'species' or 'grade'
    returns  meanings by key

    >>> known("grade")["ss"].names
    ('Select Structural',)
    """
    key = KEYS[field]
    canonical = species_names() if field == "species" else grade_names()
    table: dict[str, Meaning] = {}
    for row in read("aliases.csv")[1]:
        if row["field"] == field:
            note = f"'{row['alias']}': {row['note']}" if row["note"] else ""
            names = tuple(row["name"].split(";"))
            table[key(row["alias"])] = Meaning(names, note, row["kind"] != "several")
    table.update({key(name): Meaning((name,)) for name in canonical})
    return table


def nearest_names(field: str, text: str, count: int = 3) -> tuple[str, ...]:
    """Canonical names that are written much like a text, nearest first.

    field    'species' or 'grade'
    text     as typed
    count    how many at most
    returns  names; none where nothing is near

    >>> nearest_names("species", "douglas furr larch")[0]
    'Douglas Fir-Larch'
    """
    from difflib import get_close_matches  # only a refusal needs it

    table = known(field)
    close = get_close_matches(KEYS[field](text[:LONGEST]), list(table), n=2 * count, cutoff=0.6)
    return tuple(dict.fromkeys(name for key in close for name in table[key].names))[:count]


@lru_cache(maxsize=1024)
def _match(field: str, text: str) -> Meaning:
    found = known(field).get(KEYS[field](text))
    what = "a species group" if field == "species" else "a grade"
    some = "Douglas Fir-Larch, Hem-Fir, Southern Pine" if field == "species" else "Select Structural, No. 2, Stud"
    if found is None:
        near = nearest_names(field, text)
        names = f"nearest: {' or '.join(near)}" if near else f"e.g. {some}"
        raise WoodError(field, text, f"{what} with published values, {names}", near)
    if not found.certain:
        groups = f"{what} by its full name: {' or '.join(found.names)}"
        raise WoodError(field, text, groups, found.names, "may be more than one group")
    return found


def _checked(field: str, text: str) -> Meaning:
    if not isinstance(text, str) or len(text) > LONGEST:
        raise WoodError(field, text, f"a name of at most {LONGEST} characters")
    return _match(field, text)


def match_species(text: str) -> str:
    """The canonical name of a species group, from any common way of writing it.

    text     as typed or stamped: 'DF-L', 'doug fir', 'S-P-F s', 'SYP'
    returns  the name used by the tables
    raises   WoodError, with the nearest names, for one that is not known or may be more than one group

    >>> match_species("SPF-S"), match_species("spf")
    ('Spruce-Pine-Fir (South)', 'Spruce-Pine-Fir')
    """
    return _checked("species", text).names[0]


def match_grade(text: str) -> str:
    """The canonical name of a grade, from any common way of writing it.

    text     as typed or stamped: '#2', 'No2', 'SS', 'sel str', '1&BTR'
    returns  the name used by the tables
    raises   WoodError, with the nearest names, for one that is not known

    >>> match_grade("#2"), match_grade("sel. str."), match_grade("1&BTR")
    ('No. 2', 'Select Structural', 'No. 1 and Btr')
    """
    return _checked("grade", text).names[0]


def species_note(text: str) -> str:
    """What must be said of having read a species so; empty for a plain spelling of a canonical name.

    text     as typed
    returns  one line, or nothing
    raises   WoodError as match_species does

    >>> species_note("douglas fir")[:50]
    "'Douglas Fir': read as Douglas Fir-Larch; a mark w"
    """
    return _checked("species", text).note


def grade_note(text: str) -> str:
    """What must be said of having read a grade so; empty for a plain spelling of a canonical name.

    text     as typed
    returns  one line, or nothing
    raises   WoodError as match_grade does

    >>> grade_note("2&BTR")
    "'No. 2 and Btr': No. 2 and better is a mixed lot: its lowest grade, No. 2, is taken"
    """
    return _checked("grade", text).note
