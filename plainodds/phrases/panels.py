"""Several answers in one figure, in words and in Python."""

from __future__ import annotations

from plainodds.answers.panels import PanelsAnswer, panel_letter
from plainodds.phrases.alternative import alternative
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.code import code
from plainodds.phrases.methods.note import MethodsNote, methods_note
from plainodds.phrases.saying import Audience, Words, words

__all__: list[str] = []


@words.register_for_all
def _(answer: PanelsAnswer, audience: Audience = "plain") -> Words:
    told = [words(each, audience) for each in answer.answers]
    sentences = []
    for number, each in enumerate(told):
        first, *rest = each.sentences or ("",)
        sentences += [f"{panel_letter(number)}: {first}", *rest]
    cautions = dict.fromkeys(caution for each in told for caution in each.cautions)
    return Words(tuple(sentences), tuple(cautions))


@alternative.register
def _(answer: PanelsAnswer) -> str:
    told = [
        f"Panel {panel_letter(number)}: {alternative(each)}"
        for number, each in enumerate(answer.answers)
    ]
    return " ".join(told)


@caption.register_for_all
def _(answer: PanelsAnswer) -> str:
    captions = [caption(each) for each in answer.answers]
    shared = _shared_end(captions)
    told = [
        f"{panel_letter(number)}: {each.removesuffix(shared).rstrip()}"
        for number, each in enumerate(captions)
    ]
    return " ".join([*told, shared]).rstrip()


def _shared_end(captions: list[str]) -> str:
    """The whole sentences with which all captions end, to be told once."""
    first, *others = [each.split(". ") for each in captions]
    shared = 0
    while shared < min(map(len, (first, *others))) - 1 and all(
        each[-1 - shared] == first[-1 - shared] for each in others
    ):
        shared += 1
    return ". ".join(first[len(first) - shared :]) if shared else ""


@methods_note.register_for_all
def _(answer: PanelsAnswer) -> MethodsNote:
    notes = [methods_note(each) for each in answer.answers]
    return MethodsNote(
        tuple(dict.fromkeys(each for note in notes for each in note.sentences)),
        tuple(sorted({each for note in notes for each in note.references})),
    )


@code.register
def _(answer: PanelsAnswer) -> str:
    lines, names, before = ["import plainodds as po", ""], [], ""
    for number, each in enumerate(answer.answers):
        body = code(each).removeprefix("import plainodds as po\n\n")
        fit, _, asked = f"\n{body}".rpartition("\nanswer = ")
        names.append(f"answer_{panel_letter(number).lower()}")
        if fit != before:
            lines.append(fit.strip("\n"))
        before = fit
        lines.append(f"{names[-1]} = {asked.rstrip()}")
    question = answer.question
    given = [*names, f"columns={question.columns}", f"shared={question.shared}"]
    lines.append(f"answer = po.panels({', '.join(given)})")
    return "\n".join(lines) + "\n"
