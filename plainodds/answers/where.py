"""Which rows a question is about: by stated values, or by a mask handed over beside it."""

from __future__ import annotations

import hashlib
from collections.abc import Mapping
from typing import Any, TypeAlias

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.values import Pairs, pairs, value

__all__ = ["Mask", "Where", "chosen_rows", "stated_rows"]


@value
class Mask:
    """A boolean mask over the rows, by its fingerprint: an answer holds no rows.

    Attributes
    ----------
    rows : int
        Rows chosen.
    fingerprint : str
        A digest of the mask, by which it is known again.
    """

    rows: int
    fingerprint: str


Where: TypeAlias = Pairs | Mask | None


def stated_rows(
    model: FittedModel, where: Mapping[str, Any] | Any | None
) -> tuple[Where, NDArray[np.bool_] | None]:
    """What the question holds of a `where=`, and the mask itself where it is one.

    Raises
    ------
    QuestionRefused
        If a mask is not boolean or has another number of rows.
    """
    if where is None:
        return None, None
    if isinstance(where, Mapping):
        return pairs(where), None
    mask = np.asarray(where.to_numpy() if isinstance(where, pd.Series) else where)
    if mask.dtype != bool or mask.ndim != 1:
        raise QuestionRefused(
            "where= is a mapping of values, as {'soil': 'high'}, or a boolean mask with one "
            "True or False for each row used in the fit."
        )
    if len(mask) != model.sample.rows:
        raise QuestionRefused(
            f"where= has {len(mask):,} rows, and the fit used {model.sample.rows:,}. Make the mask "
            "from the rows that the fit used (without those dropped for missing values)."
        )
    return Mask(int(mask.sum()), hashlib.sha256(np.packbits(mask).tobytes()).hexdigest()[:16]), mask


def chosen_rows(
    model: FittedModel, where: Where, mask: NDArray[np.bool_] | None
) -> tuple[NDArray[np.bool_], str]:
    """The rows chosen, and how to say which.

    Raises
    ------
    QuestionRefused
        For an unknown predictor or level, or a mask that was not handed over again.
    """
    if isinstance(where, Mask):
        if mask is None:
            raise QuestionRefused(
                "The question chooses rows by a mask, which is not kept with it. Hand the mask "
                "over again, as where=mask."
            )
        return mask, "a True in the mask"
    rows = np.ones(model.sample.rows, dtype=bool)
    for name, held in where or ():
        rows &= _having(model, name, held)
    return rows, " and ".join(f"{name} = {held!r}" for name, held in where or ())


def _having(model: FittedModel, name: str, held: Any) -> NDArray[np.bool_]:
    """Rows with a level, one of several levels, a number, or a number within (lowest, highest)."""
    facts = model.subject.predictor(name)
    column = model.sample.columns[name]
    if facts.is_number:
        if isinstance(held, tuple):
            if len(held) != 2 or any(isinstance(end, str) for end in held):
                raise QuestionRefused(f"where={{{name!r}: {held!r}}} is not (lowest, highest).")
            return np.asarray((column >= held[0]) & (column <= held[1]))
        return np.asarray(column == model.coded_values(facts, (held,)))
    listed = held if isinstance(held, tuple) else (held,)
    return np.isin(column, model.coded_values(facts, listed))
