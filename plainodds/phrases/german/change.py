"""Changes in German: both chances, what lies between them, and for whom."""

from __future__ import annotations

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.estimate import Estimate
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.choices.change import (
    both_intervals,
    change_averaged,
    has_others,
    is_open,
    marks_told,
    misses_one,
)
from plainodds.phrases.german.concerns import level_cautions
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.needed import needed_sentences, needed_technical
from plainodds.phrases.german.parts import (
    EVERYTHING,
    ODDS_MEANING,
    ROUNDED_APART,
    among,
    association,
    beyond_saying,
    chance,
    covariance,
    drawn_method,
    drawn_sentences,
    held_sentences,
    held_whom,
    kept_sentence,
    level_intervals,
    model_cautions,
    odds_ratio_cautions,
)
from plainodds.phrases.labels import listed
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.moves import (
    end_label,
    ends_beyond,
    levels_moved,
    moves_label,
    moves_words,
    settled_moves,
    start_label,
)
from plainodds.phrases.numbers import (
    denominator_of_change,
    percentage_points,
)
from plainodds.phrases.parts import (
    cases_with_interval,
    chance_with_interval,
    difference_with_interval,
    is_beyond_saying,
    points_with_interval,
    rather,
    ratio_with_interval,
    rows_words,
    say_level_once,
    standard_error,
)
from plainodds.phrases.saying import Audience, Words, for_audience
from plainodds.phrases.sentences import joined, sentence

__all__: list[str] = []


@GERMAN.words.register
def _(answer: ChangeAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: ChangeAnswer) -> Words:
    level, difference = answer.question.level, answer.comparison.risk_difference
    over = denominator_of_change(answer.start.estimate, answer.end.estimate)
    told = [
        _chances(answer, over),
        *_intervals(answer),
        _difference(answer, over),
        _framed(answer, over),
        _ratios(answer),
        *needed_sentences(answer.subject, answer.number_needed, level),
        *_others(answer),
        *drawn_sentences(answer.subject, answer.question.sample, difference),
    ]
    return _words(answer, told, [ODDS_MEANING], _rounding(answer, over))


def _words(answer: ChangeAnswer, told: list[str], before: list[str], after: list[str]) -> Words:
    odds_ratio = answer.comparison.odds_ratio
    cautions = [
        *_beyond(answer),
        *level_cautions(answer.subject, levels_moved(answer)),
        *before,
        *odds_ratio_cautions((answer.start.estimate, answer.end.estimate)),
        *_of_averages(answer),
        association(answer.subject),
        *after,
        *([beyond_saying("bei dieser Änderung")] if is_beyond_saying(odds_ratio) else []),
    ]
    held = answer.question.others != "observed"
    return Words(
        tuple(map(sentence, told)),
        (*map(sentence, cautions), *model_cautions(answer.subject, offset_held=held)),
    )


def _beyond(answer: ChangeAnswer) -> list[str]:
    outside = ends_beyond(answer)
    if not outside:
        return []
    return [
        f"Diese Änderung geht über die Daten hinaus: {listed(outside)}; dort spricht das Modell "
        "für sich allein"
    ]


def _chances(answer: ChangeAnswer, over: int) -> str:
    subject, question = answer.subject, answer.question
    moves = moves_words(subject, settled_moves(answer))
    told = rather(answer.end.estimate, answer.start.estimate, over)
    noun = chance(subject.outcome, averaged=change_averaged(answer))
    if change_averaged(answer):
        rest_kept = ", alles andere wie es ist," if has_others(answer) else ""
        whose = among(subject, question.where, answer.counted)
        return f"mit {moves}{rest_kept} beträgt {noun} bei {whose} {told}"
    if answer.held:
        who = held_whom(subject, answer.held, question.others)
        return f"für {who} beträgt mit {moves} {noun} {told}"
    return f"mit {moves} beträgt {noun} {told}"


def _intervals(answer: ChangeAnswer) -> list[str]:
    """The intervals of both chances, in the order in which the chances are told."""
    ends = both_intervals(answer)
    if not ends:
        return []
    return [f"Die {level_intervals(answer.question.level)} der beiden sind {ends[0]} und {ends[1]}"]


def _difference(answer: ChangeAnswer, over: int) -> str:
    level, difference = answer.question.level, answer.comparison.risk_difference
    counted, points = say_level_once(
        [cases_with_interval(difference, over, level), difference_with_interval(difference, level)],
        level,
    )
    told = f"Das sind {counted}, anders gesagt {points}"
    return f"{told}; offen bleibt, ob es mehr oder weniger sind" if is_open(answer) else told


def _framed(answer: ChangeAnswer, over: int) -> str:
    """The same chances from their other side, since either side alone can mislead."""
    here, there = answer.end.estimate, answer.start.estimate
    told = rather(1 - here, 1 - there, over)
    return f"Die Wahrscheinlichkeit, dass dies nicht eintritt, beträgt {told}"


def _ratios(answer: ChangeAnswer) -> str:
    level, compared = answer.question.level, answer.comparison
    kind = "mittlere " if change_averaged(answer) else ""
    return (
        f"Als Verhältnisse gesagt wird die {kind}Wahrscheinlichkeit mit "
        f"{ratio_with_interval(compared.risk_ratio, level)} multipliziert und die Chance (Odds) "
        f"mit {ratio_with_interval(compared.odds_ratio, level)}"
    )


def _others(answer: ChangeAnswer, at_most: int = 8) -> list[str]:
    question, subject = answer.question, answer.subject
    if question.others != "observed":
        return held_sentences(subject, answer.held, question.others, at_most=at_most)
    if not change_averaged(answer):
        return []
    rows = rows_chosen(subject, question.where, answer.counted)
    if not has_others(answer):
        return [f"Die Wahrscheinlichkeiten sind gemittelt über {rows}"]
    return [kept_sentence(subject, "die Wahrscheinlichkeiten", rows)]


def _of_averages(answer: ChangeAnswer) -> list[str]:
    if not change_averaged(answer):
        return []
    return [
        "Das Chancenverhältnis (Odds Ratio) vergleicht hier die Odds zweier Mittelwerte; das an "
        "gegebenen Werten der übrigen Merkmale ist eine andere Zahl, meist weiter von 1 entfernt"
    ]


def _rounding(answer: ChangeAnswer, over: int) -> list[str]:
    return [ROUNDED_APART] if misses_one(answer, over) else []


def _technical(answer: ChangeAnswer) -> Words:
    subject, question, level = answer.subject, answer.question, answer.question.level
    compared, moves = answer.comparison, settled_moves(answer)
    averaged = change_averaged(answer)
    noun = chance(subject.outcome, averaged=averaged).removeprefix("die ")
    kind = "marginales Odds Ratio (der Mittelwerte)" if averaged else "Odds Ratio"
    told = [
        f"{moves_label(subject, moves)}: {noun} am Anfang {_with_error(answer.start, level)}; am "
        f"Ende {_with_error(answer.end, level)}",
        f"Risikodifferenz {points_with_interval(compared.risk_difference, level)}"
        f"{_points_error(compared.risk_difference)}; das sind "
        f"{cases_with_interval(compared.risk_difference, 100, level)} und "
        f"{cases_with_interval(compared.risk_difference, 1_000, level)}",
        f"Relatives Risiko {ratio_with_interval(compared.risk_ratio, level)}"
        f"{standard_error(compared.risk_ratio)}; {kind} "
        f"{ratio_with_interval(compared.odds_ratio, level)}{standard_error(compared.odds_ratio)}",
        *needed_technical(answer.number_needed, level),
        *_others(answer, EVERYTHING),
    ]
    method = f"Aus {rows_words(subject)}"
    if compared.risk_difference.lower is not None:
        method += (
            f"; {level_intervals(level)} nach einer gemeinsamen Delta-Methode, der "
            "Wahrscheinlichkeiten auf der Logit-Skala, der Verhältnisse auf der Log-Skala, der "
            f"Differenz für sich, mit {covariance(subject)}"
        )
        if question.others == "observed":
            method += f"; Zeilen gewichtet wie bei der Anpassung{drawn_method(question.sample)}"
    return _words(answer, [*told, method], [], [])


def _with_error(estimate: Estimate, level: float) -> str:
    return f"{chance_with_interval(estimate, level)}{_points_error(estimate)}"


def _points_error(estimate: Estimate) -> str:
    if estimate.se is None:
        return ""
    return lexicon().standard_error.format(percentage_points(estimate.se))


@GERMAN.alternative.register
def _(answer: ChangeAnswer) -> str:
    subject, question = answer.subject, answer.question
    level, moves = question.level, settled_moves(answer)
    start, end = say_level_once(
        [chance_with_interval(each, level) for each in (answer.start, answer.end)], level
    )
    averaged = change_averaged(answer)
    opening = chance(subject.outcome, averaged=averaged).removeprefix("die ")
    if averaged:
        opening += f" bei {among(subject, question.where, answer.counted).removesuffix(',')}"
    elif answer.held:
        opening += f" für {held_whom(subject, answer.held, question.others)}"
    return joined(
        f"{opening}: {start} mit {start_label(subject, moves)} und {end} mit "
        f"{end_label(subject, moves)}",
        f"Darunter dasselbe als Zeichen, {marks_told(answer)}; die sich unterscheiden, sind durch "
        "ihre Form abgesetzt",
    )
