"""Verdicts in words and marks: a word and a mark carry each, colour never alone."""

from __future__ import annotations

from assess.finding import Finding
from tui.numbers import load_text, place_text, ratio_text

MARKS = {"adequate": "+", "inadequate": "x", "undetermined": "?", "incomplete": "-"}


def verdict_sentence(finding: Finding) -> str:
    """The answer in one sentence a professional can stand behind."""
    if finding.verdict == "adequate":
        return f"adequate for {finding.use} under the assumptions listed"
    if finding.verdict == "inadequate":
        return f"inadequate for {finding.use}"
    return f"undetermined for {finding.use}"


def governs_sentence(finding: Finding) -> str:
    """What decides: ratio, check, combination and place."""
    governs = finding.governs
    if governs is None:
        return f"ratio {ratio_text(finding.ratio)}"
    at = f" at {place_text(governs.at_in)}" if governs.at_in is not None else ""
    return f"ratio {ratio_text(finding.ratio)}: {governs.check}, {governs.combination}{at}"


def carries_sentence(finding: Finding) -> str:
    """The live load it can carry by strength and service, the concentrated load, the posting figure."""
    live = finding.live_load
    load = "" if live.of == "use" else f" {live.of}"
    parts = [f"carries {load_text(live.strength_psf)} psf{load}"]
    if live.strength_governs:
        parts[0] += f" by {live.strength_governs}"
    if live.service_psf is not None:
        parts.append(f"{load_text(live.service_psf)} psf within the live deflection limit")
    if live.concentrated_ok is not None:
        parts.append("concentrated load carried" if live.concentrated_ok else "concentrated load not carried")
    text = ", ".join(parts)
    if live.posting_psf is not None and live.of == "use":
        text += f"; post {load_text(live.posting_psf)} psf"
    return text


def service_sentence(finding: Finding) -> str:
    """Whether deflection stays within its limits."""
    words = "within limits" if finding.service == "within limits" else "over its limit"
    return f"deflection {words}: ratio {ratio_text(finding.service_ratio)}"


def change_sentence(finding: Finding) -> str | None:
    """The change of use: both ratios, and that being excused says nothing of adequacy."""
    change = finding.change_of_use
    if change is None:
        return None
    both = f"present use {ratio_text(change.present_ratio)}, proposed {ratio_text(change.proposed_ratio)}"
    if change.increase is None:
        return f"change of use: {both}"
    rule = "within" if change.excused else "over"
    text = f"change of use: {both}, demand {change.increase * 100:+.1f} %, {rule} the 5 % of IEBC 506.5.1"
    if change.alteration:
        text += "; as an alteration it triggers a full check (503.3)"
    if max(change.present_ratio or 0.0, change.proposed_ratio or 0.0) > 1.0:
        text += "; a ratio is over 1 all the same"
    return text + "; the authority having jurisdiction decides"
