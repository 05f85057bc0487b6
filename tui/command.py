"""The `willcarry` command: picks the subcommand, imports only what it needs, turns every error into one line."""

from __future__ import annotations

import io
import os
import sys
import tempfile
from collections.abc import Sequence

from tui import exits

# name -> (module, one line of help); each module has `parser()` and `run(arguments) -> int`.
COMMANDS = {
    "demo": (
        "tui.commands.demo",
        "open a copy of the built-in invented survey; --print assesses it and prints",
    ),
    "assess": ("tui.commands.assess", "assess every member of session files and print the findings"),
    "wood": ("tui.commands.wood", "list reference values of species and grades with their sources"),
    "check": ("tui.commands.check", "verify a session file line by line"),
    "schema": ("tui.commands.schema", "print the JSON Schema of a session line"),
}

USAGE = """\
usage: willcarry [FILE]              open a session in the terminal interface (new where FILE does not exist)
       willcarry COMMAND [-h] ...    run one command

Says whether existing framing will carry a new use, what live load it can carry, and shows why.

commands:
{commands}

exit status: 0 every member adequate; 1 some member inadequate, undetermined or incomplete;
             2 input that cannot be used; 3 something unexpected went wrong

example: willcarry assess granary.survey --member N-07 --explain

Screening, not a stamped design. The authority having jurisdiction decides.
"""


def usage() -> str:
    """The text of `willcarry -h`."""
    lines = [f"  {name:<8} {words}" for name, (_, words) in COMMANDS.items()]
    return USAGE.format(commands="\n".join(lines))


def main(arguments: Sequence[str] | None = None) -> int:
    """Run the command line.

    arguments   words after the program's name; those of the process where none are given
    returns     exit status (see tui.exits)
    """
    words = list(sys.argv[1:] if arguments is None else arguments)
    for stream in (sys.stdout, sys.stderr):
        if isinstance(stream, io.TextIOWrapper) and stream.encoding.lower() not in ("utf-8", "utf8"):
            stream.reconfigure(errors="backslashreplace")  # a plain terminal shows what it can, and stops nothing
    try:
        return _dispatch(words)
    except KeyboardInterrupt:
        return exits.INTERRUPTED
    except BrokenPipeError:
        # The reader of our output went away; what it read was right, so there is nothing to say.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return exits.ADEQUATE
    except Exception as error:  # noqa: BLE001 - the last edge: a person gets one line, the details go to a file
        sys.stderr.write(f"willcarry: something unexpected went wrong; details are in {_details(error)}\n")
        return exits.UNEXPECTED


def _dispatch(words: list[str]) -> int:
    if words and words[0] in ("-h", "--help", "help"):
        sys.stdout.write(usage())
        return exits.ADEQUATE
    if words and words[0] == "--version":
        from importlib.metadata import version

        sys.stdout.write(f"willcarry {version('willcarry')}\n")
        return exits.ADEQUATE
    foreign = _foreign()
    if foreign is not None:
        sys.stderr.write(f"willcarry: another package named {foreign!r} stands in ours' way; install willcarry alone\n")
        return exits.BAD_INPUT
    if words and words[0] in COMMANDS:
        from importlib import import_module

        module = import_module(COMMANDS[words[0]][0])
        try:
            parsed = module.parser().parse_args(words[1:])
        except SystemExit as stop:  # argparse has said what was wrong, in one line and the usage
            return int(stop.code or 0)
        return int(module.run(parsed))
    if words[:1] == ["--"]:
        words = words[1:]
    elif words and words[0].startswith("-") and words[0] != "--no-mouse":
        sys.stderr.write(f"willcarry: {words[0]!r} is not an option; accepted: a command ({', '.join(COMMANDS)}) "
                         "or a session file; a file whose name begins with - goes after --\n")  # fmt: skip
        return exits.BAD_INPUT
    from tui.commands.interface import run

    return run(words)


def _foreign() -> str | None:
    """The name of one of our packages that another has replaced, or None."""
    import assess
    import species

    ours = os.path.dirname(os.path.dirname(os.path.abspath(__file__)))
    for package in (assess, species):
        place = getattr(package, "__file__", None)
        if place is None or os.path.dirname(os.path.dirname(os.path.abspath(place))) != ours:
            return package.__name__
    return None


def _details(error: Exception) -> str:
    """Write the traceback, without local values, to a file of its own; the file's name."""
    import traceback

    handle, name = tempfile.mkstemp(prefix="willcarry-", suffix=".txt")
    with os.fdopen(handle, "w", encoding="utf-8") as file:
        traceback.print_exception(error, file=file)
    return name
