"""Findings in words: every figure the evidence's own, every finding with all its parts."""

import math
import re
from dataclasses import replace

import pytest

from plainodds.answers.checks import (
    amount,
    calibration,
    collinearity,
    convergence,
    dependence,
    discrimination,
    influence,
    overall,
    separation,
    shape,
    standard_errors,
)
from plainodds.answers.checks.finding import CONCERNS, TOPICS, Finding
from plainodds.answers.estimate import Estimate
from plainodds.phrases.checks import finding_figures, finding_words
from plainodds.phrases.checks.finding_words import WHY, evidence_figures, evidence_words
from plainodds.phrases.checks.headings import (
    concern_label,
    concern_sign,
    finding_heading,
    picture_axes,
    picture_legend,
    topic_label,
)
from plainodds.phrases.checks.pictures import picture_words
from plainodds.phrases.checks.plainly import plain_sentences
from tests.phrases.made import level_facts, number_facts, subject
from tests.phrases.made_findings import MADE, UNKNOWN, everything, finding, numbers_of
from tests.phrases.made_findings import convergence as convergence_evidence
from tests.phrases.made_findings import discrimination as discrimination_evidence
from tests.phrases.made_findings import influence as influence_evidence
from tests.phrases.made_findings import missing as missing_evidence
from tests.phrases.made_findings import pattern as made_pattern
from tests.phrases.made_findings import shape as shape_evidence
from tests.phrases.reading import faults, says, unaccounted

LEVEL = 0.95
ALL = everything()
REASONS = {
    "convergence": convergence.REASONS,
    "separation": separation.REASONS,
    "collinearity": collinearity.REASONS,
    "standard errors": standard_errors.REASONS,
    "amount": amount.AMOUNT_REASONS,
    "levels": amount.LEVELS_REASONS,
    "missing": amount.MISSING_REASONS,
    "shape": shape.REASONS,
    "calibration": calibration.REASONS,
    "influence": influence.REASONS,
    "dependence": dependence.REASONS,
    "discrimination": discrimination.REASONS,
    "overall": overall.REASONS,
}
# names of labels, limits that are written, and what is said of every fit
KNOWN = [0.95, 0.9, 1.0, 2.0, 20.0, 0.001, 12.0]
NAMED = re.compile(r"“[^”]*”|burst this winter|ΔX²|χ²|R²|Δβ")


def sentences_of(found, about=None):
    about = about or subject()
    said = finding_words(found, about, LEVEL)
    plain = plain_sentences(found, about, LEVEL)
    return [said.what, said.why, said.next_step, *plain, picture_words(found, about, LEVEL)]


def tidied(text):
    return NAMED.sub("", text)


def known_numbers(found):
    numbers = [*KNOWN, *numbers_of(found.evidence)]
    evidence = found.evidence
    if isinstance(evidence, amount.MissingEvidence):
        every = evidence.used + evidence.dropped
        numbers += [every, evidence.dropped / every]
    if isinstance(evidence, amount.LevelsEvidence):
        numbers += [each.cases - each.events for each in evidence.counts]
    if isinstance(evidence, standard_errors.StandardErrorsEvidence):
        numbers.append(len(evidence.wide) - 1)
    if isinstance(evidence, influence.InfluenceEvidence):
        numbers += [len(each.labels) - 3 for each in evidence.standing_out]
    return numbers


def test_the_findings_made_by_hand_leave_out_no_topic_and_no_reason():
    made = {(each.topic, reason) for each in MADE for reason in each.reasons}
    assert made == {(topic, reason) for topic, reasons in REASONS.items() for reason in reasons}
    assert {each.topic for each in MADE if each.concern == "nothing found"} == set(TOPICS)
    assert {(each.topic, each.unknown) for each in ALL if each.evidence is None} == {
        (topic, unknown) for topic in TOPICS for unknown in UNKNOWN
    }


@pytest.mark.parametrize("found", ALL)
def test_every_finding_has_all_its_words(found):
    said = finding_words(found, subject(), LEVEL)
    assert said.heading.startswith(topic_label(found.topic))
    assert not said.heading.endswith(".")
    for text in (said.what, said.why, said.next_step):
        assert len(text.split()) > 3


@pytest.mark.parametrize("found", ALL)
def test_sentences_are_well_made(found):
    for sentence in sentences_of(found):
        assert faults(sentence) == [], sentence
        assert not re.search(r"prove|guarantee", sentence)


@pytest.mark.parametrize("found", ALL)
def test_every_part_is_one_sentence(found):
    said = finding_words(found, subject(), LEVEL)
    for text in (said.what, said.why, said.next_step):
        assert not re.search(r"[.!?] [A-Z]", text), text


@pytest.mark.parametrize("found", ALL)
def test_every_figure_is_the_evidences_own(found):
    known = known_numbers(found)
    for sentence in sentences_of(found):
        assert unaccounted(tidied(sentence), known) == [], sentence


@pytest.mark.parametrize("found", ALL)
def test_figures_have_names_and_are_the_evidences_own(found):
    figures = finding_figures(found, subject(), LEVEL)
    assert bool(figures) == (found.evidence is not None) or found.topic == "levels"
    labels = [label for label, _ in figures]
    assert len(labels) == len(set(labels))
    known = [*known_numbers(found), 100.0]
    for label, text in figures:
        assert label == label.strip() != ""
        assert text == text.strip() != ""
        assert "nan" not in text.lower().split()
        assert "inf" not in text.lower().split()
        assert unaccounted(tidied(text), known) == [], text


@pytest.mark.parametrize("unknown", UNKNOWN)
@pytest.mark.parametrize("topic", TOPICS)
def test_what_cannot_be_known_says_why_and_claims_nothing(topic, unknown):
    about = ("age_years",) if topic == "shape" else ()
    said = finding_words(Finding(topic, "not known", (), about, None, unknown), subject(), LEVEL)
    assert said.what.startswith("This cannot be told, because ")
    assert said.why == f"{WHY[topic]}"


def test_the_reasons_why_something_cannot_be_known_differ():
    whats = {
        finding_words(Finding("amount", "not known", unknown=each), subject(), LEVEL).what
        for each in UNKNOWN
    }
    assert len(whats) == len(UNKNOWN)


def test_concerns_are_called_what_they_are_called_everywhere():
    assert [concern_label(each) for each in CONCERNS] == [
        "nothing found",
        "not known",
        "keep in mind",
        "don't explain yet",
    ]
    signs = [concern_sign(each) for each in CONCERNS]
    assert len(set(signs)) == len(signs)
    assert all(len(sign) == 1 for sign in signs)


def test_topics_have_headings_of_their_own():
    assert len({topic_label(topic) for topic in TOPICS}) == len(TOPICS)


@pytest.mark.parametrize("found", ALL)
def test_axes_and_marks_have_titles_or_none(found):
    texts = (*picture_axes(found, subject()), *picture_legend(found, subject()))
    assert len(texts) == 4
    assert all(text == text.strip() for text in texts)
    if found.topic in ("shape", "calibration"):
        assert all(texts)
    assert (texts[2] == "") == (texts[3] == "")


def test_a_shape_names_its_number_in_the_heading():
    found = finding("shape", "nothing found", shape_evidence(), about=("age_years",))
    assert finding_heading(found, subject()) == "Shape along pipe age"


def test_rows_left_out_say_how_many_and_how_they_differ():
    found = finding("missing", "keep in mind", missing_evidence(), ("many", "differ"))
    assert finding_words(found, subject(), LEVEL).what == (
        "In 12% of rows (720 of 6,000) something was missing, most often in pipe age (700), and "
        "they were left out; among the 613 of them whose outcome is known the share of events was "
        "3.4 percentage points higher (95% interval 1.4 to 5.6 higher) than among the rows used."
    )


@pytest.mark.parametrize(
    ("gap", "p", "told"),
    [
        (0.012, 0.31, "too little to change an explanation"),
        (0.012, 1e-9, "too little to change an explanation"),
        (0.07, 0.31, "which chance alone may explain"),
        (0.07, math.nan, "leaves no other shape to test against"),
    ],
)
def test_a_gap_that_raises_no_concern_says_why_it_does_not(gap, p, told):
    evidence = shape_evidence(gap, p, 1.0, 0 if math.isnan(p) else 2)
    found = finding("shape", "nothing found", evidence, about=("age_years",))
    said = finding_words(found, subject(), LEVEL).what
    assert told in said
    assert says(said, gap, 100)


def test_a_case_control_sample_says_that_shares_are_the_samples():
    found = next(f for f in MADE if f.topic == "shape" and f.unknown == "rows chosen by outcome")
    assert "shares here are those of the sample" in finding_words(found, subject(), LEVEL).what


def test_a_turned_odds_ratio_is_told_from_both_sides_of_one():
    patterns = influence_evidence(made_pattern())
    reasons = ("turns an odds ratio", "moves an odds ratio")
    found = finding("influence", "don't explain yet", patterns, reasons, ("age_years",))
    said = finding_words(found, subject(), LEVEL).what
    assert said == (
        "Among 498 different rows, a single one turns an odds ratio to the other side of 1: "
        "without row “r12” (1 pipe, with the event), the odds ratio for pipe age from 40 to 50 "
        "years is 0.83 rather than 1.43."
    )


def test_an_odds_ratio_that_could_not_be_refitted_is_told_as_about():
    found = next(f for f in MADE if f.topic == "influence" and f.about == ("material",))
    said = finding_words(found, subject(), LEVEL).what
    assert "is about 1.12 rather than 2.31" in said
    assert "given lined yes" in said


def test_ranking_without_exception_claims_no_interval():
    found = next(f for f in MADE if f.topic == "discrimination" and f.evidence.c.estimate == 1.0)
    said = finding_words(found, subject(), LEVEL).what
    assert "without exception" in said
    assert "no interval can be given" in said


def test_overall_tests_are_never_a_verdict():
    for found in MADE:
        if found.topic == "overall" and not found.reasons:
            said = finding_words(found, subject(), LEVEL)
            assert "none of them is a verdict" in said.why
            assert not re.search(r"\b(good|bad|poor|passes|fails)\b", said.what)


def test_a_penalised_fit_owes_its_finite_estimates_to_the_penalty():
    found = next(f for f in MADE if f.topic == "separation" and f.concern == "keep in mind")
    said = finding_words(found, subject(), LEVEL)
    assert "would have no finite estimate without the penalty" in said.what


def test_the_plain_words_keep_columns_and_tests_to_the_analysts():
    for found in MADE:
        if found.reasons and found.topic != "dependence":
            told = " ".join(plain_sentences(found, subject(), LEVEL))
            assert "“" not in told
            assert "p-value" not in told
            assert "standard error" not in told
            assert "coefficient" not in told


def test_the_plain_words_name_no_row():
    found = next(f for f in MADE if f.topic == "influence" and f.about == ("material",))
    told = plain_sentences(found, subject(), LEVEL)[0]
    assert told == (
        "Much hangs on a few rows: without 1 pipe, the odds ratio for material PVC against cast "
        "iron, given lined yes, is about 1.12 rather than 2.31."
    )


def test_the_plain_words_of_nothing_found_claim_nothing():
    for found in MADE:
        if not found.reasons:
            said = finding_words(found, subject(), LEVEL)
            assert plain_sentences(found, subject(), LEVEL) == (said.what, said.why)


# ------------------------------------------------------------------ over a grid of figures

GAPS = (0.0, 0.00004, 0.0004, 0.012, 0.0299, 0.0301, 0.07, 0.3, 0.98)
P_VALUES = (math.nan, 1e-30, 0.0004, 0.0099, 0.05, 0.7, 0.999)


def held_to(found):
    """Figures and grammar of all that is said of a finding."""
    known = known_numbers(found)
    for sentence in sentences_of(found):
        assert faults(sentence) == [], sentence
        assert unaccounted(tidied(sentence), known) == [], sentence
    for _, text in finding_figures(found, subject(), LEVEL):
        assert unaccounted(tidied(text), [*known, 100.0]) == [], text


@pytest.mark.parametrize("concern", ["nothing found", "keep in mind", "don't explain yet"])
@pytest.mark.parametrize("p", P_VALUES)
@pytest.mark.parametrize("gap", GAPS)
def test_shapes_of_every_size(gap, p, concern):
    reasons = () if concern == "nothing found" else ("bends",)
    evidence = shape_evidence(gap, p, 3.2, 0 if math.isnan(p) else 2)
    found = finding("shape", concern, evidence, reasons, ("age_years",))
    held_to(found)
    said = finding_words(found, subject(), LEVEL).what
    assert says(said, gap, 100) or "under 0.001 percentage points" in said


@pytest.mark.parametrize("step", [0.0, 1e-9, 0.00099, 0.0011, 0.0099, 0.19, 1.0, 37.2, 5e7])
@pytest.mark.parametrize("converged", [True, False, None])
@pytest.mark.parametrize("iterations", [None, 0, 1, 12_345])
def test_fits_that_ended_anywhere(step, converged, iterations):
    reasons = (("not converged",) if converged is False else ()) + (
        ("gradient",) if step > 0.01 else ()
    )
    evidence = convergence_evidence(converged, iterations, step)
    concern = "don't explain yet" if step > 0.2 else "keep in mind" if reasons else "nothing found"
    held_to(finding("convergence", concern, evidence, reasons))


@pytest.mark.parametrize("dropped", [1, 2, 12, 12_345])
@pytest.mark.parametrize("difference", [-0.9, -0.03, -0.00002, 0.0, 0.0004, 0.031, 0.6])
def test_rows_left_out_in_any_number(dropped, difference):
    estimate = Estimate(difference, 0.01, difference - 0.02, difference + 0.02)
    for known in {1, dropped}:
        held_to(finding("missing", "nothing found", missing_evidence(dropped, known, estimate)))


@pytest.mark.parametrize("c", [0.5, 0.5004, 0.61, 0.9004, 0.9996])
def test_ranks_of_every_quality(c):
    evidence = discrimination_evidence(c, c - 0.01, min(c + 0.01, 0.9999))
    held_to(finding("discrimination", "nothing found", evidence))
    assert (
        "100%"
        not in finding_words(
            finding("discrimination", "nothing found", evidence), subject(), LEVEL
        ).what
    )


@pytest.mark.parametrize("events", [0.0, 1.0, 3.5, 12.0, 123_456.0])
@pytest.mark.parametrize("parameters", [1, 2, 30])
def test_any_amount_of_data(events, parameters):
    evidence = amount.AmountEvidence(events, 5000.0, parameters, min(events, 5000) / parameters)
    held_to(finding("amount", "keep in mind", evidence, ("few events",)))


HOSTILE = "  <img src=x onerror=alert(1)>\n & “quoted” $x^2$ %s {0} "


def hostile_subject():
    facts = (
        number_facts(label=HOSTILE, unit=HOSTILE),
        number_facts("past_repairs", label=HOSTILE, unit=""),
        level_facts(label=HOSTILE, level_labels=(HOSTILE,) * 3),
        level_facts(
            "lined", (False, True), label=HOSTILE, kind="yes/no", level_labels=(HOSTILE, "")
        ),
    )
    made = subject(predictors=facts)
    texts = {"name": HOSTILE, "event": HOSTILE, "case": HOSTILE, "cases": HOSTILE}
    return replace(made, outcome=replace(made.outcome, **texts))


@pytest.mark.parametrize("found", ALL)
def test_any_label_stays_on_one_line_and_is_left_as_it_is(found):
    about = hostile_subject()
    said = finding_words(found, about, LEVEL)
    texts = [said.heading, *sentences_of(found, about)]
    texts += [text for pair in finding_figures(found, about, LEVEL) for text in pair]
    texts += [*picture_axes(found, about), *picture_legend(found, about)]
    for text in texts:
        assert text == " ".join(text.split())


def test_columns_and_rows_of_any_name_stay_on_one_line():
    moved = made_pattern(labels=(HOSTILE,))
    reasons = ("moves an odds ratio",)
    found = finding("influence", "keep in mind", influence_evidence(moved), reasons, ("age_years",))
    said = finding_words(found, subject(), LEVEL).what
    assert said == " ".join(said.split())
    assert "<img src=x onerror=alert(1)>" in said


def test_evidence_of_an_unknown_kind_is_refused():
    with pytest.raises(TypeError, match="no words for object"):
        evidence_words(object(), MADE[0], subject(), LEVEL)
    with pytest.raises(TypeError, match="no figures of object"):
        evidence_figures(object(), MADE[0], subject(), LEVEL)
