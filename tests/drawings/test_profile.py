import math
from decimal import Decimal

import numpy as np
import pytest
from matplotlib.figure import Figure

from plainodds.drawings.ledger import ledger_lines
from plainodds.drawings.profile import ProfileDrawing
from plainodds.drawings.theme import theme_of
from tests.drawings import made
from tests.drawings.conftest import texts_of, words_on

THEME = theme_of("page")


def drawn(answer, width=480, height=None):
    height = ProfileDrawing.natural_height(answer, THEME, width) if height is None else height
    figure = Figure(figsize=(width / 72, height / 72))
    return ProfileDrawing(figure.add_axes((0, 0, 1, 1)), answer, THEME)


def figure_of(drawing):
    return drawing.ruler.axes.get_figure()


@pytest.mark.parametrize("eta", [-0.94, -3.333, -2.5149, 1.0 / 3])
def test_the_ledger_sums_exactly_as_written(eta):
    lines = ledger_lines(made.profile_answer(eta=eta))
    first, *parts, last = (Decimal(line.log_odds.replace("−", "-")) for line in lines)
    assert first + sum(parts) == last


def test_each_group_of_predictors_has_a_line_with_its_values():
    lines = ledger_lines(made.profile_answer())
    names = [line.name for line in lines]
    assert names == [
        "Profile compared with",
        "Pipe age = 78 years, Material = cast iron",
        "Soil corrosivity = high",
        "Past repairs = 2",
        "Unchanged: pressure, diameter and lined",
        "This profile",
    ]
    assert lines[1].detail == "instead of 41 years"
    assert lines[2].detail == "instead of low"


def test_each_line_says_what_is_added_what_is_multiplied_and_where_that_leaves_the_chance():
    answer = made.profile_answer()
    row = ledger_lines(answer)[2]
    assert row.odds == f"× {math.exp(answer.ledger[1].adds.estimate):.2f}"
    assert row.chance == f"{100 * answer.ledger[1].running_probability:.0f}%"
    assert ledger_lines(answer)[-1].chance == "28%"


def test_without_a_comparison_the_ledger_starts_at_the_typical_profile():
    assert ledger_lines(made.profile_answer(compared=False))[0].name == "Typical profile"


def test_equal_profiles_leave_nothing_to_add():
    lines = ledger_lines(made.profile_answer(eta=-2.51))
    assert [line.name.partition(":")[0] for line in lines] == [
        "Profile compared with", "Unchanged", "This profile",
    ]  # fmt: skip
    assert not drawn(made.profile_answer(eta=-2.51)).ledger.bars.get_paths()


def test_bars_start_from_one_zero_and_are_as_long_as_what_they_add():
    answer = made.profile_answer()
    bars = [path.vertices for path in drawn(answer).ledger.bars.get_paths()]
    zeros = {round(float(bar[0, 0]), 6) for bar in bars}
    assert len(zeros) == 1
    lengths = np.array([bar[1, 0] - bar[0, 0] for bar in bars])
    adds = np.array([row.adds.estimate for row in answer.ledger if row.adds.estimate])
    assert lengths / lengths[0] == pytest.approx(adds / adds[0])


def test_bars_of_what_is_taken_away_point_the_other_way():
    up = drawn(made.profile_answer()).ledger.bars.get_paths()[0].vertices
    down = drawn(made.profile_answer(eta=-4.0)).ledger.bars.get_paths()[0].vertices
    assert up[1, 0] > up[0, 0]
    assert down[1, 0] < down[0, 0]


@pytest.mark.parametrize("width", [250, 480, 800])
def test_the_ledger_stands_beneath_the_ruler(width):
    figure = figure_of(drawn(made.profile_answer(), width))
    boxes, _, _ = texts_of(figure)
    heights = {text.get_text().replace("\n", " "): box.y0 for text, box in boxes}
    assert heights["This profile"] < heights["Profile compared with"] < heights["Log odds η"]


def test_another_answer_is_written_over_the_first():
    drawing = drawn(made.profile_answer())
    drawing.update(made.profile_answer(eta=-2.51))
    words = words_on(figure_of(drawing))
    assert "Soil corrosivity = high" not in words
    assert "Unchanged: pipe age, material, soil corrosivity, pressure," in " ".join(words).replace(
        "\n", " "
    )
