"""Inches between floats and the trade's mixed numbers: 7 1/2."""

from __future__ import annotations

import re

MIXED = re.compile(r"(\d+)(?: (\d+)/(\d+))?$|(\d+)/(\d+)$")


def from_mixed(text: str) -> float:
    """A printed size in inches, as data files carry it.

    text     a whole number, a fraction, or both: '7', '1/2', '7 1/2'
    returns  the size [in]
    raises   ValueError for any other text

    >>> from_mixed("1 9/16")
    1.5625
    """
    found = MIXED.match(text.strip())
    if found is None:
        raise ValueError(f"{text!r} is no mixed number of inches")
    whole, over, under, alone_over, alone_under = found.groups()
    if alone_over is not None:
        return int(alone_over) / int(alone_under)
    return int(whole) + (int(over) / int(under) if over else 0.0)


def to_mixed(size_in: float) -> str:
    """A size as the trade writes it: a fraction where it is one to sixteenths, else three decimals.

    size_in  the size [in]
    returns  text without its unit

    >>> to_mixed(7.5), to_mixed(0.0625), to_mixed(8.0), to_mixed(7.48)
    ('7 1/2', '1/16', '8', '7.48')
    """
    sixteenths = round(size_in * 16)
    if abs(size_in * 16 - sixteenths) > 1e-6:
        return f"{size_in:.3f}".rstrip("0").rstrip(".")
    whole, over = divmod(sixteenths, 16)
    if over == 0:
        return str(whole)
    under = 16
    while over % 2 == 0:
        over, under = over // 2, under // 2
    return f"{whole} {over}/{under}" if whole else f"{over}/{under}"
