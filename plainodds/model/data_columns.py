"""Columns of the analyst's data beside the model's own, read while the data are there."""

from __future__ import annotations

from typing import Any
from weakref import ref

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused

__all__ = ["DataColumns"]


class DataColumns:
    """The rows used of any column of the analyst's frame, which is neither copied nor kept alive.

    Parameters
    ----------
    frame : DataFrame
    kept : array (rows of the frame,) of bool, or None
        The rows that the fit used; None for all.
    """

    def __init__(self, frame: pd.DataFrame, kept: NDArray[np.bool_] | None) -> None:
        self._frame = ref(frame)
        self._rows = len(frame)
        self._kept = kept

    def names(self) -> tuple[str, ...]:
        """Names of the columns that can be read, in their order; none once the data are gone."""
        frame = self._frame()
        if frame is None or len(frame) != self._rows:
            return ()
        written = [str(column) for column in frame.columns]
        return tuple(name for name in written if written.count(name) == 1)

    def read(self, name: str) -> pd.Series[Any]:
        """A column's values in the rows used.

        Raises
        ------
        QuestionRefused
            If the data are gone or have changed, or have no such column.
        """
        frame = self._frame()
        if frame is None or len(frame) != self._rows:
            gone = "are no longer there" if frame is None else "have other rows than at the fit"
            raise QuestionRefused(
                f"{name!r} is a column of data that {gone}. Hand its values over, one for each "
                f"row that the fit used: groups=frame[{name!r}]."
            )
        found = [column for column in frame.columns if str(column) == name]
        if len(found) != 1:
            known = ", ".join(map(str, frame.columns))
            raise QuestionRefused(f"The data have no single column {name!r}. They have {known}.")
        column: pd.Series[Any] = frame[found[0]]
        return column if self._kept is None else column[self._kept]
