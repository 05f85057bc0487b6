"""The printed and JSON lists of wood values, and what listing them loads."""

from __future__ import annotations

import json
import subprocess
import sys

import pytest

from species import WoodError
from species.catalogue import LISTS, rows
from tui.wood_text import wood_json, wood_lines


@pytest.mark.parametrize("rules", LISTS)
def test_list_holds_every_row_within_80_columns_with_its_sources(rules: str) -> None:
    listed = rows(rules=rules)
    assert len(listed) == {"current": 153 + 35 + 60, "1991-2013": 4 + 20, "railway 1911": 9}[rules]
    text = wood_lines(listed)
    assert max(map(len, text)) <= 80
    joined = " ".join(" ".join(text).split())
    for row in listed:
        assert " ".join(row.source.split()) in joined
    numbers = [line for line in text if line.startswith("  ") and line.split()[-1][:2] in ("0.", "-")]
    assert len(numbers) == len(listed)


def test_list_shows_the_row_asked_for() -> None:
    text = wood_lines(rows("doug fir", "#2"))
    assert text[:3] == [
        "Douglas Fir-Larch, 2-4 in thick (Table 4A)",
        "                             Fb  Fv Fc_perp       E   Emin    G",
        "  No. 2                     900 180     625 1600000 580000 0.50",
    ]
    assert any("N (North) or S (South)" in line for line in text)
    assert wood_lines([]) == ["no rows"]


def test_json_list_holds_the_same_rows() -> None:
    listed = rows("Southern Pine", rules="1991-2013")
    given_back = json.loads(wood_json(listed))["rows"]
    assert [(row["grade"], row["size"], row["Fb"]) for row in given_back] == [
        (row.grade, row.size, row.Fb) for row in listed
    ]
    assert given_back[0]["Ft"] is None


def test_railway_values_are_listed_only_by_name_and_warned_of() -> None:
    # AREA 1911, longleaf pine, as carried.
    (row,) = rows("longleaf pine", rules="railway 1911")
    assert (row.Fb, row.E, row.Fv, row.Fc_perp, row.Emin) == (1300, 1_610_000, 120, 260, None)
    assert "never to judge" in row.warning
    assert wood_lines([row])[0] == "Warning"
    assert all(not r.warning and r.rules == "current" for r in rows())
    assert rows("bald cypress", rules="railway 1911")[0].Fv is None


@pytest.mark.parametrize(
    ("asked", "field"),
    [
        (("oak",), "species"),
        (("DF-L", "No. 9"), "grade"),
        (("Redwood", "Stud"), "grade"),
        (("Western Woods", None, "1991-2013"), "species"),
        (("Hem-Fir", None, "railway 1911"), "species"),
        (("spruce", "No. 1", "railway 1911"), "grade"),
        ((None, None, "1905"), "rules"),
        ((None, "Utility", "1991-2013"), "grade"),
    ],
)
def test_a_list_of_nothing_is_an_error(asked: tuple[str | None, ...], field: str) -> None:
    with pytest.raises(WoodError) as caught:
        rows(*asked)  # type: ignore[arg-type]
    assert caught.value.field == field


def test_listing_wood_loads_nothing_from_outside_the_standard_library() -> None:
    script = (
        "import sys; from species.catalogue import rows; from tui.wood_text import wood_lines;"
        "wood_lines(rows('DF', '2'));"
        "print(*sorted({name.split('.')[0] for name in sys.modules} - sys.stdlib_module_names))"
    )
    done = subprocess.run([sys.executable, "-c", script], capture_output=True, text=True, check=True, timeout=60)
    ours = {"species", "tui", "__main__"}
    loaded = {name for name in done.stdout.split() if not name.startswith(("_", "sitecustomize"))}
    assert loaded <= ours
