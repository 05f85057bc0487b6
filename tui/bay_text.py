"""What is said of a bay, in cleaned words: what it gives, which members name it, how they stand."""

from __future__ import annotations

from typing import Any

from tui.clean import clean
from tui.field_text import raw_of, to_text
from tui.fields import BY_KEY
from tui.walk_row import WalkRow, counts

SUMMED = (  # (before, line, after), in the order of the summary
    ("", "spacing", " centres"),
    ("carries ", "tributary", ""),
    ("span ", "spans", ""),
    ("", "wood.species", ""),
    ("", "wood.grade", ""),
    ("dead ", "dead", ""),
    ("used as ", "present_use", ""),
    ("to be ", "proposed_use", ""),
)


def gives(data: dict[str, Any]) -> str:
    """What a bay gives its members, shortly; lines beyond the usual ones are counted.

    >>> gives({"spacing": "16 in", "spans": ["12 ft"], "dead": "10 psf", "moisture": "dry"})
    '16 in centres, span 12 ft, dead 10 psf, 1 more'
    """
    said = []
    for before, key, after in SUMMED:
        raw = raw_of(data, BY_KEY[key])
        if raw is not None:
            said.append(f"{before}{clean(to_text(raw, BY_KEY[key]), longest=60)}{after}")
    more = len(set(data) - {BY_KEY[key].path[0] for _, key, _ in SUMMED})
    return ", ".join(said + ([f"{more} more"] if more else [])) or "nothing yet"


def members_of(members: dict[str, dict[str, Any]], bay: str) -> list[str]:
    """Ids of the members that name a bay, in their order.

    >>> members_of({"J-1": {"bay": "north"}, "J-2": {}}, "north")
    ['J-1']
    """
    return [name for name, data in members.items() if data.get("bay") == bay]


def stands(rows: list[WalkRow]) -> list[tuple[str, str]]:
    """Paragraphs on the members of a bay and how they stand, each with its look."""
    if not rows:
        return [("no member names this bay yet: F4 on the bay line of a member picks it", "muted")]
    said = [(counts(rows), "strong")]
    for row in rows:
        look = row.verdict if row.verdict and row.verdict != "not usable" else "refused" if row.verdict else "muted"
        said.append((" ".join(f"{row.mark} {row.name} {row.verdict or 'not yet'} {row.ratio}".split()), look))
    return said


def page(rows: list[WalkRow]) -> str:
    """The members of a bay, a line each, with what governs or what is missing."""
    lines = [counts(rows) if rows else "no member names this bay yet", ""]
    for row in rows:
        words = (row.mark, row.name, row.where, row.verdict or "not assessed yet", row.ratio, row.governs, row.why)
        lines.append("  ".join(word for word in words if word))
    return "\n".join(lines)
