"""Wood: what a piece may be trusted with and on what basis; knows nothing of buildings."""

from __future__ import annotations

from importlib import import_module

TYPE_CHECKING = False  # importing typing for this one name would cost more than the tables do
if TYPE_CHECKING:
    from species.dressing import dressed_size
    from species.errors import WoodError
    from species.names import match_grade, match_species
    from species.reference import ReferenceValues, reference_values
    from species.sizes import size_class

__all__ = [
    "ReferenceValues",
    "WoodError",
    "dressed_size",
    "match_grade",
    "match_species",
    "reference_values",
    "size_class",
]

_ROOMS = {
    "ReferenceValues": "reference",
    "WoodError": "errors",
    "dressed_size": "dressing",
    "match_grade": "names",
    "match_species": "names",
    "reference_values": "reference",
    "size_class": "sizes",
}


def __getattr__(name: str) -> object:
    """Load a public name when it is first asked for."""
    if name not in _ROOMS:
        raise AttributeError(f"module {__name__!r} has no attribute {name!r}")
    return getattr(import_module(f"species.{_ROOMS[name]}"), name)
