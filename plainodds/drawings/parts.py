"""Parts of a picture that have axes of their own within its slot."""

from __future__ import annotations

from dataclasses import dataclass

from matplotlib.axes import Axes

from plainodds.drawings.geometry import slot_size

__all__ = ["Place", "part_axes", "set_place"]


@dataclass(frozen=True)
class Place:
    """A part's place in points, from the upper left of the slot; heights downwards."""

    left: float
    top: float
    width: float
    height: float


def part_axes(whole: Axes, place: Place) -> Axes:
    """Axes for a part, which belong to the picture's and not to its figure."""
    figure = whole.get_figure()
    assert figure is not None
    part = Axes(figure, _fractions(whole, place))
    whole.add_child_axes(part)
    return part


def set_place(whole: Axes, part: Axes, place: Place) -> None:
    """Move a part to another place in the slot."""
    part.set_position(_fractions(whole, place))


def _fractions(whole: Axes, place: Place) -> tuple[float, float, float, float]:
    """A place in fractions of the figure."""
    slot = whole.get_position(original=True)
    width, height = slot_size(whole)
    across, up = slot.width / width, slot.height / height
    return (
        slot.x0 + place.left * across,
        slot.y1 - (place.top + place.height) * up,
        place.width * across,
        place.height * up,
    )
