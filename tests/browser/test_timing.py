"""What the tests measure with: a slow picture is measured as slow, a burst loses no last value."""

import pytest
from playwright.sync_api import expect

from tests.browser.notebooks import put_notebook
from tests.browser.page import opened
from tests.browser.timing import burst_of_keys, median_ms_to_picture

PICTURES = """
import io
import time

import ipywidgets as widgets
import matplotlib.image
import numpy as np

def png(shade):
    file = io.BytesIO()
    matplotlib.image.imsave(file, np.full((40, 40, 3), shade / 100), format="png")
    return file.getvalue()

def pair(name, seconds):
    slider = widgets.IntSlider(value=5, min=0, max=100)
    slider.add_class(f"test-{name}-slider")
    image = widgets.Image(value=png(5), width=40)
    image.add_class(f"test-{name}-picture")
    label = widgets.Label(value="5")
    label.add_class(f"test-{name}-label")

    def on_change(change):
        time.sleep(seconds)
        image.value = png(change.new)
        label.value = str(change.new)

    slider.observe(on_change, "value")
    return widgets.VBox([slider, image, label])

widgets.VBox([pair("quick", 0.0), pair("slow", 0.3)])
"""


@pytest.fixture(scope="module")
def shown(browser, lab):
    with opened(browser, lab, put_notebook(lab, PICTURES)) as notebook:
        notebook.run_all()
        notebook.wait_until_drawn()
        yield notebook


def handle(shown, name):
    return shown.page.locator(f".test-{name}-slider .noUi-handle")


def test_the_time_to_a_picture_includes_the_kernels_work(shown):
    keys = ["ArrowRight"] * 5
    quick = median_ms_to_picture(
        shown.page, handle(shown, "quick"), shown.page.locator(".test-quick-picture"), keys
    )
    slow = median_ms_to_picture(
        shown.page, handle(shown, "slow"), shown.page.locator(".test-slow-picture"), keys
    )
    assert slow > 300
    assert slow - quick > 200


def test_a_burst_ends_at_the_last_value(shown):
    start = int(shown.page.locator(".test-quick-label").inner_text())
    burst_of_keys(handle(shown, "quick"), "ArrowRight", times=60, gap_ms=16)
    expect(shown.page.locator(".test-quick-label")).to_have_text(str(start + 60))
