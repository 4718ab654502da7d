import io
import time
from statistics import median

import pytest
from matplotlib.backends.backend_agg import FigureCanvasAgg

from plainodds.drawings import Picture
from plainodds.drawings.draw import drawing_of, figure_for
from plainodds.drawings.ruler import RulerDrawing
from plainodds.drawings.theme import theme_of
from tests.drawings import made

TARGET = 1.5


def seconds(do, *arguments):
    start = time.process_time()
    do(*arguments)
    return time.process_time() - start


@pytest.mark.parametrize(
    "answer_of",
    [
        lambda i: made.odds_answer(made.odds_rows(shift=0.003 * i)),
        lambda i: made.curve_by_material(shift=0.01 * i),
        lambda i: made.profile_answer(eta=-2 + 0.03 * i),
    ],
    ids=["odds", "curve", "ruler"],
)
def test_a_change_costs_little_more_than_a_bare_redraw_of_the_same_picture(answer_of):
    """Against matplotlib's own redraw and PNG of a figure with the same artists."""
    answers = [answer_of(i) for i in range(16)]
    picture = Picture("screen", 600, 420)
    picture.show(answers[0])
    drawing = RulerDrawing if picture.structure[0] is RulerDrawing else drawing_of(answers[0])
    figure, _ = figure_for(drawing, answers[0], theme_of("screen"), 450, 315, dpi=192)
    canvas = FigureCanvasAgg(figure)

    def change(answer):
        picture.show(answer)
        picture.png(2)

    def bare(_):
        canvas.print_png(io.BytesIO())

    change(answers[1])
    bare(None)
    # in turns, so that whatever else the machine does slows both
    turns = [(seconds(change, each), seconds(bare, None)) for each in answers]
    changes, bares = (median(column) for column in zip(*turns, strict=True))
    assert picture.rebuilt == 1
    assert changes <= TARGET * bares, f"{changes / bares:.2f}"
