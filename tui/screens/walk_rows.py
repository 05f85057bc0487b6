"""Rows of the walk list: their columns, and the id that is suggested for the next member."""

from __future__ import annotations

import re

from tui.screens.rows import Piece, RowList, fit
from tui.walk_row import WalkRow

HEADS = ("member", "where", "verdict", "ratio", "governs", "carries")


def widths(width: int, longest: int = 6) -> tuple[int, int, int, int, int, int]:
    """Columns of id, place, verdict, ratio, what governs, load carried.

    width     columns there are
    longest   of the ids, in columns

    >>> widths(74)
    (8, 17, 13, 7, 20, 9)
    """
    name = max(7, min(longest, 16 if width >= 100 else 10)) + 1
    if width < 62:
        return min(name, max(4, width - 29)), 0, 13, 7, 0, 9
    governs, carries = (20, 9) if width < 100 else (26, 18)  # a roof's load is named beside it where there is room
    return name, max(0, min(44, width - name - governs - carries - 20)), 13, 7, governs, carries


class WalkRows(RowList):
    """Members, one a row."""

    def __init__(self) -> None:
        super().__init__(id="walk")
        self.shown: list[WalkRow] = []
        self.longest = 0  # of the ids shown

    def row_count(self) -> int:
        """How many members are shown."""
        return len(self.shown)

    def pieces(self, row: int, width: int) -> list[Piece]:
        """What the list says of a member, in its columns."""
        item = self.shown[row]
        name, where, verdict, ratio, governs, carries = self.columns(width)
        look = item.verdict if item.verdict in ("adequate", "inadequate", "undetermined", "incomplete") else "refused"
        look = look if item.verdict else "muted"
        pieces = [(f"{item.mark} ", look), (fit(item.name, name - 1) + " ", "strong")]
        if where:
            pieces.append((fit(item.where, where - 1) + " ", ""))
        pieces.append((fit(item.verdict or "not yet", verdict - 1) + " ", look))
        if item.why:
            return [*pieces, (fit(item.why, ratio + governs + carries), "muted")]
        pieces.append((fit(item.ratio.rjust(5), ratio - 1) + " ", ""))
        if governs:
            pieces.append((fit(item.governs, governs - 1) + " ", "muted"))
        return [*pieces, (fit(item.carries, carries), "")]

    def columns(self, width: int) -> tuple[int, int, int, int, int, int]:
        """Columns of a row that is so wide."""
        return widths(width - 2, self.longest)

    def refill(self) -> None:
        """Rows came, went or changed."""
        self.longest = max((len(row.name) for row in self.shown), default=0)
        super().refill()


def next_id(ids: list[str], after: str | None = None) -> str:
    """An id for the next member: the last one, or the one copied, counted up to where none is.

    >>> next_id(["N-07", "N-09", "B-01"], "N-07"), next_id([])
    ('N-08', 'J-01')
    """
    text = after or (ids[-1] if ids else "J-00")
    found = re.fullmatch(r"(.*?)([0-9]{1,6})", text)
    stem, number = (found[1], found[2]) if found else (f"{text}-", "1")
    count = int(number)
    while True:
        count += 1
        made = f"{stem}{count:0{len(number)}d}"
        if made not in ids:
            return made
