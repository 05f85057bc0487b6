"""Working, step by step: the trace of an assessment read at the governing variant, combination and place."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from typing import Any

import numpy as np

from assess.checks import Checked
from assess.engine import Computed
from assess.finding import finite
from assess.judge import worst_row
from assess.trace import Step, Trace

DIGITS = 8  # enough that a printed formula gives its printed result again


@dataclass(frozen=True)
class Line:
    """One step as printed: symbol = formula, the numbers in it, the result with its unit, clause and meaning.

    formula is None for a value taken from a reading, a table or the statics; `clause` then says which.
    """

    scope: str
    symbol: str
    formula: str | None
    numbers: tuple[tuple[str, float], ...]
    result: float | None
    unit: str
    clause: str
    meaning: str

    def text(self) -> str:
        """The step in one to three lines of plain text."""
        result = "none" if self.result is None else f"{self.result:.{DIGITS}g}"
        unit = f" {self.unit}" if self.unit else ""
        if self.formula is None:
            return f"  {self.symbol} = {result}{unit}   {self.meaning} [{self.clause}]"
        numbers = ", ".join(f"{name} = {value:.{DIGITS}g}" for name, value in self.numbers)
        return (
            f"  {self.symbol} = {self.formula}   {self.meaning} [{self.clause}]\n"
            f"      with {numbers}\n"
            f"      = {result}{unit}"
        )


def working(computed: Computed, trace: Trace) -> list[Line]:
    """Every step that led to the governing case of each check, in order.

    computed, trace   the same assessment, run with the trace
    returns           Lines: what all checks share first, then each check at its own governing place
    """
    row = worst_row(computed)
    lines: list[Line] = []
    shared = [s for s in trace.steps if s.scope in ("section", "weight and stiffness", "bounce")]
    lines += _read(shared, row, 0, 0, "")
    for checked in (*computed.strength, computed.live_deflection, computed.total_deflection):
        combination = int(checked.ratio[row].argmax())
        place = int(checked.worst[row, combination])
        at = float(checked.at_in[row, place]) if checked.at_in.shape[1] > place else 0.0
        scope = f"{checked.scope}, {checked.combinations[combination]}, at {at:.{DIGITS}g} in"
        steps = [s for s in trace.steps if s.scope == checked.scope]
        lines += _read(steps, row, combination, place, scope)
        lines.append(_ratio(checked, row, combination, place, scope))
    return lines


def _ratio(checked: Checked, row: int, combination: int, place: int, scope: str) -> Line:
    demand, capacity = (_pick(values, row, combination, place) for values in (checked.demand, checked.capacity))
    none = checked.governs_none
    ratio = finite(float(checked.ratio[row, combination]))
    if none is not None or ratio is None:
        return Line(scope, "ratio", None, (), None, "", checked.clause, none or "no capacity exists")
    numbers = (("demand", demand), ("capacity", capacity))
    return Line(scope, "ratio", "demand / capacity", numbers, ratio, "", checked.clause, "demand over capacity")


def _read(steps: Iterable[Step], row: int, combination: int, place: int, scope: str) -> list[Line]:
    lines = []
    for step in steps:
        numbers = tuple((name, _pick(value, row, combination, place)) for name, value in step.inputs.items())
        result = finite(_pick(step.result, row, combination, place))
        lines.append(
            Line(
                scope or step.scope,
                step.symbol,
                step.text,
                numbers,
                result,
                step.unit,
                step.clause,
                step.meaning,
            )
        )
    return lines


def _pick(values: Any, row: int, combination: int, place: int) -> float:
    """One number out of an array laid out [K, C, place], each axis as long as it needs to be."""
    array = np.asarray(values, dtype=float)
    index = (row, combination, place)[: array.ndim]
    return float(array[tuple(min(i, size - 1) for i, size in zip(index, array.shape, strict=True))])


def explain_text(lines: list[Line]) -> str:
    """The working as plain text, a heading for each scope."""
    out: list[str] = []
    scope = None
    for line in lines:
        if line.scope != scope:
            scope = line.scope
            out += ["", scope]
        out.append(line.text())
    return "\n".join(out).strip("\n")
