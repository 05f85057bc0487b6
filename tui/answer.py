"""The answer beside a member: the verdict first, what supports it after, in words a professional can stand behind."""

from __future__ import annotations

from assess.finding import Finding
from assess.survey import Assessed
from tui.clean import clean
from tui.fields import BY_KEY
from tui.numbers import load_text, place_text, ratio_text
from tui.verdicts import MARKS, carries_sentence, change_sentence, service_sentence, verdict_sentence

Said = list[tuple[str, str]]  # (words, look): '' or one of the looks of a row


def answer(item: Assessed, refused: str | None) -> Said:
    """Paragraphs of the answer, the most important first.

    item      the member as assessed, with the text being typed taken in
    refused   label of a line whose text is not understood, or None; then there is no answer
    """
    if refused is not None:
        return [(f"! no answer: {refused} is not understood", "refused")]
    if item.finding is not None:
        return _finding(item.finding)
    if item.incomplete and item.member is not None:
        lacking = ", ".join(_label(name) for name in item.member.missing())
        return [(f"{MARKS['incomplete']} incomplete", "incomplete"), (f"still to be read: {lacking}", "")]
    message = item.problem.message if item.problem is not None else "cannot be assessed"
    return [("! no answer", "refused"), (clean(message, longest=400), "")]


LACKING = {
    "size": "width and depth, or nominal size",
    "wood": "species and grade",
    "spans": "span",
    "dead": "dead load",
    "proposed_use": "what it is to be",
    "spacing or tributary": "spacing, or width carried",
}


def _label(name: str) -> str:
    return LACKING.get(name) or (BY_KEY[name].label if name in BY_KEY else name.replace(".", " "))


def _finding(f: Finding) -> Said:
    said: Said = [(clean(f"{MARKS[f.verdict]} {verdict_sentence(f)}", longest=300), f.verdict)]
    if f.shore_now:
        said.append(("! shore now: dead load alone is too much", "refused"))
    said.append((_governs(f), "strong"))
    pending = [c for c in f.cautions if c.startswith("recorded, not yet assessed")]
    said += [(clean(caution, longest=200), "undetermined") for caution in pending]
    said += [(clean(f.leading, longest=300), "muted"), (carries_sentence(f), ""), (service_sentence(f), "")]
    change = change_sentence(f)
    if change is not None:
        said.append((change, "muted"))
    return said


def _governs(f: Finding) -> str:
    if f.governs is None:
        return f"ratio {ratio_text(f.ratio)}"
    at = f" at {place_text(f.governs.at_in)}" if f.governs.at_in is not None else ""
    return f"ratio {ratio_text(f.ratio)}  {f.governs.check}{at}, {f.governs.combination}"


def listed(f: Finding) -> Said:
    """Assumptions and cautions in full."""
    said: Said = [("assumed", "strong")]
    said += [(f"- {clean(text, longest=600)}", "muted") for text in f.assumptions]
    said.append(("cautions", "strong"))
    return said + [(f"- {clean(text, longest=600)}", "muted") for text in f.cautions]


def counted(f: Finding) -> str:
    """How many assumptions and cautions there are, where there is no room for them."""
    return f"{len(f.assumptions)} assumptions, {len(f.cautions)} cautions: w lists them"


def checks(f: Finding) -> list[str]:
    """Each check at its worst: name, ratio, combination."""
    worst: dict[str, tuple[float, str]] = {}
    for check in f.checks:
        name = f"{check.check} {check.combination}" if check.check == "bounce" else check.check
        ratio = check.ratio if check.ratio is not None else float("inf")
        if name not in worst or ratio > worst[name][0]:
            worst[name] = (ratio, check.combination)
    lines = []
    for name, (ratio, combination) in worst.items():
        text = "none" if ratio == float("inf") else ratio_text(ratio)
        advice = "advice" if name.startswith("bounce") else combination.replace(" (concentrated)", ", point")
        lines.append(f"{name:<18} {text:>7}  {advice}")
    return lines


def carried(f: Finding) -> str:
    """The load carried, in a few words."""
    return f"carries {load_text(f.live_load.strength_psf)} psf"
