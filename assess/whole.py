"""The whole way from a member record to its finding, pure: no files, no clock, no globals."""

from __future__ import annotations

from assess.engine import compute
from assess.finding import Finding
from assess.judge import judge
from assess.record import Member
from assess.resolve import resolve
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
    return judge(scenario, compute(scenario))


def explain(member: Member) -> tuple[Finding, list[Line]]:
    """The finding of a member and every step that led to it; the same computation, traced.

    member    as for `assess`
    returns   (Finding, working)
    raises    ReadingError as `assess` does
    """
    scenario = resolve(member)
    trace = Trace()
    computed = compute(scenario, trace)
    return judge(scenario, computed), working(computed, trace)
