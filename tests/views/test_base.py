"""What every view does: one render per change, errors in sight, one state for all threads."""

import threading
from dataclasses import replace

import pytest

import plainodds as po
from plainodds.answers.profile import ProfileQuestion
from plainodds.drawings.picture import Picture
from tests.views.frontend import control_of, text_of

VIEWS = [po.OddsView, po.CurveView, po.ProfileView, po.EffectsView, po.ChangeView, po.SoundnessView]


def picture_of(view):
    return view._stage.place.value


@pytest.mark.parametrize("kind", VIEWS)
def test_a_result_is_enough(kind, result, page):
    view = kind(result)
    assert "<img " in picture_of(view)
    assert text_of(view._words.value)
    assert "<table" in view._table.value
    assert view.answer.question == view.question


@pytest.mark.parametrize("kind", VIEWS)
def test_the_picture_says_what_it_shows_and_is_twice_as_fine_as_its_size(kind, fit, page):
    view = kind(fit)
    shot = view._stage.shot
    assert po.alternative(view.answer) == shot.alternative
    width = int.from_bytes(shot.png[16:20], "big")
    assert width == 2 * shot.width


@pytest.mark.parametrize("kind", VIEWS)
def test_making_a_view_renders_once(kind, fit, page, monkeypatch):
    rendered = []
    png = Picture.png
    monkeypatch.setattr(Picture, "png", lambda self, ratio: rendered.append(1) or png(self, ratio))
    kind(fit)
    assert len(rendered) == 1


def test_one_message_of_a_slider_is_one_render(fit, page):
    view = po.ProfileView(fit)
    slider = view.controls["age_years"].slider
    page.forget()
    page.change(slider, value=80.0)
    assert len(page.updates(view._stage.place)) == 1
    assert view.question.values == (("age_years", 80),)
    assert page.updates(view.controls["age_years"].box) == [80.0]
    # the slider's own value comes from the page and is not sent back
    assert page.updates(slider) == []


def test_a_message_that_changes_nothing_renders_nothing(fit, page):
    view = po.ProfileView(fit)
    box = view.controls["age_years"].box
    page.forget()
    page.change(box, value=box.value)
    assert page.updates(view._stage.place) == []


def test_a_number_outside_the_range_is_one_render_and_a_remark(fit, page):
    view = po.ProfileView(fit)
    high = view.controls["pressure_m"]._high
    page.forget()
    page.change(view.controls["pressure_m"].box, value=5000.0)
    assert len(page.updates(view._stage.place)) == 1
    assert dict(view.question.values)["pressure_m"] == high
    assert "5000 m was set to" in text_of(view._messages.value)
    assert 'role="alert"' in view._messages.value
    assert page.updates(view.controls["pressure_m"].box) == [high]


def test_the_next_change_takes_the_remark_away(fit, page):
    view = po.ProfileView(fit)
    page.change(view.controls["pressure_m"].box, value=5000.0)
    page.change(view.controls["pressure_m"].box, value=60.0)
    assert view._messages.value == ""


def test_an_error_is_shown_escaped_and_the_last_picture_stays(fit, page, monkeypatch):
    view = po.ProfileView(fit)
    before, question = picture_of(view), view.question

    def broken(question):
        raise ZeroDivisionError("<img src=x onerror=alert(1)>")

    monkeypatch.setattr(view.fit, "ask", broken, raising=False)
    page.forget()
    page.change(view.controls["age_years"].slider, value=80.0)
    assert 'role="alert"' in view._messages.value
    assert "&lt;img src=x onerror=alert(1)&gt;" in view._messages.value
    assert "<img" not in view._messages.value
    assert isinstance(view.problem, ZeroDivisionError)
    assert picture_of(view) == before
    assert page.updates(view._stage.place) == []
    assert view.question == question


def test_after_an_error_the_control_shows_what_the_picture_shows(fit, page, monkeypatch):
    view = po.ProfileView(fit)
    start = view.controls["age_years"].value
    with monkeypatch.context() as during:
        during.setattr(view.fit, "ask", lambda question: 1 / 0, raising=False)
        page.change(view.controls["age_years"].box, value=80.0)
    assert view.controls["age_years"].value == start
    assert page.updates(view.controls["age_years"].box)[-1] == start
    page.change(view.controls["age_years"].box, value=81.0)
    assert view._messages.value == ""
    assert view.problem is None
    assert view.question.values == (("age_years", 81),)


def test_a_drawing_that_fails_changes_nothing(fit, page, monkeypatch):
    view = po.CurveView(fit)
    before = (view.question, view.answer, picture_of(view), view._words.value, view._table.value)
    monkeypatch.setattr(Picture, "show", lambda self, answer: 1 / 0)
    page.change(view._scale.widget, index=2)
    after = (view.question, view.answer, picture_of(view), view._words.value, view._table.value)
    assert after == before
    assert view._scale.value == "probability"


def test_an_error_of_an_observer_is_shown_too(fit, page):
    view = po.ProfileView(fit)
    view.observe(lambda change: 1 / 0, "answer")
    page.change(view.controls["age_years"].box, value=80.0)
    assert "ZeroDivisionError" in text_of(view._messages.value)


def test_nothing_is_printed(fit, page, capsys, monkeypatch):
    view = po.ProfileView(fit)
    monkeypatch.setattr(view.fit, "ask", lambda question: 1 / 0, raising=False)
    page.change(view.controls["age_years"].box, value=80.0)
    assert capsys.readouterr() == ("", "")


def test_the_question_can_be_set_from_python(fit, page):
    view = po.ProfileView(fit)
    view.question = ProfileQuestion(values=(("age_years", 80), ("material", "PVC")))
    assert view.controls["age_years"].box.value == 80.0
    assert view.controls["age_years"].slider.value == 80.0
    assert view.controls["material"].value == "PVC"
    assert view.answer.question == view.question


def test_setting_the_question_renders_once(fit, page):
    view = po.ProfileView(fit)
    page.forget()
    view.question = ProfileQuestion(values=(("age_years", 80), ("material", "cast iron")))
    assert len(page.updates(view._stage.place)) == 1


@pytest.mark.parametrize(
    "refused",
    [
        ProfileQuestion(values=(("colour", "red"),)),
        ProfileQuestion(values=(("material", "lead"),)),
        "no question",
    ],
)
def test_a_question_that_cannot_be_answered_is_refused_and_nothing_changes(fit, page, refused):
    view = po.ProfileView(fit)
    before = view.question
    with pytest.raises(po.QuestionRefused):
        view.question = refused
    assert view.question == before
    assert view.answer.question == before


def test_a_view_edits_its_own_kind_of_question_only(fit, page):
    view = po.CurveView(fit)
    with pytest.raises(po.QuestionRefused, match="edits a CurveQuestion"):
        view.question = ProfileQuestion()


def test_answers_can_be_observed(fit, page):
    view = po.ProfileView(fit)
    seen = []
    view.observe(lambda change: seen.append(change.new), "answer")
    page.change(view.controls["age_years"].box, value=80.0)
    assert seen == [fit.profile({"age_years": 80})]


def test_the_confidence_level_is_edited_like_the_rest(fit, page):
    view = po.ProfileView(fit)
    level = control_of(view, "level")
    page.change(level.widget, index=0)
    assert view.question.level == 0.8
    view.question = replace(view.question, level=0.5)
    assert level.value == 0.5


def test_two_threads_that_move_controls_at_once_lose_nothing(fit, page):
    view = po.ProfileView(fit)
    failed = []

    def move(widget, values):
        try:
            for value in values:
                page.change(widget, value=value)
        except BaseException as error:
            failed.append(error)

    age = view.controls["age_years"].slider
    pressure = view.controls["pressure_m"].box
    threads = [
        threading.Thread(target=move, args=(age, [float(each) for each in range(40, 70)])),
        threading.Thread(target=move, args=(pressure, [float(each) for each in range(30, 60)])),
    ]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join()
    assert not failed
    assert view.problem is None
    assert view.question.values == (("age_years", 69), ("pressure_m", 59.0))
    assert view.answer == fit.profile({"age_years": 69, "pressure_m": 59})
    assert po.alternative(view.answer) == view._stage.shot.alternative
    assert view.controls["age_years"].box.value == 69.0
    assert view.controls["pressure_m"].slider.value == 59.0


def test_two_threads_with_a_view_each_draw_their_own(fit, page):
    views = [po.CurveView(fit), po.ProfileView(fit)]
    alone = [po.CurveView(fit), po.ProfileView(fit)]
    for view in alone:
        view.question = replace(view.question, level=0.8)

    def redraw(view):
        for level in (0.5, 0.6, 0.7, 0.9, 0.8):
            view.question = replace(view.question, level=level)

    threads = [threading.Thread(target=redraw, args=(view,)) for view in views]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join()
    for view, expected in zip(views, alone, strict=True):
        assert view._stage.shot == expected._stage.shot


def test_every_control_shows_the_question_and_edits_it(fit, page):
    view = po.ProfileView(fit)
    view.question = ProfileQuestion(
        values=(("lined", True), ("age_years", 70), ("past_repairs", 2)), level=0.9
    )
    for binding in view._bindings.values():
        shown = binding.control.value
        assert shown == binding.read(view.question)
        assert binding.write(view.question, shown) == view.question


def test_a_narrow_page_can_have_a_picture_of_its_own(fit, page):
    view = po.CurveView(fit)
    wide = view.picture_width
    page.press(view._stage.letters)
    assert view.picture_width < wide
    assert f'width="{view.picture_width}"' in picture_of(view)
    page.press(view._stage.letters)
    assert view.picture_width == wide


def test_a_view_keeps_the_writing_with_which_it_was_made(fit, page):
    english = po.ProfileView(fit)
    with po.writing("de"):
        german = po.ProfileView(fit)
        page.change(english.controls["age_years"].slider, value=80.0)
    page.change(german.controls["age_years"].slider, value=80.0)
    german.question = replace(german.question, level=0.9)
    for view, word, other in ((english, "chance", "90"), (german, "Wahrscheinlichkeit", "90-%-")):
        assert word in text_of(view._words.value)
        assert word in view._stage.shot.alternative
        assert word in view._repr_mimebundle_()["text/html"]
        assert (other in text_of(view._words.value)) == (view is german)


def test_a_view_keeps_its_writing_on_other_threads(fit, page):
    with po.writing(decimal=","):
        view = po.ProfileView(fit)
    slider = view.controls["age_years"].slider
    thread = threading.Thread(target=page.change, args=(slider,), kwargs={"value": 80.0})
    thread.start()
    thread.join()
    assert view.question.values == (("age_years", 80),)
    with po.writing(decimal=","):
        told = po.words(view.answer).sentences[0]
    assert told in text_of(view._words.value)
    assert told != po.words(view.answer).sentences[0]
