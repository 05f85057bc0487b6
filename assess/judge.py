"""From checks to a finding: verdict, what governs, the live load it can carry, what travels with it."""

from __future__ import annotations

import math

import numpy as np

from assess.cautions import STANDING
from assess.checks import Checked
from assess.combinations import CONCENTRATED
from assess.engine import Computed
from assess.finding import ChangeOfUse, Check, Finding, Governs, LiveLoad, finite
from assess.prescriptive import prescriptive
from assess.scenario import Scenario
from assess.service import LEAST_FREQUENCY_HZ
from assess.trace import Array

POSTING_STEP_PSF = 5.0
EXCUSED_INCREASE = 0.05  # IEBC 2021 506.5.1, 503.3
CHANGE_RULE = (
    "IEBC 2021 506.5.1 and 1006.1 by effect (ratio over ratio); 503.3 and 805.2 by load type; clauses recalled"
)


def judge(scenario: Scenario, computed: Computed) -> Finding:
    """Make the finding of a computed scenario.

    scenario, computed   the member and what the checks found over its candidate rows
    returns              Finding: the worst candidate's ratio decides; strength gives the verdict, deflection the
                         service answer; a member with something not yet assessed is never adequate
    """
    judged = computed.rows.judged
    ratios = _ratios(computed)
    by_row = ratios[:, :judged].max(axis=0)
    row = worst_row(computed)
    governing = computed.strength[int(ratios[:, row].argmax())]
    combination = int(governing.ratio[row].argmax())
    nones = tuple(dict.fromkeys(c.governs_none for c in computed.strength if c.governs_none))
    cautions = list(nones)
    verdict = _verdict(by_row, bool(scenario.pending))
    service = [computed.live_deflection, computed.total_deflection]
    service_ratio = max(float(c.ratio[:judged].max()) for c in service)
    live, live_notes = _live_load(scenario, computed, bool(nones))
    cautions += live_notes
    shore = _dead_fails(computed, row)
    if shore:
        cautions.append("shore now: dead load alone overloads the member as it stands")
    if computed.gone is not None or scenario.lost_bearings:
        shore = True
        cautions.append("shore now: " + ("a bearing is lost" if computed.gone is None else "the member is broken"))
    cautions += [f"recorded, not yet assessed: {what}" for what in scenario.pending]
    if len(by_row) > 1:
        label = scenario.parts[0].woods[row].label
        cautions.append(f"{len(by_row)} candidate woods assessed; {label} governs")
    breaches = [c.combination for c in prescriptive(scenario) if c.ratio is None or c.ratio > 1.0]
    if breaches:
        cautions.append("beyond the prescriptive limits (IRC R502.8.1): " + "; ".join(breaches))
    place = _at(governing, row, combination)
    return Finding(
        verdict=verdict,
        ratio=finite(float(by_row[row])),
        governs=Governs(governing.name, governing.combinations[combination], place),
        range=None,
        service="within limits" if service_ratio <= 1.0 else "exceeds limits",
        service_ratio=finite(service_ratio),
        live_load=live,
        change_of_use=_change_of_use(scenario, ratios.max(axis=0), row, judged),
        shore_now=shore,
        checks=_checks(scenario, computed, row),
        settle=None,
        assumptions=scenario.assumptions,
        cautions=tuple(cautions) + scenario.cautions + STANDING,
        wood=scenario.parts[0].woods[row].label,
        use=use_words(scenario),
        leading=(scenario.cautions + scenario.assumptions)[0],
    )


def use_words(scenario: Scenario) -> str:
    """The load a member is judged for, as it stands in a sentence: 'offices (50 psf, 2,000 lb)'."""
    if scenario.live is not None:
        figures = [f"{scenario.live.live_psf:g} psf"]
        if scenario.live.concentrated_lb:
            figures.append(f"{scenario.live.concentrated_lb:,.0f} lb")
        return f"{scenario.live.name} ({', '.join(figures)})"
    figures = []
    if scenario.snow_psf:
        figures.append(f"snow {scenario.snow_psf:g} psf")
    if scenario.roof_live_psf:
        figures.append(f"roof live load {scenario.roof_live_psf:g} psf")
    return "a roof (" + ", ".join(figures) + ")"


def _ratios(computed: Computed) -> Array:
    """Worst ratio of each strength check [checks, K]."""
    return np.stack([checked.ratio.max(axis=1) for checked in computed.strength])


def worst_row(computed: Computed) -> int:
    """The row, that is the candidate, whose strength ratio is greatest under the use that is judged."""
    return int(_ratios(computed)[:, : computed.rows.judged].max(axis=0).argmax())


def _change_of_use(scenario: Scenario, by_row: Array, row: int, judged: int) -> ChangeOfUse | None:
    """Both ratios of the governing candidate, the increase by effect and by load type, and what the code says."""
    if len(by_row) == judged or scenario.present is None or scenario.live is None:
        return None
    proposed, present = finite(float(by_row[row])), finite(float(by_row[row + judged]))
    before = scenario.present.live_psf + scenario.present.partition_psf
    after = scenario.live.live_psf + scenario.live.partition_psf
    live_increase = after / before - 1.0 if before > 0.0 else None
    grown = (live_increase is None and after > 0.0) or (live_increase is not None and live_increase > EXCUSED_INCREASE)
    increase = proposed / present - 1.0 if proposed is not None and present else None
    return ChangeOfUse(
        present_ratio=present,
        proposed_ratio=proposed,
        increase=increase,
        excused=None if increase is None else increase <= EXCUSED_INCREASE and not scenario.new_work,
        live_increase=live_increase,
        alteration=grown or scenario.new_work,
        rule=CHANGE_RULE,
    )


def _verdict(by_row: Array, pending: bool) -> str:
    if bool((by_row > 1.0).all()):
        return "inadequate"
    if pending or bool((by_row > 1.0).any()):
        return "undetermined"
    return "adequate"


def _dead_fails(computed: Computed, row: int) -> bool:
    """Whether a strength check fails under dead load alone: urgent, apart from any ratio under use."""
    return any(
        name == "D" and c.governs_none is None and c.ratio[row, i] > 1.0
        for c in computed.strength
        for i, name in enumerate(c.combinations)
    )


def _at(checked: Checked, row: int, combination: int) -> float | None:
    if checked.governs_none is not None:
        return None
    # Stations stand a rounding apart where a grid place meets an edge; nought has no sign.
    return round(float(checked.at_in[row, checked.worst[row, combination]]), 9) + 0.0


def _live_load(scenario: Scenario, computed: Computed, no_value: bool) -> tuple[LiveLoad, list[str]]:
    """Greatest uniform load by strength and by live deflection, of the worst row."""
    env = computed.envelope
    judged = computed.rows.judged
    # lb/in of member -> psf over its tributary width, before any reduction
    reduction = scenario.live.reduction if scenario.live is not None else 1.0
    to_psf = 144.0 / computed.rows.tributary_in[:judged] / reduction
    uniform = [i for i, c in enumerate(env.combinations) if not c.of(CONCENTRATED)]
    limits = [(float((c.greatest[:judged, uniform].min(axis=1) * to_psf).min()), c.name) for c in computed.strength]
    strength, strength_name = min(limits, key=lambda pair: pair[0])
    if no_value:
        strength, strength_name = 0.0, next(c.name for c in computed.strength if c.governs_none)
    service = float((computed.live_deflection.greatest[:judged].min(axis=1) * to_psf).min())
    concentrated = [i for i, c in enumerate(env.combinations) if c.of(CONCENTRATED)]
    ok = None
    if concentrated and scenario.live is not None and scenario.live.concentrated_lb:
        ok = all(float(c.ratio[:judged, concentrated].max()) <= 1.0 for c in computed.strength)
    notes = []
    if math.isfinite(strength):
        notes.append("posting figure is from the readings as they stand, not from the low end of their range")
    if any(c.governs_none is None and float(c.ratio[:judged, 0].max()) > 1.0 for c in computed.strength):
        notes.append("overloaded as it stands: no live load can be carried")
    of = "use" if env.asked == "live" else env.asked
    return (
        LiveLoad(
            of=of,
            strength_psf=finite(strength),
            strength_governs=strength_name if math.isfinite(strength) else None,
            concentrated_ok=ok,
            service_psf=finite(service),
            service_governs="live deflection" if math.isfinite(service) else None,
            posting_psf=posting(strength),
        ),
        notes,
    )


def posting(strength_psf: float) -> float | None:
    """Live load to post: rounded down to 5 psf, never up.

    >>> posting(54.99), posting(4.0)
    (50.0, 0.0)
    """
    if not math.isfinite(strength_psf):
        return None
    return math.floor(strength_psf / POSTING_STEP_PSF) * POSTING_STEP_PSF


def _checks(scenario: Scenario, computed: Computed, row: int) -> tuple[Check, ...]:
    """The governing case of each check in each combination, for the worst row."""
    found: dict[tuple[str, str], Check] = {}
    for checked in (*computed.strength, computed.live_deflection, computed.total_deflection):
        for i, name in enumerate(checked.combinations):
            check = _check(checked, row, i)
            held = found.get((checked.name, name))
            # Bending comes once for each sign of moment: the greater stands for the combination.
            if held is None or (held.ratio is not None and (check.ratio is None or check.ratio > held.ratio)):
                found[checked.name, name] = check
    return (*found.values(), *prescriptive(scenario), *_bounce(computed, row))


def _check(checked: Checked, row: int, combination: int) -> Check:
    place = int(checked.worst[row, combination])

    def pick(values: Array) -> float:
        K, C, n = values.shape
        number: float = values.item(row if K > 1 else 0, combination if C > 1 else 0, place if n > 1 else 0)
        return number

    none = checked.governs_none is not None
    return Check(
        check=checked.name,
        combination=checked.combinations[combination],
        at_in=_at(checked, row, combination),
        demand=finite(pick(checked.demand)),
        capacity=None if none else finite(pick(checked.capacity)),
        unit=checked.unit,
        ratio=finite(float(checked.ratio[row, combination])),
        clause=checked.clause,
        factors={} if none else {name: pick(values) for name, values in checked.factors.items()},
    )


def _bounce(computed: Computed, row: int) -> tuple[Check, Check]:
    b = computed.bounce
    f, y, limit = float(b.frequency_Hz[row]), float(b.point_in[row]), float(b.limit_in[row])
    middle = float(computed.rows.spans_in[row].max()) / 2
    return (
        Check("bounce", "frequency", middle, LEAST_FREQUENCY_HZ, finite(f), "Hz", finite(LEAST_FREQUENCY_HZ / f),
              "EN 1995-1-1 7.3.3 threshold, recalled; advice only", {}),
        Check("bounce", "1 kN", middle, y, limit, "in", finite(y / limit),
              "ATC Design Guide 1, recalled; advice only", {}),
    )  # fmt: skip
