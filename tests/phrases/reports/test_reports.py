"""Formatted tables: what stands in them, and that no label breaks their format."""

import csv
import io
import re
from dataclasses import replace
from html.parser import HTMLParser

import pytest

import plainodds as po
from tests.phrases import made, made_changes

ANSWERS = {
    "odds": made.odds_answer(
        made.odds_row("material", "CI", "DI", 0.2, 0.1, per_step=False),
        made.odds_row("material", "CI", "PVC", -0.7, 0.1, per_step=False),
        made.odds_row(),
    ),
    "curve": made.curve_answer(),
    "profile": made.profile_answer(),
    "effects": made_changes.effects_answer(
        made_changes.level_row(), made_changes.effect_row(value=0.0014)
    ),
    "change": made_changes.change_answer(),
}
EVERY_KIND = pytest.mark.parametrize("answer", ANSWERS.values(), ids=ANSWERS)

HOSTILE = {
    "formula": '=HYPERLINK("http://x","y")',
    "minus": "-2+3",
    "at": "@SUM(A1)",
    "dollar": "$x_1^2$ & 50% #1 ~ {a} \\b",
    "tag": "<script>alert('1')</script> & <b>",
    "quotes": 'it\'s a "pipe", `so`',
    "pipe": "a | b || c",
    "newline": "two\nlines\r\nand\ttabs",
    "right to left": "גיל הצינור",
    "CJK": "水道管の年数",
    "long": "very long " * 20,
    "markdown": "**bold** _it_ [link](x) # head",
}


class Cells(HTMLParser):
    """The rows of cells that a browser would see, and every element it would make."""

    def __init__(self, text):
        super().__init__()
        self.rows, self.tags, self._open = [], [], False
        self.feed(text)

    def handle_starttag(self, tag, attributes):
        self.tags.append(tag)
        if tag == "tr":
            self.rows.append([])
        self._open = tag in ("th", "td")
        if self._open:
            self.rows[-1].append("")

    def handle_endtag(self, tag):
        if tag in ("th", "td"):
            self._open = False

    def handle_data(self, data):
        if self._open:
            self.rows[-1][-1] += data


def with_label(answer, label):
    """The answer with every label of every predictor and level, unit and event replaced."""
    facts = tuple(
        replace(each, label=label, unit=label, level_labels=(label,) * len(each.levels))
        for each in answer.subject.predictors
    )
    outcome = replace(answer.subject.outcome, event=label, case=label, cases=label)
    return replace(answer, subject=replace(answer.subject, predictors=facts, outcome=outcome))


def test_odds_ratios_stand_under_their_predictor_with_the_reference_shown():
    table = po.report_table(ANSWERS["odds"])
    kinds = [row.kind for row in table.rows]
    assert kinds == ["heading", "reference", "entry", "entry", "heading", "entry"]
    assert table.rows[1].cells[1] == "1 (reference)"
    assert table.rows[2].cells[1].startswith("1.22 (1.0")
    assert table.columns == ("Predictor", "Odds ratio (95% interval)", "p-value")


def test_models_side_by_side_have_a_column_each_and_gaps_are_said():
    rows = (
        made.odds_row(model="crude"),
        made.odds_row(model="adjusted", log=0.3),
        made.odds_row("past_repairs", 0.0, 1.0, model="adjusted"),
    )
    answer = made.odds_answer(*rows)
    answer = replace(answer, question=replace(answer.question, models=("crude", "adjusted")))
    table = po.report_table(answer)
    assert [column.split(":")[0] for column in table.columns] == ["Predictor", "crude", "adjusted"]
    assert table.rows[1].cells[1].startswith("1.52")
    assert table.rows[1].cells[2].startswith("1.35")
    assert table.rows[3].cells[1] == "not known"


@EVERY_KIND
def test_the_estimate_stands_before_its_interval(answer):
    table = po.report_table(answer)
    figures = [row.cells[1] for row in table.rows if row.kind == "entry"]
    assert any(re.search(r"\d.* \(.* to .*\)", figure) for figure in figures)
    assert len({len(row.cells) for row in table.rows if row.kind != "heading"}) == 1
    assert "6,000 pipes" in " ".join(table.notes)


@EVERY_KIND
def test_without_intervals_the_table_says_why(answer):
    subject = replace(answer.subject, no_interval="The fit is penalised.")
    table = po.report_table(replace(answer, subject=subject))
    assert "95%" not in " ".join(table.columns)
    assert "The fit is penalised." in " ".join(table.notes)


@EVERY_KIND
@pytest.mark.parametrize("hostile", HOSTILE.values(), ids=HOSTILE)
def test_html_makes_the_same_elements_whatever_the_labels(answer, hostile):
    harmless = Cells(po.report_table(with_label(answer, "harmless")).html())
    found = Cells(po.report_table(with_label(answer, hostile)).html())
    assert found.tags == harmless.tags
    assert [len(row) for row in found.rows] == [len(row) for row in harmless.rows]


@EVERY_KIND
@pytest.mark.parametrize("hostile", HOSTILE.values(), ids=HOSTILE)
def test_csv_reads_back_cell_by_cell_and_holds_no_formula(answer, hostile):
    table = po.report_table(with_label(answer, hostile))
    rows = list(csv.reader(io.StringIO(table.csv(), newline="")))
    body = rows[1 : 1 + 1 + sum(row.kind != "heading" for row in table.rows)]
    assert {len(row) for row in body} == {len(table.columns) + 1}
    for cell in (cell for row in rows for cell in row):
        assert not cell.lstrip().startswith(("=", "+", "-", "@", "\t", "\r"))


@EVERY_KIND
@pytest.mark.parametrize("hostile", HOSTILE.values(), ids=HOSTILE)
def test_markdown_keeps_its_columns(answer, hostile):
    table = po.report_table(with_label(answer, hostile))
    lines = [line for line in table.markdown().splitlines() if line.startswith("|")]
    assert len(lines) == len(table.rows) + 2
    bars = {len(re.findall(r"(?<!\\)\|", line)) for line in lines}
    assert bars == {len(table.columns) + 1}
    assert "<script>" not in re.sub(r"\\.", "", table.markdown())


def balanced(text):
    depth = 0
    for brace in re.findall(r"(?<!\\)[{}]", text):
        depth += 1 if brace == "{" else -1
        assert depth >= 0
    return depth == 0


@EVERY_KIND
@pytest.mark.parametrize("hostile", HOSTILE.values(), ids=HOSTILE)
def test_latex_keeps_its_columns_and_braces(answer, hostile):
    table = po.report_table(with_label(answer, hostile))
    written = table.latex()
    assert balanced(written)
    inside = written[written.index(r"\midrule") : written.index(r"\bottomrule")]
    for line, row in zip(inside.splitlines()[1:], table.rows, strict=True):
        cells = 0 if row.kind == "heading" else len(table.columns) - 1
        assert len(re.findall(r"(?<!\\)&", line)) == cells
        assert line.endswith(r" \\")
    bare = re.sub(r"\\[a-z]+(\{\})?|\\.", "", written)
    assert not set(bare) & set('$#%_~^<>|"`')


def test_a_table_can_be_asked_for_by_the_name_of_its_format():
    table = po.report_table(ANSWERS["odds"])
    assert table.written("latex") == table.latex()
    assert table._repr_html_() == table.html()
    assert str(table) == table.markdown()
    with pytest.raises(ValueError, match="'html', 'markdown', 'latex' or 'csv'"):
        table.written("docx")


def test_what_is_no_answer_has_no_table():
    with pytest.raises(TypeError, match="no report table"):
        po.report_table("odds")
