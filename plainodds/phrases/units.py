"""Units beside numbers: one year, two years, and the change "per year more"."""

from __future__ import annotations

import re

from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import quantity

__all__ = ["one_line", "per_unit", "single", "step", "tidy", "with_unit"]

_IRREGULAR = {
    "analyses": "analysis",
    "children": "child",
    "diagnoses": "diagnosis",
    "feet": "foot",
    "men": "man",
    "mice": "mouse",
    "people": "person",
    "teeth": "tooth",
    "women": "woman",
    # German units, which may stand beside words of any language
    "jahre": "Jahr",
    "minuten": "Minute",
    "monate": "Monat",
    "personen": "Person",
    "punkte": "Punkt",
    "sekunden": "Sekunde",
    "stunden": "Stunde",
    "tage": "Tag",
    "wochen": "Woche",
}
_NOT_PLURAL = {"celsius", "gas", "hertz", "lens", "series", "siemens", "species"}
_NUMERALS = {"dozen", "hundred", "thousand", "million", "billion"}
_CLOSED_UP = ("%", "‰", "°", "$", "£", "€", "¥", "₹")
# a space that doesn't break within a number is part of it
_SPACES = re.compile(r"(?:(?!(?<=\d)[\u00a0\u2009\u202f]\S)\s)+")
_BEFORE_THE_REST = re.compile(r"\s+(?:of|per|in|since|at|on|from|for|to|with|before|after)\s|\s*/")


def tidy(text: str) -> str:
    """Put a label on one line, without leading, trailing or doubled spaces."""
    return " ".join(text.split())


def one_line(text: str) -> str:
    """Put a sentence on one line; a space within a number that doesn't break stays as it is."""
    return _SPACES.sub(" ", text).strip()


def single(unit: str) -> str:
    """Give a unit's singular, or the unit itself where it has none of its own.

    Examples
    --------
    >>> single("years"), single("metres of head"), single("degrees Celsius"), single("mmHg")
    ('year', 'metre of head', 'degree Celsius', 'mmHg')
    """
    unit = tidy(unit)
    cut = _BEFORE_THE_REST.search(unit)
    head, rest = (unit[: cut.start()], unit[cut.start() :]) if cut else (unit, "")
    words = head.split(" ")
    if len(words) > 1 and words[0].lower() in _NUMERALS:
        return unit
    for place in (-1, 0):
        word = _single_word(words[place])
        if word != words[place]:
            words[place] = word
            break
    return " ".join(words) + rest


def _single_word(word: str) -> str:
    lowered = word.lower()
    if lowered in _IRREGULAR:
        return _IRREGULAR[lowered]
    # "ms" and "US" are no plurals, "yrs" and "lbs" are
    if not word.endswith("s") or len(word) < 3 or lowered in _NOT_PLURAL:
        return word
    if not word.isalpha() or not word[-2].islower() or lowered.endswith(("ss", "us", "is")):
        return word
    if lowered.endswith("ies") and len(word) > 4:
        return word[:-3] + "y"
    if lowered.endswith(("xes", "sses", "shes", "ches")):
        return word[:-2]
    return word[:-1]


def with_unit(number: float, unit: str) -> str:
    """Write a value with its unit in the number that grammar asks for.

    Examples
    --------
    >>> with_unit(1, "years"), with_unit(40, "years"), with_unit(0.5, "years"), with_unit(2, "")
    ('1 year', '40 years', '0.5 years', '2')
    """
    unit = tidy(unit)
    return quantity(number, single(unit) if quantity(number) == "1" else unit)


def step(size: float, unit: str) -> str:
    """Write the size of a step, as it stands after "per".

    Examples
    --------
    >>> step(1, "years"), step(10, "years"), step(1, "mmHg"), step(1, ""), step(5, "")
    ('year', '10 years', '1 mmHg', 'unit', '5 units')
    >>> step(10, "%"), step(1, "%")
    ('10 percentage points', 'percentage point')
    """
    unit = tidy(unit)
    if unit == "%":
        # "10% more" would read as a tenth more
        return lexicon().point if quantity(size) == "1" else with_unit(size, lexicon().points)
    if not unit:
        return lexicon().unit if quantity(size) == "1" else with_unit(size, lexicon().units)
    countable = single(unit) != unit
    if quantity(size) == "1" and countable:
        return single(unit)
    return with_unit(size, unit)


def per_unit(unit: str) -> str:
    """Write one unit, as it stands after "per" on an axis.

    Examples
    --------
    >>> per_unit("years"), per_unit("mmHg"), per_unit("")
    ('year', 'mmHg', 'unit')
    """
    written = step(1, unit)
    return written if tidy(unit) in _CLOSED_UP else written.removeprefix("1 ")
