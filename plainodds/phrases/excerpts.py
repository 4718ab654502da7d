"""One part of an answer's picture, in words and in Python."""

from __future__ import annotations

from plainodds.answers.excerpts import ExcerptAnswer
from plainodds.phrases.alternative import alternative
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words, interval_words
from plainodds.phrases.code import code
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.saying import Audience, Words, words
from plainodds.phrases.sentences import joined

__all__: list[str] = []

_WIDTH = 88
_SHOWN = {
    "ruler": "The linear predictor, the odds and the chance stand on three scales set against "
    "each other, so that each can be read from the others",
    "ledger": "Each line says what a predictor adds to the linear predictor, by what that "
    "multiplies the odds, and the chance reached so far",
    "marks": "Each mark is one case; those that differ after the change are set apart by their "
    "shape",
}


@words.register_for_all
def _(answer: ExcerptAnswer, audience: Audience = "plain") -> Words:
    return words(answer.whole, audience)


@alternative.register_for_all
def _(answer: ExcerptAnswer) -> str:
    return alternative(answer.whole)


@caption.register
def _(answer: ExcerptAnswer) -> str:
    title = caption(answer.whole).split(". ", 1)[0]
    subject, part = answer.subject, answer.question.part
    marked = {"ruler": "Pointers are estimates, bands"}.get(part)
    level = answer.whole.question.level  # type: ignore[attr-defined]
    return joined(
        title,
        _SHOWN[part],
        interval_words(subject, level, marked) if marked else "",
        fitted_words(subject),
    )


@methods_note.register_for_all
def _(answer: ExcerptAnswer) -> MethodsNote:
    return methods_note(answer.whole)


@report_of.register
def _(answer: ExcerptAnswer) -> ReportTable:
    return report_of(answer.whole)


@code.register
def _(answer: ExcerptAnswer) -> str:
    before, _, asked = f"\n{code(answer.whole)}".rpartition("\nanswer = ")
    part = f'"{answer.question.part}"'
    lines = [before.removeprefix("\n"), f"answer = po.excerpt({asked.rstrip()}, {part})"]
    if "\n" in asked.rstrip() or len(lines[1]) > _WIDTH:
        lines[1:] = [f"whole = {asked.rstrip()}", f"answer = po.excerpt(whole, {part})"]
    return "\n".join(lines) + "\n"
