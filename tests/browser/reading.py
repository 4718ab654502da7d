"""Numbers read from the page, and waiting until they are what they ought to be."""

import re
import time
from collections.abc import Callable
from dataclasses import dataclass

from playwright.sync_api import Locator, Page

__all__ = ["Shown", "chance_in", "eventually", "numbers_in", "rows_of"]

_NUMBER = r"[−-]?\d[\d,]*(?:\.\d+)?"


@dataclass(frozen=True)
class Shown:
    """A number as it is written, and the unit that it is written in."""

    written: str
    unit: float = 1.0

    @property
    def value(self) -> float:
        """What is written."""
        return float(self.written.replace(",", "").replace("−", "-")) * self.unit

    def stands_for(self, exact: float) -> bool:
        """Whether the exact number is written like this when it is rounded."""
        decimals = len(self.written.partition(".")[2])
        half = (0.5 + 1e-6) * 10.0**-decimals * self.unit
        return abs(self.value - exact) <= half


def numbers_in(text: str) -> list[Shown]:
    """Every number in a text; percentages as shares."""
    found = re.finditer(rf"({_NUMBER})(%?)", text)
    return [Shown(each[1], 0.01 if each[2] else 1.0) for each in found]


def chance_in(text: str) -> tuple[Shown, Shown, Shown]:
    """The first chance in a text, with its interval."""
    found = re.search(rf"({_NUMBER})% \(.*?({_NUMBER})% to ({_NUMBER})%\)", text)
    if found is None:
        raise AssertionError(f"no chance with its interval in: {text}")
    chance, lower, upper = (Shown(each, 0.01) for each in found.groups())
    return chance, lower, upper


def rows_of(table: Locator) -> dict[str, list[str]]:
    """A table's rows by their heading."""
    # in one go, since a new answer replaces the table as a whole
    cells = table.evaluate(
        """table => [...table.querySelectorAll('tbody tr')].map(
            row => [...row.querySelectorAll('th, td')].map(cell => cell.innerText))"""
    )
    return {first: rest for first, *rest in cells}


def eventually(page: Page, check: Callable[[], None], seconds: float = 10) -> None:
    """Check again and again until the assertions hold; fail with the last failure."""
    last = time.monotonic() + seconds
    while True:
        try:
            return check()
        except AssertionError:
            if time.monotonic() > last:
                raise
        page.wait_for_timeout(30)
