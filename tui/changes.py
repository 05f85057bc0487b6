"""Members added, copied, dropped; a site named; changes undone: what the walk list asks for before the store acts."""

from __future__ import annotations

import copy
from collections.abc import Callable
from typing import TYPE_CHECKING, Any

from tui.clean import clean
from tui.screens.ask import AskScreen, SureScreen

if TYPE_CHECKING:
    from tui.app import Willcarry
    from tui.store import Saved


def may_change(app: Willcarry) -> bool:
    """Whether the session can be changed; where it cannot, that is said."""
    if app.store is None:
        app.notice("still reading the session")
    elif app.store.read_only is not None:
        app.notice(f"read only: {app.store.read_only}")
    else:
        return True
    return False


def change(app: Willcarry, event: dict[str, Any], words: str) -> bool:
    """Make a change and say what became of it; whether it was kept."""
    from tui.store import NotKeptError

    assert app.store is not None
    try:
        app.walk.told(app.store.change(event), words)
    except NotKeptError as error:
        app.walk.say(str(error))
        return False
    return True


def new_member(app: Willcarry, suggested: str, of: str | None = None, bay: str | None = None) -> None:
    """Ask for an id, add a member, or a copy of one, and open it.

    suggested   id to start from
    of          id of the member to copy, or None for an empty one
    bay         id of the bay an empty one starts in
    """
    if not may_change(app):
        return
    store = app.store
    assert store is not None
    data = copy.deepcopy(store.members[of]) if of is not None else {"bay": bay} if bay is not None else {}
    title = f"A copy of {clean(of, longest=60)}" if of is not None else "A new member"
    if bay is not None:
        title += f" of {clean(bay, longest=60)}"

    def refuse(answers: list[str]) -> str | None:
        from assess.errors import ReadingError
        from assess.log.fold import check_id

        try:
            name = check_id(answers[0].strip())
        except ReadingError as error:
            return clean(error.line(), longest=200)
        return "a member of this id is there already" if name in store.members else None

    def answered(answers: list[str] | None) -> None:
        if answers is None:
            return
        name = answers[0].strip()
        if change(app, {"put": "member", "id": name, "data": data}, f"{clean(name)} added"):
            app.walk.list.cursor = len(app.walk.list.shown)
            app.open_member(name, typing=of is None)

    app.push_screen(AskScreen(title, [("id", suggested)], refuse), answered)


def drop_member(app: Willcarry, member_id: str) -> None:
    """Drop a member, after a question."""
    if not may_change(app):
        return
    name = clean(member_id, longest=60)

    def answered(sure: bool | None) -> None:
        if sure:
            change(app, {"drop": "member", "id": member_id}, f"{name} dropped; u brings it back")

    app.push_screen(SureScreen(f"Drop {name}? What was read of it stays in the file's history."), answered)


def name_site(app: Willcarry) -> None:
    """Name the site of a new session; a file that is there keeps its first line as it is."""
    if not may_change(app):
        return
    store = app.store
    assert store is not None
    if store.log is not None:
        app.walk.say("site, inspector and units stand in the file's first line and are not rewritten")
        return

    def refuse(answers: list[str]) -> str | None:
        if max(len(answer) for answer in answers) > 200:
            return "at most 200 characters"
        return None if answers[2].strip().upper() in ("US", "SI") else "units: US or SI"

    def answered(answers: list[str] | None) -> None:
        if answers is None:
            return
        from assess.log.read import SessionError

        try:
            store.begin(answers[0].strip(), answers[1].strip(), answers[2].strip().upper())
        except SessionError as error:
            app.walk.say(str(error))
            return
        app.status = "saved"
        app.walk.message = ""
        app.refresh_walk()

    asked = [("site", ""), ("inspector", ""), ("units of a number without one: US or SI", "US")]
    app.push_screen(AskScreen("This session", asked, refuse), answered)


def save_elsewhere(app: Willcarry, why: str) -> None:
    """Ask for another file where the session's own cannot be written, and go on there."""
    from tui.store import NotKeptError

    store = app.store
    assert store is not None

    def refuse(answers: list[str]) -> str | None:
        try:
            store.save_elsewhere(answers[0].strip())
        except NotKeptError as error:
            return clean(str(error), longest=200)
        return None

    def answered(answers: list[str] | None) -> None:
        if answers is not None:
            app.path, app.status = store.path, "saved"
            app.notice(f"everything is saved in {store.path}")

    app.push_screen(AskScreen(clean(why, longest=300), [("write everything to another file", "")], refuse), answered)


def undo(app: Willcarry, told: Callable[[Saved, str], None]) -> None:
    """Undo the last change."""
    _swap(app, "undo", "undone", told)


def redo(app: Willcarry, told: Callable[[Saved, str], None]) -> None:
    """Redo what was undone."""
    _swap(app, "redo", "done again", told)


def _swap(app: Willcarry, which: str, words: str, told: Callable[[Saved, str], None]) -> None:
    from tui.fields import BY_KEY
    from tui.store import NotKeptError

    if not may_change(app):
        return
    assert app.store is not None
    try:
        saved = app.store.undo() if which == "undo" else app.store.redo()
    except NotKeptError as error:
        app.notice(str(error))
        return
    if saved is None:
        app.notice(f"nothing to {which}")
    else:
        field = BY_KEY[saved.field].label if saved.field in BY_KEY else saved.field
        told(saved, f"{words}: {saved.id} {field}".strip())
