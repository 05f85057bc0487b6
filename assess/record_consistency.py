"""Readings that are each understood but cannot stand together: a defect off the member, a notch through it."""

from __future__ import annotations

from assess.errors import ReadingError
from assess.reading import Reading
from assess.record import Fields
from assess.record_fields import Record, written

REACH_IN = 0.75  # design points lie this far inside the bearing, so the clear ends reach no farther


def consistency_problems(record: Fields) -> list[ReadingError]:
    """Problems between fields that are both given, each named at the field that must change.

    record    a bay or a member whose fields are each understood
    returns   ReadingErrors; empty where nothing contradicts
    """
    return [*_supports(record), *_orientation(record), *_loads(record), *_defects(record)]


def _supports(record: Fields) -> list[ReadingError]:
    spans = record.spans
    if spans is None:
        return []
    found = []
    if record.bearing is not None and len(record.bearing) not in (1, len(spans) + 1):
        found.append(
            ReadingError("bearing", written(record.bearing), f"one reading for all supports, or {len(spans) + 1}")
        )
    for name, back in (("overhang_left", spans[0]), ("overhang_right", spans[-1])):
        reading = getattr(record, name)
        if reading is not None and reading.value > back.value:
            found.append(
                ReadingError(name, written(reading), f"no longer than its back span, {back.shown()}", "is too long")
            )
    return found


def _orientation(record: Fields) -> list[ReadingError]:
    size = record.size
    if record.orientation is None or size is None or size.width is None or size.depth is None:
        return []
    flat = size.width.value > size.depth.value
    if size.width.value == size.depth.value or flat == (record.orientation == "flat"):
        return []
    lies = "flat (width greater than depth)" if flat else "on edge (depth greater than width)"
    return [
        ReadingError(
            "orientation", record.orientation, f"what the readings say: it lies {lies}", "contradicts the size"
        )
    ]


def _ends(record: Fields) -> tuple[float, float] | None:
    """Both ends of the member from the first support's design point [in]."""
    if record.spans is None:
        return None
    slack = 0.0 if record.span_basis == "design" else 2 * REACH_IN
    left = record.overhang_left.value if record.overhang_left is not None else 0.0
    right = record.overhang_right.value if record.overhang_right is not None else 0.0
    return -left - slack, sum(span.value + slack for span in record.spans) + right + slack


def _off(field: str, reading: Reading, ends: tuple[float, float], to_in: float | None = None) -> list[ReadingError]:
    last = reading.value if to_in is None else to_in
    if ends[0] - 1e-9 <= reading.value and last <= ends[1] + 1e-9:
        return []
    accepted = f"a place on the member, {ends[0] / 12:.2f} to {ends[1] / 12:.2f} ft from the first support"
    return [ReadingError(field, written(reading), accepted, "is off the member")]


def _loads(record: Fields) -> list[ReadingError]:
    ends = _ends(record)
    if ends is None:
        return []
    found = []
    for index, point in enumerate(record.point_loads or ()):
        found += _off(f"point_loads.{index}.at", point.at, ends)
    for index, line in enumerate(record.line_loads or ()):
        found += _off(f"line_loads.{index}.from", line.from_, ends)
        found += _off(f"line_loads.{index}.to", line.to, ends)
    for name in ("top_edge", "bottom_edge"):
        places = getattr(record, name)
        for index, place in enumerate(places if isinstance(places, tuple) else ()):
            found += _off(f"{name}.{index}", place, ends)
    for index, support in enumerate(record.new_supports or ()):
        found += _off(f"new_supports.{index}.at", support.at, ends)
    return found


def _defects(record: Fields) -> list[ReadingError]:
    found: list[ReadingError] = []
    ends = _ends(record)
    depth = record.size.depth if record.size is not None else None
    for index, defect in enumerate(record.condition or ()):
        field = f"condition.{index}"
        at, length = _reading(defect, "at"), _reading(defect, "length")
        if ends is not None and at is not None:
            found += _off(f"{field}.at", at, ends, at.value + length.value if length is not None else None)
        if depth is None:
            continue
        for name in ("depth", "remaining"):
            size = _reading(defect, name)
            limit = depth.value if defect.defect != "remaining" else depth.value + 0.5
            if size is not None and size.value > limit:
                found.append(
                    ReadingError(f"{field}.{name}", written(size), f"at most the depth, {depth.shown()}", "is too deep")
                )
        diameter, height = _reading(defect, "diameter"), _reading(defect, "height")
        if diameter is not None and height is not None:
            low, high = height.value - diameter.value / 2, height.value + diameter.value / 2
            if low <= 0.0 or high >= depth.value:
                found.append(
                    ReadingError(
                        f"{field}.height", written(height), "a hole with wood on both sides; an open one is a notch",
                        "breaks an edge",
                    )
                )  # fmt: skip
    return found


def _reading(defect: Record, name: str) -> Reading | None:
    value = getattr(defect, name, None)
    return value if isinstance(value, Reading) else None
