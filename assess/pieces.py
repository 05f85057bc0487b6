"""Pieces lapped or butted over their supports: each span is a simple span of its own, and the worst decides."""

from __future__ import annotations

from dataclasses import replace

from assess.finding import Check, Finding, Governs, LiveLoad
from assess.scenario import Edge, Scenario


def split(scenario: Scenario) -> list[tuple[float, Scenario]]:
    """One scenario for each piece, with where its first support stands on the whole member [in].

    A load over an inner support goes to both pieces, since which of them it bears on is not recorded. A measured
    inner bearing is shared half and half, as between butted ends; lapped ends have more.
    """
    supports = scenario.supports_in
    last = len(scenario.spans_in) - 1
    pieces = []
    for index, span in enumerate(scenario.spans_in):
        start = supports[index]
        left = scenario.overhang_left_in if index == 0 else 0.0
        right = scenario.overhang_right_in if index == last else 0.0
        low, high = start - left, start + span + right
        bearing = []
        for end in (index, index + 1):
            whole = scenario.bearing_in[end]
            inner = 0 < end <= last
            bearing.append(whole / 2 if inner and scenario.bearing_measured[end] else whole)
        lines = []
        for line in scenario.line_loads:
            a, b = max(line.from_in, low), min(line.to_in, high)
            if b > a:
                lines.append(replace(line, from_in=a - start, to_in=b - start))
        pieces.append(
            (
                start,
                replace(
                    scenario,
                    first_support=index,
                    origin_in=start,
                    spans_in=(span,),
                    overhang_left_in=left,
                    overhang_right_in=right,
                    face_in=scenario.face_in[index : index + 2],
                    bearing_in=tuple(bearing),
                    bearing_measured=scenario.bearing_measured[index : index + 2],
                    hold_down=tuple(s - index for s in scenario.hold_down if 0 <= s - index <= 1),
                    top=_moved(scenario.top, start, low, high),
                    bottom=_moved(scenario.bottom, start, low, high),
                    point_loads=tuple(
                        replace(p, at_in=p.at_in - start) for p in scenario.point_loads if low <= p.at_in <= high
                    ),
                    line_loads=tuple(lines),
                    losses=tuple(
                        replace(loss, from_in=loss.from_in - start, to_in=loss.to_in - start)
                        for loss in scenario.losses
                        if loss.to_in > low and loss.from_in < high
                    ),
                    splits=tuple(
                        split
                        for split in scenario.splits
                        if (split.end == "left" and index == 0) or (split.end == "right" and index == last)
                    ),
                    lost_bearings=tuple((s - index, why) for s, why in scenario.lost_bearings if 0 <= s - index <= 1),
                ),
            )
        )
    return pieces


def _moved(edge: Edge, start: float, low: float, high: float) -> Edge:
    return replace(edge, places_in=tuple(p - start for p in edge.places_in if low <= p <= high))


def worst(found: list[tuple[float, Finding]]) -> Finding:
    """One finding of all pieces: the worst piece's, with the least loads and the worst of every check.

    found   (where the piece's first support stands [in], its finding)
    """
    offset, governing = max(found, key=lambda item: _rank(item[1].ratio))
    findings = [finding for _, finding in found]
    checks: dict[tuple[str, str], Check] = {}
    for start, finding in found:
        for check in finding.checks:
            key = (check.check, check.combination)
            if key not in checks or _rank(check.ratio) > _rank(checks[key].ratio):
                checks[key] = replace(check, at_in=None if check.at_in is None else check.at_in + start)
    verdicts = {finding.verdict for finding in findings}
    verdict = next(word for word in ("inadequate", "undetermined", "adequate") if word in verdicts)
    governs = governing.governs
    if governs is not None and governs.at_in is not None:
        governs = Governs(governs.check, governs.combination, governs.at_in + offset)
    service = max((f.service_ratio for f in findings if f.service_ratio is not None), default=None)
    return replace(
        governing,
        verdict=verdict,
        governs=governs,
        service="within limits" if all(f.service == "within limits" for f in findings) else "exceeds limits",
        service_ratio=service,
        live_load=_least([finding.live_load for finding in findings]),
        shore_now=any(finding.shore_now for finding in findings),
        checks=tuple(checks.values()),
        cautions=tuple(dict.fromkeys(caution for finding in findings for caution in finding.cautions)),
    )


def _rank(ratio: float | None) -> float:
    return float("inf") if ratio is None else ratio


def _least(loads: list[LiveLoad]) -> LiveLoad:
    strength = min(loads, key=lambda load: _rank(load.strength_psf))
    service = min(loads, key=lambda load: _rank(load.service_psf))
    carried = [load.concentrated_ok for load in loads if load.concentrated_ok is not None]
    return replace(
        strength,
        concentrated_ok=all(carried) if carried else None,
        service_psf=service.service_psf,
        service_governs=service.service_governs,
    )
