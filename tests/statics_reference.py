"""Independent beam solutions to hold the statics against: exact direct stiffness in fractions, and sympy's Beam."""

from __future__ import annotations

import random
from dataclasses import dataclass
from fractions import Fraction
from itertools import pairwise

import sympy
from sympy.physics.continuum_mechanics.beam import Beam


@dataclass(frozen=True)
class Case:
    """A member in exact numbers: stations, EI of each segment, support stations, and loads by load case."""

    x: tuple[Fraction, ...]
    EI: tuple[Fraction, ...]
    supports: tuple[int, ...]
    w: tuple[tuple[Fraction, ...], ...]
    P: tuple[tuple[Fraction, ...], ...]


@dataclass(frozen=True)
class Answer:
    """Moment, shear left and right of each station, reactions and downward deflection of each load case."""

    M: list[list[float]]
    V_left: list[list[float]]
    V_right: list[list[float]]
    R: list[list[float]]
    y: list[list[float]]


def generate(
    number: int, *, several: bool, stepped: bool, overhang: bool, load_cases: int = 3, spans: int = 5, extra: int = 6
) -> Case:
    """A member made from its number, of at most so many spans and stations besides.

    Lengths are in quarter inches, EI in 1e5 lb-in2, line loads in quarter pounds.
    """
    rng = random.Random(number)
    bounds = [rng.randint(16, 720) for _ in range(rng.randint(2, spans) if several else 1)]
    left = rng.randint(8, 200) if overhang and rng.random() < 0.7 else 0
    right = rng.randint(8, 200) if overhang and (left == 0 or rng.random() < 0.5) else 0
    places = {0}
    at = left
    held = [at]
    for span in bounds:
        at += span
        held.append(at)
    end = at + right
    places.update(held, [end], (rng.randint(1, end - 1) for _ in range(rng.randint(1, extra))))
    quarters = sorted(places)
    N = len(quarters)
    base = rng.randint(200, 20000)
    EI = [base * 100_000] * (N - 1)
    if stepped:
        EI = [max(1, base * rng.randint(5, 120) // 100) * 100_000 for _ in EI]
    w, P = [], []
    for _ in range(load_cases):
        w.append([Fraction(rng.choice((0, rng.randint(0, 400))), 4) for _ in range(N - 1)])
        P.append(tuple(Fraction(rng.choice((0, 0, rng.randint(-2000, 8000)))) for _ in range(N)))
    # Every case has some load on its longest segment: none is empty, or loaded only where nothing can move.
    longest = max(range(N - 1), key=lambda n: quarters[n + 1] - quarters[n])
    for row in w:
        row[longest] += 1
    supports = tuple(quarters.index(place) for place in held)
    return Case(
        tuple(Fraction(q, 4) for q in quarters), tuple(map(Fraction, EI)), supports, tuple(map(tuple, w)), tuple(P)
    )


def stiffness_answer(case: Case) -> Answer:
    """Direct stiffness of Hermite elements between stations, with every number a fraction: exact.

    Unknowns are the upward displacement and anticlockwise turn of each station. Under a uniform load the cubic
    element is exact at its ends (fixed-end forces). Source: matrix structural analysis, any textbook.
    """
    N, C = len(case.x), len(case.w)
    size = 2 * N
    K = [[Fraction(0)] * size for _ in range(size)]
    F = [[Fraction(0)] * C for _ in range(size)]
    elements = []
    for n in range(N - 1):
        L, EI = case.x[n + 1] - case.x[n], case.EI[n]
        a, b, c, d = 12 * EI / L**3, 6 * EI / L**2, 4 * EI / L, 2 * EI / L
        k = [[a, b, -a, b], [b, c, -b, d], [-a, -b, a, -b], [b, d, -b, c]]
        fixed = [[w[n] * L / 2, w[n] * L**2 / 12, w[n] * L / 2, -w[n] * L**2 / 12] for w in case.w]
        elements.append((k, fixed))
        for i in range(4):
            for j in range(4):
                K[2 * n + i][2 * n + j] += k[i][j]
            for q in range(C):
                F[2 * n + i][q] -= fixed[q][i]
    for n in range(N):
        for q in range(C):
            F[2 * n][q] -= case.P[q][n]
    held = {2 * s for s in case.supports}
    free = [i for i in range(size) if i not in held]
    u = [[Fraction(0)] * C for _ in range(size)]
    solved = _eliminate([[K[i][j] for j in free] + F[i] for i in free], C)
    for i, row in zip(free, solved, strict=True):
        u[i] = row
    M, V_left, V_right, R, y = [], [], [], [], []
    for q in range(C):
        ends = []
        for n, (k, fixed) in enumerate(elements):
            local = [u[2 * n + i][q] for i in range(4)]
            ends.append([sum(k[i][j] * local[j] for j in range(4)) + fixed[q][i] for i in range(4)])
        M.append([float(-e[1]) for e in ends] + [float(ends[-1][3])])
        V_right.append([float(e[0]) for e in ends] + [0.0])
        V_left.append([0.0] + [float(-e[2]) for e in ends])
        R.append([float(sum(K[2 * s][j] * u[j][q] for j in range(size)) - F[2 * s][q]) for s in case.supports])
        y.append([float(-u[2 * n][q]) for n in range(N)])
    return Answer(M, V_left, V_right, R, y)


def _eliminate(rows: list[list[Fraction]], rhs: int) -> list[list[Fraction]]:
    """Solve a symmetric positive definite system by elimination without pivoting, skipping zeros."""
    n = len(rows)
    for i in range(n):
        filled = [j for j in range(i, n + rhs) if rows[i][j]]
        for below in range(i + 1, n):
            if rows[below][i]:
                ratio = rows[below][i] / rows[i][i]
                for j in filled:
                    rows[below][j] -= ratio * rows[i][j]
    for i in reversed(range(n)):
        for q in range(n, n + rhs):
            total = rows[i][q] - sum(rows[i][j] * rows[j][q] for j in range(i + 1, n) if rows[i][j])
            rows[i][q] = total / rows[i][i]
    return [row[n:] for row in rows]


def sympy_answer(case: Case) -> Answer:
    """sympy.physics.continuum_mechanics.beam.Beam over the first load case of a member of one stiffness.

    Shear is read in the middle of each segment and carried to its ends, away from sympy's jumps.
    """
    x, w, P = [sympy.Rational(f) for f in case.x], case.w[0], case.P[0]
    assert len(set(case.EI)) == 1, "sympy's Beam gives wrong deflections where stiffness is stepped"
    beam = Beam(x[-1], sympy.Rational(case.EI[0]), 1)
    reactions = [beam.apply_support(x[s], "pin") for s in case.supports]
    for n, load in enumerate(w):
        if load:
            beam.apply_load(sympy.Rational(load), x[n], 0, end=x[n + 1])
    for n, load in enumerate(P):
        if load:
            beam.apply_load(sympy.Rational(load), x[n], -1)
    beam.solve_for_reaction_loads(*reactions)
    moment, shear, deflection = beam.bending_moment(), beam.shear_force(), beam.deflection()
    middle = [_value(shear, beam.variable, (a + b) / 2) for a, b in pairwise(x)]
    half = [sympy.Rational(load) * (b - a) / 2 for load, a, b in zip(w, x[:-1], x[1:], strict=True)]
    return Answer(
        M=[[float(_value(moment, beam.variable, at)) for at in x]],
        V_left=[[0.0] + [float(v - h) for v, h in zip(middle, half, strict=True)]],
        V_right=[[float(v + h) for v, h in zip(middle, half, strict=True)] + [0.0]],
        R=[[float(-beam.reaction_loads[r]) for r in reactions]],
        y=[[float(_value(deflection, beam.variable, at)) for at in x]],
    )


def _value(expression: sympy.Expr, variable: sympy.Symbol, at: sympy.Rational) -> sympy.Rational:
    """A sum of powers and singularity functions <x - a>^n, n >= 0, at a place."""
    total = sympy.S.Zero
    for term in sympy.Add.make_args(expression):
        factor, rest = term.as_coeff_Mul()
        if isinstance(rest, sympy.SingularityFunction):
            _, start, power = rest.args
            total += factor * ((at - start) ** power if at >= start else 0)
        else:
            total += term.subs(variable, at)
    return total
