"""The languages in which an answer can be told, and where each finds its own functions."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from contextlib import contextmanager
from contextvars import ContextVar
from dataclasses import dataclass, field
from functools import singledispatch, wraps
from typing import Any, ParamSpec, Protocol, TypeVar, cast

from plainodds.answers.questions import Answer
from plainodds.errors import QuestionRefused
from plainodds.phrases.lexicon import ENGLISH_LEXICON, Lexicon, lexicon, speaking
from plainodds.phrases.numbers import ENGLISH_WORDING, Marks, Wording, worded

__all__ = [
    "Language",
    "Telling",
    "Ways",
    "add_language",
    "by_language",
    "in_language",
    "language_now",
    "language_of",
    "spoken_now",
    "telling_in",
]

P = ParamSpec("P")
F = TypeVar("F", bound=Callable[..., Any])
T = TypeVar("T")
T_co = TypeVar("T_co", covariant=True)


class Telling(Protocol[T_co]):
    """A function that tells an answer in the language asked for."""

    def __call__(self, answer: Answer, *args: Any, **kwargs: Any) -> T_co:
        """Tell an answer."""

    def register(self, way: F) -> F:
        """Take a function as the English way for the kind of answer it is annotated with."""

    def register_for_all(self, way: F) -> F:
        """Take a function as the way in every language, since it only passes on other texts."""


class Ways:
    """A language's functions of one name, one for each kind of answer."""

    def __init__(self) -> None:
        self._ways = singledispatch(_untold)

    def register(self, way: F) -> F:
        """Take a function as the way for the kind of answer that it is annotated with."""
        self._ways.register(way)
        return way

    def of(self, answer: object) -> Callable[..., Any] | None:
        """The function for an answer; None where there is none."""
        way = self._ways.dispatch(type(answer))
        return None if way is _untold else way


def _untold(answer: object) -> None:
    """Stands where a language has nothing."""


@dataclass(frozen=True)
class Language:
    """One language.

    Attributes
    ----------
    code : str
        As in "de".
    name : str
        In English, as refusals name it.
    marks : Marks
        Of numbers, unless others are asked for.
    wording : Wording
        Words around numbers.
    lexicon : Lexicon
        Small phrases.
    words, caption, methods_note, alternative : Ways
        What is registered for each kind of answer.
    finding_words : Ways
        What is registered for a finding, which pictures and tables tell by itself.
    fitted_words, rest_words, others_words, model_cautions, needed_technical : Ways
        What printed tables need in another structure; registered for the kind of thing told of.
    """

    code: str
    name: str
    marks: Marks
    wording: Wording
    lexicon: Lexicon
    words: Ways = field(default_factory=Ways)
    caption: Ways = field(default_factory=Ways)
    methods_note: Ways = field(default_factory=Ways)
    alternative: Ways = field(default_factory=Ways)
    finding_words: Ways = field(default_factory=Ways)
    fitted_words: Ways = field(default_factory=Ways)
    rest_words: Ways = field(default_factory=Ways)
    others_words: Ways = field(default_factory=Ways)
    model_cautions: Ways = field(default_factory=Ways)
    needed_technical: Ways = field(default_factory=Ways)


_ENGLISH = Language("en", "English", Marks(".", ","), ENGLISH_WORDING, ENGLISH_LEXICON)
_KNOWN = {"en": _ENGLISH}
_CURRENT: ContextVar[Language] = ContextVar("plainodds_language", default=_ENGLISH)


def add_language(language: Language) -> None:
    """Make a language known by its code."""
    _KNOWN[language.code] = language


def language_of(code: str) -> Language:
    """The language of a code.

    Raises
    ------
    ValueError
        If there is none.
    """
    if code not in _KNOWN:
        known = ", ".join(f"{each!r} ({_KNOWN[each].name})" for each in sorted(_KNOWN))
        raise ValueError(f"There is no language {code!r}. There are: {known}.")
    return _KNOWN[code]


def language_now() -> Language:
    """The language in which answers are told now."""
    return _CURRENT.get()


@contextmanager
def spoken_now() -> Iterator[None]:
    """Speak the language of now in labels and fixed texts too; serves as decorator as well."""
    language = _CURRENT.get()
    with worded(language.wording), speaking(language.lexicon):
        yield


@contextmanager
def telling_in(language: Language) -> Iterator[None]:
    """Tell answers in this language, in this context only."""
    token = _CURRENT.set(language)
    try:
        yield
    finally:
        _CURRENT.reset(token)


def by_language(english: Callable[..., T]) -> Telling[T]:
    """Let a function tell answers in the language asked for; what is registered is English."""
    ways, for_all, name = singledispatch(english), Ways(), english.__name__

    @wraps(english)
    def tell(answer: Answer, *args: Any, **kwargs: Any) -> T:
        language = _CURRENT.get()
        if language is _ENGLISH or not isinstance(answer, Answer):
            return ways(answer, *args, **kwargs)
        way = getattr(language, name).of(answer) or for_all.of(answer)
        if way is None:
            raise QuestionRefused(
                f"There is no {name}() of {type(answer).__name__} in {language.name} "
                f"({language.code!r}) yet. Write it in English, within writing('en')."
            )
        with worded(language.wording), speaking(language.lexicon):
            return cast(T, way(answer, *args, **kwargs))

    def register(way: F) -> F:
        ways.register(way)
        return way

    def register_for_all(way: F) -> F:
        for_all.register(way)
        return register(way)

    vars(tell).update(register=register, register_for_all=register_for_all)
    return cast("Telling[T]", tell)


def in_language(english: Callable[P, T]) -> Callable[P, T]:
    """Let a part of other texts be told in the language spoken now, where that has its own way.

    What a language can say by the same sentence with other words is a `message` instead.
    """
    name = english.__name__

    @wraps(english)
    def tell(*args: P.args, **kwargs: P.kwargs) -> T:
        language = _CURRENT.get()
        way = getattr(language, name).of(args[0])
        # where a language is asked for but not spoken, all around is English
        if way is None or lexicon() is not language.lexicon:
            return english(*args, **kwargs)
        return cast(T, way(*args, **kwargs))

    return tell
