"""The browser tests' own footing: a plain slider in real JupyterLab, moved as people move it."""

import re

import pytest
from playwright.sync_api import expect

from tests.browser.notebooks import put_notebook
from tests.browser.page import opened

SLIDER = """
import ipywidgets as widgets

slider = widgets.IntSlider(value=5, min=0, max=20)
slider.add_class("test-slider")
doubled = widgets.Label(value="twice is 10")
doubled.add_class("test-doubled")

def on_change(change):
    doubled.value = f"twice is {2 * change.new}"

slider.observe(on_change, "value")
widgets.VBox([slider, doubled], layout={"width": "400px"})
"""


@pytest.fixture(scope="module")
def shown(browser, lab):
    with opened(browser, lab, put_notebook(lab, SLIDER, "1 + 1")) as notebook:
        notebook.run_all()
        yield notebook


@pytest.fixture
def handle(shown):
    """The slider's knob, with the slider set to 5."""
    readout = shown.page.locator(".test-slider .widget-readout")
    readout.fill("5")
    readout.press("Enter")
    expect(readout).to_have_text("5")
    return shown.page.locator(".test-slider .noUi-handle")


@pytest.fixture
def doubled(shown):
    """What the kernel's callback writes."""
    return shown.page.locator(".test-doubled")


def test_a_key_press_reaches_the_kernel_and_comes_back(shown, handle, doubled):
    shown.press(handle, "ArrowRight", times=3)
    expect(doubled).to_have_text("twice is 16")


def test_a_drag_reaches_the_kernel_and_comes_back(shown, handle, doubled):
    shown.drag(handle, by_px=400)
    expect(doubled).to_have_text("twice is 40")


def test_cells_without_widgets_have_run_too(shown):
    expect(shown.outputs.last).to_have_text("2")


def test_a_traceback_fails_the_run(browser, lab):
    with (
        opened(browser, lab, put_notebook(lab, "1 / 0")) as notebook,
        pytest.raises(AssertionError, match="ZeroDivisionError"),
    ):
        notebook.run_all()


def test_the_notebook_can_be_made_as_narrow_as_430_px(shown):
    shown.hide_sidebar()
    shown.set_notebook_width(430)
    box = shown.page.locator(".jp-NotebookPanel").bounding_box()
    assert box["width"] == 430


def test_what_sticks_out_to_the_right_is_found(browser, lab):
    cell = (
        "from IPython.display import HTML\n"
        'HTML(\'<div id=inside style="width:200px"><p class=wide style="width:300px">wide</p>'
        '<p class=fits style="width:200px">fits</p></div>\')'
    )
    with opened(browser, lab, put_notebook(lab, cell)) as notebook:
        notebook.run_all()
        assert notebook.overflowing(notebook.page.locator("#inside")) == ["P.wide"]


@pytest.mark.parametrize(("theme", "is_light"), [("dark", "false"), ("light", "true")])
def test_pages_open_in_the_theme_asked_for(browser, lab, theme, is_light):
    lab.use_theme(theme)
    try:
        with opened(browser, lab, put_notebook(lab, "1")) as notebook:
            body = notebook.page.locator("body")
            expect(body).to_have_attribute("data-jp-theme-light", is_light)
    finally:
        lab.use_theme("light")


def test_a_saved_notebook_carries_its_outputs(browser, lab):
    path = put_notebook(lab, "6 * 7")
    with opened(browser, lab, path) as notebook:
        notebook.run_all()
        notebook.save()
    assert re.search(r'"text/plain":\s*\[\s*"42"', path.read_text())
