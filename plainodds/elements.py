"""HTML elements: whatever is text is escaped, always.

Labels, levels, column names and messages may be any text, and whatever shows HTML runs
what it is given. So nothing else in this package writes a tag.
"""

from __future__ import annotations

from collections.abc import Iterable
from html import escape

__all__ = ["Markup", "element", "joined"]

_VOID = frozenset({"br", "hr", "img"})


class Markup(str):
    """Text that is HTML already. Only this module makes it of text."""

    __slots__ = ()


def element(tag: str, *children: str, **attributes: str | int | None) -> Markup:
    """Write one element; children that are not `Markup` are text and escaped.

    Attributes that are None are left out; ``class_`` and ``aria_label`` stand for
    names that Python cannot spell.

    Examples
    --------
    >>> element("p", "1 < 2", class_="note")
    '<p class="note">1 &lt; 2</p>'
    """
    written = "".join(
        f' {name.rstrip("_").replace("_", "-")}="{escape(str(held), quote=True)}"'
        for name, held in attributes.items()
        if held is not None
    )
    if tag in _VOID:
        return Markup(f"<{tag}{written}>")
    return Markup(f"<{tag}{written}>{joined(children)}</{tag}>")


def joined(children: Iterable[str]) -> Markup:
    """Put pieces one after the other, escaping those that are text."""
    return Markup("".join(each if isinstance(each, Markup) else escape(each) for each in children))
