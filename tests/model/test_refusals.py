"""What cannot be taken in or answered is refused, with the reason and the way out."""

import re

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from statsmodels.discrete.conditional_models import ConditionalLogit
from statsmodels.gam.api import BSplines, GLMGam
from statsmodels.genmod.generalized_estimating_equations import NominalGEE, OrdinalGEE
from statsmodels.miscmodels.ordinal_model import OrderedModel

from plainodds import FitRefused, FittedLogit, Outcome, Predictor, QuestionRefused
from tests.model import made

FRAME = made.cases()
EXOG = sm.add_constant(FRAME[["age", "depth"]])
links = sm.families.links

pytestmark = pytest.mark.filterwarnings("ignore")


def binomial(link):
    return made_glm(sm.families.Binomial(link=link))


def gee_binomial(link):
    family = sm.families.Binomial(link=link)
    return smf.gee("left ~ age", "group", FRAME, family=family).fit()


def made_glm(family, outcome="left"):
    return smf.glm(f"{outcome} ~ age", FRAME, family=family).fit()


def gam():
    smooth = BSplines(FRAME[["age"]], df=[5], degree=[3])
    return GLMGam(
        FRAME["left"], EXOG[["const"]], smoother=smooth, family=sm.families.Binomial()
    ).fit()


OTHER_MODELS = {
    "probit link": (lambda: binomial(links.Probit()), "link is Probit.*logit"),
    "cloglog link": (lambda: binomial(links.CLogLog()), "link is CLogLog.*logit"),
    "identity link": (lambda: gee_binomial(links.Identity()), "link is Identity.*logit"),
    "GEE, probit link": (lambda: gee_binomial(links.Probit()), "GEE's link is Probit.*logit"),
    "Poisson GLM": (lambda: made_glm(sm.families.Poisson()), "family is Poisson.*Binomial"),
    "Gaussian GLM": (lambda: made_glm(sm.families.Gaussian()), "family is Gaussian.*Binomial"),
    "Poisson": (lambda: sm.Poisson(FRAME["visits"], EXOG).fit(disp=0), "Poisson is not.*Fit Logit"),
    "Probit": (lambda: sm.Probit(FRAME["left"], EXOG).fit(disp=0), "Probit is not.*fit a Logit"),
    "OLS": (lambda: sm.OLS(FRAME["left"], EXOG).fit(), "OLS is not.*Fit Logit"),
    "MNLogit": (
        lambda: sm.MNLogit(FRAME["code"], EXOG).fit(disp=0),
        "MNLogit is not.*one Logit per comparison",
    ),
    "OrderedModel": (
        lambda: OrderedModel(FRAME["soil"], FRAME[["age"]], distr="logit").fit(disp=0),
        "OrderedModel is not.*'at or above'",
    ),
    "ConditionalLogit": (
        lambda: ConditionalLogit(
            FRAME["left"], FRAME[["age"]], groups=FRAME["group"] // 10
        ).fit(disp=0),
        "ConditionalLogit is not.*GEE with the groups",
    ),
    "NominalGEE": (
        lambda: NominalGEE(FRAME["code"], EXOG, FRAME["group"]).fit(),
        "NominalGEE is not.*Fit Logit",
    ),
    "OrdinalGEE": (
        lambda: OrdinalGEE(FRAME["left"], EXOG[["age"]], FRAME["group"]).fit(maxiter=2),
        "OrdinalGEE is not.*Fit Logit",
    ),
    "GLMGam": (gam, r"GLMGam penalises.*bs\(x, df="),
    "a model that was not fitted": (lambda: made.logit("left ~ age", FRAME), r"fit\(\) returns"),
    "no model at all": (lambda: {"age": 1}, r"A dict is not a fitted.*fit\(\)"),
    "no predictor": (lambda: made.logit("left ~ 1", FRAME).fit(disp=0), "only an intercept.*Add"),
}  # fmt: skip


@pytest.mark.parametrize("what", OTHER_MODELS)
def test_other_models_are_refused(what):
    make, message = OTHER_MODELS[what]
    with pytest.raises(FitRefused, match=f"(?s){message}"):
        FittedLogit(make())


def with_outcome(values, fit):
    return fit(FRAME.assign(outcome=values))


def gee_of(frame):
    return made.gee("outcome ~ age", frame).fit()


def glm_of(frame):
    return made.glm("outcome ~ age", frame).fit()


OUTCOMES = {
    "coded 1 and 2": (FRAME["left"] + 1, glm_of, r"values 1, 2.*df\['outcome'\] == 2"),
    "coded 1 and 2, GEE": (FRAME["left"] + 1, gee_of, r"values 1, 2.*df\['outcome'\] == 2"),
    "coded -1 and 1": (2 * FRAME["left"] - 1, glm_of, r"values -1, 1.*df\['outcome'\] == 1"),
    "counted": (FRAME["visits"], glm_of, "values 0, 1, 2.*Recode"),
    "always 0": (0 * FRAME["left"], glm_of, "is 0 in every row.*Check how it is coded"),
    "always 1": (0 * FRAME["left"] + 1, gee_of, "is 1 in every row.*Check how it is coded"),
}


@pytest.mark.parametrize("what", OUTCOMES)
def test_outcomes_that_are_not_two_valued_are_refused(what):
    values, kind, message = OUTCOMES[what]
    result = kind(FRAME.assign(outcome=values))
    with pytest.raises(FitRefused, match=message):
        FittedLogit(result)


def swapped(frame):
    return frame.iloc[::-1].reset_index(drop=True)


def glm_with(formula):
    return made.glm(formula, FRAME).fit()


DATA = {
    "rows missing": (FRAME.iloc[:-5], r"235 rows and the fit used 240.*dropna"),
    "rows in excess": (pd.concat([FRAME, FRAME]), "480 rows and the fit used 240.*dropna"),
    "rows reordered": (swapped(FRAME), "do not match.*row 0.*unchanged"),
    "two rows exchanged": (FRAME.iloc[[1, 0, *range(2, 240)]], "do not match.*row 0"),
    "a number changed": (
        FRAME.assign(age=FRAME["age"].where(FRAME.index != 99, 5.0)),
        "do not match: in row 99 of the rows used, age is .* in the fit and 5 in the data",
    ),
    "a level exchanged": (
        FRAME.assign(site=FRAME["site"].replace({"a": "b", "b": "a"})),
        r"do not match.*site\[T.b\]",
    ),
    "a level that is new": (
        FRAME.assign(site=FRAME["site"].replace({"a": "z"})),
        r"do not match|cannot be computed anew",
    ),
    "a value gone missing": (
        FRAME.assign(age=FRAME["age"].where(FRAME.index != 7)),
        "'age' has 1 missing values.*data=frame",
    ),
    "text where the fit had numbers": (
        FRAME.assign(age=FRAME["age"].map("{:.1f} years".format)),
        "cannot be computed anew.*could not convert",
    ),
    "a column gone": (FRAME.drop(columns="age"), "age"),
    "not a frame": (FRAME.to_numpy(), "data= is a ndarray.*DataFrame"),
    "two columns of one name": (
        pd.concat([FRAME, FRAME[["age"]]], axis=1),
        "Two columns are named 'age'.*name of its own",
    ),
}


@pytest.mark.parametrize("what", DATA)
def test_data_that_are_not_the_fits_are_refused(what):
    data, message = DATA[what]
    result = glm_with("left ~ age + site")
    with pytest.raises(FitRefused, match=message):
        FittedLogit(result, data=data)


FITS = {
    "dates": (lambda: glm_with("left ~ I(when.dt.year) + age"), "dates.*years since"),
    "numbers of few digits": (
        lambda: made.glm("left ~ np.log(year)", FRAME.astype({"year": "float16"})).fit(),
        "differ in the last digits.*float64",
    ),
    "from other rows": (
        lambda: glm_with("left ~ I(age - age.mean())"),
        r"from other rows too.*center\(\)",
    ),
    "ranks": (lambda: glm_with("left ~ age.rank()"), "from other rows too.*column of the data"),
    "quantile bands": (
        lambda: glm_with("left ~ C(quartile(age))"),
        "(?s)cannot be computed anew.*Make a column of it in the data",
    ),
    "a function of one's own, formulaic": (
        lambda: fit_formulaic("left ~ quartile(age)"),
        r"quartile\(age\) cannot be computed anew.*functions=\{'name': name\}",
    ),
    "two columns of one name": (
        lambda: sm.Logit(
            FRAME["left"], pd.concat([EXOG, EXOG["age"] ** 2], axis=1)
        ).fit(disp=0),
        "Two columns are named 'age'",
    ),
}  # fmt: skip


def quartile(values):
    return pd.qcut(values, 4, labels=False)


def fit_formulaic(formula):
    with made.formula_engine("formulaic"):
        return smf.glm(formula, FRAME, family=sm.families.Binomial()).fit()


@pytest.mark.parametrize("what", FITS)
def test_fits_that_cannot_be_explained_are_refused(what, monkeypatch):
    monkeypatch.setattr(made, "quartile", quartile, raising=False)
    when = pd.Timestamp("2020-01-01") + pd.to_timedelta(FRAME["visits"] * 200, unit="D")
    monkeypatch.setitem(globals(), "FRAME", FRAME.assign(when=when))
    make, message = FITS[what]
    result = make()
    with pytest.raises(FitRefused, match=message):
        FittedLogit(result)


def stated(name, **fields):
    return {"predictors": {name: Predictor(**fields)}}


STATEMENTS = {
    "predictors, not a dict": ({"predictors": [Predictor()]}, "predictors= is a list.*dict"),
    "predictors, not a Predictor": ({"predictors": {"age": "Age"}}, "state it as a Predictor"),
    "predictors, unknown": (stated("height"), "'height'.*does not use.*It uses.*age"),
    "predictors, unused column": (stated("money"), "'money'.*does not use"),
    "outcome, not an Outcome": ({"outcome": "left"}, "outcome='left'.*Outcome"),
    "outcome, unknown level": ({"outcome": Outcome(level=7)}, "7.*levels 0 and 1"),
    "derived, not a dict": ({"derived": "age**2"}, "derived= is a str.*dict"),
    "derived, not text": ({"derived": {"age": 2}}, "as text"),
    "functions, not a dict": ({"functions": [abs]}, "functions= is a list.*dict"),
    "functions, not a function": ({"functions": {"f": 1}}, "is no function"),
    "offset, not a number": ({"offset": "median"}, "offset='median' is not a number"),
    "offset, none to hold": ({"offset": 1.0}, "no offset to hold.*Leave offset= out"),
    "label": (stated("age", label=3), "label=3 is not text"),
    "kind": (stated("age", kind="ordinal"), "kind='ordinal'; choose one of 'number'"),
    "kind, number of text": (stated("site", kind="number"), "stated as a number.*Leave kind= out"),
    "kind, yes/no of text": (stated("site", kind="yes/no"), "stated as yes/no.*Leave kind= out"),
    "kind, yes/no of numbers": (stated("age", kind="yes/no"), "other than 0 and 1.*Leave kind="),
    "kind, whole of fractions": (stated("age", kind="whole number"), "between whole.*'number'"),
    "kind, number of yes/no": (stated("flag", kind="number"), "holds yes/no.*Leave kind="),
    "step of 0": (stated("age", step=0), "step=0 is not a number above 0"),
    "step below 0": (stated("age", step=-1.0), "step=-1.0 is not a number above 0"),
    "step, text": (stated("age", step="10"), "step='10' is not a number above 0"),
    "step, infinite": (stated("age", step=np.inf), "step=inf is not a number above 0"),
    "step of levels": (stated("site", step=1), "has levels, so step= has no meaning"),
    "range, reversed": (stated("age", range=(9, 1)), "range=.*lowest below"),
    "range of one": (stated("age", range=(1,)), "range=.*lowest below"),
    "range, no pair": (stated("age", range=5), "range=5 is not"),
    "range, text": (stated("age", range=("1", "9")), "range=.*lowest below"),
    "range, missing": (stated("age", range=(1, np.nan)), "range=.*lowest below"),
    "range of levels": (stated("site", range=(0, 1)), "has levels, so range= has no meaning"),
    "range, beyond a logarithm": (stated("money", range=(-9, 9)), "-9 to 9 goes beyond"),
    "range, beyond a spline": (stated("depth", range=(-99, 99)), "-99 to 99 goes beyond"),
    "typical, text": (stated("age", typical="old"), "typical='old' is not a number.*median"),
    "typical, missing": (stated("age", typical=np.nan), "typical=nan is not a number"),
    "typical, outside the range": (stated("age", range=(1, 5), typical=6), "outside range="),
    "typical, beyond a spline": (stated("depth", typical=99), "goes beyond"),
    "typical, no level": (stated("site", typical="z"), r"no level 'z'.*\['a', 'b', 'c'\]"),
    "typical, a list": (stated("age", typical=[1]), "is not a single number"),
    "levels, unknown": (stated("site", levels=("a", "b", "z")), "must name each.*'a', 'b', 'c'"),
    "levels, incomplete": (stated("site", levels=("a", "b")), "must name each"),
    "levels, twice": (stated("site", levels=("a", "b", "c", "a")), "must name each"),
    "levels, text": (stated("site", levels="abc"), r"write levels=\("),
    "levels of a number": (stated("age", levels=(1, 2)), "is a number.*kind='category'"),
    "levels of yes/no": (stated("flag", levels=("no", "yes")), "must name each.*False, True"),
    "level labels, unknown": (stated("site", level_labels={"z": "Zed"}), "no level 'z'"),
    "level labels, text": (stated("site", level_labels="abc"), "level_labels=.*write"),
    "level labels, no pairs": (stated("site", level_labels=[("a", "b", "c")]), "dict from level"),
    "level labels of a number": (stated("age", level_labels={1: "one"}), "no levels to label"),
}


@pytest.fixture(scope="module")
def explained():
    return glm_with("left ~ age + site + flag + bs(depth, df=4) + np.log(visits + 1)")


@pytest.mark.parametrize("what", STATEMENTS)
def test_impossible_statements_are_refused(what, explained):
    arguments, message = STATEMENTS[what]
    result = glm_with("left ~ age + np.log(money + 1)") if "logarithm" in what else explained
    with pytest.raises(FitRefused, match=message):
        FittedLogit(result, **arguments)


PROFILES = {
    "unknown predictor": ({"height": 1}, "no predictor 'height'.*It has:.*age"),
    "unknown level": ({"site": "z"}, "site has no level 'z'. It has 'a', 'b', 'c'"),
    "number where a level belongs": ({"site": 1}, "site has no level 1. It has 'a'"),
    "text where a number belongs": ({"age": "old"}, "age is a number, and 'old' is text"),
    "digits in quotes": ({"age": "4"}, "age is a number, and '4' is text.*without quotes"),
    "text where yes or no belongs": ({"flag": "yes"}, "flag has no level 'yes'. It has False"),
    "missing number": ({"age": np.nan}, "age: a missing value"),
    "missing level": ({"site": None}, "site: a missing value"),
    "pandas' missing value": ({"site": pd.NA}, "site: a missing value"),
    "pandas' missing time": ({"age": pd.NaT}, "age: a missing value"),
    "numpy's missing value": ({"age": np.float64("nan")}, "age: a missing value"),
    "infinite": ({"age": np.inf}, "age: inf is not a finite number"),
    "beyond a spline, above": ({"depth": 99}, "depth = 99:.*only from.*spline"),
    "beyond a spline, below": ({"depth": -99}, "depth = -99:.*only from.*spline"),
    "beyond a logarithm": ({"visits": -1}, "visits = -1:.*only from.*logarithm"),
    "several values": ({"age": [1, 2]}, r"age is a number, and \[1, 2\]"),
    "several levels": ({"site": ["a"]}, "site has no level"),
    "a date": ({"age": pd.Timestamp("2020-01-01")}, "age is a number, and Timestamp"),
}


@pytest.mark.parametrize("engine", made.ENGINES)
@pytest.mark.parametrize("what", PROFILES)
def test_impossible_values_are_refused(what, engine):
    values, message = PROFILES[what]
    with pytest.raises(QuestionRefused, match=message):
        explained_by(engine).model.completed(values)


def explained_by(engine, cache={}):  # noqa: B006
    if engine not in cache:
        with made.formula_engine(engine):
            formula = "left ~ age + site + flag + bs(depth, df=4) + np.log(visits + 1)"
            cache[engine] = FittedLogit(made.glm(formula, FRAME).fit())
    return cache[engine]


def test_a_value_that_a_joint_factor_cannot_take_is_refused():
    fit = FittedLogit(glm_with("left ~ np.log(age + 10 + depth)"))
    assert fit.subject.predictor("depth").allowed == (-np.inf, np.inf)
    with pytest.raises(QuestionRefused, match="not a number for some of these values"):
        fit.profile({"depth": -99})


def test_every_refusal_reads_as_sentences():
    messages = []
    for make, _ in OTHER_MODELS.values():
        with pytest.raises(FitRefused) as refused:
            FittedLogit(make())
        messages.append(str(refused.value))
    assert all(re.search(r"^[A-Z][^\n]*\.$", message) for message in messages)
