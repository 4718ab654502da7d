"""Numbers are rounded honestly: no chance becomes certain, no sum stops adding up."""

import math
from decimal import Decimal

import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.phrases import numbers
from tests.phrases.reading import figures

chances = st.floats(0, 1)
ratios = st.floats(0, exclude_min=True, allow_infinity=True, allow_nan=False)


def shown(text):
    """The number that a text shows, with its limits just beyond what they say."""
    if text.startswith("under"):
        return -1.0
    if text.startswith("over"):
        return math.inf
    return figures(text)[0][0]


@given(chances)
def test_no_chance_reads_as_impossible_or_certain(p):
    text = numbers.chance(p)
    assert text not in ("0%", "100%")
    assert all(not text.startswith(bare) for bare in ("0.0%", "0.00%", "100"))
    assert 0.1 <= figures(text)[0][0] <= 99.9


@given(chances, st.integers(0, 4))
def test_no_stated_decimals_make_a_chance_impossible_or_certain(p, decimals):
    value = figures(numbers.chance(p, decimals=decimals))[0][0]
    assert 0 < value < 100


@given(chances)
def test_a_chance_is_within_half_a_unit_of_what_is_written(p):
    text = numbers.chance(p)
    value, half = figures(text)[0]
    if text.startswith("under"):
        assert p < 0.001
    elif text.startswith("over"):
        assert p > 0.999
    else:
        assert abs(value - 100 * p) <= half * (1 + 1e-9)


@given(chances, chances)
def test_a_larger_chance_is_never_written_smaller(p, q):
    low, high = sorted((p, q))
    assert shown(numbers.chance(low)) <= shown(numbers.chance(high))


@given(chances)
def test_a_chance_has_at_most_three_figures(p):
    digits = numbers.chance(p).split()[-1].rstrip("%").lstrip("0.").replace(".", "")
    assert 1 <= len(digits) <= 3


@pytest.mark.parametrize(
    ("p", "text"),
    [
        (0.2345, "23%"),
        (0.0999, "10%"),
        (0.0421, "4.2%"),
        (0.0042, "0.42%"),
        (0.00996, "1.0%"),
        (0.001, "0.10%"),
        (0.0009, "under 0.1%"),
        (0.9049, "90.5%"),
        (0.9421, "94.2%"),
        (0.9989, "99.9%"),
        (0.9996, "over 99.9%"),
        (math.nan, "not known"),
    ],
)
def test_chances_are_written_with_two_or_three_figures(p, text):
    assert numbers.chance(p) == text


@given(st.lists(chances, min_size=1, max_size=5))
def test_one_denominator_serves_a_set_of_chances(ps):
    over = numbers.denominator(ps)
    assert over in (100, 1_000, 10_000)
    assert all(numbers.frequency(p, over).endswith(f" in {over:,}") for p in ps)


@given(chances)
def test_a_frequency_never_counts_none_or_all(p):
    text = numbers.frequency(p)
    count, over = (figure for figure, _ in figures(text))
    assert 0 < count < over
    if not text.startswith(("under", "over")):
        assert abs(count - p * over) <= 0.5 * (1 + 1e-9)


def test_a_denominator_grows_with_rarity_and_with_comparison():
    assert numbers.denominator([0.23]) == 100
    assert numbers.denominator([0.004]) == 1_000
    assert numbers.denominator([0.0004]) == 10_000
    assert numbers.denominator([0.996]) == 1_000
    assert numbers.denominator([0.03]) == 100
    assert numbers.denominator([0.03, 0.3]) == 1_000
    assert numbers.denominator([0.231, 0.234]) == 1_000
    assert numbers.denominator([]) == 100
    assert numbers.denominator([math.nan, 0.2]) == 100


def test_frequencies_share_their_denominator():
    assert numbers.frequencies([0.12, 0.07, 0.03], 100) == "12, 7 and 3 in 100"
    assert numbers.frequency(0.00001, 100) == "under 1 in 100"
    assert numbers.frequency(0.99999, 1_000) == "over 999 in 1,000"
    assert numbers.frequency_span(0.18, 0.29, 100) == "18 to 29 in 100"
    assert numbers.frequency_span(0.181, 0.182, 100) == "18 in 100"


@given(chances, chances)
def test_the_ends_of_a_range_of_chances_keep_their_order(p, q):
    low, high = sorted((p, q))
    text = numbers.span(low, high)
    ends = [shown(end) for end in text.split(" to ")]
    assert ends == sorted(ends)
    assert 0.0 not in ends
    assert 100.0 not in ends
    if len(ends) == 1 and ends[0] not in (-1.0, math.inf):
        assert high - low < 0.002


@given(chances, chances)
def test_a_range_of_chances_stays_near_its_ends(p, q):
    low, high = sorted((p, q))
    for end, number in zip(numbers.span(low, high).split(" to "), (low, high), strict=False):
        value, half = figures(end)[0]
        if end.startswith("under"):
            assert number < 0.001
        elif end.startswith("over"):
            assert number > 0.999
        else:
            assert abs(value - 100 * number) <= max(half, 0.005) * (1 + 1e-9)


@pytest.mark.parametrize(
    ("low", "high", "text"),
    [
        (0.1834, 0.2921, "18% to 29%"),
        (0.2312, 0.2341, "23.1% to 23.4%"),
        (0.013, 0.16, "1.3% to 16%"),
        (0.004, 0.12, "0.4% to 12%"),
        (0.0001, 0.06, "under 0.1% to 6%"),
        (0.88, 0.9996, "88% to over 99.9%"),
        (0.00001, 0.0002, "under 0.1%"),
        (0.2, 0.2, "20%"),
    ],
)
def test_a_range_is_as_coarse_as_its_width_warrants(low, high, text):
    assert numbers.span(low, high) == text


def test_a_range_takes_other_ways_of_writing():
    assert numbers.span(1.08, 3.78, numbers.ratio) == "1.08 to 3.78"
    assert numbers.span(20.0, 40.0, numbers.quantity) == "20 to 40"
    assert numbers.span(-0.42, 0.4, numbers.signed) == "−0.4 to +0.4"


@given(ratios)
def test_a_ratio_never_reads_as_nought(r):
    text = numbers.ratio(r)
    assert any(digit in text for digit in "123456789")
    value, half = figures(text)[0]
    if text.startswith("under"):
        assert r < 0.001
    elif text.startswith("over"):
        assert r > 1000
    else:
        assert abs(value - r) <= half * (1 + 1e-9)


@given(st.floats(-0.9, 0.9).filter(lambda x: abs(x) >= 0.00005))
def test_a_ratio_shows_on_which_side_of_one_it_lies(from_one):
    value = figures(numbers.ratio(1 + from_one))[0][0]
    assert (value > 1) == (from_one > 0)


@given(ratios, ratios)
def test_the_ends_of_an_interval_of_ratios_keep_their_order(r, s):
    ends = [shown(end) for end in numbers.ratio_interval(*sorted((r, s))).split(" to ")]
    assert ends == sorted(ends)


@pytest.mark.parametrize(
    ("r", "text"),
    [
        (2.0249, "2.02"),
        (0.45, "0.45"),
        (12.34, "12.3"),
        (123.4, "123"),
        (9.996, "10.0"),
        (1.0034, "1.003"),
        (0.9996, "0.9996"),
        (1.0, "1.00"),
        (0.0345, "0.035"),
        (1000.0, "1,000"),
        (1000.4, "over 1,000"),
        (math.inf, "over 1,000"),
        (0.0, "under 0.001"),
        (math.nan, "not known"),
    ],
)
def test_ratios_are_written_with_about_three_figures(r, text):
    assert numbers.ratio(r) == text


def test_intervals_of_ratios_share_their_decimals_near_one():
    assert numbers.ratio_interval(1.084, 3.776) == "1.08 to 3.78"
    assert numbers.ratio_interval(0.9996, 1.21) == "0.9996 to 1.2100"
    assert numbers.ratio_interval(0.061, 2.878) == "0.061 to 2.88"
    assert numbers.ratio_interval(0.0004, math.inf) == "under 0.001 to over 1,000"


@given(st.floats(-1e6, 1e6))
def test_a_signed_number_has_a_true_minus_and_no_signed_nought(x):
    text = numbers.signed(x)
    assert "-" not in text
    value = figures(text)[0][0]
    assert value == 0 or text[0] == ("+" if x > 0 else "−")
    assert abs(value - x) <= 0.005 * (1 + 1e-9)


def test_signed_numbers():
    assert numbers.signed(0.42) == "+0.42"
    assert numbers.signed(-0.42) == "−0.42"
    assert numbers.signed(-0.001, decimals=2) == "0.00"
    assert numbers.signed(1234.5, decimals=1) == "+1,234.5"
    assert numbers.signed(math.inf) == "+∞"
    assert numbers.signed(-math.inf) == "−∞"
    assert numbers.signed(math.nan) == "not known"


@given(st.floats(-1, 1))
def test_percentage_points_never_read_as_nought_for_a_difference(d):
    text = numbers.percentage_points(d)
    assert text.endswith(" percentage points")
    if d != 0:
        assert any(digit in text for digit in "123456789")
    if d < 0 and "between" not in text:
        assert text.startswith("−")


def test_percentage_points():
    assert numbers.percentage_points(0.034) == "3.4 percentage points"
    assert numbers.percentage_points(0.034, sign=True) == "+3.4 percentage points"
    assert numbers.percentage_points(-0.12) == "−12 percentage points"
    assert numbers.percentage_points(0.00042) == "0.042 percentage points"
    assert numbers.percentage_points(1e-7) == "under 0.001 percentage points"
    assert numbers.percentage_points(-1e-7) == "between −0.001 and 0 percentage points"
    assert numbers.percentage_points(0.0) == "0 percentage points"
    assert numbers.percentage_points(math.nan) == "not known percentage points"


def test_ranges_of_differences_say_their_sides():
    assert numbers.points_span(-0.021, 0.016) == "−2.1 to +1.6 percentage points"
    assert numbers.points_on_sides(0.021, 0.056) == "2.1 to 5.6 higher"
    assert numbers.points_on_sides(-0.056, -0.021) == "2.1 to 5.6 lower"
    assert numbers.points_on_sides(-0.021, 0.016) == "2.1 lower to 1.6 higher"
    assert numbers.points_on_sides(-0.021, 0.0) == "0 to 2.1 lower"


def test_a_tiny_end_of_a_range_is_told_beside_the_other_end():
    tail = " percentage points"
    assert numbers.points_span(-0.00017, -0.000004) == "−0.017 to −0.0004" + tail
    assert numbers.points_span(-0.00017, -4e-10) == "−0.017 to just below 0" + tail
    assert numbers.points_span(4e-10, 0.00017) == "just above 0 to 0.017" + tail


@given(st.floats(-1e12, 1e12))
def test_a_quantity_keeps_its_whole_part_and_four_figures(x):
    value, half = figures(numbers.quantity(x))[0] if abs(x) >= 1e-5 else (x, 0.0)
    assert abs(value - x) <= max(half, 0.0) + 1e-9 * abs(x)
    assert abs(value - x) <= 0.5
    assert abs(value - x) <= 0.0005 * abs(x) + 1e-300


@pytest.mark.parametrize(
    ("x", "unit", "text"),
    [
        (0.30000000000000004, "", "0.3"),
        (3.14159, "", "3.14159"),
        (43.333333333, "years", "43.33 years"),
        (33.300000000000004, "years", "33.3 years"),
        (40.0, "years", "40 years"),
        (-2.0, "°C", "−2 °C"),
        (40, "%", "40%"),
        (12500, "£", "£12,500"),
        (-3, "£", "−£3"),
        (1987, "", "1987"),
        (9999.6, "", "9,999.6"),
        (1234567.0, "", "1,234,567"),
        (0.00000012, "", "1.2e−07"),
        (0.0000012, "", "0.0000012"),
        (0.00012, "", "0.00012"),
        (0.0, "", "0"),
        (math.nan, "years", "not known years"),
        (math.inf, "", "∞"),
    ],
)
def test_quantities(x, unit, text):
    assert numbers.quantity(x, unit) == text


@given(
    st.lists(st.floats(-50, 50), min_size=1, max_size=30),
    st.integers(0, 4),
)
def test_rounded_parts_add_up_to_the_rounded_total(parts, decimals):
    total = math.fsum(parts)
    rounded = numbers.summing(parts, total, decimals)
    written = [Decimal(f"{each:.{decimals}f}") for each in rounded]
    scaled = Decimal(round(total * 10**decimals)).scaleb(-decimals)
    assert sum(written) == scaled
    unit = 10.0**-decimals
    assert all(abs(a - b) < unit * (1 + 1e-6) for a, b in zip(rounded, parts, strict=True))


def test_parts_that_do_not_add_up_are_refused():
    with pytest.raises(ValueError, match="do not add up"):
        numbers.summing([0.1, 0.2], 0.5)


def test_parts_that_are_not_finite_are_left_as_they_are():
    assert numbers.summing([math.inf, 1.234], math.inf) == (math.inf, 1.234)


@pytest.mark.parametrize("decimals", range(5))
def test_no_rounded_part_is_a_negative_nought(decimals):
    assert all(
        math.copysign(1, each) == 1 or each < 0
        for each in numbers.summing([-0.00001, 0.00001], 0.0, decimals)
    )


@given(st.floats(0, 1))
def test_a_p_value_is_never_nought_and_never_one(p):
    text = numbers.p_value(p)
    assert 0 < figures(text)[0][0] < 1
    if not text.startswith(("under", "over")):
        value, half = figures(text)[0]
        assert abs(value - p) <= half * (1 + 1e-9)


@pytest.mark.parametrize(
    ("number", "text"),
    [
        (0.25, "1/4"),
        (0.5, "1/2"),
        (1.0, "1"),
        (2, "2"),
        (4.0, "4"),
        (1.5, "3/2"),
        (2 / 3, "2/3"),
        (1 / 1024, "1/1,024"),
        (1024.0, "1,024"),
        (0.123456, "0.12"),
    ],
)
def test_ticks_of_odds_are_simple_fractions(number, text):
    assert numbers.simple_fraction(number) == text


def test_counts_and_levels():
    assert numbers.count(6000) == "6,000"
    assert numbers.confidence(0.95) == "95%"
    assert numbers.confidence(0.999) == "99.9%"
    assert numbers.confidence(0.29) == "29%"


@pytest.mark.parametrize(
    ("number", "told"),
    [(1.0, "1"), (1.04, "1"), (9.94, "9.9"), (9.96, "10"), (24.3, "24"), (1234.6, "1,235")],
)
def test_a_number_needed_has_one_decimal_where_it_is_small(number, told):
    assert numbers.needed(number) == told


@given(st.floats(-1, 1), st.sampled_from([100, 1_000, 10_000]))
def test_cases_apart_are_the_rounded_difference_and_its_side(difference, over):
    told = numbers.cases_apart(difference, over)
    cases = round(abs(difference) * over)
    if difference == 0:
        assert told == "no more and no fewer"
    else:
        assert told.endswith("more" if difference > 0 else "fewer")
        assert told.startswith("under 1 " if cases == 0 else f"{cases:,} ")


@given(st.floats(0, 1), st.floats(0, 1))
def test_a_changes_denominator_is_no_coarser_than_its_chances(start, end):
    over = numbers.denominator_of_change(start, end)
    assert over >= numbers.denominator([start, end])
    assert over in (100, 1_000, 10_000)
    if abs(end - start) >= 0.05:
        assert over == numbers.denominator([start, end])
