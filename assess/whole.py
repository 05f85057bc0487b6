"""The whole way from a member record to its finding, pure: no files, no clock, no globals."""

from __future__ import annotations

from dataclasses import replace

from assess.engine import compute
from assess.finding import Finding
from assess.judge import judge
from assess.pieces import split, worst
from assess.profile import profile
from assess.record import Member
from assess.resolve import resolve
from assess.scenario import Scenario
from assess.trace import Trace
from assess.working import Line, working


def assess(member: Member) -> Finding:
    """Assess a member as it was read.

    member    a record that has all it needs (`Member.missing()` is empty), its bay's fields filled in
    returns   Finding
    raises    ReadingError naming the field that is missing or cannot be used
    source    engineering basis: NDS 2018, ASCE 7-16, IBC 2021
    """
    scenario = resolve(member)
    if scenario.separate:
        return worst([(start, judge(piece, compute(piece))) for start, piece in split(scenario)])
    return judge(scenario, compute(scenario))


def study(member: Member, stretches: int) -> tuple[Finding, tuple[float, ...]]:
    """The finding of a member and its utilisation along the length, out of one computation, for the drawing.

    member      as for `assess`
    stretches   in how many equal stretches the length is divided
    returns     (Finding, worst ratio in each stretch); of separate pieces no utilisation
    raises      ReadingError as `assess` does
    """
    scenario = resolve(member)
    if scenario.separate:
        return assess(member), ()
    computed = compute(scenario)
    return judge(scenario, computed), profile(computed, stretches)


def explain(member: Member) -> tuple[Finding, list[Line]]:
    """The finding of a member and every step that led to it; the same computation, traced.

    member    as for `assess`
    returns   (Finding, working)
    raises    ReadingError as `assess` does
    """
    scenario = resolve(member)
    if not scenario.separate:
        return _traced(scenario)
    found, lines = [], []
    for number, (start, piece) in enumerate(split(scenario), 1):
        finding, steps = _traced(piece)
        found.append((start, finding))
        lines += [replace(step, scope=f"piece {number}: {step.scope}") for step in steps]
    return worst(found), lines


def _traced(scenario: Scenario) -> tuple[Finding, list[Line]]:
    trace = Trace()
    computed = compute(scenario, trace)
    return judge(scenario, computed), working(computed, trace)
