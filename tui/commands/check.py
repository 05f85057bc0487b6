"""`willcarry check FILE`: verify a session file line by line."""

from __future__ import annotations

import argparse
import sys

from tui.check_text import check_lines


def parser() -> argparse.ArgumentParser:
    """Arguments of the command."""
    made = argparse.ArgumentParser(
        prog="willcarry check",
        description="Verify a session file line by line: form, checksums, fields and readings.",
        epilog="example: willcarry check granary.survey",
    )
    made.add_argument("file", help="a session file")
    return made


def run(arguments: argparse.Namespace) -> int:
    """Print what was found; status 0 where the file is sound, 2 where it is not."""
    lines, status = check_lines(arguments.file)
    sys.stdout.write("\n".join(lines) + "\n")
    return status
