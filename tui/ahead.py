"""Keys typed faster than screens come and go: each acts where it was meant to, none is lost."""

from __future__ import annotations

from typing import Any, Generic, TypeVar

from textual import events
from textual.app import App
from textual.screen import Screen

from tui.screens.base import Base

HELD_S = 1.0  # keys are never held longer for a screen
R = TypeVar("R")


class AheadApp(App[R], Generic[R]):
    """An app that holds keys while the screen they are meant for is on its way.

    ready   False until the session is read: keys wait that long as well
    """

    ready = False

    def __init__(self) -> None:
        super().__init__()
        self._ahead: list[events.Key] = []
        self._holding = True

    def hold(self) -> None:
        """Hold keys until the screen that comes next stands."""
        self._holding = True
        if self.ready:
            self.set_timer(HELD_S, self.let_go)

    def held(self, event: events.Key) -> bool:
        """Whether a key is held; it is handed on later. Quitting never waits."""
        if not self._holding or event.key == "ctrl+q":
            return False
        self._ahead.append(event)
        return True

    def release(self, screen: Screen[Any]) -> None:
        """A screen stands: hand it the keys typed ahead."""
        if screen is self.screen and self.ready:
            self.let_go()

    def let_go(self) -> None:
        """Hand on the keys that are held."""
        self._holding = False
        ahead, self._ahead = self._ahead, []
        for event in ahead:
            self.post_message(events.Key(event.key, event.character))

    def push_screen(self, screen: Any, *args: Any, **kwargs: Any) -> Any:
        """Go to a screen; keys typed ahead wait for it."""
        if isinstance(screen, Base):
            self.hold()
        return super().push_screen(screen, *args, **kwargs)

    async def on_event(self, event: events.Event) -> None:
        """Act on a key of a list at once, so that one typed right behind it finds the screen it was meant for.

        Textual forwards a key to the widget in focus and acts on it when it has travelled back up; a letter typed in
        the same instant would be forwarded meanwhile, to the old screen.
        """
        if isinstance(event, events.Key) and not event.is_forwarded:
            if self.held(event):
                return
            focused = self.focused
            takes_text = focused is not None and focused.check_consume_key("a", "a")
            if isinstance(self.screen, Base) and not takes_text and await self._check_bindings(event.key):
                return
        await super().on_event(event)
