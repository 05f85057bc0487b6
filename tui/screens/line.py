"""A one-line entry: its text always clean, no key lost, nothing dropped without a word."""

from __future__ import annotations

from collections.abc import Callable

from textual.events import Key, Paste
from textual.widgets import Input

from tui.clean import clean

LONGEST_PASTE = 2_000


class Line(Input):
    """Input whose text is always clean, and whose own keys act in the order they were typed.

    Textual runs a key's binding only after the key has travelled up to the app; letters typed behind it would land in
    the wrong reading. So the keys that end or move an entry are acted on here, in the queue the letters come by.

    acts   key -> what it does; may be set anew for each use
    say    shows why a paste was not taken
    """

    def __init__(self, value: str = "", id: str | None = None, classes: str | None = None) -> None:
        super().__init__(value, id=id, classes=classes, compact=True, select_on_focus=False)
        self.acts: dict[str, Callable[[], None]] = {}
        self.say: Callable[[str], None] = lambda words: None
        self.resting = False

    def start(self, text: str, selected: bool = True) -> None:
        """Begin with a text, selected so that typing replaces it."""
        self.value = clean(text, longest=10_000)
        self.cursor_position = len(self.value)
        if selected and self.value:
            self.select_all()
        self.resting = False
        self.screen.set_focus(self)

    async def _on_key(self, event: Key) -> None:
        if self.app.held(event):  # type: ignore[attr-defined]
            event.stop()
            event.prevent_default()
        elif self.resting:
            event.prevent_default()  # typed behind the key that ended the entry: it is meant for the screen
        elif event.key == "ctrl+c":
            event.stop()
            event.prevent_default()
            self.copy_selected()
        elif event.key in self.acts:
            event.stop()
            event.prevent_default()
            self.acts[event.key]()

    def copy_selected(self) -> None:
        """Send what is selected to the terminal's clipboard; where nothing is, say how to quit."""
        if self.selected_text:
            self.app.copy_to_clipboard(self.selected_text)
            self.say("the selected text was sent to the terminal")
        else:
            self.say("Ctrl+Q quits; nothing was changed")

    def _on_paste(self, event: Paste) -> None:
        event.stop()
        event.prevent_default()
        text = event.text.strip("\r\n")
        if "\n" in text or "\r" in text:
            self.say("a paste of several lines is not taken here; nothing was changed")
        elif len(text) > LONGEST_PASTE:
            self.say(f"a paste of {len(text):,} characters is too long; nothing was changed")
        else:
            selection = self.selection
            self.replace(clean(text), min(selection), max(selection))
