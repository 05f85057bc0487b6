"""Reads a data file of this package: its source line, then its rows."""

from __future__ import annotations

import csv
import os
from functools import cache

FOLDER = os.path.join(os.path.dirname(__file__), "data")


@cache
def read(name: str) -> tuple[str, tuple[dict[str, str], ...]]:
    """The source line (without its mark) and the rows of a data file, as text.

    name     file name in the package's data folder
    returns  (source, rows by column name)

    >>> read("railway_1911.csv")[1][1]["Fb"]
    '1300'
    """
    with open(os.path.join(FOLDER, name), encoding="utf-8", newline="") as file:
        source = file.readline().removeprefix("#").strip()
        return source, tuple(csv.DictReader(file))


def source(name: str) -> str:
    """The source line in the head of a data file.

    name     file name in the package's data folder
    returns  the line, without its mark

    >>> source("nds2018_4d_timbers.csv")[:34]
    'NDS Supplement 2018 Table 4D, visu'
    """
    return read(name)[0]
