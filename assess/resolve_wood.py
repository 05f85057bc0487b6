"""From the wood as recorded to the values each candidate may be trusted with."""

from __future__ import annotations

from dataclasses import dataclass

from assess.errors import ReadingError
from assess.record import Member
from assess.record_parts import Wood
from assess.scenario import WoodValues
from species import WoodError, reference_values

TIMBER_IN = 4.5  # least thickness of a timber, NDS Supplement Table 4D
COV_E = 0.25  # visually graded lumber, NDS 2018 Appendix D and F


@dataclass(frozen=True)
class ResolvedWood:
    """Candidates with their values, and what must be said of them."""

    woods: tuple[WoodValues, ...]
    assumptions: tuple[str, ...]
    cautions: tuple[str, ...]


BASIS_CAUTION = {
    "stamp": "the stamp is of the piece as graded: later notches, splits or ripping come off it or void it",
    "certificate": "the certificate is of the piece as graded: later damage comes off it",
    "graded in place": "graded in place: faces that were hidden are not graded",
    "assumed": "wood species and grade are assumed, not read from a stamp: this decides the answer",
}


def resolve_wood(member: Member, ply_in: float, depth_in: float) -> ResolvedWood:
    """Values of each candidate wood of a member.

    member            the record, with `wood` given
    ply_in, depth_in  measured breadth of one ply and depth [in]
    returns           ResolvedWood
    raises            ReadingError where a species or grade has no values at this size
    """
    wood = member.wood
    if wood is None:
        raise ReadingError("wood", None, "species and grade, candidates, or values with their source", "is missing")
    if wood.values is not None:
        return _typed(wood, ply_in, depth_in)
    rules = wood.rules or "current"
    pairs = [(c.species, c.grade) for c in wood.candidates] if wood.candidates else [(wood.species, wood.grade)]
    woods: list[WoodValues] = []
    notes: list[str] = []
    for index, (species, grade) in enumerate(pairs):
        field = f"wood.candidates.{index}" if wood.candidates else "wood"
        try:
            found = reference_values(species or "", grade or "", min(ply_in, depth_in), max(ply_in, depth_in), rules)
        except WoodError as error:
            raise ReadingError(f"{field}.{error.field}", error.value, error.accepted, error.problem) from None
        notes += found.notes
        woods.append(
            WoodValues(
                label=f"{found.species} {found.grade}",
                species=found.species,
                grade=found.grade,
                size_class=found.size_class,
                lumber=found.tables != ("4D",),
                timber="4D" in found.tables,
                cf_rules=tuple(_cf_rule(table, found.grade) for table in found.tables),
                Fb=found.Fb,
                Fv=found.Fv,
                Fc_perp=found.Fc_perp,
                E=found.E,
                Emin=found.Emin,
                G=found.G,
                source=found.source,
            )
        )
    basis = wood.basis or "assumed"
    sources = [f"{w.label}: {w.source}" for w in woods]
    return ResolvedWood(tuple(woods), tuple(dict.fromkeys((*sources, *notes))), (BASIS_CAUTION[basis],))


def _cf_rule(table: str, grade: str) -> str:
    """Which size-factor rule of the Supplement the grade follows."""
    if table == "4D":
        return "timber"
    if table == "4B":
        return "southern pine"
    return {
        "Stud": "stud",
        "Construction": "light framing",
        "Standard": "light framing",
        "Utility": "utility",
    }.get(grade, "dimension")


def _typed(wood: Wood, ply_in: float, depth_in: float) -> ResolvedWood:
    """Values typed by an engineer: taken after CF and Cfu; the other factors apply by the piece's own thickness."""
    values = wood.values
    assert values is not None
    assumptions = [f"design values typed, taken after CF and Cfu; source: {wood.source}"]
    E = values.E.value
    if values.Emin is not None:
        Emin = values.Emin.value
    else:
        Emin = 1.03 * E * (1 - 1.645 * COV_E) / 1.66
        assumptions.append(f"Emin {Emin:.0f} psi from E with COV 0.25 (NDS Appendix D)")
    G = values.G
    if G is None:
        G = 0.55
        assumptions.append("specific gravity 0.55 taken for own weight (none was typed; the heavier softwoods)")
    made = WoodValues(
        label="typed values",
        species="",
        grade="",
        size_class="",
        lumber=min(ply_in, depth_in) < TIMBER_IN,
        timber=min(ply_in, depth_in) >= TIMBER_IN,
        cf_rules=("none",),
        Fb=values.Fb.value,
        Fv=values.Fv.value,
        Fc_perp=values.Fc_perp.value,
        E=E,
        Emin=Emin,
        G=G,
        source=wood.source or "",
    )
    return ResolvedWood((made,), tuple(assumptions), ("design values are an engineer's, not from a published table",))
