"""Several answers in one figure."""

import numpy as np
import pytest
from matplotlib.figure import Figure

import plainodds as po
from plainodds.drawings import sharing
from plainodds.drawings.draw import draw, figure_for, height_for
from plainodds.drawings.kinds import drawing_of
from plainodds.drawings.panels import PanelsDrawing
from plainodds.drawings.theme import theme_of
from tests.drawings import made, made_effects
from tests.drawings.seen import assert_readable, boxes_on, words_on

THEME = theme_of("page")


def two_curves(**more):
    return po.panels(made.curve_by_material(), made.curve_of_levels(by=False), **more)


def drawn(answer, width=504.0):
    height = height_for(drawing_of(answer), answer, THEME, width)
    return figure_for(drawing_of(answer), answer, THEME, width, height)


def place_of(figure, text):
    return next(box for words, box in boxes_on(figure) if words == text)


def limits(drawing):
    return drawing.axes.get_ylim()


def test_panels_have_letters_in_reading_order():
    answer = po.panels(*[made.curve_alone()] * 4)
    figure, _ = drawn(answer, 620.0)
    a, b, c, d = (place_of(figure, each) for each in "ABCD")
    assert a.x0 == c.x0 < b.x0 == d.x0
    assert a.y0 == b.y0 > c.y0 == d.y0


def test_a_narrow_figure_has_its_panels_beneath_each_other():
    figure, _ = drawn(two_curves(), 300.0)
    a, b = place_of(figure, "A"), place_of(figure, "B")
    assert a.x0 == b.x0
    assert a.y0 > b.y0


def test_columns_are_as_asked_where_there_is_room():
    figure, _ = drawn(po.panels(*[made.curve_alone()] * 3, columns=1), 620.0)
    assert len({place_of(figure, each).x0 for each in "ABC"}) == 1


def test_the_same_quantity_has_one_scale_unless_it_is_not_wanted():
    _, shared = drawn(two_curves())
    assert limits(shared.panels[0]) == limits(shared.panels[1])
    _, apart = drawn(two_curves(shared=False))
    assert limits(apart.panels[0]) != limits(apart.panels[1])


def test_a_shared_scale_holds_what_either_panel_needs():
    low, high = made.curve_alone(shift=-2.0), made.curve_alone(shift=2.0)
    _, one = drawn(po.panels(low, high))
    top = max(max(line.estimate) for line in (*low.lines, *high.lines))
    assert all(limits(panel)[1] >= top for panel in one.panels)


def plot_of(drawing):
    """Lower and upper edge of a plot, in points from the figure's lower edge."""
    box = drawing.axes.get_window_extent()
    return box.y0, box.y1


def test_plots_of_one_scale_stand_in_line_in_a_row():
    figure, shared = drawn(two_curves())
    figure.draw_without_rendering()
    assert plot_of(shared.panels[0]) == pytest.approx(plot_of(shared.panels[1]), abs=0.5)
    ticks = [list(each.axes.get_yticks()) for each in shared.panels]
    assert ticks[0] == ticks[1]
    figure, apart = drawn(two_curves(shared=False))
    figure.draw_without_rendering()
    assert plot_of(apart.panels[0]) != pytest.approx(plot_of(apart.panels[1]), abs=0.5)


def margins_of(answer, width):
    return [panel.frame.room.margins for panel in drawn(answer, width)[1].panels]


def test_plots_beneath_each_other_keep_the_room_they_need():
    a, b = margins_of(two_curves(), 300.0)
    assert a.bottom > b.bottom


def test_plots_of_other_quantities_keep_the_room_they_need():
    answers = made.curve_by_material(), made.curve_of_levels("odds", by=False)
    shared, apart = (margins_of(po.panels(*answers, shared=each), 504.0) for each in (True, False))
    assert shared == apart


def test_a_plot_that_would_lose_much_of_its_height_is_not_brought_into_line(monkeypatch):
    monkeypatch.setattr(sharing, "_LEAST_PLOT", 1.1)
    a, b = margins_of(two_curves(), 504.0)
    assert a.bottom > b.bottom


def test_other_quantities_keep_their_own_scale():
    odds, chance = made.curve_by_material("odds"), made.curve_by_material()
    _, one = drawn(po.panels(odds, chance))
    assert one.panels[0].axes.get_yscale() == "log"
    assert one.panels[1].axes.get_yscale() == "linear"
    assert limits(one.panels[0]) != limits(one.panels[1])


def test_odds_ratios_share_their_axis():
    few, many = made.odds_answer(made.odds_rows()[:1]), made.odds_answer()
    _, one = drawn(po.panels(few, many))
    assert one.panels[0].axes.get_xlim() == one.panels[1].axes.get_xlim()


@pytest.mark.parametrize("width", [300.0, 504.0, 700.0])
def test_no_text_meets_another(width):
    answer = po.panels(
        made.curve_by_material(), made.odds_answer(), made_effects.change_answer(),
        made_effects.effects_answer(),
    )  # fmt: skip
    figure, _ = drawn(answer, width)
    assert_readable(figure)


def test_panels_keep_to_the_axes_that_are_given():
    figure = Figure(figsize=(12, 9))
    left, right = figure.subplots(1, 2)
    draw(two_curves(columns=1), ax=left)
    slot = left.get_position(original=True)
    for _, box in boxes_on(figure):
        if "Chance" in _:
            assert box.x1 <= figure.bbox.width * slot.x1 + 1
    assert len(right.lines) == 0


def test_other_figures_of_the_same_structure_are_followed():
    first = po.panels(made.curve_alone(), made.curve_alone())
    second = po.panels(made.curve_alone(shift=1.0), made.curve_alone(shift=0.5))
    assert PanelsDrawing.structure(first) == PanelsDrawing.structure(second)
    _, one = drawn(first)
    one.update(second)
    seen = one.panels[0].lines[0].supported.get_ydata()
    assert np.nanmax(seen) == pytest.approx(max(second.answers[0].lines[0].estimate))


def test_panels_are_saved_captioned_and_told_as_any_answer(tmp_path):
    answer = po.panels(made.odds_answer(), made.curve_by_material())
    for suffix in ("svg", "pdf", "png"):
        assert po.save(answer, tmp_path / f"fig.{suffix}", "page").stat().st_size > 1_000
    caption = po.caption(answer)
    assert caption.startswith("A: Odds ratios")
    assert " B: Chance of" in caption
    assert caption.count("From a logistic regression") == 1
    assert po.alternative(answer).startswith("Panel A: ")
    told = str(po.words(answer))
    assert told.startswith("A: ")
    assert told.count("what goes with what") == 1
    notes = [po.methods_note(each) for each in answer.answers]
    assert set(po.methods_note(answer).references) == {r for n in notes for r in n.references}
    assert po.from_json(po.to_json(answer)) == answer


def test_the_code_gives_the_panels_again(fit_of_demo):
    fit, result = fit_of_demo
    answer = po.panels(fit.curve("age_years"), fit.odds("soil"), columns=1)
    scope = {"result": result}
    exec(po.code(answer), scope)
    assert scope["answer"] == answer
    assert po.code(answer).count("po.FittedLogit") == 1


@pytest.fixture(scope="module")
def fit_of_demo():
    import statsmodels.formula.api as smf

    result = smf.logit("burst ~ age_years + soil", po.demo.tessel_bay(rows=800)).fit(disp=0)
    return po.FittedLogit(result), result


@pytest.mark.parametrize(
    ("given", "more", "message"),
    [
        ([], {}, "from 2 to 12"),
        ([made.odds_answer()], {}, "from 2 to 12"),
        ([made.odds_answer()] * 13, {}, "from 2 to 12"),
        ([made.odds_answer(), "odds"], {}, "not a str"),
        ([made.odds_answer(), two_curves()], {}, "not a PanelsAnswer"),
        ([made.odds_answer()] * 2, {"columns": 0}, "columns=0"),
        ([made.odds_answer()] * 2, {"columns": 1.5}, "columns=1.5"),
    ],
)
def test_what_makes_no_panels_is_refused(given, more, message):
    with pytest.raises(po.QuestionRefused, match=message):
        po.panels(*given, **more)


def test_one_letter_more_than_ten_panels():
    figure, _ = drawn(po.panels(*[made.curve_alone()] * 11, columns=4), 900.0)
    assert "K" in words_on(figure)
