"""Net sections against shapely's polygons, a boundary integral of the second moment, and hand values."""

from __future__ import annotations

import math
import warnings

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from shapely.geometry import MultiPolygon, Polygon, box

from assess.section import Section, circle, net_rectangle

NAMES = ("A", "I", "S_top", "S_bot", "y_bar", "b_net", "d_net")


def one(b: float, d: float, top: float = 0, bottom: float = 0, side: float = 0, holes: tuple = ()) -> dict[str, float]:
    """Properties of one place; holes are (diameter, height of centre)."""
    at = [np.array([[float(v)]]) for v in (b, d, top, bottom, side)]
    through = [(np.array([[float(D)]]), np.array([[float(h)]]), np.array([[True]])) for D, h in holes]
    section = net_rectangle(*at, through)
    return {name: float(getattr(section, name)[0, 0]) for name in NAMES}


# Hand values.


def test_notch_of_a_sixth_leaves_694_thousandths() -> None:
    """b(d - n)^2/6 with n = d/6: (5/6)^2 = 0.694 of the whole (engineering basis 5)."""
    whole, left = one(1.5, 9.0), one(1.5, 9.0, bottom=1.5)
    assert left["S_bot"] == left["S_top"] == pytest.approx(1.5 * 7.5**2 / 6)
    assert left["S_bot"] / whole["S_bot"] == pytest.approx(25 / 36)
    assert left["y_bar"] == pytest.approx(1.5 + 7.5 / 2)
    assert left["I"] == pytest.approx(1.5 * 7.5**3 / 12)


def test_centred_hole_of_a_third_leaves_963_thousandths() -> None:
    """Two strips: 1 - (1/3)^3 = 0.963 of the whole; shear on b(d - diameter)."""
    whole, left = one(1.5, 9.0), one(1.5, 9.0, holes=((3.0, 4.5),))
    assert left["S_bot"] / whole["S_bot"] == pytest.approx(26 / 27)
    assert left["S_top"] / whole["S_top"] == pytest.approx(26 / 27)
    assert (left["d_net"], left["b_net"]) == (6.0, 1.5)
    assert left["y_bar"] == pytest.approx(4.5)


def test_hole_off_the_middle_moves_the_neutral_axis() -> None:
    """2 x 10 full, hole of 2 centred 3 above the bottom: strips 0-2 and 4-10; by hand y = 44/8, I = 2 x 70.667."""
    left = one(2.0, 10.0, holes=((2.0, 3.0),))
    I = 2 * (2**3 / 12 + 2 * 4.5**2 + 6**3 / 12 + 6 * 1.5**2)  # noqa: E741
    assert left["y_bar"] == pytest.approx(5.5)
    assert left["I"] == pytest.approx(I)
    assert left["S_top"] == pytest.approx(I / 4.5)
    assert left["S_bot"] == pytest.approx(I / 5.5)


def test_char_on_four_faces() -> None:
    """Half an inch from every face of a 6 x 10: 5 x 9."""
    left = one(6.0, 10.0, top=0.5, bottom=0.5, side=1.0)
    assert left == pytest.approx(
        {"A": 45, "I": 303.75, "S_top": 67.5, "S_bot": 67.5, "y_bar": 5, "b_net": 5, "d_net": 9}
    )


def test_whole_section() -> None:
    """A 1 1/2 x 9 1/4: A 13.875, S 21.39, I 98.93 (NDS Supplement Table 1B, recalled)."""
    whole = one(1.5, 9.25)
    assert whole["A"] == 13.875
    assert round(whole["S_top"], 2) == round(whole["S_bot"], 2) == 21.39
    assert round(whole["I"], 2) == 98.93
    assert (whole["y_bar"], whole["b_net"], whole["d_net"]) == (4.625, 1.5, 9.25)


def test_hole_broken_out_at_the_edge_is_a_notch() -> None:
    """A hole that reaches the bottom edge leaves no fibre there: the lowest fibre is the top of the hole."""
    assert one(1.5, 9.0, holes=((3.0, 1.0),)) == pytest.approx(one(1.5, 9.0, bottom=2.5))
    assert one(1.5, 9.0, holes=((3.0, 8.0),)) == pytest.approx(one(1.5, 9.0, top=2.5))
    assert one(1.5, 9.0, bottom=2.0, holes=((3.0, 3.0),)) == pytest.approx(one(1.5, 9.0, bottom=4.5))


def test_overlapping_holes_take_their_strip_once() -> None:
    merged = one(1.5, 9.0, holes=((2.0, 4.0), (2.0, 5.0), (1.0, 4.5)))
    assert merged == pytest.approx(one(1.5, 9.0, holes=((3.0, 4.5),)))
    assert one(1.5, 9.0, holes=((2.0, 5.0), (2.0, 4.0))) == pytest.approx(merged)


@pytest.mark.parametrize(
    "losses",
    [
        {"top": 9.0},
        {"bottom": 12.0},
        {"top": 5.0, "bottom": 5.0},
        {"side": 1.5},
        {"side": 2.0, "bottom": 1.0},
        {"holes": ((9.0, 4.5),)},
        {"holes": ((40.0, 1.0),)},
        {"holes": ((5.0, 2.5), (5.0, 7.0))},
        {"top": 9.0, "holes": ((2.0, 4.5),)},
        {"side": 1.5, "holes": ((2.0, 4.5),)},
        {"bottom": 3.1, "holes": ((5.9, 6.05),)},
    ],
)
def test_nothing_left_is_zero_without_a_warning(losses: dict) -> None:
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        assert one(1.5, 9.0, **losses) == dict.fromkeys(NAMES, 0.0)


def test_negative_loss_adds_no_wood() -> None:
    assert one(1.5, 9.0, top=-1.0, bottom=-1.0, side=-0.5) == pytest.approx(one(1.5, 9.0))


def test_sliver_beside_a_hole_is_never_less_than_nothing() -> None:
    """Modulus of what a hole or notch leaves down to rounding: positive or zero, and no more than the strip has."""
    for thin in 10.0 ** -np.arange(1, 18):
        for left in (one(1.5, 9.0, holes=((9.0 - thin, 4.5 - thin / 2),)), one(1.5, 9.0, bottom=9.0 - thin)):
            assert all(left[name] >= 0.0 for name in NAMES)
            assert left["S_bot"] <= 1.5 * (1.01 * thin + 1e-12) ** 2 / 6


def test_holes_side_by_side_leave_nothing_between() -> None:
    """A row of holes from edge to edge, each touching the next but for rounding, cuts the part through."""
    for count in range(2, 13):
        row = tuple((9.3 / count, (i + 0.5) * 9.3 / count) for i in range(count))
        assert one(1.5, 9.3, holes=row) == dict.fromkeys(NAMES, 0.0)


def test_circle() -> None:
    """A = pi D^2/4, S = pi D^3/32, I = pi D^4/64; a rectangle of its depth and b_net has its area."""
    log = circle(np.array([[8.0, 10.0, 0.0]]))
    assert log.A[0].tolist() == pytest.approx([math.pi * 16, math.pi * 25, 0])
    assert log.S_top[0].tolist() == log.S_bot[0].tolist() == pytest.approx([math.pi * 16, math.pi * 1000 / 32, 0])
    assert log.I[0].tolist() == pytest.approx([math.pi * 64, math.pi * 10000 / 64, 0])
    assert (log.b_net * log.d_net)[0].tolist() == pytest.approx(log.A[0].tolist())
    assert log.y_bar[0].tolist() == [4.0, 5.0, 0.0]
    assert log.A.shape == log.d_net.shape == (1, 3)


def test_circle_against_shapely() -> None:
    many_sides = Polygon([(4 * math.cos(a), 4 * math.sin(a)) for a in np.linspace(0, 2 * math.pi, 4001)[:-1]])
    log = circle(np.array([[8.0]]))
    # A polygon of n sides falls short of its circle by about 6.6/n^2 in area.
    assert float(log.A[0, 0]) == pytest.approx(many_sides.area, rel=2e-6)
    assert float(log.I[0, 0]) == pytest.approx(second_moment(many_sides, 0.0), rel=2e-6)


# Against polygons.


def second_moment(polygon: Polygon | MultiPolygon, axis: float) -> float:
    """Second moment about the horizontal line y = axis, by Green's theorem round the boundary."""
    total = 0.0
    for part in getattr(polygon, "geoms", [polygon]):
        x, y = np.array(part.exterior.coords).T
        y = y - axis
        cross = x[:-1] * y[1:] - x[1:] * y[:-1]
        total += abs(float((cross * (y[:-1] ** 2 + y[:-1] * y[1:] + y[1:] ** 2)).sum())) / 12.0
        assert not part.interiors, "a full-width strip leaves no ring inside"
    return total


sixteenths = st.integers(0, 48).map(lambda n: n / 16)
Place = tuple[float, float, float, list[bool]]


@st.composite
def parts(draw: st.DrawFn) -> tuple[list[tuple[float, float]], list[list[tuple[float, float]]], list[list[Place]]]:
    """Variants (b, d), their holes (diameter, height), and at each of three places the losses and holes there."""
    K, H = draw(st.integers(1, 3)), draw(st.integers(0, 4))
    size = st.integers(16, 192).map(lambda n: n / 16)
    sizes = [(draw(size), draw(size)) for _ in range(K)]
    hole = st.tuples(st.integers(1, 80).map(lambda n: n / 16), st.integers(-16, 208).map(lambda n: n / 16))
    holes = [draw(st.lists(hole, min_size=H, max_size=H)) for _ in range(K)]
    there = st.lists(st.booleans(), min_size=H, max_size=H)
    places = [[draw(st.tuples(sixteenths, sixteenths, sixteenths, there)) for _ in range(3)] for _ in range(K)]
    return sizes, holes, places


@settings(derandomize=True, max_examples=150, deadline=None)
@given(parts())
def test_shapely(case: tuple) -> None:
    """Area, centroid, extreme fibres and second moment of the polygon left; sixteenths are exact in doubles."""
    sizes, holes, places = case
    b, d = (np.array([[size[i]] for size in sizes]) for i in (0, 1))
    top, bottom, side = (np.array([[place[i] for place in row] for row in places]) for i in (0, 1, 2))
    through = [
        (
            np.array([[of[h][0]] for of in holes]),
            np.array([[of[h][1]] for of in holes]),
            np.array([[place[3][h] for place in row] for row in places]),
        )
        for h in range(len(holes[0]))
    ]
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        section = net_rectangle(b, d, top, bottom, side, through)
    for name in NAMES:
        assert getattr(section, name).shape == (len(sizes), 3)
    for k, (breadth, depth) in enumerate(sizes):
        for j, (off_top, off_bottom, off_side, present) in enumerate(places[k]):
            cuts = [hole for hole, here in zip(holes[k], present, strict=True) if here]
            check(section, k, j, polygon_left(breadth - off_side, off_bottom, depth - off_top, cuts))


def polygon_left(width: float, low: float, high: float, cuts: list[tuple[float, float]]) -> Polygon | MultiPolygon:
    if width <= 0 or high <= low:
        return Polygon()
    left = box(0, low, width, high)
    for diameter, height in cuts:
        left = left.difference(box(-1, height - diameter / 2, width + 1, height + diameter / 2))
    return left


def check(section: Section, k: int, j: int, polygon: Polygon | MultiPolygon) -> None:
    found = {name: float(getattr(section, name)[k, j]) for name in NAMES}
    if polygon.is_empty:
        assert found == dict.fromkeys(NAMES, 0.0)
        return
    _, low, width, high = polygon.bounds
    y_bar = polygon.centroid.y
    I = second_moment(polygon, y_bar)  # noqa: E741
    expected = {
        "A": polygon.area,
        "I": I,
        "S_top": I / (high - y_bar),
        "S_bot": I / (y_bar - low),
        "y_bar": y_bar,
        "b_net": width,
        "d_net": polygon.area / width,
    }
    assert found == pytest.approx(expected, rel=1e-9)


@settings(derandomize=True, max_examples=100, deadline=None)
@given(parts(), st.integers(0, 3), st.floats(0.0, 2.0))
def test_more_loss_never_adds_area_or_stiffness(case: tuple, which: int, more: float) -> None:
    sizes, holes, places = case
    (b, d), (top, bottom, side, present) = sizes[0], places[0][0]
    cuts = tuple(hole for hole, here in zip(holes[0], present, strict=True) if here)
    losses = [top, bottom, side]
    before = one(b, d, *losses, holes=cuts)
    if which < 3:
        losses[which] += more
    after = one(b, d, *losses, holes=cuts if which < 3 else (*cuts, (more + 0.1, d / 3)))
    for name in ("A", "I", "b_net", "d_net"):
        assert after[name] <= before[name] * (1 + 1e-12), name


def test_places_without_loss_are_whole_beside_places_with() -> None:
    """The short way taken where nothing is lost anywhere gives what the long way gives."""
    b, d, zero = np.array([[1.5], [3.0]]), np.array([[9.25], [11.0]]), np.zeros((2, 4))
    bottom = zero.copy()
    bottom[:, 3] = 1.0
    hole = (np.full((2, 1), 2.0), np.full((2, 1), 4.0), bottom > 0)
    absent = (hole[0], hole[1], np.zeros((2, 4), dtype=bool))
    whole = net_rectangle(b, d, zero, zero, zero, [absent])
    notched = net_rectangle(b, d, zero, bottom, zero, [absent])
    holed = net_rectangle(b, d, zero, zero, zero, [hole])
    for name in NAMES:
        want = getattr(whole, name)
        assert want.shape == (2, 4)
        for other in (notched, holed):
            assert getattr(other, name)[:, :3] == pytest.approx(want[:, :3], rel=1e-14), name
        assert (notched.A < whole.A)[:, 3].all()
