"""Tests of all terms that join two predictors, in words."""

from __future__ import annotations

from plainodds.answers.joined import JoinedTest
from plainodds.answers.odds_interactions import InteractionTest
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.numbers import count, p_value, signed
from plainodds.phrases.units import tidy

__all__ = ["interaction_line", "joined_test", "statistic_words", "test_name"]

_KINDS = {"wald": "Wald test", "likelihood_ratio": "likelihood-ratio test"}


def joined_test(subject: Subject, names: tuple[str, str], test: JoinedTest) -> str:
    """The test with its statistic, as the start of a sentence of technical words."""
    told = [predictor_name(subject.predictor(each)) for each in names]
    kind = _KINDS[test.kind]
    return f"{kind[0].upper()}{kind[1:]} that no term joins {listed(told)}: {statistic_words(test)}"


def statistic_words(test: JoinedTest) -> str:
    """As in "χ² = 3.68 on 2 degrees of freedom, p-value 0.16"."""
    written = signed(test.statistic).removeprefix("+")
    letter = "χ²" if test.denominator is None else "F"
    return f"{letter} = {written} {_freedom(test)}, p-value {p_value(test.p_value)}"


def test_name(test: JoinedTest) -> str:
    """As in "Wald test on 2 degrees of freedom"."""
    return f"{_KINDS[test.kind]} {_freedom(test)}"


def interaction_line(subject: Subject, predictor: str, found: InteractionTest) -> str:
    """What a test beneath the rows of one of its two predictors is called, without its p-value.

    As in "Test of interaction with material, Wald test on 2 degrees of freedom".
    """
    other = found.modifier if predictor == found.predictor else found.predictor
    named = predictor_name(subject.predictor(other))
    model = f", model “{tidy(found.model)}”" if found.model else ""
    return f"Test of interaction with {named}{model}, {test_name(found.test)}"


def _freedom(test: JoinedTest) -> str:
    freedom = count(test.degrees_of_freedom)
    if test.denominator is None:
        return f"on {freedom} degree{'' if test.degrees_of_freedom == 1 else 's'} of freedom"
    below = signed(test.denominator, decimals=0).removeprefix("+")
    return f"on {freedom} and {below} degrees of freedom"
