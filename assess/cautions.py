"""Words that travel with every finding, whatever it says."""

from __future__ import annotations

STANDING = (
    "screening and a record of what was seen, not a stamped design; "
    "local code and the authority having jurisdiction rule",
    "a licensed engineer decides where a ratio exceeds 1, where there is damage, fire, decay at a bearing "
    "or lateral load",
    "shore before cutting or jacking; leave if anything moves",
    "old buildings may hold asbestos, lead, live wiring and bad air",
)
