"""What of a fit's checks leaves the notebook: captions, methods, tables, and no single row."""

import math
import re
from dataclasses import replace

import numpy as np
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from matplotlib.text import Text

import plainodds as po
from plainodds.answers.disclosure import guarded
from plainodds.phrases.references import REFERENCES


@pytest.fixture(scope="module")
def answer():
    mains = po.demo.tessel_bay(rows=1_200)
    result = smf.logit("burst ~ age_years + material + soil", mains).fit(disp=0)
    return po.FittedLogit(result).soundness()


def found(answer, topic):
    return next(each for each in answer.findings if each.topic == topic)


def test_the_note_on_methods_cites_what_was_looked_at_and_no_more(answer):
    note = po.methods_note(answer)
    text = " ".join(note.sentences)
    assert "linear programme" in text
    assert "Pregibon 1981" in text
    assert "by groups" not in text, "no groups were named"
    assert set(note.references) == {full for short, full in REFERENCES.items() if short in text}


def test_the_report_table_has_every_finding_with_its_concern(answer):
    table = po.report_table(answer)
    headings = [row.cells[0] for row in table.rows if row.kind == "heading"]
    assert len(headings) == len(answer.findings)
    assert all(": " in each for each in headings)


def test_single_rows_do_not_leave(answer):
    whole, safe = found(answer, "influence"), found(guarded(answer), "influence")
    assert whole.evidence.standing_out
    assert safe.evidence is None
    assert safe.concern == whole.concern
    assert "single rows" in po.report_table(answer).markdown()


def test_counts_of_few_do_not_leave(answer):
    safe = guarded(answer, 60)
    for each in found(safe, "levels").evidence.counts:
        assert each.cases == 0 or each.cases >= 60
        if not math.isnan(each.events):
            assert each.events == 0 or each.events >= 60
            assert each.cases == each.events or each.cases - each.events >= 60
    for number in found(safe, "discrimination").evidence.events:
        assert number == 0 or number >= 60
    shape = found(safe, "shape").evidence
    assert all(each.cases >= 60 for each in shape.bins)


def test_a_caption_names_the_finding_that_is_shown(answer):
    shown = po.caption(answer)
    assert "1,200" in shown
    assert shown.count("  ") == 0


@pytest.fixture(scope="module")
def scarce():
    """A level of four, all of whose events are known, and six rows left out."""
    mains = po.demo.tessel_bay(rows=1_500)
    mains["soil"] = mains.soil.astype(str)
    mains.loc[mains.index[:4], "soil"] = "peat"
    mains.loc[mains.index[:4], "burst"] = 1
    mains.loc[mains.index[50:56], "age_years"] = np.nan
    result = smf.glm("burst ~ age_years + soil", mains, family=sm.families.Binomial()).fit()
    outcome = po.Outcome(event="a burst", case="main", cases="mains")
    return po.FittedLogit(result, outcome=outcome).soundness()


@pytest.mark.parametrize("language", ["en", "de"])
def test_what_was_raised_is_told_as_up_to_and_never_as_the_number(scarce, language):
    whole, safe = scarce, guarded(scarce)
    few = {"en": "up to 10", "de": "höchstens 10"}[language]
    with po.writing(language):
        told = "\n".join(
            (
                str(po.words(safe)), str(po.words(safe, "technical")),
                po.report_table(whole).markdown(),
                *texts_of(replace(safe, question=replace(safe.question, show="levels"))),
                *texts_of(replace(safe, question=replace(safe.question, show="missing"))),
                *texts_of(replace(safe, question=replace(safe.question, show="separation"))),
            )
        )  # fmt: skip
    told = " ".join(told.split())
    assert told.count(few) >= 6
    rest = told.replace(few, "")
    # nothing else is ten, and neither four mains nor six rows are told
    assert not re.search(r"(?<![\d.,×/])(?:4|6|10) (?:mains|rows|of|Fälle|Zeilen|von)", rest)
    for unknown in ("not known events", "nicht bekannt Ereignis"):
        assert unknown not in told


def texts_of(answer):
    return [each.get_text() for each in po.draw(answer).findobj(Text) if each.get_text()]
