"""`willcarry schema`: the JSON Schema of a session line."""

from __future__ import annotations

import argparse
import json
import sys

from assess.schema import session_line_schema
from tui import exits


def parser() -> argparse.ArgumentParser:
    """Arguments of the command."""
    return argparse.ArgumentParser(
        prog="willcarry schema",
        description="Print the JSON Schema of one line of a session file.",
        epilog="example: willcarry schema > session-line.schema.json",
    )


def run(arguments: argparse.Namespace) -> int:
    """Print the schema."""
    sys.stdout.write(json.dumps(session_line_schema(), indent=1, ensure_ascii=False) + "\n")
    return exits.ADEQUATE
