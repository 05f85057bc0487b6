"""Adjusted design values (NDS 2018 4.3): which factor applies when, and the products that use them."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy import where
from numpy.typing import NDArray

from assess import stability
from assess.factors import (
    CI,
    CM_DIMENSION,
    CM_FB_STEP_PSI,
    CM_TIMBER_FC_PERP,
    REPETITIVE,
    flat_use_factor,
    size_factor,
    temperature_factor,
)
from assess.scenario import Edge, Scenario
from assess.trace import Array, Trace, formula
from assess.variants import PartRows, Rows
from species.sizes import size_class, thickness_class


@formula("Fb*", "psi", "NDS 3.3.3.8, 4.3")
def Fb_star(Fb: Array, CD: Array, CM_Fb: Array, Ct: Array, CF: Array, Ci: Array, Cr: Array) -> Array:
    """Bending value with every factor but CL and Cfu.

    >>> float(Fb_star(900.0, 1.0, 1.0, 1.0, 1.1, 1.0, 1.15))
    1138.5
    """
    return Fb * CD * CM_Fb * Ct * CF * Ci * Cr


@formula("Fb'", "psi", "NDS 4.3, Table 4.3.1")
def Fb_prime(Fb_star: Array, CL: Array, Cfu: Array) -> Array:
    """Adjusted bending design value."""
    return Fb_star * CL * Cfu


@formula("Fv'", "psi", "NDS 4.3, Table 4.3.1")
def Fv_prime(Fv: Array, CD: Array, CM_Fv: Array, Ct: Array, Ci: Array) -> Array:
    """Adjusted shear design value parallel to grain."""
    return Fv * CD * CM_Fv * Ct * Ci


@formula("Fc_perp'", "psi", "NDS 4.3, 3.10.4")
def Fc_perp_prime(Fc_perp: Array, CM_Fc: Array, Ct: Array, Ci_c: Array, Cb: Array) -> Array:
    """Adjusted compression design value perpendicular to grain."""
    return Fc_perp * CM_Fc * Ct * Ci_c * Cb


@formula("E'", "psi", "NDS 4.3, Table 4.3.1")
def E_prime(E: Array, CM_E: Array, Ct_E: Array, Ci_E: Array, Cfu_E: Array) -> Array:
    """Adjusted modulus of elasticity."""
    return E * CM_E * Ct_E * Ci_E * Cfu_E


@formula("Emin'", "psi", "NDS 4.3, Table 4.3.1")
def Emin_prime(Emin: Array, CM_E: Array, Ct_E: Array, Ci_E: Array, Cfu_E: Array) -> Array:
    """Adjusted modulus of elasticity for stability."""
    return Emin * CM_E * Ct_E * Ci_E * Cfu_E


@formula("CM", "", "NDS Supplement Table 4A/4B, wet service")
def CM_bending(Fb: Array, CF: Array, CM_Fb_wet: Array, step: float) -> Array:
    """Wet service factor on Fb; 1.0 where Fb CF is at or under the step.

    >>> float(CM_bending(900.0, 1.2, 0.85, 1150.0)), float(CM_bending(1000.0, 1.2, 0.85, 1150.0))
    (1.0, 0.85)
    """
    return where(Fb * CF <= step, 1.0, CM_Fb_wet)


@dataclass(frozen=True)
class Factors:
    """Factors of one part over K rows, arrays [K, 1, 1]; `none` says why none exists."""

    CM_Fb: Array
    CM_Fv: Array
    CM_Fc: Array
    CM_E: Array
    Ct: Array
    Ct_E: Array
    CF: Array
    Cfu: Array
    Cfu_E: Array
    Ci: Array
    Ci_c: Array
    Ci_E: Array
    Cr: Array
    none: str | None


def factors(scenario: Scenario, rows: Rows, part: PartRows, trace: Trace | None = None) -> Factors:
    """Every adjustment factor of a part but CD, CL and Cb, with its conditions (NDS 2018 4.3).

    scenario, rows, part   the member and the part's K rows
    returns                Factors, arrays [K, 1, 1]
    """
    K = rows.count
    names = ("CM_Fv", "CM_Fc", "CM_E", "CF", "Cfu", "Cfu_E", "Ci", "Ci_c", "Ci_E", "Cr")
    table = np.ones((len(names), K))
    column = dict(zip(names, table, strict=True))
    CM_Fb_wet = np.ones(K)
    for k, wood in enumerate(part.woods):
        thickness = min(float(part.ply_in[k]), float(part.depth_in[k]))
        width = max(float(part.ply_in[k]), float(part.depth_in[k]))
        t_class, w_class = thickness_class(thickness), size_class(width)
        depth, flat = float(part.depth_in[k]), scenario.on_flat
        column["CF"][k] = min(size_factor(rule, t_class, w_class, depth, flat) for rule in wood.cf_rules)
        if flat:
            pairs = [flat_use_factor(rule, wood.size_class, wood.grade, t_class, w_class) for rule in wood.cf_rules]
            column["Cfu"][k] = min(on_Fb for on_Fb, _ in pairs)
            column["Cfu_E"][k] = min(on_E for _, on_E in pairs)
        if scenario.wet:
            if wood.lumber:
                CM_Fb_wet[k] = CM_DIMENSION["Fb"]
                column["CM_Fv"][k], column["CM_E"][k] = CM_DIMENSION["Fv"], CM_DIMENSION["E"]
                column["CM_Fc"][k] = CM_DIMENSION["Fc_perp"]
            elif wood.species != "Southern Pine":
                column["CM_Fc"][k] = CM_TIMBER_FC_PERP  # Southern Pine timbers serve wet or dry
        if scenario.incised and wood.lumber:
            column["Ci"][k], column["Ci_c"][k], column["Ci_E"][k] = CI["Fb"], CI["Fc_perp"], CI["E"]
        if repetitive(scenario, wood.lumber and not wood.timber):
            column["Cr"][k] = REPETITIVE
    Ct = temperature_factor(scenario.temperature_F, scenario.wet)
    Ct_E, Ct_strength = Ct if Ct is not None else (1.0, 1.0)
    shaped = {name: values.reshape(K, 1, 1) for name, values in column.items()}
    Fb = part.wood("Fb").reshape(K, 1, 1)
    if scenario.wet:
        CM_Fb = CM_bending.on(trace, Fb, shaped["CF"], CM_Fb_wet.reshape(K, 1, 1), CM_FB_STEP_PSI)
    else:
        CM_Fb = np.ones((K, 1, 1))
    return Factors(
        CM_Fb=CM_Fb,
        Ct=np.full((1, 1, 1), Ct_strength),
        Ct_E=np.full((1, 1, 1), Ct_E),
        none=None if Ct is not None else "temperature is over 150 °F: the standard gives no temperature factor",
        **shaped,
    )


def repetitive(scenario: Scenario, lumber: bool) -> bool:
    """Whether Cr applies: dimension lumber, three or more, spacing known and to 24 in, joined by flooring that shares.

    >>> from assess.factors import REPETITIVE
    >>> REPETITIVE
    1.15
    """
    spacing = scenario.spacing_in
    return lumber and scenario.alike >= 3 and spacing is not None and spacing <= 24.0 and scenario.top.held


@dataclass(frozen=True)
class Bending:
    """Fb' for one sign of moment, [K, C, N] or less; `slender` marks where RB is over 50 and no value exists."""

    value: Array
    CL: Array
    slender: NDArray[np.bool_]


def bending_value(
    scenario: Scenario,
    part: PartRows,
    f: Factors,
    star: Array,
    sagging: bool,
    uniform_only: NDArray[np.bool_],
    x: Array,
    supports: Array,
    trace: Trace | None = None,
) -> Bending:
    """Fb' of a part at every station for one sign of moment.

    star           Fb* [K, C, 1] [psi]
    sagging        True for sagging moment (top edge in compression), False for hogging (bottom edge)
    uniform_only   [1, C, 1] True where a combination holds nothing but uniform load over one whole simple span
    x, supports    stations [K, N] and support places [K, S] [in]
    returns        Bending
    source         NDS 2018 3.3.3, Table 4.3.1
    """
    edge = scenario.top if sagging else scenario.bottom
    b = part.stability_in[:, None, None]
    d = part.depth_in[:, None, None]
    deep = d > b
    if part.round or not bool(deep.any()) or edge.held:
        # 3.3.3.1, 3.3.3.3: not deeper than broad, or the compression edge held along its length.
        one = np.ones((1, 1, 1))
        return Bending(Fb_prime.on(trace, star, one, f.Cfu), one, np.zeros((1, 1, 1), dtype=bool))
    lu = stability.unbraced_length(x, edge, supports, scenario.ends_held)[:, None, :]
    if trace is not None:
        trace.value("lu", lu, "in", "bracing as read", "unbraced length of the compression edge")
    le = _effective_length(scenario, sagging, edge, lu, d, uniform_only, x, supports, trace)
    ratio = stability.RB.on(trace, le, d, b)
    E = Emin_prime.on(trace, part.wood("Emin")[:, None, None], f.CM_E, f.Ct_E, f.Ci_E, f.Cfu_E)
    with np.errstate(divide="ignore"):
        euler = stability.FbE.on(trace, E, ratio)
    # A length of nothing at a free tip gives no slenderness: alpha is held finite, where CL is 1.
    slope = np.minimum(stability.alpha.on(trace, euler, star), 1e6)
    CL = np.where(deep, stability.CL.on(trace, slope), 1.0)
    return Bending(Fb_prime.on(trace, star, CL, f.Cfu), CL, deep & (ratio > stability.RB_LIMIT))


def _effective_length(
    scenario: Scenario,
    sagging: bool,
    edge: Edge,
    lu: Array,
    d: Array,
    uniform_only: NDArray[np.bool_],
    x: Array,
    supports: Array,
    trace: Trace | None,
) -> Array:
    """Effective length by the row of NDS Table 3.3.3 that fits: the general row wherever no narrower one does."""
    free = edge.every_in is None and not edge.places_in
    if sagging and scenario.simple and free and bool(uniform_only.all()):
        return stability.le_uniform.on(trace, lu, d)
    general = stability.le_general.on(trace, lu, d)
    if sagging and scenario.simple and free:
        return np.where(uniform_only, stability.le_uniform.on(trace, lu, d), general)
    if not sagging and free and not scenario.simple:
        tip = ((x < supports[:, :1]) | (x > supports[:, -1:]))[:, None, :]
        if bool(tip.any()):
            return np.where(tip & uniform_only, stability.le_cantilever_uniform.on(trace, lu, d), general)
    return general
