"""Exit statuses, in one place (interface.md, Commands)."""

from __future__ import annotations

ADEQUATE = 0
NOT_ADEQUATE = 1  # some member inadequate, undetermined or incomplete
BAD_INPUT = 2
UNEXPECTED = 3
INTERRUPTED = 130
TERMINATED = 143  # by SIGTERM; the text being typed is kept
HUNG_UP = 129  # the terminal went away; likewise
