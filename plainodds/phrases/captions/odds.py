"""Captions of odds ratios."""

from __future__ import annotations

from plainodds.answers.odds import OddsAnswer
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.captions.parts import fitted_words, interval_words
from plainodds.phrases.labels import listed
from plainodds.phrases.odds_lines import odds_lines
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy

__all__: list[str] = []


@caption.register
def _(answer: OddsAnswer) -> str:
    question, subject = answer.question, answer.subject
    models = ""
    if question.models:
        names = listed([f"“{tidy(name)}”" for name in question.models])
        models = f"Models side by side: {names}, told apart by their markers"
    likelihood = question.interval == "likelihood"
    kind = "by profile likelihood" if likelihood else "(Wald)"
    intervals = interval_words(subject, question.level, "Points are estimates, lines their")
    return joined(
        f"Odds ratios of {tidy(subject.outcome.event)}, each for the change that stands beside it",
        intervals if subject.no_interval else f"{intervals} {kind}",
        "The scale is logarithmic; at 1 the odds are the same before and after the change",
        *_printed(answer),
        _given(answer),
        models,
        fitted_words(subject),
    )


def _printed(answer: OddsAnswer) -> tuple[str, ...]:
    """What stands in the printed table and in no other layout."""
    if answer.question.layout != "table":
        return ()
    counts = [line.counts for line in odds_lines(answer) if line.counts is not None]
    events = "events and " if any(each.events is not None for each in counts) else ""
    cases = tidy(answer.subject.outcome.cases)
    return (
        f"Counted beside each level: {events}{cases}" if counts else "",
        "Tests of interaction are of all terms that the two predictors share"
        if answer.interactions
        else "",
    )


def _given(answer: OddsAnswer) -> str:
    if not any(row.given for row in answer.rows):
        return ""
    return "Where an odds ratio depends on another predictor, it is stated at the values named"
