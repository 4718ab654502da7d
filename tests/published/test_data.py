"""The open data are those that the published fits were made on.

Values are as remembered, and were reproduced by an independent calculation to the digits shown.
"""

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

from tests.published import data


def agree(found, published, digits=3):
    """Whether numbers agree with what was printed to so many digits."""
    half = 0.5000001 * 10.0**-digits
    np.testing.assert_allclose(np.asarray(found), np.asarray(published), rtol=0, atol=half)


def test_spector_and_mazzeo():
    """Greene, Econometric Analysis, the table of the logit model."""
    fit = smf.logit("GRADE ~ GPA + TUCE + PSI", data.spector()).fit(disp=0)
    agree(fit.params, [-13.021, 2.826, 0.095, 2.379])
    agree(fit.bse, [4.931, 1.263, 0.142, 1.065])
    agree(fit.llf, -12.890)


def test_low_birth_weight():
    """Hosmer, Lemeshow & Sturdivant, Applied Logistic Regression, ch. 2."""
    fit = smf.logit("low ~ age + lwt + race + ftv", data.births()).fit(disp=0)
    names = ["Intercept", "age", "lwt", "race[T.black]", "race[T.other]", "ftv"]
    agree(fit.params[names], [1.295, -0.024, -0.014, 1.004, 0.433, -0.049])
    agree(fit.bse[names], [1.071, 0.034, 0.007, 0.498, 0.362, 0.167])
    agree(fit.llf, -111.286)


def test_low_birth_weight_by_smoking_alone():
    """Hosmer, Lemeshow & Sturdivant, Applied Logistic Regression, ch. 3."""
    fit = smf.logit("low ~ smoke", data.births()).fit(disp=0)
    agree(np.exp(fit.params["smoke"]), 2.02, digits=2)
    agree(np.exp(fit.conf_int().loc["smoke"]), [1.08, 3.78], digits=2)


def test_vasoconstriction():
    """Pregibon 1981: coefficients on the logs, and the two cases that stand out."""
    frame = data.vasoconstriction()
    fit = smf.glm("Y ~ np.log(Volume) + np.log(Rate)", frame, family=sm.families.Binomial()).fit()
    agree(fit.params, [-2.875, 5.179, 4.562])
    assert set(fit.resid_pearson.abs().nlargest(2).index) == {4, 18}


def test_budworm():
    """Venables & Ripley, Modern Applied Statistics with S: sex + ldose without an intercept."""
    frame = data.budworm()
    assert (frame["dead"] + frame["alive"] == 20).all()
    fit = smf.glm("dead + alive ~ sex + log2_dose - 1", frame, family=sm.families.Binomial()).fit()
    agree(fit.params[["sex[female]", "sex[male]", "log2_dose"]], [-3.473, -2.372, 1.064])


@pytest.mark.parametrize(
    ("alcohol", "smoking", "odds_ratio"), [(1, 0, 2.96), (0, 1, 3.33), (1, 1, 9.04)]
)
def test_mouth_cancer(alcohol, smoking, odds_ratio):
    """Hosmer & Lemeshow 1992: odds ratios against those who neither drink nor smoke."""
    cells = data.mouth_cancer().set_index(["alcohol", "smoking"])
    odds = cells["cases"] / cells["controls"]
    agree(odds[alcohol, smoking] / odds[0, 0], odds_ratio, digits=2)
