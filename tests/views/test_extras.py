"""The code at the press of a button."""

from html import unescape

import plainodds as po


def test_the_code_is_that_of_the_answer_shown(fit, page):
    view = po.ProfileView(fit)
    assert view._extras.code.value == ""
    page.press(view._extras.code_button)
    assert view._extras.code_button.description == "Hide the code"
    source = view._extras.code.value.partition("<code>")[2].partition("</code>")[0]
    assert unescape(source) == po.code(view.answer)


def test_open_code_follows_the_controls(fit, page):
    view = po.ProfileView(fit)
    page.press(view._extras.code_button)
    page.change(view.controls["age_years"].slider, value=80.0)
    assert "age_years&quot;: 80" in view._extras.code.value


def test_the_code_can_be_hidden_again(fit, page):
    view = po.ProfileView(fit)
    page.press(view._extras.code_button)
    page.press(view._extras.code_button)
    assert view._extras.code.value == ""
    assert view._extras.code_button.description == "Show the code"
    page.change(view.controls["age_years"].slider, value=80.0)
    assert view._extras.code.value == ""
