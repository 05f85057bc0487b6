"""Prints rows of the wood tables: aligned text to 80 columns, or JSON."""

from __future__ import annotations

import json
from collections.abc import Sequence
from dataclasses import asdict
from textwrap import wrap

from species.catalogue import CatalogueRow

WIDTH = 80
COLUMNS = (("Fb", 5), ("Fv", 4), ("Fc_perp", 8), ("E", 8), ("Emin", 7), ("G", 5))


def _cell(name: str, value: float | None) -> str:
    if value is None:
        return "-"
    return f"{value:.2f}" if name == "G" else f"{value:.0f}"


def _line(label: str, label_width: int, cells: Sequence[str]) -> str:
    numbers = "".join(f"{text:>{width}}" for text, (_, width) in zip(cells, COLUMNS, strict=True))
    return f"  {label:<{label_width}}{numbers}"


def _heading(row: CatalogueRow) -> str:
    """What rows that stand together share; a table by width keeps its widths in the rows."""
    set_of = "" if row.rules == "current" else f", {row.rules} set"
    if not row.grade:
        return f"{row.size.capitalize()} ({row.table}{set_of})"
    size = "" if row.table == "4B" else f", {row.size}"
    return f"{row.species}{size} (Table {row.table}{set_of})"


def _label(row: CatalogueRow) -> str:
    if not row.grade:
        return row.species
    return f"{row.grade}, {row.size}" if row.table == "4B" else row.grade


def _foot(title: str, texts: list[str]) -> list[str]:
    """Each text once, in order, wrapped under a dash; nothing where there is none."""
    lines = [
        line
        for text in dict.fromkeys(texts)
        for line in wrap(text, WIDTH, initial_indent="- ", subsequent_indent="  ", break_on_hyphens=False)
    ]
    return [title, *lines] if lines else []


def wood_lines(rows: Sequence[CatalogueRow]) -> list[str]:
    """Rows as a plain table of at most 80 columns, warnings above, notes and sources below.

    rows     rows of species.catalogue.rows
    returns  lines without their ends

    >>> from species.catalogue import rows
    >>> print(wood_lines(rows("SPF", "SS"))[2])
      Select Structural        1250 135     425 1500000 550000 0.42
    """
    if not rows:
        return ["no rows"]
    label_width = max(24, *(len(_label(row)) for row in rows))
    lines = _foot("Warning", [row.warning for row in rows])
    heading = ""
    for row in rows:
        if _heading(row) != heading:
            heading = _heading(row)
            lines += [*([""] if lines else []), heading]
            lines.append(_line("", label_width, [name for name, _ in COLUMNS]))
        lines.append(_line(_label(row), label_width, [_cell(name, getattr(row, name)) for name, _ in COLUMNS]))
    return [
        *lines,
        "",
        "Values before adjustment, psi; G oven-dry.",
        *_foot("Notes", [note for row in rows for note in row.notes]),
        *_foot("Sources", [row.source for row in rows]),
    ]


def wood_json(rows: Sequence[CatalogueRow]) -> str:
    """Rows as JSON: {"rows": [...]}, a value the set does not print as null.

    rows     rows of species.catalogue.rows
    returns  one JSON text

    >>> from species.catalogue import rows
    >>> json.loads(wood_json(rows("HF", "#2")))["rows"][0]["Fb"]
    850.0
    """
    return json.dumps({"rows": [asdict(row) for row in rows]}, indent=1, allow_nan=False)
