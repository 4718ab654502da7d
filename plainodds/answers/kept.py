"""What is computed once for each model, and forgotten with it."""

from __future__ import annotations

from collections.abc import Callable
from functools import wraps
from typing import TypeVar
from weakref import WeakKeyDictionary

from plainodds.model.fitted import FittedModel

__all__ = ["kept"]

_T = TypeVar("_T")


def kept(function: Callable[[FittedModel], _T]) -> Callable[[FittedModel], _T]:
    """Make a function of a model remember its result for as long as the model lives.

    The result must not hold the model itself.
    """
    memory: WeakKeyDictionary[FittedModel, _T] = WeakKeyDictionary()

    @wraps(function)
    def remembered(model: FittedModel) -> _T:
        if model not in memory:
            memory[model] = function(model)
        return memory[model]

    return remembered
