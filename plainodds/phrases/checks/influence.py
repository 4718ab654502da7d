"""Rows that carry the result, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.influence import InfluenceEvidence, InfluentialPattern, Moved
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, cases, counted, quoted, short_list
from plainodds.phrases.choices.checks import example_of, ratio_without
from plainodds.phrases.labels import (
    from_to,
    given_clause,
    predictor_name,
    sentence_case,
    value_label,
)
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import chance, ratio

__all__ = ["moved_by_few", "moved_words", "pattern_words"]

_LABELS_AT_MOST = 3


@evidence_words.register
def _(
    evidence: InfluenceEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    example = example_of(evidence, finding, subject)
    told = "" if example is None else _without(*example, subject)
    patterns = counted(evidence.patterns, "kind of row", "different rows")
    if finding.concern == "nothing found":
        what = (
            f"of {patterns}, no single one of few cases moves an odds ratio by more than its "
            "standard error"
        )
        if told:
            what += f"; for example, {told}"
        return made(finding, subject, what, "Nothing needs doing about this")
    turns = "turns an odds ratio" in finding.reasons
    what = (
        f"among {patterns}, a single one "
        f"{'turns an odds ratio to the other side of 1' if turns else 'moves an odds ratio far'}"
    )
    if told:
        what += f": {told}"
    step = "See whether these rows are right; if they are, keep them and tell both figures"
    if turns:
        step = (
            "See whether these rows are right and belong to those the model is meant for; until "
            "then do not say which way that odds ratio points"
        )
    return made(finding, subject, what, step)


def moved_by_few(evidence: InfluenceEvidence, finding: Finding, subject: Subject) -> str:
    """What an odds ratio is without some rows, whose labels are not told; empty where unknown."""
    example = example_of(evidence, finding, subject)
    if example is None:
        return ""
    pattern, moved = example
    return f"without {cases(subject, pattern.cases)}, {moved_words(moved, subject)}"


def _without(pattern: InfluentialPattern, moved: Moved, subject: Subject) -> str:
    return f"without {pattern_words(pattern, subject)}, {moved_words(moved, subject)}"


def pattern_words(pattern: InfluentialPattern, subject: Subject) -> str:
    """Which rows a pattern stands for: "row 12 (1 pipe, with the event)"."""
    who = cases(subject, pattern.cases)
    share = pattern.events / pattern.cases if pattern.cases else math.nan
    if share >= 1 - 1e-9:
        told = message("{cases}, with the event", cases=who)
    elif share <= 1e-9:
        told = message("{cases}, without the event", cases=who)
    else:
        number = amount(pattern.events)
        told = message("{cases}, {number} with the event", cases=who, number=number)
    if not pattern.labels:
        return message("one kind of row ({})", told)
    labels = short_list([quoted(label) for label in pattern.labels], _LABELS_AT_MOST)
    if len(pattern.labels) == 1:
        return message("row {} ({})", labels, told)
    return message("rows {} ({})", labels, told)


def moved_words(moved: Moved, subject: Subject) -> str:
    """As in "the odds ratio for pipe age from 20 to 30 years is 0.80 rather than 1.40"."""
    facts = subject.predictor(moved.predictor)
    if facts.is_number:
        change = f"{predictor_name(facts)} {from_to(facts, moved.start, moved.end)}"
    else:
        end, start = value_label(facts, moved.end), value_label(facts, moved.start)
        change = f"{predictor_name(facts)} {lexicon().against.format(end, start)}"
    given = f", {given_clause(subject, moved.given)}," if moved.given else ""
    before, after = ratio(moved.odds_ratio), ratio(ratio_without(moved))
    sizes = message("{} either way", after)
    if before != after:
        sizes = message("{} rather than {}", after, before)
    if math.isnan(moved.refitted):
        sizes = message("about {}", sizes)
    return message("the odds ratio for {change} is {sizes}", change=f"{change}{given}", sizes=sizes)


@evidence_figures.register
def _(
    evidence: InfluenceEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    found: list[Figure] = [(message("Different rows"), amount(evidence.patterns))]
    for pattern in evidence.standing_out:
        measures = message(
            "chance {}, leverage {}, ΔX² {}, ΔD {}, Δβ {}",
            chance(pattern.probability), ratio(pattern.leverage), ratio(pattern.delta_chi2),
            ratio(pattern.delta_deviance), ratio(pattern.delta_beta),
        )  # fmt: skip
        moves = [moved_words(moved, subject) for moved in pattern.moved]
        label = sentence_case(pattern_words(pattern, subject))
        found.append((label, "; ".join([measures, *moves])))
    return found
