"""Remarks: text of several lines."""

from __future__ import annotations

from collections.abc import Callable
from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import BindingType
from textual.content import Content
from textual.events import Paste, Resize
from textual.widgets import Static, TextArea

from tui import actions
from tui.clean import clean
from tui.screens.base import Base, small_notice

LONGEST = 10_000  # characters; the record holds no more


class NoteArea(TextArea):
    """A text area that takes nothing in that a terminal could be tricked by."""

    say: Callable[[str], None] = lambda words: None

    async def _on_paste(self, event: Paste) -> None:
        event.stop()
        event.prevent_default()
        text = event.text.replace("\r\n", "\n").replace("\r", "\n")
        if len(self.text) + len(text) > LONGEST:
            self.say(f"a paste of {len(text):,} characters is too long; nothing was changed")
            return
        self.replace(clean(text, lines=True, longest=LONGEST), *self.selection, maintain_selection_offset=False)


class NoteScreen(Base[tuple[str, bool]]):
    """Gives the text and whether it is to be kept; a text left behind becomes a draft."""

    BINDINGS: ClassVar[list[BindingType]] = list(actions.bindings("note"))
    WHERE = "note"

    def __init__(self, title: str, text: str) -> None:
        super().__init__()
        self.heading = title
        self.start = clean(text, lines=True, longest=LONGEST)

    def compose(self) -> ComposeResult:
        yield Static(Content(self.heading), id="head")
        yield NoteArea(self.start, id="note", soft_wrap=True, show_line_numbers=False, tab_behavior="focus")
        yield Static("", id="said")
        yield Static("", id="keys")
        yield small_notice()

    def on_mount(self) -> None:
        """Type at once."""
        area = self.query_one(NoteArea)
        area.say = lambda words: self.put("said", words)
        area.move_cursor(area.document.end)
        self.set_focus(area)

    def on_resize(self, event: Resize) -> None:
        """Fit the footer."""
        self.foot()

    def action_keep(self) -> None:
        """Keep the text."""
        self.dismiss((self.query_one(NoteArea).text, True))

    def action_back(self) -> None:
        """Leave it as a draft."""
        self.dismiss((self.query_one(NoteArea).text, False))
