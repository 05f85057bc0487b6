"""The one door user text goes through before it is shown: nothing a terminal or an eye could be tricked by."""

from __future__ import annotations

import unicodedata

LONGEST = 2_000  # characters shown of one text
MOST_MARKS = 4  # combining marks kept on one letter

# Line separators, blanks that look like nothing, and selectors that change a character's width in some terminals.
_HIDDEN = {
    0x2028, 0x2029, 0x034F, 0x115F, 0x1160, 0x17B4, 0x17B5, 0x2800, 0x3164, 0xFFA0, *range(0xFE00, 0xFE10),
    *range(0xE0000, 0xE01F0),
}  # fmt: skip


def clean(text: str, lines: bool = False, longest: int = LONGEST) -> str:
    """Text as it may be shown: control and hidden characters become visible stand-ins, pile-ups and lengths are cut.

    text      any text
    lines     keep newlines and tabs (notes); else they become stand-ins too
    longest   characters shown; more are cut with a notice

    >>> clean("a\\x1b[2Jb"), clean("x\\u202ey")
    ('a␛[2Jb', 'x‹202E›y')
    """
    cut = len(text) > longest
    shown = text[:longest]
    if shown.isascii() and shown.isprintable():
        return shown + (f" … ({len(text):,} characters)" if cut else "")
    out: list[str] = []
    marks = 0
    for char in shown:
        if unicodedata.category(char) in ("Mn", "Me") and ord(char) not in _HIDDEN:
            marks += 1
            if marks <= MOST_MARKS:
                out.append(char)
            continue
        marks = 0
        out.append(char if lines and char in "\n\t" else _visible(char))
    return "".join(out) + (f" … ({len(text):,} characters)" if cut else "")


def _visible(char: str) -> str:
    code = ord(char)
    if code < 0x20:
        return chr(0x2400 + code)
    if code == 0x7F:
        return "␡"
    if code in _HIDDEN or unicodedata.category(char) in ("Cc", "Cf", "Cs") or code & 0xFFFE == 0xFFFE:
        return f"‹{code:04X}›"
    return char
