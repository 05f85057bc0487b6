"""What `willcarry check` says of a session file: every line's form, checksum, fields and readings."""

from __future__ import annotations

from assess.log.fold import fold
from assess.log.read import SessionError, read_session
from tui import exits
from tui.clean import clean
from tui.finding_text import problem_line


def check_lines(path: str) -> tuple[list[str], int]:
    """Verify a session file.

    path      a session file
    returns   (lines to print, exit status: 0 sound, 2 not)
    """
    try:
        file = read_session(path)
    except SessionError as error:
        return [f"not sound: {clean(str(error))}"], exits.BAD_INPUT
    state = fold(file.lines, file.units)
    problems = sorted((*file.problems, *state.problems), key=lambda problem: problem.line)
    lines = [problem_line(path, problem) for problem in problems]
    lines += [clean(notice) for notice in (*file.notices, *state.notices)]
    if state.conflicts:
        lines.append(f"{len(state.conflicts)} conflict(s) between two inspectors stand until a person chooses")
    sound = not problems and not file.torn
    held = [_counted(len(records), kind) for kind, records in state.records.items() if records]
    read = _counted(1 + len(file.lines) + len(file.problems), "line")
    lines.append(f"{'sound' if sound else 'not sound'}: {', '.join([read, *(held or ['no records'])])}")
    return lines, exits.ADEQUATE if sound else exits.BAD_INPUT


def _counted(number: int, word: str) -> str:
    return f"{number:,} {word}" + ("" if number == 1 else "s")
