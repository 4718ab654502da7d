"""In which language answers are told, and with which marks their numbers are written."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from contextlib import AbstractContextManager, contextmanager
from functools import partial

from plainodds.phrases.languages import Language, language_now, language_of, telling_in
from plainodds.phrases.numbers import Marks, marking, marks_now

__all__ = ["kept_writing", "writing"]


def writing(
    language: str = "en", *, decimal: str | None = None, thousands: str | None = None
) -> AbstractContextManager[None]:
    """Write in another language, or with other marks in numbers, for as long as a block lasts.

    `words`, `caption`, `methods_note`, `alternative`, pictures, report tables and dossiers
    follow both; a report table keeps the language in which it was made, whenever it is written.
    Views follow both in what they tell and draw; their controls and their tables keep their
    English words. What `table` and `code` give never changes. Labels, units and levels are the
    analyst's own and are not translated; notices about the fit are handed on in English, and
    are introduced as such.

    Nothing global changes: other threads and other tasks write as before. A view that is made
    within the block keeps its language and its marks for as long as it lives.

    Parameters
    ----------
    language : {"en", "de"}
        English or German.
    decimal, thousands : str, optional
        The mark before decimals and the one between thousands, one character each. By default
        the language's own: "." and "," in English, "," and "." in German. Where one is stated
        that is the other's default, the other takes its place.

    Returns
    -------
    context manager

    Raises
    ------
    ValueError
        If there is no such language, a mark is not a single character that can stand in a
        number, or both marks are the same.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> answer = po.FittedLogit(sm.Logit(y, sm.add_constant(x)).fit(disp=False)).profile()
    >>> with writing("de"):
    ...     print(po.words(answer).sentences[1].replace("\u00a0", " "))
    Die Wahrscheinlichkeit, dass dies nicht eintritt, beträgt 40 %, das sind 40 von 100.
    """
    chosen = language_of(language)
    return _writing(chosen, _marks(chosen, decimal, thousands))


def kept_writing() -> Callable[[], AbstractContextManager[None]]:
    """Keep the writing of now, to be taken up again later and in whatever context.

    Returns
    -------
    callable
        Gives the context manager that takes it up.
    """
    return partial(_writing, language_now(), marks_now())


def _marks(language: Language, decimal: str | None, thousands: str | None) -> Marks:
    usual = language.marks
    if decimal is None:
        decimal = usual.thousands if thousands == usual.decimal else usual.decimal
    if thousands is None:
        thousands = usual.decimal if decimal == usual.thousands else usual.thousands
    return Marks(decimal, thousands)


@contextmanager
def _writing(language: Language, marks: Marks) -> Iterator[None]:
    with telling_in(language), marking(marks):
        yield
