"""FittedLogit: a fitted model, and the questions that can be asked of it."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Mapping, Sequence
from typing import Any, Literal

import pandas as pd

from plainodds.answers.arguments import listed_values, odds_question
from plainodds.answers.change import ChangeAnswer, ChangeQuestion, answer_change
from plainodds.answers.checks.finding import Topic
from plainodds.answers.curve import CurveAnswer, CurveQuestion, Others, Scale, answer_curve
from plainodds.answers.effects import EffectsAnswer, EffectsQuestion, answer_effects
from plainodds.answers.groups import stated_groups
from plainodds.answers.moves import Shift, stated_moves
from plainodds.answers.odds import OddsAnswer, OddsQuestion, answer_odds, answer_odds_of
from plainodds.answers.pair import PairAnswer, PairQuestion, answer_pair
from plainodds.answers.profile import ProfileAnswer, ProfileQuestion, answer_profile
from plainodds.answers.questions import Answer, Question
from plainodds.answers.soundness import SoundnessAnswer, SoundnessQuestion, answer_soundness
from plainodds.answers.where import stated_rows
from plainodds.errors import FitRefused, QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.model.intake import take_in
from plainodds.model.predictors import Outcome, Predictor, Sampling, Subject
from plainodds.values import Scalar, pairs

__all__ = ["FittedLogit", "odds_of"]

_ANSWERERS: dict[type[Question], Callable[[FittedModel, Any], Answer]] = {
    OddsQuestion: answer_odds,
    CurveQuestion: answer_curve,
    EffectsQuestion: answer_effects,
    ChangeQuestion: answer_change,
    PairQuestion: answer_pair,
    ProfileQuestion: answer_profile,
    SoundnessQuestion: answer_soundness,
}


class FittedLogit:
    """A fitted binary logit model, ready to be asked.

    Parameters
    ----------
    result : statsmodels result
        What `fit()` of Logit, or of GLM or GEE with a binomial family and logit link,
        returned; made with patsy, with formulaic or without a formula.
    data : DataFrame, optional
        The data that the model was fitted on, where the result no longer carries them,
        or where `derived` reads columns that the model does not.
    predictors : mapping of name to Predictor, optional
        Labels, units, steps, ranges, typical values; what is left out comes from the data.
    outcome : Outcome, optional
        What the event and the cases are called.
    derived : mapping of name to expression, optional
        Columns that move with others, as ``{"exper_sq": "exper ** 2"}``.
    functions : mapping of name to callable, optional
        Functions of your own that a formulaic formula mentions.
    offset : float, optional
        Where the model has an offset: the value at which it is held. Default: its median.
    sampling : {"cohort", "case-control"}, optional
        A sample chosen by the outcome tells odds ratios but no chances: questions about
        chances are refused unless `prevalence` is stated.
    prevalence : float, optional
        The population's share of events, for a case-control sample. Every chance is then
        corrected by shifting the intercept (King & Zeng 2001, Political Analysis 9:137),
        and averages weigh events and non-events to that share; odds ratios stay.
    causal : bool
        Whether the design of the study allows to take differences for effects. Otherwise
        the words say that they are associations.
    reason : str
        What makes it so; told wherever the figures are told. Goes with ``causal=True``.

    Notes
    -----
    Weights are the fit's own. Averages over the rows weigh each row by its frequency weight
    times its variance weight times its trials. An interval takes the coefficients'
    covariance as the fit gives it: with frequency weights a row of weight 3 counts as three
    cases, with variance weights as one case of three times the information. Survey weights
    are neither; fit them with a robust covariance, which is then used.

    Raises
    ------
    FitRefused
        If the result is no binary logit model, or its data are gone or don't match;
        the message says why and what to do.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> pipes = po.demo.tessel_bay()
    >>> fit = po.FittedLogit(smf.logit("burst ~ age_years * material", pipes).fit(disp=0))
    >>> [facts.name for facts in fit.subject.predictors]
    ['material', 'age_years']
    """

    def __init__(
        self,
        result: Any,
        data: pd.DataFrame | None = None,
        *,
        predictors: Mapping[str, Predictor] | None = None,
        outcome: Outcome | None = None,
        derived: Mapping[str, str] | None = None,
        functions: Mapping[str, Callable[..., Any]] | None = None,
        offset: float | None = None,
        sampling: Sampling | None = None,
        prevalence: float | None = None,
        causal: bool = False,
        reason: str = "",
    ) -> None:
        if isinstance(result, FittedLogit):
            raise FitRefused(
                "This is a FittedLogit already; ask it, or hand over what fit() returned."
            )
        self.model = take_in(
            result,
            data,
            predictors,
            outcome,
            derived,
            functions,
            offset,
            sampling,
            prevalence,
            causal,
            reason,
        )

    @property
    def subject(self) -> Subject:
        """The outcome, the predictors and the notices: what every answer carries."""
        return self.model.subject

    def __repr__(self) -> str:
        subject = self.subject
        lines = [
            f"FittedLogit: chance of {subject.outcome.event}, {subject.rows:,} rows",
            *(f"  {facts.name} ({facts.kind})" for facts in subject.predictors),
            *(f"  Note: {notice}" for notice in subject.notices),
        ]
        return "\n".join(lines)

    def ask(self, question: Question) -> Answer:
        """Answer any question.

        Parameters
        ----------
        question : Question
            As OddsQuestion, CurveQuestion, EffectsQuestion, ChangeQuestion, PairQuestion,
            ProfileQuestion or SoundnessQuestion.

        Raises
        ------
        QuestionRefused
            With the reason and the way out.

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years", pipes).fit(disp=0))
        >>> fit.ask(fit.odds().question) == fit.odds()
        True
        """
        if type(question) not in _ANSWERERS:
            raise QuestionRefused(f"{type(question).__name__} is not a question of plainodds.")
        return _ANSWERERS[type(question)](self.model, question)

    def odds(
        self,
        predictors: str | Iterable[str] = (),
        *,
        steps: Mapping[str, float] | None = None,
        between: Mapping[str, Sequence[Scalar]] | None = None,
        references: Mapping[str, Scalar] | None = None,
        given: Mapping[str, Any] | None = None,
        order: Literal["model", "size"] = "model",
        interval: Literal["wald", "likelihood"] = "wald",
        level: float = 0.95,
        layout: Literal["changes", "table"] = "changes",
    ) -> OddsAnswer:
        """By what are the odds multiplied when a predictor changes?

        One row for each change: a number per step, a category's levels against a
        reference, a predictor that enters along a curve from its lower to its upper
        quartile, and an interacting predictor once for each value of its modifiers.

        Parameters
        ----------
        predictors : str or iterable of str
            Whose odds ratios; all when left out.
        steps : mapping of name to number, optional
            As ``{"age_years": 10}``.
        between : mapping of name to (from, to), optional
            Two values to compare, as ``{"pressure_m": (40, 60)}``.
        references : mapping of name to level, optional
            No new fit is needed for another reference.
        given : mapping of modifier to value or values, optional
            Where an interacting predictor's odds ratio is stated; default: every level,
            or the quartiles of a number.
        order : {"model", "size"}
        interval : {"wald", "likelihood"}
            Estimate plus and minus standard errors, or the values that the likelihood
            allows, by refitting (Venzon & Moolgavkar 1988); an end that does not exist is
            infinite.
        level : float
            Confidence level.
        layout : {"changes", "table"}
            How it is drawn: a row for each change; or as journals print it, with reference
            levels, events and cases, and tests of interaction as rows of their own.

        Raises
        ------
        QuestionRefused
            For an unknown predictor, level, value or layout.

        Notes
        -----
        exp((x₁ − x₀)'β) with variance (x₁ − x₀)'V(x₁ − x₀) on the log scale. Source:
        Hosmer, Lemeshow & Sturdivant, Applied Logistic Regression, ch. 3.

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years", pipes).fit(disp=0))
        >>> row = fit.odds(steps={"age_years": 10}).rows[0]
        >>> row.odds_ratio.lower < row.odds_ratio.estimate < row.odds_ratio.upper
        True
        """
        question = odds_question(
            predictors, steps, between, references, given, order, interval, level, layout
        )
        return answer_odds(self.model, question)

    def curve(
        self,
        predictor: str,
        by: str | None = None,
        *,
        by_values: Sequence[Scalar] = (),
        others: Literal["typical", "observed"] | Mapping[str, Scalar] = "typical",
        scale: Scale = "probability",
        at: Sequence[Scalar] = (),
        level: float = 0.95,
    ) -> CurveAnswer:
        """How does the chance change along a predictor?

        Parameters
        ----------
        predictor : str
        by : str, optional
            A second predictor: one line for each of its values.
        by_values : sequence, optional
            Its values; default: every level, or the quartiles of a number.
        others : {"typical", "observed"} or mapping
            What the remaining predictors do: held at the typical profile (medians and
            most frequent levels); each row keeps its own values and the chances are
            averaged; or held at stated values, the rest typical.
        scale : {"probability", "slope", "odds", "linear_predictor"}
            "slope" is the marginal effect dπ/dx, through every column that the
            predictor moves.
        at : sequence, optional
            The predictor's values; default: a grid over the data's range, or every level.
        level : float
            Confidence level.

        Raises
        ------
        QuestionRefused
            For an unknown predictor, level or value.

        Notes
        -----
        Held: Wald interval on η, carried over (Hosmer, Lemeshow & Sturdivant). Observed:
        delta method on the logit of the average (Muller & MacLehose 2014, Int J
        Epidemiol 43:962). Slope: exact gradient (Greene, Econometric Analysis).

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years * material", pipes).fit(disp=0))
        >>> [line.by for line in fit.curve("age_years", by="material").lines]
        ['cast iron', 'ductile iron', 'PVC']
        """
        held: Others = others if isinstance(others, str) else pairs(others)
        question = CurveQuestion(
            predictor, by, listed_values(by_values), held, scale, listed_values(at), level
        )
        return answer_curve(self.model, question)

    def effects(
        self,
        predictors: str | Iterable[str] = (),
        *,
        others: Literal["observed", "typical"] | Mapping[str, Scalar] = "observed",
        number: Literal["slope", "step"] = "slope",
        by: str | None = None,
        where: Mapping[str, Any] | Any | None = None,
        sample: Literal["fixed", "drawn"] = "fixed",
        level: float = 0.95,
    ) -> EffectsAnswer:
        """How much does the chance change with each predictor, for people like ours?

        One effect per predictor, through every column that it moves: interactions,
        polynomials, splines, transforms, derived columns.

        Parameters
        ----------
        predictors : str or iterable of str
            Whose effects; all when left out.
        others : {"observed", "typical"} or mapping
            Averaged over the rows, each with its own values; at the typical profile; or at
            stated values, the rest typical.
        number : {"slope", "step"}
            For a number: dπ/dx per unit, or the change when it goes up by its step.
        by : str, optional
            A category or yes/no: the effects among the rows of each of its levels.
        where : mapping or boolean mask, optional
            Among which rows: levels, (lowest, highest) of a number, or one True or False
            for each row that the fit used.
        sample : {"fixed", "drawn"}
            Whether the interval is about these very rows, or also counts that they were
            drawn from a larger population.
        level : float
            Confidence level.

        Raises
        ------
        QuestionRefused
            For an unknown predictor or level, a `where` that no row meets, or a
            case-control sample without a prevalence.

        Notes
        -----
        Exact delta-method gradients (Greene, Econometric Analysis); observed values: Hanmer
        & Kalkan 2013 (AJPS 57:263). "drawn" adds Σ (wᵢ²/fᵢ)(θᵢ − θ̂)² to the variance, with
        wᵢ the rows' normalised weights, fᵢ how many cases a row stands for and θᵢ its own
        effect (Dowd, Greene & Norton 2014, Health Serv Res 49:731).

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years * material", pipes).fit(disp=0))
        >>> [row.predictor for row in fit.effects().rows]
        ['material', 'material', 'age_years']
        """
        chosen, mask = stated_rows(self.model, where)
        question = EffectsQuestion(
            predictors=(predictors,) if isinstance(predictors, str) else tuple(predictors),
            others=others if isinstance(others, str) else pairs(others),
            number=number,
            by=by,
            where=chosen,
            sample=sample,
            level=level,
        )
        return answer_effects(self.model, question, mask)

    def change(
        self,
        moves: str | Mapping[str, Any],
        start: Scalar | Shift | None = None,
        end: Scalar | None = None,
        *,
        others: Literal["observed", "typical"] | Mapping[str, Scalar] = "observed",
        where: Mapping[str, Any] | Any | None = None,
        sample: Literal["fixed", "drawn"] = "fixed",
        level: float = 0.95,
    ) -> ChangeAnswer:
        """What becomes of the chance when one or several predictors change?

        Parameters
        ----------
        moves : str or mapping
            A predictor, with `start` and `end`; or predictors that move together, each with
            (from, to) or a Shift, as ``{"age_years": (60, 0), "material": ("cast iron", "PVC")}``.
        start, end : scalar
            From where to where; or a single Shift, for everybody from his own value:
            ``change("age_years", po.Shift(by=-10, lowest=0))``.
        others, where, sample, level
            As in `effects`.

        Raises
        ------
        QuestionRefused
            For an unknown predictor, level or value, a change from a value to itself, a
            shift of levels, or a shift to where the formula cannot be computed.

        Notes
        -----
        One joint delta method for both chances, their difference and ratios, ratios on the
        log scale (Localio, Margolis & Berlin 2007, J Clin Epidemiol 60:874); the number
        needed in its two pieces where the difference's interval includes 0 (Altman 1998,
        BMJ 317:1309).

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years * material", pipes).fit(disp=0))
        >>> fit.change("age_years", 20, 60).comparison.risk_difference.estimate > 0
        True
        """
        chosen, mask = stated_rows(self.model, where)
        question = ChangeQuestion(
            stated_moves(moves, start, end),
            others=others if isinstance(others, str) else pairs(others),
            where=chosen,
            sample=sample,
            level=level,
        )
        return answer_change(self.model, question, mask)

    def pair(
        self,
        a: str,
        b: str,
        *,
        a_values: Sequence[Scalar] = (),
        b_values: Sequence[Scalar] = (),
        number: Literal["change", "slope"] = "change",
        others: Literal["typical", "observed"] | Mapping[str, Scalar] = "typical",
        scale: Literal["probability", "odds"] = "probability",
        shape: Literal["lines", "map"] = "lines",
        test: Literal["wald", "likelihood_ratio"] = "wald",
        level: float = 0.95,
    ) -> PairAnswer:
        """How do two predictors act together?

        The effect of `a` as `b` varies and where it differs from nothing; the interaction
        itself on the probability scale, at a profile and averaged over the rows, and on
        the odds scale; a test of all terms that join the two; and for two levels of each
        the joint table.

        Parameters
        ----------
        a, b : str
            Two predictors. The effect of `a` is followed as `b` varies.
        a_values, b_values : (from, to), optional
            The change of each that is compared. Default: a number goes from its lower to
            its upper quartile, a category from its reference to its most frequent other
            level.
        number : {"change", "slope"}
            How a number without stated values enters: by its change, or by dπ/dx per unit
            (on the odds scale: per step).
        others : {"typical", "observed"} or mapping
            What the remaining predictors do, as in `curve`.
        scale : {"probability", "odds"}
            Of the lines, the map and the effect; the interaction is told on both.
        shape : {"lines", "map"}
            Lines of one predictor by values of the other, or for two numbers also a map.
        test : {"wald", "likelihood_ratio"}
            Of the whole group of terms that join the two.
        level : float
            Confidence level.

        Raises
        ------
        QuestionRefused
            For the same predictor twice, an unknown predictor, level, value or setting, a
            level that no row has, a map of levels, or a test that the fit does not have.

        Notes
        -----
        On the probability scale the interaction is a cross difference or cross partial with
        its own delta-method interval, never a product's coefficient: it may differ from 0
        without any product term (Ai & Norton 2003, Economics Letters 80:123). Bounds of
        the stretches: Johnson & Neyman 1936; Bauer & Curran 2005 (Multivariate Behav Res
        40:373). Joint table: Knol & VanderWeele 2012 (Int J Epidemiol 41:514).

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years + material", pipes).fit(disp=0))
        >>> found = fit.pair("age_years", "material").interaction
        >>> found.joined, found.ratio.estimate, found.at_profile.estimate < 0
        (False, 1.0, True)
        """
        question = PairQuestion(
            a,
            b,
            a_values=listed_values(a_values),
            b_values=listed_values(b_values),
            number=number,
            others=others if isinstance(others, str) else pairs(others),
            scale=scale,
            shape=shape,
            test=test,
            level=level,
        )
        return answer_pair(self.model, question)

    def profile(
        self,
        values: Mapping[str, Scalar] | None = None,
        against: Mapping[str, Scalar] | None = None,
        *,
        level: float = 0.95,
    ) -> ProfileAnswer:
        """What is the chance for this profile, and what makes it so?

        Parameters
        ----------
        values : mapping of name to value
            Stated values; the remaining predictors are typical.
        against : mapping of name to value, optional
            A second profile to compare with.
        level : float
            Confidence level.

        Raises
        ------
        QuestionRefused
            For an unknown predictor or level, or a value that cannot be computed.

        Notes
        -----
        Wald interval on η, carried over to odds and probability (Agresti, Categorical
        Data Analysis); differences and ratios by one joint delta method (Localio 2007).

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years * material", pipes).fit(disp=0))
        >>> answer = fit.profile({"age_years": 80}, against={"age_years": 20})
        >>> answer.comparison.risk_difference.estimate > 0
        True
        """
        question = ProfileQuestion(
            pairs(values), None if against is None else pairs(against), level
        )
        return answer_profile(self.model, question)

    def soundness(
        self,
        *,
        show: Topic | Literal[""] = "",
        predictor: str = "",
        groups: str | Any | None = None,
        optimism: Literal["none", "bootstrap", "cross-validation"] = "none",
        repeats: int = 200,
        seed: int = 0,
        level: float = 0.95,
    ) -> SoundnessAnswer:
        """Is this fit fit to be explained?

        Parameters
        ----------
        show : str
            Which finding the picture shows: "convergence", "separation", "collinearity",
            "standard errors", "amount", "levels", "missing", "shape", "calibration",
            "influence", "dependence", "discrimination" or "overall"; default: the heaviest.
        predictor : str
            Whose shape is shown; default: the heaviest.
        groups : str, array or Series, optional
            Which rows belong together: a column of the data, or one value for each row that
            the fit used.
        optimism : {"none", "bootstrap", "cross-validation"}
            How much better the fit looks on its own data than it would on others; takes as
            many fits as there are repeats.
        repeats : int
            Bootstrap samples, or repeats of tenfold cross-validation.
        seed : int
            Of the resampling, so that the same question gives the same answer.
        level : float
            Confidence level.

        Raises
        ------
        QuestionRefused
            For an unknown topic, predictor or column, groups with missing values, or an
            optimism that cannot be had.

        Notes
        -----
        Separation: Albert & Anderson 1984 (Biometrika 71:1), Konis 2007. Shape: Landwehr,
        Pregibon & Shoemaker 1984 (JASA 79:61). Influence: Pregibon 1981 (Annals of Statistics
        9:705). Discrimination: DeLong, DeLong & Clarke-Pearson 1988 (Biometrics 44:837).
        Dependence: Liang & Zeger 1986 (Biometrika 73:13). Each check's module says where its
        thresholds come from.

        Examples
        --------
        >>> import statsmodels.formula.api as smf
        >>> import plainodds as po
        >>> pipes = po.demo.tessel_bay()
        >>> fit = po.FittedLogit(smf.logit("burst ~ age_years * material", pipes).fit(disp=0))
        >>> [each.concern for each in fit.soundness().findings if each.topic == "convergence"]
        ['nothing found']
        """
        stated, values = stated_groups(self.model, groups)
        question = SoundnessQuestion(
            show=show,
            predictor=predictor,
            groups=stated,
            optimism=optimism,
            repeats=repeats,
            seed=seed,
            level=level,
        )
        return answer_soundness(self.model, question, values)


def odds_of(
    results: Mapping[str, Any],
    predictors: str | Iterable[str] = (),
    *,
    steps: Mapping[str, float] | None = None,
    between: Mapping[str, Sequence[Scalar]] | None = None,
    references: Mapping[str, Scalar] | None = None,
    given: Mapping[str, Any] | None = None,
    order: Literal["model", "size"] = "model",
    interval: Literal["wald", "likelihood"] = "wald",
    level: float = 0.95,
    layout: Literal["changes", "table"] = "changes",
) -> OddsAnswer:
    """The same odds ratios in several fitted models, side by side.

    Parameters
    ----------
    results : mapping of name to result or FittedLogit
        As ``{"crude": r1, "adjusted": r2}``.
    predictors, steps, between, references, given, order, interval, level, layout
        As in `FittedLogit.odds`. Changes that are not stated are those of the first
        model that has the predictor.

    Raises
    ------
    QuestionRefused, FitRefused

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> pipes = po.demo.tessel_bay()
    >>> crude = smf.logit("burst ~ age_years", pipes).fit(disp=0)
    >>> adjusted = smf.logit("burst ~ age_years + material", pipes).fit(disp=0)
    >>> answer = po.odds_of({"crude": crude, "adjusted": adjusted}, "age_years")
    >>> [row.model for row in answer.rows]
    ['crude', 'adjusted']
    """
    fits = {
        str(name): result if isinstance(result, FittedLogit) else FittedLogit(result)
        for name, result in results.items()
    }
    question = odds_question(
        predictors, steps, between, references, given, order, interval, level, layout
    )
    return answer_odds_of({name: fit.model for name, fit in fits.items()}, question)
