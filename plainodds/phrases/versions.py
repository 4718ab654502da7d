"""With which packages something was made."""

from __future__ import annotations

from functools import lru_cache
from importlib.metadata import PackageNotFoundError, version

__all__ = ["versions"]


@lru_cache(maxsize=8)
def versions(*packages: str) -> str:
    """Packages with their versions, as in "plainodds 0.1.0, numpy 2.1.0"."""
    return ", ".join(f"{name} {_version(name)}" for name in packages)


def _version(name: str) -> str:
    try:
        return version(name)
    except PackageNotFoundError:
        return "(version unknown)"
