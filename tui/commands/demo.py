"""`willcarry demo`: a copy of the built-in invented survey, opened or printed."""

from __future__ import annotations

import argparse
import os
import sys
import tempfile

from tui import exits

SURVEY = os.path.join(os.path.dirname(os.path.dirname(__file__)), "data", "demo.survey")


def parser() -> argparse.ArgumentParser:
    """Arguments of the command."""
    made = argparse.ArgumentParser(
        prog="willcarry demo",
        description="Open a copy of the built-in survey of an invented building.",
        epilog="example: willcarry demo --print",
    )
    made.add_argument("--print", action="store_true", dest="printed", help="assess it and print, no terminal needed")
    made.add_argument("--json", action="store_true", help="with --print: print JSON")
    made.add_argument("--explain", action="store_true", help="with --print: print every step")
    return made


def run(arguments: argparse.Namespace) -> int:
    """Print the findings of the demo, or open a copy of it in the terminal interface."""
    if arguments.printed:
        from tui.commands.assess import assess_files

        return assess_files([SURVEY], None, arguments.json, arguments.explain)
    if not (sys.stdin.isatty() and sys.stdout.isatty()):
        sys.stderr.write("willcarry demo: no terminal here; `willcarry demo --print` prints the findings\n")
        return exits.BAD_INPUT
    from tui.commands.interface import run as open_session

    folder = tempfile.mkdtemp(prefix="willcarry-demo-")
    copy = os.path.join(folder, "demo.survey")
    with open(SURVEY, "rb") as source, open(copy, "wb") as target:
        target.write(source.read())
    return open_session([copy])
