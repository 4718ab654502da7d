"""Additive interaction of alcohol and smoking in cancer of the mouth.

Source: Rothman & Keller (1972), J Chronic Diseases 25:711; analysed in Hosmer & Lemeshow (1992),
Epidemiology 3:452. The published values are as remembered, and were reproduced by an independent
calculation to the digits shown; `by_hand` is another one, from the eight counts alone.
"""

import math

import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from tests.published.data import mouth_cancer

PUBLISHED = {
    "relative_excess_risk": (3.74, -1.84, 9.32),
    "attributable_proportion": (0.41, -0.07, 0.90),
    "synergy_index": (1.87, 0.65, 5.42),
}
Z = 1.959963984540054


def grouped():
    formula = "cases + controls ~ alcohol * smoking"
    return smf.glm(formula, mouth_cancer(), family=sm.families.Binomial()).fit(tol=1e-12)


def one_row_per_count():
    frame = mouth_cancer().melt(["alcohol", "smoking"], var_name="group", value_name="people")
    return frame.assign(cancer=(frame.group == "cases").astype(int))


def weighted():
    frame = one_row_per_count()
    return smf.glm(
        "cancer ~ alcohol * smoking",
        frame,
        family=sm.families.Binomial(),
        freq_weights=frame.people.to_numpy(),
    ).fit(tol=1e-12)


def one_row_per_person():
    frame = one_row_per_count()
    people = frame.loc[frame.index.repeat(frame.people)].reset_index(drop=True)
    return smf.logit("cancer ~ alcohol * smoking", people).fit(disp=0, tol=1e-12)


FITS = {"grouped": grouped, "weighted": weighted, "one row per person": one_row_per_person}


@pytest.fixture(scope="module", params=FITS)
def fit(request):
    return po.FittedLogit(FITS[request.param](), sampling="case-control")


@pytest.fixture(scope="module")
def table(fit):
    return fit.pair("alcohol", "smoking", scale="odds").joint


@pytest.mark.parametrize("measure", PUBLISHED)
def test_the_measure_and_its_interval_are_the_published_ones(table, measure):
    found = getattr(table.additive_by_odds, measure)
    assert (found.estimate, found.lower, found.upper) == pytest.approx(
        PUBLISHED[measure], abs=5.1e-3
    )


def test_each_combination_has_the_published_odds_ratio_and_its_counts(table):
    assert [(cell.a, cell.b) for cell in table.cells] == [(0, 0), (1, 0), (0, 1), (1, 1)]
    assert [cell.odds_ratio.estimate for cell in table.cells] == pytest.approx(
        [1, 2.96, 3.33, 9.04], abs=5e-3
    )
    assert [(cell.rows, cell.events) for cell in table.cells] == [
        (23, 3),
        (26, 8),
        (18, 6),
        (391, 225),
    ]
    assert table.recoded == ()


def by_hand():
    """Estimate, lower and upper of each measure.

    With θ the log odds of the four combinations, independent and of variance 1/cases +
    1/controls (Woolf 1955, Ann Hum Genet 19:251), the derivatives are written out.
    """
    cells = mouth_cancer().set_index(["alcohol", "smoking"])
    odds = cells.cases / cells.controls
    variance = 1 / cells.cases + 1 / cells.controls
    a, b, both = (odds[key] / odds[0, 0] for key in ((1, 0), (0, 1), (1, 1)))
    order = [(0, 0), (1, 0), (0, 1), (1, 1)]

    def spread(*slopes):
        return math.sqrt(sum(s**2 * variance[key] for s, key in zip(slopes, order, strict=True)))

    excess = both - a - b + 1
    excess_se = spread(a + b - both, -a, -b, both)
    proportion = excess / both
    proportion_se = spread(1 / both, -a / both, -b / both, (a + b - 1) / both)
    synergy = (both - 1) / (a + b - 2)
    together, apart = both / (both - 1), 1 / (a + b - 2)
    log_se = spread((a + b) * apart - together, -a * apart, -b * apart, together)
    return {
        "relative_excess_risk": (excess, excess - Z * excess_se, excess + Z * excess_se),
        "attributable_proportion": (
            proportion,
            proportion - Z * proportion_se,
            proportion + Z * proportion_se,
        ),
        "synergy_index": (
            synergy,
            synergy * math.exp(-Z * log_se),
            synergy * math.exp(Z * log_se),
        ),
    }


@pytest.mark.parametrize("measure", PUBLISHED)
def test_the_measure_and_its_interval_are_those_of_the_eight_counts(table, measure):
    found = getattr(table.additive_by_odds, measure)
    assert (found.estimate, found.lower, found.upper) == pytest.approx(by_hand()[measure], rel=1e-5)


@pytest.mark.parametrize("measure", PUBLISHED)
def test_the_calculation_by_hand_gives_the_published_digits(measure):
    assert by_hand()[measure] == pytest.approx(PUBLISHED[measure], abs=5.1e-3)


def test_the_sample_was_chosen_by_its_outcome_so_no_chances_are_told(table):
    assert table.additive_by_chances is None
    assert all(cell.chance is None for cell in table.cells)


@pytest.mark.parametrize("how", FITS)
def test_taken_for_a_cohort_the_odds_ratios_stay_and_chances_are_the_shares(how, table):
    cohort = po.FittedLogit(FITS[how]()).pair("alcohol", "smoking", scale="odds").joint
    for found, same in zip(cohort.cells, table.cells, strict=True):
        assert found.odds_ratio.estimate == pytest.approx(same.odds_ratio.estimate)
        assert found.chance.estimate == pytest.approx(found.events / found.rows)
    none, alcohol, smoking, both = (cell.chance.estimate for cell in cohort.cells)
    excess = cohort.additive_by_chances.relative_excess_risk.estimate
    assert excess == pytest.approx((both - alcohol - smoking) / none + 1)


def test_alcohol_stated_backwards_is_recoded_to_the_same_table(fit, table):
    turned = fit.pair("alcohol", "smoking", a_values=(1, 0), scale="odds").joint
    assert turned.recoded == ("alcohol",)
    assert turned.cells == table.cells
    assert turned.additive_by_odds == table.additive_by_odds
