"""Rows that belong together: standard errors as if they were strangers, and by groups."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.formula.api as smf

from plainodds.answers.checks.dependence import covariance_by_groups, dependence_of
from plainodds.answers.groups import grouping, stated_groups
from plainodds.values import from_json, to_json
from tests.answers.checks.fits import binomial, invented, logit, model_of


def clinics(groups=60, each=10, shared=1.0, seed=0):
    """Cases in clinics, which share a liking of the event and one of their predictors."""
    draw = np.random.default_rng(seed)
    clinic = np.repeat(np.arange(groups), each)
    size, x = draw.normal(size=groups)[clinic], draw.normal(size=groups * each)
    eta = -0.5 + 0.5 * x + 0.3 * size + shared * draw.normal(size=groups)[clinic]
    y = (draw.uniform(size=len(x)) < 1 / (1 + np.exp(-eta))).astype(int)
    return pd.DataFrame({"y": y, "x": x, "size": size, "clinic": clinic})


DATA = clinics()
FORMULA = "y ~ x + size"


def by(model, groups):
    stated, values = stated_groups(model, groups)
    return grouping(model, stated, values)


def found(frame, groups="clinic", formula=FORMULA):
    model = logit(formula, frame)
    return dependence_of(model, by(model, groups))


# --- the covariance by groups ------------------------------------------------------


@pytest.mark.filterwarnings("ignore:cov_type not fully supported")
@pytest.mark.parametrize("kind", ["plain", "frequency weights", "offset", "no intercept"])
def test_standard_errors_by_groups_are_statsmodels_but_for_its_correction(kind):
    stated = {
        "frequency weights": {"freq_weights": DATA.index.to_numpy() % 3 + 1},
        "offset": {"offset": np.linspace(-1, 1, len(DATA))},
    }.get(kind, {})
    formula = "y ~ 0 + x + size" if kind == "no intercept" else FORMULA
    glm = smf.glm(formula, DATA, family=binomial(), **stated)
    theirs = glm.fit(
        tol=1e-12,
        cov_type="cluster",
        cov_kwds={"groups": DATA.clinic, "use_correction": False, "df_correction": False},
    )
    model = model_of(glm.fit(tol=1e-12))
    ours = covariance_by_groups(model, by(model, "clinic"))
    assert ours == pytest.approx(theirs.cov_params().to_numpy() * 60 / 59, rel=1e-6)


def test_statsmodels_own_correction_is_ours_times_that_for_coefficients():
    glm = smf.logit(FORMULA, DATA)
    theirs = glm.fit(disp=0, cov_type="cluster", cov_kwds={"groups": DATA.clinic})
    model = model_of(glm.fit(disp=0))
    ours = np.sqrt(np.diag(covariance_by_groups(model, by(model, "clinic"))))
    n, k = len(DATA), 3
    assert theirs.bse.to_numpy() == pytest.approx(ours * np.sqrt((n - 1) / (n - k)), rel=1e-6)


def test_counts_of_a_row_belong_together():
    frame = pd.DataFrame({"dead": [1, 4, 9, 13, 18, 20], "dose": range(6), "g": list("aabbcc")})
    frame["alive"] = 20 - frame.dead
    model = model_of(smf.glm("dead + alive ~ dose", frame, family=binomial()).fit(tol=1e-12))
    pi, m = 1 / (1 + np.exp(-(model.sample.matrix @ model.coefficients))), 20
    scores = model.sample.matrix * (frame.dead - m * pi).to_numpy()[:, None]
    summed = scores.reshape(3, 2, 2).sum(axis=1)
    expected = model.information_inverse @ summed.T @ summed @ model.information_inverse * 3 / 2
    assert covariance_by_groups(model, by(model, "g")) == pytest.approx(expected)


# --- concerns ----------------------------------------------------------------------


def test_both_standard_errors_stand_side_by_side():
    model = logit(FORMULA, DATA)
    evidence = dependence_of(model, by(model, "clinic")).evidence
    assert (evidence.name, evidence.groups, evidence.largest) == ("clinic", 60, 10)
    assert (evidence.rows, evidence.already) == (600, False)
    pairs = {pair.column: pair for pair in evidence.standard_errors}
    assert pairs["size"].predictors == ("size",)
    assert pairs["size"].model_based == pytest.approx(np.sqrt(model.covariance[2, 2]), rel=1e-6)


def test_shared_fates_of_a_predictor_that_groups_share_raise_a_concern():
    finding = found(clinics(shared=1.0))
    assert (finding.concern, finding.reasons) == ("keep in mind", ("standard errors differ",))
    assert finding.about == ("size",)


def test_intervals_half_as_wide_as_they_should_be_forbid_explaining():
    finding = found(clinics(each=40, shared=1.5))
    assert finding.concern == "don't explain yet"
    pair = next(each for each in finding.evidence.standard_errors if each.column == "size")
    assert pair.by_groups > 2 * pair.model_based


def test_strangers_put_into_groups_raise_none():
    assert found(clinics(shared=0.0)).concern == "nothing found"


def test_groups_of_one_row_each_raise_none():
    finding = found(DATA, groups=np.arange(len(DATA)))
    assert (finding.concern, finding.evidence.largest) == ("nothing found", 1)


def test_few_groups_are_told():
    finding = found(clinics(groups=12, each=50, shared=0.0))
    assert (finding.concern, finding.reasons) == ("keep in mind", ("few groups",))


def test_false_alarms_are_seldom():
    alarms = 0
    for seed in range(60):
        frame = invented(500, seed=seed)
        groups = np.random.default_rng(seed).integers(0, 40, 500)
        alarms += found(frame, groups, "y ~ x + w + count + group").concern != "nothing found"
    assert alarms <= 6


# --- fits that know their groups ---------------------------------------------------


@pytest.mark.parametrize("named", [True, False])
def test_a_fit_with_clustered_standard_errors_takes_groups_into_account_already(named):
    frame = clinics(each=40, shared=1.5)
    result = smf.logit(FORMULA, frame).fit(
        disp=0, cov_type="cluster", cov_kwds={"groups": frame.clinic}
    )
    model = model_of(result)
    finding = dependence_of(model, by(model, "clinic") if named else None)
    assert (finding.concern, finding.evidence.already) == ("nothing found", True)
    size = finding.evidence.standard_errors[2]
    assert size.by_groups == pytest.approx(result.bse["size"], rel=2e-3)
    assert size.by_groups > 2 * size.model_based


def test_a_gee_takes_groups_into_account_already():
    model = model_of(smf.gee(FORMULA, "clinic", DATA, family=binomial()).fit())
    finding = dependence_of(model, None)
    assert (finding.concern, finding.evidence.already) == ("nothing found", True)
    assert dependence_of(model, by(model, "clinic")).concern == "nothing found"


def test_a_robust_covariance_that_knows_no_groups_takes_none_into_account():
    model = model_of(smf.logit(FORMULA, DATA).fit(disp=0, cov_type="HC1"))
    assert not dependence_of(model, by(model, "clinic")).evidence.already


# --- what cannot be known ----------------------------------------------------------


def test_without_groups_nothing_is_known():
    finding = dependence_of(logit(FORMULA, DATA), None)
    assert (finding.concern, finding.unknown) == ("not known", "no groups named")


def test_without_an_outcome_repeated_rows_are_all_that_is_known():
    result = smf.glm(FORMULA, DATA, family=binomial()).fit()
    result.remove_data()
    model = model_of(result, data=DATA)
    finding = dependence_of(model, by(model, "clinic"))
    assert (finding.concern, finding.reasons) == ("keep in mind", ("repeated rows",))
    assert finding.unknown == "no outcome"
    assert (finding.evidence.groups, finding.evidence.standard_errors) == (60, ())
    alone = dependence_of(model, by(model, np.arange(len(DATA))))
    assert (alone.concern, alone.unknown) == ("nothing found", "no outcome")


def test_a_penalised_fit_has_no_standard_errors_to_compare():
    model = model_of(smf.logit(FORMULA, DATA).fit_regularized(alpha=1.0, disp=0))
    finding = dependence_of(model, by(model, "clinic"))
    assert (finding.reasons, finding.unknown) == (("repeated rows",), "no covariance")
    assert finding.evidence.standard_errors == ()


def test_the_finding_goes_to_json_and_back():
    finding = found(DATA)
    assert from_json(to_json(finding)) == finding
