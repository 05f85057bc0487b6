"""Paragraphs in a pane of fixed size: new words move nothing, and what does not fit is said."""

from __future__ import annotations

from textual.content import Content
from textual.events import Resize
from textual.widgets import Static

from tui.screens.looks import STYLES, said_content

MORE = "... w shows the rest"


class Words(Static):
    """Paragraphs with their looks, wrapped to the pane; the first ones matter most."""

    def __init__(self, id: str) -> None:
        super().__init__("", id=id, markup=False)
        self.said: list[tuple[str, str]] = []

    def say(self, said: list[tuple[str, str]]) -> None:
        """Show the paragraphs."""
        if said != self.said:
            self.said = said
            self._fill()

    def on_resize(self, event: Resize) -> None:
        """Wrap anew."""
        self._fill()

    def _fill(self) -> None:
        width, height = self.content_size
        if width < 1 or height < 1:
            return
        lines = said_content(self.said).wrap(width)
        if len(lines) > height:
            lines = [*lines[: height - 1], Content.styled(MORE, STYLES["muted"])]
        self.update(Content("\n").join(lines), layout=False)
