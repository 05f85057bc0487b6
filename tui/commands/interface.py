"""`willcarry [FILE]`: the terminal interface."""

from __future__ import annotations

import os
import sys
import tempfile
import time
import traceback

from tui import exits
from tui.clean import clean

NOTHING_HERE = (
    "willcarry: no terminal here; `willcarry assess FILE` prints findings, `willcarry -h` lists the commands\n"
)


def run(words: list[str]) -> int:
    """Open a session on the screen.

    words     the file, and --no-mouse; without a file, one of today's date in the current folder
    returns   exit status
    """
    mouse = "--no-mouse" not in words
    names = [word for word in words if word != "--no-mouse"]
    if len(names) > 1:
        sys.stderr.write(f"willcarry: one session at a time; {len(names)} names were given\n")
        return exits.BAD_INPUT
    if not all(stream is not None and stream.isatty() for stream in (sys.stdin, sys.stdout, sys.stderr)):
        sys.stderr.write(NOTHING_HERE)
        return exits.BAD_INPUT
    if os.environ.get("TERM", "") in ("", "dumb"):
        sys.stderr.write("willcarry: this terminal cannot show a screen; `willcarry assess FILE` prints findings\n")
        return exits.BAD_INPUT
    path = names[0] if names else time.strftime("survey-%Y-%m-%d.survey")
    why = _cannot(path)
    if why is not None:
        sys.stderr.write(f"willcarry: {clean(why)}\n")
        return exits.BAD_INPUT
    return _show(path, mouse)


def _cannot(path: str) -> str | None:
    """Why a session cannot be opened or begun, on one line."""
    if os.path.lexists(path):
        return None
    folder = os.path.dirname(os.path.abspath(path))
    if not os.path.isdir(folder):
        return f"{folder!r} is not a folder; accepted: a session file in a folder that is there"
    if not os.access(folder, os.W_OK):
        return f"{folder!r} cannot be written, and {path!r} is not there"
    return None


def _show(path: str, mouse: bool) -> int:
    from assess.log.read import SessionError, read_session
    from tui.walk_row import first_rows

    rows = []
    if os.path.lexists(path):
        try:
            rows = first_rows(read_session(path))
        except SessionError as error:
            sys.stderr.write(f"willcarry: {clean(str(error))}\n")
            return exits.BAD_INPUT
    from tui.app import Willcarry

    app = Willcarry(path, rows, draws_plain())
    app.run(mouse=mouse)
    if app.crash is not None:
        return _crashed(app.crash, app.store.entries if app.store is not None else 0, path)
    if app.failure:
        sys.stderr.write(f"willcarry: {clean(app.failure)}\n")
    return app.return_code or exits.ADEQUATE


def _crashed(error: Exception, entries: int, path: str) -> int:
    """Three lines: what stopped, that the entries are on disk, where the details are."""
    handle, name = tempfile.mkstemp(prefix="willcarry-", suffix=".txt")
    with os.fdopen(handle, "w", encoding="utf-8", errors="backslashreplace") as file:
        # Frames and lines only: values of a session are nobody's business but its owner's.
        file.writelines(traceback.format_list(traceback.extract_tb(error.__traceback__)))
        file.write(f"{type(error).__name__}\n")
    kept = f"all {entries} entries are in {clean(path)}" if entries else f"nothing was changed in {clean(path)}"
    sys.stderr.write(
        f"willcarry: stopped by something unexpected ({type(error).__name__})\n{kept}\ndetails are in {name}\n"
    )
    return exits.UNEXPECTED


def draws_plain(environment: dict[str, str] | None = None) -> bool:
    """Whether the terminal's locale has no line drawing: then figures are ASCII.

    >>> draws_plain({"LANG": "C", "LC_CTYPE": "C.UTF-8"}), draws_plain({"LC_ALL": "en_GB.UTF-8"}), draws_plain({})
    (True, False, False)
    """
    held = os.environ if environment is None else environment
    said = held.get("LC_ALL") or held.get("LANG") or "utf-8"  # LC_CTYPE is Python's own, where the locale is C
    return "utf" not in said.lower()
