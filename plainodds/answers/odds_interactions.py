"""Tests of the interactions for which odds ratios are stated at values of other predictors."""

from __future__ import annotations

from collections.abc import Iterable
from functools import partial
from typing import Literal

import numpy as np

from plainodds.answers.bounded import limits_of
from plainodds.answers.changes import OddsRow
from plainodds.answers.joined import JoinedTest, joining_contrasts, tested
from plainodds.answers.remembered import remembered
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = ["InteractionTest", "interaction_tests"]


@value
class InteractionTest:
    """A test of all terms that join a predictor and one of its modifiers.

    Attributes
    ----------
    predictor, modifier : str
        The test is of the two together: neither comes first.
    test : JoinedTest
    model : str
        The fitted model's name where several are set side by side; else empty.
    """

    predictor: str
    modifier: str
    test: JoinedTest
    model: str = ""


def interaction_tests(
    model: FittedModel, rows: Iterable[OddsRow], interval: Literal["wald", "likelihood"]
) -> tuple[InteractionTest, ...]:
    """One test for each pair of a predictor and a modifier that rows are stated at.

    Parameters
    ----------
    model : FittedModel
    rows : iterable of OddsRow
    interval : {"wald", "likelihood"}
        Of the odds ratios: the tests are of the same kind as theirs.

    Returns
    -------
    tuple of InteractionTest
        Without the pairs that cannot be tested: a fit without a covariance has no test,
        and a Wald test has no meaning where the data are separated along the interaction.
    """
    pairs: dict[frozenset[str], tuple[str, str]] = {}
    for row in rows:
        for modifier, _ in row.given:
            pairs.setdefault(frozenset((row.predictor, modifier)), (row.predictor, modifier))
    kind: Literal["wald", "likelihood_ratio"] = (
        "likelihood_ratio" if interval == "likelihood" else "wald"
    )
    found = []
    for names in pairs.values():
        key = "interaction test", *sorted(names), kind
        test = remembered(model, key, partial(_test, model, names, kind))
        if test is not None:
            found.append(InteractionTest(*names, test))
    return tuple(found)


def _test(
    model: FittedModel, names: tuple[str, str], kind: Literal["wald", "likelihood_ratio"]
) -> JoinedTest | None:
    contrasts = joining_contrasts(model, *names)
    if kind == "wald" and len(contrasts) and np.isinf(limits_of(model, contrasts)).any():
        return None
    return tested(model, contrasts, kind)
