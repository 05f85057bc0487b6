"""The one exception raised for wood no table knows: what was asked for, and what there is instead."""

from __future__ import annotations


class WoodError(ValueError):
    """Wood that cannot be looked up.

    field        'species', 'grade', 'size', 'rules', 'nominal' or 'dressing'
    value        what was asked for, as typed
    accepted     what would be accepted, in words, the nearest names among them
    suggestions  the same names for programs, nearest first; empty where none is near
    problem      what is wrong with the value, as the end of a clause

    >>> str(WoodError("grade", "No. 9", "a grade with published values, nearest: No. 2", ("No. 2",)))
    "grade: 'No. 9' is not known; accepted: a grade with published values, nearest: No. 2"
    """

    def __init__(
        self,
        field: str,
        value: object,
        accepted: str,
        suggestions: tuple[str, ...] = (),
        problem: str = "is not known",
    ) -> None:
        self.field = field
        self.value = value
        self.accepted = accepted
        self.suggestions = suggestions
        self.problem = problem
        super().__init__(self.line())

    def line(self) -> str:
        """The one line shown to a person; long values are cut, control characters shown as escapes."""
        text = ascii(self.value[:60]) if isinstance(self.value, str) else ascii(self.value)
        if len(text) > 60:
            text = text[:57] + "..."
        return f"{self.field}: {text} {self.problem}; accepted: {self.accepted}"
