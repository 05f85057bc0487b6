"""Every printed step of the demo's members: each formula, re-evaluated with its printed numbers, gives its result."""

from __future__ import annotations

import json
import re
from pathlib import Path
from typing import Any

import numpy as np
import pytest

from assess import explain
from assess.record import read_member
from assess.working import explain_text

DEMO = Path(__file__).resolve().parent.parent / "tui" / "data" / "demo.survey"
EVENTS = [json.loads(line) for line in DEMO.read_text(encoding="utf-8").splitlines()]
MEMBERS = {event["id"]: event["data"] for event in EVENTS if event.get("put") == "member"}
WORDS = {name: getattr(np, name) for name in ("sqrt", "where", "minimum", "maximum", "exp", "pi")}


@pytest.mark.parametrize("name", MEMBERS)
def test_printed_formulas_hold(name: str) -> None:
    finding, lines = explain(read_member(MEMBERS[name]))
    evaluated = 0
    for line in lines:
        if line.formula is None or line.result is None:
            continue
        # What is read is the printed text itself, as a person with a calculator would.
        printed = line.text()
        numbers = dict(
            re.findall(r"(\w+) = (-?[\d.]+(?:e[+-]?\d+)?|inf)", printed.split("\n      with ")[1].split("\n")[0])
        )
        result = float(re.findall(r"\n      = (-?[\d.]+(?:e[+-]?\d+)?)", printed)[0])
        values: dict[str, Any] = {key: float(value) for key, value in numbers.items()}
        again = float(eval(line.formula, {"__builtins__": {}}, WORDS | values))
        assert again == pytest.approx(result, rel=1e-5, abs=1e-9), printed
        evaluated += 1
    assert evaluated >= 15
    assert finding.ratio is None or f"{finding.ratio:.8g}" in explain_text(lines)


def test_a_step_names_its_clause_and_unit() -> None:
    _, lines = explain(read_member(MEMBERS["N-11"]))
    assert all(line.clause for line in lines)
    assert {"psi", "lb-in", "lb", "in"} <= {line.unit for line in lines}
    assert any("3.4.3.2" in line.clause for line in lines)
