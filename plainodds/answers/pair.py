"""Two predictors together: how the effect of one depends on the other, on both scales."""

from __future__ import annotations

from plainodds.answers.along import effect_along
from plainodds.answers.averaging import Averager, Exact
from plainodds.answers.crossing import averaged_crossing, crossing_at_profile, double_contrast
from plainodds.answers.curve import CurveAnswer
from plainodds.answers.delta import mapped, p_values, wald
from plainodds.answers.estimate import UNKNOWN, Estimate
from plainodds.answers.joined import JoinedTest, joining_contrasts, tested
from plainodds.answers.joint import JointTable, joint_table_of
from plainodds.answers.pair_lines import lines_of
from plainodds.answers.pair_settled import PairQuestion, Settled, settled
from plainodds.answers.population import Averages, everyone
from plainodds.answers.progress import Progress, silent, within
from plainodds.answers.questions import Answer
from plainodds.answers.remembered import remembered
from plainodds.answers.stretches import EffectAlong, Stretch
from plainodds.answers.surface import Surface, surface_of
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import Subject
from plainodds.scales import odds_from_linear_predictor
from plainodds.values import Pairs, Scalar, value

__all__ = [
    "EffectAlong",
    "Interaction",
    "PairAnswer",
    "PairQuestion",
    "Stretch",
    "answer_pair",
]

_STAGES = 4


@value
class Interaction:
    """The interaction itself, on both scales.

    Attributes
    ----------
    at_profile : Estimate or None
        On the probability scale at the held profile: the cross difference of the four
        chances; for two slopes the cross partial ∂²π/∂a∂b; for a slope and a change the
        difference of slopes. None where the sample tells no chances.
    averaged : Estimate or None
        The same averaged over the rows; None where there are none, or no chances.
    at_profile_p_value, averaged_p_value : float or None
        Wald tests of 0.
    ratio : Estimate
        On the odds scale: the ratio of odds ratios; exactly 1 without a shared term.
    log_ratio : Estimate
    joined : bool
        Whether any term of the model joins the two predictors.
    test : JoinedTest or None
        Of the whole group of such terms; None where there is none, or no covariance.
    """

    at_profile: Estimate | None
    averaged: Estimate | None
    at_profile_p_value: float | None
    averaged_p_value: float | None
    ratio: Estimate
    log_ratio: Estimate
    joined: bool
    test: JoinedTest | None


@value
class PairAnswer(Answer):
    """Two predictors together.

    Attributes
    ----------
    question : PairQuestion
    subject : Subject
    a_change, b_change : (from, to)
        The settled changes. A sloped number's is one step from its typical value: that
        of its odds ratio.
    sloped : tuple of str
        Which of the two are taken as slopes on the probability scale.
    held : pairs of (predictor, value)
        The profile of the remaining predictors at which `interaction.at_profile` holds,
        and everything else unless `others` is "observed".
    counted : int
        Rows that `interaction.averaged` averages over; 0 where there are none.
    lines : CurveAnswer or None
        Lines of one predictor by values of the other: along a number where there is one.
        None where the sample tells no chances.
    surface : Surface or None
        Where the question asks for a map.
    effect : EffectAlong
        Of `a` along `b`, on the question's scale.
    interaction : Interaction
    joint : JointTable or None
        Where both changes are between two levels or two stated values.
    """

    question: PairQuestion
    subject: Subject
    a_change: tuple[Scalar, Scalar]
    b_change: tuple[Scalar, Scalar]
    sloped: tuple[str, ...]
    held: Pairs
    counted: int
    lines: CurveAnswer | None
    surface: Surface | None
    effect: EffectAlong
    interaction: Interaction
    joint: JointTable | None


def answer_pair(
    model: FittedModel,
    question: PairQuestion,
    averager: Averager | None = None,
    progress: Progress = silent,
) -> PairAnswer:
    """Two predictors together, on the probability scale and on the odds scale.

    Sources: Ai & Norton 2003 (Economics Letters 80:123) for the interaction on the
    probability scale; Johnson & Neyman 1936 and Bauer & Curran 2005 for where an effect
    differs from nothing; Knol & VanderWeele 2012 (Int J Epidemiol 41:514) for the joint
    table.

    Parameters
    ----------
    model : FittedModel
    question : PairQuestion
    averager : Averager, optional
        What averages over the rows; exactly over every row when left out.
    progress : callable, optional
        Told how many of how many parts are done; may raise to stop.

    Raises
    ------
    QuestionRefused
        For the same predictor twice, an unknown predictor, level, value or setting, a map
        of levels, chances that a case-control sample does not tell, or a test that the fit
        does not have.
    """
    pair = settled(model, question)
    if averager is None and model.sample.rows and _tells_chances(model):
        averager = Exact(model, everyone(model))
    if question.others == "observed" and averager is None:
        # says why nobody can be averaged over
        everyone(model)
    moving = averager if question.others == "observed" else None
    stages = [within(progress, stage, _STAGES) for stage in range(_STAGES)]
    lines = lines_of(model, question, pair, moving) if _tells_chances(model) else None
    stages[0](1, 1)
    surface = None
    if question.shape == "map":
        surface = _surface(model, question, pair, moving, stages[1])
    stages[1](1, 1)
    effect = effect_along(model, pair, question.scale, moving)
    stages[2](1, 1)
    interaction = _interaction(model, question, pair, averager)
    stages[3](1, 1)
    return PairAnswer(
        question=question,
        subject=model.subject,
        a_change=pair.a_change,
        b_change=pair.b_change,
        sloped=pair.sloped,
        held=pair.held,
        counted=0 if averager is None else averager.population.counted,
        lines=lines,
        surface=surface,
        effect=effect,
        interaction=interaction,
        joint=_joint(model, question, pair, moving),
    )


def _tells_chances(model: FittedModel) -> bool:
    subject = model.subject
    return subject.sampling != "case-control" or subject.prevalence is not None


def _surface(
    model: FittedModel,
    question: PairQuestion,
    pair: Settled,
    averager: Averager | None,
    progress: Progress,
) -> Surface:
    if averager is None:
        return surface_of(model, pair, question.scale, None)
    # the averages over everyone are the same whatever is asked of the two numbers
    return remembered(
        model,
        ("averaged surface", pair.a.name, pair.b.name, question.scale),
        lambda: surface_of(model, pair, question.scale, averager, progress),
    )


def _interaction(
    model: FittedModel, question: PairQuestion, pair: Settled, averager: Averager | None
) -> Interaction:
    at_profile: tuple[Estimate | None, float | None] = (None, None)
    averaged: tuple[Estimate | None, float | None] = (None, None)
    if _tells_chances(model):
        at_profile = _estimated(model, crossing_at_profile(model, pair), pair.level)
    if averager is not None:
        averaged = _estimated(model, _averaged(model, pair, averager), pair.level)
    contrast = double_contrast(model, pair)[None]
    logs = wald(model, contrast @ model.coefficients, contrast, pair.level)
    ratio = mapped(logs, odds_from_linear_predictor, odds_from_linear_predictor)
    names = pair.a.name, pair.b.name
    contrasts = remembered(model, ("joining", *names), lambda: joining_contrasts(model, *names))
    (determined,) = model.estimable.determined(contrast)
    return Interaction(
        at_profile=at_profile[0],
        averaged=averaged[0],
        at_profile_p_value=at_profile[1],
        averaged_p_value=averaged[1],
        ratio=ratio.at(0) if determined else UNKNOWN,
        log_ratio=logs.at(0) if determined else UNKNOWN,
        joined=len(contrasts) > 0,
        test=remembered(
            model,
            ("joined", *names, question.test),
            lambda: tested(model, contrasts, question.test),
        ),
    )


def _averaged(model: FittedModel, pair: Settled, averager: Averager) -> Averages:
    """The averaged interaction, which no held value changes: kept while sliders move."""
    if not isinstance(averager, Exact):
        return averaged_crossing(model, pair, averager)
    changes = pair.a.name, pair.b.name, pair.a_change, pair.b_change, pair.sloped
    return remembered(
        model, ("averaged crossing", *changes), lambda: averaged_crossing(model, pair, averager)
    )


def _estimated(model: FittedModel, found: Averages, level: float) -> tuple[Estimate, float | None]:
    """A value with its interval and the test of 0; unknown where the rows leave it open."""
    if not model.estimable.determined(found.gradient).all():
        return UNKNOWN, None
    intervals = wald(model, found.value, found.gradient, level)
    return intervals.at(0), p_values(model, intervals)[0]


def _joint(
    model: FittedModel, question: PairQuestion, pair: Settled, averager: Averager | None
) -> JointTable | None:
    for facts, stated in ((pair.a, question.a_values), (pair.b, question.b_values)):
        if facts.is_number and not stated:
            return None
    return joint_table_of(
        model,
        pair.a.name,
        pair.b.name,
        pair.a_change,
        pair.b_change,
        pair.around.profile,
        averager,
        pair.level,
    )
