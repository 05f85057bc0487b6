"""Names to offer where one that was typed is in no table: those its words begin, else those that look like it."""

from __future__ import annotations

import difflib
import re
from collections.abc import Sequence

MOST = 5


def key(text: str) -> str:
    """A name without its case and punctuation; fractions stay.

    >>> key("Hardwood flooring, 7/8 in")
    'hardwood flooring 7/8 in'
    """
    return " ".join(re.findall(r"[a-z0-9/]+", text[:200].lower()))


def offers(typed: str, names: Sequence[str]) -> list[str]:
    """Names that may have been meant, none of them chosen.

    typed     what was typed
    names     names of the table, in its order
    returns   at most five; empty where nothing is like it

    >>> offers("corridor", ["offices", "school first-floor corridors"])
    ['school first-floor corridors']
    """
    words = key(typed).split()
    begun = [name for name in names if words and all(any(w.startswith(t) for w in key(name).split()) for t in words)]
    by_key = {key(name): name for name in names}
    alike = difflib.get_close_matches(key(typed), by_key, MOST, 0.4)
    return (begun or [by_key[one] for one in alike])[:MOST]
