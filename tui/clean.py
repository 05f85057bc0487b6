"""The one door user text goes through before it is shown: nothing a terminal or an eye could be tricked by."""

from __future__ import annotations

import unicodedata

LONGEST = 2_000  # characters shown of one text
MOST_MARKS = 4  # combining marks kept on one letter

# Bidirectional controls, zero-width characters and line separators.
_HIDDEN = {
    *range(0x200B, 0x2010), *range(0x202A, 0x202F), *range(0x2060, 0x2070), 0x061C, 0xFEFF, 0x2028, 0x2029,
    0x00AD, 0x180E, *range(0xFFF9, 0xFFFC), *range(0xE0000, 0xE0080),
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
    out: list[str] = []
    marks = 0
    for char in text[:longest]:
        code = ord(char)
        if lines and char in "\n\t":
            out.append(char)
        elif code < 0x20:
            out.append(chr(0x2400 + code))
        elif code == 0x7F:
            out.append("␡")
        elif 0x80 <= code < 0xA0 or code in _HIDDEN or 0xD800 <= code < 0xE000 or code & 0xFFFE == 0xFFFE:
            out.append(f"‹{code:04X}›")
        elif unicodedata.combining(char):
            marks += 1
            if marks <= MOST_MARKS:
                out.append(char)
            continue
        else:
            out.append(char)
        marks = 0
    return "".join(out) + (f" … ({len(text):,} characters)" if cut else "")
