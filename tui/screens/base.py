"""What every screen of ours shares: classes by size, the head and foot lines, keys held until it stands."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar, Generic, TypeVar

from textual.content import Content
from textual.events import ScreenResume
from textual.screen import Screen
from textual.widgets import Static

from tui import actions

if TYPE_CHECKING:
    from tui.app import Willcarry

T = TypeVar("T")
FIXED = (
    "head",
    "counts",
    "heads",
    "said",
    "keys",
    "drawing-below",
    "drawing-middle",
    "checks",
)  # of one height: new words move nothing


class Base(Screen[T], Generic[T]):
    """A screen whose keys come from the action registry.

    WHERE   place in the registry whose keys the footer shows
    """

    HORIZONTAL_BREAKPOINTS = [  # noqa: RUF012 - Textual declares it of the instance
        (0, "-cramped"), (40, "-narrow"), (70, "-normal"), (120, "-wide"),
    ]  # fmt: skip
    VERTICAL_BREAKPOINTS = [(0, "-flat"), (12, "-low"), (20, "-high")]  # noqa: RUF012
    AUTO_FOCUS = ""
    WHERE: ClassVar[str] = ""

    def __init__(self, classes: str | None = None) -> None:
        super().__init__(classes=classes)
        self._shown: dict[str, Content] = {}

    @property
    def ours(self) -> Willcarry:
        """The app."""
        from tui.app import Willcarry

        assert isinstance(self.app, Willcarry)
        return self.app

    def foot(self, where: str | None = None) -> None:
        """Show the keys of a place on the last line."""
        self.put("keys", actions.footer(where or self.WHERE, max(0, self.size.width - 2)))

    def put(self, name: str, text: str | Content) -> None:
        """Show cleaned text in one of the screen's lines; it is never read as markup. What did not change stays."""
        found = self.query(f"#{name}")
        content = text if isinstance(text, Content) else Content(text)
        held = self._shown.get(name)
        if not found or (held is not None and held.is_same(content)):
            return
        self._shown[name] = content
        found.first(Static).update(content, layout=name not in FIXED)

    def on_screen_resume(self, event: ScreenResume) -> None:
        """The screen stands: hand it the keys that were typed ahead."""
        self.call_after_refresh(self.ours.release, self)

    def action_help(self) -> None:
        """Keys in words."""
        from tui.screens.page import PageScreen

        self.app.push_screen(PageScreen("Help", actions.help_text(self.WHERE)))

    def action_quit(self) -> None:
        """Quit; asks only where something is not saved."""
        self.ours.leave()


TOO_SMALL = "This window is too small to work in: 40 columns and 12 lines are needed. Nothing is lost."


def small_notice() -> Static:
    """The notice shown instead of a screen that does not fit."""
    return Static(Content(TOO_SMALL), id="small")
