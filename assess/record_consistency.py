"""Readings that are each understood but cannot stand together: a defect off the member, a notch through it."""

from __future__ import annotations

from assess.errors import ReadingError
from assess.reading import Reading
from assess.record import Fields
from assess.record_fields import Record, written
from assess.record_parts import section_by_name

SEAT_IN = 1.5  # bearing taken where none was measured; a clear span reaches half of it beyond each face
SLACK_IN = 1e-6
REMAINING_SLACK_IN = 0.5  # a remaining section is measured roughly, and swollen wood is larger


def consistency_problems(record: Fields) -> list[ReadingError]:
    """Problems between fields that are both given, each named at the field that must change.

    record    a bay or a member whose fields are each understood
    returns   ReadingError, one each; empty where nothing contradicts

    >>> from assess.record import record_problems
    >>> load = {"load": "400 lb", "at": "12 ft", "type": "dead"}
    >>> record_problems("member", {"spans": ["10 ft"], "point_loads": [load]})[0].accepted
    'a place from -1 1/2 in to 10 ft 3 in'
    """
    return [*_supports(record), *_orientation(record), *_places(record), *_defects(record)]


def _supports(record: Fields) -> list[ReadingError]:
    found = []
    if record.hanger is not None and record.bearing_on in ("wood", "masonry"):
        found.append(
            ReadingError("bearing_on", record.bearing_on, "hanger, or no hanger recorded", "contradicts the hanger")
        )
    spans = record.spans
    if spans is None:
        return found
    count = len(spans) + 1
    if record.bearing is not None and len(record.bearing) > count:
        found.append(
            ReadingError("bearing", written(record.bearing), f"at most {count} readings, one a support", "is too long")
        )
    for name, back in (("overhang_left", spans[0]), ("overhang_right", spans[-1])):
        reading = getattr(record, name)
        if reading is not None and reading.value > back.value:
            found.append(
                ReadingError(name, written(reading), f"no longer than its back span, {back.shown()}", "is too long")
            )
    numbers = [(f"hold_down.{index}", number) for index, number in enumerate(record.hold_down or ())]
    numbers += [
        (f"condition.{index}.support", number)
        for index, defect in enumerate(record.condition or ())
        if (number := getattr(defect, "support", None)) is not None
    ]
    found += [
        ReadingError(field, number, f"a support from 1 to {count}, counted from the left", "is no support")
        for field, number in numbers
        if number > count
    ]
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
    """Both ends of the piece from the first support's design point [in]; it reaches over its bearings."""
    if record.spans is None:
        return None
    seats = [reading.value for reading in record.bearing or ()]
    first = max(seats[0], SEAT_IN) if seats else SEAT_IN
    last = max(seats[-1], SEAT_IN) if seats else SEAT_IN
    left = record.overhang_left.value if record.overhang_left is not None else 0.0
    right = record.overhang_right.value if record.overhang_right is not None else 0.0
    added = 0.0 if record.span_basis == "design" else SEAT_IN
    return -max(left, first), sum(span.value + added for span in record.spans) + max(right, last)


def _off(field: str, reading: Reading, ends: tuple[float, float], to_in: float | None = None) -> list[ReadingError]:
    last = reading.value if to_in is None else to_in
    if ends[0] - SLACK_IN <= reading.value and last <= ends[1] + SLACK_IN:
        return []
    shown = [Reading("", end, None, 0.0, reading.quantity, reading.metric).shown() for end in ends]
    said = "is off the member" if reading.value > ends[1] or to_in is None else "reaches off the member"
    return [ReadingError(field, written(reading), f"a place from {shown[0]} to {shown[1]}", said)]


def _places(record: Fields) -> list[ReadingError]:
    ends = _ends(record)
    if ends is None:
        return []
    places: list[tuple[str, Reading | None]] = []
    for index, point in enumerate(record.point_loads or ()):
        places.append((f"point_loads.{index}.at", point.at))
    for index, line in enumerate(record.line_loads or ()):
        places += [(f"line_loads.{index}.from", line.from_), (f"line_loads.{index}.to", line.to)]
    for name in ("top_edge", "bottom_edge"):
        held = getattr(record, name)
        places += [(f"{name}.{index}", place) for index, place in enumerate(held if isinstance(held, tuple) else ())]
    if record.stiffness_test is not None:
        places.append(("stiffness_test.at", record.stiffness_test.at))
    for index, part in enumerate(record.added or ()):
        places += [(f"added.{index}.from", part.from_), (f"added.{index}.to", part.to)]
    for index, support in enumerate(record.new_supports or ()):
        places.append((f"new_supports.{index}.at", support.at))
    return [error for field, place in places if place is not None for error in _off(field, place, ends)]


def _section(record: Fields) -> tuple[float, float] | None:
    """Breadth of all plies and depth [in], as far as they are known."""
    size = record.size
    if size is None:
        return None
    if size.diameter is not None:
        return size.diameter.value, size.diameter.value
    plies = size.plies or 1
    if size.nominal is not None:
        thickness, width = section_by_name(size.nominal, size.dressing)
        return (width * plies, thickness) if record.orientation == "flat" else (thickness * plies, width)
    if size.width is None or size.depth is None:
        return None
    return size.width.value * plies, size.depth.value


def _defects(record: Fields) -> list[ReadingError]:
    found: list[ReadingError] = []
    ends, section = _ends(record), _section(record)
    for index, defect in enumerate(record.condition or ()):
        field = f"condition.{index}"
        at, length = _reading(defect, "at"), _reading(defect, "length")
        if ends is not None and at is not None:
            found += _off(f"{field}.at", at, ends, at.value + length.value if length is not None else None)
        if ends is not None and at is None and length is not None and length.value > ends[1] - ends[0]:
            found.append(ReadingError(f"{field}.length", written(length), "no longer than the member", "is too long"))
        if section is not None:
            found += _through(field, defect, *section)
    return found


def _through(field: str, defect: Record, breadth_in: float, depth_in: float) -> list[ReadingError]:
    """Whether a defect is larger than the section it is in."""
    found = []
    kind = getattr(defect, "defect", "")
    depth, width, remaining = (_reading(defect, name) for name in ("depth", "width", "remaining"))
    if kind == "remaining":
        limits = [("depth", depth, depth_in + REMAINING_SLACK_IN), ("width", width, breadth_in + REMAINING_SLACK_IN)]
    elif getattr(defect, "face", None) == "side":
        limits = [("depth", depth, breadth_in)]
    elif kind == "check":
        limits = [("depth", depth, max(breadth_in, depth_in))]
    else:
        limits = [("depth", depth, depth_in), ("remaining", remaining, depth_in)]
    for name, reading, limit in limits:
        if reading is not None and reading.value > limit + SLACK_IN:
            found.append(
                ReadingError(f"{field}.{name}", written(reading), f"at most {limit:g} in of this member", "is too deep")
            )
        elif kind == "notch" and reading is not None and reading.value > limit - SLACK_IN:
            found.append(
                ReadingError(
                    f"{field}.{name}", written(reading), f"less than the depth, {limit:g} in", "cuts it through"
                )
            )
    diameter, height = _reading(defect, "diameter"), _reading(defect, "height")
    if diameter is not None and height is not None:
        low, high = height.value - diameter.value / 2, height.value + diameter.value / 2
        if low <= 0.0 or high >= depth_in:
            found.append(
                ReadingError(
                    f"{field}.height", written(height), "a hole with wood above and below; an open one is a notch",
                    "breaks an edge",
                )
            )  # fmt: skip
    return found


def _reading(defect: Record, name: str) -> Reading | None:
    value = getattr(defect, name, None)
    return value if isinstance(value, Reading) else None
