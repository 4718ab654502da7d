"""The marks in a number: what stands before its decimals and between its thousands."""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from contextvars import ContextVar
from dataclasses import dataclass

__all__ = ["Marks", "marked", "marking", "marks_now"]

_NEVER = "+-−%‰()/∞\n\r\t\v\f"


@dataclass(frozen=True)
class Marks:
    """The two marks of a locale.

    Attributes
    ----------
    decimal, thousands : str
        One character each.

    Raises
    ------
    ValueError
        If a mark is not a single character that can stand in a number, or both are one.
    """

    decimal: str
    thousands: str

    def __post_init__(self) -> None:
        for name, mark in (("decimal", self.decimal), ("thousands", self.thousands)):
            if not isinstance(mark, str) or len(mark) != 1 or mark.isalnum() or mark in _NEVER:
                raise ValueError(
                    f"{name}={mark!r}: a mark is a single character that is no letter, figure or "
                    "sign, such as '.', ',', \"'\" or a narrow no-break space '\\u202f'."
                )
        if self.decimal == self.thousands:
            raise ValueError(
                f"decimal and thousands are both {self.decimal!r}: state two that can be told "
                "apart, such as ',' and '.'."
            )


_PLAIN = Marks(".", ",")
_CURRENT: ContextVar[Marks] = ContextVar("plainodds_marks", default=_PLAIN)


@contextmanager
def marking(marks: Marks) -> Iterator[None]:
    """Write numbers with these marks, in this context only."""
    token = _CURRENT.set(marks)
    try:
        yield
    finally:
        _CURRENT.reset(token)


def marks_now() -> Marks:
    """The marks that are asked for now."""
    return _CURRENT.get()


def marked(figures: str) -> str:
    """Give a number as Python formats it the marks that are asked for now.

    Parameters
    ----------
    figures : str
        One number, and no words: "1,234.5".

    Examples
    --------
    >>> with marking(Marks(",", ".")):
    ...     marked("1,234.5")
    '1.234,5'
    """
    marks = marks_now()
    if marks == _PLAIN:
        return figures
    # both at once, or one would be taken for the other
    return figures.translate({ord("."): marks.decimal, ord(","): marks.thousands})
