"""A picture as a file of an exact size, for a journal, a report or a slide."""

from __future__ import annotations

import os
from pathlib import Path
from typing import Literal, TypeAlias

from plainodds.answers.questions import Answer
from plainodds.drawings import writers
from plainodds.drawings.draw import BORDER, drawing_of, figure_for, height_for
from plainodds.drawings.drawing import SMALLEST
from plainodds.drawings.geometry import POINTS_PER_INCH
from plainodds.drawings.theme import Theme, theme_of
from plainodds.phrases.alternative import alternative

__all__ = ["Size", "save"]

Size: TypeAlias = Literal["column", "page", "slide"] | tuple[float, float]
"""A named size, or width and height in millimetres."""

_MM_PER_INCH = 25.4
# width, height (None: as high as the answer needs), size of the letters in points
_SIZES: dict[str, tuple[float, float | None, float]] = {
    "column": (88.0, None, 7.0),
    "page": (178.0, None, 9.0),
    "slide": (320.0, 180.0, 18.0),
}
_LEAST, _MOST = 20.0, 2000.0
_MOST_PIXELS = 6000
_SUFFIXES = (".svg", ".pdf", ".png")


def save(
    answer: Answer,
    path: str | os.PathLike[str],
    size: Size = "column",
    *,
    theme: str | Theme = "page",
    overwrite: bool = False,
) -> Path:
    """Draw an answer and write it as SVG, PDF or PNG, by the path's suffix.

    Text stays text in SVG and PDF, and its font is in the file; PNG has 600 pixels per
    inch, fewer where it would have more than 6,000 along a side.

    Parameters
    ----------
    answer : Answer
    path : path-like
        Ends in ``.svg``, ``.pdf`` or ``.png``.
    size : {"column", "page", "slide"} or (float, float)
        A journal's column (88 mm wide) or page (178 mm wide), both as high as the answer
        needs; a slide (320 × 180 mm); or width and height in millimetres.
    theme : str or Theme
    overwrite : bool
        Whether a file of that name is replaced.

    Returns
    -------
    pathlib.Path
        The file written.

    Raises
    ------
    ValueError
        If the suffix is none of the three, or the picture cannot have that size.
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
    if suffix not in _SUFFIXES:
        raise ValueError(
            f"{target.name!r} does not say what kind of file it is to be: "
            f"end its name in .svg, .pdf or .png."
        )
    if target.exists() and not overwrite:
        raise FileExistsError(_exists(target))
    width_mm, height_mm, letter = _asked(size)
    drawing, chosen = drawing_of(answer), theme_of(theme)
    chosen = chosen.scaled(letter / chosen.font_size)
    width = width_mm / _MM_PER_INCH * POINTS_PER_INCH
    natural = height_for(drawing, answer, chosen, width)
    height = natural if height_mm is None else height_mm / _MM_PER_INCH * POINTS_PER_INCH
    border = 2 * BORDER * chosen.font_size
    smallest = chosen.scaled(SMALLEST)
    least = drawing.least_height(answer, smallest, width - border) + border
    if height_mm is not None and least > height + 0.5:
        needed = least / POINTS_PER_INCH * _MM_PER_INCH
        raise ValueError(
            f"This picture does not fit into {width_mm:g} × {height_mm:g} mm: at that width it "
            f"needs a height of {needed:.0f} mm. Ask for a larger size, or for less in the "
            f'picture; size="page" is as high as the answer needs.'
        )
    figure, _ = figure_for(drawing, answer, chosen, width, height)
    title, description = drawing.title(answer), alternative(answer)
    if suffix == ".svg":
        content = writers.svg(figure, title, description)
    elif suffix == ".pdf":
        content = writers.pdf(figure, title, description)
    else:
        longest = max(width, height) / POINTS_PER_INCH
        content = writers.png(figure, title, description, min(600.0, _MOST_PIXELS // longest))
    try:
        # in mode "x" the file system itself sees to it that nothing is overwritten
        with target.open("wb" if overwrite else "xb") as file:
            file.write(content)
    except FileExistsError:
        raise FileExistsError(_exists(target)) from None
    return target


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
