"""Findings as plain text for the command line: the answer first, what supports it after."""

from __future__ import annotations

import textwrap

from assess.cautions import STANDING
from assess.finding import Finding
from assess.log.read import Problem
from assess.survey import Assessed
from tui.clean import clean
from tui.numbers import load_text, place_text, ratio_text
from tui.verdicts import MARKS, carries_sentence, change_sentence, governs_sentence, service_sentence, verdict_sentence

WIDTH = 80


def table(found: list[Assessed]) -> list[str]:
    """One line for each member: mark, id, verdict, ratio, what governs and where, live load it carries."""
    lines = [f"  {'member':<10} {'verdict':<13} {'ratio':>7}  {'governs':<28} {'carries':>8}"]
    for item in found:
        name = clean(item.id, longest=200)
        name = name if len(name) <= 10 else name[:9] + "…"
        if item.finding is None:
            verdict = "incomplete" if item.incomplete else "not usable"
            lines.append(f"{MARKS.get(verdict, '!')} {name:<10} {verdict:<13}")
            continue
        f = item.finding
        governs = ""
        if f.governs is not None:
            at = f" {place_text(f.governs.at_in)}" if f.governs.at_in is not None else ""
            governs = f"{f.governs.check}{at}"
        carries = load_text(f.live_load.strength_psf)
        lines.append(
            f"{MARKS[f.verdict]} {name:<10} {f.verdict:<13} {ratio_text(f.ratio):>7}  {governs:<28.28} {carries:>4} psf"
        )
    return lines


def counts(found: list[Assessed]) -> str:
    """How many of each verdict, what is not settled first."""
    words = [i.finding.verdict if i.finding else ("incomplete" if i.incomplete else "not usable") for i in found]
    order = ("undetermined", "incomplete", "not usable", "inadequate", "adequate")
    parts = [f"{words.count(word)} {word}" for word in order if word in words]
    return ", ".join(parts) if parts else "no members"


def paragraph(item: Assessed) -> list[str]:
    """The finding of one member in words, its assumptions and its own cautions after."""
    name = clean(item.id)
    where = f", {clean(item.member.where, longest=200)}" if item.member is not None and item.member.where else ""
    if item.finding is None:
        return []
    f = item.finding
    lines = _wrapped(f"{name}{where}", "", "")
    lines += _wrapped(f"{MARKS[f.verdict]} {verdict_sentence(f)}", "  ", "    ")
    if f.shore_now:
        lines += _wrapped("SHORE NOW", "  ! ", "    ")
    for sentence in (governs_sentence(f), carries_sentence(f), service_sentence(f), change_sentence(f)):
        if sentence is not None:
            lines += _wrapped(sentence, "    ", "      ")
    lines += _wrapped(f"wood: {clean(f.wood)}; {clean(f.leading)}", "    ", "      ")
    for caution in own_cautions(f):
        lines += _wrapped(clean(caution), "    caution: ", "      ")
    for assumption in f.assumptions:
        lines += _wrapped(clean(assumption), "    - ", "      ")
    return lines


def own_cautions(finding: Finding) -> list[str]:
    """Cautions of this member: without those that always travel, and the one already beside its verdict."""
    return [c for c in finding.cautions if c not in STANDING and c != finding.leading]


def standing() -> list[str]:
    """The cautions that travel with every finding."""
    return [line for caution in STANDING for line in _wrapped(caution, "- ", "  ")]


def problem_line(path: str, problem: Problem) -> str:
    """One problem on one line: file, line, member, field, reason."""
    parts = [clean(path)]
    if problem.line:
        parts.append(f"line {problem.line}")
    if problem.id:
        parts.append(clean(problem.id, longest=100))
    if problem.field:
        parts.append(clean(problem.field, longest=100))
    parts.append(clean(problem.message, longest=600))
    return ": ".join(parts)


def _wrapped(text: str, first: str, rest: str) -> list[str]:
    return textwrap.wrap(text, WIDTH, initial_indent=first, subsequent_indent=rest, break_on_hyphens=False) or [first]
