"""Two predictors together in words: chances first, then odds, then why the two disagree."""

from __future__ import annotations

from plainodds.answers.joined import JoinedTest
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.alternative import alternative
from plainodds.phrases.averaged import drawn_method, rows_chosen
from plainodds.phrases.held import held_words, kept_words
from plainodds.phrases.labels import axis_title, listed, predictor_name, sentence_case
from plainodds.phrases.numbers import confidence, p_value, percentage_points, signed
from plainodds.phrases.pair_chances import (
    averaged_words,
    chances_words,
    intervals_words,
    main_interaction,
    rounding_words,
)
from plainodds.phrases.pair_corners import corners
from plainodds.phrases.pair_joint import additive_words, joint_cautions, joint_technical
from plainodds.phrases.pair_labels import (
    at_value,
    followed_label,
    has_others,
    interaction_label,
    is_averaged,
    pair_noun,
    pair_title,
    per_additional,
)
from plainodds.phrases.pair_scales import disagreement_words, odds_words
from plainodds.phrases.parts import (
    association,
    beyond_saying,
    chance_with_interval,
    covariance_words,
    is_beyond_saying,
    model_cautions,
    odds_ratio_cautions,
    points_with_interval,
    ratio_with_interval,
    rows_words,
    sentence,
    signed_with_interval,
    standard_error,
)
from plainodds.phrases.reach import beyond_words, line_words
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.stretches import stretches_words, turns_words, unsupported_words
from plainodds.phrases.units import tidy

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
        *_turns(answer),
        *additive_words(answer),
        *_others(answer),
        *intervals_words(answer),
    ]
    return _words(answer, told, rounding_words(answer))


def _turns(answer: PairAnswer) -> list[str]:
    """Where the effect turns; without any clear stretch a turn is too uncertain to be told."""
    stretches = answer.effect.stretches
    if stretches and all(each.sign == "open" for each in stretches):
        return []
    return turns_words(answer)


def _words(answer: PairAnswer, told: list[str], more: list[str]) -> Words:
    held = answer.question.others != "observed"
    cautions = [
        *_beyond(answer),
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
    return odds_ratio_cautions(_chances(answer))


def _chances(answer: PairAnswer) -> list[float]:
    """The chances that the answer speaks of."""
    four = corners(answer)
    if four is not None:
        return [each.estimate for each in four.all]
    if answer.lines is None or answer.lines.question.scale != "probability":
        return []
    return [each for line in answer.lines.lines for each in line.estimate]


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
        *_corners_told(answer),
        *_interaction_told(answer),
        *_ratio_told(answer),
        *_test_told(answer),
        *(f"{followed_label(answer)}: {each}" for each in _stretches(answer)),
        *joint_technical(answer),
        *_others(answer, _EVERYTHING),
        _method(answer),
    ]
    return _words(answer, told, [])


def _stretches(answer: PairAnswer) -> list[str]:
    return [*stretches_words(answer, at_most=_EVERYTHING), *turns_words(answer)]


def _corners_told(answer: PairAnswer) -> list[str]:
    four, question = corners(answer), answer.question
    if four is None:
        return []
    places = [(a, b) for b in answer.b_change for a in answer.a_change]
    told = [
        f"{chance_with_interval(each, question.level)}{_points_error(each.se)} with "
        f"{at_value(answer.subject, question.a, a)} and {at_value(answer.subject, question.b, b)}"
        for (a, b), each in zip(places, four.all, strict=True)
    ]
    noun = sentence_case(pair_noun(answer))
    return [f"{noun} of {tidy(answer.subject.outcome.event)}: {'; '.join(told)}"]


def _points_error(se: float | None) -> str:
    return "" if se is None else f", standard error {percentage_points(se)}"


def _interaction_told(answer: PairAnswer) -> list[str]:
    kind = {0: "Cross difference of the chance", 1: "Difference of slopes dπ/dx"}.get(
        len(answer.sloped), "Cross partial ∂²π/∂a∂b"
    )
    units = [per_additional(answer.subject.predictor(name)) for name in answer.sloped]
    if units:
        kind += f", {listed(units)},"
    found, level = answer.interaction, answer.question.level
    told = []
    for where, estimate, p in (
        ("at the held profile", found.at_profile, found.at_profile_p_value),
        ("averaged over the rows", found.averaged, found.averaged_p_value),
    ):
        if estimate is None:
            continue
        text = f"{kind} {where} {points_with_interval(estimate, level)}{_points_error(estimate.se)}"
        told.append(text if p is None else f"{text}, p-value {p_value(p)} (Wald test of 0)")
    return told


def _ratio_told(answer: PairAnswer) -> list[str]:
    found, level = answer.interaction, answer.question.level
    if not found.joined:
        return ["Ratio of odds ratios exactly 1, since no term joins the two predictors"]
    return [
        f"Ratio of odds ratios {ratio_with_interval(found.ratio, level)}"
        f"{standard_error(found.ratio)}; its logarithm "
        f"{signed_with_interval(found.log_ratio, level)}{standard_error(found.log_ratio)}"
    ]


def _test_told(answer: PairAnswer) -> list[str]:
    test, question = answer.interaction.test, answer.question
    if test is None:
        return []
    names = [predictor_name(answer.subject.predictor(each)) for each in (question.a, question.b)]
    kind = {"wald": "Wald test", "likelihood_ratio": "Likelihood-ratio test"}[test.kind]
    return [f"{kind} that no term joins {listed(names)}: {_statistic(test)}"]


def _statistic(test: JoinedTest) -> str:
    written = signed(test.statistic).removeprefix("+")
    freedom = f"{test.degrees_of_freedom:,}"
    one = test.degrees_of_freedom == 1
    if test.denominator is None:
        on = f"χ² = {written} on {freedom} degree{'' if one else 's'} of freedom"
    else:
        below = signed(test.denominator, decimals=0).removeprefix("+")
        on = f"F = {written} on {freedom} and {below} degrees of freedom"
    return f"{on}, p-value {p_value(test.p_value)}"


def _method(answer: PairAnswer) -> str:
    method = f"From {rows_words(answer.subject)}"
    if answer.interaction.ratio.lower is None and answer.effect.lower is None:
        return method
    level = confidence(answer.question.level)
    averaged = answer.interaction.averaged is not None
    rows = f"; rows weighted as fitted{drawn_method('fixed')}" if averaged else ""
    return (
        f"{method}; {level} intervals of differences and slopes by the delta method with exact "
        "gradients (cross difference and cross partial after Ai and Norton), of ratios on the log "
        f"scale, of chances on the logit scale, with {covariance_words(answer.subject)}{rows}"
    )


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
