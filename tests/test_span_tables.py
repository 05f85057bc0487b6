"""Floor-joist spans of published residential code tables, every cell, against our own assessment."""

from __future__ import annotations

import csv
from pathlib import Path
from typing import Any

import pytest

from assess import assess
from assess.record import read_member

TABLE = Path(__file__).parent / "published" / "floor_joist_spans.csv"
DRESSED = {"2x6": "5 1/2 in", "2x8": "7 1/4 in", "2x10": "9 1/4 in", "2x12": "11 1/4 in"}


def cells() -> list[dict[str, str]]:
    lines = [line for line in TABLE.read_text(encoding="utf-8").splitlines() if not line.startswith("#")]
    return list(csv.DictReader(lines))


def live_load_psf(cell: dict[str, str], span_in: float) -> float:
    """The live load a joist of the cell can carry at a span, by bending or live deflection as the tables count it."""
    record: dict[str, Any] = {
        "kind": "joist",
        "size": {"width": "1 1/2 in", "depth": DRESSED[cell["size"]]},
        "wood": {"species": cell["species"], "grade": cell["grade"], "basis": "stamp"},
        "spans": [f"{span_in!r} in"],
        "span_basis": "design",
        "bearing": ["3 in"],  # the tables do not let bearing decide
        "spacing": f"{cell['spacing_in']} in",
        "dead": f"{cell['dead_psf']} psf",
        "own_weight": "included",
        "proposed_use": {"live": f"{cell['live_psf']} psf", "name": "table"},
        "limits": {"live": cell["deflection"], "total": "L/1"},
    }
    live = assess(read_member(record)).live_load
    assert live.strength_psf is not None
    assert live.service_psf is not None
    return min(live.strength_psf, live.service_psf)


@pytest.mark.parametrize("cell", cells(), ids=lambda c: f"{c['species']}-{c['grade']}-{c['size']}@{c['spacing_in']}")
def test_span_table_cell(cell: dict[str, str]) -> None:
    # Source of each cell: head of the table file. Spans there are rounded to the nearest inch: hence 1 in.
    feet, inches = cell["span"].split("-")
    printed = int(feet) * 12 + int(inches)
    target = float(cell["live_psf"])
    low, high = printed * 0.8, printed * 1.2
    assert live_load_psf(cell, low) > target > live_load_psf(cell, high)
    for _ in range(18):
        middle = 0.5 * (low + high)
        low, high = (middle, high) if live_load_psf(cell, middle) > target else (low, middle)
    assert low == pytest.approx(printed, abs=1.0)
