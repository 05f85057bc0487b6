"""A joist as the session file has it, and every form of every field of the interface."""

from __future__ import annotations

from typing import Any

JOIST: dict[str, Any] = {
    "kind": "joist",
    "size": {"width": "1 5/8 in", "depth": "7 1/2 in"},
    "wood": {"species": "Douglas Fir-Larch", "grade": "No. 2"},
    "spans": ["13'4\""],
    "spacing": "16 in",
    "dead": "12 psf",
    "proposed_use": "offices",
}


EXTENT = {"at": "3 ft", "length": "4 in"}  # of a defect

# Every field of the interface's table, with values in the forms it names.
FIELDS: dict[str, tuple[Any, ...]] = {
    "kind": ("joist", "beam", "header", "rafter", "ceiling joist", "deck joist"),
    "where": ("north bay, by the hoist door",),
    "bay": ("north bay",),
    "stands_for": ({"count": 22, "measured": 5},),
    "ties_rafters": (True, False),
    "size": (
        {"width": "1 1/2 in", "depth": "7 1/4 in", "plies": 2, "plies_fastened": False, "surface": "rough"},
        {"diameter": "8 in"},
        {"nominal": "2x8", "dressing": "current"},
        {"nominal": "2x8", "dressing": "1925-1969"},
        {"nominal": "2x8", "dressing": "full sawn"},
    ),
    "orientation": ("edge",),
    "wood": (
        {
            "species": "Douglas Fir-Larch", "grade": "No. 2", "basis": "stamp", "stamp": "S-DRY No. 2 D FIR-L",
            "rules": "1991-2013",
        },
        {"species": "HF", "grade": "#2", "basis": "graded in place"},
        {"candidates": [{"species": "SPF", "grade": "SS"}, {"species": "SYP", "grade": "No 2"}]},
        {
            "values": {
                "Fb": "1200 psi", "Fv": "95 psi", "Fc_perp": "400 psi", "E": "1400000 psi", "Emin": "510000 psi",
                "G": 0.45,
            },
            "source": "invented",
        },
    ),
    "spans": (["13'4\""], [["13'4\"", "13'4 1/4\""], "4.06 m"]),
    "overhang_left": ("2 ft", 0),
    "overhang_right": ("2 ft",),
    "span_basis": ("clear", "design"),
    "over_supports": ("continuous", "separate"),
    "bearing": (["3 in"], ["3 in", "3 1/2 in"]),
    "bearing_on": ("wood", "masonry", "hanger"),
    "hanger": ({"kind": "seat"}, {"kind": "fasteners", "de": "5 in"}),
    "loaded_on": ("top", "side"),
    "spacing": ("16 in", 16),
    "tributary": ("4 ft",),
    "alike": (3,),
    "top_edge": ("held", "ends only", "4 ft", ["4 ft", "8 ft"]),
    "bottom_edge": ("held", "ends only", 4, ["4 ft", "8 ft"]),
    "ends_held": (True, False),
    "moisture": ("14 %", "dry", "wet", 14),
    "temperature": ("110 °F", "43 °C"),
    "incised": (True, False),
    "dead": (
        "12 psf", ["12 psf", "13 psf"],
        [{"layer": "hardwood flooring", "thickness": "7/8 in"}, {"layer": "tile on mortar bed", "load": "16 psf"}],
    ),
    "own_weight": ("add", "included"),
    "present_use": ("dwelling, living areas", {"live": "40 psf", "concentrated": "300 lb", "name": "typed"}),
    "proposed_use": ("offices", {"live": "40 psf"}),
    "snow": ("30 psf",),
    "roof_live": ("20 psf",),
    "slope": ("6:12", "26 deg", 26),
    "point_loads": (
        [{"name": "post", "load": "420 lb", "at": "6 ft", "type": t}
         for t in ("dead", "live", "snow", "roof live", "construction", "wind")],
        [{"load": "-300 lb", "at": "6 ft", "type": "wind"}],
    ),
    "line_loads": ([{"name": "wall", "load": "120 plf", "from": "0 ft", "to": "4 ft", "type": "dead"}],),
    "limits": ({"live": "L/360", "total": "L/240"}, {"live": "L/480"}),
    "condition": (
        [{"defect": "notch", "edge": "top", "depth": "1 in"} | EXTENT],
        [{"defect": "notch", "edge": "bottom", "depth": "1 in", "new_work": True} | EXTENT],
        [{"defect": "hole", "at": "3 ft", "diameter": "2 in", "height": "3 in"}],
        [{"defect": "decay", "face": face, "depth": "1/2 in", "margin": "1/4 in"} | EXTENT
         for face in ("top", "bottom", "side", "all")],
        [{"defect": "insects", "face": "side", "depth": "1/2 in"} | EXTENT],
        [{"defect": "end split", "end": end, "remaining": "6 in", "length": "12 in"} for end in ("left", "right")],
        [{"defect": "check"}, {"defect": "check", "depth": "1/2 in"} | EXTENT],
        [{"defect": "char", "faces": ["left", "bottom"], "depth": "1/4 in"} | EXTENT],
        [{"defect": "remaining", "width": "1 1/2 in", "depth": "7 in"} | EXTENT],
        [{"defect": "hanger corrosion", "support": 1}],
    ),
    "sag": ("5/8 in", {"left": "40 in", "middle": "40 3/4 in", "right": "40 in"}),
    "stiffness_test": ({"load": "400 lb", "at": "7 ft", "deflection": "0.11 in", "carried_by": 3},),
    "photos": (["n07-east.jpg"],),
    "remarks": ("stamp read with a torch\nlast letter rubbed",),
    "not_seen": (["top edge, under the boards"],),
    "identified": ({"resin canals": "large"},),
    "graded": (
        {"knots": ["1 in edge", {"size": "2 in", "on": "face"}], "slope_of_grain": "1:9", "wane": "1/4 in",
         "splits": "none", "faces_seen": 3, "rings_per_inch": 8},
    ),
    "partitions": (True, False, "15 psf"),
    "reduce": (True,),
    "supported_area": ("400 ft2",),
    "concentrated_on": (["30 in", "30 in"],),
    "hold_down": ([1, 2],),
    "added": (
        [{"part": "sister", "size": {"width": "1 1/2 in", "depth": "7 1/4 in"},
          "wood": {"species": "SPF", "grade": "#2"}, "from": "0 ft", "to": "13 ft", "bears": [True, True],
          "jacked": 0.5, "fasteners": {"kind": "10d common", "rows": 2, "spacing": "12 in", "at_ends": 4}}],
        [{"part": "plate", "steel": {"thickness": "1/4 in", "depth": "7 in", "Fy": "36000 psi"}}],
    ),
    "new_supports": ([{"at": "6 ft", "bearing": "3 1/2 in", "jacked": 0.0}],),
}  # fmt: skip
