"""Text of a table: on common baselines, whatever letters stand in it."""

from __future__ import annotations

from matplotlib.text import Text

__all__ = ["write"]

_HALF_HEIGHT = 0.36
"""From the middle of a line of text to its baseline, in letters."""

_STEP = 1.16
"""From line to line, in letters: somewhat less than a line takes by itself."""


def write(text: Text, words: str, x: float, middle: float) -> None:
    """Set a text whose vertical place is its baseline, so that its middle stands at a height.

    Parameters
    ----------
    text : Text
        Aligned at its baseline; heights grow downwards.
    words : str
    x, middle : float
        In points.
    """
    size = float(text.get_fontsize())
    # the baseline is that of the last line
    last = middle + words.count("\n") * _STEP * size / 2
    text.set_text(words)
    text.set_position((x, last + _HALF_HEIGHT * size))
