"""Formulas that compute and can show their working: the text printed is the code that ran."""

from __future__ import annotations

import ast
import functools
import inspect
from collections.abc import Callable
from dataclasses import dataclass, field
from typing import Any, Generic, ParamSpec

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]
P = ParamSpec("P")


@dataclass(frozen=True)
class Formula(Generic[P]):
    """One line of a clause: a function of one return expression, with its symbol, unit and clause.

    Calling it computes. `on(trace, ...)` computes and leaves a step in the trace, where there is one.
    """

    function: Callable[P, Any]
    symbol: str
    unit: str
    clause: str

    def __call__(self, *args: P.args, **kwargs: P.kwargs) -> Array:
        result: Array = self.function(*args, **kwargs)
        return result

    def on(self, trace: Trace | None, *args: P.args, **kwargs: P.kwargs) -> Array:
        """Compute; where a trace is kept, note inputs and result in it."""
        result: Array = self.function(*args, **kwargs)
        if trace is not None:
            names = self.function.__code__.co_varnames
            inputs = dict(zip(names, args, strict=False)) | kwargs
            trace.note(self.symbol, self.text, self.unit, self.clause, inputs, result, self.meaning)
        return result

    @functools.cached_property
    def text(self) -> str:
        """The return expression as it stands in the source."""
        tree = ast.parse(inspect.cleandoc(inspect.getsource(self.function)))
        definition = tree.body[0]
        if not isinstance(definition, ast.FunctionDef) or not isinstance(definition.body[-1], ast.Return):
            raise TypeError(f"{self.symbol}: a formula ends in one return expression")
        value = definition.body[-1].value
        if value is None:
            raise TypeError(f"{self.symbol}: a formula returns an expression")
        return ast.unparse(value)

    @functools.cached_property
    def meaning(self) -> str:
        """First line of the docstring: what the symbol is."""
        return (inspect.getdoc(self.function) or self.symbol).splitlines()[0].rstrip(".")


def formula(symbol: str, unit: str, clause: str) -> Callable[[Callable[P, Any]], Formula[P]]:
    """Make a function of one return expression a Formula that can show its working."""

    def wrap(function: Callable[P, Any]) -> Formula[P]:
        made = Formula(function, symbol, unit, clause)
        object.__setattr__(made, "__doc__", function.__doc__)
        return made

    return wrap


@dataclass(frozen=True)
class Step:
    """One step of working: arrays as they were computed, read at one variant, combination and place.

    text is None for a value taken from a reading or a table: there `clause` says where from.
    """

    symbol: str
    text: str | None
    unit: str
    clause: str
    inputs: dict[str, Any]
    result: Any
    meaning: str
    scope: str


@dataclass
class Trace:
    """The steps of one assessment, in the order they were made, each under its scope."""

    steps: list[Step] = field(default_factory=list)
    scope: str = ""

    def note(
        self,
        symbol: str,
        text: str | None,
        unit: str,
        clause: str,
        inputs: dict[str, Any],
        result: Any,
        meaning: str,
    ) -> None:
        """Add a step under the scope that is open."""
        self.steps.append(Step(symbol, text, unit, clause, inputs, result, meaning, self.scope))

    def value(self, symbol: str, result: Any, unit: str, source: str, meaning: str) -> None:
        """Note a value taken from a reading or a table."""
        self.note(symbol, None, unit, source, {}, result, meaning)
