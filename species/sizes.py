"""Size classes: which nominal width or thickness a measured size belongs to."""

from __future__ import annotations

from math import ceil, isfinite

from species.dressing import standard_widths_in
from species.errors import WoodError

CLASSES = (2, 3, 4, 5, 6, 8, 10, 12, 14)  # nominal, in; 14 stands for 14 and wider
OVERSIZE_IN = 0.125  # rough stock may exceed its nominal size by this much
READING_IN = 1 / 16  # a tape reading this near a standard size is that size
SLACK_IN = 1e-6  # a size converted from millimetres must not cross a limit by its last digit


def checked(size_in: float) -> float:
    """The size itself, where it is one.

    size_in  a dimension [in]
    raises   WoodError where it is not a positive finite number
    """
    if not isfinite(size_in) or size_in <= 0:
        raise WoodError("size", size_in, "a size over zero, in inches", problem="is no size of a piece")
    return size_in


def nominal_size(size_in: float) -> int:
    """The smallest nominal size whose full size is at least the measurement, with 1/8 in for oversize stock.

    size_in  measured thickness or width [in]
    returns  nominal size [in]: 2, 3, 4, 5, 6, then every even number without end
    raises   WoodError for a size that is none

    >>> nominal_size(5.5), nominal_size(7.5), nominal_size(8.125), nominal_size(8.25), nominal_size(15.5)
    (6, 8, 8, 10, 16)
    """
    least = checked(size_in) - OVERSIZE_IN - SLACK_IN
    for nominal in CLASSES:
        if nominal >= least:
            return nominal
    return 2 * ceil(least / 2)


def size_class(width_in: float) -> int:
    """The nominal width whose row and size factor a measured width takes (tables are silent: a rule of ours).

    width_in  the piece's greater dimension [in]
    returns   2, 3, 4, 5, 6, 8, 10, 12 or 14 [in]; 14 stands for 14 and wider
    raises    WoodError for a size that is none

    >>> [size_class(w) for w in (7.25, 7.5, 8.0, 8.125, 8.25, 16.5)]
    [8, 8, 8, 8, 10, 14]
    """
    return min(nominal_size(width_in), CLASSES[-1])


def thickness_class(thickness_in: float) -> int:
    """The nominal thickness a measured thickness takes, by the same rule as a width.

    thickness_in  the piece's lesser dimension [in]
    returns       2, 3 or 4 for dimension lumber [in]; 5 and more for timbers
    raises        WoodError for a size that is none

    >>> thickness_class(1.625), thickness_class(2.125), thickness_class(2.5), thickness_class(4.0)
    (2, 2, 3, 4)
    """
    return size_class(thickness_in)


def is_standard_dressed(width_in: float) -> bool:
    """Whether a width is one that lumber to 4 in thick is dressed to today (PS 20, dry), to a tape reading.

    width_in  the piece's greater dimension [in]
    returns   False where its class rests on this program's rule and must be said
    raises    WoodError for a size that is none

    >>> is_standard_dressed(7.25), is_standard_dressed(7.5)
    (True, False)
    """
    checked(width_in)
    return any(abs(width_in - standard) <= READING_IN + SLACK_IN for standard in standard_widths_in())


def is_standard_timber(size_in: float) -> bool:
    """Whether a dimension is one that timbers are dressed to: 1/2 in under a nominal size, to a tape reading.

    size_in  either dimension of a timber [in]
    raises   WoodError for a size that is none

    >>> is_standard_timber(9.5), is_standard_timber(10.0)
    (True, False)
    """
    return abs(nominal_size(size_in) - 0.5 - size_in) <= READING_IN + SLACK_IN
