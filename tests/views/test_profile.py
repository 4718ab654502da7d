"""ProfileView: sliders for every predictor, the pin, the ledger, the warning."""

import re

import plainodds as po
from plainodds.answers.profile import ProfileQuestion
from plainodds.views.controls import ChoiceControl, NumberControl, SwitchControl
from plainodds.views.profile import ledger_table
from tests.views.frontend import text_of


def cells(table):
    """Texts of a table's body, row by row."""
    body = table.partition("<tbody>")[2]
    return [
        [text_of(cell) for cell in re.findall(r"<t[hd][^>]*>(.*?)</t[hd]>", row)]
        for row in re.findall(r"<tr[^>]*>(.*?)</tr>", body)
    ]


def test_it_starts_at_the_typical_profile(fit, page):
    view = po.ProfileView(fit)
    assert view.question == ProfileQuestion()
    for facts in fit.subject.predictors:
        assert view.controls[facts.name].value == facts.typical


def test_each_predictor_has_the_control_of_its_kind(fit, page):
    view = po.ProfileView(fit)
    kinds = {name: type(control) for name, control in view.controls.items()}
    assert kinds == {
        "material": ChoiceControl,
        "lined": SwitchControl,
        "age_years": NumberControl,
        "pressure_m": NumberControl,
        "past_repairs": NumberControl,
    }


def test_only_what_is_not_typical_is_stated(fit, page):
    view = po.ProfileView(fit)
    page.change(view.controls["age_years"].slider, value=80.0)
    page.change(view.controls["material"].widget, index=0)
    assert view.question.values == (("material", "cast iron"), ("age_years", 80))
    page.change(view.controls["age_years"].box, value=float(typical(fit, "age_years")))
    assert view.question.values == (("material", "cast iron"),)


def typical(fit, name):
    return fit.subject.predictor(name).typical


def test_a_pinned_profile_is_compared_with_the_next(fit, page):
    view = po.ProfileView(fit)
    page.change(view.controls["age_years"].slider, value=80.0)
    page.press(view._pin)
    page.change(view.controls["age_years"].slider, value=40.0)
    expected = fit.profile({"age_years": 40}, against={"age_years": 80})
    assert view.answer.comparison == expected.comparison
    assert "Pinned: pipe age 80 years" in text_of(view._pinned.value)
    assert "Compared with" in text_of(view._words.value)


def test_the_typical_profile_can_be_pinned_too(fit, page):
    view = po.ProfileView(fit)
    page.press(view._pin)
    assert view.question.against == ()
    assert view.answer.comparison is not None
    assert "Pinned: a typical main" in text_of(view._pinned.value)


def test_the_pin_can_be_removed(fit, page):
    view = po.ProfileView(fit)
    assert view._unpin.layout.display == "none"
    page.press(view._pin)
    assert view._unpin.layout.display is None
    page.press(view._unpin)
    assert view.question.against is None
    assert view.answer.comparison is None
    assert view._pinned.value == ""
    assert view._unpin.layout.display == "none"


def test_back_to_typical_keeps_the_pin(fit, page):
    view = po.ProfileView(fit)
    assert view._typical.disabled
    page.change(view.controls["age_years"].slider, value=80.0)
    page.press(view._pin)
    page.press(view._typical)
    assert view.question == ProfileQuestion(values=(), against=(("age_years", 80),))
    assert view.controls["age_years"].value == typical(fit, "age_years")
    assert view._typical.disabled


def test_a_familiar_profile_has_no_warning(fit, page):
    view = po.ProfileView(fit)
    assert view.answer.point.familiarity.verdict == "familiar"
    assert view._warning.value == ""


def test_a_profile_that_leaves_the_data_is_warned_of_in_words_and_shape(fit, page):
    view = po.ProfileView(fit)
    page.change(view.controls["past_repairs"].box, value=view.controls["past_repairs"]._high)
    page.change(view.controls["age_years"].box, value=1.0)
    verdict = view.answer.point.familiarity.verdict
    assert verdict in ("rare", "beyond")
    heading = {"rare": "△ Rare in the data", "beyond": "▲ Beyond the data"}[verdict]
    assert heading in text_of(view._warning.value)
    assert 'role="status"' in view._warning.value


def test_what_the_warning_says_is_not_said_twice(fit, page):
    view = po.ProfileView(fit, ProfileQuestion(values=(("age_years", 300),)))
    warned = text_of(view._warning.value).partition(". ")[2]
    assert warned
    assert warned not in text_of(view._words.value)


def test_the_ledger_adds_up_as_it_is_shown(fit, page):
    answer = fit.profile({"age_years": 83, "material": "PVC", "pressure_m": 71.3, "lined": True})
    first, *rows, last = cells(ledger_table(answer))
    hundredths = [round(100 * number(row[2])) for row in (first, *rows, last)]
    assert sum(hundredths[:-1]) == hundredths[-1]
    assert len(rows) == len(answer.ledger)


def number(text):
    return float(text.replace("−", "-").replace("+", ""))


def test_the_ledger_names_each_groups_values(fit, page):
    answer = fit.profile({"age_years": 83})
    rows = {row[0]: row for row in cells(ledger_table(answer))}
    assert rows["Material, Pipe age"][1] == f"{typical(fit, 'material')}, 83 years"
    assert (
        rows["This profile"][4]
        == text_of(po.words(answer).sentences[0]).split(" is ")[1].split(" ")[0]
    )


def test_rows_that_move_nothing_are_marked(fit, page):
    table = ledger_table(fit.profile({"age_years": 83}))
    assert table.count("plainodds-unmoved") == len(fit.profile().ledger) - 1


def test_the_ledger_starts_from_the_pinned_profile(fit, page):
    first = cells(ledger_table(fit.profile({"age_years": 83}, against={"age_years": 20})))[0]
    assert first[0] == "Pinned profile (start)"
    assert cells(ledger_table(fit.profile()))[0][0] == "Typical profile (start)"


def test_predictors_whose_names_look_alike_have_hooks_of_their_own(mains, page):
    import statsmodels.formula.api as smf

    data = mains.rename(columns={"age_years": "a b", "pressure_m": "a-b"})
    result = smf.logit("burst ~ Q('a b') + Q('a-b')", data).fit(disp=0)
    view = po.ProfileView(result)
    hooks = [control.widget._dom_classes[-1] for control in view.controls.values()]
    assert hooks == ["plainodds-control-a-b", "plainodds-control-a-b-2"]
