"""The ruler, the ledger and the marks, each as a figure of its own."""

import numpy as np
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.drawings.draw import draw, drawing_of, figure_for, height_for
from plainodds.drawings.theme import theme_of
from tests.drawings import made, made_effects
from tests.drawings.seen import assert_readable, words_on

EXCERPTS = {
    "ruler": lambda: po.excerpt(made.profile_answer(), "ruler"),
    "ruler alone": lambda: po.excerpt(made.profile_answer(compared=False), "ruler"),
    "ledger": lambda: po.excerpt(made.profile_answer(), "ledger"),
    "marks": lambda: po.excerpt(made_effects.change_answer(), "marks"),
}
EACH = pytest.mark.parametrize("make", EXCERPTS.values(), ids=EXCERPTS)


@EACH
def test_nothing_meets_or_leaves_the_picture(make):
    assert_readable(draw(make()))


THEME = theme_of("slide")
CHANGES = {
    "a hundred": lambda: made_effects.change_answer(0.2, 0.35),
    "a thousand": lambda: made_effects.change_answer(0.004, 0.009, difference=0.003),
}


def marks_on(change, width, height):
    """The figure with marks alone, and their room: left, right, lower and upper end in points."""
    answer = po.excerpt(change, "marks")
    figure, drawing = figure_for(drawing_of(answer), answer, THEME, width, height)
    xy = np.concatenate([line.get_xydata() for line in drawing.marks.lines.values()])
    return figure, xy[:, 0].min(), xy[:, 0].max(), xy[:, 1].min(), xy[:, 1].max()


@pytest.mark.parametrize("make", CHANGES.values(), ids=CHANGES)
@pytest.mark.parametrize("share", [1.3, 1.7, 2.5])
def test_marks_grow_where_there_is_room_to_spare(make, share):
    change, width = make(), 960.0
    answer = po.excerpt(change, "marks")
    usual = height_for(drawing_of(answer), answer, THEME, width)
    _, left, right, low, high = marks_on(change, width, usual)
    figure, wide_left, wide_right, wide_low, wide_high = marks_on(change, width, share * usual)
    assert wide_right - wide_left > right - left
    assert wide_high - wide_low > high - low
    # beyond the picture's border nothing is drawn
    assert wide_right < width
    assert wide_low > 0
    assert_readable(figure)


def test_each_part_is_there_and_the_others_are_not():
    ruler = words_on(draw(EXCERPTS["ruler"]()))
    ledger = words_on(draw(EXCERPTS["ledger"]()))
    marks = words_on(draw(EXCERPTS["marks"]()))
    assert "Log odds η" in ruler
    assert "This profile" not in ruler
    assert "This profile" in ledger
    assert "Log odds η" not in ledger
    assert any(word.startswith("Of 100 ") for word in marks)
    assert "Difference" not in marks
    assert "Difference" in words_on(draw(made_effects.change_answer()))


@EACH
def test_an_excerpt_is_saved_captioned_and_told_as_any_answer(make, tmp_path):
    answer = make()
    assert po.save(answer, tmp_path / "fig.svg").stat().st_size > 1_000
    assert po.words(answer) == po.words(answer.whole)
    assert po.table(answer).equals(po.table(answer.whole))
    assert po.methods_note(answer) == po.methods_note(answer.whole)
    caption, whole = po.caption(answer), po.caption(answer.whole)
    assert caption.split(". ")[0] == whole.split(". ")[0]
    assert caption != whole
    assert po.from_json(po.to_json(answer)) == answer


def test_the_code_gives_the_excerpt_again():
    mains = po.demo.tessel_bay(rows=800)
    result = smf.logit("burst ~ age_years + soil", mains).fit(disp=0)
    fit = po.FittedLogit(result)
    long = {"age_years": 80, "soil": "high"}
    for answer in (
        po.excerpt(fit.change("soil", "low", "high"), "marks"),
        po.excerpt(fit.profile(long, against={"age_years": 20, "soil": "moderate"}), "ledger"),
    ):
        scope = {"result": result}
        exec(po.code(answer), scope)
        assert scope["answer"] == answer


@pytest.mark.parametrize(
    ("answer", "part", "message"),
    [
        (made.odds_answer(), "ruler", "part of a profile's picture"),
        (made.profile_answer(), "marks", "part of a change's picture"),
        (made.profile_answer(), "dial", "'ruler', 'ledger', 'marks'"),
    ],
)
def test_a_part_that_is_not_there_is_refused(answer, part, message):
    with pytest.raises(po.QuestionRefused, match=message):
        po.excerpt(answer, part)
