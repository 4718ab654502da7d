"""How long work tells how far it is, and is stopped."""

from __future__ import annotations

from collections.abc import Callable
from typing import TypeAlias

__all__ = ["Progress", "Stopped", "silent"]

Progress: TypeAlias = Callable[[int, int], None]
"""Told how many of how many parts are done; raises `Stopped` to stop the work."""


class Stopped(Exception):
    """Long work was stopped by whoever asked for it."""


def silent(done: int, parts: int) -> None:
    """Tell nobody."""
