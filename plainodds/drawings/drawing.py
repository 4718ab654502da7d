"""What every drawing is: artists on given axes that follow an answer."""

from __future__ import annotations

from collections.abc import Hashable, Iterator
from typing import Any, Protocol, TypeVar

from matplotlib.axes import Axes

from plainodds.answers.questions import Answer
from plainodds.drawings.theme import Theme

__all__ = ["SMALLEST", "Drawing", "fitting_theme", "smaller_themes"]

A_contra = TypeVar("A_contra", bound=Answer, contravariant=True)

_SCALES = (1.0, 0.94, 0.88, 0.82, 0.76, 0.7, 0.65, 0.6, 0.55)

SMALLEST = _SCALES[-1]
"""How far letters may shrink for an answer to fit."""


class Drawing(Protocol[A_contra]):
    """Artists on axes, made once for a structure and then only moved.

    A drawing class takes ``(axes, answer, theme)``. It stays within the slot that the
    axes have in their figure, and changes nothing outside them.
    """

    axes: Axes

    def __init__(self, axes: Axes, answer: A_contra, theme: Theme) -> None: ...

    @staticmethod
    def title(answer: A_contra) -> str:
        """What the picture is about, as its heading and as the title of its file."""

    @staticmethod
    def structure(answer: A_contra) -> Hashable:
        """What has to be equal for `update` to be able to show an answer."""

    @staticmethod
    def natural_height(answer: A_contra, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best, for a width in points."""

    @staticmethod
    def least_height(answer: A_contra, theme: Theme, width: float) -> float:
        """Height in points below which texts would meet."""

    def update(self, answer: A_contra) -> None:
        """Show another answer of the same structure."""


def fitting_theme(
    drawing: type[Drawing[Any]], answer: Any, theme: Theme, width: float, height: float
) -> Theme:
    """The theme, with smaller letters where the answer would not fit otherwise.

    Down to `SMALLEST` of the size asked for: what doesn't fit then needs a larger picture.
    """
    scaled = theme
    for scaled in smaller_themes(theme):
        if drawing.least_height(answer, scaled, width) <= height + 0.5:
            break
    return scaled


def smaller_themes(theme: Theme, least_letter: float = 0.0) -> Iterator[Theme]:
    """The theme, then with smaller and smaller letters.

    Parameters
    ----------
    theme : Theme
    least_letter : float
        In points: no text gets smaller.
    """
    scaled = (theme.scaled(factor) for factor in _SCALES)
    # a hair of slack, so that a size that was asked for exactly is kept
    return (each for each in scaled if each.small >= least_letter - 1e-9)
