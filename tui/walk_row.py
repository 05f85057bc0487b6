"""What the walk list says of a member, in cleaned words: mark, place, verdict, ratio, what governs, what it carries."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

from tui.clean import clean
from tui.numbers import load_text, place_text, ratio_text
from tui.verdicts import MARKS

if TYPE_CHECKING:
    from assess.log.read import SessionFile
    from assess.survey import Assessed

ORDER = ("undetermined", "incomplete", "not usable", "inadequate", "adequate")


@dataclass(frozen=True)
class WalkRow:
    """A member on the walk list; words are ready to be shown.

    verdict   a verdict, 'incomplete', 'not usable', or '' while it is not assessed yet
    why       of a member without a finding: what is missing or wrong
    """

    id: str
    name: str
    where: str
    verdict: str = ""
    ratio: str = ""
    governs: str = ""
    carries: str = ""
    why: str = ""

    @property
    def mark(self) -> str:
        """The mark of the verdict."""
        return MARKS.get(self.verdict, "!" if self.verdict else "·")

    def holds(self, words: str) -> bool:
        """Whether every word typed stands somewhere in the row."""
        text = f"{self.name} {self.where} {self.verdict} {self.governs} {self.why}".casefold()
        return all(word in text for word in words.casefold().split())


def unread_row(member_id: str, where: object) -> WalkRow:
    """A member that is not assessed yet."""
    return WalkRow(
        member_id, clean(member_id, longest=200), clean(where, longest=300) if isinstance(where, str) else ""
    )


def row_of(item: Assessed, where: object) -> WalkRow:
    """A member as assessed."""
    blank = unread_row(item.id, where)
    if item.finding is None:
        message = item.problem.message if item.problem is not None else ""
        field = item.problem.field if item.problem is not None and not item.incomplete else ""
        why = message.removeprefix("incomplete: ") if item.incomplete else message
        if field and not why.startswith(field):
            why = f"{field}: {why}"
        verdict = "incomplete" if item.incomplete else "not usable"
        return WalkRow(blank.id, blank.name, blank.where, verdict, why=clean(why, longest=300))
    f = item.finding
    governs = ""
    if f.governs is not None:
        at = f.governs.at_in
        governs = f.governs.check + (f" {place_text(float(round(at)))}" if at is not None else "")
    psf = f.live_load.strength_psf
    carries = f"{load_text(psf):>3} psf" if psf is not None else "no limit"
    if f.live_load.of != "use":
        carries += f" {f.live_load.of}"
    return WalkRow(blank.id, blank.name, blank.where, f.verdict, ratio_text(f.ratio), governs, carries)


def counts(rows: list[WalkRow]) -> str:
    """How many of each verdict, what is not settled first; what is undetermined is counted even where it is none."""
    words = [row.verdict for row in rows]
    if not rows:
        return "no members yet: a adds one"
    parts = [f"{words.count(word)} {word}" for word in ORDER if word in words or word == "undetermined"]
    waiting = f", {words.count('')} not assessed yet" if "" in words else ""
    return f"{len(rows)} member{'s' if len(rows) > 1 else ''}{waiting}: " + ", ".join(parts)


def first_rows(file: SessionFile) -> list[WalkRow]:
    """Members as the log's own lines name them, before anything is understood."""
    where: dict[str, Any] = {}
    for line in file.lines:
        event = line.event
        name, data = event.get("id"), event.get("data")
        if not isinstance(name, str):
            continue
        if event.get("put") == "member" and isinstance(data, dict):
            where[name] = data.get("where")
        elif event.get("drop") == "member":
            where.pop(name, None)
        elif event.get("set") == "member" and event.get("path") == ["where"] and name in where:
            where[name] = data
    return [unread_row(name, place) for name, place in where.items()]
