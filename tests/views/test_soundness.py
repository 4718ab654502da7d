"""SoundnessView: the list of findings, the one that is shown, and looking again."""

import re
import threading
import time
from dataclasses import replace
from html import unescape

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.checks.finding import TOPICS
from plainodds.answers.progress import Stopped
from plainodds.answers.soundness import SoundnessQuestion, answer_soundness, shown_finding
from plainodds.drawings.picture import Picture
from plainodds.phrases.checks.finding_words import finding_figures, finding_words
from plainodds.views import soundness
from plainodds.views.findings import entries
from plainodds.views.soundness import figures_table
from plainodds.views.whose import predictors_of
from tests.answers.checks.fits import binomial, invented
from tests.views.frontend import control_of, text_of
from tests.views.test_curve import choose, labels
from tests.views.test_profile import cells

WAIT = 20
DATA = invented(400).assign(clinic=lambda frame: frame.index // 8)
FORMULA = "y ~ x + w + count + group"


@pytest.fixture(scope="module")
def sound():
    return po.FittedLogit(
        smf.logit(FORMULA, DATA).fit(disp=0),
        predictors={"x": po.Predictor(label="Height", unit="cm")},
    )


@pytest.fixture
def view(sound, page):
    return po.SoundnessView(sound)


@pytest.fixture
def looks(monkeypatch):
    """The questions that were computed."""
    asked = []

    def counted(model, question, *others):
        asked.append(question)
        return answer_soundness(model, question, *others)

    monkeypatch.setattr(soundness, "answer_soundness", counted)
    return asked


@pytest.fixture(scope="module")
def bent():
    """Two numbers along which the data bend where the model does not, and one along which not."""
    random = np.random.default_rng(2)
    frame = pd.DataFrame({name: random.normal(size=3000) for name in "abc"})
    eta = -1.2 + 1.1 * (frame.a**2 - 1) + 0.5 * (frame.b**2 - 1) + 0.5 * frame.c
    frame["y"] = (random.uniform(size=3000) < 1 / (1 + np.exp(-eta))).astype(int)
    return po.FittedLogit(smf.logit("y ~ a + b + c", frame).fit(disp=0))


def read(markup):
    return unescape(text_of(markup))


def card_of(view, topic):
    return next(card for card in view._list.cards if card._entry.first.topic == topic)


def chosen(view):
    return [card for card in view._list.cards if "plainodds-chosen" in card.widget._dom_classes]


def of(answer, topic):
    return next(each for each in answer.findings if each.topic == topic)


# --- the list ----------------------------------------------------------------------


def test_every_topic_has_a_card_the_heaviest_first(view):
    told = [card._entry.first for card in view._list.cards]
    assert {each.topic for each in told} == set(TOPICS)
    assert [each.weight for each in told] == sorted((each.weight for each in told), reverse=True)


def test_a_card_has_a_sign_a_heading_a_weight_and_a_sentence_in_words(view, sound):
    finding = of(view.answer, "convergence")
    card = card_of(view, "convergence")
    said = finding_words(finding, sound.subject, 0.95)
    written = card.button.description.replace("\N{NO-BREAK SPACE}", " ")
    assert written == f"○ {said.heading}: nothing found"
    assert read(card.sentence.value) == said.what


def test_signs_differ_where_weights_do(bent, page):
    view = po.SoundnessView(bent)
    signs = {card._entry.first.concern: card.button.description[0] for card in view._list.cards}
    assert len(signs) >= 3
    assert len(set(signs.values())) == len(signs)


def test_shapes_that_weigh_stand_one_by_one_and_the_others_together(bent, sound):
    of_shape = [each for each in entries(bent.soundness()) if each.first.topic == "shape"]
    assert [[each.about for each in entry.findings] for entry in of_shape] == [
        [("a",)], [("b",)], [("c",)],
    ]  # fmt: skip
    assert [entry.first.concern for entry in of_shape[-1:]] == ["nothing found"]
    (together,) = [each for each in entries(sound.soundness()) if each.first.topic == "shape"]
    assert "3 predictors" in together.heading(sound.subject)
    assert together.sentence(sound.subject, 0.95) == "Height, w and count."


def test_what_weighs_alike_in_two_shapes_is_still_told_apart(bent):
    answer = bent.soundness()
    heavy = of(answer, "shape")
    twice = replace(
        answer,
        findings=tuple(
            replace(each, concern=heavy.concern, reasons=heavy.reasons)
            if each.topic == "shape"
            else each
            for each in answer.findings
        ),
    )
    assert sum(entry.first.topic == "shape" for entry in entries(twice)) == 3


def test_the_first_sentence_is_hers_and_the_analyst_finds_all_of_them_below(view):
    assert read(view._summary.value) == po.words(view.answer).sentences[0]
    for sentence in po.words(view.answer, "technical").sentences:
        assert sentence.split(":")[0] in read(view._for_analysts.value)
    assert "<details>" in view._for_analysts.value


# --- choosing ----------------------------------------------------------------------


def test_it_starts_with_the_heaviest_that_has_evidence(view, sound):
    assert view.question == SoundnessQuestion()
    assert view.answer == sound.soundness()
    (card,) = chosen(view)
    assert card._entry.first == shown_finding(view.answer)
    assert card.button.tooltip == "Shown in the picture"


def test_at_no_moment_are_two_findings_marked(view, page):
    marked = []
    for card in view._list.cards:
        card.widget.observe(lambda _: marked.append(len(chosen(view))), "_dom_classes")
    told = [card._entry.first.topic for card in view._list.cards]
    for topic in (told[-1], told[0], told[1]):
        page.press(card_of(view, topic).button)
    assert set(marked) == {0, 1}


@pytest.mark.parametrize("topic", TOPICS)
def test_choosing_a_finding_shows_its_picture_words_and_figures(view, sound, page, topic):
    page.press(card_of(view, topic).button)
    assert view.problem is None
    finding = shown_finding(view.answer)
    assert finding.topic == topic
    assert [card._entry.first.topic for card in chosen(view)] == [topic]
    said = finding_words(finding, sound.subject, 0.95)
    written = read(view._words.value)
    for each in (said.what, said.why, said.next_step):
        assert each in written
    assert view._stage.shot.alternative == po.alternative(view.answer)
    assert [unescape(row[0]) for row in cells(view._table.value)] == [
        label for label, _ in finding_figures(finding, sound.subject, 0.95)
    ]


def test_choosing_sends_one_picture_and_computes_nothing_again(sound, page, looks):
    view = po.SoundnessView(sound)
    assert len(looks) == 1
    page.forget()
    page.press(card_of(view, "discrimination").button)
    assert len(page.updates(view._stage.place)) == 1
    page.press(card_of(view, "shape").button)
    choose(page, control_of(view, "predictor"), "count")
    view.question = sound.soundness(show="influence").question
    page.press(view._stage.letters)
    assert view.problem is None
    assert len(looks) == 1


def test_choosing_what_is_shown_sends_nothing(view, page):
    page.press(card_of(view, "calibration").button)
    page.forget()
    page.press(card_of(view, "calibration").button)
    assert page.sent == []


def test_only_the_cards_that_change_are_sent(view, page):
    page.forget()
    page.press(card_of(view, "calibration").button)
    assert all(page.updates(card.button, "description") == [] for card in view._list.cards)
    assert all(page.updates(card.sentence) == [] for card in view._list.cards)


@pytest.mark.parametrize("name", ["x", "w", "count"])
def test_the_shape_of_each_number_can_be_chosen(view, sound, page, name):
    page.press(card_of(view, "shape").button)
    control = control_of(view, "predictor")
    assert [held for _, held in control._options] == ["x", "w", "count"]
    assert labels(control)[0] == "○ Height: nothing found"
    choose(page, control, name)
    assert view.question == SoundnessQuestion(show="shape", predictor=name)
    assert shown_finding(view.answer).about == (name,)
    assert control.value == name


def test_a_predictor_chosen_for_the_heaviest_finding_states_its_topic_too(bent, page):
    view = po.SoundnessView(bent)
    assert shown_finding(view.answer).topic == "shape"
    choose(page, control_of(view, "predictor"), "b")
    assert view.question == SoundnessQuestion(show="shape", predictor="b")


@pytest.mark.parametrize("topic", ["calibration", "dependence", "amount"])
def test_where_a_topic_has_no_predictors_none_is_offered(view, page, topic):
    page.press(card_of(view, topic).button)
    assert view._whose.place.children == ()


def test_influence_can_be_shown_for_one_predictor_or_all(view, sound, page):
    page.press(card_of(view, "influence").button)
    control = control_of(view, "predictor")
    assert control.value == ""
    choose(page, control, "group")
    assert view.question == SoundnessQuestion(show="influence", predictor="group")
    page.press(card_of(view, "calibration").button)
    assert view.question == SoundnessQuestion(show="calibration")


def test_predictors_offered_are_those_that_the_evidence_names(sound):
    answer = sound.soundness()
    influence = of(answer, "influence")
    named = {moved.predictor for each in influence.evidence.standing_out for moved in each.moved}
    offered = predictors_of(answer, influence)
    assert {name for _, name in offered} == {"", *named}
    # one predictor has levels: nothing to choose between
    assert predictors_of(answer, of(answer, "levels")) == []


def test_files_are_named_after_what_is_shown(view, page):
    page.press(card_of(view, "shape").button)
    choose(page, control_of(view, "predictor"), "count")
    assert view._stem() == "soundness-shape-count"


# --- looking again -----------------------------------------------------------------


def test_another_level_is_looked_at_once(sound, page, looks):
    view = po.SoundnessView(sound)
    for level in (0.9, 0.95, 0.9):
        choose(page, control_of(view, "level"), level)
    assert [asked.level for asked in looks] == [0.95, 0.9]
    assert view.answer == sound.soundness(level=0.9)


def test_a_column_of_the_data_tells_which_rows_belong_together(view, sound, page):
    control = control_of(view, "groups")
    assert labels(control) == [
        "nobody has said", "by x", "by w", "by count", "by group", "by clinic",
    ]  # fmt: skip
    choose(page, control, view.fit.soundness(groups="clinic").question.groups)
    assert view.problem is None
    assert view.answer == sound.soundness(groups="clinic", show="dependence")
    assert "clinic" in read(view._words.value)


def test_a_column_that_cannot_tell_is_refused_and_the_picture_stays(sound, page):
    frame = DATA.assign(same=1)
    view = po.SoundnessView(smf.logit(FORMULA, frame).fit(disp=0))
    before = view._stage.place.value
    groups = next(held for label, held in control_of(view, "groups")._options if label == "by same")
    choose(page, control_of(view, "groups"), groups)
    assert "all rows into one group" in read(view._messages.value)
    assert view._stage.place.value == before
    assert control_of(view, "groups").value is None


def test_groups_may_be_handed_over_as_a_column_or_as_values(sound, page):
    by_name = po.SoundnessView(sound, groups="clinic")
    assert by_name.answer == sound.soundness(groups="clinic")
    values = DATA.clinic.to_numpy()
    by_value = po.SoundnessView(sound, sound.soundness(level=0.9).question, groups=values)
    assert by_value.answer == sound.soundness(groups=values, level=0.9)
    control = control_of(by_value, "groups")
    assert labels(control)[:2] == ["nobody has said", "as the values handed over say"]
    choose(page, control, None)
    assert by_value.answer == sound.soundness(level=0.9)
    choose(page, control, control._options[1][1])
    assert by_value.answer == sound.soundness(groups=values, level=0.9, show="dependence")


def test_groups_that_cannot_be_read_are_refused_at_once(sound, page):
    with pytest.raises(po.QuestionRefused, match="'ward'"):
        po.SoundnessView(sound, groups="ward")
    with pytest.raises(po.QuestionRefused, match="values"):
        po.SoundnessView(sound, sound.soundness(groups=DATA.clinic.to_numpy()).question)


def test_without_a_frame_no_columns_are_offered(page):
    result = sm.Logit(DATA.y.to_numpy(), sm.add_constant(DATA[["x", "w"]].to_numpy())).fit(disp=0)
    view = po.SoundnessView(result)
    assert view._groups.widgets == []


@pytest.mark.parametrize(
    "asked",
    [
        {"show": "shape", "predictor": "w"},
        {"show": "dependence", "groups": "clinic", "level": 0.8},
        {"optimism": "cross-validation", "repeats": 2, "show": "calibration"},
    ],
)
def test_controls_show_the_question_that_is_set(view, sound, asked):
    view.question = sound.soundness(**asked).question
    assert view.answer == sound.soundness(**asked)
    for binding in view._bindings.values():
        assert binding.control.value == binding.read(view.question)
        again = view.fit.ask(binding.write(view.question, binding.control.value))
        assert again.findings == view.answer.findings
        assert shown_finding(again) == shown_finding(view.answer)


@pytest.mark.parametrize(
    "asked", [{"show": "vibes"}, {"predictor": "colour"}, {"show": "shape", "predictor": "group"}]
)
def test_what_there_is_not_is_refused_and_nothing_changes(view, asked):
    before = view.question
    with pytest.raises(po.QuestionRefused):
        view.question = SoundnessQuestion(**asked)
    assert view.question == before
    assert view.answer.question == before


# --- the fit's own optimism, beside the page ----------------------------------------


class Looks:
    """Looking that waits for the test at each step."""

    def __init__(self):
        self.begun, self.go_on, self.stopped = (threading.Event() for _ in range(3))
        self.asked = []

    def __call__(self, model, question, groups, progress):
        self.asked.append(question)
        progress(0, question.repeats + 13)
        self.begun.set()
        assert self.go_on.wait(WAIT)
        try:
            progress(1, 3)
        except Stopped:
            self.stopped.set()
            raise
        return replace(answer_soundness(model, replace(question, repeats=2)), question=question)


@pytest.fixture
def slow(monkeypatch, view):
    made = Looks()
    monkeypatch.setattr(soundness, "answer_soundness", made)
    yield made
    made.go_on.set()
    until_idle(view)


def until_idle(view):
    """Wait until nothing is wanted but what is shown, whichever thread begins what."""
    until = time.monotonic() + WAIT
    while view._waiting is not None or view._work.key is not None:
        assert time.monotonic() < until
        time.sleep(0.01)


def begin(view, page, slow, way="cross-validation"):
    choose(page, control_of(view, "optimism"), way)
    assert slow.begun.wait(WAIT)


def test_optimism_is_found_beside_the_page(view, sound, page):
    choose(page, control_of(view, "optimism"), "bootstrap")
    page.change(control_of(view, "repeats").widget, value=3.0)
    view._work.wait()
    assert view.problem is None
    assert view.answer == sound.soundness(optimism="bootstrap", repeats=3, show="calibration")
    assert "corrected for optimism" in read(view._table.value)


@pytest.mark.parametrize(("way", "repeats"), [("bootstrap", 200), ("cross-validation", 20)])
def test_meanwhile_a_bar_counts_repeats_and_their_number_can_be_changed(
    view, page, slow, way, repeats
):
    assert control_of(view, "repeats").widget not in view._optimism._place.children
    begin(view, page, slow, way)
    assert f'<progress value="0" max="{repeats}"' in view._work._said.value
    assert f"0 of {repeats}" in read(view._work._said.value)
    assert view._optimism._place.children == (control_of(view, "repeats").widget,)
    assert control_of(view, "repeats").value == repeats
    assert view.question == SoundnessQuestion()


def test_stopping_keeps_what_is_shown_and_puts_controls_back(view, page, slow):
    before = view._stage.place.value
    begin(view, page, slow)
    page.press(view._work.stop_button)
    assert control_of(view, "optimism").value == "none"
    assert view._optimism._place.children == ()
    assert "Stopped" in read(view._messages.value)
    slow.go_on.set()
    assert slow.stopped.wait(WAIT)
    assert view._stage.place.value == before
    assert view._begin.layout.display == "none"


def test_meanwhile_another_finding_is_shown_at_once_and_the_work_goes_on(view, page, slow):
    begin(view, page, slow)
    page.press(card_of(view, "discrimination").button)
    assert view.question == SoundnessQuestion(show="discrimination")
    assert [card._entry.first.topic for card in chosen(view)] == ["discrimination"]
    assert control_of(view, "optimism").value == "cross-validation"
    assert view._work.key is not None
    slow.go_on.set()
    view._work.wait()
    assert len(slow.asked) == 1
    assert view.question == SoundnessQuestion(
        show="discrimination", optimism="cross-validation", repeats=20
    )


def test_a_change_that_comes_while_the_result_is_drawn_is_not_lost(view, page, slow, monkeypatch):
    repeats = control_of(view, "repeats").widget
    other = threading.Thread(target=page.change, args=(repeats,), kwargs={"value": 30.0})
    show = Picture.show

    def interrupted(picture, answer):
        if slow.go_on.is_set() and not other.ident:
            other.start()
            # the number has arrived and waits for its turn
            until = time.monotonic() + WAIT
            while repeats.value != 30 and time.monotonic() < until:
                time.sleep(0.01)
        show(picture, answer)

    monkeypatch.setattr(Picture, "show", interrupted)
    begin(view, page, slow)
    slow.go_on.set()
    until_idle(view)
    other.join(WAIT)
    until_idle(view)
    assert view.problem is None
    assert repeats.value == 30
    assert view.question.repeats == 30


def test_going_back_and_forth_computes_nothing_again(view, page, slow):
    slow.go_on.set()
    begin(view, page, slow)
    view._work.wait()
    choose(page, control_of(view, "optimism"), "none")
    assert view.question == SoundnessQuestion(show="calibration")
    choose(page, control_of(view, "optimism"), "cross-validation")
    view._work.wait()
    assert view.question.optimism == "cross-validation"
    assert len(slow.asked) == 1


@pytest.mark.parametrize("repeats", [2.5, 0.0])
def test_a_number_of_repeats_that_cannot_be_had_is_refused(view, page, repeats):
    view.question = SoundnessQuestion(optimism="bootstrap", repeats=2)
    page.change(control_of(view, "repeats").widget, value=repeats)
    view._work.wait()
    assert "whole number" in read(view._messages.value)
    assert control_of(view, "repeats").value == 2
    assert view.question.repeats == 2


def test_an_optimism_that_cannot_be_had_is_refused(page):
    view = po.SoundnessView(smf.gee("y ~ x + w", DATA.clinic, DATA, family=binomial()).fit())
    choose(page, control_of(view, "optimism"), "bootstrap")
    view._work.wait()
    assert "Not possible" in read(view._messages.value)
    assert control_of(view, "optimism").value == "none"


def test_two_threads_that_choose_at_once_end_with_one_state(view, page):
    failed = []

    def press(topics):
        try:
            for topic in topics:
                page.press(card_of(view, topic).button)
        except BaseException as error:
            failed.append(error)

    threads = [
        threading.Thread(target=press, args=(("calibration", "shape", "amount", "overall"),)),
        threading.Thread(target=press, args=(("influence", "levels", "missing", "separation"),)),
    ]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join(WAIT)
    assert not failed
    assert view.problem is None
    assert view._stage.shot.alternative == po.alternative(view.answer)
    assert [card._entry.first.topic for card in chosen(view)] == [view.question.show]


# --- many rows ---------------------------------------------------------------------


@pytest.fixture
def many(monkeypatch):
    """Few rows count as many."""
    monkeypatch.setattr(soundness, "MANY_ROWS", 100)


@pytest.fixture
def opening(sound, page, many, monkeypatch):
    """A view whose first look goes on."""
    made = Looks()
    monkeypatch.setattr(soundness, "answer_soundness", made)
    view = po.SoundnessView(sound, SoundnessQuestion(show="calibration"))
    assert made.begun.wait(WAIT)
    yield view, made
    made.go_on.set()


def test_a_view_of_many_rows_opens_at_once_and_the_findings_come_when_they_are_found(
    opening, sound
):
    view, slow = opening
    assert view.answer is None
    assert "400 rows" in read(view._work._said.value)
    assert view._work.widget in view._ahead.children
    assert view._list.widget.layout.display == "none"
    assert view._extras.widget.layout.display == "none"
    slow.go_on.set()
    view._work.wait()
    assert view.problem is None
    assert view.answer == sound.soundness(show="calibration")
    assert view._list.widget.layout.display is None
    assert view._extras.widget.layout.display is None
    assert (view._ahead.children, view._beside.children) == ((), (view._work.widget,))
    assert view._begin.layout.display == "none"


def test_what_is_left_in_the_page_meanwhile_says_so(opening):
    view, _ = opening
    data = view._repr_mimebundle_()
    assert "application/vnd.jupyter.widget-view+json" in data
    assert "still being looked at" in data["text/html"]


class Place:
    """An output that can be written again."""

    def __init__(self, data):
        self.data = data

    def update(self, data, raw):
        self.data = data


def test_a_saved_notebook_gets_the_picture_once_there_is_one(opening, monkeypatch):
    view, slow = opening
    places = []

    def display(data, raw, display_id):
        places.append(Place(data))
        return places[-1]

    monkeypatch.setattr(soundness, "display", display)
    view._ipython_display_()
    assert [("<img " in each.data["text/html"]) for each in places] == [False, False]
    slow.go_on.set()
    view._work.wait()
    assert view.problem is None
    assert [("<img " in each.data["text/html"]) for each in places] == [True, True]
    first = places[0].data
    view.question = SoundnessQuestion(show="levels")
    assert places[0].data is first


def test_a_first_look_can_be_stopped_and_begun_again(opening, page, sound):
    view, slow = opening
    page.press(view._work.stop_button)
    assert "has not been looked at yet" in read(view._messages.value)
    assert view._begin.layout.display is None
    slow.go_on.set()
    assert slow.stopped.wait(WAIT)
    page.press(view._begin)
    view._work.wait()
    assert view._messages.value == ""
    assert view.answer == sound.soundness(show="calibration")
    assert view._begin.layout.display == "none"


def test_a_first_look_that_fails_says_why_and_can_be_tried_again(sound, page, many, monkeypatch):
    with monkeypatch.context() as during:
        during.setattr(soundness, "answer_soundness", lambda *each: 1 / 0)
        view = po.SoundnessView(sound)
        view._work.wait()
    assert "ZeroDivisionError" in read(view._messages.value)
    assert view._begin.layout.display is None
    page.press(view._begin)
    view._work.wait()
    assert view.answer == sound.soundness()


def test_a_question_set_from_python_is_waited_for(sound, page, many):
    view = po.SoundnessView(sound)
    view.question = SoundnessQuestion(show="levels")
    assert view.answer == sound.soundness(show="levels")


# --- whatever the fit --------------------------------------------------------------


def without_data():
    result = smf.glm(FORMULA, DATA, family=binomial()).fit()
    result.remove_data()
    return po.FittedLogit(result, data=DATA)


def grouped():
    frame = DATA.groupby(["count", "group"]).y.agg(events="sum", all="size").reset_index()
    frame["others"] = frame["all"] - frame.events
    return smf.glm("events + others ~ count + group", frame, family=binomial()).fit()


FITS = {
    "grouped counts": grouped,
    "frequency weights": lambda: smf.glm(
        FORMULA, DATA, family=binomial(), freq_weights=DATA.index.to_numpy() % 3 + 1
    ).fit(),
    "an offset": lambda: smf.glm(
        FORMULA, DATA, family=binomial(), offset=np.linspace(-1, 1, len(DATA))
    ).fit(),
    "arrays": lambda: sm.Logit(DATA.y, sm.add_constant(DATA[["x", "w"]])).fit(disp=0),
    "a GEE": lambda: smf.gee(FORMULA, DATA.clinic, DATA, family=binomial()).fit(),
    "a penalty": lambda: smf.logit(FORMULA, DATA).fit_regularized(alpha=1.0, disp=0),
    "no data": without_data,
    "a chosen sample": lambda: po.FittedLogit(
        smf.logit(FORMULA, DATA).fit(disp=0), sampling="case-control"
    ),
    "splines": lambda: smf.logit("y ~ bs(x, df=5) * group + I(w**2) + w", DATA).fit(disp=0),
    "levels only": lambda: smf.logit("y ~ group", DATA).fit(disp=0),
    "a constant": lambda: smf.logit("y ~ 0 + x", DATA).fit(disp=0),
    "nine rows": lambda: smf.glm("y ~ w", DATA[9:18], family=binomial()).fit(),
    "separated outcomes": lambda: smf.glm(
        "y ~ x + w", DATA.assign(y=(DATA.x > 50) * 1), family=binomial()
    ).fit(),
    "a column twice": lambda: smf.glm(
        "y ~ x + twice", DATA.assign(twice=2 * DATA.x), family=binomial()
    ).fit(),
}


@pytest.mark.filterwarnings("ignore")
@pytest.mark.parametrize("kind", FITS)
def test_whatever_the_fit_every_card_can_be_opened(kind, page, monkeypatch):
    # everything is drawn; writing the files would take longer than all the rest
    monkeypatch.setattr(Picture, "png", lambda self, ratio: b"")
    view = po.SoundnessView(FITS[kind]())
    for card in list(view._list.cards):
        page.press(card.button)
        assert view.problem is None
        assert shown_finding(view.answer) == card._entry.first
        assert read(view._words.value)
        assert "<img " in view._stage.place.value
        assert po.code(view.answer)


def test_without_data_the_view_names_what_cannot_be_known(page):
    view = po.SoundnessView(without_data())
    weights = {card._entry.first.topic: card.button.description for card in view._list.cards}
    for topic in ("amount", "separation", "calibration"):
        assert weights[topic].startswith("?")
        page.press(card_of(view, topic).button)
        assert view._table.value == ""
        assert "cannot be told" in read(view._words.value)


def test_long_figures_are_opened_by_whoever_wants_them(sound):
    short = figures_table(sound.soundness(show="convergence"))
    long = figures_table(sound.soundness(show="influence"))
    assert "<details>" not in short
    assert re.match(r"<details><summary>Figures behind it: \d+</summary><table>", long)
