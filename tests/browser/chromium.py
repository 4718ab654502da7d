"""The system's Chromium: where it is, how it is started, what to say when there is none."""

import os
import shutil

from playwright.sync_api import Browser, Playwright

__all__ = ["MISSING", "REQUIRED", "find", "launch"]

MISSING = (
    "no Chromium on this machine, so real JupyterLab was not opened; to run these tests too, "
    "install one (Debian: apt-get install chromium) and run them again"
)

REQUIRED = os.environ.get("PLAINODDS_BROWSER") == "required"
"""Whether a machine without Chromium fails the browser tests instead of skipping them."""

_NAMES = ("chromium", "chromium-browser", "google-chrome", "google-chrome-stable", "chrome")

# nothing here talks to anything but the server that the tests start
_QUIET = [
    "--disable-gpu",
    "--disable-dev-shm-usage",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
    "--disable-quic",
]


def find() -> str | None:
    """Path of an installed Chromium or Chrome."""
    return next((path for name in _NAMES if (path := shutil.which(name))), None)


def launch(playwright: Playwright) -> Browser:
    """Start the system's Chromium without a window."""
    path = find()
    if path is None:
        raise FileNotFoundError(MISSING)
    as_root = ["--no-sandbox"] if hasattr(os, "geteuid") and os.geteuid() == 0 else []
    return playwright.chromium.launch(executable_path=path, args=[*_QUIET, *as_root])
