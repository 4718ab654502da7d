"""What the analyst says of predictors and outcome, and what is known of them.

`Predictor` and `Outcome` are what she may state; `PredictorFacts` and
`OutcomeFacts` are the same things settled, from her statement where there is
one and from the data where there is none. `Subject` gathers the facts that
every answer carries.
"""

from __future__ import annotations

from collections.abc import ItemsView, Mapping
from dataclasses import fields
from typing import Any, Literal, TypeAlias

import numpy as np

from plainodds.errors import QuestionRefused
from plainodds.values import Scalar, value

__all__ = ["Kind", "Outcome", "OutcomeFacts", "Predictor", "PredictorFacts", "Setting", "Subject"]

Kind: TypeAlias = Literal["number", "whole number", "yes/no", "category"]
Sampling: TypeAlias = Literal["cohort", "case-control"]
"""How the rows came: as they are, or chosen by their outcome."""
Stakes: TypeAlias = Literal["health", "safety", "money", "rights"]
"""What a wrong reading can hurt."""


@value
class Predictor:
    """What the analyst states about one predictor; whatever is left out comes from the data.

    Attributes
    ----------
    label : str, optional
        How people call it, for example ``"Pipe age"``.
    unit : str, optional
        The unit in the plural, for example ``"years"``.
    kind : {"number", "whole number", "yes/no", "category"}, optional
    levels : tuple, optional
        The order in which a category's levels are shown.
    level_labels : tuple of (level, label) pairs or mapping, optional
        How people call the levels.
    range : (float, float), optional
        Lowest and highest value that a slider offers.
    typical : scalar, optional
        The value held when the predictor is "typical".
    step : float, optional
        The change that an odds ratio speaks of, and the step of a slider.

    Examples
    --------
    >>> Predictor(label="Pipe age", unit="years", step=10).step
    10
    """

    label: str | None = None
    unit: str | None = None
    kind: Kind | None = None
    levels: tuple[Scalar, ...] | None = None
    level_labels: tuple[tuple[Scalar, str], ...] | None = None
    range: tuple[float, float] | None = None
    typical: Scalar | None = None
    step: float | None = None

    def __post_init__(self) -> None:
        # lists, dicts and numpy scalars are held as plain values, so that they can be compared;
        # what is neither is refused where the fit is taken in, with the predictor's name
        for field in fields(self):
            object.__setattr__(self, field.name, _as_plain(getattr(self, field.name)))


def _as_plain(held: Any) -> Any:
    if isinstance(held, Mapping):
        held = held.items()
    if isinstance(held, list | tuple | np.ndarray | ItemsView):
        return tuple(_as_plain(each) for each in held)
    return held.item() if isinstance(held, np.generic) else held


@value
class Outcome:
    """What the analyst states about the outcome.

    Attributes
    ----------
    event : str, optional
        What the chance is a chance of, for example ``"burst this winter"``.
    case, cases : str, optional
        What one row is, and many: ``"pipe"`` and ``"pipes"``.
    level : scalar, optional
        The outcome's level whose chance is wanted. Where the fit modelled the other
        one, every sign is turned and a notice says so.
    stakes : {"health", "safety", "money", "rights"}, optional
        What a wrong reading can hurt. The words then carry the usual cautions: about groups
        and individuals, and about the rules and people to whom a decision belongs.

    Examples
    --------
    >>> Outcome(event="burst this winter", case="pipe", cases="pipes").case
    'pipe'
    """

    event: str | None = None
    case: str | None = None
    cases: str | None = None
    level: Scalar | None = None
    stakes: Stakes | None = None


@value
class PredictorFacts:
    """One predictor as answers know it.

    Attributes
    ----------
    name : str
        The raw column's name.
    label, unit : str
        `unit` may be empty.
    kind : {"number", "whole number", "yes/no", "category"}
    levels : tuple of scalars
        The levels in order; ``(False, True)`` or ``(0, 1)`` for yes/no; empty for numbers.
    level_labels : tuple of str
        Parallel to `levels`.
    level_counts : tuple of int
        Rows per level, parallel to `levels`.
    minimum, maximum : float
        Range in the data (nan for categories).
    quartiles : (float, float, float)
        Lower quartile, median, upper quartile in the data (nan for categories).
    offered : (float, float)
        The range that controls offer (nan for categories).
    allowed : (float, float)
        Values outside this range cannot be computed, for example beyond a spline's
        boundary knots; infinite where there is no such bound.
    typical : scalar
        Median of a number, most frequent level of a category.
    step : float
        A round step (1, 2 or 5 times a power of ten); nan for categories.
    linear : bool
        Whether the linear predictor changes by the same amount for each step.
    modifiers : tuple of str
        Predictors that share a term with this one.
    level_cases : tuple of float
        Cases per level, parallel to `levels`: rows by their frequencies.
    level_events : tuple of float
        Cases with the event per level, parallel to `levels`; empty where the result no
        longer carries its outcome.
    """

    name: str
    label: str
    unit: str
    kind: Kind
    levels: tuple[Scalar, ...]
    level_labels: tuple[str, ...]
    level_counts: tuple[int, ...]
    minimum: float
    maximum: float
    quartiles: tuple[float, float, float]
    offered: tuple[float, float]
    allowed: tuple[float, float]
    typical: Scalar
    step: float
    linear: bool
    modifiers: tuple[str, ...]
    level_cases: tuple[float, ...] = ()
    level_events: tuple[float, ...] = ()

    @property
    def is_number(self) -> bool:
        """Whether the predictor takes numbers, and not levels."""
        return self.kind in ("number", "whole number")

    @property
    def levels_with_rows(self) -> tuple[Scalar, ...]:
        """The levels that some row has: of the others a fit knows nothing."""
        return tuple(
            level for level, count in zip(self.levels, self.level_counts, strict=True) if count
        )

    def level_label(self, level: Scalar) -> str:
        """How people call a level."""
        return self.level_labels[self.levels.index(level)]


@value
class OutcomeFacts:
    """The outcome as answers know it.

    Attributes
    ----------
    name : str
        The outcome column's name.
    event : str
        What the chance is a chance of; reads well after "chance of".
    case, cases : str
        What one row is, and many.
    level : scalar or None
        The modelled level; None for proportions and counts.
    share : float
        Weighted share of the event in the rows used.
    """

    name: str
    event: str
    case: str
    cases: str
    level: Scalar | None
    share: float
    stakes: Stakes | None = None


@value
class Setting:
    """What the analyst stated when she took the fit in, so that code can state it again."""

    predictors: tuple[tuple[str, Predictor], ...] = ()
    outcome: Outcome | None = None
    derived: tuple[tuple[str, str], ...] = ()
    functions: tuple[str, ...] = ()
    offset: float | None = None
    with_data: bool = False
    sampling: Sampling | None = None
    prevalence: float | None = None
    causal: bool = False
    reason: str = ""


@value
class Subject:
    """What an answer is about: the same for every answer of one fitted model.

    Attributes
    ----------
    outcome : OutcomeFacts
    predictors : tuple of PredictorFacts
        In the order in which the model mentions them.
    rows : int
        Rows used in the fit.
    covariance_kind : str
        The result's own covariance, for example ``"nonrobust"`` or ``"cluster"``.
    no_interval : str
        Why there are no intervals; empty where there are.
    offset : float or None
        The value at which the offset is held; None where the model has no offset.
    notices : tuple of str
        What the analyst should know about how the fit was taken in.
    setting : Setting
    sampling : {"cohort", "case-control"}
    prevalence : float or None
        The population's share of events, stated for a case-control sample.
    smallest_cell : int
        Counts from 1 to it all stand as it, and are read as "up to"; 0 where every count is
        as it is.
    """

    outcome: OutcomeFacts
    predictors: tuple[PredictorFacts, ...]
    rows: int
    covariance_kind: str
    no_interval: str
    offset: float | None
    notices: tuple[str, ...]
    setting: Setting
    sampling: Sampling = "cohort"
    prevalence: float | None = None
    smallest_cell: int = 0

    def predictor(self, name: str) -> PredictorFacts:
        """The facts of one predictor.

        Raises
        ------
        QuestionRefused
            If the model has no such predictor.
        """
        for facts in self.predictors:
            if facts.name == name:
                return facts
        known = ", ".join(facts.name for facts in self.predictors)
        raise QuestionRefused(f"The model has no predictor {name!r}. It has: {known}.")
