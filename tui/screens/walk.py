"""The walk list: every member with its place, verdict, ratio, what governs, and the live load it carries."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from textual.app import ComposeResult
from textual.binding import BindingType
from textual.content import Content
from textual.events import Resize
from textual.widgets import Static

from tui import actions, changes
from tui.clean import clean
from tui.screens.base import Base, small_notice
from tui.screens.line import Line
from tui.screens.rows import RowList, fit
from tui.screens.walk_rows import HEADS, WalkRows, next_id
from tui.walk_row import WalkRow, counts

if TYPE_CHECKING:
    from tui.store import Saved


class WalkScreen(Base[None]):
    """The first screen."""

    BINDINGS: ClassVar[list[BindingType]] = list(actions.bindings("walk"))
    WHERE = "walk"

    def __init__(self, rows: list[WalkRow]) -> None:
        super().__init__()
        self.all = {row.id: row for row in rows}
        self.filter = ""
        self.message = "reading the session ..."
        self.list = WalkRows()
        self.line = Line(id="find")

    def compose(self) -> ComposeResult:
        yield Static("", id="head")
        yield Static("", id="counts")
        yield Static("", id="heads")
        yield self.list
        yield self.line
        yield Static("", id="said")
        yield Static("", id="keys")
        yield small_notice()

    def on_mount(self) -> None:
        """Show what the file's own lines name."""
        self.line.resting = True
        self.line.say = self.say
        self.line.acts = {"enter": self._found, "down": self._found, "escape": self.action_back}
        self.set_focus(self.list)
        self.fill()

    def on_resize(self, event: Resize) -> None:
        """Fit what depends on the width."""
        self.call_after_refresh(self.show_lines)

    # what is shown

    def fill(self) -> None:
        """Show the rows the filter lets through; the cursor stays with its member."""
        here = self.current
        self.list.shown = [row for row in self.all.values() if row.holds(self.filter)]
        ids = [row.id for row in self.list.shown]
        if here in ids:
            self.list.cursor = ids.index(here)
        self.list.refill()
        self.show_lines()

    def update_rows(self, rows: list[WalkRow]) -> None:
        """Rows changed; those shown are changed in place."""
        self.all |= {row.id: row for row in rows if row.id in self.all}
        self.list.shown = [self.all[row.id] for row in self.list.shown if row.id in self.all]
        self.list.refill()
        self.show_lines()
        if (came := getattr(self.app.screen, "members_came", None)) is not None:
            came()  # a bay is open and shows them as well

    def show_lines(self) -> None:
        """Show head, counts, column heads, what is said, keys."""
        store = self.ours.store
        room = max(0, self.size.width - 2)
        site = clean(store.site, longest=200) if store is not None else ""
        path = clean(self.ours.path, longest=300)
        left = site or path
        status = self.ours.status or (path if site else "")
        right = min(len(status), room // 2)
        self.put("head", Content(fit(left, room - right - 2) + "  " + fit(status, right)))
        text = counts(list(self.all.values()))
        if self.filter:
            text = f"{len(self.list.shown)} shown that hold {clean(self.filter, longest=40)!r}; " + text
        typed = len(store.drafts) + len(store.bay_drafts) if store is not None else 0
        if typed:
            text += f"; {typed} text{'s' if typed > 1 else ''} typed but not kept"
        self.put("counts", text)
        columns = self.list.columns(self.list.row_width)
        heads = "".join(fit(head, width) for head, width in zip(HEADS, columns, strict=True))
        self.put("heads", Content(" " * 4 + heads))
        self.put("said", self.message)
        self.foot()

    def say(self, words: str) -> None:
        """Say something beneath the list."""
        self.message = clean(words, longest=400)
        self.show_lines()

    def told(self, saved: Saved, words: str = "") -> None:
        """Say what became of a change, and show it."""
        store = self.ours.store
        assert store is not None
        self.ours.status = "saved" if saved.on_disk else "NOT SAVED"
        words = words if saved.on_disk else saved.words
        self.message = clean("; ".join([*([words] if words else []), *store.notices()]), longest=400)
        self.ours.refresh_walk()

    @property
    def current(self) -> str | None:
        """Id of the member under the cursor."""
        return self.list.shown[self.list.cursor].id if self.list.shown else None

    # keys

    def on_row_list_chosen(self, event: RowList.Chosen) -> None:
        """A member was clicked again: open it."""
        self.action_open()

    def action_down(self) -> None:
        """Next member."""
        self.list.move(1)

    def action_up(self) -> None:
        """Member before."""
        self.list.move(-1)

    def action_page_down(self) -> None:
        """A page down."""
        self.list.page(1)

    def action_page_up(self) -> None:
        """A page up."""
        self.list.page(-1)

    def action_first(self) -> None:
        """First member."""
        self.list.cursor = 0

    def action_last(self) -> None:
        """Last member."""
        self.list.cursor = len(self.list.shown) - 1

    def action_open(self) -> None:
        """Open the member under the cursor."""
        if self.current is not None:
            self.ours.open_member(self.current)

    def action_add(self) -> None:
        """Add a member."""
        changes.new_member(self.ours, next_id(self._used()), bay=self._bay())

    def _bay(self) -> str | None:
        """The bay of the member under the cursor, where it names one that is there."""
        store = self.ours.store
        bay = store.members.get(self.current or "", {}).get("bay") if store is not None else None
        return bay if store is not None and isinstance(bay, str) and bay in store.state.records["bay"] else None

    def action_bays(self) -> None:
        """The bays."""
        store = self.ours.store
        if store is None:
            self.say("still reading the session")
            return
        from tui.screens.bays import BaysScreen

        self.app.push_screen(BaysScreen(store), lambda _: self.ours.refresh_walk())

    def _used(self) -> list[str]:
        """Ids that are or were in use; a dropped one is not given to another member."""
        store = self.ours.store
        return [name for kind, name in store.state.touched if kind == "member"] if store is not None else []

    def action_copy(self) -> None:
        """Copy the member under the cursor."""
        if self.current is not None:
            changes.new_member(self.ours, next_id(self._used(), self.current), self.current)

    def action_drop(self) -> None:
        """Drop the member under the cursor."""
        if self.current is not None:
            changes.drop_member(self.ours, self.current)

    def action_working(self) -> None:
        """Every step of the member under the cursor."""
        if self.current is not None:
            self.ours.show_working(self.current)

    def action_site(self) -> None:
        """Name the site."""
        changes.name_site(self.ours)

    def action_undo(self) -> None:
        """Undo the last change."""
        changes.undo(self.ours, self.told)

    def action_redo(self) -> None:
        """Redo what was undone."""
        changes.redo(self.ours, self.told)

    def action_find(self) -> None:
        """Type words to find."""
        self.line.add_class("open")
        self.line.start(self.filter)
        self.put("said", "words in id, place, verdict or what governs; Enter stays with them, Esc shows all")

    def on_input_changed(self, event: Line.Changed) -> None:
        """Narrow the list while typing."""
        if not self.line.resting and self.line.value != self.filter:
            self.filter = self.line.value
            self.fill()

    def _found(self) -> None:
        self.filter = self.line.value
        self._close_line()

    def _close_line(self) -> None:
        self.line.resting = True
        self.line.remove_class("open")
        self.set_focus(self.list)
        self.message = ""
        self.fill()

    def action_back(self) -> None:
        """Show all members again."""
        self.filter = ""
        self.line.value = ""
        self._close_line()
