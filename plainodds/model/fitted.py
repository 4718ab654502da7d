"""A fitted model as this package needs it."""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from functools import cached_property
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused
from plainodds.model.data_columns import DataColumns
from plainodds.model.design.design import Coded, Design, Floats
from plainodds.model.estimable import Estimable, estimable
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.model.products import product, transposed_product
from plainodds.model.record import FitRecord
from plainodds.scales import probability_from_linear_predictor, probability_slope
from plainodds.values import Pairs, Scalar

__all__ = ["FittedModel", "Sample"]

_BLOCK = 65_536


@dataclass(frozen=True, eq=False)
class Sample:
    """The rows that the fit used.

    Attributes
    ----------
    matrix : array (n, k)
        The result's own design matrix, not a copy.
    columns : mapping of name to array (n,)
        Coded raw predictors.
    weights : array (n,) or None
        Frequency times variance weights times trials; None where all are 1.
    offset : array (n,) or None
    outcome : array (n,) or None
        Share of events in each row; None where the result no longer carries it.
    frequencies : array (n,) or None
        How many cases a row stands for: frequency weights times trials; None where all
        are 1.
    labels : Index or None
        What the rows are called in the analyst's data; positions where they have no names.
    """

    matrix: Floats
    columns: Coded
    weights: Floats | None
    offset: Floats | None
    outcome: Floats | None = None
    frequencies: Floats | None = None
    labels: pd.Index[Any] | None = None

    @property
    def rows(self) -> int:
        """How many rows."""
        return len(self.matrix)

    @property
    def cases(self) -> Floats | None:
        """How many cases each row stands for; None where each is one.

        A share is a share of some number of cases: where there are no frequencies, the
        weights tell it.
        """
        if self.frequencies is not None or self.weights is None or self.outcome is None:
            return self.frequencies
        shares = bool(np.any((self.outcome > 0) & (self.outcome < 1)))
        return self.weights if shares else None

    def blocks(self) -> list[slice]:
        """Slices that cover the rows, each small enough for the processor's cache."""
        return [slice(start, start + _BLOCK) for start in range(0, self.rows, _BLOCK)]


@dataclass(frozen=True, eq=False)
class FittedModel:
    """Coefficients, covariance, design and sample of a fitted binary logit model.

    Attributes
    ----------
    coefficients : array (k,)
    covariance : array (k, k) or None
    degrees_of_freedom : float or None
        Of the t distribution where the result uses it.
    design : Design
    sample : Sample
    subject : Subject
        What every answer carries.
    no_likelihood : str
        Why likelihood intervals cannot be had; empty where they can.
    intercept_shift : float
        What is added to every η for the population's share of events, in case-control
        samples (King & Zeng 2001, Political Analysis 9:137); else 0.
    record : FitRecord
        How the fit went, as far as the result tells.
    data : DataColumns or None
        Columns of the analyst's data beside the model's own; None where there is no frame.
    """

    coefficients: Floats
    covariance: Floats | None
    degrees_of_freedom: float | None
    design: Design
    sample: Sample
    subject: Subject
    no_likelihood: str = ""
    intercept_shift: float = 0.0
    record: FitRecord = field(default_factory=FitRecord)
    data: DataColumns | None = None

    @property
    def offset(self) -> float:
        """What a profile's η has beside its columns: the held offset, the intercept's shift."""
        return (self.subject.offset or 0.0) + self.intercept_shift

    @cached_property
    def typical(self) -> Pairs:
        """The typical profile: medians and most frequent levels."""
        return tuple((facts.name, facts.typical) for facts in self.subject.predictors)

    def completed(self, stated: Mapping[str, Scalar] | Pairs) -> Pairs:
        """A whole profile: stated values checked and put in order, the rest typical.

        Raises
        ------
        QuestionRefused
            For an unknown predictor or level, text where a number belongs, a missing
            value, or a value at which the formula cannot be computed.
        """
        given = dict(stated)
        for name in given:
            self.subject.predictor(name)
        return tuple(
            (
                facts.name,
                checked(facts, given[facts.name]) if facts.name in given else facts.typical,
            )
            for facts in self.subject.predictors
        )

    def coded(self, profiles: Sequence[Pairs]) -> dict[str, NDArray[Any]]:
        """Whole profiles as coded columns."""
        columns: dict[str, NDArray[Any]] = {}
        for position, facts in enumerate(self.subject.predictors):
            held = [profile[position][1] for profile in profiles]
            columns[facts.name] = code_values(facts, held)
        return columns

    def rows(self, profiles: Sequence[Pairs]) -> Floats:
        """Design rows of whole profiles, shape (len(profiles), k)."""
        return self.design.rows(self.coded(profiles))

    def coded_values(self, facts: PredictorFacts, values: Sequence[Any]) -> NDArray[Any]:
        """Values of one predictor as floats, or as positions of its levels.

        Raises
        ------
        QuestionRefused
            For an unknown level, text where a number belongs, or a missing value.
        """
        return code_values(facts, [checked(facts, value) for value in values])

    def coded_reference(self, facts: PredictorFacts) -> int:
        """Position of the level that the fit's own coding sets to zero; else 0."""
        profiles = [self.completed({facts.name: level}) for level in facts.levels]
        rows = self.rows(profiles)[:, self.design.touched([facts.name])]
        zero = np.nonzero((rows == 0).all(axis=1))[0]
        return int(zero[0]) if len(zero) == 1 else 0

    def refuse_case_control(self) -> None:
        """Refuse a question about probabilities where the sample cannot tell them.

        Raises
        ------
        QuestionRefused
        """
        if self.subject.sampling == "case-control" and self.subject.prevalence is None:
            raise QuestionRefused(
                "The sample is marked as case-control: its share of events was chosen, not found, "
                "so it tells odds ratios but no chances. State the population's share, "
                "FittedLogit(result, sampling='case-control', prevalence=0.02), or ask odds()."
            )

    @cached_property
    def _may_leave_open(self) -> bool:
        """Whether the covariance lacks a direction, as it does where columns follow from others."""
        if self.covariance is None:
            return False
        size = np.sqrt(np.maximum(np.diag(self.covariance), 0.0))
        if not (size > 0).all():
            return True
        strength = np.linalg.eigvalsh(self.covariance / np.outer(size, size))
        return bool(strength[0] <= 1e-9 * strength[-1])

    @property
    def leaves_something_open(self) -> bool:
        """Whether some combination of the coefficients makes no difference in any row."""
        return self._may_leave_open and bool(self.estimable.open.shape[1])

    def leaves_open(self, gradients: Floats) -> NDArray[np.bool_]:
        """Which functions of the coefficients, by their gradients (m, k), the rows leave open."""
        if not self._may_leave_open:
            return np.zeros(len(gradients), dtype=bool)
        return ~self.estimable.determined(gradients)

    @cached_property
    def standard_deviations(self) -> dict[str, float]:
        """Of each predictor that takes numbers, over the rows."""
        return {
            facts.name: float(np.std(self.sample.columns[facts.name]))
            for facts in self.subject.predictors
            if facts.is_number
        }

    @cached_property
    def information_inverse(self) -> Floats:
        """(X'WX)⁻¹ at the fitted probabilities, whatever covariance the result carries."""
        k = len(self.coefficients)
        information = np.zeros((k, k))
        for block in self.sample.blocks():
            X = self.sample.matrix[block]
            eta = np.einsum("ij,j->i", X, self.coefficients)
            if self.sample.offset is not None:
                eta += self.sample.offset[block]
            w = probability_slope(probability_from_linear_predictor(eta))
            if self.sample.weights is not None:
                w *= self.sample.weights[block]
            information += transposed_product(X, X * w[:, None])
        return np.asarray(np.linalg.pinv(information, hermitian=True))

    @cached_property
    def estimable(self) -> Estimable:
        """Which functions of the coefficients the rows determine."""
        return estimable(self.sample.matrix, self.sample.weights)

    @cached_property
    def leverage_quantiles(self) -> tuple[float, float]:
        """99th percentile and largest of x'(X'WX)⁻¹x among the rows."""
        if not self.sample.rows:
            return math.nan, math.nan
        inverse = self.information_inverse
        found = [
            np.einsum("ij,ij->i", product(X := self.sample.matrix[block], inverse), X)
            for block in self.sample.blocks()
        ]
        leverages = np.concatenate(found)
        return float(np.quantile(leverages, 0.99)), float(leverages.max())


def checked(facts: PredictorFacts, value: Any) -> Scalar:
    """A stated value as the predictor's own kind of value, or a refusal.

    Raises
    ------
    QuestionRefused
        Naming the predictor, the value and what it may be.
    """
    item = value.item() if isinstance(value, np.generic) else value
    if pd.api.types.is_scalar(item) and pd.isna(item):
        raise QuestionRefused(
            f"{facts.name}: a missing value has no place in a profile. State one, or leave "
            f"{facts.name} out for its typical value."
        )
    if not facts.is_number:
        # intervals and the like are known by their text
        level = item if isinstance(item, bool | int | float | str) else str(item)
        if level not in facts.levels:
            known = ", ".join(repr(each) for each in facts.levels)
            raise QuestionRefused(f"{facts.name} has no level {level!r}. It has {known}.")
        return facts.levels[facts.levels.index(level)]
    if isinstance(item, str):
        raise QuestionRefused(
            f"{facts.name} is a number, and {item!r} is text. Write it without quotes."
        )
    if not isinstance(item, int | float):
        raise QuestionRefused(
            f"{facts.name} is a number, and {item!r} ({type(item).__name__}) is not a single one."
        )
    number = float(item)
    if not math.isfinite(number):
        raise QuestionRefused(f"{facts.name}: {item!r} is not a finite number.")
    low, high = facts.allowed
    if not low <= number <= high:
        raise QuestionRefused(
            f"{facts.name} = {number:g}: the formula cannot be computed there, only from "
            f"{low:g} to {high:g} (a spline ends at its boundary knots, a logarithm at 0)."
        )
    return int(number) if facts.kind == "whole number" and number.is_integer() else number


def code_values(facts: PredictorFacts, values: Sequence[Scalar]) -> NDArray[Any]:
    """Values of one predictor as floats, or as positions of its levels."""
    if facts.is_number:
        return np.array(values, dtype=float)
    places = {level: place for place, level in enumerate(facts.levels)}
    return np.array([places[value] for value in values], dtype=np.intp)
