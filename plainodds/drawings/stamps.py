"""Text that is drawn once and stamped from then on, for pictures that follow a slider.

Setting letters takes most of the time of a redraw, and while a slider moves most texts
stay as they are. On a `ScreenFigure` such a text keeps the pixels that it was drawn with;
everywhere else, in vector files above all, it is drawn as any text is.
"""

from __future__ import annotations

import math
from typing import Any

import numpy as np
from matplotlib.artist import Artist
from matplotlib.backends.backend_agg import RendererAgg
from matplotlib.figure import Figure
from matplotlib.text import Text
from matplotlib.transforms import IdentityTransform

__all__ = ["ScreenFigure", "StampedText", "root_figure"]

_EDGE = 2  # pixels around the letters


class ScreenFigure(Figure):
    """A figure that is only ever shown as pixels."""

    _sheet: RendererAgg | None = None

    def sheet(self, renderer: RendererAgg) -> RendererAgg:
        """An empty sheet to draw single texts on, for a renderer of this figure.

        It is kept, because matplotlib remembers a text's measures by its renderer.
        """
        size = (renderer.width, max(renderer.height // 3, 200), renderer.dpi)
        held = self._sheet
        if held is None or (held.width, held.height, held.dpi) != size:
            self._sheet = held = RendererAgg(*size)  # type: ignore[no-untyped-call]
        held.clear()  # type: ignore[no-untyped-call]
        return held


def root_figure(artist: Artist) -> Figure | None:
    """The figure that an artist is on, beyond all subfigures; from matplotlib 3.9 on."""
    parent: Any = artist.figure
    return None if parent is None else parent.figure


class StampedText(Text):
    """A text that keeps its pixels on a `ScreenFigure`.

    It is set on whole pixels there, at most half of one from where it would be otherwise.
    """

    _stamp: tuple[tuple[Any, ...], np.ndarray, float, float] | None = None

    def draw(self, renderer: Any) -> None:
        """Draw the text, from its stamp where it has a valid one."""
        figure = root_figure(self)
        plain = self.get_bbox_patch() is not None or not isinstance(renderer, RendererAgg)
        if plain or not isinstance(figure, ScreenFigure):
            super().draw(renderer)
            return
        if not self.get_visible() or not self.get_text():
            return
        key = self._look(renderer)
        if self._stamp is None or self._stamp[0] != key:
            self._stamp = (key, *self._drawn_alone(renderer))
        _, pixels, left, down = self._stamp
        x, y = self.get_transform().transform(self.get_position())
        graphics = renderer.new_gc()
        renderer.draw_image(graphics, round(x + left), round(y + down), pixels)
        graphics.restore()
        self.stale = False

    def _look(self, renderer: RendererAgg) -> tuple[Any, ...]:
        font = self.get_fontproperties()
        return (
            self.get_text(), font.get_size_in_points(), font.get_weight(), self.get_color(),
            self.get_horizontalalignment(), self.get_verticalalignment(), renderer.dpi,
        )  # fmt: skip

    def _drawn_alone(self, renderer: RendererAgg) -> tuple[np.ndarray, float, float]:
        """The text's pixels, and where their lower left corner is from the text's place."""
        figure = root_figure(self)
        assert isinstance(figure, ScreenFigure)
        sheet = figure.sheet(renderer)
        alone = Text()
        alone.update_from(self)
        alone.set_figure(figure)
        alone.set(
            text=self.get_text(), position=(0.0, 0.0), transform=IdentityTransform(),
            clip_on=False, parse_math=False, usetex=False,
        )  # fmt: skip
        box = alone.get_window_extent(sheet)
        left, down = math.floor(box.x0) - _EDGE, math.floor(box.y0) - _EDGE
        width, height = math.ceil(box.x1) + _EDGE - left, math.ceil(box.y1) + _EDGE - down
        alone.set_position((-left, -down))
        alone.draw(sheet)
        drawn = np.asarray(sheet.buffer_rgba())[-height:, :width]  # type: ignore[no-untyped-call]
        return drawn[::-1].copy(), left, down
