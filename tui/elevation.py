"""The member drawn from the side in characters: loads, supports, spans, defects, strength used along the length."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from assess.reading import Reading
from assess.record import Member
from tui.numbers import place_text

MARGIN = 1
Column = Callable[[float], int]


@dataclass(frozen=True)
class Pen:
    """Characters the drawing is made of; the second set is plain ASCII."""

    beam: str
    load: str
    point: str
    support: str
    lost: str
    levels: str
    left: str
    right: str
    line: str
    worst: str


FINE = Pen("━", "╷", "▼", "△", "▒", "▁▂▃▄▅▆▇█", "├", "┤", "─", "▲")
PLAIN = Pen("=", "'", "v", "^", "#", "12345678", "|", "|", "-", "^")


def elevation(
    member: Member, width: int, uses: tuple[float, ...], worst_in: float | None, ascii_only: bool = False
) -> list[str]:
    """The member from the side.

    member     as read; a member without spans has no drawing
    width      columns
    uses       utilisation in equal stretches from end to end, empty where there is no answer
    worst_in   place of the governing check from the first support [in]
    returns    lines of at most `width` columns: loads, member, supports, dimensions, utilisation, its worst place
    """
    if not member.spans or width < 24:
        return []
    pen = PLAIN if ascii_only else FINE
    left = member.overhang_left.value if member.overhang_left is not None else 0.0
    right = member.overhang_right.value if member.overhang_right is not None else 0.0
    supports = [0.0]
    for span in member.spans:
        supports.append(supports[-1] + span.value)
    total = left + supports[-1] + right
    room = width - 2 * MARGIN - 1

    def column(at_in: float) -> int:
        return MARGIN + round(min(max((at_in + left) / total, 0.0), 1.0) * room)

    feet = [" "] * width
    for support in supports:
        feet[column(support)] = pen.support
    lines = [_loads(pen, member, column, width), _beam(pen, member, column, width), "".join(feet)]
    lines.append(_dimensions(pen, width, column, supports, member))
    if uses:
        lines += [_utilisation(pen, width, room, uses), _worst(pen, width, column, worst_in, max(uses))]
    return [line.rstrip() for line in lines]


def _loads(pen: Pen, member: Member, column: Column, width: int) -> str:
    """The load over the whole length, line loads thicker, point loads as arrows."""
    loads = [" "] * MARGIN + [pen.load] * (width - 2 * MARGIN) + [" "] * MARGIN
    for line in member.line_loads or ():
        for i in range(column(line.from_.value), column(line.to.value) + 1):
            loads[i] = "|" if pen is PLAIN else "┃"
    for point in member.point_loads or ():
        loads[column(point.at.value)] = pen.point
    return "".join(loads)


def _beam(pen: Pen, member: Member, column: Column, width: int) -> str:
    beam = [" "] * MARGIN + [pen.beam] * (width - 2 * MARGIN) + [" "] * MARGIN
    for a, b in _extents(member):
        for i in range(column(a), column(b) + 1):
            beam[i] = pen.lost
    return "".join(beam)


def _extents(member: Member) -> list[tuple[float, float]]:
    """Where defects are along the member [in]."""
    found = []
    for defect in member.condition or ():
        at, length = getattr(defect, "at", None), getattr(defect, "length", None)
        if isinstance(at, Reading):
            found.append((at.value, at.value + (length.value if isinstance(length, Reading) else 0.0)))
    return found


def _dimensions(pen: Pen, width: int, column: Column, supports: list[float], member: Member) -> str:
    line = [" "] * width
    for a, b, span in zip(supports, supports[1:], member.spans or (), strict=False):
        start, end = column(a), column(b)
        for i in range(start, end + 1):
            line[i] = pen.line
        line[start], line[end] = pen.left, pen.right
        text = f" {span.shown()} {member.span_basis or 'clear'} "
        if len(text) > end - start - 1:
            text = f" {span.shown()} "
        if len(text) <= end - start - 1:
            middle = (start + end + 1 - len(text)) // 2
            line[middle : middle + len(text)] = text
    return "".join(line)


def _utilisation(pen: Pen, width: int, room: int, uses: tuple[float, ...]) -> str:
    """A bar for each column; full height is all of the strength, and a stretch over it is marked."""
    line = [" "] * width
    for i in range(room + 1):
        a = i * len(uses) // (room + 1)
        b = max(a + 1, (i + 1) * len(uses) // (room + 1))
        ratio = max(uses[a:b])
        line[MARGIN + i] = "!" if ratio > 1.0 else pen.levels[min(7, int(ratio * 8))]
    return "".join(line)


def _worst(pen: Pen, width: int, column: Column, at_in: float | None, ratio: float) -> str:
    """Where the governing check is, and what the line above shows."""
    over = "; ! is over it" if ratio > 1.0 else ""
    about = f"strength used{over}"
    if at_in is None:
        return " " * MARGIN + about
    place = column(at_in)
    text = f"{pen.worst} worst at {place_text(at_in)}"
    if place + len(text) > width:
        text = f"worst at {place_text(at_in)} {pen.worst}"
        place = max(0, place + 1 - len(text))
    if MARGIN + len(about) + 2 <= place:
        return (" " * MARGIN + about).ljust(place) + text
    after = place + len(text) + 2
    return " " * place + text + (f"  {about}" if after + len(about) <= width else "")
