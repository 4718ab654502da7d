"""A picture as a file of an exact size, for a journal, a report or a slide."""

from __future__ import annotations

import math
import os
from collections.abc import Callable
from pathlib import Path
from typing import Literal, TypeAlias

from matplotlib.figure import Figure

from plainodds.answers.disclosure import SMALLEST_CELL, guarded
from plainodds.answers.questions import Answer
from plainodds.drawings import writers
from plainodds.drawings.about import About, about
from plainodds.drawings.draw import BORDER, drawing_of, figure_for, height_for
from plainodds.drawings.drawing import smaller_themes
from plainodds.drawings.geometry import POINTS_PER_INCH
from plainodds.drawings.letters import refuse_missing_letters
from plainodds.drawings.theme import Theme, theme_of
from plainodds.phrases.languages import spoken_now

__all__ = ["Size", "save"]

Size: TypeAlias = Literal["column", "page", "slide"] | tuple[float, float]
"""A named size, or width and height in millimetres."""

_MM_PER_INCH = 25.4
# width, height (None: as high as the answer needs), size of the letters in points
_SIZES: dict[str, tuple[float, float | None, float]] = {
    "column": (88.0, None, 8.0),
    "page": (178.0, None, 9.0),
    "slide": (320.0, 180.0, 18.0),
}
_LEAST_LETTER = 7.0  # points: what journals ask of the smallest text
_LEAST, _MOST = 20.0, 2000.0
_MOST_PIXELS = 6000


@spoken_now()
def save(
    answer: Answer,
    path: str | os.PathLike[str],
    size: Size = "column",
    *,
    theme: str | Theme | None = None,
    smallest_cell: int = SMALLEST_CELL,
    overwrite: bool = False,
) -> Path:
    """Draw an answer and write it as SVG, PDF, PNG or TIFF, by the path's suffix.

    Text stays text in SVG and PDF, and its font is in the file; PNG and TIFF have 600
    pixels per inch, fewer where they would have more than 6,000 along a side. No text is
    smaller than 7 points. The file says what it is: title, caption, the code that gives
    its answer again, and the versions of the packages; no user, path or date. So the same
    answer gives the same file, byte for byte.

    Parameters
    ----------
    answer : Answer
    path : path-like
        Ends in ``.svg``, ``.pdf``, ``.png``, ``.tif`` or ``.tiff``.
    size : {"column", "page", "slide"} or (float, float)
        A journal's column (88 mm wide) or page (178 mm wide), both as high as the answer
        needs; a slide (320 × 180 mm); or width and height in millimetres.
    theme : str or Theme, optional
        Default: "slide" for a slide, else "page".
    smallest_cell : int
        Counts of fewer rows are merged or withheld in the file.
    overwrite : bool
        Whether a file of that name is replaced.

    Returns
    -------
    pathlib.Path
        The file written.

    Raises
    ------
    ValueError
        If the suffix is none of these, the picture cannot have that size, or its font
        lacks letters.
    FileExistsError
        If the file exists and `overwrite` is False.
    TypeError
        If there is no picture of this kind of answer.

    Examples
    --------
    >>> import tempfile, numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> fit = po.FittedLogit(sm.Logit(y, sm.add_constant(x)).fit(disp=False))
    >>> with tempfile.TemporaryDirectory() as folder:
    ...     save(fit.odds(), f"{folder}/odds.pdf", size="column").name
    'odds.pdf'
    """
    target = Path(path)
    suffix = target.suffix.lower()
    if suffix not in _WRITERS:
        raise ValueError(
            f"{target.name!r} does not say what kind of file it is to be: "
            f"end its name in .svg, .pdf, .png or .tiff."
        )
    if target.exists() and not overwrite:
        raise FileExistsError(_exists(target))
    answer = guarded(answer, smallest_cell)
    figure = _figure(answer, size, _theme(theme, size))
    refuse_missing_letters(figure)
    content = _WRITERS[suffix](figure, about(answer))
    try:
        # in mode "x" the file system itself sees to it that nothing is overwritten
        with target.open("wb" if overwrite else "xb") as file:
            file.write(content)
    except FileExistsError:
        raise FileExistsError(_exists(target)) from None
    return target


def _theme(theme: str | Theme | None, size: Size) -> Theme:
    if theme is None:
        theme = "slide" if size == "slide" else "page"
    return theme_of(theme)


def _figure(answer: Answer, size: Size, theme: Theme) -> Figure:
    """The answer in a figure of exactly the size asked for, its letters large enough."""
    width_mm, height_mm, letter = _asked(size)
    drawing = drawing_of(answer)
    theme = theme.scaled(letter / theme.font_size)
    width = width_mm / _MM_PER_INCH * POINTS_PER_INCH
    if height_mm is None:
        height = height_for(drawing, answer, theme, width)
        return figure_for(drawing, answer, theme, width, height)[0]
    height = height_mm / _MM_PER_INCH * POINTS_PER_INCH
    border = 2 * BORDER * theme.font_size
    least = math.inf
    for smaller in smaller_themes(theme, _LEAST_LETTER):
        least = drawing.least_height(answer, smaller, width - border) + border
        if least <= height + 0.5:
            return figure_for(drawing, answer, smaller, width, height)[0]
    needed = least / POINTS_PER_INCH * _MM_PER_INCH
    raise ValueError(
        f"This picture does not fit into {width_mm:g} × {height_mm:g} mm: at that width it "
        f"needs a height of {needed:.0f} mm, so that no letter is smaller than "
        f"{_LEAST_LETTER:g} points. Ask for a larger size, or for less in the picture; "
        'size="page" is as high as the answer needs.'
    )


def _png(figure: Figure, told: About) -> bytes:
    return writers.png(figure, told, _resolution(figure))


def _tiff(figure: Figure, told: About) -> bytes:
    return writers.tiff(figure, told, _resolution(figure))


def _resolution(figure: Figure) -> float:
    return float(min(600.0, _MOST_PIXELS // max(figure.get_size_inches())))


_WRITERS: dict[str, Callable[[Figure, About], bytes]] = {
    ".svg": writers.svg,
    ".pdf": writers.pdf,
    ".png": _png,
    ".tif": _tiff,
    ".tiff": _tiff,
}


def _exists(target: Path) -> str:
    return f"{target} exists already. Choose another name, or pass overwrite=True to replace it."


def _asked(size: Size) -> tuple[float, float | None, float]:
    if isinstance(size, str):
        if size not in _SIZES:
            known = ", ".join(f'"{name}"' for name in _SIZES)
            raise ValueError(
                f"No size is named {size!r}. There are {known}; or give (width, height) in mm."
            )
        return _SIZES[size]
    try:
        width, height = (float(each) for each in size)
    except (TypeError, ValueError):
        raise ValueError(
            f"{size!r} is no size: give a name or (width, height) in millimetres."
        ) from None
    if not (_LEAST <= width <= _MOST and _LEAST <= height <= _MOST):
        raise ValueError(
            f"{width:g} × {height:g} mm is no size for a picture: both have to lie between "
            f"{_LEAST:g} and {_MOST:g} mm."
        )
    return width, height, _letter(width)


def _letter(width: float) -> float:
    """Letters for a width in mm: those of the named sizes, and between them in proportion."""
    column, page, slide = (_SIZES[name] for name in ("column", "page", "slide"))
    if width <= page[0]:
        share = max(0.0, (width - column[0]) / (page[0] - column[0]))
        return column[2] + share * (page[2] - column[2])
    share = min(1.0, (width - page[0]) / (slide[0] - page[0]))
    return page[2] + share * (slide[2] - page[2])
