"""A picture that follows its answer: one figure, kept, its artists moved."""

from __future__ import annotations

from collections.abc import Hashable
from typing import Any, cast

import numpy as np
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.figure import Figure

from plainodds.answers.profile import ProfileAnswer
from plainodds.answers.questions import Answer
from plainodds.drawings.draw import drawing_of, figure_for, height_for, theme_for
from plainodds.drawings.drawing import Drawing
from plainodds.drawings.geometry import POINTS_PER_INCH
from plainodds.drawings.png import png_of
from plainodds.drawings.ruler import RulerDrawing
from plainodds.drawings.stamps import ScreenFigure
from plainodds.drawings.theme import Theme, theme_of
from plainodds.phrases.languages import spoken_now

__all__ = ["Picture"]

_PIXELS_PER_INCH = 96.0  # a CSS pixel


class Picture:
    """A picture for the screen, quick to change.

    It is no value and not for several threads at once: whoever shares one locks it.

    Parameters
    ----------
    theme : str or Theme
    width_px : int
        Width in CSS pixels.
    height_px : int, optional
        Height in CSS pixels; left out, every new structure gets the height that it needs.

    Attributes
    ----------
    structure : hashable
        What the figure was built for; answers of the same structure only move its artists.
    rebuilt : int
        How many times the figure was built.
    width_px, height_px : int
        Size in CSS pixels; the height of a picture that has shown nothing is 0 unless given.

    Examples
    --------
    >>> Picture("screen", 600, 400).width_px
    600
    """

    def __init__(
        self, theme: str | Theme = "screen", width_px: int = 600, height_px: int | None = None
    ) -> None:
        self._theme = theme_of(theme)
        self._asked_height = height_px
        self.width_px, self.height_px = width_px, height_px or 0
        self.structure: Hashable = None
        self.rebuilt = 0
        self._figure: Figure | None = None
        self._drawing: Drawing[Any] | None = None

    @property
    def figure(self) -> Figure:
        """The figure that is kept.

        Raises
        ------
        ValueError
            If nothing has been shown yet.
        """
        if self._figure is None:
            raise ValueError("The picture is empty: show an answer first.")
        return self._figure

    @spoken_now()
    def show(self, answer: Answer) -> None:
        """Show an answer: move the artists where the structure is the same, else build anew.

        A profile answer is shown as its ruler alone.

        Raises
        ------
        TypeError
            If there is no picture of this kind of answer.
        """
        drawing: type[Drawing[Any]] = drawing_of(answer)
        if isinstance(answer, ProfileAnswer):
            drawing = RulerDrawing
        width = self.width_px / _PIXELS_PER_INCH * POINTS_PER_INCH
        height_px, fitted = self._asked_height, self._theme
        if height_px is None:
            needed = height_for(drawing, answer, self._theme, width)
            height_px = round(needed / POINTS_PER_INCH * _PIXELS_PER_INCH)
        height = height_px / _PIXELS_PER_INCH * POINTS_PER_INCH
        if self._asked_height is not None:
            fitted = theme_for(drawing, answer, self._theme, width, height)
        # another height, or letters of another size, need another figure
        structure = (drawing, drawing.structure(answer), height_px, fitted.font_size)
        if self._drawing is not None and structure == self.structure:
            self._drawing.update(answer)
            return
        self._figure, self._drawing = figure_for(
            drawing, answer, self._theme, width, height, dpi=_PIXELS_PER_INCH, kind=ScreenFigure
        )
        self.height_px, self.structure = height_px, structure
        self.rebuilt += 1

    def png(self, pixel_ratio: float = 2.0) -> bytes:
        """Give the picture as PNG.

        Parameters
        ----------
        pixel_ratio : float
            Device pixels per CSS pixel.

        Returns
        -------
        bytes

        Raises
        ------
        ValueError
            If nothing has been shown yet.
        """
        figure = self.figure
        figure.set_dpi(_PIXELS_PER_INCH * pixel_ratio)
        canvas = cast(FigureCanvasAgg, figure.canvas)
        canvas.draw()  # type: ignore[no-untyped-call]
        return png_of(np.asarray(canvas.buffer_rgba()))  # type: ignore[no-untyped-call]
