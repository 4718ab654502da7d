"""The signs of numbers, and what is written where there is no number."""

from __future__ import annotations

__all__ = ["MINUS", "NOT_KNOWN", "with_sign"]

MINUS = "−"
NOT_KNOWN = "not known"


def with_sign(text: str, plus: bool) -> str:
    """Give written figures a true minus sign, and a plus sign where it is wanted."""
    # a number that rounds to nought has no sign
    nought = not any(figure in "123456789" for figure in text)
    bare = text.lstrip("-")
    if nought:
        return bare
    if text.startswith("-"):
        return f"{MINUS}{bare}"
    return f"+{bare}" if plus else bare
