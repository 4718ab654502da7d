"""Which rows belong together: by a column of the data, or by values handed over beside it."""

from __future__ import annotations

import hashlib
from dataclasses import dataclass
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = ["Grouping", "Groups", "grouping", "stated_groups"]


@value
class Groups:
    """Which rows belong together, by name and fingerprint: an answer holds no rows.

    Attributes
    ----------
    name : str
        A column's name, or "groups" for values handed over.
    fingerprint : str
        A digest of the values handed over, by which they are known again; empty for a
        column.
    """

    name: str
    fingerprint: str = ""


@dataclass(frozen=True, eq=False)
class Grouping:
    """Groups of rows.

    Attributes
    ----------
    name : str
    of_row : array (n,)
        Each row's group, from 0.
    count : int
    """

    name: str
    of_row: NDArray[np.intp]
    count: int

    @property
    def largest(self) -> int:
        """Rows of the largest group."""
        return int(np.bincount(self.of_row).max())


def stated_groups(model: FittedModel, groups: Any) -> tuple[Groups | None, Any]:
    """What the question holds of a `groups=`, and the values themselves where it is values.

    Raises
    ------
    QuestionRefused
        If the values are not one for each row, or some are missing.
    """
    if groups is None:
        return None, None
    if isinstance(groups, str):
        return Groups(groups), None
    of_row, _ = _coded(model, "groups", groups)
    return Groups("groups", _fingerprint(of_row)), groups


def grouping(model: FittedModel, stated: Groups, values: Any = None) -> Grouping:
    """The groups themselves.

    Parameters
    ----------
    model : FittedModel
    stated : Groups
        What the question holds.
    values : array or Series (n,), optional
        What was handed over, where it was values.

    Raises
    ------
    QuestionRefused
        For a column that cannot be read, missing values, one group only, or values that
        were not handed over again or are others than those of the question.
    """
    if not stated.fingerprint:
        of_row, count = _coded(model, stated.name, _column(model, stated.name))
    elif values is None:
        raise QuestionRefused(
            "The question tells which rows belong together by values, which are not kept with it. "
            "Hand them over again, as soundness(groups=values)."
        )
    else:
        of_row, count = _coded(model, stated.name, values)
        if _fingerprint(of_row) != stated.fingerprint:
            raise QuestionRefused(
                "The values handed over as groups= put other rows together than those that the "
                "question was asked with. Hand the same ones over, or ask soundness() anew."
            )
    if count == 1:
        raise QuestionRefused(
            f"groups={stated.name!r} puts all rows into one group, so nothing can be compared "
            "between groups. Name a column that tells several apart."
        )
    return Grouping(stated.name, of_row, count)


def _column(model: FittedModel, name: str) -> Any:
    if name in model.sample.columns:
        return model.sample.columns[name]
    if model.data is None:
        raise QuestionRefused(
            f"groups={name!r}: the model carries no data but its own predictors. Hand the values "
            f"over, one for each row that the fit used: groups=frame[{name!r}]."
        )
    return model.data.read(name)


def _coded(model: FittedModel, name: str, values: Any) -> tuple[NDArray[np.intp], int]:
    held = values if isinstance(values, pd.Series) else pd.Series(_one_each(values))
    if len(held) != model.sample.rows:
        raise QuestionRefused(
            f"groups= has {len(held):,} values, and the fit used {model.sample.rows:,} rows. Make "
            "them from the rows that the fit used (without those dropped for missing values)."
        )
    codes, found = pd.factorize(held)
    missing = int((codes < 0).sum())
    if missing:
        raise QuestionRefused(
            f"groups={name!r} is missing in {missing:,} of the rows that the fit used. Say to "
            "which group each of them belongs, or fit without them."
        )
    return codes, len(found)


def _one_each(values: Any) -> Any:
    each = np.asarray(values)
    if each.ndim != 1:
        raise QuestionRefused(
            "groups= is the name of a column, or one value for each row that the fit used."
        )
    return each


def _fingerprint(of_row: NDArray[np.intp]) -> str:
    # which rows belong together, whatever their groups are called
    return hashlib.sha256(of_row.astype("<i8").tobytes()).hexdigest()[:16]
