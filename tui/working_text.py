"""The working of a member as a page: the answer, assumptions and cautions in full, then every step."""

from __future__ import annotations

from assess.errors import ReadingError
from assess.whole import explain
from assess.working import explain_text
from tui.answer import listed
from tui.clean import clean
from tui.store import Store
from tui.verdicts import MARKS, carries_sentence, change_sentence, governs_sentence, service_sentence, verdict_sentence

LONGEST = 400_000  # characters; five spans with all their checks stay far below


def working_text(store: Store, member_id: str) -> str:
    """Everything that led to a member's answer, or why there is none; cleaned."""
    if member_id not in store.members:
        return "this member is not there any more"
    item = store.assessed(member_id)
    if item.finding is None or item.member is None:
        return clean(item.problem.message if item.problem is not None else "no answer", longest=2_000)
    f = item.finding
    try:
        steps = explain_text(explain(item.member)[1])
    except ReadingError as error:
        steps = error.line()
    said = [f"{MARKS[f.verdict]} {verdict_sentence(f)}", governs_sentence(f), carries_sentence(f), service_sentence(f)]
    change = change_sentence(f)
    parts = [*said, *([change] if change is not None else []), f"wood: {f.wood}"]
    if f.shore_now:
        parts.insert(1, "! shore now: dead load alone is too much")
    lists = [("\n" if look == "strong" else "") + text for text, look in listed(f)]
    return clean("\n".join([*parts, *lists, "", steps]), lines=True, longest=LONGEST)
