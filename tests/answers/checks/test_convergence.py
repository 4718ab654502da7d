"""Whether a fit ended where the likelihood is highest."""

import math

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.checks.convergence import convergence_of
from tests.model import made

FRAME = made.cases()
FORMULA = "left ~ age + depth + site"

pytestmark = pytest.mark.filterwarnings("ignore")


def found(result):
    return convergence_of(po.FittedLogit(result).model)


WHOLE = {
    "Logit": lambda: made.logit(FORMULA, FRAME).fit(disp=0),
    "GLM": lambda: made.glm(FORMULA, FRAME).fit(),
    "GLM, weighted": lambda: made.glm(FORMULA, FRAME, freq_weights=FRAME["visits"] + 1).fit(),
    "GLM, variance weights": lambda: made.glm(FORMULA, FRAME, var_weights=FRAME["class"]).fit(),
    "GLM, offset": lambda: made.glm(FORMULA, FRAME, offset=FRAME["real"].astype(float)).fit(),
    "GLM, robust": lambda: made.glm(FORMULA, FRAME).fit(cov_type="HC1"),
    "GLM, counts": lambda: made.glm(
        "visits + six ~ age + depth", FRAME.assign(six=6 - FRAME["visits"])
    ).fit(),
    "no intercept": lambda: made.glm("left ~ age + depth - 1", FRAME).fit(),
    "the other level": lambda: made.glm("flag ~ age + depth", FRAME).fit(),
}


@pytest.mark.parametrize("kind", WHOLE)
def test_a_fit_that_converged_stands_at_the_optimum(kind):
    finding = found(WHOLE[kind]())
    assert (finding.concern, finding.reasons) == ("nothing found", ())
    assert finding.evidence.converged is True
    assert finding.evidence.remaining_step < 1e-3


@pytest.mark.parametrize("kind", [made.glm, made.logit])
def test_a_fit_stopped_after_one_iteration_has_a_step_to_go(kind):
    quiet = {"disp": 0} if kind is made.logit else {}
    result = kind(FORMULA, FRAME).fit(maxiter=1, **quiet)
    whole = kind(FORMULA, FRAME).fit(**quiet)
    finding = found(result)
    assert finding.reasons == ("not converged", "gradient")
    assert finding.concern == "don't explain yet"
    evidence = finding.evidence
    assert (evidence.converged, evidence.iterations) == (False, 1)
    # what is left to go, in standard errors, is about what the whole fit went
    gone = ((whole.params - result.params) / whole.bse).abs()
    assert evidence.remaining_step == pytest.approx(gone.max(), rel=0.3)
    assert evidence.coefficient == gone.idxmax()


def test_the_remaining_step_is_newtons():
    model = made.logit(FORMULA, FRAME)
    result = model.fit(maxiter=2, disp=0)
    information = -model.hessian(result.params)
    inverse = np.linalg.inv(information)
    step = np.abs(inverse @ model.score(result.params)) / np.sqrt(np.diag(inverse))
    finding = found(result)
    assert finding.evidence.remaining_step == pytest.approx(step.max(), rel=1e-6)


def test_a_fit_that_complains_at_the_optimum_is_to_be_kept_in_mind():
    model = made.logit(FORMULA, FRAME)
    best = model.fit(disp=0)
    result = model.fit(start_params=best.params, method="bfgs", maxiter=0, disp=0)
    result.mle_retvals["converged"] = False
    finding = found(result)
    assert (finding.concern, finding.reasons) == ("keep in mind", ("not converged",))


def test_a_fit_that_says_it_converged_is_not_believed_when_a_step_is_left():
    result = made.glm(FORMULA, FRAME).fit(tol=1e3)
    assert result.converged
    finding = found(result)
    assert finding.reasons == ("gradient",)
    assert finding.about == tuple(
        name for name in ("age", "depth", "site") if name in finding.evidence.coefficient
    )


def test_estimating_equations_are_not_judged_by_the_likelihood():
    finding = found(made.gee(FORMULA, FRAME, cov_struct=sm.cov_struct.Exchangeable()).fit())
    assert (finding.concern, finding.unknown) == ("nothing found", "no likelihood")
    assert finding.evidence.converged is True
    assert math.isnan(finding.evidence.remaining_step)
    stopped = found(
        made.gee(FORMULA, FRAME, cov_struct=sm.cov_struct.Exchangeable()).fit(maxiter=1, ctol=0)
    )
    assert (stopped.concern, stopped.reasons) == ("don't explain yet", ("not converged",))


def test_a_penalised_or_constrained_fit_is_not_judged_by_the_likelihood():
    penalised = made.logit(FORMULA, FRAME).fit_regularized(alpha=1.0, disp=0)
    constrained = made.glm(FORMULA, FRAME).fit_constrained("age = depth")
    for result in (penalised, constrained):
        finding = found(result)
        assert "gradient" not in finding.reasons
        assert finding.unknown in ("no likelihood", "not said by the fit")


def test_without_data_the_fits_own_word_is_all():
    result = smf.glm("left ~ age", FRAME, family=sm.families.Binomial()).fit()
    result.remove_data()
    finding = convergence_of(po.FittedLogit(result, data=FRAME).model)
    assert (finding.concern, finding.unknown) == ("nothing found", "no outcome")
    assert finding.evidence.converged is True


def test_tied_columns_do_not_hide_how_the_fit_ended():
    result = made.glm("left ~ age + I(2 * age)", FRAME).fit()
    assert found(result).evidence.remaining_step < 1e-3
