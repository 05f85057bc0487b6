"""Looks of words: theme variables only, so that light, dark and no colour all read."""

from __future__ import annotations

from textual.content import Content

STYLES = {
    "": "",
    "strong": "bold",
    "muted": "$foreground 70%",
    "faint": "$foreground 70% italic",
    "adequate": "bold $text-success",
    "inadequate": "bold $text-error",
    "undetermined": "bold $text-warning",
    "incomplete": "$text-warning",
    "refused": "bold $text-error",
}


def said_content(said: list[tuple[str, str]]) -> Content:
    """Paragraphs with their looks, ready for a Static; words are never read as markup."""
    return Content("\n").join(
        [Content.styled(words, STYLES[look]) if STYLES[look] else Content(words) for words, look in said]
    )
