"""A list of one-line rows with a cursor, drawn line by line so that thousands cost nothing."""

from __future__ import annotations

from typing import ClassVar

from rich.cells import cell_len, set_cell_size
from rich.segment import Segment
from rich.style import Style
from textual.events import Click
from textual.geometry import Size
from textual.message import Message
from textual.reactive import reactive
from textual.scroll_view import ScrollView
from textual.strip import Strip

Piece = tuple[str, str]  # cleaned text, and the look it has: '' or one of LOOKS

LOOKS = ("muted", "faint", "adequate", "inadequate", "undetermined", "incomplete", "refused", "strong")


def fit(text: str, width: int) -> str:
    """Text in exactly so many columns: padded, or cut with an ellipsis.

    >>> fit("joist", 7), fit("north bay", 6)
    ('joist  ', 'north…')
    """
    if width <= 0:
        return ""
    if cell_len(text) <= width:
        return set_cell_size(text, width)
    return set_cell_size(set_cell_size(text, width - 1) + "…", width)


class RowList(ScrollView, can_focus=True, inherit_bindings=False):
    """Rows with a cursor; what a row says is its subclass's business, and never read as markup."""

    COMPONENT_CLASSES: ClassVar[set[str]] = {f"rows--{look}" for look in LOOKS} | {"rows--cursor"}
    cursor: reactive[int] = reactive(0, repaint=False)  # the two rows it concerns are drawn anew, no more

    class Moved(Message):
        """The cursor stands on another row."""

    class Chosen(Message):
        """The row under the cursor was clicked once more."""

    def row_count(self) -> int:
        """How many rows there are."""
        raise NotImplementedError

    def pieces(self, row: int, width: int) -> list[Piece]:
        """What a row says, in so many columns."""
        raise NotImplementedError

    @property
    def row_width(self) -> int:
        """Columns of a row, without the mark of the cursor."""
        return max(0, self.scrollable_content_region.width - 2)

    def refill(self) -> None:
        """Rows came, went or changed."""
        self.virtual_size = Size(0, self.row_count())
        self.cursor = self.validate_cursor(self.cursor)
        self.refresh()

    def validate_cursor(self, cursor: int) -> int:
        """Keep the cursor on a row."""
        return max(0, min(cursor, self.row_count() - 1))

    def watch_cursor(self, before: int, after: int) -> None:
        """Keep the cursor's row in sight and say that it moved."""
        self.keep_in_sight()
        self.refresh_line(before)
        self.refresh_line(after)
        self.post_message(self.Moved())

    def keep_in_sight(self) -> None:
        """Scroll just so far that the cursor's row shows."""
        top, height = self.scroll_offset.y, self.scrollable_content_region.height
        if height < 1:
            return
        wanted = min(max(top, self.cursor - height + 1), self.cursor)
        if wanted != top:
            self.scroll_to(y=wanted, animate=False, force=True)

    def on_resize(self) -> None:
        """Keep the cursor's row in sight in a smaller window."""
        self.keep_in_sight()

    def move(self, by: int) -> None:
        """Move the cursor so many rows down, or up where negative."""
        self.cursor += by

    def page(self, pages: int) -> None:
        """Move the cursor by pages."""
        self.move(pages * max(1, self.size.height - 1))

    def on_click(self, event: Click) -> None:
        """Put the cursor on the row clicked; choose it where it stood there already."""
        row = event.y + self.scroll_offset.y
        if row < self.row_count():
            self.pointed(row)

    def pointed(self, row: int) -> None:
        """A row was clicked."""
        if row == self.cursor:
            self.post_message(self.Chosen())
        self.cursor = row

    def render_line(self, y: int) -> Strip:
        """One line of the screen."""
        row, width = y + self.scroll_offset.y, self.scrollable_content_region.width
        if row >= self.row_count():
            return Strip.blank(width, self.rich_style)
        here = row == self.cursor
        base = self.look("", here)
        segments = [Segment("› " if here else "  ", base)]
        segments += [Segment(text, self.look(look, here)) for text, look in self.pieces(row, self.row_width)]
        return Strip(segments).adjust_cell_length(width, base)

    def look(self, look: str, here: bool) -> Style:
        """How words of a look are drawn, on the cursor's row or another."""
        names = (["rows--cursor"] if here else []) + ([f"rows--{look}"] if look else [])
        return self.get_visual_style(*names).rich_style
