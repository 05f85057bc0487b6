"""Grades: their order by strength ratio, the widths they exist in, and the nearest where one has no row."""

from __future__ import annotations

# From high to low bending strength ratio of the National Grading Rule (light framing and Stud: recalled).
ORDER = (
    "Clear Structural",
    "Dense Select Structural",
    "Select Structural",
    "No. 1 and Btr",
    "No. 1 Dense",
    "Dense No. 1",
    "No. 1",
    "No. 2 Dense",
    "No. 2",
    "Construction",
    "Stud",
    "No. 3",
    "Standard",
    "Utility",
)
# Tables 4B and 4D print one grade in two ways.
SAME = {"No. 1 Dense": "Dense No. 1", "Dense No. 1": "No. 1 Dense"}
# Greatest nominal width (in) a grade exists in, and what a wider piece takes.
TO_WIDTH = {"Stud": 6, "Construction": 4, "Standard": 4, "Utility": 4}
WIDER = {
    "Stud": "No. 3 applies to wider Stud",
    "Construction": "the lower grade that applies to wider lumber is No. 3",
    "Standard": "wider lumber is graded No. 3 at the lowest, above what Standard warrants: grade it in place",
    "Utility": "wider lumber is graded No. 3 at the lowest, above what Utility warrants: grade it in place",
}
WIDER_TAKES = {"Stud": ("No. 3",), "Construction": ("No. 3",)}


def nearest(grade: str, available: tuple[str, ...]) -> tuple[str | None, str | None]:
    """The nearest grades that have a row, below and above one that has none.

    grade      a grade by its canonical name
    available  grades that have a row
    returns    (nearest lower, nearest higher), each None where there is none

    >>> nearest("No. 1 and Btr", ("Select Structural", "No. 1", "No. 2"))
    ('No. 1', 'Select Structural')
    """
    place = ORDER.index(grade)
    ranked = sorted((name for name in available if name in ORDER), key=ORDER.index)
    lower = next((name for name in ranked if ORDER.index(name) > place), None)
    higher = next((name for name in reversed(ranked) if ORDER.index(name) < place), None)
    return lower, higher
