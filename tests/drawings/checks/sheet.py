"""A finding drawn on a sheet of its own, for tests that look at its artists."""

from matplotlib.figure import Figure

from plainodds.drawings.soundness import SoundnessDrawing
from plainodds.drawings.theme import theme_of
from tests.drawings.seen import words_on

__all__ = ["board_of", "drawn", "ends_of", "points_of", "text_of"]

THEME = theme_of("page")


def drawn(answer, width=480):
    """The drawing, on a sheet of a width in points that is as high as it needs."""
    height = SoundnessDrawing.natural_height(answer, THEME, width)
    figure = Figure(figsize=(width / 72, height / 72))
    return SoundnessDrawing(figure.add_axes((0, 0, 1, 1)), answer, THEME)


def board_of(answer, width=480):
    """Its artists, by name."""
    return drawn(answer, width).board


def points_of(line):
    """The markers of a line as (x, y)."""
    return list(zip(line.get_xdata(), line.get_ydata(), strict=True))


def ends_of(segments, across=0):
    """Both ends of each line along an axis."""
    return [(each[0][across], each[1][across]) for each in segments.get_segments()]


def text_of(answer, width=480):
    """All that is written, as one text."""
    return " ".join(words_on(drawn(answer, width).axes.figure)).replace("\n", " ")
