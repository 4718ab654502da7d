"""Drawing an answer: into a figure of its own, or into axes that the user gives."""

from __future__ import annotations

from typing import Any

from matplotlib.axes import Axes
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.figure import Figure

from plainodds.answers.excerpts import ExcerptAnswer, Part
from plainodds.answers.panels import PanelsAnswer
from plainodds.answers.questions import Answer
from plainodds.drawings.drawing import Drawing, fitting_theme
from plainodds.drawings.excerpts import LedgerExcerpt, MarksExcerpt, RulerExcerpt
from plainodds.drawings.geometry import POINTS_PER_INCH, slot_size
from plainodds.drawings.kinds import drawing_of
from plainodds.drawings.panels import PanelsDrawing
from plainodds.drawings.stamps import root_figure
from plainodds.drawings.theme import Theme, theme_of
from plainodds.phrases.languages import spoken_now

__all__ = ["BORDER", "draw", "drawing_of", "figure_for", "height_for", "theme_for"]

BORDER = 0.7
"""What a figure leaves free around its picture, in letters of its theme."""

_WIDTH = 6.3  # inches: the text width of a report


@drawing_of.register
def _(answer: PanelsAnswer) -> type[Drawing[Any]]:
    return PanelsDrawing


@drawing_of.register
def _(answer: ExcerptAnswer) -> type[Drawing[Any]]:
    drawings: dict[Part, type[Drawing[Any]]] = {
        "ruler": RulerExcerpt,
        "ledger": LedgerExcerpt,
        "marks": MarksExcerpt,
    }
    return drawings[answer.question.part]


@spoken_now()
def draw(answer: Answer, ax: Axes | None = None, theme: str | Theme = "page") -> Figure:
    """Draw an answer.

    Parameters
    ----------
    answer : Answer
    ax : matplotlib.axes.Axes, optional
        Axes of the user's own figure. The picture keeps to the place that the axes have,
        labels included; their data coordinates are the answer's, so that more can be drawn
        on them. Without it the answer gets a figure of its own, as high as it needs.
    theme : str or Theme
        "page", "screen", "screen dark", "slide", or a Theme.

    Returns
    -------
    matplotlib.figure.Figure
        The figure drawn on. Neither pyplot nor any global setting is touched.

    Raises
    ------
    TypeError
        If there is no picture of this kind of answer.
    ValueError
        If no theme has that name.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> fit = po.FittedLogit(sm.Logit(y, sm.add_constant(x)).fit(disp=False))
    >>> figure = draw(fit.odds())
    >>> figure.axes[0].get_xscale()
    'log'
    """
    chosen = theme_of(theme)
    drawing = drawing_of(answer)
    if ax is not None:
        width, height = slot_size(ax)
        drawing(ax, answer, fitting_theme(drawing, answer, chosen, width, height))
        figure = root_figure(ax)
        assert figure is not None
        return figure
    width = _WIDTH * POINTS_PER_INCH
    figure, _ = figure_for(
        drawing, answer, chosen, width, height_for(drawing, answer, chosen, width)
    )
    return figure


@spoken_now()
def height_for(drawing: type[Drawing[Any]], answer: Answer, theme: Theme, width: float) -> float:
    """Height in points of a figure in which the answer looks best, for a width in points."""
    border = BORDER * theme.font_size
    return drawing.natural_height(answer, theme, width - 2 * border) + 2 * border


@spoken_now()
def theme_for(
    drawing: type[Drawing[Any]], answer: Answer, theme: Theme, width: float, height: float
) -> Theme:
    """The theme with letters that fit into a figure of a size in points."""
    border = 2 * BORDER * theme.font_size
    return fitting_theme(drawing, answer, theme, width - border, height - border)


@spoken_now()
def figure_for(
    drawing: type[Drawing[Any]],
    answer: Answer,
    theme: Theme,
    width: float,
    height: float,
    *,
    dpi: float = 100.0,
    kind: type[Figure] = Figure,
) -> tuple[Figure, Drawing[Any]]:
    """Make a figure of a size in points with an answer in it.

    Returns
    -------
    tuple of Figure and Drawing
        The figure has an Agg canvas and belongs to no pyplot.
    """
    figure = kind(figsize=(width / POINTS_PER_INCH, height / POINTS_PER_INCH), dpi=dpi)
    FigureCanvasAgg(figure)
    figure.set_layout_engine("none")
    figure.set_facecolor(theme.background)
    figure.set_edgecolor("none")
    border = BORDER * theme.font_size
    across, up = border / width, border / height
    axes = figure.add_axes((across, up, 1.0 - 2.0 * across, 1.0 - 2.0 * up))
    return figure, drawing(axes, answer, theme_for(drawing, answer, theme, width, height))
