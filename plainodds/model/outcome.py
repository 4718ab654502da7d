"""Which event a fit models: found out from the result, and stated."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, get_args

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import FitRefused
from plainodds.model.predictors import Outcome, OutcomeFacts, Stakes
from plainodds.values import Scalar

__all__ = ["Modelled", "modelled_outcome", "must_turn", "outcome_facts"]


@dataclass(frozen=True)
class Modelled:
    """The event that statsmodels modelled.

    Attributes
    ----------
    name : str
        The outcome's name.
    level : scalar or None
        The modelled level; None for proportions and counts.
    other : scalar or None
        The level that was not modelled.
    flipped : bool
        Whether the fit modelled the level that most people would not expect, which is
        the first of a text or yes/no outcome.
    """

    name: str
    level: Scalar | None
    other: Scalar | None
    flipped: bool


def modelled_outcome(model: Any, outcome: NDArray[Any] | None) -> Modelled:
    """Find out which event a model's coefficients speak of.

    Parameters
    ----------
    model : statsmodels model
    outcome : array (n,) or None
        The outcome as statsmodels fitted it: 0/1 or shares; None where it was removed.

    Raises
    ------
    FitRefused
        If the outcome is neither two-valued nor a share.
    """
    names = model.endog_names
    names = [names] if isinstance(names, str) else list(names)
    if outcome is not None:
        _refuse_other_outcomes(names[0], outcome)
    if len(names) == 2:
        indicators = _indicators(names) if _is_one_case_per_row(model) else None
        if indicators:
            # a text or yes/no outcome becomes two indicators, of which the first is modelled
            name, first, second = indicators
            return Modelled(name, _level(first), _level(second), flipped=True)
        return Modelled(str(names[0]), None, None, flipped=False)
    if outcome is not None and np.isin(outcome, (0, 1)).all():
        boolean = outcome.dtype == bool
        level, other = (True, False) if boolean else (1, 0)
        return Modelled(str(names[0]), level, other, flipped=False)
    return Modelled(str(names[0]), None, None, flipped=False)


def _is_one_case_per_row(model: Any) -> bool:
    trials = getattr(model, "n_trials", None)
    return hasattr(model, "formula") and (trials is None or bool(np.all(np.asarray(trials) == 1)))


def _indicators(names: Sequence[str]) -> tuple[str, str, str] | None:
    """The outcome's name and its levels, from names like ``fate[left]`` and ``fate[stayed]``."""
    one, other = names
    if not (one.endswith("]") and other.endswith("]")):
        return None
    for place, sign in enumerate(one):
        name = one[:place]
        if sign == "[" and name and other.startswith(f"{name}[") and _is_whole(name):
            first, second = (text[place + 1 : -1].removeprefix("T.") for text in names)
            return name, first, second
    return None


def _is_whole(code: str) -> bool:
    # brackets and quotes within a name or a call are not the level's
    return code.count("(") == code.count(")") and not (code.count("'") % 2 or code.count('"') % 2)


def _level(text: str) -> Scalar:
    return {"True": True, "False": False}.get(text, text)


def _refuse_other_outcomes(name: str, outcome: NDArray[Any]) -> None:
    values = np.asarray(outcome, dtype=float)
    outside = (values < 0) | (values > 1)
    if outside.any():
        found = ", ".join(f"{v:g}" for v in np.unique(values)[:5])
        raise FitRefused(
            f"The outcome {name} has values {found}, and a chance needs 0 and 1 (or shares "
            f"between them). Recode it, for example df[{name!r}] == {np.unique(values)[-1]:g}, and "
            "fit again."
        )
    if values.size and (values == values[0]).all() and values[0] in (0.0, 1.0):
        raise FitRefused(
            f"The outcome {name} is {values[0]:g} in every row used, so there is nothing to "
            "explain. Check how it is coded and which rows were dropped."
        )


def outcome_facts(
    modelled: Modelled, stated: Outcome | None, share: float, turned: bool
) -> tuple[OutcomeFacts, tuple[str, ...]]:
    """Settle the outcome's wording, with the notices that the analyst should see.

    Parameters
    ----------
    modelled : Modelled
    stated : Outcome or None
        What the analyst said.
    share : float
        Weighted share of the event that the answers speak of.
    turned : bool
        Whether every sign was turned, because the analyst asked for the other level.
    """
    stated = stated or Outcome()
    level = modelled.other if turned else modelled.level
    event = stated.event or (modelled.name if level is None else f"{modelled.name} = {level}")
    notices: list[str] = []
    if turned:
        notices.append(
            f"The fit models {modelled.name} = {modelled.level}; as asked, every sign was turned "
            f"and the answers speak of {modelled.name} = {level}."
        )
    elif modelled.flipped:
        notices.append(
            f"The fit models {modelled.name} = {modelled.level}, not {modelled.name} = "
            f"{modelled.other}: of a text or yes/no outcome the first level is taken as the event. "
            f"The answers speak of {modelled.name} = {modelled.level}; for the other level pass "
            f"outcome=Outcome(level={modelled.other!r})."
        )
    cases = stated.cases or (f"{stated.case}s" if stated.case else "cases")
    facts = OutcomeFacts(
        modelled.name, event, stated.case or "case", cases, level, share, _stakes(stated.stakes)
    )
    return facts, tuple(notices)


def _stakes(stated: Stakes | None) -> Stakes | None:
    if stated is not None and stated not in get_args(Stakes):
        known = ", ".join(repr(each) for each in get_args(Stakes))
        raise FitRefused(f"Outcome(stakes={stated!r}): choose one of {known}, or leave it out.")
    return stated


def must_turn(modelled: Modelled, stated: Outcome | None) -> bool:
    """Whether the analyst wants the level that the fit did not model.

    Raises
    ------
    FitRefused
        If she names a level that the outcome does not have.
    """
    if stated is None or stated.level is None:
        return False
    if modelled.level is not None and _same(stated.level, modelled.level):
        return False
    if modelled.other is None or not _same(stated.level, modelled.other):
        known = [level for level in (modelled.other, modelled.level) if level is not None]
        raise FitRefused(
            f"Outcome(level={stated.level!r}): the outcome {modelled.name} has "
            + (
                f"the levels {known[0]!r} and {known[1]!r}."
                if known
                else "no levels but counts or shares."
            )
        )
    return True


def _same(stated: Scalar, level: Scalar) -> bool:
    # statsmodels knows the levels of a categorical outcome by their text only
    return stated == level or str(stated) == str(level)
