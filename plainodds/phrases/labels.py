"""What things are called: predictors, their values, changes, and the scales of pictures.

Used by sentences and drawings alike, so that both say the same. Labels come from the
analyst or from column names and may be any text; nothing is escaped here, whatever
shows a label does that.
"""

from __future__ import annotations

from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectRow, EffectsAnswer
from plainodds.answers.odds import OddsRow
from plainodds.model.predictors import OutcomeFacts, PredictorFacts, Subject
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import quantity, wording
from plainodds.phrases.units import one_line, per_unit, step, tidy, with_unit
from plainodds.values import Pairs, Scalar

__all__ = [
    "average_chance_of",
    "axis_title",
    "cases_label",
    "chance_of",
    "change_label",
    "data_range",
    "effect_label",
    "effects_title",
    "from_to",
    "given_clause",
    "given_label",
    "in_sentence",
    "line_label",
    "listed",
    "named_value",
    "odds_of_event",
    "predictor_label",
    "predictor_name",
    "row_label",
    "scale_title",
    "sentence_case",
    "step_label",
    "value_label",
    "values_range",
    "why_no_interval",
]

# what a yes/no is called whose levels have no labels of their own
_YES_NO = ("no", "yes")


def sentence_case(text: str) -> str:
    """Begin with a capital, unless the first word has a spelling of its own.

    Examples
    --------
    >>> sentence_case("pipe age"), sentence_case("pH of soil")
    ('Pipe age', 'pH of soil')
    """
    text = one_line(text)
    first = text.split(" ", 1)[0]
    return text[:1].upper() + text[1:] if first == first.lower() else text


def in_sentence(text: str) -> str:
    """Write a label as it stands within a sentence.

    Only a first word of the form "Xxxx" loses its capital; "BMI" and "pH" keep theirs.

    Examples
    --------
    >>> in_sentence("Pipe age"), in_sentence("BMI at entry"), in_sentence("pH")
    ('pipe age', 'BMI at entry', 'pH')
    """
    text = tidy(text)
    if lexicon().nouns_keep_capitals:
        return text
    first = text.split(" ", 1)[0]
    plain_word = len(first) > 2 and first.isalpha() and first == first.capitalize()
    return text[:1].lower() + text[1:] if plain_word else text


def predictor_label(facts: PredictorFacts) -> str:
    """What a predictor is called, as a heading."""
    return sentence_case(tidy(facts.label)) or tidy(facts.name)


def predictor_name(facts: PredictorFacts) -> str:
    """What a predictor is called within a sentence."""
    return in_sentence(facts.label) or tidy(facts.name)


def axis_title(facts: PredictorFacts) -> str:
    """A predictor's label with its unit, as along an axis: "Pipe age (years)"."""
    unit = tidy(facts.unit)
    label = predictor_label(facts)
    return f"{label} ({unit})" if unit and facts.is_number else label


def value_label(facts: PredictorFacts, value: Scalar) -> str:
    """A predictor's value with its unit, or what a level is called.

    Parameters
    ----------
    facts : PredictorFacts
    value : scalar

    Returns
    -------
    str
        For example "40 years", "1 year" or "cast iron".
    """
    if not facts.is_number:
        if facts.kind == "yes/no" and facts.level_labels == _YES_NO and value in facts.levels:
            return lexicon().yes if value else lexicon().no
        label = facts.level_label(value) if value in facts.levels else str(value)
        return tidy(label) or tidy(str(value)) or lexicon().blank
    if isinstance(value, str):
        return tidy(value) or lexicon().blank
    return with_unit(float(value), facts.unit)


def line_label(facts: PredictorFacts, value: Scalar) -> str:
    """A value that has to be understood alone, beside a line.

    Returns
    -------
    str
        "cast iron" and "40 years" speak for themselves; a bare number or a yes does
        not: "past repairs: 2", "smoker: yes".
    """
    alone = facts.kind == "category" or (facts.is_number and tidy(facts.unit) != "")
    written = value_label(facts, value)
    return written if alone else f"{predictor_name(facts)}: {written}"


def step_label(facts: PredictorFacts, size: float) -> str:
    """A change by a step: "per year more", "per 10 years more", "per 5 units less"."""
    phrase = lexicon().per_less if size < 0 else lexicon().per_more
    return phrase.format(step(abs(size), facts.unit))


def change_label(facts: PredictorFacts, row: OddsRow) -> str:
    """The change that an odds ratio belongs to.

    Returns
    -------
    str
        "per 10 years more" where every step counts the same, "from 20 to 60 years"
        where it does not, "PVC against cast iron" for levels.
    """
    if not facts.is_number or isinstance(row.start, str) or isinstance(row.end, str):
        return lexicon().against.format(value_label(facts, row.end), value_label(facts, row.start))
    if row.per_step:
        return step_label(facts, float(row.end) - float(row.start))
    return from_to(facts, row.start, row.end)


def from_to(facts: PredictorFacts, start: Scalar, end: Scalar) -> str:
    """A change between two values, the unit said once: "from 20 to 60 years"."""
    return lexicon().from_to.format(values_range(facts, start, end))


def values_range(facts: PredictorFacts, start: Scalar, end: Scalar) -> str:
    """Two values as a range, the unit said once: "20 to 60 years"."""
    low, high = value_label(facts, start), value_label(facts, end)
    if facts.is_number and high.startswith(f"{quantity(float(end))} "):
        low = quantity(float(start))
    return wording().to.format(low, high)


def effect_label(facts: PredictorFacts, row: EffectRow) -> str:
    """The change that a difference of the chance belongs to.

    Returns
    -------
    str
        "per additional year" for a slope, "per 10 years more" for a step, "PVC against
        cast iron" for levels.
    """
    if row.start is not None and row.end is not None:
        return lexicon().against.format(value_label(facts, row.end), value_label(facts, row.start))
    if row.step is not None:
        return step_label(facts, row.step)
    return lexicon().per_additional.format(per_unit(facts.unit))


def row_label(subject: Subject, row: OddsRow) -> str:
    """The whole label of an odds ratio: predictor, change and what it is given."""
    facts = subject.predictor(row.predictor)
    text = f"{predictor_label(facts)}, {change_label(facts, row)}"
    return f"{text}; {given_label(subject, row.given)}" if row.given else text


def given_label(subject: Subject, given: Pairs) -> str:
    """Stated values, as a short list: "soil high, pipe age 40 years"."""
    return ", ".join(_held_words(subject, name, value) for name, value in given)


def _held_words(subject: Subject, name: str, value: Scalar) -> str:
    return named_value(subject.predictor(name), value)


def named_value(facts: PredictorFacts, value: Scalar) -> str:
    """A predictor's name with a value: "pipe age 40 years"."""
    return lexicon().value.format(predictor_name(facts), value_label(facts, value))


def data_range(facts: PredictorFacts) -> str:
    """The range of a number in the data: "(the data have 0 to 110 years)"."""
    low, high = quantity(facts.minimum), with_unit(facts.maximum, facts.unit)
    return lexicon().data_range.format(low, high)


def given_clause(subject: Subject, given: Pairs) -> str:
    """Stated values, as part of a sentence: "given soil high and pipe age 40 years"."""
    told = [_held_words(subject, name, value) for name, value in given]
    return lexicon().given.format(listed(told)) if told else ""


def listed(items: list[str]) -> str:
    """Join as in speech: "a", "a and b", "a, b and c"."""
    if len(items) < 2:
        return "".join(items)
    return wording().both.format(", ".join(items[:-1]), items[-1])


def why_no_interval(subject: Subject) -> str:
    """Why a picture has no intervals, in its small print."""
    return subject.no_interval or message("No intervals can be given.")


def cases_label(outcome: OutcomeFacts) -> str:
    """What many rows are called; a word of the language where the analyst has not said."""
    called = tidy(outcome.cases)
    return message("cases") if called == "cases" else called


def chance_of(outcome: OutcomeFacts) -> str:
    """What the chance is a chance of: "Chance of burst this winter"."""
    return message("Chance of {}", tidy(outcome.event))


def average_chance_of(outcome: OutcomeFacts) -> str:
    """What an average chance is one of: "Average chance of burst this winter"."""
    return message("Average chance of {}", tidy(outcome.event))


def odds_of_event(outcome: OutcomeFacts) -> str:
    """What the odds are odds of: "Odds of burst this winter"."""
    return message("Odds of {}", tidy(outcome.event))


def scale_title(answer: CurveAnswer) -> str:
    """The title of a curve's vertical axis, with the event and the unit.

    Returns
    -------
    str
        For a slope the figures meant are percentage points, that is 100 times the
        answer's.
    """
    scale, outcome = answer.question.scale, answer.subject.outcome
    averaged, event = answer.question.others == "observed", tidy(outcome.event)
    # what is averaged are chances; their odds and log odds are read off the average
    if scale == "odds":
        title = odds_of_event(outcome)
        if averaged:
            title = message("Odds matching the average chance of {}", event)
    elif scale == "linear_predictor":
        title = message("Log odds of {}", event)
        if averaged:
            title = message("Log odds matching the average chance of {}", event)
    else:
        title = average_chance_of(outcome) if averaged else chance_of(outcome)
    if scale != "slope":
        return title
    facts = answer.subject.predictor(answer.question.predictor)
    return message("{}: percentage points per {} more", title, per_unit(facts.unit))


def effects_title(answer: EffectsAnswer) -> str:
    """The title of an axis of differences, which are 100 times the answer's.

    Returns
    -------
    str
        As in "Change of the average chance of burst this winter (percentage points)".
    """
    event = tidy(answer.subject.outcome.event)
    if answer.question.others == "observed":
        return message("Change of the average chance of {} (percentage points)", event)
    return message("Change of the chance of {} (percentage points)", event)
