"""Arguments as questions hold them: plain, immutable values."""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from typing import Any, Literal

from plainodds.answers.odds import OddsQuestion
from plainodds.errors import QuestionRefused
from plainodds.values import Scalar, pairs, plain

__all__ = ["listed_values", "odds_question"]


def odds_question(
    predictors: str | Iterable[str],
    steps: Mapping[str, float] | None,
    between: Mapping[str, Sequence[Scalar]] | None,
    references: Mapping[str, Scalar] | None,
    given: Mapping[str, Any] | None,
    order: Literal["model", "size"],
    interval: Literal["wald", "likelihood"],
    level: float,
    layout: Literal["changes", "table"],
) -> OddsQuestion:
    """Hold the arguments of `plainodds.FittedLogit.odds` as a question.

    Raises
    ------
    QuestionRefused
        If `order` or `layout` is none of those that there are.
    """
    if order not in ("model", "size"):
        raise QuestionRefused(f"order={order!r}: choose 'model' or 'size'.")
    if layout not in ("changes", "table"):
        raise QuestionRefused(f"layout={layout!r}: choose 'changes' or 'table'.")
    listed = {
        name: (held,) if isinstance(held, str | bytes) or not hasattr(held, "__iter__") else held
        for name, held in (given or {}).items()
    }
    return OddsQuestion(
        predictors=(predictors,) if isinstance(predictors, str) else tuple(predictors),
        steps=pairs(steps),
        between=pairs(between),
        references=pairs(references),
        given=pairs({name: tuple(held) for name, held in listed.items()}),
        order=order,
        interval=interval,
        level=level,
        layout=layout,
    )


def listed_values(values: Sequence[Scalar]) -> tuple[Scalar, ...]:
    """Hold a list of values as plain Python values.

    Raises
    ------
    QuestionRefused
        If it is one text, which would be taken letter by letter.
    """
    if isinstance(values, str):
        raise QuestionRefused(f"{values!r} is one text; give a list of values.")
    return tuple(plain(each) for each in values)
