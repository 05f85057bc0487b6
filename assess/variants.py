"""The uncertain numbers of a scenario as K rows; row 0 is as read, and everything after runs over all rows."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from assess.scenario import Scenario, UseLoad, WoodValues
from assess.trace import Array


@dataclass(frozen=True)
class PartRows:
    """One part over K rows: breadth of a ply, of all plies, depth (in), and the wood of each row.

    stability_in   breadth that resists buckling sideways: of one ply unless the plies act as one
    """

    ply_in: Array
    breadth_in: Array
    depth_in: Array
    stability_in: Array
    round: bool
    woods: tuple[WoodValues, ...]

    def wood(self, name: str) -> Array:
        """A value of the wood over the rows, e.g. 'E' [psi]."""
        return np.array([getattr(wood, name) for wood in self.woods])


@dataclass(frozen=True)
class Rows:
    """K rows of numbers: arrays of shape [K], or [K, n] for spans and supports. Loads psf, lengths in.

    judged   how many rows, from the first on, stand under the use that is judged; the rest, where there are any,
             are the same rows under the present use, for the change-of-use ratios
    """

    count: int
    judged: int
    parts: tuple[PartRows, ...]
    spans_in: Array
    overhang_left_in: Array
    overhang_right_in: Array
    face_in: Array
    bearing_in: Array
    tributary_in: Array
    dead_psf: Array
    moisture_percent: Array
    live_psf: Array
    partition_psf: Array
    concentrated_lb: Array
    patch_along_in: Array
    patch_across_in: Array


NO_USE = UseLoad("none", 0.0, 0.0, None, 30.0, 30.0, "")


def variants(scenario: Scenario) -> Rows:
    """Rows of a scenario: one for each candidate wood of the old member, readings as they stand.

    scenario   a member resolved to floats [in, psf, psi]
    returns    rows for each candidate under the use that is judged, then, where a present use is known too, the
               same candidates under that; row 0 has the first candidate
    """
    woods = scenario.parts[0].woods
    judged = len(woods)
    uses = [scenario.live or NO_USE] * judged
    if scenario.live is not None and scenario.present is not None and scenario.present != scenario.live:
        uses += [scenario.present] * judged
    K = len(uses)
    repeats = K // judged

    def column(value: float) -> Array:
        return np.array((value,) * K)

    def table(values: tuple[float, ...]) -> Array:
        return np.array((values,) * K)

    parts = tuple(
        PartRows(
            ply_in=column(part.width_in),
            breadth_in=column(part.width_in * part.plies),
            depth_in=column(part.depth_in),
            stability_in=column(part.width_in * (part.plies if part.plies_fastened else 1)),
            round=part.round,
            woods=part.woods * repeats if index == 0 else part.woods[:1] * K,
        )
        for index, part in enumerate(scenario.parts)
    )
    return Rows(
        count=K,
        judged=judged,
        parts=parts,
        spans_in=table(scenario.spans_in),
        overhang_left_in=column(scenario.overhang_left_in),
        overhang_right_in=column(scenario.overhang_right_in),
        face_in=table(scenario.face_in),
        bearing_in=table(scenario.bearing_in),
        tributary_in=column(scenario.tributary_in),
        dead_psf=column(scenario.dead_psf),
        moisture_percent=column(scenario.moisture_percent),
        live_psf=np.array([use.live_psf * use.reduction for use in uses]),
        partition_psf=np.array([use.partition_psf for use in uses]),
        concentrated_lb=np.array([use.concentrated_lb or 0.0 for use in uses]),
        patch_along_in=np.array([use.patch_along_in for use in uses]),
        patch_across_in=np.array([use.patch_across_in for use in uses]),
    )
