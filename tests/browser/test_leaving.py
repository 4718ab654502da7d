"""What leaves the notebook, read by another program: HTML tables and SVG in a browser."""

import csv
import io
import shutil
import subprocess

import pytest

import plainodds as po
from tests.drawings import made as drawn
from tests.drawings.seen import boxes_on
from tests.phrases.reports.test_reports import ANSWERS, HOSTILE, with_label

CELLS = """() => [...document.querySelectorAll('table tr')].map(
    row => [...row.children].map(cell => cell.innerText))"""


@pytest.fixture
def page(browser):
    page = browser.new_page(viewport={"width": 900, "height": 700})
    alerts = []
    page.on("dialog", lambda dialog: (alerts.append(dialog.message), dialog.dismiss()))
    yield page
    assert alerts == []
    page.close()


@pytest.mark.parametrize("answer", ANSWERS.values(), ids=ANSWERS)
def test_a_report_table_reads_cell_by_cell_in_a_browser(page, answer):
    table = po.report_table(answer)
    page.set_content(table.html())
    rows = page.evaluate(CELLS)
    head, *body = rows
    assert head == list(table.columns)
    for shown, row in zip(body, table.rows, strict=False):
        # a browser shows a narrow or leading space as it likes
        assert [" ".join(cell.split()) for cell in shown] == [
            " ".join(cell.split()) for cell in row.cells
        ]
    assert page.locator("caption").inner_text() == table.title


def test_figures_stand_at_the_right_and_keep_their_looks_without_a_style_sheet(page):
    page.set_content(po.report_table(ANSWERS["odds"]).html())
    figure = page.locator("td", has_text="(reference)").first
    assert figure.evaluate("cell => getComputedStyle(cell).textAlign") == "right"
    assert page.locator("style, link, script").count() == 0


@pytest.mark.parametrize("hostile", ["tag", "quotes", "dollar", "right to left", "CJK"])
def test_a_hostile_label_is_text(page, hostile):
    table = po.report_table(with_label(ANSWERS["odds"], HOSTILE[hostile]))
    page.set_content(table.html())
    shown = " ".join(page.locator("table").inner_text().split())
    assert " ".join(HOSTILE[hostile].split()) in shown


def test_the_text_of_an_svg_is_text_in_a_browser(page, tmp_path):
    answer = drawn.odds_answer()
    path = po.save(answer, tmp_path / "fig.svg", "page")
    page.goto(path.as_uri())
    shown = page.evaluate("() => [...document.querySelectorAll('text')].map(t => t.textContent)")
    wanted = {text.strip() for text, _ in boxes_on(po.draw(answer))}
    assert "1.40 (1.30 to 1.52)" in {text.strip() for text in shown}
    assert len(shown) >= len(wanted) // 2
    width = page.evaluate("() => document.documentElement.getBoundingClientRect().width")
    assert width == pytest.approx(178 / 25.4 * 96, abs=0.5)


@pytest.mark.skipif(shutil.which("pdftotext") is None, reason="pdftotext is not installed")
def test_a_pdf_is_of_its_size_and_its_text_can_be_selected(tmp_path):
    path = po.save(drawn.odds_answer(), tmp_path / "fig.pdf", (120, 150))
    told = subprocess.run(["pdfinfo", path], capture_output=True, text=True, check=True).stdout
    (line,) = [each for each in told.splitlines() if each.startswith("Page size")]
    width, height = (float(part) for part in line.split()[2:5:2])
    assert width == pytest.approx(120 / 25.4 * 72, abs=0.1 / 25.4 * 72)
    assert height == pytest.approx(150 / 25.4 * 72, abs=0.1 / 25.4 * 72)
    fonts = subprocess.run(["pdffonts", path], capture_output=True, text=True, check=True).stdout
    embedded = [line.split() for line in fonts.splitlines()[2:]]
    assert embedded
    assert all("yes" in line for line in embedded)
    text = subprocess.run(["pdftotext", path, "-"], capture_output=True, text=True, check=True)
    assert "1.40 (1.30 to 1.52)" in text.stdout


@pytest.mark.skipif(shutil.which("pdflatex") is None, reason="no TeX is installed")
@pytest.mark.parametrize("hostile", ["dollar", "quotes", "tag", "pipe", "newline", "markdown"])
def test_a_latex_table_compiles(tmp_path, hostile):
    table = po.report_table(with_label(ANSWERS["odds"], HOSTILE[hostile]))
    document = (
        "\\documentclass{article}\\usepackage{booktabs}\\usepackage{textcomp}"
        f"\\begin{{document}}\n{table.latex()}\\end{{document}}\n"
    )
    (tmp_path / "table.tex").write_text(document, encoding="utf-8")
    ran = subprocess.run(
        ["pdflatex", "-interaction=nonstopmode", "-halt-on-error", "table.tex"],
        cwd=tmp_path, capture_output=True, text=True, check=False,
    )  # fmt: skip
    assert ran.returncode == 0, ran.stdout[-2_000:]


def test_a_csv_opens_in_pandas_with_its_columns():
    import pandas as pd

    table = po.report_table(ANSWERS["odds"])
    lines = list(csv.reader(io.StringIO(table.csv(), newline="")))
    frame = pd.DataFrame(lines[2 : 2 + 4], columns=lines[1])
    assert list(frame.columns) == ["Group", *table.columns]
    assert frame.Group.nunique() == 2
