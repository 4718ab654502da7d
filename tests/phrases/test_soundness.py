"""Whether to explain a fit, in words: one sentence first, and nothing claimed beyond the checks."""

import math
import re
from dataclasses import replace

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.soundness import SoundnessQuestion
from plainodds.errors import QuestionRefused
from plainodds.phrases import alternative, words
from plainodds.phrases.checks import finding_figures, finding_words
from plainodds.phrases.soundness import summary
from tests.answers.checks.fits import invented
from tests.phrases.made_findings import (
    MADE,
    UNKNOWN,
    answer_of,
    everything,
    finding,
    shape,
)
from tests.phrases.reading import faults

FINE = next(each for each in MADE if each.concern == "nothing found")
MIND = next(each for each in MADE if each.concern == "keep in mind")
HEAVY = next(each for each in MADE if each.concern == "don't explain yet")
OPEN = finding("dependence", "not known", None, unknown="no groups named")


def by_weight(findings):
    return sorted(findings, key=lambda each: -each.weight)


@pytest.mark.parametrize(
    ("findings", "told"),
    [
        (
            (HEAVY, MIND, OPEN, FINE),
            "This fit should not be explained yet: of 4 checks, 1 speaks against it, 1 needs "
            "keeping in mind and 1 could not be told.",
        ),
        (
            (HEAVY, HEAVY, FINE),
            "This fit should not be explained yet: of 3 checks, 2 speak against it.",
        ),
        (
            (MIND, MIND, FINE),
            "Of 3 checks, 2 need keeping in mind; nothing that was looked at speaks against "
            "explaining this fit.",
        ),
        (
            (OPEN, FINE),
            "Of 2 checks, 1 could not be told; nothing that was looked at speaks against "
            "explaining this fit.",
        ),
        (
            (FINE, FINE),
            "Of 2 checks, all found nothing to keep in mind; nothing that was looked at speaks "
            "against explaining this fit.",
        ),
        (
            (OPEN, OPEN),
            "None of the checks could be made, so whether to explain this fit is not known.",
        ),
    ],
)
def test_the_first_sentence_says_whether_to_explain_the_fit(findings, told):
    answer = answer_of(*findings)
    assert summary(answer) == told
    assert words(answer).sentences[0] == told
    assert words(answer, "technical").sentences[0] == told


def test_the_plain_words_tell_at_most_three_findings_and_say_how_many_are_left():
    heavy = [each for each in by_weight(MADE) if each.reasons]
    said = words(answer_of(*by_weight(MADE)))
    assert len(said.sentences) <= 1 + 3 * 2 + 1
    assert (
        said.sentences[-1] == f"{len(heavy) - 3} more findings are told in the words for analysts."
    )
    assert words(answer_of(*heavy[:4])).sentences[-1].startswith("1 more finding is told")
    assert "more finding" not in " ".join(words(answer_of(*heavy[:3])).sentences)


def test_the_plain_words_of_a_clean_fit_are_one_sentence():
    assert len(words(answer_of(FINE, OPEN)).sentences) == 1


def test_the_analysts_words_tell_every_finding_with_its_weight():
    findings = by_weight(MADE)
    answer = answer_of(*findings)
    told = " ".join(words(answer, "technical").sentences)
    for each in findings:
        said = finding_words(each, answer.subject, 0.95)
        assert f"{said.heading} ({each.concern}): {said.what}" in told
        if each.weight:
            assert f"{said.why} {said.next_step}" in told


def test_what_is_only_reported_comes_with_its_limits():
    reported = [each for each in MADE if each.topic in ("overall", "discrimination")]
    told = " ".join(words(answer_of(*reported), "technical").cautions)
    for limit in ("arbitrary", "any large one", "not shares of variance", "whether the chances"):
        assert limit in told
    assert "arbitrary" not in " ".join(words(answer_of(FINE), "technical").cautions)


def test_no_check_is_said_to_show_that_a_model_is_right():
    for audience in ("plain", "technical"):
        told = " ".join(words(answer_of(FINE), audience).cautions)
        assert "no check can tell" in told


def test_what_is_to_be_known_of_the_fit_is_said_here_too():
    said = words(answer_of(FINE, notices=("the outcome was turned round",)))
    assert said.cautions[-1] == "The outcome was turned round."


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize("found", everything())
def test_sentences_are_well_made(found, audience):
    answer = answer_of(found)
    said = words(answer, audience)
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == [], sentence


def test_the_description_of_a_picture_is_of_the_finding_that_is_shown():
    bends = finding("shape", "keep in mind", shape(0.07), ("bends",), ("age_years",))
    answer = answer_of(HEAVY, bends)
    assert alternative(answer).startswith("How the fit ended, don't explain yet")
    shown = replace(answer, question=SoundnessQuestion(show="shape"))
    assert alternative(shown) == (
        "Shape along pipe age, keep in mind: the share of burst this winter in the data along "
        "pipe age, smoothed with a band and in 11 groups, beside the model's. Along pipe age, the "
        "model and the data differ by up to 7.0 percentage points in the middle 90% of rows, more "
        "than chance would explain (p-value under 0.001)."
    )


def test_an_unknown_audience_is_refused():
    with pytest.raises(QuestionRefused, match="'plain' or 'technical'"):
        words(answer_of(FINE), "lay")


@pytest.mark.parametrize("unknown", UNKNOWN)
def test_what_is_not_known_is_not_called_fine(unknown):
    found = finding("calibration", "not known", None, unknown=unknown)
    told = " ".join(words(answer_of(found, FINE), "technical").sentences)
    assert "1 could not be told" in told
    assert "Chances against what happened (not known): This cannot be told" in told


# ------------------------------------------------------------------ real fits


def well_made(answer):
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == [], sentence
    for found in answer.findings:
        shown = replace(answer, question=replace(answer.question, show=found.topic))
        assert faults(alternative(shown)) == []
        for label, text in finding_figures(found, answer.subject, answer.question.level):
            assert label
            assert text
            assert "nan" not in text.split()


def logit(formula, data):
    return smf.logit(formula, data).fit(disp=0)


def test_a_clean_fit():
    data = invented(600)
    data["home"] = np.arange(600) // 5
    data.loc[::17, "w"] = np.nan
    fit = po.FittedLogit(logit("y ~ x + w + count + C(group)", data), data=data)
    answer = fit.soundness(groups="home", optimism="bootstrap", repeats=5)
    well_made(answer)
    assert "speaks against explaining this fit" in words(answer).sentences[0]
    assert "36 of 600" in " ".join(words(answer, "technical").sentences)


def test_a_separated_fit_says_so_first():
    data = invented(300)
    data["alarm"] = np.arange(300) < 6
    data.loc[data.alarm, "y"] = 1
    result = smf.glm("y ~ x + alarm", data, family=sm.families.Binomial()).fit()
    answer = po.FittedLogit(result).soundness()
    well_made(answer)
    first, second = words(answer).sentences[:2]
    assert first.startswith("This fit should not be explained yet")
    assert second == (
        "Alarm tells the outcome of 6 of 300 rows without exception: all cases with alarm yes had "
        "the same outcome."
    )


def test_a_fit_that_bends_names_the_number():
    answer = po.FittedLogit(logit("y ~ x + w", invented(1500, bend=0.8))).soundness()
    well_made(answer)
    assert "Along x, the model's chances and what happened differ" in str(words(answer))


@pytest.mark.parametrize(
    "make",
    [
        lambda d: smf.logit("y ~ x + w", d).fit_regularized(disp=0, alpha=1.0),
        lambda d: smf.gee("y ~ x + w", "group", d, family=sm.families.Binomial()).fit(),
        lambda d: smf.glm(
            "y ~ x + w", d, family=sm.families.Binomial(), offset=np.full(len(d), 0.1)
        ).fit(cov_type="HC1"),
        lambda d: smf.glm(
            "y ~ 0 + C(group)", d, family=sm.families.Binomial(), freq_weights=np.full(len(d), 2.0)
        ).fit(),
        lambda d: sm.GLM(
            np.column_stack([d["count"] + 1, np.full(len(d), 3)]),
            sm.add_constant(d[["x", "w"]]),
            family=sm.families.Binomial(),
        ).fit(),
        lambda d: smf.logit("y ~ x + w + I(x + w)", d).fit(disp=0, method="bfgs"),
    ],
    ids=["penalised", "gee", "offset and HC1", "no intercept, weights", "counts", "rank"],
)
def test_fits_of_every_kind_have_their_words(make):
    well_made(po.FittedLogit(make(invented(200))).soundness())


def test_a_fit_without_its_rows_says_what_cannot_be_known():
    data = invented(200)
    result = logit("y ~ x", data)
    result.remove_data()
    answer = po.FittedLogit(result, data=data).soundness()
    well_made(answer)
    told = " ".join(words(answer, "technical").sentences)
    assert "because the result carries its outcome no longer" in told


def test_a_case_control_sample():
    fit = po.FittedLogit(logit("y ~ x + w", invented(400)), sampling="case-control")
    answer = fit.soundness()
    well_made(answer)
    told = " ".join(words(answer, "technical").sentences)
    assert "whose rows were chosen by their outcome" in told


def test_figures_are_written_as_they_were_found():
    fit = po.FittedLogit(logit("y ~ x + w", invented(400)))
    answer = fit.soundness()
    found = {each.topic: each for each in answer.findings}
    figures = dict(finding_figures(found["overall"], answer.subject, 0.95))
    assert math.isclose(
        float(figures["Tjur's R²"]), found["overall"].evidence.tjur, abs_tol=0.005001
    )
    counted = dict(finding_figures(found["amount"], answer.subject, 0.95))
    events = int(pd.Series(invented(400).y).sum())
    assert counted["With the event"] == str(events)
    assert re.fullmatch(r"[\d.]+", counted["Of the rarer outcome for each coefficient"])
