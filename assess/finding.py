"""What an assessment found: the frozen result that screens show, reports print and `--json` writes."""

from __future__ import annotations

import math
from dataclasses import asdict, dataclass
from typing import Any

BASIS = "NDS 2018 ASD"


@dataclass(frozen=True)
class Check:
    """The governing case of one check in one combination; ratio is None where no capacity exists."""

    check: str
    combination: str
    at_in: float | None
    demand: float | None
    capacity: float | None
    unit: str
    ratio: float | None
    clause: str
    factors: dict[str, float]


@dataclass(frozen=True)
class Governs:
    """Which check decides, in which combination, where along the member."""

    check: str
    combination: str
    at_in: float | None


@dataclass(frozen=True)
class LiveLoad:
    """The uniform load the member can carry, psf over its tributary width, by strength and by service.

    of              the load named: 'use', or 'snow' or 'roof live' on a roof
    concentrated_ok None where the use has no concentrated load
    posting_psf     strength figure rounded down to 5 psf
    """

    of: str
    strength_psf: float | None
    strength_governs: str | None
    concentrated_ok: bool | None
    service_psf: float | None
    service_governs: str | None
    posting_psf: float | None


@dataclass(frozen=True)
class ChangeOfUse:
    """Demand over capacity under the present and the proposed use, both with the capacity as found.

    increase         by effect: proposed_ratio / present_ratio - 1; None where either does not exist
    excused          whether that is at most 5 % (IEBC 2021 506.5.1, 1006.1): never a statement that it is adequate
    live_increase    by load type: proposed over present live load - 1, partitions included; None where there was none
    alteration       whether an alteration triggers a full check (IEBC 2021 503.3, 805.2): design live load up by more
                     than 5 %, or capacity reduced by the planned work, which has no tolerance
    rule             code edition and the reading of the rule that was used
    """

    present_ratio: float | None
    proposed_ratio: float | None
    increase: float | None
    excused: bool | None
    live_increase: float | None
    alteration: bool
    rule: str


@dataclass(frozen=True)
class Finding:
    """An assessment of one member, as interface.md's `assess --json` describes it.

    ratio     governing strength ratio at the readings, of the worst candidate; None where a check has no capacity
    wood      label of the candidate that governs
    use       the use or load it is judged for, in words with its figures
    leading   the assumption that matters most, to stand beside the verdict
    """

    verdict: str
    ratio: float | None
    governs: Governs | None
    range: None
    service: str
    service_ratio: float | None
    live_load: LiveLoad
    change_of_use: ChangeOfUse | None
    shore_now: bool
    checks: tuple[Check, ...]
    settle: None
    assumptions: tuple[str, ...]
    cautions: tuple[str, ...]
    wood: str
    use: str
    leading: str

    def to_json(self) -> dict[str, Any]:
        """Plain data for JSON: no NaN, no infinity; a number that does not exist is null."""
        data = asdict(self)
        data["checks"] = list(data["checks"])
        data["assumptions"], data["cautions"] = list(self.assumptions), list(self.cautions)
        return data


def finite(value: float) -> float | None:
    """The number, or None where it does not exist.

    >>> finite(float("inf")) is None, finite(1.5)
    (True, 1.5)
    """
    return float(value) if math.isfinite(value) else None
