"""What was found of a model before: kept for questions asked again, as a slider moves."""

from __future__ import annotations

from collections.abc import Callable, Hashable
from typing import Any, TypeVar
from weakref import WeakKeyDictionary

from plainodds.model.fitted import FittedModel

__all__ = ["remembered"]

_T = TypeVar("_T")
_KEPT = 64

# a model is never changed, so that what was found of it stays true as long as it lives
_found: WeakKeyDictionary[FittedModel, dict[Hashable, Any]] = WeakKeyDictionary()


def remembered(model: FittedModel, key: Hashable, find: Callable[[], _T]) -> _T:
    """What `find` finds, computed once for each model and key.

    Parameters
    ----------
    model : FittedModel
    key : hashable
        All that the result depends on beside the model, by a name that tells it from others.
    find : callable
        Without arguments; what it raises is not kept.
    """
    kept = _found.setdefault(model, {})
    if key in kept:
        return kept[key]  # type: ignore[no-any-return]
    found = find()
    while len(kept) >= _KEPT:
        kept.pop(next(iter(kept)), None)
    kept[key] = found
    return found
