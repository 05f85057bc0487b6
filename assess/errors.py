"""The one exception a bad reading raises: which field, what was read, what is accepted."""

from __future__ import annotations


class ReadingError(ValueError):
    """A reading that cannot be used.

    field     dotted path of the field in the record, e.g. ``size.depth``; empty where not known yet
    value     what was read, as typed
    accepted  what would be accepted, in words

    >>> str(ReadingError("size.depth", "40 psf", "a length, e.g. 7 1/2 in"))
    "size.depth: '40 psf' is not understood; accepted: a length, e.g. 7 1/2 in"
    """

    def __init__(self, field: str, value: object, accepted: str, problem: str = "is not understood") -> None:
        self.field = field
        self.value = value
        self.accepted = accepted
        self.problem = problem
        super().__init__(self.line())

    def line(self) -> str:
        """The one line shown to a person; long values are cut."""
        text = repr(self.value)
        if len(text) > 60:
            text = text[:57] + "..."
        where = f"{self.field}: " if self.field else ""
        return f"{where}{text} {self.problem}; accepted: {self.accepted}"

    def at(self, field: str) -> ReadingError:
        """The same error, said of the named field."""
        return ReadingError(field, self.value, self.accepted, self.problem)
