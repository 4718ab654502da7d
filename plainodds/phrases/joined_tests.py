"""Tests of all terms that join two predictors, in words."""

from __future__ import annotations

from plainodds.answers.joined import JoinedTest
from plainodds.answers.odds_interactions import InteractionTest
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, p_value, signed
from plainodds.phrases.units import tidy

__all__ = ["interaction_line", "joined_test", "statistic_words", "test_name"]


def joined_test(subject: Subject, names: tuple[str, str], test: JoinedTest) -> str:
    """The test with its statistic, as the start of a sentence of technical words."""
    told = [predictor_name(subject.predictor(each)) for each in names]
    kind = _kind(test)
    kind = f"{kind[0].upper()}{kind[1:]}"
    return message("{} that no term joins {}: {}", kind, listed(told), statistic_words(test))


def statistic_words(test: JoinedTest) -> str:
    """As in "χ² = 3.68 on 2 degrees of freedom, p-value 0.16"."""
    written = signed(test.statistic).removeprefix("+")
    letter = "χ²" if test.denominator is None else "F"
    told = message("p-value {}", p_value(test.p_value))
    return f"{letter} = {written} {_freedom(test)}, {told}"


def test_name(test: JoinedTest) -> str:
    """As in "Wald test on 2 degrees of freedom"."""
    return f"{_kind(test)} {_freedom(test)}"


def interaction_line(subject: Subject, predictor: str, found: InteractionTest) -> str:
    """What a test beneath the rows of one of its two predictors is called, without its p-value.

    As in "Test of interaction with material, Wald test on 2 degrees of freedom".
    """
    other = found.modifier if predictor == found.predictor else found.predictor
    named = predictor_name(subject.predictor(other))
    test = test_name(found.test)
    if not found.model:
        return message("Test of interaction with {}, {}", named, test)
    return message("Test of interaction with {}, model “{}”, {}", named, tidy(found.model), test)


def _kind(test: JoinedTest) -> str:
    return message("Wald test") if test.kind == "wald" else message("likelihood-ratio test")


def _freedom(test: JoinedTest) -> str:
    freedom = count(test.degrees_of_freedom)
    if test.denominator is None:
        if test.degrees_of_freedom == 1:
            return message("on {} degree of freedom", freedom)
        return message("on {} degrees of freedom", freedom)
    below = signed(test.denominator, decimals=0).removeprefix("+")
    return message("on {} and {} degrees of freedom", freedom, below)
