"""The one owner of the truth while a session is open: log, records, findings, drafts, what can be undone."""

from __future__ import annotations

import copy
import os
from dataclasses import dataclass, field, replace
from typing import Any

from assess.errors import ReadingError
from assess.log import drafts
from assess.log.drafts import Draft
from assess.log.fold import State
from assess.log.lines import LineError
from assess.log.read import SessionError
from assess.log.write import SessionLog, WriteError
from assess.record import Member
from assess.survey import Assessed, assessed, whole_member
from assess.whole import study
from tui.fields import BY_KEY
from tui.undo import inverse

LONGEST_DRAFT = 10_000  # characters; no field of the record holds more
STRETCHES = 120  # in which utilisation along a member is kept for its drawing


class NotKeptError(Exception):
    """A change that is not kept, neither here nor on disk; str() is one line."""


@dataclass(frozen=True)
class Saved:
    """What became of a change: words to show, whether it is on disk, and what it touched: the record, a field of it."""

    words: str
    on_disk: bool
    id: str = ""
    field: str = ""


@dataclass(frozen=True)
class Seen:
    """A member as the screen shows it: understood, assessed, its utilisation along the length; or why not.

    member   with its bay's readings filled in; None where it cannot be read
    """

    member: Member | None
    assessed: Assessed
    uses: tuple[float, ...]


@dataclass
class Store:
    """An open session. Widgets show it and propose changes; only it changes anything.

    log   None while a new session has no file yet: the first change, or naming the site, makes it
    """

    path: str
    log: SessionLog | None
    done: list[tuple[dict[str, Any], dict[str, Any]]] = field(default_factory=list)  # (event, its inverse)
    undone: list[tuple[dict[str, Any], dict[str, Any]]] = field(default_factory=list)
    found: dict[str, Assessed] = field(default_factory=dict)
    drafts: dict[tuple[str, str], str] = field(default_factory=dict)  # of members: (id, line) -> text
    bay_drafts: dict[tuple[str, str], str] = field(default_factory=dict)
    _empty: State = field(default_factory=lambda: State("US"))
    _told: int = 0

    @classmethod
    def open(cls, path: str) -> Store:
        """Open a session; a path where nothing is begins a new one.

        raises   SessionError where it cannot be read
        """
        if not os.path.lexists(path):
            return cls(path, None)
        store = cls(path, SessionLog.open(path))
        for draft in drafts.load(path):
            known = draft.kind in ("member", "bay") and draft.id in store.state.records[draft.kind]
            if known and draft.field in BY_KEY and len(draft.text) <= LONGEST_DRAFT:
                store.keep_draft(draft.id, draft.field, draft.text, draft.kind)
        return store

    @property
    def state(self) -> State:
        """Records as they stand."""
        return self.log.state if self.log is not None else self._empty

    @property
    def members(self) -> dict[str, dict[str, Any]]:
        """Raw member records by id."""
        return self.state.members

    @property
    def site(self) -> str:
        """The site's name from the session's header."""
        return str(self.log.file.header.get("site") or "") if self.log is not None else ""

    @property
    def read_only(self) -> str | None:
        """Why nothing can be changed, or None."""
        return self.log.read_only if self.log is not None else None

    @property
    def entries(self) -> int:
        """Lines of the session on disk, its header among them."""
        return sum(len(lines) for lines in self.state.history.values()) + 1 if self.log is not None else 0

    def begin(self, site: str = "", inspector: str = "", units: str = "US") -> None:
        """Make the file of a new session.

        raises   SessionError where it cannot be made
        """
        if self.log is None:
            self.log = SessionLog.create(self.path, site, units, inspector, by=inspector)

    def notices(self) -> list[str]:
        """What was found in the file and not said yet."""
        if self.log is None:
            return []
        new = self.log.notices[self._told :]
        self._told = len(self.log.notices)
        return new

    def unread(self) -> int:
        """Lines of the file that are not applied."""
        return len(self.log.file.problems) + len(self.log.state.problems) if self.log is not None else 0

    def assessed(self, member_id: str) -> Assessed:
        """The member with its finding; reused while nothing it rests on has changed."""
        if member_id not in self.found:
            self.found[member_id] = assessed(self.state, member_id)
        return self.found[member_id]

    def seen(self, member_id: str, data: dict[str, Any] | None = None) -> Seen:
        """A member as the screen shows it, as it stands or with other data; nothing is kept."""
        state = self.state if data is None else snapshot(self.state)
        if data is not None:
            state.records["member"][member_id] = data
        member: Member | None = None
        try:
            member = whole_member(state, member_id)
            finding, uses = study(member, STRETCHES)
        except ReadingError:
            return Seen(member, assessed(state, member_id), ())
        item = Assessed(member_id, member, finding, None, False)
        if data is None:
            self.found[member_id] = item
        return Seen(member, item, uses)

    def change(self, event: dict[str, Any]) -> Saved:
        """Apply a change, log it, and make it undoable.

        raises   NotKeptError where it is refused or cannot be: nothing is kept of it
        """
        try:
            self.begin()
        except SessionError as error:
            raise NotKeptError(str(error)) from None
        kind = next(event[name] for name in ("put", "set", "drop") if name in event)
        held = self.state.records[kind].get(event["id"])
        if held is None and "put" not in event:
            raise NotKeptError(f"{event['id']} is not there any more")
        try:
            back = inverse(event, copy.deepcopy(held))
        except ReadingError as error:
            raise NotKeptError(error.line()) from None
        saved = self._append(event)
        self.done.append((event, back))
        self.undone.clear()
        return saved

    def undo(self) -> Saved | None:
        """Take the last change back by logging its inverse; None where there is none. Raises NotKeptError."""
        return self._swap(self.done, self.undone)

    def redo(self) -> Saved | None:
        """Do the last undone change again; None where there is none. Raises NotKeptError."""
        return self._swap(self.undone, self.done)

    def _swap(self, source: list[Any], target: list[Any]) -> Saved | None:
        if not source:
            return None
        event, back = source[-1]
        saved = self._append(back)
        source.pop()
        target.append((back, event))
        return replace(saved, field=".".join(event.get("path", ())))

    def _append(self, event: dict[str, Any]) -> Saved:
        assert self.log is not None
        if self.read_only is not None:
            raise NotKeptError(f"read only: {self.read_only}")
        try:
            self.log.append(event)
        except (ReadingError, LineError) as error:
            raise NotKeptError(str(error)) from None
        except WriteError as error:
            words, on_disk = str(error), False
        else:
            words, on_disk = "saved", True
        self.found.pop(event["id"], None)
        if (
            "member" not in (event.get("put"), event.get("set"), event.get("drop"))
            or len(self.log.notices) > self._told
        ):
            self.found.clear()  # a bay, or another program's lines, may move any finding
        return Saved(words, on_disk, event["id"], ".".join(event.get("path", ())))

    def retry(self) -> Saved:
        """Write what waits to be written."""
        if self.log is None:
            return Saved("nothing to save yet", True)
        if self.read_only is not None:
            return Saved(f"read only: {self.read_only}", False)
        try:
            self.log.retry()
        except WriteError as error:
            return Saved(str(error), False)
        return Saved("already saved: every accepted reading is on disk", True)

    def save_elsewhere(self, path: str) -> None:
        """Write everything, what waits included, to another file and go on there.

        raises   NotKeptError where that file is there already or cannot be made
        """
        assert self.log is not None
        try:
            self.log.save_elsewhere(path)
        except SessionError as error:
            raise NotKeptError(str(error)) from None
        self.path = path

    @property
    def waiting(self) -> int:
        """Changes accepted but not on disk."""
        return len(self.log.pending) if self.log is not None else 0

    def member_drafts(self, member_id: str, kind: str = "member") -> dict[str, str]:
        """Texts of a member, or a bay, that are not kept yet, by line."""
        return {key: text for (name, key), text in self._drafts_of(kind).items() if name == member_id}

    def keep_draft(self, member_id: str, key: str, text: str | None, kind: str = "member") -> None:
        """Remember a text not kept yet; None forgets it."""
        if text is None:
            self._drafts_of(kind).pop((member_id, key), None)
        else:
            self._drafts_of(kind)[member_id, key] = text

    def _drafts_of(self, kind: str) -> dict[tuple[str, str], str]:
        return self.bay_drafts if kind == "bay" else self.drafts

    def flush_drafts(self) -> str | None:
        """Write the drafts beside the session; why that failed, or None."""
        if self.log is None or self.read_only is not None:
            return None
        kept = [
            Draft(kind, name, key, text)
            for kind in ("member", "bay")
            for (name, key), text in self._drafts_of(kind).items()
        ]
        try:
            drafts.save(self.log.path, kept)
        except OSError as error:
            return f"a text being typed could not be kept: {error.strerror}"
        return None

    def close(self) -> None:
        """Flush the drafts and let go of the file."""
        self.flush_drafts()
        if self.log is not None:
            self.log.close()


def snapshot(state: State) -> State:
    """Records as they stand now, whatever comes after; a record itself is never changed in place."""
    made = copy.copy(state)
    made.records = {kind: dict(records) for kind, records in state.records.items()}
    made.touched = dict(state.touched)
    return made
