import numpy as np
import pytest
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.figure import Figure
from matplotlib.text import Text

from plainodds.drawings.stamps import ScreenFigure, StampedText


def shown(kind, text_kind, words="Ägypten, 41 years\n(two lines)", dpi=96, **properties):
    figure = kind(figsize=(3, 1), dpi=dpi)
    text = text_kind(0.5, 0.5, words, figure=figure, transform=figure.transFigure, **properties)
    figure.add_artist(text)
    canvas = FigureCanvasAgg(figure)
    canvas.draw()
    return figure, text, np.asarray(canvas.buffer_rgba())[..., 0].astype(int)


@pytest.mark.parametrize("dpi", [96, 192])
@pytest.mark.parametrize("across", ["left", "center", "right"])
@pytest.mark.parametrize("down", ["top", "center", "bottom"])
def test_a_stamp_is_the_text_within_a_pixel(dpi, across, down):
    look = {"ha": across, "va": down, "fontsize": 9}
    _, _, plain = shown(Figure, Text, dpi=dpi, **look)
    _, _, stamped = shown(ScreenFigure, StampedText, dpi=dpi, **look)
    for axis in (0, 1):
        ink = [np.flatnonzero((255 - each).sum(axis=axis)) for each in (plain, stamped)]
        assert abs(ink[0][0] - ink[1][0]) <= 1
        assert abs(ink[0][-1] - ink[1][-1]) <= 1


def test_a_stamp_is_kept_until_the_text_looks_otherwise():
    figure, text, _ = shown(ScreenFigure, StampedText, "one")
    first = text._stamp[1]
    text.set_position((0.3, 0.3))
    figure.canvas.draw()
    assert text._stamp[1] is first
    for change in ({"text": "two"}, {"color": "red"}, {"fontsize": 20}, {"fontweight": "bold"}):
        before = text._stamp[1]
        text.set(**change)
        figure.canvas.draw()
        assert text._stamp[1] is not before, change


def test_a_stamp_is_made_anew_for_another_resolution():
    figure, text, _ = shown(ScreenFigure, StampedText)
    before = text._stamp[1].shape
    figure.set_dpi(192)
    figure.canvas.draw()
    assert text._stamp[1].shape > before


def test_elsewhere_a_text_is_drawn_as_any_other():
    _, text, pixels = shown(Figure, StampedText)
    assert text._stamp is None
    assert (pixels == shown(Figure, Text)[2]).all()


def test_what_is_not_seen_leaves_no_ink():
    assert (shown(ScreenFigure, StampedText, visible=False)[2] == 255).all()
    assert (shown(ScreenFigure, StampedText, "")[2] == 255).all()
