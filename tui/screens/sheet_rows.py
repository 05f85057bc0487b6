"""The lines of a form, drawn: label, text as typed, how it was understood."""

from __future__ import annotations

from collections.abc import Callable

from rich.cells import cell_len

from tui.screens.rows import Piece, RowList, fit
from tui.sheet import SheetLine

LABEL = 12
LOOKS = {
    "read": ("", "muted"),
    "draft": ("strong", "undetermined"),
    "refused": ("strong", "refused"),
    "bay": ("", "muted"),
    "taken": ("", "faint"),
    "needed": ("", "incomplete"),
    "none": ("", ""),
}


class SheetRows(RowList):
    """The lines of the form."""

    def __init__(self) -> None:
        super().__init__(id="sheet")
        self.lines: list[SheetLine] = []
        self.typing_echo: tuple[str, str] | None = None  # (words, look) beside the line being typed
        self.point: Callable[[int], None] = lambda row: None

    def row_count(self) -> int:
        """How many lines."""
        return len(self.lines)

    def pointed(self, row: int) -> None:
        """A line was clicked."""
        self.point(row)

    @property
    def text_width(self) -> int:
        """Columns of the text as typed."""
        return max(8, round((self.row_width - LABEL) * 0.54))

    def pieces(self, row: int, width: int) -> list[Piece]:
        """Label, text as typed, how it was understood."""
        line = self.lines[row]
        text_look, echo_look = LOOKS[line.state]
        echo = f"! {line.echo}" if line.state == "refused" else line.echo
        room, text_width = max(0, width - LABEL), self.text_width
        if self.typing_echo is not None and row == self.cursor:
            words, look = self.typing_echo
            return [
                (fit(line.field.label, LABEL), "strong"),
                (" " * text_width, ""),
                (fit(" " + words, room - text_width), look),
            ]
        long = cell_len(line.text)
        if long > text_width:
            # A long text takes the room its understanding does not need.
            text_width = min(long, max(text_width, room - 1 - cell_len(echo))) if echo else room
        return [
            (fit(line.field.label, LABEL), "muted"),
            (fit(line.text, text_width), text_look),
            (fit(" " + echo, room - text_width), echo_look),
        ]
