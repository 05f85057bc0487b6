"""The record of the whole survey: tolerances of instruments, stock and site limits for repairs, code editions."""

from __future__ import annotations

from typing import Annotated, Any, Self

from pydantic import model_validator

from assess import quantities as q
from assess.errors import ReadingError
from assess.quantities import Quantity
from assess.reading import Reading
from assess.record_added import Steel
from assess.record_fields import Record, Typed, choice, measured, text, yes_no
from assess.record_lists import record_of, records
from assess.record_parts import Size, Wood


def _half_width(of: Quantity) -> Typed:
    """A tolerance: a length, an angle or percent points, at most a tenth of what the quantity may be."""
    most = of.high / 10
    words = f"a tolerance of 0 to {most:g} {of.unit}, e.g. {of.default_tolerance:g} {of.unit}"
    return measured(Quantity("tolerance", of.unit, of.unit, of.bare_si, 0.0, most, False, 0.0, words))


class Tolerances(Record):
    """Half widths of the instruments' tolerances, by what was measured; the usual ones where not given."""

    size: Annotated[Reading | None, _half_width(q.SIZE)] = None
    length: Annotated[Reading | None, _half_width(q.LENGTH)] = None
    height: Annotated[Reading | None, _half_width(q.HEIGHT)] = None
    margin: Annotated[Reading | None, _half_width(q.MARGIN)] = None
    sag: Annotated[Reading | None, _half_width(q.SAG)] = None
    span: Annotated[Reading | None, _half_width(q.SPAN)] = None
    overhang: Annotated[Reading | None, _half_width(q.OVERHANG)] = None
    position: Annotated[Reading | None, _half_width(q.POSITION)] = None
    spacing: Annotated[Reading | None, _half_width(q.SPACING)] = None
    tributary: Annotated[Reading | None, _half_width(q.TRIBUTARY)] = None
    bearing: Annotated[Reading | None, _half_width(q.BEARING)] = None
    moisture: Annotated[Reading | None, _half_width(q.MOISTURE)] = None
    slope: Annotated[Reading | None, _half_width(q.SLOPE)] = None
    deflection: Annotated[Reading | None, _half_width(q.DEFLECTION)] = None


class StockItem(Record):
    """Material at hand for repairs: lumber of a size and wood, or steel; the longest piece there is of it."""

    name: Annotated[str | None, text(200)] = None
    size: Annotated[Size | None, record_of(Size)] = None
    wood: Annotated[Wood | None, record_of(Wood)] = None
    steel: Annotated[Steel | None, record_of(Steel)] = None
    longest: Annotated[Reading | None, measured(q.SPAN)] = None

    @model_validator(mode="after")
    def _is_something(self) -> Self:
        if (self.size is None) == (self.steel is None):
            raise ReadingError("size", None, "a size with its wood, or steel", "is needed, or steel, not both")
        return self


class SiteLimits(Record):
    """What can be got into the space, and done there."""

    depth: Annotated[Reading | None, measured(q.SIZE)] = None
    longest: Annotated[Reading | None, measured(q.SPAN)] = None
    jacking: Annotated[bool | None, yes_no()] = None
    side: Annotated[str | None, choice("left", "right", "both", "none")] = None
    wet: Annotated[bool | None, yes_no()] = None


class Codes(Record):
    """Editions the survey is held to, as text."""

    NDS: Annotated[str | None, text(100)] = None
    loads: Annotated[str | None, text(100)] = None
    building: Annotated[str | None, text(100)] = None
    residential: Annotated[str | None, text(100)] = None
    existing: Annotated[str | None, text(100)] = None


class Survey(Record):
    """What holds for the whole survey: tolerances of instruments, stock and site limits for repairs, code editions."""

    tolerances: Annotated[Tolerances | None, record_of(Tolerances)] = None
    stock: Annotated[tuple[StockItem, ...] | None, records(StockItem, 100)] = None
    site_limits: Annotated[SiteLimits | None, record_of(SiteLimits)] = None
    codes: Annotated[Codes | None, record_of(Codes)] = None
    remarks: Annotated[str | None, text()] = None

    def tolerance(self, reading: Reading) -> float:
        """Half width of a reading's tolerance [its engine unit]: as typed, else the survey's, else the usual one."""
        if reading.tolerance is not None:
            return reading.tolerance
        name = reading.quantity.name.removesuffix(" width").replace(" ", "_")
        own: Any = getattr(self.tolerances, name, None) if self.tolerances is not None else None
        return own.value if isinstance(own, Reading) else reading.quantity.default_tolerance
