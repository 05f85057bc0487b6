"""Adjustment-factor tables of NDS 2018 and its Supplement, each standing once: looked up by class, not computed."""

from __future__ import annotations

from assess.errors import ReadingError

# NDS Supplement 2018 Table 4A, size factor CF on Fb for SS, No. 1 & Btr, No. 1, No. 2, No. 3:
# nominal width -> (2 and 3 in thick, 4 in thick).
CF_DIMENSION = {
    2: (1.5, 1.5),
    3: (1.5, 1.5),
    4: (1.5, 1.5),
    5: (1.4, 1.4),
    6: (1.3, 1.3),
    8: (1.2, 1.3),
    10: (1.1, 1.2),
    12: (1.0, 1.1),
    14: (0.9, 1.0),
}
CF_STUD = {2: 1.1, 3: 1.1, 4: 1.1, 5: 1.0, 6: 1.0}
CF_UTILITY = {2: 0.4, 3: 0.4, 4: 1.0}

# NDS Supplement 2018 Tables 4A and 4B, flat-use factor Cfu on Fb: nominal width -> (2 and 3 in thick, 4 in thick).
CFU_DIMENSION = {
    2: (1.0, 1.0),
    3: (1.0, 1.0),
    4: (1.1, 1.0),
    5: (1.1, 1.05),
    6: (1.15, 1.05),
    8: (1.15, 1.05),
    10: (1.2, 1.1),
    12: (1.2, 1.1),
    14: (1.2, 1.1),
}
# NDS Supplement 2018 Table 4D, beams and stringers loaded on the wide face: grade -> (Fb, E and Emin).
CFU_STRINGER = {"Select Structural": (0.86, 1.0), "No. 1": (0.74, 0.90), "No. 2": (1.0, 1.0)}

# NDS 2018 Table 2.3.3, temperature factor Ct: to temperature (deg F) -> (E and Emin, strength dry, strength wet).
CT_ROWS = ((100.0, 1.0, 1.0, 1.0), (125.0, 0.9, 0.8, 0.7), (150.0, 0.9, 0.7, 0.5))

# NDS Supplement 2018 Table 4A/4B, wet service factor CM: value above 19 % moisture.
CM_DIMENSION = {"Fb": 0.85, "Fv": 0.97, "Fc_perp": 0.67, "E": 0.9}
CM_FB_STEP_PSI = 1150.0  # where Fb CF is no more than this, CM on Fb is 1.0
CM_TIMBER_FC_PERP = 0.67  # Table 4D; Southern Pine timbers serve wet or dry at their values

# NDS 2018 Table 4.3.8, incising factor Ci.
CI = {"Fb": 0.80, "Fv": 0.80, "Fc_perp": 1.0, "E": 0.95}

REPETITIVE = 1.15  # NDS 2018 4.3.9, Cr
KCR_DRY = 1.5  # NDS 2018 3.5.2, seasoned lumber in dry service
KCR_WET = 2.0  # unseasoned, or wet in service


def size_factor(rule: str, thickness_class: int, width_class: int, depth_in: float, on_flat: bool) -> float:
    """CF on Fb by the rule of the piece's table.

    rule              'dimension', 'stud', 'light framing', 'utility', 'southern pine', 'timber' or 'none'
    thickness_class   nominal thickness of the piece's lesser dimension [in]
    width_class       nominal width of its greater dimension [in]; 14 stands for 14 and wider
    depth_in          depth in the direction of load [in]; only timbers use it
    on_flat           True where load is on the wide face
    returns           CF [-]
    raises            ReadingError where the grade has no values at this width
    source            NDS Supplement 2018 Tables 4A, 4B, 4D, adjustment factors

    >>> size_factor("dimension", 2, 10, 9.25, False)
    1.1
    >>> round(size_factor("timber", 8, 16, 15.5, False), 4)
    0.972
    """
    column = 1 if thickness_class >= 4 else 0
    if rule == "dimension":
        return CF_DIMENSION[width_class][column]
    if rule in ("stud", "utility"):
        table = CF_STUD if rule == "stud" else CF_UTILITY
        if width_class not in table:
            raise ReadingError("wood.grade", rule, f"a grade with values at {width_class} in wide", "has no values")
        return table[width_class]
    if rule == "southern pine":
        return (1.1 if thickness_class >= 4 and width_class >= 8 else 1.0) * (0.9 if width_class >= 14 else 1.0)
    if rule == "timber":
        # The formula is for loads on the narrow face of timbers deeper than 12 in.
        return (12.0 / depth_in) ** (1.0 / 9.0) if depth_in > 12.0 and not on_flat else 1.0
    return 1.0


def flat_use_factor(
    rule: str, size_class: str, grade: str, thickness_class: int, width_class: int
) -> tuple[float, float]:
    """Cfu on Fb, and on E and Emin, for a piece loaded on its wide face.

    returns   (factor on Fb, factor on E and Emin) [-]
    source    NDS Supplement 2018 Tables 4A, 4B (Fb) and 4D (beams and stringers)

    >>> flat_use_factor("dimension", "", "No. 2", 2, 10)
    (1.2, 1.0)
    """
    if rule == "none":
        return 1.0, 1.0
    if rule == "timber":
        if size_class != "beams and stringers":
            return 1.0, 1.0
        return CFU_STRINGER.get(grade.replace("Dense ", ""), CFU_STRINGER["No. 1"])
    return CFU_DIMENSION[width_class][1 if thickness_class >= 4 else 0], 1.0


def temperature_factor(temperature_F: float | None, wet: bool) -> tuple[float, float] | None:
    """Ct on E and Emin, and on strengths; None above 150 deg F, where the standard gives none.

    temperature_F   sustained temperature [deg F]; None is ordinary
    source          NDS 2018 Table 2.3.3

    >>> temperature_factor(110.0, wet=False)
    (0.9, 0.8)
    """
    if temperature_F is None:
        return 1.0, 1.0
    for limit, on_E, dry, when_wet in CT_ROWS:
        if temperature_F <= limit:
            return on_E, (when_wet if wet else dry)
    return None
