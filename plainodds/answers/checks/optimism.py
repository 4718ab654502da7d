"""How much better a fit looks on its own data than on others: by fitting it many times.

Bootstrap: fit a resample, and see by how much it does better on the resample than on the
rows themselves; the mean of that is taken off what the fit shows. Source: Harrell, Lee &
Mark 1996 (Stat Med 15:361). Cross-validation: each tenth of the cases is judged by a fit of
the other nine, all cases together, and that several times over (Stone 1974, JRSS B 36:111);
in small samples its slope is the lower of the two, for it judges fits of fewer cases.
Resampled are cases, not rows: a row that counts 5 events of 20 is 20 cases.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Literal

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.checks.calibration import Optimism
from plainodds.answers.checks.discrimination import concordance
from plainodds.answers.checks.finding import Unknown
from plainodds.answers.checks.fitted_rows import (
    FEWEST,
    FittedRows,
    fitted_rows,
    has_score_tests,
    unknown_rows,
)
from plainodds.answers.checks.refitting import refitted
from plainodds.answers.kept import kept
from plainodds.answers.progress import Progress, silent
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.model.products import product
from plainodds.scales import probability_from_linear_predictor

__all__ = ["FOLDS", "Performance", "optimism_of", "performance_of"]

Floats = NDArray[np.float64]

FOLDS = 10

# Where η is so far off, outcomes are separated: from there a refit would seem to be done.
_FAR = 15.0

_WHY_NOT: dict[Unknown, str] = {
    "no rows": "the fit's rows are not there.",
    "no outcome": "the result no longer carries its outcome. Fit again and keep the data.",
    "too few rows": "there are too few events, or too few cases without one.",
    "no likelihood": "the model would have to be fitted again by maximum likelihood on rows drawn "
    "one by one, and this fit is of another kind (penalised, under constraints, with groups of "
    "rows or a scale of its own).",
}


@dataclass(frozen=True, eq=False)
class Performance:
    """Calibration slope, Brier score and c of some chances for some cases."""

    slope: float
    brier: float
    c: float

    def plain(self) -> tuple[float, float, float]:
        """The three of them."""
        return self.slope, self.brier, self.c


@dataclass(frozen=True, eq=False)
class _Cases:
    """A sample of cases: how many with the event and without it in each row."""

    events: Floats
    others: Floats

    @property
    def count(self) -> Floats:
        return self.events + self.others


def optimism_of(
    model: FittedModel,
    way: Literal["bootstrap", "cross-validation"],
    repeats: int = 200,
    seed: int = 0,
    progress: Progress = silent,
) -> Optimism:
    """Slope, Brier score and c, corrected for optimism.

    Parameters
    ----------
    model : FittedModel
    way : {"bootstrap", "cross-validation"}
    repeats : int
        Resamples, or repeats of tenfold cross-validation.
    seed : int
    progress : callable
        Told after each repeat; may raise `Stopped`.

    Raises
    ------
    QuestionRefused
        Where the model cannot be fitted again as it was.
    """
    unknown = unknown_rows(model, FEWEST) or ("" if has_score_tests(model) else "no likelihood")
    if unknown:
        raise QuestionRefused(f"optimism={way!r}: {_WHY_NOT[unknown]} Ask with optimism='none'.")
    rng = np.random.default_rng(seed)
    repeated = _bootstrap if way == "bootstrap" else _cross_validation
    found: list[tuple[float, float, float]] = []
    for done, each in enumerate(repeated(model, repeats, rng), start=1):
        if each is not None:
            found.append(each)
        progress(done, repeats)
    mean = np.mean(found, axis=0).tolist() if found else [np.nan] * 3
    return Optimism(way, len(found), repeats - len(found), *mean)


def performance_of(linear_predictor: Floats, events: Floats, others: Floats) -> Performance:
    """How well chances fare; nan where a slope does not exist.

    Parameters
    ----------
    linear_predictor, events, others : array (n,)
    """
    cases = events + others
    pi = probability_from_linear_predictor(linear_predictor)
    brier = float(events @ (1 - pi) ** 2 + others @ pi**2) / float(cases.sum())
    X = np.column_stack([np.ones(len(pi)), linear_predictor])
    share = np.divide(events, cases, out=np.zeros(len(cases)), where=cases > 0)
    refit = refitted(X, share, cases, np.array([0.0, 1.0]))
    slope = float(refit.coefficients[1]) if refit.converged and refit.rank == 2 else np.nan
    return Performance(slope, brier, concordance(linear_predictor, events, others)[0])


def _bootstrap(
    model: FittedModel, repeats: int, rng: np.random.Generator
) -> Iterator[tuple[float, float, float] | None]:
    rows = fitted_rows(model)
    everyone = _all_cases(rows)
    shown = np.array(_performance(rows.linear_predictor, everyone).plain())
    for _ in range(repeats):
        drawn = _resampled(everyone, rng)
        eta = _fitted_to(model, rows, drawn)
        if eta is None:
            yield None
            continue
        better = np.array(_performance(eta, drawn).plain())
        better -= _performance(eta, everyone).plain()
        yield _or_failed(shown - better)


def _cross_validation(
    model: FittedModel, repeats: int, rng: np.random.Generator
) -> Iterator[tuple[float, float, float] | None]:
    rows = fitted_rows(model)
    everyone = _all_cases(rows)
    for _ in range(repeats):
        judged = _judged(model, rows, everyone, rng)
        yield None if judged is None else _or_failed(np.array(judged.plain()))


def _judged(
    model: FittedModel, rows: FittedRows, everyone: _Cases, rng: np.random.Generator
) -> Performance | None:
    """All cases together, each judged by the fit that did not see it."""
    eta, events, others = [], [], []
    for left_out in _folds(everyone, rng):
        seen = _Cases(everyone.events - left_out.events, everyone.others - left_out.others)
        found = _fitted_to(model, rows, seen)
        if found is None:
            return None
        of_fold = left_out.count > 0
        eta.append(found[of_fold])
        events.append(left_out.events[of_fold])
        others.append(left_out.others[of_fold])
    return performance_of(*(np.concatenate(each) for each in (eta, events, others)))


def _performance(eta: Floats, cases: _Cases) -> Performance:
    return performance_of(eta, cases.events, cases.others)


def _or_failed(found: Floats) -> tuple[float, float, float] | None:
    slope, brier, c = found.tolist()
    return (slope, brier, c) if np.isfinite(found).all() else None


def _all_cases(rows: FittedRows) -> _Cases:
    events = rows.events
    return _Cases(events, rows.cases - events)


def _fitted_to(model: FittedModel, rows: FittedRows, cases: _Cases) -> Floats | None:
    """η of every row by a fit to some cases; None where there is no such fit."""
    sample, count = model.sample, cases.count
    share = np.divide(cases.events, count, out=np.zeros(len(count)), where=count > 0)
    per_case = 1.0 if rows.cases is rows.weights else rows.weights / rows.cases
    ran_away = float(np.abs(rows.linear_predictor).max()) > _FAR
    start = np.zeros_like(model.coefficients) if ran_away else model.coefficients
    found = refitted(sample.matrix, share, count * per_case, start, sample.offset)
    # a level that no drawn case has leaves its coefficient open
    if not found.converged or found.rank < _rank(model):
        return None
    eta = product(sample.matrix, found.coefficients[:, None])[:, 0]
    return eta if sample.offset is None else eta + sample.offset


@kept
def _rank(model: FittedModel) -> int:
    """Of the fit's own information: a fit with columns too many has refits like itself."""
    rows = fitted_rows(model)
    k = len(model.coefficients)
    return refitted(model.sample.matrix, rows.outcome, rows.weights, np.zeros(k)).rank


def _resampled(everyone: _Cases, rng: np.random.Generator) -> _Cases:
    """As many cases as there are, drawn with replacement."""
    rows = len(everyone.events)
    if _whole(everyone) and not _single(everyone):
        counts = np.concatenate([everyone.events, everyone.others])
        drawn = rng.multinomial(round(counts.sum()), counts / counts.sum()).astype(float)
        return _Cases(drawn[:rows], drawn[rows:])
    # single cases; and what are no counts (weights of a survey) stays with its row
    times = np.bincount(rng.integers(rows, size=rows), minlength=rows)
    return _Cases(times * everyone.events, times * everyone.others)


def _folds(everyone: _Cases, rng: np.random.Generator) -> Iterator[_Cases]:
    """The cases in ten parts at random, events and others dealt out evenly.

    Were they not, a part with more events would be judged by a fit to fewer of them, and
    slope and c of all parts together would look worse than they are.
    """
    if _whole(everyone):
        events, others = _dealt(everyone.events, rng), _dealt(everyone.others, rng)
        for fold in range(FOLDS):
            yield _Cases(events[:, fold], others[:, fold])
        return
    rows = len(everyone.events)
    fold_of = rng.permutation(np.arange(rows) % FOLDS)
    for fold in range(FOLDS):
        inside = fold_of == fold
        yield _Cases(inside * everyone.events, inside * everyone.others)


def _dealt(counts: Floats, rng: np.random.Generator) -> Floats:
    """Counted cases of each row by part, shape (n, 10)."""
    rows = len(counts)
    one_by_one = rng.permutation(np.repeat(np.arange(rows), np.rint(counts).astype(int)))
    cell = one_by_one * FOLDS + np.arange(len(one_by_one)) % FOLDS
    dealt = np.bincount(cell, minlength=rows * FOLDS).reshape(rows, FOLDS)
    return np.asarray(dealt, dtype=float)


def _single(cases: _Cases) -> bool:
    return bool((cases.count == 1).all()) and bool(np.isin(cases.events, (0.0, 1.0)).all())


def _whole(cases: _Cases) -> bool:
    """Whether these are counts; shares times trials miss whole numbers by a rounding."""
    counts = np.concatenate([cases.events, cases.others])
    return bool(np.allclose(counts, np.rint(counts), rtol=0, atol=1e-6))
