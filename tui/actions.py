"""Every key that does something, once: bindings, footer, help, palette and the README's key table come from here."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True)
class Action:
    """A key and what it does.

    id       name of the screen's method, without `action_`
    keys     as Textual names them, with commas between
    shown    the keys as printed
    words    what it does, for help, palette and table
    where    one of WHERE
    footer   what the footer says of it; None where the footer leaves it out
    """

    id: str
    keys: str
    shown: str
    words: str
    where: str
    footer: str | None = None


WHERE = {
    "walk": "walk list",
    "member": "member",
    "typing": "typing a reading",
    "bays": "bays",
    "page": "working, help",
    "list": "list to pick from",
    "note": "remarks",
    "question": "question",
    "anywhere": "anywhere",
}

ACTIONS = (
    Action("help", "question_mark,f1", "?", "help on this screen", "walk", "help"),
    Action("open", "enter", "Enter", "open the member under the cursor", "walk", "open"),
    Action("add", "a", "a", "add a member", "walk", "add"),
    Action("copy", "c", "c", "copy the member under the cursor", "walk", "copy"),
    Action("drop", "d", "d", "drop the member under the cursor, after a question", "walk"),
    Action("find", "slash", "/", "show only members that hold the words typed", "walk", "find"),
    Action("bays", "b", "b", "the bays: readings that their members share", "walk", "bays"),
    Action("working", "w", "w", "every step, assumption and caution", "walk", "working"),
    Action("undo", "u", "u", "undo the last change", "walk", "undo"),
    Action("redo", "U", "U", "redo what was undone", "walk"),
    Action("site", "e", "e", "name the site, inspector and units of a new session", "walk"),
    Action("down", "down,j", "↓ j", "next line", "walk"),
    Action("up", "up,k", "↑ k", "line before", "walk"),
    Action("page_down", "pagedown", "PgDn", "a page down", "walk"),
    Action("page_up", "pageup", "PgUp", "a page up", "walk"),
    Action("first", "home", "Home", "first line", "walk"),
    Action("last", "end", "End", "last line", "walk"),
    Action("back", "escape", "Esc", "show all members again", "walk"),
    Action("quit", "q", "q", "quit", "walk", "quit"),
    Action("help", "question_mark,f1", "?", "help on this screen", "member", "help"),
    Action("type", "enter", "Enter", "type the reading under the cursor", "member", "type"),
    Action("more", "m", "m", "show or hide the readings seldom taken", "member", "more lines"),
    Action("working", "w", "w", "every step, assumption and caution; of a bay, its members", "member", "working"),
    Action("undo", "u", "u", "undo the last change", "member", "undo"),
    Action("redo", "U", "U", "redo what was undone", "member", "redo"),
    Action("down", "down,j,tab", "↓ j Tab", "next reading", "member"),
    Action("up", "up,k,shift+tab", "↑ k", "reading before", "member"),
    Action("page_down", "pagedown", "PgDn", "a page down", "member"),
    Action("page_up", "pageup", "PgUp", "a page up", "member"),
    Action("first", "home", "Home", "first reading", "member"),
    Action("last", "end", "End", "last reading", "member"),
    Action("back", "escape", "Esc", "back to the list", "member", "back"),
    Action("quit", "q", "q", "quit", "member", "quit"),
    Action("keep", "enter", "Enter", "keep the reading and go to the next", "typing", "keep, next"),
    Action("down", "down,tab", "Tab ↓", "keep it if it is understood, go to the next reading", "typing", "next"),
    Action("up", "up,shift+tab", "↑", "keep it if it is understood, go to the reading before", "typing", "before"),
    Action("pick", "f4", "F4", "pick a species, grade, use, bay or other name from a list", "typing", "list"),
    Action("leave", "escape", "Esc", "stop typing; a changed text is not kept, but offered again", "typing", "stop"),
    Action("help", "f1", "F1", "help on this screen", "typing", "help"),
    Action("working", "f2", "F2", "every step, assumption and caution", "typing", "working"),
    Action("help", "question_mark,f1", "?", "help on this screen", "bays", "help"),
    Action("open", "enter", "Enter", "open the bay under the cursor", "bays", "open"),
    Action("add", "a", "a", "add a bay", "bays", "add"),
    Action("drop", "d", "d", "drop the bay under the cursor, after a question; none that members name", "bays", "drop"),
    Action("undo", "u", "u", "undo the last change", "bays", "undo"),
    Action("redo", "U", "U", "redo what was undone", "bays", "redo"),
    Action("down", "down,j", "↓ j", "next line", "bays"),
    Action("up", "up,k", "↑ k", "line before", "bays"),
    Action("first", "home", "Home", "first line", "bays"),
    Action("last", "end", "End", "last line", "bays"),
    Action("back", "escape", "Esc", "back to the walk list", "bays", "back"),
    Action("quit", "q", "q", "quit", "bays", "quit"),
    Action("down", "down,j", "↓ j", "a line down", "page", "down"),
    Action("up", "up,k", "↑ k", "a line up", "page", "up"),
    Action("page_down", "pagedown,space", "PgDn", "a page down", "page"),
    Action("page_up", "pageup", "PgUp", "a page up", "page"),
    Action("first", "home", "Home", "to the top", "page"),
    Action("last", "end", "End", "to the end", "page"),
    Action("back", "escape,q", "Esc q", "back", "page", "back"),
    Action("take", "enter", "Enter", "put the words under the cursor into the reading", "list", "take"),
    Action("down", "down,j", "↓ j", "next line", "list", "down"),
    Action("up", "up,k", "↑ k", "line before", "list", "up"),
    Action("back", "escape", "Esc", "back, with nothing taken", "list", "back"),
    Action("keep", "ctrl+s", "Ctrl+S", "keep the remarks", "note", "keep"),
    Action("back", "escape", "Esc", "back; a changed text is not kept, but offered again", "note", "back"),
    Action("yes", "y", "y", "yes, do it", "question", "yes"),
    Action("no", "n,escape", "n Esc", "no, leave it", "question", "no"),
    Action("save", "ctrl+s", "Ctrl+S", "say what is saved; try again what could not be written", "anywhere"),
    Action("command_palette", "ctrl+p", "Ctrl+P", "every command, found by its words", "anywhere"),
    Action("help_quit", "ctrl+c", "Ctrl+C", "copy what is selected; else say how to quit", "anywhere"),
    Action("quit", "ctrl+q", "Ctrl+Q", "quit", "anywhere"),
)  # fmt: skip


def of(where: str) -> tuple[Action, ...]:
    """Actions of one place, in order."""
    return tuple(action for action in ACTIONS if action.where == where)


def bindings(where: str) -> list[tuple[str, str, str]]:
    """Textual bindings of one place: keys, action, words."""
    return [(action.keys, action.id, action.words) for action in of(where)]


def footer(where: str, width: int = 80) -> str:
    """The keys of a place on one line, the first ones first, as many as the width holds.

    >>> footer("walk", 20)
    '? help  Enter open'
    """
    text = ""
    for action in of(where):
        if action.footer is None:
            continue
        longer = f"{text}  {action.shown} {action.footer}".strip()
        if len(longer) > width:
            break
        text = longer
    return text


def help_text(where: str) -> str:
    """Keys in words: those of the place asked from first, then all others."""
    order = [where, *(name for name in WHERE if name != where)]
    lines = []
    for name in order:
        lines.append(WHERE[name])
        lines += [f"  {action.shown:<9} {action.words}" for action in of(name)]
        lines.append("")
    return "\n".join(lines)


def table() -> str:
    """The key table of the README."""
    rows = ["| where | key | what it does |", "|---|---|---|"]
    rows += [f"| {WHERE[action.where]} | `{action.shown}` | {action.words} |" for action in ACTIONS]
    return "\n".join(rows)
