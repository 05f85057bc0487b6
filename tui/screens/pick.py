"""A list to pick a known name from: species, grades, uses; nothing is taken without Enter."""

from __future__ import annotations

from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import BindingType
from textual.containers import Vertical
from textual.content import Content
from textual.widgets import Static

from tui import actions
from tui.screens.base import Base
from tui.screens.rows import Piece, RowList, fit


class Names(RowList):
    """Names, one a row."""

    def __init__(self, names: list[str]) -> None:
        super().__init__(id="names")
        self.names = names

    def row_count(self) -> int:
        """How many names."""
        return len(self.names)

    def pieces(self, row: int, width: int) -> list[Piece]:
        """The name."""
        return [(fit(self.names[row], width), "")]


class PickScreen(Base[str | None]):
    """Gives the name picked, or None; those that hold what was typed come first."""

    BINDINGS: ClassVar[list[BindingType]] = list(actions.bindings("list"))
    WHERE = "list"

    def __init__(self, title: str, names: list[str], typed: str) -> None:
        super().__init__(classes="ask")
        words = typed.casefold().split()
        near = [name for name in names if all(word in name.casefold() for word in words)]
        self.heading = title
        self.names = Names([*near, *(name for name in names if name not in near)])

    def compose(self) -> ComposeResult:
        with Vertical(id="pick"):
            yield Static(Content(self.heading), id="question")
            yield self.names
            yield Static(Content(actions.footer("list")), classes="label")

    def on_mount(self) -> None:
        """Stand on the nearest name."""
        self.names.refill()
        self.set_focus(self.names)

    def on_row_list_chosen(self, event: RowList.Chosen) -> None:
        """Clicked again: take it."""
        self.action_take()

    def action_down(self) -> None:
        """Next name."""
        self.names.move(1)

    def action_up(self) -> None:
        """Name before."""
        self.names.move(-1)

    def action_take(self) -> None:
        """Give the name under the cursor."""
        self.dismiss(self.names.names[self.names.cursor] if self.names.names else None)

    def action_back(self) -> None:
        """Give nothing."""
        self.dismiss(None)
