"""A member: its readings as typed and understood, the answer beside them, the member drawn from the side."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any, ClassVar

from textual.app import ComposeResult
from textual.binding import BindingType
from textual.containers import Horizontal, Vertical
from textual.content import Content
from textual.events import Resize
from textual.widgets import Static

from tui import actions, changes
from tui.answer import Said, answer, checks, counted, listed
from tui.clean import clean
from tui.elevation import elevation
from tui.field_shown import also_recorded
from tui.screens.base import small_notice
from tui.screens.readings import Readings
from tui.screens.rows import RowList, fit
from tui.screens.typing import TypingScreen
from tui.screens.words import Words
from tui.sheet import SheetLine, blocked_by, lines
from tui.store import Seen, Store

if TYPE_CHECKING:
    from assess.record import Member


class MemberScreen(TypingScreen):
    """One member, `member_id` of the store; `typing` begins with its first line."""

    BINDINGS: ClassVar[list[BindingType]] = list(actions.bindings("member"))
    WHERE = "member"

    def __init__(self, store: Store, member_id: str, typing: bool = False) -> None:
        super().__init__(store, member_id)
        self.start_typing = typing
        self.more = False

    def compose(self) -> ComposeResult:
        yield Static("", id="head")
        with Horizontal(id="body"):
            yield self.readings
            with Vertical(id="middle"):
                yield Static("", id="drawing-middle")
                yield Static("", id="checks")
            yield Words("answer")
        yield Static("", id="drawing-below")
        yield Static("", id="said")
        yield Static("", id="keys")
        yield small_notice()

    def on_mount(self) -> None:
        """Show the member as it stands."""
        self.readings.keep, self.readings.leave, self.readings.same = self.keep, self.leave, self.same
        self.readings.weigh, self.readings.start_text = self.weigh, self.start_text
        line = self.readings.line
        line.say = self.say
        does = {
            "keep": self.readings.enter, "down": lambda: self.readings.go(1), "up": lambda: self.readings.go(-1),
            "pick": self.action_pick, "leave": self.readings.stop, "help": self.action_help,
            "working": self.action_working,
        }  # fmt: skip
        line.acts = {key: does[action.id] for action in actions.of("typing") for key in action.keys.split(",")}
        self.set_focus(self.readings.rows)
        if self.store.read_only is not None:
            self.status = f"read only: {self.store.read_only}"
        self.show()
        if self.start_typing:
            self.readings.begin()

    def on_resize(self, event: Resize) -> None:
        """Fit what depends on the width."""
        self.call_after_refresh(self.show)

    # what is shown

    def show(self) -> None:
        """Show the member as the record has it."""
        if self.member_id not in self.records:
            self.dismiss(None)
            return
        seen, data, drafts = self.seen(), self.records[self.member_id], self.drafts()
        self.readings.show(self.form(data, seen.member, drafts))
        self.show_answer(seen, blocked_by(data, drafts, self.store.state.units))
        if self.readings.typing:
            self.readings.judge()
        self.show_lines()

    def form(self, data: dict[str, Any], member: Member | None, drafts: dict[str, str]) -> list[SheetLine]:
        """The lines of the form; that of the bay only where there are bays."""
        also = ("bay",) if self.store.state.records["bay"] else ()
        return lines(data, member, drafts, self.store.state.units, self.more, also)

    def said_of(self, seen: Seen, blocked: str | None) -> Said:
        """Paragraphs of the answer; none where a text is not understood."""
        finding = seen.assessed.finding if blocked is None else None
        said: Said = answer(seen.assessed, blocked)
        if finding is not None:
            said += listed(finding) if self.size.width >= 120 else [(counted(finding), "muted")]
        return said

    def show_answer(self, seen: Seen, blocked: str | None) -> None:
        """Show the answer and the drawing; none where a text is not understood."""
        finding = seen.assessed.finding if blocked is None else None
        said = self.said_of(seen, blocked)
        wide = self.size.width >= 120
        if seen.member is not None and (also := also_recorded(seen.member)):
            said.append((f"recorded as well: {', '.join(also)}", "muted"))
        self.query_one("#answer", Words).say(said)
        middle = self.query_one("#middle").size.width if wide else 0
        width = middle - 2 if wide else self.size.width - 2
        worst = finding.governs.at_in if finding is not None and finding.governs is not None else None
        uses = seen.uses if finding is not None else ()
        drawn = elevation(seen.member, width, uses, worst, self.ours.plain) if seen.member is not None else []
        self.put("drawing-middle" if wide else "drawing-below", "\n".join(drawn))
        self.put("checks", "\n".join(checks(finding)) if finding is not None and wide else "")

    def titled(self) -> str:
        """The record's name in the head."""
        return clean(self.member_id, longest=100)

    def show_lines(self) -> None:
        """Show the head, what is said of the line under the cursor, and the keys."""
        where = self.records.get(self.member_id, {}).get("where")
        name = self.titled() + (f"  {clean(where, longest=200)}" if isinstance(where, str) else "")
        status = clean(self.status or self.store.path, longest=300)
        room = max(0, self.size.width - 2)
        right = min(len(status), room // 2)
        self.put("head", Content(fit(name, room - right - 2) + "  " + fit(status, right)))
        line = self.readings.current
        first = self.of_line(line) if line is not None else ""
        if self.message:
            first = f"{fit(first, room)}\n{fit(self.message, room)}"
        self.put("said", Content(first))
        self.foot("typing" if self.readings.typing else "member")

    def of_line(self, line: SheetLine) -> str:
        """What is said in full of one line: why it is refused, else how it is understood, else what may be typed."""
        if self.readings.typing and self.why:
            return self.why
        if line.state == "refused":
            return f"! {line.why}"
        if self.readings.typing or line.state in ("taken", "needed", "none"):
            return f"{line.field.label}: {line.field.hint}"
        return f"{line.field.label}: {line.text}" + (f" → {line.echo}" if line.echo else "")

    def on_readings_paused(self, event: Readings.Paused) -> None:
        """A second without a key: the text being typed is kept beside the session."""
        self.keep_typed_draft()

    def on_readings_typing(self, event: Readings.Typing) -> None:
        """Typing began, moved or ended."""
        if not self.readings.typing:
            self.show()
        self.show_lines()

    def on_row_list_moved(self, event: RowList.Moved) -> None:
        """The cursor stands on another line."""
        if not self.readings.typing:
            self.message = ""
        self.show_lines()

    # keys

    def action_type(self) -> None:
        """Type the line under the cursor."""
        self.readings.begin()

    def action_down(self) -> None:
        """Next line."""
        self.readings.rows.move(1)

    def action_up(self) -> None:
        """Line before."""
        self.readings.rows.move(-1)

    def action_page_down(self) -> None:
        """A page down."""
        self.readings.rows.page(1)

    def action_page_up(self) -> None:
        """A page up."""
        self.readings.rows.page(-1)

    def action_first(self) -> None:
        """First line."""
        self.readings.rows.cursor = 0

    def action_last(self) -> None:
        """Last line."""
        self.readings.rows.cursor = len(self.readings.rows.lines) - 1

    def action_more(self) -> None:
        """Show or hide the lines seldom used."""
        self.more = not self.more
        self.show()

    def action_back(self) -> None:
        """Back to the walk list."""
        self.dismiss(None)

    def action_working(self) -> None:
        """Every step."""
        self.ours.show_working(self.member_id)

    def action_undo(self) -> None:
        """Undo the last change, of whatever member."""
        changes.undo(self.ours, self.told)
        self.show()

    def action_redo(self) -> None:
        """Redo what was undone."""
        changes.redo(self.ours, self.told)
        self.show()
