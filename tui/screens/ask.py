"""A short question over the screen: lines to fill in, or a yes."""

from __future__ import annotations

from collections.abc import Callable
from functools import partial
from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import BindingType
from textual.containers import Vertical
from textual.content import Content
from textual.widgets import Static

from tui import actions
from tui.screens.base import Base
from tui.screens.line import Line

Answers = list[str]


class AskScreen(Base[Answers | None]):
    """Asks for one or more lines of text; Enter goes on and at last gives them, Esc gives None.

    title     cleaned words above
    asked     (label, text to start from) of each line
    refuse    gives why the texts cannot be taken, or None
    """

    def __init__(self, title: str, asked: list[tuple[str, str]], refuse: Callable[[Answers], str | None]) -> None:
        super().__init__(classes="ask")
        self.heading, self.asked, self.refuse = title, asked, refuse

    def compose(self) -> ComposeResult:
        with Vertical(id="ask"):
            yield Static(Content(self.heading), id="question")
            for number, (label, value) in enumerate(self.asked):
                yield Static(Content(label), classes="label")
                yield Line(value, id=f"asked{number}")
            yield Static("", id="why")
            yield Static(Content("Enter takes it   Esc leaves it"), classes="label")

    def on_mount(self) -> None:
        """Stand in the first line."""
        for number, line in enumerate(self.lines()):
            line.say = self.why
            line.acts = {
                "enter": partial(self._go, number),
                "escape": partial(self.finish, None),
                "down": partial(self._to, number + 1),
                "tab": partial(self._to, number + 1),
                "up": partial(self._to, number - 1),
            }
        self._to(0)

    def lines(self) -> list[Line]:
        """The entries."""
        return list(self.query(Line))

    def why(self, words: str) -> None:
        """Say why something was not taken."""
        self.put("why", words)

    def _to(self, number: int) -> None:
        line = self.lines()[number % len(self.asked)]
        line.start(line.value)

    def _go(self, number: int) -> None:
        if number + 1 < len(self.asked):
            self._to(number + 1)
            return
        answers = [line.value for line in self.lines()]
        refusal = self.refuse(answers)
        if refusal is None:
            self.finish(answers)
        else:
            self.why(refusal)

    def finish(self, answers: Answers | None) -> None:
        """Give the answers; what is typed behind goes to the screen that follows."""
        self.ours.hold()
        self.dismiss(answers)


class SureScreen(Base[bool]):
    """Asks before something is taken away."""

    BINDINGS: ClassVar[list[BindingType]] = list(actions.bindings("question"))
    WHERE = "question"

    def __init__(self, question: str) -> None:
        super().__init__(classes="ask")
        self.question = question

    def compose(self) -> ComposeResult:
        with Vertical(id="ask"):
            yield Static(Content(self.question), id="question")
            yield Static(Content(actions.footer("question")), classes="label")

    def action_yes(self) -> None:
        """Do it."""
        self.dismiss(True)

    def action_no(self) -> None:
        """Leave it."""
        self.dismiss(False)
