"""Whether a picture's font has the letters of its texts."""

from __future__ import annotations

import unicodedata
from collections.abc import Iterable
from functools import lru_cache
from typing import Any

from matplotlib import ft2font
from matplotlib.figure import Figure
from matplotlib.font_manager import FontProperties, findfont, fontManager, get_font
from matplotlib.text import Text

__all__ = ["refuse_missing_letters"]

_LISTED = 12
_RIGHT_TO_LEFT = {"R", "AL"}


def refuse_missing_letters(figure: Figure) -> None:
    """Refuse a figure whose texts would come out as empty boxes, or in the wrong order.

    Raises
    ------
    ValueError
        Naming the letters, the text they stand in, and a font that has them if there is
        one on this machine.
    """
    for text in figure.findobj(Text):
        written = text.get_text()
        if not written or not text.get_visible():
            continue
        _refuse_unordered(written)
        path = findfont(FontProperties(family=text.get_fontfamily(), weight=text.get_fontweight()))
        missing = _missing(written, path)
        if missing:
            raise ValueError(_told(missing, written, text.get_fontfamily()[0]))


def _missing(written: str, path: Any) -> str:
    # what is not printed (marks of direction, joiners) needs no letter of its own
    letters = sorted({each for each in written if unicodedata.category(each)[0] != "C"})
    return "".join(each for each in letters if not _has(path, each))


@lru_cache(maxsize=4096)
def _has(path: Any, letter: str) -> bool:
    return bool(get_font(path).get_char_index(ord(letter)))


def _refuse_unordered(written: str) -> None:
    """Without a shaping library matplotlib sets letters from left to right, whatever they are."""
    turned = any(unicodedata.bidirectional(each) in _RIGHT_TO_LEFT for each in written)
    if turned and not hasattr(ft2font, "__libraqm_version__"):
        raise ValueError(
            f"{written!r} is read from right to left, which this version of matplotlib cannot set. "
            "Install matplotlib 3.11 or later, or state another label."
        )


def _told(missing: str, written: str, family: str) -> str:
    some = ", ".join(repr(each) for each in missing[:_LISTED])
    more = " and more" if len(missing) > _LISTED else ""
    named = _font_with(missing)
    way = f"{named!r}, installed here, has" if named else "No font installed here has"
    example = named or "the name of a font that has"
    return (
        f"The font {family} has no letter for {some}{more}, as in {written!r}. {way} "
        f"{'them' if len(missing) > 1 else 'it'}: pass theme=dataclasses.replace("
        f"plainodds.THEMES['page'], font={example!r}), or state another label."
    )


def _font_with(letters: Iterable[str]) -> str:
    """The name of an installed upright font that has all of some letters; empty without one."""
    for entry in sorted(fontManager.ttflist, key=lambda each: each.name):
        if entry.style == "normal" and all(_has(entry.fname, each) for each in letters):
            return str(entry.name)
    return ""
