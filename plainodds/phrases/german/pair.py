"""Two predictors together in German: chances first, then odds, then why the two disagree."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.choices.pair import chances_spoken_of, main_interaction
from plainodds.phrases.choices.stretches import turns_are_told
from plainodds.phrases.german.curve import beyond_data
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.pair_chances import (
    averaged_sentences,
    chances_sentences,
    interval_sentences,
    rounding_sentences,
)
from plainodds.phrases.german.pair_joint import (
    additive_sentences,
    joint_cautions,
    joint_technical,
)
from plainodds.phrases.german.pair_labels import followed, interaction, title
from plainodds.phrases.german.pair_scales import disagreement_sentences, odds_sentences
from plainodds.phrases.german.pair_stretches import (
    stretches_sentences,
    turns_sentences,
    unsupported_sentences,
)
from plainodds.phrases.german.pair_technical import (
    corners_technical,
    interaction_technical,
    pair_method,
    tested_technical,
)
from plainodds.phrases.german.parts import (
    EVERYTHING,
    ODDS_MEANING,
    association,
    beyond_saying,
    held_sentences,
    kept_sentence,
    model_cautions,
    odds_ratio_cautions,
)
from plainodds.phrases.labels import axis_title, listed, predictor_name
from plainodds.phrases.numbers import quantity
from plainodds.phrases.pair_labels import has_others, is_averaged
from plainodds.phrases.parts import is_beyond_saying, points_with_interval, ratio_with_interval
from plainodds.phrases.reach import line_words
from plainodds.phrases.saying import Audience, Words, for_audience
from plainodds.phrases.sentences import joined, sentence

__all__: list[str] = []


@GERMAN.words.register
def _(answer: PairAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: PairAnswer) -> Words:
    told = [
        *chances_sentences(answer),
        *averaged_sentences(answer),
        *odds_sentences(answer),
        *disagreement_sentences(answer),
        *stretches_sentences(answer),
        *(turns_sentences(answer) if turns_are_told(answer) else []),
        *additive_sentences(answer),
        *_others(answer),
        *interval_sentences(answer),
    ]
    return _words(answer, told, [ODDS_MEANING], rounding_sentences(answer))


def _words(answer: PairAnswer, told: list[str], before: list[str], after: list[str]) -> Words:
    held = answer.question.others != "observed"
    extreme = is_beyond_saying(answer.interaction.ratio)
    cautions = [
        *_beyond(answer),
        *joint_cautions(answer),
        *before,
        *_reading(answer),
        *_of_averages(answer),
        *_slopes(answer),
        association(answer.subject),
        *([beyond_saying("beim Verhältnis der Odds Ratios")] if extreme else []),
        *after,
    ]
    return Words(
        tuple(map(sentence, told)),
        (*map(sentence, cautions), *model_cautions(answer.subject, offset_held=held)),
    )


def _reading(answer: PairAnswer) -> tuple[str, ...]:
    """That an odds ratio is no ratio of chances, where these are common or not known."""
    if answer.lines is None:
        return (
            "Ein Chancenverhältnis (Odds Ratio) ist kein Verhältnis von Wahrscheinlichkeiten; "
            "beide liegen nur nah beieinander, wo die Wahrscheinlichkeiten unter etwa "
            f"{quantity(10, '%')} liegen",
        )
    return odds_ratio_cautions(chances_spoken_of(answer))


def _others(answer: PairAnswer, at_most: int = 8) -> list[str]:
    subject, question = answer.subject, answer.question
    if not has_others(answer):
        return []
    if question.others != "observed":
        return held_sentences(subject, answer.held, question.others, at_most=at_most)
    if answer.interaction.averaged is None:
        return held_sentences(subject, answer.held, "typical", at_most=at_most)
    rows = rows_chosen(subject, None, answer.counted)
    return [kept_sentence(subject, "die Wahrscheinlichkeiten", rows)]


def _beyond(answer: PairAnswer) -> list[str]:
    if answer.surface is not None:
        if all(all(row) for row in answer.surface.supported):
            return []
        return [
            "Wo die Karte schraffiert ist, haben die Daten keine Zeilen in der Nähe, und dort ist "
            "nichts gezeichnet"
        ]
    told = [] if answer.lines is None else beyond_data(answer.lines)
    return told or unsupported_sentences(answer)


def _of_averages(answer: PairAnswer) -> list[str]:
    if not is_averaged(answer):
        return []
    typical = "mit den übrigen Merkmalen auf ihren typischen Werten"
    if not has_others(answer):
        typical = "bei typischen Werten"
    if answer.question.scale == "probability":
        return [
            f"Odds Ratios gelten hier {typical}; sie vergleichen nicht die Odds von Mittelwerten"
        ]
    b = predictor_name(answer.subject.predictor(answer.question.b))
    return [
        f"Odds Ratios entlang {b} vergleichen die Odds von Mittelwerten; das Verhältnis der Odds "
        f"Ratios gilt {typical} und muss nicht ihres sein"
    ]


def _slopes(answer: PairAnswer) -> list[str]:
    if not answer.sloped:
        return []
    return [
        "Eine Zahl je Einheit ist die Rate an einer Stelle; über eine größere Änderung muss sich "
        "die Wahrscheinlichkeit nicht daran halten"
    ]


def _technical(answer: PairAnswer) -> Words:
    told = [
        *corners_technical(answer),
        *interaction_technical(answer),
        *tested_technical(answer),
        *(f"{followed(answer)}: {each}" for each in _stretches(answer)),
        *joint_technical(answer),
        *_others(answer, EVERYTHING),
        pair_method(answer),
    ]
    return _words(answer, told, [], [])


def _stretches(answer: PairAnswer) -> list[str]:
    return [*stretches_sentences(answer, at_most=EVERYTHING), *turns_sentences(answer)]


@GERMAN.alternative.register
def _(answer: PairAnswer) -> str:
    question = answer.question
    along = predictor_name(answer.subject.predictor(question.b))
    scale = "als Odds Ratios" if question.scale == "odds" else "in Prozentpunkten"
    return joined(
        title(answer),
        *_together(answer),
        f"{followed(answer)}, entlang {along}, {scale}",
        *_stretches(answer),
        *_shown(answer),
    )


def _together(answer: PairAnswer) -> list[str]:
    """What the part of the picture shows that has both predictors in it."""
    if answer.surface is not None:
        b, a = (
            axis_title(answer.subject.predictor(name))
            for name in (answer.question.b, answer.question.a)
        )
        return [
            f"Eine Karte von {a} gegen {b} mit beschrifteten Linien gleicher Höhe, schraffiert, wo "
            "keine Zeile in der Nähe liegt"
        ]
    if answer.lines is None:
        return []
    lines = listed([line_words(answer.lines, line) for line in answer.lines.lines])
    along = predictor_name(answer.subject.predictor(answer.lines.question.predictor))
    return [f"Linien entlang {along}, je eine für {lines}"]


def _shown(answer: PairAnswer) -> list[str]:
    """The interaction itself on the scale of the picture."""
    level = answer.question.level
    if answer.question.scale == "odds":
        ratio = ratio_with_interval(answer.interaction.ratio, level)
        if not answer.interaction.joined:
            ratio = "genau 1"
        return [f"{interaction(answer, 'odds')}: {ratio}"]
    apart = main_interaction(answer)
    if apart is None:
        return []
    return [f"{interaction(answer, 'probability')}: {points_with_interval(apart, level)}"]
