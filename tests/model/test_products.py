"""Products in pieces are the products."""

import numpy as np
import pytest

from plainodds.model.products import product, transposed_product

DRAW = np.random.default_rng(3)


@pytest.mark.parametrize("a", [1, 5, 27])
@pytest.mark.parametrize("b", [1, 4, 27, 400])
@pytest.mark.parametrize("n", [0, 1, 7, 1000, 30_000])
def test_products_in_pieces_are_the_products(n, a, b):
    n = min(n, 2_000_000 // b)
    rows, matrix, other = (
        DRAW.normal(size=(n, a)),
        DRAW.normal(size=(a, b)),
        DRAW.normal(size=(n, b)),
    )
    np.testing.assert_allclose(product(rows, matrix), rows @ matrix, atol=1e-10)
    np.testing.assert_allclose(transposed_product(rows, other), rows.T @ other, atol=1e-8)


def test_rows_may_lie_in_memory_as_they_like():
    rows = np.asfortranarray(DRAW.normal(size=(30_000, 9)))
    matrix = DRAW.normal(size=(3, 4))
    np.testing.assert_allclose(product(rows[:, ::3], matrix), rows[:, ::3] @ matrix, atol=1e-10)
    np.testing.assert_allclose(
        transposed_product(rows[:, :3], rows[:, 3:]), rows[:, :3].T @ rows[:, 3:], atol=1e-8
    )
