"""Captions of two predictors together."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words, interval_words, rest_words
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.pair_labels import followed_label, has_others, left_out, pair_title
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy

__all__: list[str] = []


@caption.register
def _(answer: PairAnswer) -> str:
    question, subject = answer.question, answer.subject
    a, b = (predictor_name(subject.predictor(name)) for name in (question.a, question.b))
    known = answer.lines is not None or answer.surface is not None
    rest = ""
    if has_others(answer):
        rest = rest_words(subject, question.others, answer.held, "chances", answer.counted)
    measure = "odds ratio" if question.scale == "odds" else "change of the chance"
    return joined(
        pair_title(answer),
        f"First {_both(answer)}; then, along {b}, the {measure} that goes with "
        f"{followed_label(answer)[:1].lower()}{followed_label(answer)[1:]}"
        if known
        else f"The odds ratio of {a} along {b}",
        "Last, the interaction itself: on the probability scale as a difference of differences, "
        "on the odds scale as the ratio of odds ratios"
        if known
        else "Beneath, the ratio of odds ratios",
        interval_words(subject, question.level, "Lines and points are estimates, bands and bars"),
        rest,
        " ".join(left_out(answer)),
        _where_nobody_is(answer),
        fitted_words(subject),
    )


def _both(answer: PairAnswer) -> str:
    if answer.surface is not None:
        return "a map of both, with lines of equal chance"
    return "both together"


def _where_nobody_is(answer: PairAnswer) -> str:
    cases = tidy(answer.subject.outcome.cases)
    if answer.surface is not None:
        return f"Where the map is hatched the data have no {cases} near by"
    lines = () if answer.lines is None else answer.lines.lines
    if all(all(line.supported) for line in lines) and all(answer.effect.supported):
        return ""
    return f"Where a line is broken, or a point hollow, the data have few {cases} or none"
