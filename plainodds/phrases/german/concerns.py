"""Levels with few cases or one outcome, and values never seen, in German."""

from __future__ import annotations

from collections.abc import Iterable

from plainodds.answers.odds import OddsAnswer
from plainodds.model.predictors import Subject
from plainodds.phrases.choices.concerns import Spoken, few_levels, odds_spoken_of, unseen_told
from plainodds.phrases.german.checks.parts import cases, counted, short_list
from plainodds.phrases.german.parts import cases as many_cases
from plainodds.phrases.german.unbounded import one_outcome_told
from plainodds.phrases.labels import listed, named_value
from plainodds.values import Scalar

__all__ = ["level_cautions", "sparse_cautions", "unseen_cautions"]


def sparse_cautions(answer: OddsAnswer) -> list[str]:
    """That odds ratios hang on few cases, by level; empty where none does."""
    return _hanging("Odds Ratios", answer.subject, odds_spoken_of(answer))


def level_cautions(subject: Subject, spoken_of: Iterable[Spoken]) -> list[str]:
    """That figures speak of levels with one outcome only, or with few cases of one."""
    held = [(name, level) for name, level in spoken_of if name is not None and level is not None]
    alone = {
        (name, level): told
        for name, level in held
        if (told := one_outcome_told(subject, name, level))
    }
    cautions = _hanging("Zahlen", subject, [each for each in held if each not in alone])
    if not alone:
        return cautions
    told = listed(list(dict.fromkeys(alone.values())))
    whom = many_cases(subject.outcome)
    return [
        f"{told}: was das Modell über solche {whom} sagt, ist mit Vorsicht zu nehmen, am meisten "
        "die Intervalle",
        *cautions,
    ]


def _hanging(figures: str, subject: Subject, held: list[tuple[str, Scalar]]) -> list[str]:
    """That figures hang on few cases of one outcome, with the levels that have so few."""
    found = [
        f"{named_value(subject.predictor(name), level)} "
        f"({counted(events, 'Ereignis', 'Ereignisse')} bei {cases(subject, of, 'Fällen')})"
        for (name, level), (events, of) in few_levels(subject, held).items()
    ]
    if not found:
        return []
    return [
        f"{figures}, die von {short_list(found)} sprechen, hängen an wenigen Fällen eines der "
        "beiden Ergebnisse"
    ]


def unseen_cautions(answer: OddsAnswer) -> list[str]:
    """That odds ratios speak of numbers beyond the data; empty where none does."""
    found = unseen_told(answer)
    if not found:
        return []
    return [
        f"Manche Odds Ratios gehen über die Daten hinaus: {short_list(found)}; dort spricht das "
        "Modell für sich allein"
    ]
