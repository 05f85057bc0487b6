"""One direction of imports, tui -> assess -> species, and what a bare start must not load."""

from __future__ import annotations

import ast
import subprocess
import sys
from pathlib import Path

import pytest

ROOT = Path(__file__).resolve().parent.parent
ALLOWED = {"species": {"species"}, "assess": {"assess", "species"}, "tui": {"tui", "assess", "species"}}
SCREEN = {"textual", "rich"}


def imported(path: Path) -> set[str]:
    """Top-level names a module imports, wherever in it."""
    found = set()
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            found |= {alias.name.split(".")[0] for alias in node.names}
        elif isinstance(node, ast.ImportFrom) and node.module and not node.level:
            found.add(node.module.split(".")[0])
    return found


@pytest.mark.parametrize("package", sorted(ALLOWED))
def test_nothing_imports_upward(package: str) -> None:
    files = sorted((ROOT / package).rglob("*.py"))
    assert files
    for path in files:
        ours = imported(path) & set(ALLOWED)
        assert ours <= ALLOWED[package], f"{path.relative_to(ROOT)} imports {sorted(ours - ALLOWED[package])}"
        if package != "tui":
            assert not imported(path) & SCREEN, f"{path.relative_to(ROOT)} knows the screen"


def test_pint_lives_in_one_room() -> None:
    rooms = [
        str(path.relative_to(ROOT))
        for package in ALLOWED
        for path in (ROOT / package).rglob("*.py")
        if "pint" in imported(path)
    ]
    assert rooms == ["assess/units.py"]


def loaded_after(code: str) -> set[str]:
    """Modules loaded by a fresh interpreter after running the code."""
    script = f"import sys\n{code}\nsys.stderr.write(' '.join(sys.modules))"
    done = subprocess.run(
        [sys.executable, "-c", script], capture_output=True, text=True, check=True, cwd=ROOT, timeout=60
    )
    return set(done.stderr.split())


@pytest.mark.parametrize(
    ("code", "absent"),
    [
        (
            "from tui.command import main; main(['-h'])",
            {"textual", "rich", "pint", "pydantic", "numpy", "json"},
        ),
        (
            "from tui.command import main; main(['wood', 'hem-fir'])",
            {"textual", "rich", "pint", "pydantic", "numpy"},
        ),
        ("from tui.command import main; main(['demo', '--print'])", {"textual", "rich"}),
        ("import assess", {"textual", "rich", "pint", "pydantic", "numpy"}),
        ("from assess import assess, Member", {"textual", "rich"}),
    ],
)
def test_a_start_loads_only_what_it_needs(code: str, absent: set[str]) -> None:
    assert not loaded_after(code) & absent
