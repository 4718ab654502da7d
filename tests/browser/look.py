"""Look at the widgets: run a notebook in real JupyterLab and take a picture of each output.

    python -m tests.browser.look notebooks/tessel_bay.ipynb out.png --dark --width 430

Writes out-01.png, out-02.png … in the order of the outputs, and prints their names.
"""

import argparse
import shutil
import tempfile
from pathlib import Path

from playwright.sync_api import sync_playwright

from tests.browser import chromium
from tests.browser.lab import LabServer
from tests.browser.page import opened

__all__ = ["look"]


def look(
    notebook: Path, picture: Path, *, dark: bool, width: int, pixel_ratio: float
) -> list[Path]:
    """Take a picture of each output of a notebook.

    Parameters
    ----------
    notebook
        Is copied; the original stays as it is.
    picture
        Name of the pictures; each gets a number of its own.
    dark
        Whether JupyterLab's dark theme is on.
    width
        Width of the notebook panel in CSS pixels.
    pixel_ratio
        Device pixels per CSS pixel.
    """
    with (
        tempfile.TemporaryDirectory() as folder,
        LabServer(Path(folder) / "home") as lab,
        sync_playwright() as playwright,
    ):
        lab.use_theme("dark" if dark else "light")
        copy = Path(shutil.copy(notebook, lab.root))
        browser = chromium.launch(playwright)
        taken = []
        with opened(browser, lab, copy, pixel_ratio=pixel_ratio) as shown:
            shown.hide_sidebar()
            shown.set_notebook_width(width)
            shown.run_all()
            shown.wait_until_drawn()
            for number, output in enumerate(shown.outputs.filter(visible=True).all(), start=1):
                path = picture.with_name(f"{picture.stem}-{number:02d}{picture.suffix}")
                output.screenshot(path=path)
                taken.append(path)
        browser.close()
    return taken


def main() -> None:
    """Read the command line and take the pictures."""
    parser = argparse.ArgumentParser(
        prog="python -m tests.browser.look", description="Take a picture of each output."
    )
    parser.add_argument("notebook", type=Path)
    parser.add_argument("picture", type=Path, help="for example out.png")
    parser.add_argument("--dark", action="store_true", help="in JupyterLab's dark theme")
    parser.add_argument("--width", type=int, default=960, help="of the notebook panel, in pixels")
    parser.add_argument("--pixel-ratio", type=float, default=1, help="2 for a fine display")
    asked = parser.parse_args()
    for path in look(
        asked.notebook,
        asked.picture,
        dark=asked.dark,
        width=asked.width,
        pixel_ratio=asked.pixel_ratio,
    ):
        print(path)


if __name__ == "__main__":
    main()
