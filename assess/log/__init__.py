"""The session file: an append-only text log, read line by line, folded in order, written one whole line at a time."""
