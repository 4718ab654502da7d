"""The small phrases that labels and sentences are made of, in one language at a time."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from contextlib import contextmanager
from contextvars import ContextVar
from dataclasses import dataclass, field

__all__ = ["ENGLISH_LEXICON", "Lexicon", "lexicon", "message", "speaking"]


@dataclass(frozen=True)
class Lexicon:
    """Small phrases, as templates round labels; none has a default, so that none stays English.

    A phrase is put round the analyst's own labels, which no language inflects.

    Attributes
    ----------
    nouns_keep_capitals : bool
        Whether a label keeps its capital within a sentence.
    blank, yes, no : str
        Values: what is empty, and the levels of a yes/no that has no labels of its own.
    unit, units, point, points : str
        One and more of what has no unit, and of percentage points.
    value : str
        A predictor's name and its value.
    from_to, against, rather, either_way, given : str
        A range; two values, the first being the end; one value at both ends; a condition.
    per_more, per_less, per_additional : str
        Steps, and the unit of a slope.
    or_more, or_less, either_or : str
        Which values are meant.
    interval, standard_error : str
        What follows an estimate; the level stands without its percent sign.
    no_difference, points_not_known : str
        Instead of a difference.
    row, rows, rows_with, rows_masked, further : str
        Rows, which rows, and how many more predictors are not named.
    that_is : str
        The same once more, as frequencies.
    below, between, above, along_all, for_lines : str
        Where a curve has no data.
    data_range : str
        The range that the data have.
    shifted_less, shifted_more, times, and_then, than_it_is, moved, no_lower, no_higher : str
        Shifts from each row's own value.
    as_it_is : str
        Before a shift.
    unseen, once_shifted : str
        Why a change leaves the data.
    messages : mapping of str to str
        The fixed texts of pictures, printed tables and dossiers, by their English; empty in
        English. What is missing stays English, so that a language can begin without them.
    """

    nouns_keep_capitals: bool
    blank: str
    yes: str
    no: str
    unit: str
    units: str
    point: str
    points: str
    value: str
    from_to: str
    against: str
    rather: str
    either_way: str
    given: str
    per_more: str
    per_less: str
    per_additional: str
    or_more: str
    or_less: str
    either_or: str
    interval: str
    standard_error: str
    no_difference: str
    points_not_known: str
    row: str
    rows: str
    rows_with: str
    rows_masked: str
    further: str
    that_is: str
    below: str
    between: str
    above: str
    along_all: str
    for_lines: str
    data_range: str
    shifted_less: str
    shifted_more: str
    times: str
    and_then: str
    than_it_is: str
    moved: str
    no_lower: str
    no_higher: str
    as_it_is: str
    unseen: str
    once_shifted: str
    messages: Mapping[str, str] = field(default_factory=dict)


ENGLISH_LEXICON = Lexicon(
    nouns_keep_capitals=False,
    blank="(blank)",
    yes="yes",
    no="no",
    unit="unit",
    units="units",
    point="percentage point",
    points="percentage points",
    value="{} {}",
    from_to="from {}",
    against="{} against {}",
    rather="{} rather than {}",
    either_way="{} either way",
    given="given {}",
    per_more="per {} more",
    per_less="per {} less",
    per_additional="per additional {}",
    or_more="{} or more",
    or_less="{} or less",
    either_or=" or ",
    interval=" ({}% interval {})",
    standard_error=", standard error {}",
    no_difference="neither higher nor lower",
    points_not_known="not known in percentage points",
    row="1 row",
    rows="{} rows",
    rows_with="{} with {}",
    rows_masked="{} chosen by a mask",
    further="{} more",
    that_is="{}, that is {}",
    below="below {}",
    between="between {} and {}",
    above="above {}",
    along_all="along all values of {}",
    for_lines="for {}, {}",
    data_range="(the data have {} to {})",
    shifted_less="{} less",
    shifted_more="{} more",
    times="multiplied by {}",
    and_then=" and then ",
    than_it_is="{} than it is",
    moved="{} (moved {})",
    no_lower="no lower than {}",
    no_higher="no higher than {}",
    as_it_is="as it is",
    unseen="{}, which no row has",
    once_shifted="{name} of some {cases} once shifted {known}",
)
_CURRENT: ContextVar[Lexicon] = ContextVar("plainodds_lexicon", default=ENGLISH_LEXICON)


def lexicon() -> Lexicon:
    """The small phrases of the language that is spoken now."""
    return _CURRENT.get()


def message(text: str, /, *parts: object, **named: object) -> str:
    """A fixed text of pictures, printed tables and dossiers, in the language spoken now.

    The English text stands where it is used, and is what another language finds its own by.

    Parameters
    ----------
    text : str
        In English, with the places of its parts as for `str.format`.
    *parts, **named
        Put in where the text has their places.

    Examples
    --------
    >>> message("Band: {} intervals.", "95%")
    'Band: 95% intervals.'
    """
    return _CURRENT.get().messages.get(text, text).format(*parts, **named)


@contextmanager
def speaking(phrases: Lexicon) -> Iterator[None]:
    """Speak with these phrases, in this context only."""
    token = _CURRENT.set(phrases)
    try:
        yield
    finally:
        _CURRENT.reset(token)
