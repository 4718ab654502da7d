import pytest
from matplotlib.figure import Figure

from plainodds.drawings.lettering import (
    align_decimals,
    elided,
    letter,
    text_width,
    wrapped,
)
from plainodds.drawings.theme import theme_of

THEME = theme_of("page")


def test_a_text_that_fits_is_left_alone():
    assert elided("cast iron", 500, THEME, 9) == "cast iron"


@pytest.mark.parametrize("width", [30, 60, 120])
def test_a_text_that_does_not_fit_is_cut_and_marked(width):
    cut = elided("a label that goes on and on and on and on", width, THEME, 9)
    assert cut.endswith("…")
    assert text_width(cut, THEME, 9) <= width + 1e-5


@pytest.mark.parametrize("letters", [7.0, 9.0, 10.2])
def test_a_width_made_from_a_text_holds_that_text(letters):
    width = text_width("ductile iron", THEME, letters)
    there_and_back = (width + 2.6 * letters) - 2.6 * letters
    assert wrapped("ductile iron", there_and_back, THEME, letters) == "ductile iron"


def test_lines_are_broken_at_spaces():
    assert wrapped("ductile iron against cast iron", 80, THEME, 9) == (
        "ductile iron\nagainst cast iron"
    )


@pytest.mark.parametrize("lines", [1, 2, 3])
def test_no_more_lines_than_allowed_and_none_too_wide(lines):
    broken = wrapped("word " * 60, 100, THEME, 9, lines)
    assert broken.count("\n") == lines - 1
    assert text_width(broken, THEME, 9) <= 100 + 1e-5
    assert broken.endswith("…")


def test_a_word_without_spaces_is_cut():
    assert text_width(wrapped("x" * 300, 100, THEME, 9), THEME, 9) <= 100 + 1e-5


def test_figures_as_wide_as_the_column_have_their_points_in_line():
    padded = align_decimals(["2.02", "12.3", "105"])
    widths = {text_width(each.partition(".")[2], THEME, 9) for each in padded[:2]}
    assert len({round(each, 3) for each in widths}) == 1
    tails = [text_width(text, THEME, 9) - text_width(whole, THEME, 9)
             for text, whole in zip(padded, ("2", "12", "105"), strict=True)]  # fmt: skip
    assert tails == pytest.approx([tails[0]] * 3)


@pytest.mark.parametrize("words", ["$", "$x^2$", "_hidden", "$\\frac", "a_b", "%", "\\"])
def test_labels_are_never_mathematics(words):
    figure = Figure()
    axes = figure.add_axes((0, 0, 1, 1))
    text = letter(axes, THEME, axes.transAxes)
    text.set_text(words)
    figure.draw_without_rendering()
    assert text.get_text() == words
    assert not text.get_parse_math()
