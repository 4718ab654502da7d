"""From a control's change to the finished picture, against bare redraws.

    python -m tests.benchmarks.redraw

The view asks, draws, prints, words, tables, escapes and sends. Two bare redraws stand beside
it, neither of which does more than move lines and print:

- of a plain matplotlib figure of the same size and resolution, with one line, a title and
  axis labels, printed as matplotlib prints: what anyone's own slider would cost;
- of the view's own figure, which keeps the pixels of texts that stay as they are, printed
  as the view prints it: what no view can go below.

For the map of two predictors the plain figure is a map too: contours filled, drawn and
labelled anew over a grid of as many points.

One run measures all in turns, so that whatever else the machine does slows all.
"""

import io
import json
import time
from collections.abc import Callable, Iterator
from itertools import cycle
from statistics import median
from typing import Any
from uuid import uuid4

import comm
import numpy as np
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.figure import Figure

import plainodds as po
from plainodds.views.base import AnswerView
from tests.benchmarks.models import fit_of_27_columns

__all__ = ["measured"]

TARGET = 1.5
TARGET_OF_A_MAP = 2.0
_TURNS = 41


class _SerialisingComm:
    """A line to the front end that goes as far as the kernel's own work does."""

    def __init__(self, comm_id: str | None = None, **_: Any) -> None:
        self.comm_id = comm_id or uuid4().hex
        self.kernel = "a kernel"

    def send(self, data: Any = None, metadata: Any = None, buffers: Any = None) -> None:
        json.dumps(data)

    def on_msg(self, callback: Any) -> None:
        self.callback = callback

    def on_close(self, callback: Any) -> None: ...

    def close(self, *args: Any, **kwargs: Any) -> None: ...


def _send(widget: Any, **state: Any) -> None:
    data = {"method": "update", "state": state, "buffer_paths": []}
    widget.comm.callback({"content": {"data": data}, "buffers": []})


def _moves(view: AnswerView) -> Callable[[], None]:
    """What is changed in a view: a number for each change, over and over."""
    if isinstance(view, po.ProfileView):
        slider, values = view.controls["age_years"].slider, cycle(map(float, range(30, 70)))
        return lambda: _send(slider, value=next(values))
    if isinstance(view, po.OddsView):
        view.question = view.fit.odds(("past_repairs", "pressure_m", "diameter_mm")).question
        box, values = view._panel("past_repairs")[0], cycle((1.0, 2.0, 3.0, 4.0))
        return lambda: _send(box, value=next(values))
    if isinstance(view, po.PairView):
        view.question = view.fit.pair(
            "age_years", "pressure_m", shape="map", others={"material": "cast iron"}
        ).question
        slider, values = view._others.held["past_repairs"].slider, cycle((1.0, 2.0, 3.0, 4.0))
        return lambda: _send(slider, value=next(values))
    view.question = view.fit.curve("age_years", by="material", others={}).question
    slider, values = view._others.held["pressure_m"].slider, cycle(map(float, range(40, 70)))
    return lambda: _send(slider, value=next(values))


def _plain(view: AnswerView) -> Callable[[], None]:
    """A redraw of one line in a plain figure of the size of the view's."""
    shot = view._stage.shot
    figure = Figure(figsize=(shot.width / 96, shot.height / 96), dpi=192)
    canvas = FigureCanvasAgg(figure)
    axes = figure.add_subplot(title="Chance", xlabel="Age (years)", ylabel="Chance")
    x = np.linspace(0, 100, 101)
    (line,) = axes.plot(x, x / 100)
    wiggle: Iterator[float] = cycle((1.0, 0.99))

    def redraw() -> None:
        line.set_ydata(next(wiggle) * x / 100)
        canvas.print_png(io.BytesIO())

    return redraw


def _plain_map(view: AnswerView) -> Callable[[], None]:
    """A redraw of the contours of one map in a plain figure of the size of the view's."""
    shot, surface = view._stage.shot, view.answer.surface
    figure = Figure(figsize=(shot.width / 96, shot.height / 96), dpi=192)
    canvas = FigureCanvasAgg(figure)
    axes = figure.add_subplot(title="Chance", xlabel="Age (years)", ylabel="Pressure (m)")
    chances = np.array(surface.estimate)
    drawn: list[Any] = []
    wiggle: Iterator[float] = cycle((1.0, 0.9))

    def redraw() -> None:
        for each in drawn:
            each.remove()
        shown = next(wiggle) * chances
        filled = axes.contourf(surface.a_at, surface.b_at, shown, 6)
        lines = axes.contour(surface.a_at, surface.b_at, shown, 6)
        # labels go with their contours
        axes.clabel(lines)
        drawn[:] = filled, lines
        canvas.print_png(io.BytesIO())

    return redraw


def _own(view: AnswerView) -> Callable[[], None]:
    picture = view._stage._picture
    wiggle: Iterator[float] = cycle((1.0, 1.01))

    def redraw() -> None:
        factor = next(wiggle)
        for axes in picture.figure.axes:
            for line in axes.lines:
                line.set_ydata([each * factor for each in line.get_ydata()])
        picture.png(2)

    return redraw


def _seconds(do: Callable[[], None]) -> float:
    start = time.perf_counter()
    do()
    return time.perf_counter() - start


def measured(view: AnswerView) -> tuple[float, float, float]:
    """Median seconds of a change in the view, of a plain redraw, of one of its own figure."""
    change = _moves(view)
    plain = _plain_map if isinstance(view, po.PairView) else _plain
    measures = (change, plain(view), _own(view))
    for warm_up in 2 * measures:
        warm_up()
    turns = [[_seconds(each) for each in measures] for _ in range(_TURNS)]
    assert view.problem is None
    first, second, third = (median(column) for column in zip(*turns, strict=True))
    return first, second, third


def main() -> None:
    """Measure each view and print the ratios."""
    comm.create_comm = _SerialisingComm
    fit = fit_of_27_columns()
    for kind in (po.OddsView, po.CurveView, po.ProfileView, po.PairView):
        target = TARGET_OF_A_MAP if kind is po.PairView else TARGET
        change, plain, own = measured(kind(fit))
        print(
            f"{kind.__name__}: change to picture {1000 * change:.1f} ms; "
            f"plain redraw {1000 * plain:.1f} ms, ratio {change / plain:.2f} (target {target}); "
            f"own figure {1000 * own:.1f} ms, ratio {change / own:.2f}"
        )


if __name__ == "__main__":
    main()
