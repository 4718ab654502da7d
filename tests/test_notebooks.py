"""The worked notebooks run from top to bottom, as committed and without a word on stderr."""

import re
from pathlib import Path

import nbformat
import pytest
from nbclient import NotebookClient

NOTEBOOKS = sorted((Path(__file__).parents[1] / "notebooks").glob("*.ipynb"))

EXPLAINING = {"po.OddsView(fit)", "po.CurveView(fit)", "po.ProfileView(fit)"}
OPENED = {
    "is_it_sound": {f"po.SoundnessView({each})" for each in ("fit", "bent", "separated")},
    "own_model": EXPLAINING,
    "tessel_bay": EXPLAINING,
}
ANSWERS = {"ageing", "districts", "smoking"}


def names(path):
    return path.stem


VIEWS = {
    "figures_for_print": set(),
    "is_it_sound": {"SoundnessView"},
    "own_model": {"OddsView", "CurveView", "ProfileView"},
    "tessel_bay": {"OddsView", "CurveView", "ProfileView", "ChangeView", "EffectsView"},
    "two_together": {"PairView"},
}
ANSWERS = {
    "figures_for_print": "two_panels",
    "is_it_sound": "districts",
    "own_model": "smoking",
    "tessel_bay": "ageing",
    "two_together": "together",
}


def test_the_notebooks_are_there():
    assert [path.stem for path in NOTEBOOKS] == sorted(VIEWS)


@pytest.fixture(scope="module", params=NOTEBOOKS, ids=names)
def executed(request, tmp_path_factory):
    notebook = nbformat.read(request.param, as_version=4)
    # another folder than the repository's: what a notebook needs is installed or invented
    elsewhere = tmp_path_factory.mktemp("elsewhere")
    client = NotebookClient(notebook, timeout=120, resources={"metadata": {"path": elsewhere}})
    ran = client.execute()
    ran.metadata["name"] = request.param.stem
    return ran


def outputs(notebook, source):
    """Outputs of the one cell whose source is this."""
    (cell,) = [each for each in notebook.cells if each.source == source]
    return cell.outputs


def test_it_runs_without_errors_or_warnings(executed):
    noise = [
        output.get("text", output.get("evalue"))
        for cell in executed.cells
        if cell.cell_type == "code"
        for output in cell.outputs
        if output.output_type == "error" or output.get("name") == "stderr"
    ]
    assert noise == []


def views_opened(notebook):
    return [
        each.source
        for each in notebook.cells
        if re.fullmatch(r"po\.\w+View\(.*\)", each.source.splitlines()[-1])
    ]


def test_it_opens_its_views(executed):
    last_lines = (each.splitlines()[-1] for each in views_opened(executed))
    opened = {re.match(r"po\.(\w+)", each)[1] for each in last_lines}
    assert opened == VIEWS[executed.metadata["name"]]


def test_each_view_leaves_its_picture_and_words_behind(executed):
    for source in views_opened(executed):
        live, waiting = outputs(executed, source)
        assert_left_behind(live, waiting)


def assert_left_behind(live, waiting):
    assert "application/vnd.jupyter.widget-view+json" in live.data
    assert live.data["image/png"]
    assert "alt=" in live.data["text/html"]
    assert live.data["text/html"] in waiting.data["text/html"]


def test_an_answer_shows_its_picture(executed):
    shown = [
        output
        for cell in executed.cells
        if cell.cell_type == "code"
        and cell.source.splitlines()[-1] == ANSWERS[executed.metadata["name"]]
        for output in cell.outputs
    ]
    assert len(shown) == 1
    assert {"image/png", "text/html"} <= set(shown[0].data)


@pytest.mark.parametrize("path", NOTEBOOKS, ids=names)
def test_it_is_committed_without_outputs(path):
    notebook = nbformat.read(path, as_version=4)
    code = [cell for cell in notebook.cells if cell.cell_type == "code"]
    assert len(code) > 5
    assert all(cell.outputs == [] and cell.execution_count is None for cell in code)
    assert "widgets" not in notebook.metadata
