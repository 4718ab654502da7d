"""The least that a live picture can be, to measure views against in the same page."""

from statistics import median

from playwright.sync_api import Locator

from tests.browser.page import NotebookPage
from tests.browser.timing import median_ms_to_picture

__all__ = ["BARE", "ms_beside_bare"]

# one line, one figure kept, its data replaced
BARE = """
import io

import ipywidgets as widgets
from matplotlib.figure import Figure

bare_figure = Figure(figsize=(6, 4), dpi=100)
(bare_line,) = bare_figure.subplots().plot(range(100), [0.0] * 100)
bare_figure.axes[0].set_ylim(0, 100)

def bare_png(height):
    bare_line.set_ydata([height] * 100)
    file = io.BytesIO()
    bare_figure.savefig(file, format="png")
    return file.getvalue()

bare_slider = widgets.IntSlider(value=5, min=0, max=100)
bare_slider.add_class("test-bare-slider")
bare_image = widgets.Image(value=bare_png(5), format="png")
bare_image.add_class("test-bare-picture")

def bare_change(change):
    bare_image.value = bare_png(change.new)

bare_slider.observe(bare_change, "value")
widgets.VBox([bare_slider, bare_image])
"""

_THERE_AND_BACK = ["ArrowRight", "ArrowRight", "ArrowLeft", "ArrowLeft"]


def ms_beside_bare(
    shown: NotebookPage, handle: Locator, picture: Locator, rounds: int
) -> tuple[float, float]:
    """Median milliseconds from key to picture: the bare slider's, and those of another.

    They take turns, so that whatever else the machine does falls on both. The notebook has a
    cell `BARE`.
    """
    bare_handle = shown.page.locator(".test-bare-slider .noUi-handle")
    bare_picture = shown.page.locator(".test-bare-picture")
    bare, other = [], []
    for _ in range(rounds):
        bare.append(median_ms_to_picture(shown.page, bare_handle, bare_picture, _THERE_AND_BACK))
        other.append(median_ms_to_picture(shown.page, handle, picture, _THERE_AND_BACK))
    return median(bare), median(other)
