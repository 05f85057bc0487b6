"""What happens to a text typed into a member's form: shown at once, refused in words, kept on disk, or left a draft."""

from __future__ import annotations

from typing import Any, ClassVar

from tui.clean import clean
from tui.field_shown import choices, refusal
from tui.field_text import raw_of, to_raw, to_text, whole
from tui.fields import BY_KEY
from tui.screens.base import Base
from tui.screens.readings import Readings
from tui.sheet import SheetLine, blocked_by, changed, line_of, problem_of
from tui.store import NotKeptError, Saved, Seen, Store


class TypingScreen(Base[None]):
    """The part of a member's screen that proposes texts to the store.

    KIND   of the record the form is of: 'member' or 'bay'
    """

    KIND: ClassVar[str] = "member"

    def __init__(self, store: Store, member_id: str) -> None:
        super().__init__()
        self.store, self.member_id = store, member_id
        self.message = ""
        self.status = ""
        self.why = ""  # why the text being typed is refused
        self.readings = Readings()

    @property
    def records(self) -> dict[str, dict[str, Any]]:
        """Raw records of the kind the form is of."""
        return self.store.state.records[self.KIND]

    def drafts(self) -> dict[str, str]:
        """Texts not kept yet, by line."""
        return self.store.member_drafts(self.member_id, self.KIND)

    def seen(self, data: dict[str, Any] | None = None) -> Seen:
        """The record as the screen shows it, as it stands or with other data."""
        return self.store.seen(self.member_id, data)

    def shown(self, line: SheetLine) -> SheetLine:
        """A line as this form shows it."""
        return line

    def names_for(self, line: SheetLine) -> list[str]:
        """Words to suggest for a line."""
        if line.field.key == "bay":
            return list(self.store.state.records["bay"])
        return choices(line.field, self.records[self.member_id])

    def show(self) -> None:
        """Show the member as the record has it."""
        raise NotImplementedError

    def show_answer(self, seen: Seen, blocked: str | None) -> None:
        """Show the answer and the drawing."""
        raise NotImplementedError

    def show_lines(self) -> None:
        """Show the lines around the form."""
        raise NotImplementedError

    def say(self, words: str) -> None:
        """Say something beneath the readings."""
        self.message = clean(words, longest=300)
        self.show_lines()

    def start_text(self, line: SheetLine) -> str | None:
        """The text typing starts from; None where the line cannot be typed, which is said."""
        if self.store.read_only is not None:
            self.say(f"read only: {self.store.read_only}")
            return None
        field = line.field
        if field.form == "note":
            self.open_note(line)
            return None
        draft = self.drafts().get(field.key)
        if draft is not None:
            return draft
        raw = raw_of(self.records[self.member_id], field)
        if not whole(raw, field):
            self.say("the record holds more here than this line can show; what is typed replaces it")
            return ""
        return to_text(raw, field)

    def weigh(self, key: str, text: str) -> tuple[str, str]:
        """What a text would change: shown at once in the answer; gives its echo and the look of it."""
        field = BY_KEY[key]
        data = self.records.get(self.member_id)
        self.why = ""
        if data is None:
            return "", ""
        if text == self.readings.began and key not in self.drafts():
            data_now, look = data, "muted"
        else:
            error = problem_of(data, field, text, self.store.state.units)
            self.why = f"! {refusal(error, field)}" if error is not None else ""
            if error is not None:
                self.show_answer(self.seen(), field.label)
                self.show_lines()
                return f"! {clean(error.problem)}", "refused"
            data_now, look = changed(data, field, text), "strong"
        seen = self.seen(data_now)
        others = {k: t for k, t in self.drafts().items() if k != key}
        self.show_answer(seen, blocked_by(data_now, others, self.store.state.units))
        self.show_lines()
        return self.shown(line_of(field, data_now, seen.member, self.store.state.units)).echo, look

    def keep(self, key: str, text: str) -> str | None:
        """Keep a reading: on disk before the screen says so. Gives why it is refused, or None."""
        field = BY_KEY[key]
        data = self.records[self.member_id]
        why = problem_of(data, field, text, self.store.state.units)
        if why is not None:
            return refusal(why, field)
        raw = to_raw(text, field)
        if raw != raw_of(data, field):
            event = {"set": self.KIND, "id": self.member_id, "path": list(field.path), "data": raw}
            try:
                self.told(self.store.change(event))
            except NotKeptError as error:
                self.say(str(error))
                return str(error)
        self.same(key)  # only now: until the reading is on disk, its draft is all there is of it
        self.show()
        return None

    def same(self, key: str) -> None:
        """Nothing of a line is left unkept: forget its draft."""
        self.store.keep_draft(self.member_id, key, None, self.KIND)
        self.store.flush_drafts()

    def leave(self, key: str, text: str) -> None:
        """Keep a text that is left behind as a draft."""
        self.store.keep_draft(self.member_id, key, text, self.KIND)
        failed = self.store.flush_drafts()
        self.message = failed or f"{BY_KEY[key].label} is not kept; its text is offered again"
        self.show()

    def told(self, saved: Saved, words: str = "") -> None:
        """Say what became of a change."""
        self.status = self.ours.status = "saved" if saved.on_disk else "NOT SAVED"
        words = words if saved.on_disk else saved.words
        notices = self.store.notices()
        self.message = clean("; ".join([words, *notices] if words else notices), longest=400)

    def keep_typed_draft(self) -> None:
        """Keep the text being typed as a draft on disk."""
        line = self.readings.current
        if not self.readings.typing or line is None:
            return
        text = self.readings.line.value
        if text == self.readings.began and not self.readings.from_draft:
            self.same(line.field.key)
            return
        self.store.keep_draft(self.member_id, line.field.key, text, self.KIND)
        failed = self.store.flush_drafts()
        if failed is not None:
            self.say(failed)

    def action_pick(self) -> None:
        """Pick a known name for the line being typed."""
        from tui.screens.pick import PickScreen

        line = self.readings.current
        names = self.names_for(line) if line is not None else []
        if line is None or not names:
            self.say("this line has no list to pick from")
            return

        adds = line.field.form == "points"

        def picked(name: str | None) -> None:
            if name is not None:
                before = self.readings.line.value.rstrip("; ")
                text = f"{before}; {name}" if adds and before else name
                self.readings.line.value = text
                self.readings.line.cursor_position = text.rfind("?") + 1 if adds else len(text)
            self.set_focus(self.readings.line)

        typed = "" if adds else self.readings.line.value
        self.app.push_screen(PickScreen(line.field.label, names, typed), picked)

    def open_note(self, line: SheetLine) -> None:
        """Type the remarks."""
        from tui.screens.note import NoteScreen

        field = line.field
        raw = raw_of(self.records[self.member_id], field)
        before = to_text(raw, field)
        text = self.drafts().get(field.key, before)

        def closed(result: tuple[str, bool] | None) -> None:
            if result is None or result[0] == before:
                self.store.keep_draft(self.member_id, field.key, None, self.KIND)
                self.show()
            elif result[1]:
                self.keep(field.key, result[0])
            else:
                self.leave(field.key, result[0])

        self.app.push_screen(NoteScreen(f"{clean(self.member_id, longest=100)}  remarks", text), closed)
