"""Do the data give the fit's own design again? If not, no answer is to be trusted."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import FitRefused, QuestionRefused
from plainodds.model.derived import Derived
from plainodds.model.design.design import Design, Floats, decoded
from plainodds.model.raw import RawColumn

__all__ = ["refuse_rows_that_do_not_match", "refuse_wrong_derivations"]

# enough to find rows out of order, and few enough to be quick on a million
_CHECKED_ROWS = 5_000
_CHECKED_ALONE = 3


def refuse_rows_that_do_not_match(
    design: Design, raw: Mapping[str, RawColumn], matrix: Floats
) -> None:
    """Build rows anew, together and one by one, and compare them with the fit's.

    Raises
    ------
    FitRefused
        If they differ: the data are not those of the fit, or the formula computes a row
        from other rows too, so that a profile of its own would be computed wrongly.
    """
    every = np.unique(np.linspace(0, len(matrix) - 1, _CHECKED_ROWS).astype(int))
    _refuse_differing(design, matrix, every, _built(design, raw, every), _OTHER_DATA)
    few = np.unique(every[np.linspace(0, len(every) - 1, _CHECKED_ALONE).astype(int)])
    alone = np.vstack([_built(design, raw, few[i : i + 1]) for i in range(len(few))])
    _refuse_differing(design, matrix, few, alone, _OTHER_ROWS)


_OTHER_DATA = (
    "The data and the fit do not match: in row {row} of the rows used, {name} is {fitted:.6g} in "
    "the fit and {built:.6g} in the data. Hand over the data that the model was fitted on, "
    "unchanged: FittedLogit(result, data=frame)."
)
_FEW_DIGITS = (
    "The data and the fit do not match: in row {row} of the rows used, {name} is {fitted:.6g} in "
    "the fit and {built:.6g} in the data, which differ in the last digits only. Numbers kept in "
    "few digits (float16, int8) make such a fit: turn them into float64 and fit again."
)
_OTHER_ROWS = (
    "The formula computes {name} from other rows too: row {row} gives {fitted:.6g} among the fit's "
    "rows and {built:.6g} alone, so it means nothing for a single profile. Use center() or "
    "standardize(), which remember the fit's mean, or make it a column of the data and fit again."
)


def _built(design: Design, raw: Mapping[str, RawColumn], chosen: NDArray[Any]) -> Floats:
    try:
        return design.rows({name: column.values[chosen] for name, column in raw.items()})
    except QuestionRefused as error:
        raise FitRefused(
            f"The fit's own rows cannot be computed anew: {error} Make a column of it in the data "
            "and fit again with that."
        ) from error


def _refuse_differing(
    design: Design, matrix: Floats, chosen: NDArray[Any], built: Floats, message: str
) -> None:
    wrong = ~np.isclose(built, matrix[chosen], rtol=1e-6, atol=1e-8)
    if wrong.any():
        if message is _OTHER_DATA and np.allclose(built, matrix[chosen], rtol=1e-2, atol=1e-3):
            message = _FEW_DIGITS
        row, column = (int(place[0]) for place in np.nonzero(wrong))
        raise FitRefused(
            message.format(
                row=chosen[row],
                name=design.columns[column].name,
                fitted=matrix[chosen[row], column],
                built=built[row, column],
            )
        )


def refuse_wrong_derivations(
    declared: Mapping[str, Derived], raw: Mapping[str, RawColumn], stored: Mapping[str, Any]
) -> None:
    """Compute derived columns in every row and compare them with the data's.

    Parameters
    ----------
    declared : mapping of name to Derived
    raw : mapping of name to RawColumn
        What they are derived from.
    stored : mapping of name to array (n,)
        The derived columns as the data have them.

    Raises
    ------
    FitRefused
        If an expression cannot be computed, or gives another value in some row.
    """
    for item in declared.values():
        said = f"derived={{{item.name!r}: {item.expression!r}}}"
        columns = {
            name: column.values
            if column.palette is None
            else decoded(column.values, column.palette)
            for name, column in raw.items()
            if name in item.variables
        }
        held = np.asarray(stored[item.name])
        try:
            with np.errstate(all="ignore"):
                computed = np.broadcast_to(item.evaluate(columns), held.shape)
        except Exception as error:
            raise FitRefused(
                f"{said} cannot be computed: {error}. Write it with +, -, *, /, **, comparisons "
                "and functions such as log, sqrt or where, or with np.…"
            ) from error
        wrong = np.nonzero(~_alike(held, computed))[0]
        if len(wrong):
            raise FitRefused(
                f"{said} does not hold: in row {wrong[0]} of the rows used {item.name} is "
                f"{held[wrong[0]]}, and the expression gives {computed[wrong[0]]}. Correct the "
                "expression, or leave it out."
            )


def _alike(held: NDArray[Any], computed: NDArray[Any]) -> NDArray[np.bool_]:
    if computed.dtype.kind in "biuf":
        try:
            numbers = held.astype(float), computed.astype(float)
        except (TypeError, ValueError):
            return np.zeros(held.shape, dtype=bool)
        return np.asarray(np.isclose(*numbers, rtol=1e-8, atol=1e-10))
    return np.asarray(held.astype(object) == computed.astype(object))
