"""How a line of the form was understood, in words; what may be picked for it; what the form has no line for."""

from __future__ import annotations

from typing import Any

from assess.errors import ReadingError
from assess.reading import Reading
from assess.reading_shown import as_text
from assess.record import Member
from assess.record_fields import Record
from tui.clean import clean
from tui.fields import BY_KEY, FORM, Field


def understood(member: Member, field: Field, units: str = "US") -> str:
    """How a line's reading was understood; '' where its own words say it already."""
    value: Any = member
    for name in field.path:
        value = getattr(value, name, None)
    if value is None:
        return ""
    if field.key == "size.nominal":
        return _nominal(value, getattr(member.size, "dressing", None))
    return clean(_shown(value, field, units), longest=300)


def _shown(value: Any, field: Field, units: str) -> str:
    if isinstance(value, Reading):
        if value.spread:
            mean = as_text(value.value, value.quantity, value.metric, digits=4)
            spread = as_text(2 * value.spread, value.quantity, value.metric, is_tolerance=True, digits=3)
            return f"mean {mean}, spread {spread}"
        return value.shown(units)
    if isinstance(value, bool):
        return ""
    if field.form == "dead" and isinstance(value, tuple):
        return f"{len(value)} layers, {_layers_psf(value):.3g} psf"
    if field.form == "points":
        return "; ".join(f"{p.load.shown()} at {p.at.shown()}" for p in value)
    if field.form == "lines":
        return "; ".join(f"{n.load.shown()}, {n.from_.shown()} to {n.to.shown()}" for n in value)
    if field.form == "condition":
        return "; ".join(_defect(defect) for defect in value)
    if field.form == "candidates":
        return f"{len(value)} woods"
    if isinstance(value, tuple):
        return "; ".join(_shown(item, field, units) for item in value)
    if field.form == "use":
        return _use(value)
    if field.key in ("wood.species", "wood.grade"):
        from species import match_grade, match_species

        return match_species(value) if field.key == "wood.species" else match_grade(value)
    return ""


def _nominal(name: str, dressing: str | None) -> str:
    from assess.record_parts import section_by_name

    thickness, width = section_by_name(name, dressing)
    return f"{thickness:g} x {width:g} in, {dressing or 'current'}"


def _layers_psf(layers: tuple[Any, ...]) -> float:
    from assess.materials import layer_psf

    total = 0.0
    for layer in layers:
        thickness = layer.thickness.value if layer.thickness is not None else None
        total += layer.load.value if layer.load is not None else layer_psf(layer.layer, thickness)[0]
    return total


def _defect(defect: Any) -> str:
    values = {name: getattr(defect, name) for name in type(defect).model_fields}
    readings = [f"{name} {value.shown()}" for name, value in values.items() if isinstance(value, Reading)]
    return ", ".join([defect.defect, *readings])


def _use(use: Any) -> str:
    if isinstance(use, Record):
        loads = [reading.shown() for name in ("live", "concentrated") if (reading := getattr(use, name)) is not None]
        return ", ".join(loads)
    from assess.uses import use_named

    found = use_named(use)
    words = f"{found.uniform_psf:g} psf"
    if found.concentrated_lb:
        words += f", {found.concentrated_lb:,.0f} lb"
    if found.partition_psf:
        words += f", partitions {found.partition_psf:g} psf"
    return words if found.name == use else f"{found.name}, {words}"


def choices(field: Field, data: dict[str, Any]) -> list[str]:
    """Words to suggest for a line; never applied unasked.

    data   raw record: the grades suggested are those of its species
    """
    if field.form == "use":
        from assess.uses import all_uses

        return [use.name for use in all_uses()]
    if field.form == "points":
        from assess.things import all_things

        # The place is the one thing no list knows: it is typed over the question mark.
        return [f"{thing.name} {thing.load_lb:g} lb at ? {thing.load_type}" for thing in all_things()]
    if field.form == "words":
        return [word.strip() for word in field.hint.split(",")]
    if field.form == "yes":
        return ["yes", "no"]
    if field.form == "edge":
        return ["held", "ends only"]
    if field.key == "moisture":
        return ["dry", "wet"]
    if field.key == "wood.species":
        from species.tables import species_names

        return list(species_names())
    if field.key == "wood.grade":
        return _grades(data)
    return []


def _grades(data: dict[str, Any]) -> list[str]:
    from species import WoodError, match_species
    from species.catalogue import rows
    from species.tables import grade_names

    wood = data.get("wood")
    try:
        species = match_species(str(wood["species"])) if isinstance(wood, dict) and wood.get("species") else None
        found = list(dict.fromkeys(row.grade for row in rows(species))) if species else []
    except WoodError:
        found = []
    return found or list(grade_names())


def also_recorded(member: Member) -> list[str]:
    """Fields the record holds that the form has no line for, in words."""
    known = {field.path[0] for field in FORM}
    return [name.replace("_", " ") for name in sorted(member.model_fields_set) if name not in known]


def refusal(error: ReadingError, field: Field) -> str:
    """Why a text is refused, said of the form's own label."""
    named = BY_KEY.get(error.field)
    inner = error.field.removeprefix(field.key).lstrip(".") if error.field.startswith(field.key) else error.field
    label = named.label if named is not None else f"{field.label} {inner}".strip() if inner != field.label else inner
    return clean(error.at(label.replace(".", " ")).line(), longest=400)
