"""Columns of the analyst's data are named and read while the data are there."""

import numpy as np
import pandas as pd
import pytest

import plainodds as po
from plainodds.model.data_columns import DataColumns


def test_columns_are_named_in_their_order_but_for_those_of_one_name():
    frame = pd.DataFrame([[1, 2, 3, 4]], columns=["b", 7, "twice", "twice"])
    assert DataColumns(frame, None).names() == ("b", "7")


def test_a_column_is_read_in_the_rows_used():
    frame = pd.DataFrame({"a": [1, 2, 3]})
    kept = np.array([True, False, True])
    assert list(DataColumns(frame, kept).read("a")) == [1, 3]


def test_data_that_are_gone_or_have_grown_name_no_columns():
    frame = pd.DataFrame({"a": [1, 2, 3]})
    columns = DataColumns(frame, None)
    frame.loc[3] = 4
    assert columns.names() == ()
    with pytest.raises(po.QuestionRefused, match="other rows than at the fit"):
        columns.read("a")
    del frame
    assert columns.names() == ()
