"""`willcarry assess FILE...`: findings of session files as text or JSON, with their working where asked."""

from __future__ import annotations

import argparse
import json
import sys

from assess.log.read import SessionError, SessionFile, read_session
from assess.survey import Assessed, as_json, survey, whole_member
from assess.whole import explain
from assess.working import Line as Step
from assess.working import explain_text
from tui import exits
from tui.clean import clean
from tui.finding_text import counts, paragraph, problem_line, standing, table


def parser() -> argparse.ArgumentParser:
    """Arguments of the command."""
    made = argparse.ArgumentParser(
        prog="willcarry assess",
        description="Assess every member of session files and print the findings.",
        epilog="example: willcarry assess granary.survey --member N-07 --explain",
    )
    made.add_argument("files", nargs="+", metavar="FILE", help="a session file")
    made.add_argument("--member", metavar="ID", help="this member alone")
    made.add_argument("--json", action="store_true", help="print JSON")
    made.add_argument("--explain", action="store_true", help="print every step: symbol, formula, numbers, clause")
    return made


def run(arguments: argparse.Namespace) -> int:
    """Assess, print to standard output, report what cannot be used on the error stream; the exit status says which."""
    return assess_files(arguments.files, arguments.member, arguments.json, arguments.explain)


def assess_files(paths: list[str], only: str | None, as_data: bool, explained: bool) -> int:
    """Assess session files and print.

    returns   exit status: 2 where something could not be used, else 1 where a member is not adequate, else 0
    """
    sessions = []
    bad = False
    for path in paths:
        try:
            file = read_session(path)
        except SessionError as error:
            sys.stderr.write(f"willcarry assess: {clean(str(error))}\n")
            bad = True
            continue
        state, found = survey(file)
        if only is not None and only not in state.members:
            sys.stderr.write(f"willcarry assess: {clean(path)}: no member {clean(only)!r}\n")
            bad = True
            continue
        if only is not None:
            state, found = survey(file, only)
        sessions.append((file, state, list(found)))
    steps = {}
    if explained:
        for file, state, found in sessions:
            for item in found:
                if item.finding is not None:
                    steps[file.path, item.id] = explain(whole_member(state, item.id))[1]
    if as_data:
        data = as_json(sessions, steps if explained else None)
        # ASCII alone: a name in the data must not reach a terminal as a control character.
        sys.stdout.write(json.dumps(data, allow_nan=False, indent=1) + "\n")
    else:
        for file, _, found in sessions:
            _print(file, found, steps if explained else None)
    worst = exits.BAD_INPUT if bad else exits.ADEQUATE
    for file, state, found in sessions:
        for notice in (*file.notices, *state.notices):
            sys.stderr.write(f"{clean(file.path)}: {clean(notice)}\n")
        problems = [*file.problems, *state.problems, *(i.problem for i in found if i.problem is not None)]
        for problem in problems:
            sys.stderr.write(problem_line(file.path, problem) + "\n")
        worst = max(worst, status(file, state.problems, found))
    return worst


def status(file: SessionFile, folded: list[object], found: list[Assessed]) -> int:
    """Exit status of one session."""
    if file.problems or folded or any(i.problem is not None and not i.incomplete for i in found):
        return exits.BAD_INPUT
    if any(i.incomplete or (i.finding is not None and i.finding.verdict != "adequate") for i in found):
        return exits.NOT_ADEQUATE
    return exits.ADEQUATE


def _print(file: SessionFile, found: list[Assessed], steps: dict[tuple[str, str], list[Step]] | None) -> None:
    out = []
    site = file.header.get("site")
    out.append(clean(str(site)) if site else clean(file.path))
    out.append(counts(found))
    out += ["", *table(found), ""]
    for item in found:
        lines = paragraph(item)
        if lines:
            out += [*lines, ""]
        if steps is not None and item.finding is not None:
            out += [explain_text(steps[file.path, item.id]), ""]
    out += ["These cautions go with every finding:", *standing()]
    sys.stdout.write("\n".join(out) + "\n")
