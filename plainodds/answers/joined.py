"""The test of an interaction: the whole group of terms that join two predictors."""

from __future__ import annotations

from itertools import product
from typing import Literal

import numpy as np
from numpy.typing import NDArray
from scipy.stats import chi2
from scipy.stats import f as f_distribution

from plainodds.answers.likelihood import likelihood_of
from plainodds.model.design.design import Floats
from plainodds.model.fitted import FittedModel, code_values
from plainodds.values import value

__all__ = ["JoinedTest", "joining_contrasts", "tested"]

_POINTS = 25
_FEW = 5
_MOST_SETTINGS = 128
_ROUNDING = 1e-9
_LEFT_OPEN = 1e-7


@value
class JoinedTest:
    """A test that no term joins the two predictors.

    Attributes
    ----------
    kind : {"wald", "likelihood_ratio"}
    statistic : float
        χ², or F where the result uses the t distribution.
    degrees_of_freedom : int
    denominator : float or None
        Denominator degrees of freedom of an F statistic.
    p_value : float
    """

    kind: Literal["wald", "likelihood_ratio"]
    statistic: float
    degrees_of_freedom: int
    denominator: float | None
    p_value: float


def joining_contrasts(model: FittedModel, a: str, b: str) -> Floats:
    """What is 0 for any coefficients if and only if no term joins two predictors.

    The linear predictor has no interaction when its double contrast is 0 at any four
    combinations of values, whatever further modifiers are. The contrasts' row space does
    not depend on how levels are coded or numbers are centred.

    Returns
    -------
    array (q, k)
        q degrees of freedom, of which each may be tested as one of L in Lβ = 0; q = 0
        where no term joins them.
    """
    design = model.design
    shared = np.intersect1d(design.touched([a]), design.touched([b]))
    nothing = np.zeros((0, len(model.coefficients)))
    if not len(shared):
        return nothing
    rows = _rows_over(model, a, b, shared)
    contrasts = rows - rows[:, :1] - rows[:, :, :1] + rows[:, :1, :1]
    contrasts = contrasts.reshape(-1, len(shared))
    size, largest = np.abs(contrasts).max(axis=0), np.abs(rows).max(axis=(0, 1, 2))
    telling = size > _ROUNDING * largest
    if not telling.any():
        return nothing
    scaled = contrasts[:, telling] / size[telling]
    # as many rows as columns are enough, and of them the triangular factor is one choice
    strength, directions = np.linalg.svd(np.linalg.qr(scaled, mode="r"))[1:]
    space = directions[: len(strength)][strength > _ROUNDING * strength[0]]
    found = np.zeros((len(space), len(model.coefficients)))
    found[:, shared[telling]] = space * size[telling]
    return found


def tested(
    model: FittedModel, contrasts: Floats, kind: Literal["wald", "likelihood_ratio"]
) -> JoinedTest | None:
    """Test that all contrasts are 0; None where there are none, or no covariance.

    Wald: (Lβ)'(LVL')⁻¹Lβ against χ² with as many degrees of freedom as contrasts, or its
    mean against F where the result uses the t distribution. Likelihood ratio: by how much
    the deviance rises when the model is fitted again with Lβ = 0.

    Raises
    ------
    QuestionRefused
        If a likelihood-ratio test is asked of a fit that has none.
    """
    if kind == "likelihood_ratio":
        likelihood = likelihood_of(model, "test='likelihood_ratio'", "test='wald'")
        contrasts = _estimable(model, contrasts)
        if not len(contrasts):
            return None
        excess = likelihood.excess_without(contrasts)
        return JoinedTest(
            kind, excess, len(contrasts), None, float(chi2.sf(excess, len(contrasts)))
        )
    contrasts = _estimable(model, contrasts)
    if model.covariance is None or not len(contrasts):
        return None
    statistic, freedom = _wald(
        contrasts @ model.coefficients, contrasts @ model.covariance @ contrasts.T
    )
    if not freedom:
        return None
    denominator = model.degrees_of_freedom
    if denominator is None:
        return JoinedTest("wald", statistic, freedom, None, float(chi2.sf(statistic, freedom)))
    mean = statistic / freedom
    return JoinedTest(
        "wald",
        mean,
        freedom,
        float(denominator),
        float(f_distribution.sf(mean, freedom, denominator)),
    )


def _wald(estimate: Floats, covariance: Floats) -> tuple[float, int]:
    """The statistic and its rank: a robust covariance of few clusters may lack directions."""
    size = np.sqrt(np.diag(covariance))
    if not (size > 0).any():
        return 0.0, 0
    size = np.where(size > 0, size, 1.0)
    strength, directions = np.linalg.eigh(covariance / np.outer(size, size))
    kept = strength > _ROUNDING * strength[-1]
    along = directions[:, kept].T @ (estimate / size)
    return float(along @ (along / strength[kept])), int(kept.sum())


def _rows_over(model: FittedModel, a: str, b: str, shared: NDArray[np.intp]) -> Floats:
    """The shared columns over settings of further modifiers, values of `a` and of `b`."""
    columns = [model.design.columns[i] for i in shared]
    points = max(_POINTS, 2 * len(shared))
    along = {name: _values(model, name, points) for name in (a, b)}
    variables = frozenset().union(*(model.design.variables_of(column) for column in columns))
    further = sorted(variables - {a, b})
    settings = _settings([_values(model, name, _FEW) for name in further])
    s, i, j = (index.ravel() for index in np.indices((len(settings), len(along[a]), len(along[b]))))
    coded = {a: along[a][i], b: along[b][j]}
    coded |= {
        name: np.array([setting[place] for setting in settings])[s]
        for place, name in enumerate(further)
    }
    rows = model.design.some_columns(shared, coded, len(s))
    return rows.reshape(len(settings), len(along[a]), len(along[b]), len(shared))


def _values(model: FittedModel, name: str, points: int) -> NDArray[np.generic]:
    """Coded values of a predictor: all its levels with rows, or numbers where the data are."""
    facts = model.subject.predictor(name)
    if not facts.is_number:
        return code_values(facts, facts.levels_with_rows)
    half = points // 2 + 1
    quantiles = np.quantile(
        model.sample.columns[name], np.linspace(0, 1, half), method="closest_observation"
    )
    return np.unique(np.concatenate([np.linspace(facts.minimum, facts.maximum, half), quantiles]))


def _settings(values: list[NDArray[np.generic]]) -> list[tuple[np.generic, ...]]:
    """Combinations of further modifiers' values; a sample of them where there are many."""
    count = int(np.prod([len(each) for each in values], dtype=float))
    if count <= _MOST_SETTINGS:
        return list(product(*values))
    drawn = np.random.default_rng(0)
    return [tuple(drawn.choice(each) for each in values) for _ in range(_MOST_SETTINGS)]


def _estimable(model: FittedModel, contrasts: Floats) -> Floats:
    """The contrasts that the rows tell, where some combinations have none.

    A contrast is estimable if it is 0 along every direction in which the coefficients may
    move without any row's linear predictor moving.
    """
    told = model.estimable
    if not len(contrasts) or not told.open.shape[1]:
        return contrasts
    scaled = contrasts / told.scale
    left = scaled @ told.open / np.linalg.norm(scaled, axis=1, keepdims=True)
    directions, strength, _ = np.linalg.svd(left)
    rank = int((strength > _LEFT_OPEN).sum())
    return np.asarray(
        directions[:, rank:].T @ (contrasts / np.linalg.norm(scaled, axis=1, keepdims=True))
    )
