"""The Python that asks an answer's question again."""

from __future__ import annotations

import math
from collections.abc import Iterable, Mapping
from dataclasses import MISSING, dataclass, fields, is_dataclass
from functools import singledispatch
from keyword import iskeyword
from typing import Any, get_args, get_type_hints

from plainodds.answers.change import ChangeQuestion
from plainodds.answers.moves import Move, Shift
from plainodds.answers.questions import Answer, Question
from plainodds.answers.where import Mask
from plainodds.model.predictors import Predictor, Setting
from plainodds.values import Pairs

__all__ = ["call", "code", "literal"]

_WIDTH = 88
_INDENT = "    "


@singledispatch
def code(answer: Answer) -> str:
    """Write the Python that gives an answer again.

    Parameters
    ----------
    answer : Answer

    Returns
    -------
    str
        Python source that uses the names of what it starts from: ``result`` (or
        ``results``, the mapping of fits, where several models stand side by side), ``data``
        where the data were handed over apart from the result, the functions of the
        analyst's own that were stated, and ``mask`` where rows were chosen by one. It ends
        with the answer in ``answer``.

    Examples
    --------
    >>> import numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> result = sm.Logit(y, sm.add_constant(x)).fit(disp=False)
    >>> print(code(po.FittedLogit(result).odds(level=0.9)))
    import plainodds as po
    <BLANKLINE>
    fit = po.FittedLogit(result)
    answer = fit.odds(level=0.9)
    <BLANKLINE>
    """
    question = answer.question
    models = getattr(question, "models", ())
    lines = ["import plainodds as po", ""]
    if models:
        results = _mapping((name, _Text(f"results[{_atom(name)}]")) for name in models)
        arguments = [results, *_arguments(question, leaving_out=("models",))]
        lines.append(_statement("answer", "po.odds_of", arguments))
    else:
        stated = [_Text("result"), *_stated(answer.subject.setting)]
        lines.append(_statement("fit", "po.FittedLogit", stated))
        arguments = _arguments(question)
        lines += _masks(question)
        lines.append(_statement("answer", f"fit.{question.method}", arguments))
    return "\n".join(lines) + "\n"


def literal(held: object) -> str:
    """A value as Python writes it, strings in double quotes where that needs no escape."""
    return _flat(_piece(held))


def call(function: str, names: Iterable[str], stated: Mapping[str, object], indent: str) -> str:
    """A call as Python writes it, one argument a line where it is long.

    Parameters
    ----------
    function : str
    names : iterable of str
        Names given by position.
    stated : mapping of argument to value
    indent : str
        How far the line is indented that the call stands on.
    """
    given = (
        *(_Text(name) for name in names),
        *(_named(f"{name}=", _piece(held)) for name, held in stated.items()),
    )
    return _rendered(_Group(f"{function}(", given, ")"), indent, len("return "))


@dataclass(frozen=True)
class _Text:
    """Source that is never broken."""

    text: str
    prefix: str = ""


@dataclass(frozen=True)
class _Group:
    """Source between brackets, which may be broken after each item."""

    opening: str
    items: tuple[_Text | _Group, ...]
    closing: str
    prefix: str = ""
    alone: str = ""


_Piece = _Text | _Group


def _statement(name: str, call: str, arguments: Iterable[_Piece]) -> str:
    return _rendered(_Group(f"{name} = {call}(", tuple(arguments), ")"), "", 0)


def _rendered(piece: _Piece, indent: str, after: int) -> str:
    """Source of a piece: on one line where it fits, else one item a line."""
    flat = _flat(piece)
    if isinstance(piece, _Text) or len(indent) + len(flat) + after <= _WIDTH or not piece.items:
        return flat
    inner = indent + _INDENT
    items = [f"{inner}{_rendered(item, inner, 1)},\n" for item in piece.items]
    return f"{piece.prefix}{piece.opening}\n{''.join(items)}{indent}{piece.closing}"


def _flat(piece: _Piece) -> str:
    if isinstance(piece, _Text):
        return f"{piece.prefix}{piece.text}"
    inside = ", ".join(map(_flat, piece.items))
    alone = piece.alone if len(piece.items) == 1 else ""
    return f"{piece.prefix}{piece.opening}{inside}{alone}{piece.closing}"


def _named(prefix: str, piece: _Piece) -> _Piece:
    if isinstance(piece, _Text):
        return _Text(piece.text, prefix)
    return _Group(piece.opening, piece.items, piece.closing, prefix, piece.alone)


def _arguments(question: Question, leaving_out: tuple[str, ...] = ()) -> list[_Piece]:
    """The question's fields as arguments of the method that asks it, defaults left out."""
    hints = get_type_hints(type(question))
    arguments = []
    for field in fields(question):  # type: ignore[arg-type]
        held = getattr(question, field.name)
        positional = field.name in question.positional
        if field.name in leaving_out or (field.default is not MISSING and held == field.default):
            continue
        if isinstance(question, ChangeQuestion) and field.name == "moves":
            arguments += _moves(question)
            continue
        may_be_pairs = hints[field.name] == Pairs or Pairs in get_args(hints[field.name])
        piece = _mapping(held) if may_be_pairs and isinstance(held, tuple) else _piece(held)
        arguments.append(piece if positional else _named(f"{field.name}=", piece))
    return arguments


def _moves(question: ChangeQuestion) -> list[_Piece]:
    """One predictor with from and to, or with its shift; several as a mapping."""
    if len(question.moves) > 1:
        return [_mapping(question.moves)]
    ((name, move),) = question.moves
    ends = [move] if isinstance(move, Shift) else [move.start, move.end]
    return [_piece(name), *map(_piece, ends)]


def _masks(question: Question) -> list[str]:
    """What the name ``mask`` stands for, since an answer holds no rows."""
    where = getattr(question, "where", None)
    if not isinstance(where, Mask):
        return []
    return [f"# mask: one True or False for each row used, {where.rows:,} of them True"]


def _stated(setting: Setting) -> list[_Piece]:
    """What the analyst stated when she took the fit in, as arguments."""
    stated: list[_Piece] = []
    if setting.with_data:
        stated.append(_Text("data", "data="))
    if setting.predictors:
        stated.append(_named("predictors=", _mapping(setting.predictors)))
    if setting.outcome is not None:
        stated.append(_named("outcome=", _piece(setting.outcome)))
    if setting.derived:
        stated.append(_named("derived=", _mapping(setting.derived)))
    if setting.functions:
        functions = ((name, _Text(_reference(name))) for name in setting.functions)
        stated.append(_named("functions=", _mapping(functions)))
    if setting.offset is not None:
        stated.append(_Text(_atom(setting.offset), "offset="))
    if setting.sampling is not None:
        stated.append(_Text(_atom(setting.sampling), "sampling="))
    if setting.prevalence is not None:
        stated.append(_Text(_atom(setting.prevalence), "prevalence="))
    if setting.causal:
        stated.append(_Text("True", "causal="))
        stated.append(_Text(_atom(setting.reason), "reason="))
    return stated


def _reference(name: str) -> str:
    usable = name.isidentifier() and not iskeyword(name)
    return name if usable else f"functions[{name!r}]"


def _mapping(items: Iterable[tuple[Any, Any]]) -> _Group:
    told = [_named(f"{_atom(key)}: ", _piece(held)) for key, held in items]
    return _Group("{", tuple(told), "}")


def _piece(held: Any) -> _Piece:
    if isinstance(held, _Text):
        return held
    if isinstance(held, Mask):
        return _Text("mask")
    if isinstance(held, Move):
        held = (held.start, held.end)
    if isinstance(held, tuple):
        return _Group("(", tuple(map(_piece, held)), ")", alone=",")
    if is_dataclass(held) and not isinstance(held, type):
        return _Group(f"po.{type(held).__name__}(", tuple(_value_arguments(held)), ")")
    return _Text(_atom(held))


def _value_arguments(held: Any) -> Iterable[_Piece]:
    for field in fields(held):
        content = getattr(held, field.name)
        if content == field.default:
            continue
        levels = isinstance(held, Predictor) and field.name == "level_labels"
        yield _named(f"{field.name}=", _mapping(content) if levels else _piece(content))


def _atom(held: Any) -> str:
    if isinstance(held, float) and not math.isfinite(held):
        return f'float("{held}")'
    text = repr(held)
    if isinstance(held, str) and text.startswith("'") and '"' not in held:
        # the quotes that formatters choose; repr keeps every escape that it needs
        text = f'"{text[1:-1]}"'
    return text
