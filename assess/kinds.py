"""What each kind of member defaults to: sharing, bracing, face loaded, deflection limits; data, with reasons."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True)
class Kind:
    """Defaults of a kind of member, each repeated in the finding where it was used."""

    alike: int
    top_held: bool
    loaded_on_top: bool
    wet: bool
    limit_live: float
    limit_total: float
    limits_source: str
    roof: bool


FLOOR = "IBC Table 1604.3 and IRC R301.7, floors, recalled"
ROOF = "IBC Table 1604.3, roof over a ceiling that is not plaster, recalled"
CEILING = "IRC R301.7, ceilings of plaster board, recalled"

KINDS = {
    "joist": Kind(3, True, True, False, 360.0, 240.0, FLOOR, False),
    "beam": Kind(1, False, False, False, 360.0, 240.0, FLOOR, False),
    "header": Kind(1, False, False, False, 360.0, 240.0, FLOOR, False),
    "rafter": Kind(3, True, True, False, 240.0, 180.0, ROOF, True),
    "ceiling joist": Kind(3, False, True, False, 240.0, 180.0, CEILING, False),
    "deck joist": Kind(3, True, True, True, 360.0, 240.0, FLOOR, False),
}
