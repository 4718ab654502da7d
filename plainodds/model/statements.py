"""What the analyst states beside her fit, read before anything is made of it."""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any, get_args

from plainodds.errors import FitRefused
from plainodds.model.predictors import Kind, Outcome, Predictor, Sampling, Setting

__all__ = ["Statements", "read_statements"]


@dataclass(frozen=True, eq=False)
class Statements:
    """The arguments of `plainodds.FittedLogit` but for the fit and its data."""

    predictors: Mapping[str, Predictor]
    outcome: Outcome | None
    derived: Mapping[str, str]
    functions: Mapping[str, Callable[..., Any]]
    offset: float | None
    sampling: Sampling
    prevalence: float | None
    causal: bool
    reason: str

    def setting(self, *, with_data: bool, sampling: Sampling | None) -> Setting:
        """What was stated, as every answer carries it so that code can state it again."""
        return Setting(
            predictors=tuple(self.predictors.items()),
            outcome=self.outcome,
            derived=tuple(self.derived.items()),
            functions=tuple(self.functions),
            offset=self.offset,
            with_data=with_data,
            sampling=sampling,
            prevalence=self.prevalence,
            causal=self.causal,
            reason=self.reason,
        )


def read_statements(
    predictors: Any,
    outcome: Any,
    derived: Any,
    functions: Any,
    offset: Any,
    sampling: Any,
    prevalence: Any,
    causal: Any = False,
    reason: Any = "",
) -> Statements:
    """Read the analyst's statements, which need not be of the right kind.

    Raises
    ------
    FitRefused
        If one is not what it should be, with an example of what it could be.
    """
    stated = _mapping(predictors, "predictors", "{'age': Predictor(label='Age', unit='years')}")
    for name, predictor in stated.items():
        if not isinstance(predictor, Predictor):
            raise FitRefused(
                f"predictors={{{name!r}: {predictor!r}}}: state it as a Predictor, for example "
                f"Predictor(label={name!r})."
            )
        _refuse_impossible(name, predictor)
    if outcome is not None and not isinstance(outcome, Outcome):
        raise FitRefused(
            f"outcome={outcome!r}: state it as an Outcome, for example "
            "Outcome(event='burst this winter', case='pipe', cases='pipes')."
        )
    expressions = _mapping(derived, "derived", "{'age_sq': 'age ** 2'}")
    for name, expression in expressions.items():
        if not isinstance(expression, str):
            raise FitRefused(
                f"derived={{{name!r}: {expression!r}}}: write the expression as text, for example "
                "'age ** 2'."
            )
    handed = _mapping(functions, "functions", "{'my_function': my_function}")
    for name, function in handed.items():
        if not callable(function):
            raise FitRefused(
                f"functions={{{name!r}: {function!r}}} is no function. Hand over the function "
                "itself, under the name that the formula uses."
            )
    if offset is not None and not _is_number(offset):
        raise FitRefused(
            f"offset={offset!r} is not a number. State the one value at which it is held, or "
            "leave it out for the median."
        )
    return Statements(
        stated,
        outcome,
        expressions,
        handed,
        None if offset is None else float(offset),
        _sampling(sampling, prevalence),
        None if prevalence is None else float(prevalence),
        *_causal(causal, reason),
    )


def _causal(causal: Any, reason: Any) -> tuple[bool, str]:
    if not isinstance(causal, bool) or not isinstance(reason, str):
        raise FitRefused(
            f"causal={causal!r}, reason={reason!r}: state causal=True and, in words, what makes "
            "it so."
        )
    reason = " ".join(reason.split())
    if causal and not reason:
        raise FitRefused(
            "causal=True needs a reason, which is told wherever the figures are told: for example "
            "reason='mains were chosen for relining by lot'."
        )
    if reason and not causal:
        raise FitRefused(f"reason={reason!r} goes with causal=True; state both or neither.")
    return causal, reason


def _sampling(sampling: Any, prevalence: Any) -> Sampling:
    if sampling not in (None, *get_args(Sampling)):
        raise FitRefused(f"sampling={sampling!r}: choose 'cohort' or 'case-control'.")
    if prevalence is None:
        return sampling or "cohort"
    if sampling == "cohort":
        raise FitRefused(
            "prevalence= corrects the chances of a case-control sample; a cohort's own share of "
            "events needs no correction. Leave one of the two out."
        )
    if not _is_number(prevalence) or not 0 < prevalence < 1:
        raise FitRefused(
            f"prevalence={prevalence!r} is not a share between 0 and 1. State the population's "
            "share of events, for example prevalence=0.02 for 2 in 100."
        )
    return "case-control"


def _mapping(held: Any, argument: str, example: str) -> dict[str, Any]:
    if held is None:
        return {}
    if not isinstance(held, Mapping) or not all(isinstance(name, str) for name in held):
        raise FitRefused(
            f"{argument}= is a {type(held).__name__}; hand over a dict by name, for example "
            f"{argument}={example}."
        )
    return dict(held)


def _is_number(held: Any) -> bool:
    return isinstance(held, int | float) and not isinstance(held, bool) and math.isfinite(held)


def _refuse_impossible(name: str, stated: Predictor) -> None:
    for field in ("label", "unit"):
        text = getattr(stated, field)
        if text is not None and not isinstance(text, str):
            raise FitRefused(f"Predictor {name!r}: {field}={text!r} is not text.")
    if stated.kind is not None and stated.kind not in get_args(Kind):
        raise FitRefused(
            f"Predictor {name!r}: kind={stated.kind!r}; choose one of "
            f"{', '.join(map(repr, get_args(Kind)))}, or leave it out."
        )
    if stated.step is not None and not (_is_number(stated.step) and stated.step > 0):
        raise FitRefused(
            f"Predictor {name!r}: step={stated.step!r} is not a number above 0. State the change "
            "that an odds ratio should speak of, for example step=10."
        )
    _refuse_impossible_range(name, stated.range)
    for field in ("levels", "level_labels"):
        held = getattr(stated, field)
        if held is not None and not isinstance(held, tuple):
            raise FitRefused(
                f"Predictor {name!r}: {field}={held!r}; write levels=('low', 'high') and "
                "level_labels={'low': 'Low', 'high': 'High'}."
            )
    if any(not isinstance(pair, tuple) or len(pair) != 2 for pair in stated.level_labels or ()):
        raise FitRefused(
            f"Predictor {name!r}: level_labels={stated.level_labels!r}; write them as a dict from "
            "level to label, for example level_labels={'low': 'Low'}."
        )
    for value in (stated.typical, *(stated.levels or ())):
        if value is not None and not isinstance(value, bool | int | float | str):
            raise FitRefused(
                f"Predictor {name!r}: {value!r} ({type(value).__name__}) is not a single number, "
                "text or yes/no value, as typical= and levels= take."
            )


def _refuse_impossible_range(name: str, stated: Any) -> None:
    if stated is None:
        return
    if (
        not isinstance(stated, tuple)
        or len(stated) != 2
        or not all(_is_number(end) for end in stated)
        or not stated[0] < stated[1]
    ):
        raise FitRefused(
            f"Predictor {name!r}: range={stated!r} is not (lowest, highest) with lowest below. "
            "Write for example range=(0, 100), or leave it out for the data's own."
        )
