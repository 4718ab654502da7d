"""A script that makes a dossier again."""

from __future__ import annotations

import textwrap
from collections.abc import Iterable, Iterator, Mapping
from keyword import iskeyword

from plainodds.answers.excerpts import ExcerptAnswer
from plainodds.answers.panels import PanelsAnswer
from plainodds.answers.questions import Answer
from plainodds.answers.where import Mask
from plainodds.phrases.code import code

__all__ = ["script"]

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
    parts, before = [], ""
    for name, answer in answers.items():
        body = code(answer).removeprefix("import plainodds as po\n\n")
        fit, _, asked = f"\n{body}".rpartition("\nanswer = ")
        fit = fit.strip("\n") + "\n" if fit.strip("\n") else ""
        # the fit is taken in once where several answers share it
        told = f"{'' if fit == before else fit}answers[{name!r}] = {asked}"
        before = fit
        parts.append(textwrap.indent(told, "    "))
    head = _HEAD.format(parameters=", ".join(["folder", *_needs(answers)]))
    given = "".join(f", {name}={held!r}" for name, held in options.items())
    return f"{head}{''.join(parts)}    return po.dossier(answers, folder{given})\n"


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
