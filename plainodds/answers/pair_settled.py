"""What a question about two predictors asks, settled: their changes and the held profile."""

from __future__ import annotations

from dataclasses import dataclass
from typing import ClassVar, Literal

from plainodds.answers.curve import Others
from plainodds.answers.delta import checked_level
from plainodds.answers.moves import refuse_empty_levels
from plainodds.answers.points import Around
from plainodds.answers.questions import Question
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel, checked
from plainodds.model.predictors import PredictorFacts
from plainodds.values import Pairs, Scalar, value

__all__ = ["PairQuestion", "Settled", "settled"]


@value
class PairQuestion(Question):
    """How do two predictors act together?

    Attributes
    ----------
    a, b : str
        Two predictors. The effect of `a` is followed as `b` varies.
    a_values, b_values : (from, to), or empty
        The change of each that is compared. Empty: a number goes from its lower to its
        upper quartile, a category from its reference to its most frequent other level.
    number : {"change", "slope"}
        How a number's effect is taken: between its two values, or dπ/dx per unit (on the
        odds scale: the odds ratio per step). "slope" goes with numbers whose two values
        are not stated; it is taken at the typical value where a profile is held, and at
        each row's own value where rows are averaged over.
    others : "typical", "observed" or pairs of (predictor, value)
        What the remaining predictors do, as in a curve.
    scale : {"probability", "odds"}
    shape : {"lines", "map"}
        How both together are shown; a map needs two numbers.
    test : {"wald", "likelihood_ratio"}
    level : float
    """

    a: str
    b: str
    a_values: tuple[Scalar, ...] = ()
    b_values: tuple[Scalar, ...] = ()
    number: Literal["change", "slope"] = "change"
    others: Others = "typical"
    scale: Literal["probability", "odds"] = "probability"
    shape: Literal["lines", "map"] = "lines"
    test: Literal["wald", "likelihood_ratio"] = "wald"
    level: float = 0.95

    method: ClassVar[str] = "pair"
    positional: ClassVar[tuple[str, ...]] = ("a", "b")


@dataclass(frozen=True, eq=False)
class Settled:
    """A question about two predictors with everything decided.

    Attributes
    ----------
    a, b : PredictorFacts
    a_change, b_change : (from, to)
    sloped : tuple of str
        Which of the two enter by their slope on the probability scale.
    around : Around
        The whole held profile, `a` and `b` at their typical values.
    level : float
    """

    a: PredictorFacts
    b: PredictorFacts
    a_change: tuple[Scalar, Scalar]
    b_change: tuple[Scalar, Scalar]
    sloped: tuple[str, ...]
    around: Around
    level: float

    @property
    def held(self) -> Pairs:
        """The profile without the two predictors themselves."""
        return tuple((n, v) for n, v in self.around.profile if n not in (self.a.name, self.b.name))


def settled(model: FittedModel, question: PairQuestion) -> Settled:
    """Decide what is left open and refuse what cannot be answered.

    Raises
    ------
    QuestionRefused
        For the same predictor twice, an unknown predictor, level, value or setting, a
        level that no row has, or values that are not two different ones.
    """
    level = checked_level(question.level)
    _refuse_unknown_settings(question)
    a, b = model.subject.predictor(question.a), model.subject.predictor(question.b)
    if a is b:
        raise QuestionRefused(
            f"pair() sets {a.name!r} against itself; name two different predictors."
        )
    _refuse_untold_chances(model, question)
    if question.shape == "map":
        _refuse_maps_of_levels(a, b)
    stated = {a.name: question.a_values, b.name: question.b_values}
    sloped = tuple(
        facts.name
        for facts in (a, b)
        if facts.is_number and question.number == "slope" and not stated[facts.name]
    )
    return Settled(
        a,
        b,
        _change(model, a, "a_values", question.a_values, a.name in sloped),
        _change(model, b, "b_values", question.b_values, b.name in sloped),
        sloped,
        Around(model, model.completed(_stated_others(question))),
        level,
    )


def _refuse_unknown_settings(question: PairQuestion) -> None:
    for name, held, known in (
        ("number", question.number, ("change", "slope")),
        ("scale", question.scale, ("probability", "odds")),
        ("shape", question.shape, ("lines", "map")),
        ("test", question.test, ("wald", "likelihood_ratio")),
    ):
        if held not in known:
            raise QuestionRefused(f"{name}={held!r}: choose {known[0]!r} or {known[1]!r}.")


def _refuse_untold_chances(model: FittedModel, question: PairQuestion) -> None:
    """Without the population's share of events a case-control sample tells odds ratios only."""
    if model.subject.sampling != "case-control" or model.subject.prevalence is not None:
        return
    wanted = {
        "scale='probability'": question.scale == "probability",
        "others='observed'": question.others == "observed",
        "shape='map'": question.shape == "map",
    }
    for asked, is_asked in wanted.items():
        if is_asked:
            raise QuestionRefused(
                f"{asked}: the sample is marked as case-control: its share of events was chosen, "
                "not found, so it tells odds ratios but no chances. State the population's share, "
                "FittedLogit(result, sampling='case-control', prevalence=0.02), or ask "
                f"pair({question.a!r}, {question.b!r}, scale='odds') with the others held."
            )


def _refuse_maps_of_levels(a: PredictorFacts, b: PredictorFacts) -> None:
    for facts in (a, b):
        if not facts.is_number:
            raise QuestionRefused(
                f"shape='map' needs two numbers, and {facts.name} has levels. Ask shape='lines': "
                "a line for each level."
            )


def _stated_others(question: PairQuestion) -> dict[str, Scalar]:
    if isinstance(question.others, str):
        if question.others not in ("typical", "observed"):
            raise QuestionRefused(
                f"others={question.others!r}: choose 'typical', 'observed' or a mapping of values."
            )
        return {}
    stated = dict(question.others)
    for name in (question.a, question.b):
        if name in stated:
            raise QuestionRefused(f"others= holds {name!r}, which the pair itself moves.")
    return stated


def _change(
    model: FittedModel,
    facts: PredictorFacts,
    argument: str,
    stated: tuple[Scalar, ...],
    sloped: bool,
) -> tuple[Scalar, Scalar]:
    if stated:
        return _stated_change(facts, argument, stated)
    if sloped:
        return _one_step(facts)
    if facts.is_number:
        return _between_quartiles(facts)
    return _between_levels(model, facts)


def _stated_change(
    facts: PredictorFacts, argument: str, stated: tuple[Scalar, ...]
) -> tuple[Scalar, Scalar]:
    if len(stated) != 2:
        raise QuestionRefused(f"{facts.name}: {argument}={stated!r} is not two values, (from, to).")
    start, end = checked(facts, stated[0]), checked(facts, stated[1])
    if start == end:
        raise QuestionRefused(f"{facts.name}: from {start!r} to {end!r} is no change.")
    refuse_empty_levels(facts, (start, end))
    return start, end


def _one_step(facts: PredictorFacts) -> tuple[Scalar, Scalar]:
    """From the typical value one step up, or the last step that can be computed."""
    end = min(float(facts.typical) + facts.step, facts.allowed[1])
    start = max(end - facts.step, facts.allowed[0])
    return checked(facts, start), checked(facts, end)


def _between_quartiles(facts: PredictorFacts) -> tuple[Scalar, Scalar]:
    low, _, high = facts.quartiles
    if low == high:
        low, high = facts.minimum, facts.maximum
    if low == high:
        raise QuestionRefused(f"Every row has {facts.name} = {low:g}: there is no change of it.")
    return checked(facts, low), checked(facts, high)


def _between_levels(model: FittedModel, facts: PredictorFacts) -> tuple[Scalar, Scalar]:
    if len(facts.levels_with_rows) < 2:
        raise QuestionRefused(
            f"Rows have no more than one level of {facts.name}: there is no change of it."
        )
    if facts.kind == "yes/no":
        return facts.levels[0], facts.levels[1]
    counts = dict(zip(facts.levels, facts.level_counts, strict=True))
    start = facts.levels[model.coded_reference(facts)]
    if not counts[start]:
        start = facts.levels_with_rows[0]
    others = [level for level in facts.levels_with_rows if level != start]
    return start, max(others, key=counts.__getitem__)
