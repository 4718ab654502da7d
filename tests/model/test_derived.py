"""Columns that move with another one do so once they are declared, and only if it is true."""

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm

from plainodds import FitRefused, FittedLogit
from tests.model import made


def worked():
    """Columns that an analyst has worked out herself."""
    frame = made.cases()
    frame["age_sq"] = frame["age"] ** 2
    frame["log_age"] = np.log(frame["age"])
    frame["age_depth"] = frame["age"] * frame["depth"]
    frame["site_b"] = (frame["site"] == "b").astype(float)
    frame["site_c"] = (frame["site"] == "c").astype(float)
    frame["age_b"] = frame["age"] * frame["site_b"]
    frame["rich"] = frame["money"] > 1e5
    frame["old"] = np.where(frame["age"] > 5, "old", "young")
    frame["above_5"] = np.maximum(frame["age"] - 5, 0)
    frame["a b sq"] = frame["a b"] ** 2
    return frame


FRAME = worked()

# columns of the design, what is declared, and the same model as a formula
PAIRS = {
    "square": (["age", "age_sq"], {"age_sq": "age ** 2"}, "age + I(age**2)"),
    "logarithm": (["log_age"], {"log_age": "log(age)"}, "np.log(age)"),
    "numpy's logarithm": (["log_age"], {"log_age": "np.log(age)"}, "np.log(age)"),
    "product": (
        ["age", "depth", "age_depth"], {"age_depth": "age * depth"}, "age + depth + age:depth",
    ),
    "dummies": (
        ["site_b", "site_c", "age"],
        {"site_b": "site == 'b'", "site_c": "where(site == 'c', 1, 0)"},
        "site + age",
    ),
    "dummies and a product": (
        ["site_b", "site_c", "age", "age_b"],
        {"site_b": "site == 'b'", "site_c": "site == 'c'", "age_b": "age * (site == 'b')"},
        "site + age + age:I((site == 'b') * 1.0)",
    ),
    "hinge": (
        ["age", "above_5"], {"above_5": "maximum(age - 5, 0)"}, "age + np.maximum(age - 5, 0)",
    ),
    "a name with a blank": (
        ["a b", "a b sq"], {"a b sq": "Q('a b') ** 2"}, "Q('a b') + I(Q('a b')**2)",
    ),
}  # fmt: skip


def without_formula(columns, derived):
    exog = sm.add_constant(FRAME[columns])
    result = sm.GLM(FRAME["left"], exog, family=sm.families.Binomial()).fit()
    return FittedLogit(result, data=FRAME, derived=derived)


def with_formula(formula):
    return FittedLogit(made.glm(f"left ~ {formula}", FRAME).fit())


@pytest.mark.parametrize("what", PAIRS)
def test_a_declared_column_moves_as_in_the_formula(what):
    columns, derived, formula = PAIRS[what]
    declared, written = without_formula(columns, derived), with_formula(formula)
    names = sorted(facts.name for facts in written.subject.predictors)
    assert sorted(facts.name for facts in declared.subject.predictors) == names
    assert not set(names) & set(derived)
    for name in names:
        one, other = declared.subject.predictor(name), written.subject.predictor(name)
        assert (one.kind, one.levels, one.linear) == (other.kind, other.levels, other.linear)
        assert one.allowed == pytest.approx(other.allowed, nan_ok=True)
        scales = ["probability", "slope"] if one.is_number else ["probability"]
        for scale in scales:
            for others in ("typical", "observed"):
                at = tuple(one.quartiles) if one.is_number else one.levels
                asked = {"scale": scale, "others": others, "at": at}
                line = declared.curve(name, **asked).lines[0]
                same = written.curve(name, **asked).lines[0]
                np.testing.assert_allclose(line.estimate, same.estimate, rtol=1e-6, atol=1e-9)
                np.testing.assert_allclose(line.se, same.se, rtol=1e-6, atol=1e-9)


def test_without_a_declaration_the_column_stays_behind():
    held = without_formula(["age", "age_sq"], {})
    moving = without_formula(["age", "age_sq"], {"age_sq": "age ** 2"})
    assert {facts.name for facts in held.subject.predictors} == {"age", "age_sq"}
    assert (
        held.profile({"age": 2}).point.probability != moving.profile({"age": 2}).point.probability
    )


@pytest.mark.parametrize("engine", made.ENGINES)
def test_derived_columns_may_stand_in_a_formula(engine):
    with made.formula_engine(engine):
        result = made.glm("left ~ age + age_sq * site + rich + old", FRAME).fit()
    derived = {
        "age_sq": "age ** 2",
        "rich": "money > 1e5",
        "old": "where(age > 5, 'old', 'young')",
    }
    fit = FittedLogit(result, derived=derived)
    assert sorted(facts.name for facts in fit.subject.predictors) == ["age", "money", "site"]
    profiles = [{"age": 3.0, "money": 0.0}, {"age": 7.0, "money": 9e5, "site": "c"}]
    new = pd.DataFrame([{**dict(fit.model.typical), **profile} for profile in profiles])
    new = new.assign(
        age_sq=new["age"] ** 2,
        rich=new["money"] > 1e5,
        old=np.where(new["age"] > 5, "old", "young"),
    )
    expected = made.predicted(result, new, engine)
    np.testing.assert_allclose(made.chances(fit, profiles), expected, rtol=1e-12)
    assert fit.subject.setting.derived == tuple(derived.items())


WRONG = {
    "another power": (
        {"age_sq": "age ** 3"},
        r"'age \*\* 3'\} does not hold: in row 0 of the rows used age_sq is .* gives",
    ),
    "wrong in one row": (
        {"age_sq": "where(age == age.max(), 0, age ** 2)"}, "does not hold: in row",
    ),
    "from other rows": ({"age_sq": "age ** 2 + age.min() - age.min()"}, None),
    "not Python": ({"age_sq": "age ^^ 2"}, "is not a Python expression"),
    "an unknown column": ({"age_sq": "height ** 2"}, "reads height, which the data don't have"),
    "an unknown function": ({"age_sq": "square(age)"}, "cannot be computed: .*square.*log, sqrt"),
    "arithmetic of text": ({"age_sq": "site ** 2"}, "cannot be computed"),
    "a column that isn't used": ({"rich": "money > 1e5"}, "'rich'.*not a column that the model"),
    "a column that there isn't": ({"height": "age ** 2"}, "'height'.*not a column that the model"),
    "itself": ({"age_sq": "age_sq * 1"}, "derived itself"),
    "another derived column": ({"age_sq": "depth ** 2", "depth": "age"}, "derived itself"),
    "text for a number": ({"age_sq": "site"}, "does not hold: in row 0"),
}  # fmt: skip


@pytest.mark.parametrize("what", WRONG)
def test_a_wrong_declaration_is_refused_naming_the_row(what):
    derived, message = WRONG[what]
    result = made.glm("left ~ age + age_sq + depth + site", FRAME).fit()
    if message is None:
        assert FittedLogit(result, derived=derived)
        return
    with pytest.raises(FitRefused, match=message):
        FittedLogit(result, derived=derived)


def test_an_expression_that_reads_other_rows_is_refused():
    frame = FRAME.assign(centred=FRAME["age"] - FRAME["age"].mean())
    result = made.glm("left ~ depth + centred", frame).fit()
    with pytest.raises(FitRefused, match="from other rows too"):
        FittedLogit(result, derived={"centred": "age - age.mean()"})


def test_an_expression_may_reach_no_more_than_numpy():
    result = made.glm("left ~ age + age_sq", FRAME).fit()
    with pytest.raises(FitRefused, match="cannot be computed"):
        FittedLogit(result, derived={"age_sq": "__import__('os').getcwd()"})


def test_a_column_may_be_called_like_a_function_of_the_expression():
    frame = FRAME.assign(log=FRAME["depth"])
    result = made.glm("left ~ I(log_age * log)", frame).fit()
    fit = FittedLogit(result, derived={"log_age": "log(age)"})
    assert {facts.name for facts in fit.subject.predictors} == {"age", "log"}
    rows = fit.model.design.rows(fit.model.sample.columns)
    np.testing.assert_allclose(rows, result.model.exog, rtol=1e-12)
