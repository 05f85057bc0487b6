"""A bay: the readings it gives, in the same form as a member's, and how the members that name it stand."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING, Any, ClassVar

from assess.errors import ReadingError
from assess.record import read_member
from assess.survey import Assessed
from tui.answer import Said, answer
from tui.bay_text import members_of, page, stands
from tui.clean import clean
from tui.screens.member import MemberScreen
from tui.screens.page import PageScreen
from tui.sheet import SheetLine, blocked_by
from tui.store import Seen
from tui.walk_row import WalkRow, unread_row

if TYPE_CHECKING:
    from assess.record import Member


class BayScreen(MemberScreen):
    """One bay of the store. Its members are assessed anew after each reading that is kept, not at each key."""

    KIND: ClassVar[str] = "bay"

    def seen(self, data: dict[str, Any] | None = None) -> Seen:
        """The bay as understood; it has no finding of its own."""
        raw = self.records[self.member_id] if data is None else data
        try:
            understood = read_member(raw, self.store.state.units)
        except ReadingError:
            understood = None
        return Seen(understood, Assessed(self.member_id, understood, None, None, False), ())

    def form(self, data: dict[str, Any], member: Member | None, drafts: dict[str, str]) -> list[SheetLine]:
        """The lines of a member's form, but for the one that names a bay."""
        return [self.shown(line) for line in super().form(data, member, drafts) if line.field.key != "bay"]

    def shown(self, line: SheetLine) -> SheetLine:
        """A bay gives what was read and takes no default for its members; nothing is needed of it."""
        return replace(line, echo="", state="none") if line.state in ("taken", "needed") else line

    def show(self) -> None:
        """Show the bay, and have those of its members assessed whose finding went with a change."""
        super().show()
        if any(name not in self.store.found for name in members_of(self.store.members, self.member_id)):
            self.ours.refresh_walk()
            self.members_came()

    def members_came(self) -> None:
        """Findings came: show how the members stand now, unless a text being typed is not understood."""
        if self.member_id in self.records and not (self.readings.typing and self.why):
            blocked = blocked_by(self.records[self.member_id], self.drafts(), self.store.state.units)
            self.show_answer(self.seen(), blocked)

    def said_of(self, seen: Seen, blocked: str | None) -> Said:
        """The members and how they stand; nothing where a text is not understood."""
        if blocked is not None:
            return answer(seen.assessed, blocked)
        typed = self.readings.typing and self.readings.line.value != self.readings.began
        unkept: Said = [("as kept before: Enter takes in what is typed", "undetermined")] if typed else []
        return unkept + stands(self.member_rows())

    def member_rows(self) -> list[WalkRow]:
        """The members as the walk list has them."""
        of_walk = self.ours.walk.all
        names = members_of(self.store.members, self.member_id)
        return [of_walk.get(name) or unread_row(name, self.store.members[name].get("where")) for name in names]

    def titled(self) -> str:
        """The bay's name in the head."""
        return f"bay {clean(self.member_id, longest=100)}"

    def action_working(self) -> None:
        """The members, all of them."""
        self.app.push_screen(PageScreen(f"{self.titled()}  members", page(self.member_rows())))
