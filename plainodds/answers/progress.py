"""How long work tells how far it is, and is stopped."""

from __future__ import annotations

from collections.abc import Callable
from typing import TypeAlias

__all__ = ["Progress", "Stopped", "silent", "within"]

_FINE = 100

Progress: TypeAlias = Callable[[int, int], None]
"""Told how many of how many parts are done; raises `Stopped` to stop the work."""


class Stopped(Exception):
    """Long work was stopped by whoever asked for it."""


def within(progress: Progress, stage: int, stages: int) -> Progress:
    """What a stage tells, as part of the whole work.

    Parameters
    ----------
    progress : callable
        Told of the whole.
    stage : int
        Which stage it is, from 0.
    stages : int
        How many there are, all counted alike.

    Examples
    --------
    >>> told = lambda done, parts: print(f"{done} of {parts}")
    >>> within(told, 1, 2)(1, 4)
    62 of 100
    """

    def tell(done: int, parts: int) -> None:
        # stages differ in their parts; the whole is always told in the same ones
        progress(int(_FINE * (stage + done / parts) / stages), _FINE)

    return tell


def silent(done: int, parts: int) -> None:
    """Tell nobody."""
