"""A page of plain text to read: the working of a member, or help."""

from __future__ import annotations

from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import BindingType
from textual.containers import VerticalScroll
from textual.content import Content
from textual.events import Resize
from textual.widgets import Static

from tui import actions
from tui.screens.base import Base, small_notice


class Scroll(VerticalScroll, can_focus=True, inherit_bindings=False):
    """Text that scrolls by the screen's own keys, at once."""


class PageScreen(Base[None]):
    """Text that scrolls.

    title, text   cleaned
    """

    BINDINGS: ClassVar[list[BindingType]] = list(actions.bindings("page"))
    WHERE = "page"

    def __init__(self, title: str, text: str) -> None:
        super().__init__()
        self.heading, self.text = title, text

    def compose(self) -> ComposeResult:
        yield Static(Content(self.heading), id="head")
        with Scroll(id="page"):
            yield Static(Content(self.text), id="text")
        yield Static("", id="keys")
        yield small_notice()

    def on_mount(self) -> None:
        """Let the arrow keys scroll at once."""
        self.set_focus(self.query_one("#page"))

    def on_resize(self, event: Resize) -> None:
        """Fit the footer."""
        self.foot()

    @property
    def page(self) -> Scroll:
        """The part that scrolls."""
        return self.query_one("#page", Scroll)

    def action_down(self) -> None:
        """A line down."""
        self.page.scroll_down(animate=False)

    def action_up(self) -> None:
        """A line up."""
        self.page.scroll_up(animate=False)

    def action_page_down(self) -> None:
        """A page down."""
        self.page.scroll_page_down(animate=False)

    def action_page_up(self) -> None:
        """A page up."""
        self.page.scroll_page_up(animate=False)

    def action_first(self) -> None:
        """To the top."""
        self.page.scroll_home(animate=False)

    def action_last(self) -> None:
        """To the end."""
        self.page.scroll_end(animate=False)

    def action_back(self) -> None:
        """Back to where one came from."""
        self.dismiss(None)
