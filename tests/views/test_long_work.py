"""Work beside the page: the picture stays meanwhile, it can be stopped, the last wish wins."""

import threading
from dataclasses import replace

import pytest

import plainodds as po
from plainodds.answers.odds import OddsQuestion, answer_odds
from plainodds.answers.progress import Stopped
from plainodds.views import odds
from tests.views.frontend import control_of, text_of
from tests.views.test_curve import choose

LIKELIHOOD = OddsQuestion(predictors=("lined", "past_repairs"), interval="likelihood")
WALD = replace(LIKELIHOOD, interval="wald")
WAIT = 20


class Refits:
    """Refits that wait for the test at each step."""

    def __init__(self):
        self.begun, self.go_on, self.stopped = (threading.Event() for _ in range(3))
        self.asked = []

    def __call__(self, model, question, progress):
        self.asked.append(question)
        progress(0, 3)
        self.begun.set()
        assert self.go_on.wait(WAIT)
        try:
            progress(1, 3)
        except Stopped:
            self.stopped.set()
            raise
        return answer_odds(model, question)


@pytest.fixture
def refits(monkeypatch):
    made = Refits()
    monkeypatch.setattr(odds, "answer_odds", made)
    yield made
    made.go_on.set()


@pytest.fixture
def view(fit, page):
    return po.OddsView(fit, WALD)


def begin(view, page, refits):
    choose(page, control_of(view, "interval"), "likelihood")
    assert refits.begun.wait(WAIT)


def test_a_fit_without_likelihood_intervals_does_not_offer_them(mains, page):
    import statsmodels.formula.api as smf

    robust = smf.logit("burst ~ lined", mains).fit(disp=0, cov_type="HC1")
    with pytest.raises(StopIteration):
        control_of(po.OddsView(robust), "interval")


def test_likelihood_intervals_come_when_they_are_done(fit, page, view):
    choose(page, control_of(view, "interval"), "likelihood")
    view._work.wait()
    assert view.problem is None
    assert view.question == LIKELIHOOD
    assert view.answer == fit.ask(LIKELIHOOD)
    assert view.answer.rows[0].odds_ratio.lower != fit.ask(WALD).rows[0].odds_ratio.lower


def test_meanwhile_the_last_picture_stays_and_a_bar_shows_how_far_it_is(view, page, refits):
    before = view._stage.place.value
    begin(view, page, refits)
    assert view._stage.place.value == before
    assert view.question == WALD
    assert control_of(view, "interval").value == "likelihood"
    assert '<progress value="0" max="3" aria-label=' in view._work._said.value
    assert "0 of 3" in text_of(view._work._said.value)
    assert view._work.stop_button in view._work.widget.children
    refits.go_on.set()
    view._work.wait()
    assert view._work.widget.children == ()
    assert view._stage.place.value != before


def test_stopping_needs_no_lock_keeps_the_picture_and_puts_controls_back(view, page, refits):
    before = view._stage.place.value
    begin(view, page, refits)
    page.press(view._work.stop_button)
    assert view._work.widget.children == ()
    assert control_of(view, "interval").value == "wald"
    assert "Stopped" in text_of(view._messages.value)
    refits.go_on.set()
    assert refits.stopped.wait(WAIT)
    assert view._stage.place.value == before
    assert view.question == WALD
    assert view.problem is None


def test_after_a_stop_the_same_can_be_asked_again(fit, view, page, refits):
    begin(view, page, refits)
    page.press(view._work.stop_button)
    refits.go_on.set()
    choose(page, control_of(view, "interval"), "likelihood")
    view._work.wait()
    assert view.question == LIKELIHOOD
    assert view._messages.value == ""


def test_a_change_meanwhile_adds_to_what_is_wanted(fit, view, page, refits):
    begin(view, page, refits)
    choose(page, control_of(view, "level"), 0.9)
    refits.go_on.set()
    view._work.wait()
    assert view.question == replace(LIKELIHOOD, level=0.9)
    assert [asked.level for asked in refits.asked] == [0.95, 0.9]


def test_going_back_meanwhile_needs_no_work_and_what_comes_late_is_dropped(view, page, refits):
    before = view._stage.place.value
    begin(view, page, refits)
    choose(page, control_of(view, "interval"), "wald")
    assert view._work.widget.children == ()
    refits.go_on.set()
    assert refits.stopped.wait(WAIT)
    assert view.question == WALD
    assert view._stage.place.value == before


def test_an_error_in_the_work_is_shown_and_controls_go_back(view, page, monkeypatch):
    def broken(model, question, progress):
        raise ZeroDivisionError("<img src=x onerror=alert(1)>")

    monkeypatch.setattr(odds, "answer_odds", broken)
    before = view._stage.place.value
    choose(page, control_of(view, "interval"), "likelihood")
    view._work.wait()
    assert "&lt;img src=x" in view._messages.value
    assert isinstance(view.problem, ZeroDivisionError)
    assert view._stage.place.value == before
    assert control_of(view, "interval").value == "wald"
    assert view._work.widget.children == ()
    choose(page, control_of(view, "level"), 0.9)
    assert view.problem is None
    assert view._messages.value == ""


def test_a_question_set_from_python_is_waited_for(fit, view):
    view.question = LIKELIHOOD
    assert view.answer == fit.ask(LIKELIHOOD)
    assert control_of(view, "interval").value == "likelihood"
    assert view._work.widget.children == ()


def test_a_view_may_start_with_likelihood_intervals(fit, page):
    view = po.OddsView(fit, LIKELIHOOD)
    assert view.answer == fit.ask(LIKELIHOOD)


def test_a_question_set_from_python_can_be_stopped(view, page, refits):
    failed = []

    def ask():
        try:
            view.question = LIKELIHOOD
        except Stopped as error:
            failed.append(error)

    cell = threading.Thread(target=ask)
    cell.start()
    assert refits.begun.wait(WAIT)
    # the cell holds the lock by now: the button must not wait for it
    page.press(view._work.stop_button)
    refits.go_on.set()
    cell.join(WAIT)
    assert len(failed) == 1
    assert view.question == WALD
    assert view._work.widget.children == ()


def test_the_lock_is_free_while_the_work_goes_on(fit, view, page, refits):
    begin(view, page, refits)
    other = po.ProfileView(fit)
    page.change(other.controls["age_years"].slider, value=80.0)
    assert other.question.values == (("age_years", 80),)
    refits.go_on.set()
    view._work.wait()


def test_another_size_of_letters_needs_no_new_work(view, page, refits):
    refits.go_on.set()
    choose(page, control_of(view, "interval"), "likelihood")
    view._work.wait()
    page.press(view._stage.letters)
    assert view.problem is None
    assert len(refits.asked) == 1
