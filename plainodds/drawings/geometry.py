"""Where things stand: margins in points, corners to measure from, labels kept apart.

A drawing never asks a layout engine. Its axes keep the slot that they were given, in the
user's figure or in ours, and an axes locator sets the plot into that slot with margins in
points. So a picture looks the same at every resolution, follows the figure when that is
resized, and costs no layout at draw time.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from typing import Any

from matplotlib.axes import Axes
from matplotlib.transforms import Affine2D, Bbox, ScaledTranslation, Transform

from plainodds.drawings.stamps import root_figure
from plainodds.phrases.languages import spoken_now
from plainodds.phrases.writing import kept_writing

__all__ = [
    "LEAST_SHARE",
    "POINTS_PER_INCH",
    "Margins",
    "Room",
    "apart",
    "corner",
    "shifted",
    "slot_size",
]

POINTS_PER_INCH = 72.0
LEAST_SHARE = 0.15
"""Of a slot's width or height: no margins make a plot smaller."""
_SAME = 0.5  # points


@dataclass(frozen=True)
class Margins:
    """Room in points around a plot."""

    left: float
    right: float
    bottom: float
    top: float


def slot_size(axes: Axes) -> tuple[float, float]:
    """Width and height in points of the slot that axes were given in their figure."""
    figure = axes.get_figure()
    assert figure is not None
    slot = axes.get_position(original=True)
    scale = POINTS_PER_INCH / figure.dpi
    return (
        float(slot.width * figure.bbox.width * scale),
        float(slot.height * figure.bbox.height * scale),
    )


class Room:
    """An axes locator that leaves margins in points between the slot and the plot.

    Margins that don't fit are narrowed, so that a plot never turns inside out. To layout
    engines and to tight bounding boxes the axes are their slot, no more and no less.

    Parameters
    ----------
    axes : Axes
    resized : callable
        Called before the axes are drawn in a slot of another size than before: the layout
        engine of the user's figure, or the user, has moved it.
    """

    def __init__(self, axes: Axes, resized: Callable[[], None]) -> None:
        self._axes, self.resized = axes, resized
        # whoever draws later need not write as the picture was written
        self._writing = kept_writing()
        self._size = slot_size(axes)
        self.margins = Margins(0.0, 0.0, 0.0, 0.0)
        axes.set_axes_locator(self)  # type: ignore[arg-type]
        axes.get_tightbbox = self._slot  # type: ignore[method-assign]

    def __call__(self, axes: Axes, renderer: Any = None) -> Bbox:
        """Give the plot's place in fractions of the figure."""
        slot = self._axes.get_position(original=True)
        width, height = slot_size(self._axes)
        if max(abs(width - self._size[0]), abs(height - self._size[1])) > _SAME:
            self._size = (width, height)
            with self._writing(), spoken_now():
                self.resized()
        left, right = _fitting(self.margins.left, self.margins.right, width)
        bottom, top = _fitting(self.margins.bottom, self.margins.top, height)
        return Bbox.from_extents(
            slot.x0 + slot.width * left / width,
            slot.y0 + slot.height * bottom / height,
            slot.x1 - slot.width * right / width,
            slot.y1 - slot.height * top / height,
        )

    def get_subplotspec(self) -> Any:
        """Where the axes are in a grid of subplots, for the tight layout engine."""
        return self._axes.get_subplotspec()

    def _slot(self, renderer: Any = None, **_: Any) -> Bbox:
        figure = self._axes.get_figure()
        assert figure is not None
        return self._axes.get_position(original=True).transformed(figure.transSubfigure)

    def plot_size(self) -> tuple[float, float]:
        """Width and height in points of the plot within its margins."""
        width, height = slot_size(self._axes)
        left, right = _fitting(self.margins.left, self.margins.right, width)
        bottom, top = _fitting(self.margins.bottom, self.margins.top, height)
        return width - left - right, height - bottom - top


def _fitting(first: float, second: float, whole: float) -> tuple[float, float]:
    wanted, most = first + second, whole * (1.0 - LEAST_SHARE)
    if wanted <= most:
        return first, second
    return first * most / wanted, second * most / wanted


def corner(axes: Axes, across: float, up: float) -> Transform:
    """Points, measured from a corner (or any other fraction) of the plot.

    Parameters
    ----------
    axes : Axes
    across, up : float
        The origin, in fractions of the plot: ``corner(axes, 0, 1)`` is its upper left.
    """
    figure = root_figure(axes)
    assert figure is not None
    return (
        Affine2D().scale(1.0 / POINTS_PER_INCH)
        + figure.dpi_scale_trans
        + ScaledTranslation(across, up, axes.transAxes)  # type: ignore[arg-type]
    )


def shifted(axes: Axes, right: float) -> Transform:
    """Data coordinates of axes, so many points to the right."""
    figure = root_figure(axes)
    assert figure is not None
    return axes.transData + ScaledTranslation(right / POINTS_PER_INCH, 0.0, figure.dpi_scale_trans)


def apart(
    wanted: Sequence[float], sizes: Sequence[float], lowest: float, highest: float
) -> list[float]:
    """Move centres along a line as little as needed so that nothing overlaps.

    Neighbours that would overlap are joined to a block, which stands where the squared
    moves of its members are smallest; blocks that meet are joined in turn.

    Parameters
    ----------
    wanted : sequence of float
        Where each centre would like to be.
    sizes : sequence of float
        The length that each needs.
    lowest, highest : float
        The ends of the line. Where there is not room enough for all, they share it.

    Returns
    -------
    list of float
        Centres, parallel to `wanted`, in the same order along the line.

    Examples
    --------
    >>> apart([1.0, 1.0, 9.0], [2.0, 2.0, 2.0], 0.0, 10.0)
    [1.0, 3.0, 9.0]
    """
    if not wanted:
        return []
    needed = sum(sizes)
    scale = min(1.0, (highest - lowest) / needed) if needed > 0 else 1.0
    order = sorted(range(len(wanted)), key=lambda place: wanted[place])
    blocks: list[tuple[float, float, list[int]]] = []  # first edge, length, members
    for place in order:
        size = sizes[place] * scale
        block = (wanted[place] - size / 2, size, [place])
        blocks.append(_within(block, lowest, highest))
        while len(blocks) > 1 and blocks[-2][0] + blocks[-2][1] > blocks[-1][0] + 1e-9:
            members = blocks[-2][2] + blocks[-1][2]
            blocks[-2:] = [_within(_block(members, wanted, sizes, scale), lowest, highest)]
    centres = [0.0] * len(wanted)
    for first, _, members in blocks:
        edge = first
        for place in members:
            size = sizes[place] * scale
            centres[place] = edge + size / 2
            edge += size
    return centres


def _block(
    members: list[int], wanted: Sequence[float], sizes: Sequence[float], scale: float
) -> tuple[float, float, list[int]]:
    length, pull = 0.0, 0.0
    for place in members:
        size = sizes[place] * scale
        pull += wanted[place] - (length + size / 2)
        length += size
    return pull / len(members), length, members


def _within(
    block: tuple[float, float, list[int]], lowest: float, highest: float
) -> tuple[float, float, list[int]]:
    edge, length, members = block
    return max(lowest, min(edge, highest - length)), length, members
