"""Scenarios built straight from numbers, for tests of the engine that need no record."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from assess.scenario import Edge, Part, Scenario, Stage, UseLoad, WoodValues

HEM_FIR_2 = WoodValues(
    "Hem-Fir No. 2", "Hem-Fir", "No. 2", "10 in wide", True, False, ("dimension",),
    850.0, 150.0, 405.0, 1.3e6, 470000.0, 0.43, "NDS Supplement 2018 Table 4A, recalled",
)  # fmt: skip
OFFICES = UseLoad("offices", 50.0, 15.0, 2000.0, 30.0, 30.0, "ASCE 7-16 Table 4.3-1")
PLAIN = UseLoad("as typed", 40.0, 0.0, None, 30.0, 30.0, "typed")

_BASE = Scenario(
    kind="joist",
    parts=(Part("member", 1.5, 9.25, 1, False, False, (HEM_FIR_2,)),),
    stages=(Stage((0,)),),
    spans_in=(160.0,),
    overhang_left_in=0.0,
    overhang_right_in=0.0,
    face_in=(0.75, 0.75),
    bearing_in=(1.5, 1.5),
    bearing_measured=(True, True),
    bearing_on="wood",
    separate=False,
    hold_down=(),
    loaded_on_top=True,
    spacing_in=16.0,
    tributary_in=16.0,
    alike=3,
    top=Edge(held=True),
    bottom=Edge(),
    ends_held=True,
    wet=False,
    moisture_percent=19.0,
    temperature_F=None,
    incised=False,
    on_flat=False,
    dead_psf=10.0,
    own_weight=False,
    slope_cos=1.0,
    live=PLAIN,
    present=None,
    snow_psf=0.0,
    roof_live_psf=0.0,
    point_loads=(),
    line_loads=(),
    limit_live=360.0,
    limit_total=240.0,
    losses=(),
    splits=(),
    lost_bearings=(),
    hung_de_in=None,
    assumptions=("invented for a test",),
    cautions=(),
    pending=(),
)


def scenario(**changes: Any) -> Scenario:
    """A 2x10 Hem-Fir No. 2 joist at 16 in over 160 in, 10 + 40 psf, with changes; part fields may be named too."""
    part = {k: changes.pop(k) for k in ("width_in", "depth_in", "plies", "plies_fastened", "woods") if k in changes}
    base = replace(_BASE, parts=(replace(_BASE.parts[0], **part),))
    made = replace(base, **changes)
    supports = len(made.spans_in) + 1
    if len(made.face_in) != supports:
        made = replace(
            made, face_in=(0.75,) * supports, bearing_in=(1.5,) * supports, bearing_measured=(True,) * supports
        )
    return made
