"""The few words that stand in and around numbers, in one language at a time."""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from contextvars import ContextVar
from dataclasses import dataclass

__all__ = ["ENGLISH_WORDING", "Wording", "worded", "wording"]


@dataclass(frozen=True)
class Wording:
    """Words around numbers, as templates; none has a default, so that none stays English.

    Attributes
    ----------
    not_known, infinity : str
        Instead of a number.
    under, over, up_to : str
        A limit, round one number.
    percent : str
        Round a number and its sign, which is "%" or "‰".
    money : str
        Round `sign`, `unit` and `figures`.
    out_of, apart_in : str
        A frequency, and a difference of two, round cases and their denominator.
    to, both : str
        A range, and the last two of a list, round two texts.
    more, fewer, lower, higher : str
        The side of a difference, round it.
    no_more_no_fewer, more_or_fewer_not_known : str
        Instead of a difference in cases.
    points : str
        Percentage points, round their number.
    just_above, just_below, between_and_nought : str
        Where figures would end in nought; the last round the other end.
    """

    not_known: str
    infinity: str
    under: str
    over: str
    up_to: str
    percent: str
    money: str
    out_of: str
    apart_in: str
    to: str
    both: str
    more: str
    fewer: str
    lower: str
    higher: str
    no_more_no_fewer: str
    more_or_fewer_not_known: str
    points: str
    just_above: str
    just_below: str
    between_and_nought: str


ENGLISH_WORDING = Wording(
    not_known="not known",
    infinity="infinity",
    under="under {}",
    over="over {}",
    up_to="up to {}",
    percent="{}{}",
    money="{sign}{unit}{figures}",
    out_of="{} in {}",
    apart_in="{} in {}",
    to="{} to {}",
    both="{} and {}",
    more="{} more",
    fewer="{} fewer",
    lower="{} lower",
    higher="{} higher",
    no_more_no_fewer="no more and no fewer",
    more_or_fewer_not_known="not known how many more or fewer",
    points="{} percentage points",
    just_above="just above 0",
    just_below="just below 0",
    between_and_nought="between {} and 0",
)
_CURRENT: ContextVar[Wording] = ContextVar("plainodds_wording", default=ENGLISH_WORDING)


def wording() -> Wording:
    """The words around numbers now."""
    return _CURRENT.get()


@contextmanager
def worded(words: Wording) -> Iterator[None]:
    """Put these words around numbers, in this context only."""
    token = _CURRENT.set(words)
    try:
        yield
    finally:
        _CURRENT.reset(token)
