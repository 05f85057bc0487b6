"""The terminal interface: opens a session, keeps its store, and goes between the screens."""

from __future__ import annotations

import asyncio
import signal
import time
from collections.abc import Iterable
from functools import partial
from typing import TYPE_CHECKING, Any, ClassVar

from textual.app import SystemCommand
from textual.binding import BindingType
from textual.screen import Screen
from textual.worker import get_current_worker

from tui import actions, changes, exits
from tui.ahead import AheadApp
from tui.clean import clean
from tui.screens.base import Base
from tui.screens.walk import WalkScreen
from tui.walk_row import WalkRow, row_of, unread_row

if TYPE_CHECKING:
    from assess.log.fold import State
    from assess.survey import Assessed
    from tui.store import Store

    Batch = list[tuple[dict[str, Any], Assessed]]

BATCH_S = 0.05  # findings are shown in batches, not one by one


class Willcarry(AheadApp[int]):
    """The app. `path` is the session's; a path where nothing is begins a new one.

    rows    members as the file's own lines name them, for the first paint
    plain   draw in ASCII only
    """

    CSS_PATH = "styles.tcss"
    TITLE = "willcarry"
    BINDINGS: ClassVar[list[BindingType]] = [b for b in actions.bindings("anywhere") if b[1] == "save"]

    def __init__(self, path: str, rows: Iterable[WalkRow] = (), plain: bool = False) -> None:
        super().__init__()
        self.path, self.plain = path, plain
        self.store: Store | None = None
        self.status = ""
        self.crash: Exception | None = None
        self.failure = ""
        self.walk = WalkScreen(list(rows))

    def on_mount(self) -> None:
        """Paint the list first, then read the session."""
        self.push_screen(self.walk)
        if not self.is_headless:
            loop = asyncio.get_running_loop()
            for number, status in ((signal.SIGTERM, exits.TERMINATED), (signal.SIGHUP, exits.HUNG_UP)):
                loop.add_signal_handler(number, self.stop, status)
        self.call_after_refresh(self.run_worker, self._open, thread=True, group="open")

    # the session

    def _open(self) -> None:
        """In a thread: what reads sessions takes a while to import, and the file to read."""
        from assess.log.read import SessionError
        from tui.store import Store

        try:
            store = Store.open(self.path)
        except SessionError as error:
            self.call_from_thread(self._cannot, str(error))
            return
        import tui.screens.member  # noqa: F401 - so that opening the first member does not wait for it

        self.call_from_thread(self._opened, store)

    def _cannot(self, why: str) -> None:
        self.failure = why
        self.exit(return_code=exits.BAD_INPUT)

    def _opened(self, store: Store) -> None:
        self.store = store
        said = store.notices()
        if store.unread():
            said.append(f"{store.unread()} line(s) of the file are not applied: willcarry check says why")
        if store.log is None:
            said.append("a new session: a adds the first member, e names the site")
        if store.read_only is not None:
            self.status = f"read only: {store.read_only}"
        self.walk.message = clean("; ".join(said), longest=400)
        self.refresh_walk()
        self.ready = True
        self.let_go()

    def refresh_walk(self) -> None:
        """Show the members as they stand; those not assessed yet are assessed off the event loop."""
        store = self.store
        if store is None:
            return
        rows: dict[str, WalkRow] = {}
        waiting = []
        for name, data in store.members.items():
            if name in store.found:
                rows[name] = row_of(store.found[name], data.get("where"))
            else:
                rows[name] = unread_row(name, data.get("where"))
                waiting.append(name)
        self.walk.all = rows
        self.walk.fill()
        if waiting:
            self.run_worker(partial(self._assess, waiting), thread=True, exclusive=True, group="assess")

    def _assess(self, names: list[str]) -> None:
        """In a thread, on records as they stood when it began: findings, in batches."""
        from assess.survey import assessed
        from tui.store import snapshot

        store = self.store
        assert store is not None
        worker = get_current_worker()
        state = snapshot(store.state)
        batch: Batch = []
        began = time.monotonic()
        for name in names:
            if worker.is_cancelled:
                return
            if name in state.members:
                batch.append((state.members[name], assessed(state, name)))
            if time.monotonic() - began > BATCH_S:
                self.call_from_thread(self._assessed, batch, state)
                batch, began = [], time.monotonic()
        self.call_from_thread(self._assessed, batch, state)

    def _assessed(self, batch: Batch, state: State) -> None:
        """Take findings in that still speak of the records as they are; drop stale ones."""
        store = self.store
        assert store is not None
        if state.records["bay"] != store.state.records["bay"]:
            return
        rows = []
        for data, item in batch:
            if store.members.get(item.id) is data:
                store.found[item.id] = item
                rows.append(row_of(item, data.get("where")))
        if rows:
            self.walk.update_rows(rows)

    # going between screens

    def open_member(self, member_id: str, typing: bool = False) -> None:
        """Open a member."""
        if self.store is None or member_id not in self.store.members:
            return
        from tui.screens.member import MemberScreen

        self.push_screen(MemberScreen(self.store, member_id, typing), lambda _: self.refresh_walk())

    def show_working(self, member_id: str) -> None:
        """Every step, assumption and caution of a member."""
        if self.store is None:
            return
        from tui.screens.page import PageScreen
        from tui.working_text import working_text

        text = working_text(self.store, member_id)
        self.push_screen(PageScreen(f"{clean(member_id, longest=100)}  working", text))

    def notice(self, words: str) -> None:
        """Say something on the screen that is there."""
        say = getattr(self.screen, "say", None)
        if say is not None:
            say(words)
        else:
            self.notify(clean(words, longest=300), markup=False)

    def get_system_commands(self, screen: Screen[Any]) -> Iterable[SystemCommand]:
        """Every action of the screen, and the theme."""
        if isinstance(screen, Base):
            for action in actions.of(screen.WHERE):
                run = partial(screen.run_action, action.id)
                yield SystemCommand(action.words.capitalize(), f"key {action.shown}", run)
        yield SystemCommand("Theme", "light, dark and others", self.action_change_theme)
        yield SystemCommand("Quit", "key Ctrl+Q", self.leave)

    # ending

    def action_save(self) -> None:
        """Everything accepted is on disk already; what could not be written is tried again."""
        if self.store is None:
            self.notice("still reading the session")
            return
        saved = self.store.retry()
        if saved.on_disk or self.store.read_only is not None:
            self.status = self.status if self.store.read_only is not None else "saved"
            self.notice(saved.words)
        else:
            changes.save_elsewhere(self, saved.words)

    def action_help_quit(self) -> None:
        """Nothing is discarded by a habit of other programs."""
        self.notice("Ctrl+Q quits; nothing was changed")

    async def action_quit(self) -> None:
        """Quit."""
        self.leave()

    def leave(self) -> None:
        """Quit; ask only where an accepted change is not on disk."""
        if self.store is None or not self.store.waiting:
            self.stop(exits.ADEQUATE)
            return
        from tui.screens.ask import SureScreen

        question = f"{self.store.waiting} change(s) could not be written. Quit and lose them?"
        self.push_screen(SureScreen(question), lambda sure: self.stop(exits.ADEQUATE) if sure else None)

    def stop(self, status: int) -> None:
        """End: keep the text being typed, let go of the file, restore the terminal."""
        for screen in self.screen_stack:
            keep = getattr(screen, "keep_typed_draft", None)
            if keep is not None:
                keep()
        if self.store is not None:
            self.store.close()
        self.exit(return_code=status)

    def on_unmount(self) -> None:
        """Let go of the file, however the app came to its end."""
        if self.store is not None:
            self.store.close()

    def _handle_exception(self, error: Exception) -> None:
        """Something unexpected: end at once, with nothing of the session printed; the command line says the rest."""
        self.crash = self.crash or error
        self._return_code = exits.UNEXPECTED
        if self._exception is None:
            self._exception = error
            self._exception_event.set()
        self._close_messages_no_wait()
