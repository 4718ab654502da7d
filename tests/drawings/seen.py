"""What is seen on a figure: its texts, and that none meets another or is cut off."""

from itertools import combinations

from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.text import Text


def boxes_on(figure):
    """Every text that is seen, with its box in pixels."""
    renderer = FigureCanvasAgg(figure).get_renderer()
    figure.draw_without_rendering()
    shown = []
    for text in figure.findobj(Text):
        if text.get_visible() and text.get_text() and not _is_idle_tick(text, figure):
            shown.append((text.get_text(), text.get_window_extent(renderer)))
    return shown


def _is_idle_tick(text, figure):
    """Whether a text is a tick label that matplotlib keeps but does not draw."""
    for axes in figure.axes:
        for axis in (axes.xaxis, axes.yaxis):
            low, high = sorted(axis.get_view_interval())
            for tick in axis.get_major_ticks():
                if text in (tick.label1, tick.label2):
                    return text is tick.label2 or not low <= tick.get_loc() <= high
    return False


def words_on(figure):
    """Every text that is seen, figure spaces as plain ones."""
    return [
        text.replace("\u2007", " ").replace("\u2008", " ").strip() for text, _ in boxes_on(figure)
    ]


def assert_readable(figure):
    shown = boxes_on(figure)
    assert len(shown) >= 5
    width, height = figure.bbox.width, figure.bbox.height
    for text, box in shown:
        inside = -1 <= box.x0 <= box.x1 <= width + 1 and -1 <= box.y0 <= box.y1 <= height + 1
        assert inside, f"{text!r} leaves the picture"
    for (text, box), (other, its) in combinations(shown, 2):
        across = min(box.x1, its.x1) - max(box.x0, its.x0)
        up = min(box.y1, its.y1) - max(box.y0, its.y0)
        # boxes are as high as the font, letters seldom are
        assert across < 1.5 or up < 3, f"{text!r} meets {other!r}"
