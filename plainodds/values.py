"""Immutable values that compare by content and go to JSON and back.

Questions, answers and everything they hold are frozen dataclasses made of
plain Python scalars, tuples and other such dataclasses. `value` registers a
class, so that `to_json` and `from_json` can carry any of them.
"""

from __future__ import annotations

import json
import math
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, fields, is_dataclass
from typing import Any, TypeAlias, TypeVar, dataclass_transform

import numpy as np

from plainodds.errors import QuestionRefused

__all__ = ["Pairs", "Scalar", "from_json", "pairs", "plain", "to_json", "value"]

Scalar: TypeAlias = bool | int | float | str
"""A value that a predictor can take."""

Pairs: TypeAlias = tuple[tuple[str, Any], ...]
"""A mapping as a hashable value: (name, value) pairs in the order given."""

_registered: dict[str, type] = {}
_C = TypeVar("_C")

_TAG = "value"
_NON_FINITE = {"nan": math.nan, "inf": math.inf, "-inf": -math.inf}


@dataclass_transform(frozen_default=True, kw_only_default=False)
def value(cls: type[_C]) -> type[_C]:
    """Make a class a frozen dataclass that `to_json` and `from_json` know."""
    if cls.__name__ in _registered:
        raise TypeError(f"two value classes are named {cls.__name__}")
    made = dataclass(frozen=True)(cls)
    _registered[made.__name__] = made
    return made


def plain(item: Any) -> Any:
    """Turn numpy and pandas scalars into the Python scalar they stand for.

    Raises
    ------
    QuestionRefused
        If the item is not a single number, text or truth value.
    """
    if isinstance(item, np.generic):
        item = item.item()
    if isinstance(item, bool | int | float | str):
        return item
    raise QuestionRefused(
        f"{item!r} ({type(item).__name__}) is not a single number, text or yes/no value."
    )


def pairs(mapping: Mapping[str, Any] | Iterable[tuple[str, Any]] | None) -> Pairs:
    """Hold a mapping as a tuple of (name, value) pairs; values that are sequences too."""
    if mapping is None:
        return ()
    items = mapping.items() if isinstance(mapping, Mapping) else mapping
    return tuple((str(name), _named(str(name), held)) for name, held in items)


def _named(name: str, item: Any) -> Any:
    try:
        return _held(item)
    except QuestionRefused as refusal:
        raise QuestionRefused(f"{name}: {refusal}") from refusal


def _held(item: Any) -> Any:
    if isinstance(item, list | tuple | np.ndarray):
        return tuple(_held(each) for each in item)
    if item is None or (is_dataclass(item) and not isinstance(item, type)):
        return item
    return plain(item)


def to_json(item: Any) -> str:
    """Write a value as JSON text.

    Parameters
    ----------
    item
        A question, an answer or any other registered value.

    Returns
    -------
    str
        Strict JSON: numbers that JSON lacks are written as tagged text.

    Examples
    --------
    >>> from plainodds.model.predictors import Outcome
    >>> from_json(to_json(Outcome(event="burst"))) == Outcome(event="burst")
    True
    """
    return json.dumps(_encoded(item), allow_nan=False, ensure_ascii=False)


def from_json(text: str) -> Any:
    """Read a value back from the text that `to_json` wrote.

    Parameters
    ----------
    text : str

    Returns
    -------
    object
        The value, equal to the one that was written.

    Raises
    ------
    ValueError
        If the text is not JSON or names a value class that does not exist.

    Examples
    --------
    >>> from_json('[1, "two", {"value": "float", "is": "inf"}]')
    (1, 'two', inf)
    """
    return _decoded(json.loads(text))


def _encoded(item: Any) -> Any:
    if is_dataclass(item) and not isinstance(item, type):
        content = {field.name: _encoded(getattr(item, field.name)) for field in fields(item)}
        return {_TAG: type(item).__name__, **content}
    if isinstance(item, tuple):
        return [_encoded(each) for each in item]
    if isinstance(item, float) and not math.isfinite(item):
        return {_TAG: "float", "is": str(item)}
    if item is None or isinstance(item, bool | int | float | str):
        return item
    raise TypeError(f"{type(item).__name__} has no place in a value: {item!r}")


def _decoded(item: Any) -> Any:
    if isinstance(item, list):
        return tuple(_decoded(each) for each in item)
    if isinstance(item, dict):
        content = dict(item)
        tag = content.pop(_TAG, None)
        if tag == "float":
            return _NON_FINITE[content["is"]]
        if tag not in _registered:
            raise ValueError(f"no value class is named {tag!r}")
        return _registered[tag](**{name: _decoded(each) for name, each in content.items()})
    return item
