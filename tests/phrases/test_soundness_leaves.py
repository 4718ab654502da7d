"""What of a fit's checks leaves the notebook: captions, methods, tables, and no single row."""

import math

import pytest
import statsmodels.formula.api as smf

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
