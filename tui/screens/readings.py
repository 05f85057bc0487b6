"""The readings of a member, line by line, and the entry that lies over the line being typed."""

from __future__ import annotations

from collections.abc import Callable

from textual.app import ComposeResult
from textual.events import DescendantFocus
from textual.message import Message
from textual.timer import Timer
from textual.widget import Widget

from tui.clean import clean
from tui.screens.line import Line
from tui.screens.rows import RowList
from tui.screens.sheet_rows import LABEL, SheetRows
from tui.sheet import SheetLine

ANSWER_AFTER = 0.008  # s; the key is echoed first, the answer follows within two frames
DRAFT_AFTER = 1.0  # s without a key


class Readings(Widget):
    """The form; what is typed is proposed to `keep` and `weigh`, which belong to the screen.

    keep    (field key, text) -> why it is refused, or None where it is kept
    weigh   shows what the text would change; None where typing ended
    leave   a text is left behind unkept
    same    a line is left as it was
    """

    class Typing(Message):
        """Typing began, moved to another line, or ended."""

    class Paused(Message):
        """Nothing was typed for a while."""

    def __init__(self) -> None:
        super().__init__(id="readings")
        self.rows = SheetRows()
        self.rows.point = self.point
        self.line = Line(id="typed")
        self.keep: Callable[[str, str], str | None] = lambda key, text: None
        self.leave: Callable[[str, str], None] = lambda key, text: None
        self.weigh: Callable[[str, str], tuple[str, str]] = lambda key, text: ("", "")
        self.start_text: Callable[[SheetLine], str | None] = lambda line: line.text
        self.same: Callable[[str], None] = lambda key: None
        self.began = ""
        self.from_draft = False
        self.typing = False
        self._answer: Timer | None = None
        self._draft: Timer | None = None

    def compose(self) -> ComposeResult:
        yield self.rows
        yield self.line

    def on_mount(self) -> None:
        """Nothing is typed yet."""
        self.line.display = False
        self.line.resting = True

    @property
    def current(self) -> SheetLine | None:
        """The line under the cursor."""
        return self.rows.lines[self.rows.cursor] if self.rows.lines else None

    def show(self, lines: list[SheetLine]) -> None:
        """Show the lines; the cursor stays with its field."""
        held = self.current.field.key if self.current is not None else ""
        self.rows.lines = lines
        keys = [line.field.key for line in lines]
        if held in keys and keys.index(held) != self.rows.cursor:
            self.rows.cursor = keys.index(held)
        self.rows.refill()

    def begin(self) -> bool:
        """Type the line under the cursor; False where it cannot be typed."""
        line = self.current
        text = self.start_text(line) if line is not None else None
        if text is None:
            return False
        self.began = clean(text, longest=10_000)
        self.from_draft = line is not None and line.state in ("draft", "refused")
        self.typing = True
        self.rows.typing_echo = ("", "")
        self.place()
        self.line.display = True
        self.line.start(text)
        self.judge()
        self.post_message(self.Typing())
        return True

    def place(self) -> None:
        """Lay the entry over its line."""
        self.line.styles.width = self.rows.text_width
        self.line.styles.offset = (2 + LABEL, self.rows.cursor - self.rows.scroll_offset.y)

    def stop(self) -> None:
        """End typing; a changed text is left behind as a draft."""
        if self.typing and self.current is not None:
            if self.line.value != self.began:
                self.leave(self.current.field.key, self.line.value)
            elif not self.from_draft:
                self.same(self.current.field.key)
        self._end()

    def point(self, row: int) -> None:
        """A line was clicked: type there."""
        self.settle()
        self.rows.cursor = row
        if not self.begin():
            self._end()

    def on_descendant_focus(self, event: DescendantFocus) -> None:
        """A click beside the entry does not end it."""
        if self.typing and event.widget is self.rows:
            self.screen.set_focus(self.line)

    def _end(self) -> None:
        if not self.typing:
            return
        self.typing = False
        self._quiet()
        self.line.resting = True
        self.line.display = False
        self.rows.typing_echo = None
        self.rows.refresh()
        self.screen.set_focus(self.rows)
        self.post_message(self.Typing())

    def _quiet(self) -> None:
        for timer in (self._answer, self._draft):
            if timer is not None:
                timer.stop()

    def settle(self) -> None:
        """Leave a line that was typed: kept where it is understood, else left behind as a draft."""
        if not self.typing or self.current is None:
            return
        key, text = self.current.field.key, self.line.value
        if text != self.began:
            if self.keep(key, text) is not None:
                self.leave(key, text)
        elif not self.from_draft:
            self.same(key)

    def enter(self) -> None:
        """Keep the text and go on to the next line; stay where it is refused."""
        line = self.current
        if line is None:
            return
        if self.line.value == self.began and not self.from_draft:
            self.go(1)
        elif self.keep(line.field.key, self.line.value) is None:
            self._onward(1)
        else:
            self.judge()

    def go(self, by: int) -> None:
        """Go to another line and type there."""
        self.settle()
        self._onward(by)

    def _onward(self, by: int) -> None:
        self._quiet()
        last = len(self.rows.lines) - 1
        target = self.rows.cursor + by
        if not 0 <= target <= last or self.rows.lines[target].field.form == "note":
            self.rows.cursor = max(0, min(last, target))
            self._end()
            return
        self.rows.cursor = target
        if not self.begin():
            self._end()

    def on_input_changed(self, event: Line.Changed) -> None:
        """Show what the text says so far, after its echo; coalesce the work, not the keys."""
        event.stop()
        if not self.typing:
            return
        self._quiet()
        self._answer = self.set_timer(ANSWER_AFTER, self.judge)
        self._draft = self.set_timer(DRAFT_AFTER, lambda: self.post_message(self.Paused()))

    def judge(self) -> None:
        """Ask the screen what the text says."""
        if self.typing and self.current is not None:
            self.rows.typing_echo = self.weigh(self.current.field.key, self.line.value)
            self.rows.refresh()

    def on_row_list_moved(self, event: RowList.Moved) -> None:
        """Keep the entry over its line."""
        if self.typing:
            self.call_after_refresh(self.place)

    def on_resize(self) -> None:
        """Keep the entry over its line."""
        self.call_after_refresh(self.place)
