"""The joint table of two factors, and interaction on both scales."""

import math
from dataclasses import replace

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from hypothesis import given, settings
from hypothesis import strategies as st

import plainodds as po
from plainodds.answers.additive import additive_interaction
from plainodds.answers.averaging import Exact
from plainodds.answers.estimate import UNKNOWN, Estimate
from plainodds.answers.joint import joint_table_of
from plainodds.answers.population import everyone
from plainodds.values import from_json, to_json

LEVEL = 0.95
Z = 1.959963984540054


def table_of(model, a, b, a_change, b_change, averaged=False, **held):
    averager = Exact(model, everyone(model)) if averaged else None
    return joint_table_of(model, a, b, a_change, b_change, model.completed(held), averager, LEVEL)


def measures(additive):
    return (
        additive.relative_excess_risk,
        additive.attributable_proportion,
        additive.synergy_index,
    )


def cells_by_levels(table):
    return {(cell.a, cell.b): cell for cell in table.cells}


def close(one, other, rel=1e-7):
    """Two estimates agree in everything."""
    if one is None or other is None or one.se is None:
        return one == other
    numbers = [(e.estimate, e.se, e.lower, e.upper) for e in (one, other)]
    return numbers[0] == pytest.approx(numbers[1], rel=rel, abs=1e-9)


# a cohort's two by two tables: events and others by smoking ("no", "yes") and dust
COHORT = {(0, 0): (12, 188), (1, 0): (20, 130), (0, 1): (18, 142), (1, 1): (45, 95)}


def cohort(counts=COHORT):
    rows = [(s, d, *found) for (s, d), found in counts.items()]
    frame = pd.DataFrame(rows, columns=["smoking", "dust", "ill", "well"])
    frame["smoking"] = frame.smoking.map({0: "no", 1: "yes"})
    return frame


def fitted(formula, frame, **stated):
    family = sm.families.Binomial()
    return po.FittedLogit(smf.glm(formula, frame, family=family).fit(tol=1e-13), **stated).model


@pytest.fixture(scope="module")
def saturated():
    return fitted("ill + well ~ smoking * dust", cohort())


@pytest.fixture(scope="module")
def raw(saturated):
    return table_of(saturated, "smoking", "dust", ("no", "yes"), (0, 1))


def test_a_saturated_model_gives_each_combinations_raw_count_chance_and_odds_ratio(raw):
    none = COHORT[0, 0][0] / COHORT[0, 0][1]
    for cell in raw.cells:
        ill, well = COHORT[int(cell.a == "yes"), cell.b]
        assert (cell.rows, cell.events) == (ill + well, ill)
        assert cell.chance.estimate == pytest.approx(ill / (ill + well))
        # on the logit the standard error is that of ln(ill / well)
        logit, se = math.log(ill / well), math.sqrt(1 / ill + 1 / well)
        assert cell.chance.lower == pytest.approx(1 / (1 + math.exp(-logit + Z * se)))
        assert cell.odds_ratio.estimate == pytest.approx(ill / well / none)
    assert [(cell.a, cell.b) for cell in raw.cells] == [
        ("no", 0),
        ("yes", 0),
        ("no", 1),
        ("yes", 1),
    ]
    assert [cell.is_reference for cell in raw.cells] == [True, False, False, False]
    assert raw.cells[0].odds_ratio == Estimate(1.0, None, None, None)
    assert raw.recoded == ()


def test_a_saturated_model_gives_each_stratums_odds_ratio_and_difference(raw):
    asked = [(e.predictor, e.start, e.end, e.within) for e in raw.strata]
    assert asked == [
        ("smoking", "no", "yes", 0),
        ("smoking", "no", "yes", 1),
        ("dust", 0, 1, "no"),
        ("dust", 0, 1, "yes"),
    ]
    ends = [((0, 0), (1, 0)), ((0, 1), (1, 1)), ((0, 0), (0, 1)), ((1, 0), (1, 1))]
    for effect, (start, end) in zip(raw.strata, ends, strict=True):
        (a, b), (c, d) = COHORT[end], COHORT[start]
        woolf = math.sqrt(1 / a + 1 / b + 1 / c + 1 / d)
        assert effect.odds_ratio.estimate == pytest.approx(a * d / (b * c))
        assert effect.odds_ratio.upper == pytest.approx(
            a * d / (b * c) * math.exp(Z * woolf), rel=1e-6
        )
        one, none = a / (a + b), c / (c + d)
        assert effect.risk_difference.estimate == pytest.approx(one - none)
        assert effect.risk_difference.se == pytest.approx(
            math.sqrt(one * (1 - one) / (a + b) + none * (1 - none) / (c + d)), rel=1e-6
        )


def test_a_saturated_model_gives_the_raw_ratio_of_odds_ratios(raw):
    of_smoking = [effect.odds_ratio.estimate for effect in raw.strata[:2]]
    assert raw.multiplicative.estimate == pytest.approx(of_smoking[1] / of_smoking[0])
    log_se = math.sqrt(sum(1 / count for cell in COHORT.values() for count in cell))
    assert raw.multiplicative.lower == pytest.approx(
        raw.multiplicative.estimate * math.exp(-Z * log_se), rel=1e-6
    )


def test_a_saturated_model_gives_the_raw_additive_measures_on_both_scales(raw):
    odds = {key: ill / well for key, (ill, well) in COHORT.items()}
    chances = {key: ill / (ill + well) for key, (ill, well) in COHORT.items()}
    for found, by in ((raw.additive_by_odds, odds), (raw.additive_by_chances, chances)):
        a, b, both = (by[key] / by[0, 0] for key in ((1, 0), (0, 1), (1, 1)))
        excess, proportion, synergy = measures(found)
        assert excess.estimate == pytest.approx(both - a - b + 1)
        assert proportion.estimate == pytest.approx((both - a - b + 1) / both)
        assert synergy.estimate == pytest.approx((both - 1) / (a + b - 2))


def test_a_cohorts_excess_risk_has_the_variance_of_independent_binomials(raw):
    # R = p/p₀; dRERI/dp₁₁ = 1/p₀, /dp₁₀ = /dp₀₁ = −1/p₀, /dp₀ = −(p₁₁ − p₁₀ − p₀₁)/p₀²
    p = {key: ill / (ill + well) for key, (ill, well) in COHORT.items()}
    spread = {key: p[key] * (1 - p[key]) / sum(COHORT[key]) for key in COHORT}
    none = p[0, 0]
    slopes = dict.fromkeys(COHORT, -1 / none)
    slopes[1, 1] = 1 / none
    slopes[0, 0] = -(p[1, 1] - p[1, 0] - p[0, 1]) / none**2
    se = math.sqrt(sum(slopes[key] ** 2 * spread[key] for key in COHORT))
    found = raw.additive_by_chances.relative_excess_risk
    assert found.se == pytest.approx(se, rel=1e-6)
    assert found.lower == pytest.approx(found.estimate - Z * se, rel=1e-6)


@pytest.fixture(scope="module")
def adjusted(pipes):
    """Two categories whose product is in the model, beside a spline and numbers."""
    formula = "burst ~ material * soil + soil * past_repairs + bs(age_years, df=4)"
    return po.FittedLogit(smf.logit(formula, pipes).fit(disp=0)).model


ASKED = ("material", "soil", ("PVC", "cast iron"), ("low", "high"))


@pytest.mark.parametrize("averaged", [False, True])
def test_intervals_are_those_of_numeric_derivatives_in_the_coefficients(adjusted, averaged):
    def quantities(model):
        table = table_of(model, *ASKED, averaged, past_repairs=1)
        by_odds, by_chances = table.additive_by_odds, table.additive_by_chances
        found = [*measures(by_odds), *measures(by_chances), table.multiplicative]
        found += [effect.risk_difference for effect in table.strata]
        found += [effect.odds_ratio for effect in table.strata]
        found += [cell.chance for cell in table.cells]
        return found + [cell.odds_ratio for cell in table.cells[1:]]

    def estimates(shift):
        moved = replace(adjusted, coefficients=adjusted.coefficients + shift)
        return np.array([each.estimate for each in quantities(moved)])

    k = len(adjusted.coefficients)
    step = 1e-5
    slopes = np.array(
        [(estimates(step * e) - estimates(-step * e)) / (2 * step) for e in np.eye(k)]
    )
    expected = np.sqrt(np.einsum("ij,ik,kj->j", slopes, adjusted.covariance, slopes))
    found = quantities(adjusted)
    assert [each.se for each in found] == pytest.approx(expected, rel=1e-5)
    for excess in (found[0], found[1], found[3], found[4]):
        assert excess.upper == pytest.approx(excess.estimate + Z * excess.se)
    for synergy in (found[2], found[5]):
        log_se = synergy.se / synergy.estimate
        assert synergy.lower == pytest.approx(synergy.estimate * math.exp(-Z * log_se))


@pytest.mark.parametrize("averaged", [False, True])
def test_chances_are_what_the_fit_predicts_held_or_averaged(fit, result, pipes, averaged):
    table = table_of(fit.model, *ASKED, averaged)
    typical = pd.DataFrame([dict(fit.model.typical)])
    for cell in table.cells:
        moved = (pipes if averaged else typical).assign(material=cell.a, soil=cell.b)
        assert cell.chance.estimate == pytest.approx(result.predict(moved).mean())
        counted = pipes[(pipes.material == cell.a) & (pipes.soil == cell.b)]
        assert (cell.rows, cell.events) == (len(counted), counted.burst.sum())


def test_odds_ratios_are_those_at_the_held_profile(adjusted):
    few, many = (table_of(adjusted, *ASKED, past_repairs=n) for n in (0, 4))
    rate = dict(zip([c.name for c in adjusted.design.columns], adjusted.coefficients, strict=True))
    gained = 4 * rate["soil[T.high]:past_repairs"]
    assert few.recoded == many.recoded == ()
    assert many.cells[2].odds_ratio.estimate == pytest.approx(
        few.cells[2].odds_ratio.estimate * math.exp(gained)
    )
    assert close(many.cells[1].odds_ratio, few.cells[1].odds_ratio)
    # the joined terms have no part in it
    assert close(few.multiplicative, many.multiplicative)


@pytest.mark.parametrize("averaged", [False, True])
def test_the_excess_risk_times_the_references_chance_is_the_cross_difference(adjusted, averaged):
    table = table_of(adjusted, *ASKED, averaged)
    none, a, b, both = (cell.chance.estimate for cell in table.cells)
    excess = table.additive_by_chances.relative_excess_risk.estimate
    assert excess * none == pytest.approx(both - a - b + none, abs=1e-14)
    of_a = [effect.risk_difference.estimate for effect in table.strata[:2]]
    assert excess * none == pytest.approx(of_a[1] - of_a[0], abs=1e-14)


def test_exchanging_the_two_predictors_exchanges_cells_and_strata_and_keeps_the_measures(adjusted):
    a, b, a_change, b_change = ASKED
    table = table_of(adjusted, a, b, a_change, b_change, averaged=True)
    turned = table_of(adjusted, b, a, b_change, a_change, averaged=True)
    cells = cells_by_levels(table)
    for (y, x), cell in cells_by_levels(turned).items():
        assert close(cell.chance, cells[x, y].chance)
        assert close(cell.odds_ratio, cells[x, y].odds_ratio)
        assert (cell.rows, cell.events) == (cells[x, y].rows, cells[x, y].events)
    for effect, same in zip(turned.strata, table.strata[2:] + table.strata[:2], strict=True):
        assert (effect.predictor, effect.within) == (same.predictor, same.within)
        assert close(effect.odds_ratio, same.odds_ratio)
    assert close(turned.multiplicative, table.multiplicative)
    for which in ("additive_by_odds", "additive_by_chances"):
        pairs = zip(measures(getattr(turned, which)), measures(getattr(table, which)), strict=True)
        assert all(close(one, other) for one, other in pairs)


@pytest.mark.parametrize(
    "formula",
    [
        "ill + well ~ C(smoking, Sum) * C(dust, Sum)",
        "ill + well ~ 0 + C(smoking):C(dust)",
        "ill + well ~ C(smoking, Treatment('yes')) * dust",
    ],
)
def test_the_formulas_coding_makes_no_difference(raw, formula):
    table = table_of(fitted(formula, cohort()), "smoking", "dust", ("no", "yes"), (0, 1))
    assert [c.odds_ratio.lower for c in table.cells[1:]] == pytest.approx(
        [c.odds_ratio.lower for c in raw.cells[1:]], rel=1e-6
    )
    assert close(table.multiplicative, raw.multiplicative, rel=1e-6)
    for which in ("additive_by_odds", "additive_by_chances"):
        pairs = zip(measures(getattr(table, which)), measures(getattr(raw, which)), strict=True)
        assert all(close(one, other, rel=1e-6) for one, other in pairs)


@pytest.mark.parametrize(
    ("a_change", "b_change", "recoded"),
    [
        (("no", "yes"), (0, 1), ()),
        (("yes", "no"), (0, 1), ("smoking",)),
        (("no", "yes"), (1, 0), ("dust",)),
        (("yes", "no"), (1, 0), ("smoking", "dust")),
    ],
)
def test_where_a_factor_protects_the_lowest_odds_become_the_reference(
    saturated, raw, a_change, b_change, recoded
):
    table = table_of(saturated, "smoking", "dust", a_change, b_change)
    assert table.recoded == recoded
    # whatever way they were stated, it is the same table
    assert replace(table, recoded=()) == raw


def test_two_factors_that_both_raise_the_odds_keep_the_stated_reference():
    # together lower than either alone, and than neither: what was stated is kept
    antagonists = {(0, 0): (30, 70), (1, 0): (45, 55), (0, 1): (50, 50), (1, 1): (20, 80)}
    model = fitted("ill + well ~ smoking * dust", cohort(antagonists))
    table = table_of(model, "smoking", "dust", ("no", "yes"), (0, 1))
    assert table.recoded == ()
    assert table.cells[3].odds_ratio.estimate < 1
    assert table.additive_by_odds.relative_excess_risk.estimate < -1
    # numerator below 0: no synergy index
    assert table.additive_by_odds.synergy_index is None
    assert table.additive_by_chances.synergy_index is None


def test_a_factor_without_any_effect_is_not_taken_for_protective_by_rounding():
    even = {(0, 0): (20, 80), (1, 0): (20, 80), (0, 1): (35, 65), (1, 1): (50, 50)}
    for formula in ("ill + well ~ smoking * dust", "ill + well ~ C(smoking, Sum) * C(dust, Sum)"):
        model = fitted(formula, cohort(even))
        assert table_of(model, "smoking", "dust", ("no", "yes"), (0, 1)).recoded == ()
        assert table_of(model, "smoking", "dust", ("yes", "no"), (0, 1)).recoded == ()


def test_without_a_shared_term_the_ratio_of_odds_ratios_is_exactly_1_and_excess_is_not_0():
    model = fitted("ill + well ~ smoking + dust", cohort())
    table = table_of(model, "smoking", "dust", ("no", "yes"), (0, 1))
    assert table.multiplicative.estimate == 1.0
    a, b, both = (cell.odds_ratio.estimate for cell in table.cells[1:])
    assert both == pytest.approx(a * b)
    assert table.additive_by_odds.relative_excess_risk.estimate == pytest.approx((a - 1) * (b - 1))


def test_two_stated_values_of_numbers_are_compared_without_counting_rows(fit):
    table = table_of(fit.model, "age_years", "material", (20, 60), ("PVC", "cast iron"))
    assert {(cell.rows, cell.events) for cell in table.cells} == {(None, None)}
    ages = {cell.a for cell in table.cells}
    assert ages == {20, 60}
    assert all(cell.chance.lower is not None for cell in table.cells)


@pytest.fixture(scope="module")
def never_both():
    """Nobody has both: with a product term the data don't tell what both together do."""
    return cohort({key: found for key, found in COHORT.items() if key != (1, 1)})


EMPTY = [
    "ill + well ~ smoking * dust",
    "ill + well ~ C(smoking, Sum) * C(dust, Sum)",
    "ill + well ~ C(smoking, Treatment('yes')) * C(dust, Treatment(1))",
]


@pytest.mark.filterwarnings("ignore::statsmodels.tools.sm_exceptions.ModelWarning")
@pytest.mark.filterwarnings("ignore::UserWarning")
@pytest.mark.parametrize("averaged", [False, True])
@pytest.mark.parametrize("formula", EMPTY)
def test_what_no_row_tells_is_no_number(never_both, formula, averaged):
    model = fitted(formula, never_both)
    table = table_of(model, "smoking", "dust", ("no", "yes"), (0, 1), averaged)
    both = cells_by_levels(table)["yes", 1]
    assert (both.rows, both.events) == (0, 0)
    assert both.odds_ratio == UNKNOWN
    for estimate in (both.chance, table.multiplicative, *measures(table.additive_by_odds)[:2]):
        assert math.isnan(estimate.estimate)
        assert (estimate.se, estimate.lower, estimate.upper) == (None, None, None)
    assert table.additive_by_odds.synergy_index is None
    assert table.additive_by_chances.synergy_index is None
    told = [not math.isnan(effect.odds_ratio.estimate) for effect in table.strata]
    assert told == [True, False, True, False]
    assert told == [not math.isnan(effect.risk_difference.estimate) for effect in table.strata]
    # what rows do tell is told
    a, b, c, d = *COHORT[1, 0], *COHORT[0, 0]
    alone = cells_by_levels(table)["yes", 0].odds_ratio
    assert alone.estimate == pytest.approx(a * d / (b * c), rel=1e-3)
    assert from_json(to_json(table)) == table


@pytest.mark.filterwarnings("ignore::statsmodels.tools.sm_exceptions.ModelWarning")
def test_where_the_table_has_a_hole_the_stated_reference_is_kept(never_both):
    model = fitted("ill + well ~ smoking * dust", never_both)
    table = table_of(model, "smoking", "dust", ("yes", "no"), (0, 1))
    assert table.recoded == ()
    assert (table.cells[0].a, table.cells[0].b) == ("yes", 0)
    assert table.cells[1].odds_ratio.estimate < 1


def test_a_combination_that_nobody_has_is_told_by_a_model_without_product_and_marked(never_both):
    model = fitted("ill + well ~ smoking + dust", never_both)
    both = table_of(model, "smoking", "dust", ("no", "yes"), (0, 1)).cells[3]
    assert (both.rows, both.events) == (0, 0)
    odds = {key: ill / well for key, (ill, well) in COHORT.items()}
    expected = odds[1, 0] * odds[0, 1] / odds[0, 0] ** 2
    assert both.odds_ratio.estimate == pytest.approx(expected)
    assert both.chance.lower < both.chance.estimate < both.chance.upper


@pytest.mark.filterwarnings("ignore::statsmodels.tools.sm_exceptions.ModelWarning")
def test_only_what_touches_the_hole_is_left_open_where_others_are_averaged():
    rng = np.random.default_rng(8)
    n = 900
    frame = pd.DataFrame(
        {
            "x": rng.normal(size=n),
            "a": rng.integers(0, 2, n),
            "b": rng.choice(["u", "v", "w"], n),
        }
    )
    frame = frame[~((frame.a == 1) & (frame.b == "w"))]
    chance = 1 / (1 + np.exp(0.5 - 0.5 * frame.a - 0.4 * (frame.b == "v") - frame.x))
    frame["y"] = (rng.uniform(size=len(frame)) < chance).astype(int)
    model = fitted("y ~ a * b + x", frame)
    whole = table_of(model, "a", "b", (0, 1), ("u", "v"), averaged=True)
    assert not any(math.isnan(cell.chance.estimate) for cell in whole.cells)
    assert whole.additive_by_chances.relative_excess_risk.lower is not None
    holed = table_of(model, "a", "b", (0, 1), ("u", "w"), averaged=True)
    assert [math.isnan(cell.chance.estimate) for cell in holed.cells] == [False] * 3 + [True]


def test_a_case_control_sample_tells_odds_ratios_and_no_chances(raw):
    model = fitted("ill + well ~ smoking * dust", cohort(), sampling="case-control")
    table = table_of(model, "smoking", "dust", ("no", "yes"), (0, 1))
    assert table.additive_by_chances is None
    assert {cell.chance for cell in table.cells} == {None}
    assert {effect.risk_difference for effect in table.strata} == {None}
    assert table.additive_by_odds == raw.additive_by_odds
    assert [cell.odds_ratio for cell in table.cells] == [cell.odds_ratio for cell in raw.cells]


def test_a_stated_prevalence_corrects_the_chances_and_makes_odds_stand_for_risks(raw):
    rare = fitted("ill + well ~ smoking * dust", cohort(), prevalence=1e-6)
    table = table_of(rare, "smoking", "dust", ("no", "yes"), (0, 1))
    assert table.additive_by_odds == raw.additive_by_odds
    pairs = zip(measures(table.additive_by_chances), measures(table.additive_by_odds), strict=True)
    assert all(close(one, other, rel=1e-4) for one, other in pairs)


def test_a_penalised_fit_has_estimates_without_intervals(pipes):
    result = smf.logit("burst ~ material * soil", pipes).fit_regularized(alpha=0.1, disp=0)
    table = table_of(po.FittedLogit(result).model, *ASKED)
    for estimate in (table.multiplicative, *measures(table.additive_by_chances)[:2]):
        assert math.isfinite(estimate.estimate)
        assert (estimate.se, estimate.lower, estimate.upper) == (None, None, None)


def test_a_table_goes_to_json_and_back(raw):
    assert from_json(to_json(raw)) == raw


class Plain:
    """A covariance, and rows that tell everything: what the delta method needs of a model."""

    degrees_of_freedom = None

    def __init__(self, covariance):
        self.covariance = covariance

    def leaves_open(self, gradients):
        return np.zeros(len(gradients), dtype=bool)


log_ratio = st.floats(-3, 3)


@settings(deadline=None)
@given(a=log_ratio, b=log_ratio, both=log_ratio, seed=st.integers(0, 1000))
def test_the_three_measures_hang_together(a, b, both, seed):
    root = np.random.default_rng(seed).normal(size=(3, 3))
    model = Plain(root @ root.T)
    found = additive_interaction(model, np.array([a, b, both]), np.eye(3), LEVEL)
    excess, proportion, synergy = measures(found)
    assert proportion.estimate == pytest.approx(excess.estimate / math.exp(both))
    apart = math.exp(a) + math.exp(b) - 2
    if synergy is None:
        assert math.exp(both) <= 1 or apart <= 0
    elif apart > 1e-6:
        # RERI = (S − 1)·(R₁₀ + R₀₁ − 2): of one sign with ln S
        assert excess.estimate == pytest.approx((synergy.estimate - 1) * apart, abs=1e-9)
        assert 0 <= synergy.lower <= synergy.estimate <= synergy.upper
