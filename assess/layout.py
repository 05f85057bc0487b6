"""Where each effect stands in the last axis of the effect arrays."""

from __future__ import annotations

from dataclasses import dataclass

from assess.trace import Array

Pair = tuple[Array, Array]  # the highest and the lowest over patterns


@dataclass(frozen=True)
class Layout:
    """Where each effect stands in the last axis: moment, shear, reaction, deflection.

    Shear is given at both ends of each segment: first all left ends, then all right ends.
    """

    stations: int
    supports: int

    @property
    def M(self) -> slice:
        """Moment at each station [lb-in], sagging positive."""
        return slice(0, self.stations)

    @property
    def V(self) -> slice:
        """Shear at the ends of each segment [lb], relieved near supports where NDS 3.4.3.1 allows it."""
        return slice(self.stations, 3 * self.stations - 2)

    @property
    def R(self) -> slice:
        """Reaction at each support [lb], upward positive."""
        start = 3 * self.stations - 2
        return slice(start, start + self.supports)

    @property
    def y(self) -> slice:
        """Deflection at each station [in], downward positive."""
        start = 3 * self.stations - 2 + self.supports
        return slice(start, start + self.stations)
