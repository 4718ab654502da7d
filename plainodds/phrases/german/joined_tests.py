"""Tests of all terms that join two predictors, in German."""

from __future__ import annotations

from plainodds.answers.joined import JoinedTest
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.numbers import count, p_value, signed

__all__ = ["joined_test"]


def joined_test(subject: Subject, names: tuple[str, str], test: JoinedTest) -> str:
    """The test with its statistic, as the start of a sentence of technical words."""
    told = [predictor_name(subject.predictor(each)) for each in names]
    kind = {"wald": "Wald-Test", "likelihood_ratio": "Likelihood-Quotienten-Test"}[test.kind]
    return f"{kind} darauf, dass kein Term {listed(told)} verbindet: {_statistic(test)}"


def _statistic(test: JoinedTest) -> str:
    written = signed(test.statistic).removeprefix("+")
    freedom = count(test.degrees_of_freedom)
    if test.denominator is None:
        one = test.degrees_of_freedom == 1
        on = f"χ² = {written} bei {freedom} {'Freiheitsgrad' if one else 'Freiheitsgraden'}"
    else:
        below = signed(test.denominator, decimals=0).removeprefix("+")
        on = f"F = {written} bei {freedom} und {below} Freiheitsgraden"
    return f"{on}, p-Wert {p_value(test.p_value)}"
