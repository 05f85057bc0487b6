"""Members: from what was read to a finding; knows nothing of screens."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

if TYPE_CHECKING:
    from assess.finding import Finding as Finding
    from assess.record import Member as Member
    from assess.whole import assess as assess
    from assess.whole import explain as explain
    from assess.whole import study as study

_HOMES = {
    "assess": "assess.whole",
    "explain": "assess.whole",
    "study": "assess.whole",
    "Member": "assess.record",
    "Finding": "assess.finding",
}


def __getattr__(name: str) -> Any:
    """Load a public name when it is first asked for: a bare import stays cheap."""
    if name not in _HOMES:
        raise AttributeError(f"module 'assess' has no attribute {name!r}")
    from importlib import import_module

    return getattr(import_module(_HOMES[name]), name)
