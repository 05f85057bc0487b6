"""The bays: each with the members that name it and what it gives them."""

from __future__ import annotations

from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import BindingType
from textual.content import Content
from textual.events import Resize
from textual.widgets import Static

from tui import actions, changes
from tui.bay_text import gives, members_of
from tui.clean import clean
from tui.screens.ask import AskScreen, SureScreen
from tui.screens.base import Base, small_notice
from tui.screens.rows import Piece, RowList, fit
from tui.store import NotKeptError, Saved, Store

COUNT = 9  # columns of how many members


class BayRows(RowList):
    """Bays, one a row: (id, how many members, what it gives)."""

    def __init__(self) -> None:
        super().__init__(id="bays")
        self.shown: list[tuple[str, int, str]] = []

    def row_count(self) -> int:
        """How many bays."""
        return len(self.shown)

    @property
    def name_width(self) -> int:
        """Columns of the id."""
        longest = max((len(clean(name)) for name, _, _ in self.shown), default=0)
        return 1 + min(max(longest, 8), max(8, self.row_width // 3))

    def pieces(self, row: int, width: int) -> list[Piece]:
        """Id, how many members, what it gives."""
        name, count, summary = self.shown[row]
        wide = self.name_width
        return [
            (fit(clean(name), wide - 1) + " ", "strong"),
            (fit(f"{count:>{COUNT - 2}}", COUNT), "" if count else "muted"),
            (fit(summary, width - wide - COUNT), "muted"),
        ]


class BaysScreen(Base[None]):
    """The list of bays."""

    BINDINGS: ClassVar[list[BindingType]] = list(actions.bindings("bays"))
    WHERE = "bays"

    def __init__(self, store: Store) -> None:
        super().__init__()
        self.store = store
        self.message = ""
        self.list = BayRows()

    def compose(self) -> ComposeResult:
        yield Static("", id="head")
        yield Static("", id="heads")
        yield self.list
        yield Static("", id="said")
        yield Static("", id="keys")
        yield small_notice()

    def on_mount(self) -> None:
        """Show the bays."""
        self.set_focus(self.list)
        self.show()

    def on_resize(self, event: Resize) -> None:
        """Fit what depends on the width."""
        self.call_after_refresh(self.show)

    @property
    def current(self) -> str | None:
        """Id of the bay under the cursor."""
        return self.list.shown[self.list.cursor][0] if self.list.shown else None

    def show(self, at: str | None = None) -> None:
        """Show the bays as they stand; the cursor stays with its bay, or goes to `at`."""
        here = at if at is not None else self.current
        bays = self.store.state.records["bay"]
        self.list.shown = [(name, len(members_of(self.store.members, name)), gives(bays[name])) for name in bays]
        if here in bays:
            self.list.cursor = list(bays).index(here)
        self.list.refill()
        self.put("head", f"{len(bays)} bay{'' if len(bays) == 1 else 's'}: readings that members share")
        self.put("heads", Content("  " + fit("bay", self.list.name_width) + fit("members", COUNT) + "gives"))
        self.put("said", self.message or ("" if bays else "no bays yet: a adds one"))
        self.foot()

    def say(self, words: str) -> None:
        """Say something beneath the list."""
        self.message = clean(words, longest=300)
        self.show()

    def told(self, saved: Saved, words: str = "") -> None:
        """Say what became of a change."""
        self.ours.status = "saved" if saved.on_disk else "NOT SAVED"
        self.say("; ".join([words if saved.on_disk else saved.words, *self.store.notices()]))

    # keys

    def on_row_list_chosen(self, event: RowList.Chosen) -> None:
        """A bay was clicked again: open it."""
        self.action_open()

    def action_down(self) -> None:
        """Next bay."""
        self.list.move(1)

    def action_up(self) -> None:
        """Bay before."""
        self.list.move(-1)

    def action_first(self) -> None:
        """First bay."""
        self.list.cursor = 0

    def action_last(self) -> None:
        """Last bay."""
        self.list.cursor = self.list.row_count() - 1

    def action_open(self) -> None:
        """Open the bay under the cursor."""
        if self.current is not None:
            self.open_bay(self.current)

    def open_bay(self, name: str, typing: bool = False) -> None:
        """Open a bay in the form."""
        from tui.screens.bay import BayScreen

        self.message = ""
        self.app.push_screen(BayScreen(self.store, name, typing), lambda _: self.show(name))

    def action_add(self) -> None:
        """Ask for an id, add a bay, and open it."""
        if not changes.may_change(self.ours):
            return

        def answered(answers: list[str] | None) -> None:
            name = answers[0].strip() if answers is not None else ""
            if name and self.change({"put": "bay", "id": name, "data": {}}, f"{clean(name)} added"):
                self.show(name)
                self.open_bay(name, typing=True)

        self.app.push_screen(AskScreen("A new bay", [("id", "")], self.refuse), answered)

    def refuse(self, answers: list[str]) -> str | None:
        """Why a bay cannot have an id, or None."""
        from assess.errors import ReadingError
        from assess.log.fold import check_id

        try:
            name = check_id(answers[0].strip())
        except ReadingError as error:
            return clean(error.line(), longest=200)
        return "a bay of this id is there already" if name in self.store.state.records["bay"] else None

    def action_drop(self) -> None:
        """Drop the bay under the cursor, after a question; refused while members name it."""
        name = self.current
        if name is None or not changes.may_change(self.ours):
            return
        said = clean(name, longest=60)
        count = len(members_of(self.store.members, name))
        if count:
            naming = "1 member names it and takes" if count == 1 else f"{count} members name it and take"
            self.say(f"{said} is not dropped: {naming} readings from it")
            return

        def answered(sure: bool | None) -> None:
            if sure:
                self.change({"drop": "bay", "id": name}, f"{said} dropped; u brings it back")

        self.app.push_screen(SureScreen(f"Drop bay {said}? What was read stays in the file's history."), answered)

    def change(self, event: dict[str, object], words: str) -> bool:
        """Make a change and say what became of it; whether it was kept."""
        try:
            self.told(self.store.change(event), words)
        except NotKeptError as error:
            self.say(str(error))
            return False
        return True

    def action_undo(self) -> None:
        """Undo the last change."""
        changes.undo(self.ours, self.told)

    def action_redo(self) -> None:
        """Redo what was undone."""
        changes.redo(self.ours, self.told)

    def action_back(self) -> None:
        """Back to the walk list."""
        self.dismiss(None)
