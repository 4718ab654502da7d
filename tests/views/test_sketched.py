"""Many rows: the picture moves by a sketch; table and saved figures come from every row."""

import threading

import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.views import effects, sketched
from tests.views.frontend import control_of, text_of
from tests.views.test_change import ends_of, move_of
from tests.views.test_curve import choose


@pytest.fixture
def many(monkeypatch):
    """Few rows count as many."""
    monkeypatch.setattr(sketched, "MANY_ROWS", 100)
    monkeypatch.setattr(effects, "MANY_ROWS", 100)


@pytest.fixture
def view(fit, page, many):
    return po.ChangeView(fit)


@pytest.fixture
def set_up(monkeypatch):
    """How often a sketch is set up."""
    made = []

    def counted(model, question):
        made.append(question)
        return sketch_for(model, question)

    sketch_for = sketched.sketch_for
    monkeypatch.setattr(sketched, "sketch_for", counted)
    return made


def close(answer, exact):
    for mine, other in (
        (answer.start, exact.start),
        (answer.end, exact.end),
        (answer.comparison.risk_difference, exact.comparison.risk_difference),
    ):
        for name in ("estimate", "se", "lower", "upper"):
            assert getattr(mine, name) == pytest.approx(getattr(other, name), abs=2e-6)


def test_few_rows_are_exact(fit, page):
    view = po.ChangeView(fit)
    assert view.is_exact
    assert view._exact_button.layout.display == "none"
    assert "<table" in view._table.value


def test_the_moving_picture_is_close_to_the_exact_answer(fit, page, view):
    assert not view.is_exact
    page.change(ends_of(view).slider, value=[20.0, 70.0])
    exact = fit.change("age_years", 20, 70)
    assert not view.is_exact
    assert view.answer.question == exact.question
    assert view.answer.counted == exact.counted
    close(view.answer, exact)


def test_one_sketch_serves_every_move_of_one_predictor(fit, page, set_up, view):
    assert len(set_up) == 1
    page.change(ends_of(view).slider, value=[20.0, 70.0])
    page.press(view._swap)
    choose(page, control_of(view, "level"), 0.9)
    assert move_of(view) == ("age_years", 70, 20)
    assert len(set_up) == 1


def test_another_predictor_or_other_rows_are_set_up_beside_the_page(fit, page, set_up, view):
    choose(page, control_of(view, "where"), (("material", "PVC"),))
    view._work.wait()
    assert view.question.where == (("material", "PVC"),)
    close(view.answer, fit.ask(view.question))
    choose(page, control_of(view, "predictor"), "lined")
    view._work.wait()
    assert move_of(view) == ("lined", False, True)
    close(view.answer, fit.ask(view.question))
    assert len(set_up) == 3


def test_while_a_sketch_is_set_up_moves_are_not_lost(fit, page, view, monkeypatch):
    begun, go_on = threading.Event(), threading.Event()
    sketch_for = sketched.sketch_for
    calls = []

    def slow(model, question):
        calls.append(question)
        begun.set()
        assert go_on.wait(20)
        return sketch_for(model, question)

    monkeypatch.setattr(sketched, "sketch_for", slow)
    choose(page, control_of(view, "where"), (("material", "PVC"),))
    assert begun.wait(20)
    assert "Looking at all 900 rows once" in text_of(view._work._said.value)
    page.change(ends_of(view).slider, value=[20.0, 70.0])
    page.change(ends_of(view).slider, value=[20.0, 71.0])
    go_on.set()
    view._work.wait()
    assert len(calls) == 1
    assert move_of(view) == ("age_years", 20, 71)
    assert view.question.where == (("material", "PVC"),)


def test_rows_that_nobody_is_among_are_refused_beside_the_page(fit, page, view, monkeypatch):
    before = view.question

    def refusing(model, question):
        raise po.QuestionRefused("No row has that; there is nobody to average over.")

    monkeypatch.setattr(sketched, "sketch_for", refusing)
    choose(page, control_of(view, "where"), (("material", "PVC"),))
    view._work.wait()
    assert "nobody to average over" in text_of(view._messages.value)
    assert view.question == before
    assert control_of(view, "where").value is None


def test_no_change_is_refused_by_a_sketch_too(fit, page, view):
    shown = move_of(view)
    page.change(ends_of(view).boxes[0], value=float(shown[2]))
    assert "is no change" in text_of(view._messages.value)
    assert move_of(view) == shown


def test_the_table_is_computed_from_every_row_when_it_is_asked_for(fit, page, view):
    assert "<table" not in view._table.value
    assert "come from a summary of the 900 rows" in text_of(view._table.value)
    assert view._exact_button.layout.display is None
    page.press(view._exact_button)
    view._work.wait()
    assert view.is_exact
    assert view.answer == fit.ask(view.question)
    assert "<table" in view._table.value
    assert view._exact_button.layout.display == "none"
    page.change(ends_of(view).slider, value=[21.0, 70.0])
    assert "<table" not in view._table.value
    assert not view.is_exact


def test_a_saved_figure_is_computed_from_every_row(fit, page, view, monkeypatch, tmp_path):
    from plainodds.views import extras

    monkeypatch.chdir(tmp_path)
    saved = []
    save_beside = extras.save_beside

    def recorded(answer, stem, kind):
        saved.append(answer)
        return save_beside(answer, stem, kind)

    monkeypatch.setattr(extras, "save_beside", recorded)
    page.press(view._extras.save_button)
    view._work.wait()
    assert saved == [fit.ask(view.question)]
    assert saved[0].comparison != view._by_sketch.comparison
    assert (tmp_path / "change-age_years.svg").exists()
    assert "change-age_years.svg" in view._extras.saved.value


def test_the_code_asks_for_the_exact_answer(fit, page, view):
    page.press(view._extras.code_button)
    assert 'fit.change("age_years"' in text_of(view._extras.code.value).replace("&quot;", '"')


def test_what_cannot_be_sketched_is_exact(two_numbers, page, many):
    # pressure, which age depends on, has more values than a sketch tells apart
    view = po.ChangeView(two_numbers)
    assert move_of(view)[0] == "age_years"
    assert view.is_exact
    page.change(ends_of(view).slider, value=[20.0, 70.0])
    assert view.answer == two_numbers.change("age_years", 20, 70)
    assert "<table" in view._table.value


def test_curves_as_observed_are_sketched_and_others_are_not(fit, page, many):
    view = po.CurveView(fit)
    assert view.is_exact
    choose(page, control_of(view, "others"), "observed")
    view._work.wait()
    assert not view.is_exact
    exact = fit.curve("age_years", by="material", others="observed")
    for mine, other in zip(view.answer.lines, exact.lines, strict=True):
        assert mine.estimate == pytest.approx(other.estimate, abs=2e-6)
        assert mine.upper == pytest.approx(other.upper, abs=2e-6)
    page.press(view._exact_button)
    view._work.wait()
    assert view.answer == exact


def test_curves_that_cannot_be_sketched_are_averaged_beside_the_page(two_numbers, page, many):
    view = po.CurveView(two_numbers)
    asked = []
    view.observe(lambda change: asked.append(threading.current_thread()), "answer")
    choose(page, control_of(view, "others"), "observed")
    view._work.wait()
    assert view.is_exact
    assert view.answer == two_numbers.curve("age_years", others="observed")
    assert asked != [threading.current_thread()]


def test_effects_over_many_rows_are_found_beside_the_page_and_can_be_stopped(
    fit, page, many, monkeypatch
):
    view = po.EffectsView(fit)
    begun, go_on = threading.Event(), threading.Event()
    ask = fit.ask

    def slow(question):
        begun.set()
        assert go_on.wait(20)
        return ask(question)

    before = view.answer
    with monkeypatch.context() as during:
        during.setattr(view.fit, "ask", slow, raising=False)
        choose(page, control_of(view, "sample"), "drawn")
        assert begun.wait(20)
        assert "Averaging over 900 rows" in text_of(view._work._said.value)
        # although this work never looks whether it is stopped
        page.press(view._work.stop_button)
        go_on.set()
    assert view.answer is before
    assert control_of(view, "sample").value == "fixed"
    choose(page, control_of(view, "sample"), "drawn")
    view._work.wait()
    assert view.answer == fit.effects(sample="drawn")


def test_moving_by_a_sketch_draws_once(fit, page, view):
    page.forget()
    page.change(ends_of(view).slider, value=[20.0, 70.0])
    assert len(page.updates(view._stage.place)) == 1


def test_a_plain_model_is_sketched_too(mains, page, many):
    view = po.ChangeView(smf.logit("burst ~ material", mains).fit(disp=0))
    exact = view.fit.ask(view.question)
    close(view.answer, exact)
