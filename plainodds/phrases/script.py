"""A script that makes a dossier again."""

from __future__ import annotations

import ast
import textwrap
from collections.abc import Iterable, Iterator, Mapping
from keyword import iskeyword

from plainodds.answers.excerpts import ExcerptAnswer
from plainodds.answers.panels import PanelsAnswer
from plainodds.answers.questions import Answer
from plainodds.answers.where import Mask
from plainodds.phrases.code import call, code, literal
from plainodds.phrases.languages import language_now
from plainodds.phrases.numbers import marks_now

__all__ = ["script"]

_INDENT = "    "
_HEAD = '''"""Makes this dossier again.

Hand over what it was made from: what fit() returned, and what else `make` asks for.
"""

import plainodds as po


def make({parameters}):
    """Ask every question again and write the dossier into a folder of another name."""
    answers = {{}}
'''


def script(answers: Mapping[str, Answer], options: Mapping[str, object]) -> str:
    """Write the Python that asks the questions of several answers again.

    Parameters
    ----------
    answers : mapping of name to Answer
    options : mapping of name to value
        Arguments of `plainodds.dossier` that are not its defaults.

    Returns
    -------
    str
        A module with one function, ``make(folder, …)``. Its parameters are what the answers'
        code starts from: ``result``, ``results``, ``data``, ``mask`` and functions of the
        analyst's own.
    """
    parts, fit = [], ""
    for name, answer in answers.items():
        *before, asked = _statements(code(answer).removeprefix("import plainodds as po\n\n"))
        for each in before:
            # the fit is taken in once where several answers share it
            if each != fit:
                parts.append(each)
            if each.startswith("fit = "):
                fit = each
        parts.append(f"answers[{literal(name)}] = {asked.removeprefix('answer = ')}")
    head = _HEAD.format(parameters=", ".join(["folder", *_needs(answers)]))
    return f"{head}{textwrap.indent(''.join(parts), _INDENT)}{_written(options)}"


def _statements(source: str) -> list[str]:
    """Source statement by statement, each with the comments above it."""
    lines, start, found = source.splitlines(keepends=True), 0, []
    for each in ast.parse(source).body:
        assert each.end_lineno is not None
        found.append("".join(lines[start : each.end_lineno]))
        start = each.end_lineno
    return found


def _written(options: Mapping[str, object]) -> str:
    """The dossier being written, in the language and with the marks of now."""
    language, marks = language_now(), marks_now()
    stated = {
        name: mark
        for name, mark in (("decimal", marks.decimal), ("thousands", marks.thousands))
        if mark != getattr(language.marks, name)
    }
    names = ("answers", "folder")
    if language.code == "en" and not stated:
        return f"{_INDENT}return {call('po.dossier', names, options, _INDENT)}\n"
    writing = call("po.writing", [literal(language.code)], stated, _INDENT)
    within = 2 * _INDENT
    asked = call("po.dossier", names, options, within)
    return f"{_INDENT}with {writing}:\n{within}return {asked}\n"


def _each(answers: Iterable[Answer]) -> Iterator[Answer]:
    """The answers that were asked, whatever figures were made of them."""
    for answer in answers:
        if isinstance(answer, PanelsAnswer):
            yield from _each(answer.answers)
        elif isinstance(answer, ExcerptAnswer):
            yield answer.whole
        else:
            yield answer


def _needs(answers: Mapping[str, Answer]) -> list[str]:
    """What the answers' code starts from, each once."""
    needs: dict[str, None] = {}
    for answer in _each(answers.values()):
        question, setting = answer.question, answer.subject.setting
        several = bool(getattr(question, "models", ()))
        needs["results" if several else "result"] = None
        if several:
            continue
        if setting.with_data:
            needs["data"] = None
        if isinstance(getattr(question, "where", None), Mask):
            needs["mask"] = None
        for name in setting.functions:
            usable = name.isidentifier() and not iskeyword(name)
            needs[name if usable else "functions"] = None
    return list(needs)
