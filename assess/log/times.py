"""Times in a session's lines: kept as text, never obeyed; those no clock should have given are said."""

from __future__ import annotations

import re
from collections.abc import Iterable
from datetime import datetime

from assess.log.read import Line

_FORM = re.compile(r"[0-9]{4}-[0-9]{2}-[0-9]{2}T[0-9]{2}:[0-9]{2}:[0-9]{2}(?:\.[0-9]{1,6})?Z")
YEARS = range(2000, 2100)  # outside them a clock was not set


def time_notices(lines: Iterable[Line]) -> list[str]:
    """What is odd about the times of lines; their order in the log is what counts, whatever their times say.

    lines     sound lines of a session, in order
    returns   at most two notices: times that are none, and clocks that ran backwards

    >>> time_notices([Line(2, {"at": "yesterday"}), Line(3, {"at": "2026-03-02T08:52:11Z"})])
    ["line 2: time 'yesterday' is not one a clock in UTC gives; kept as text"]
    """
    odd: list[Line] = []
    back: list[Line] = []
    latest: dict[str, tuple[int, datetime]] = {}  # by writer: highest number so far, and its time
    for line in lines:
        at = line.event.get("at")
        if not isinstance(at, str):
            continue
        time = _time(at)
        if time is None:
            odd.append(line)
            continue
        writer, number = line.event.get("from"), line.event.get("n")
        if not isinstance(writer, str) or not isinstance(number, int):
            continue
        before = latest.get(writer)
        if before is not None and number <= before[0]:
            continue  # a line repeated, or out of turn, says nothing about the clock
        if before is not None and time < before[1]:
            back.append(line)
        latest[writer] = number, time
    notices = []
    if odd:
        words = f"line {odd[0].number}: time {odd[0].event['at'][:40]!r} is not one a clock in UTC gives; kept as text"
        notices.append(words + _more(odd))
    if back:
        notices.append(f"line {back[0].number}: the clock ran backwards; the order is the log's" + _more(back))
    return notices


def _time(text: str) -> datetime | None:
    if not _FORM.fullmatch(text):
        return None
    try:
        time = datetime.fromisoformat(text)
    except ValueError:
        return None
    return time if time.year in YEARS else None


def _more(lines: list[Line]) -> str:
    return f" (and {len(lines) - 1} more such lines)" if len(lines) > 1 else ""
