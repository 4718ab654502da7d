"""From a slider's move to the finished map of two numbers, against bare redraws of that map.

    python -m tests.benchmarks.maps

The view asks, draws its three parts, prints, words, tables, escapes and sends. Beside it
stand the picture alone, which follows an answer and is printed; and the bare redraw, a plain
matplotlib figure of the same size and resolution that shows the same surface of 60 by 60
points as filled contours with lines and their labels, and is printed as matplotlib prints.

One run measures all in turns, so that whatever else the machine does slows all.
"""

import io
import time
from collections.abc import Callable
from itertools import cycle
from statistics import median
from typing import Any

import comm
import numpy as np
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.figure import Figure

import plainodds as po
from plainodds.answers.pair import PairAnswer
from plainodds.drawings.picture import Picture
from tests.benchmarks.models import fit_of_27_columns
from tests.benchmarks.redraw import _send, _SerialisingComm

__all__ = ["measured"]

TARGET = 2.0
_TURNS = 21
_PIXEL_RATIO = 2


def _view(view: Any) -> Callable[[], None]:
    """What moves a slider of the view, over and over."""
    slider, values = view._others.held["past_repairs"].slider, cycle((0.0, 1.0, 2.0, 3.0))
    return lambda: _send(slider, value=next(values))


def _picture(answers: list[PairAnswer], width: int) -> tuple[Picture, Callable[[], None]]:
    picture, turn = Picture("screen", width), cycle(answers)

    def redraw() -> None:
        picture.show(next(turn))
        picture.png(_PIXEL_RATIO)

    return picture, redraw


def _plain(answers: list[PairAnswer], width: int, height: int) -> Callable[[], None]:
    """A redraw of the surface in a plain figure of the same size."""
    figure = Figure(figsize=(width / 96, height / 96), dpi=96 * _PIXEL_RATIO)
    canvas = FigureCanvasAgg(figure)
    axes, turn = figure.add_subplot(), cycle(answers)

    def redraw() -> None:
        surface = next(turn).surface
        assert surface is not None
        shown = np.asarray(surface.estimate)
        axes.clear()
        axes.contourf(surface.a_at, surface.b_at, shown)
        axes.clabel(axes.contour(surface.a_at, surface.b_at, shown, colors="black"))
        axes.set(title="Chance", xlabel="Age (years)", ylabel="Pressure (m)")
        canvas.print_png(io.BytesIO())

    return redraw


def _seconds(do: Callable[[], None]) -> float:
    start = time.perf_counter()
    do()
    return time.perf_counter() - start


def measured(fit: po.FittedLogit) -> tuple[float, float, float, float]:
    """Median seconds of a move in the view, of asking, of the picture, of a bare redraw."""

    def ask(repairs: int) -> PairAnswer:
        return fit.pair("age_years", "pressure_m", shape="map", others={"past_repairs": repairs})

    answers, turn = [ask(repairs) for repairs in range(4)], cycle(range(4))
    assert answers[0].surface is not None
    assert len(answers[0].surface.a_at) == len(answers[0].surface.b_at) == 60
    view: Any = po.PairView(fit)
    view.question = answers[0].question
    picture, redraw = _picture(answers, view._stage.shot.width)
    redraw()
    plain = _plain(answers, picture.width_px, picture.height_px)
    measures = (_view(view), lambda: ask(next(turn)), redraw, plain)
    for warm_up in 2 * measures:
        warm_up()
    turns = [[_seconds(each) for each in measures] for _ in range(_TURNS)]
    assert view.problem is None
    first, second, third, fourth = (median(column) for column in zip(*turns, strict=True))
    return first, second, third, fourth


def main() -> None:
    """Measure and print the ratios."""
    comm.create_comm = _SerialisingComm
    move, asked, picture, plain = measured(fit_of_27_columns())
    print(
        f"PairView, map of 60 x 60: move to picture {1000 * move:.1f} ms; "
        f"bare redraw {1000 * plain:.1f} ms, ratio {move / plain:.2f} (target {TARGET}); "
        f"picture alone {1000 * picture:.1f} ms, ratio {picture / plain:.2f}; "
        f"asking alone {1000 * asked:.1f} ms"
    )


if __name__ == "__main__":
    main()
