"""Two predictors together in words: chances first, then odds, then why the two disagree."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.phrases.alternative import alternative
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.choices.pair import chances_spoken_of, main_interaction
from plainodds.phrases.choices.stretches import turns_are_told
from plainodds.phrases.held import held_words, kept_words
from plainodds.phrases.labels import axis_title, listed, predictor_name
from plainodds.phrases.pair_chances import (
    averaged_words,
    chances_words,
    intervals_words,
    rounding_words,
)
from plainodds.phrases.pair_joint import additive_words, joint_cautions, joint_technical
from plainodds.phrases.pair_labels import (
    followed_label,
    has_others,
    interaction_label,
    is_averaged,
    left_out,
    pair_title,
)
from plainodds.phrases.pair_scales import disagreement_words, odds_words
from plainodds.phrases.pair_technical import (
    corners_technical,
    interaction_technical,
    pair_method,
    ratio_technical,
    test_technical,
)
from plainodds.phrases.parts import (
    association,
    beyond_saying,
    is_beyond_saying,
    model_cautions,
    odds_ratio_cautions,
    points_with_interval,
    ratio_with_interval,
)
from plainodds.phrases.reach import beyond_words, line_words
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.sentences import sentence
from plainodds.phrases.stretches import stretches_words, turns_words, unsupported_words

__all__: list[str] = []

_EVERYTHING = 1_000_000


@words.register
def _(answer: PairAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: PairAnswer) -> Words:
    told = [
        *chances_words(answer),
        *averaged_words(answer),
        *odds_words(answer),
        *disagreement_words(answer),
        *stretches_words(answer),
        *(turns_words(answer) if turns_are_told(answer) else []),
        *additive_words(answer),
        *_others(answer),
        *intervals_words(answer),
    ]
    return _words(answer, told, rounding_words(answer))


def _words(answer: PairAnswer, told: list[str], more: list[str]) -> Words:
    held = answer.question.others != "observed"
    cautions = [
        *_beyond(answer),
        *left_out(answer),
        *joint_cautions(answer),
        *_reading(answer),
        *_of_averages(answer),
        *_slopes(answer),
        association(answer.subject),
        *_extremes(answer),
        *more,
    ]
    return Words(
        tuple(map(sentence, told)),
        (*map(sentence, cautions), *model_cautions(answer.subject, offset_held=held)),
    )


def _reading(answer: PairAnswer) -> tuple[str, ...]:
    """That an odds ratio is no ratio of chances, where these are common or not known."""
    if answer.lines is None:
        return (
            "An odds ratio is not a ratio of chances; the two are close only where the chances are "
            "under about 10%",
        )
    return odds_ratio_cautions(chances_spoken_of(answer))


def _others(answer: PairAnswer, at_most: int = 8) -> list[str]:
    subject, question = answer.subject, answer.question
    if not has_others(answer):
        return []
    if question.others != "observed":
        return held_words(subject, answer.held, question.others, at_most=at_most)
    if answer.interaction.averaged is None:
        return held_words(subject, answer.held, "typical", at_most=at_most)
    return [kept_words(subject, "chances", rows_chosen(subject, None, answer.counted))]


def _beyond(answer: PairAnswer) -> list[str]:
    if answer.surface is not None:
        if all(all(row) for row in answer.surface.supported):
            return []
        return ["Where the map is hatched the data have no rows near by, and nothing is drawn"]
    if answer.lines is not None:
        told = beyond_words(answer.lines)
        if told:
            return told
    return unsupported_words(answer)


def _of_averages(answer: PairAnswer) -> list[str]:
    if not is_averaged(answer):
        return []
    typical = "with the other predictors at their typical values"
    if not has_others(answer):
        typical = "at typical values"
    if answer.question.scale == "probability":
        return [f"Odds ratios here hold {typical}; they are not ratios of the odds of averages"]
    b = predictor_name(answer.subject.predictor(answer.question.b))
    return [
        f"Odds ratios along {b} compare the odds of averages; the ratio of odds ratios holds "
        f"{typical} and need not be theirs"
    ]


def _slopes(answer: PairAnswer) -> list[str]:
    if not answer.sloped:
        return []
    return [
        "A figure per unit is the rate at one place; over a larger change the chance need not keep "
        "to it"
    ]


def _extremes(answer: PairAnswer) -> list[str]:
    if not is_beyond_saying(answer.interaction.ratio):
        return []
    return [beyond_saying("the ratio of odds ratios")]


def _technical(answer: PairAnswer) -> Words:
    told = [
        *corners_technical(answer),
        *interaction_technical(answer),
        *ratio_technical(answer),
        *test_technical(answer),
        *(f"{followed_label(answer)}: {each}" for each in _stretches(answer)),
        *joint_technical(answer),
        *_others(answer, _EVERYTHING),
        pair_method(answer),
    ]
    return _words(answer, told, [])


def _stretches(answer: PairAnswer) -> list[str]:
    return [*stretches_words(answer, at_most=_EVERYTHING), *turns_words(answer)]


@alternative.register
def _(answer: PairAnswer) -> str:
    subject, question = answer.subject, answer.question
    facts = subject.predictor(question.b)
    told = [pair_title(answer)]
    told += _together(answer)
    scale = "odds ratios" if question.scale == "odds" else "percentage points"
    told.append(f"{followed_label(answer)}, along {predictor_name(facts)}, in {scale}")
    told += _stretches(answer)
    told += _shown(answer)
    return " ".join(sentence(each) for each in told)


def _together(answer: PairAnswer) -> list[str]:
    """What the part of the picture shows that has both predictors in it."""
    if answer.surface is not None:
        b, a = (
            axis_title(answer.subject.predictor(name))
            for name in (answer.question.b, answer.question.a)
        )
        return [f"A map of {a} against {b} with labelled contours, hatched where no row lies near"]
    if answer.lines is None:
        return []
    question = answer.lines.question
    lines = listed([line_words(answer.lines, line) for line in answer.lines.lines])
    along = predictor_name(answer.subject.predictor(question.predictor))
    return [f"Lines along {along}, one for {lines}"]


def _shown(answer: PairAnswer) -> list[str]:
    """The interaction itself on the scale of the picture."""
    level = answer.question.level
    if answer.question.scale == "odds":
        ratio = ratio_with_interval(answer.interaction.ratio, level)
        if not answer.interaction.joined:
            ratio = "exactly 1"
        return [f"{interaction_label(answer, 'odds')}: {ratio}"]
    apart = main_interaction(answer)
    if apart is None:
        return []
    return [f"{interaction_label(answer, 'probability')}: {points_with_interval(apart, level)}"]
