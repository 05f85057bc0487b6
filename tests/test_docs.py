"""What the documents say exists, exists; and what exists is in the documents."""

from __future__ import annotations

import re
from pathlib import Path

from tui import actions, command

ROOT = Path(__file__).resolve().parent.parent
README = (ROOT / "README.md").read_text(encoding="utf-8")


def test_two_fenced_commands_for_a_bare_machine() -> None:
    blocks = re.findall(r"^```sh\n(.*?)^```", README, re.S | re.M)
    assert len(blocks) == 2
    assert "willcarry demo" in blocks[0]
    assert blocks[1].strip().splitlines()[-1].endswith("-m pytest")
    assert all(line.startswith(("python3 ", ".venv/bin/")) for block in blocks for line in block.splitlines())


def test_the_key_table_is_the_registry() -> None:
    assert actions.table() in README


def test_every_command_is_documented_and_every_documented_one_exists() -> None:
    rows = re.findall(r"^\| `willcarry (\w+)", README, re.M)
    assert set(rows) == set(command.COMMANDS)


def test_files_named_in_the_guide_exist() -> None:
    guide = (ROOT / "DEVELOPERS.md").read_text(encoding="utf-8")
    table = guide[guide.index("| stage |") : guide.index("`engine.compute`")]
    for name in re.findall(r"`([\w*/]+\.py)`", table):
        assert list((ROOT / "assess").glob(name)), name
    for name in re.findall(r"`((?:tui|tests|assess|species)/[\w./]+)`", guide):
        assert (ROOT / name).exists(), name


def test_nothing_else_stands_at_the_top() -> None:
    names = {path.name for path in ROOT.iterdir() if not path.name.startswith(".")}
    assert {"README.md", "DEVELOPERS.md", "pyproject.toml", "tui", "assess", "species", "tests"} <= names
