"""`willcarry wood [SPECIES [GRADE]]`: reference values with their sources."""

from __future__ import annotations

import argparse
import sys

from species import WoodError
from species.catalogue import rows
from tui import exits
from tui.wood_text import wood_json, wood_lines


def parser() -> argparse.ArgumentParser:
    """Arguments of the command."""
    made = argparse.ArgumentParser(
        prog="willcarry wood",
        description="List reference design values, before adjustment, with their sources.",
        epilog="example: willcarry wood 'douglas fir' 'no 2'",
    )
    made.add_argument("species", nargs="?", help="a species or its abbreviation; all where left out")
    made.add_argument("grade", nargs="?", help="a grade; all where left out")
    made.add_argument("--rules", default="current", help="current (default), 1991-2013, or 'railway 1911'")
    made.add_argument("--json", action="store_true", help="print JSON")
    return made


def run(arguments: argparse.Namespace) -> int:
    """Print the rows; an unknown name is one line with the nearest known ones."""
    try:
        found = rows(arguments.species, arguments.grade, arguments.rules)
    except WoodError as error:
        sys.stderr.write(f"willcarry wood: {error}\n")
        return exits.BAD_INPUT
    sys.stdout.write(wood_json(found) + "\n" if arguments.json else "\n".join(wood_lines(found)) + "\n")
    return exits.ADEQUATE
