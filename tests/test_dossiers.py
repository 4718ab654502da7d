"""Everything in one folder, whole or not at all."""

import hashlib
import json
import os
import re
from dataclasses import replace

import pandas as pd
import pytest
import statsmodels.formula.api as smf

import plainodds as po
from plainodds import dossiers as module
from tests.phrases.reports.test_reports import HOSTILE


@pytest.fixture(scope="module")
def result():
    return smf.logit("burst ~ age_years + soil", po.demo.tessel_bay(rows=1_500)).fit(disp=0)


@pytest.fixture(scope="module")
def fit(result):
    return po.FittedLogit(result, outcome=po.Outcome(event="a burst", case="main", cases="mains"))


@pytest.fixture(scope="module")
def answers(fit):
    return {
        "Odds ratios": fit.odds(),
        "ageing": fit.curve("age_years", by="soil"),
        "change": fit.change("age_years", 20, 60),
    }


def contents(folder):
    return {
        path.relative_to(folder).as_posix(): path.read_bytes()
        for path in sorted(folder.rglob("*"))
        if path.is_file()
    }


def test_a_dossier_holds_figures_tables_words_methods_a_script_and_a_manifest(answers, tmp_path):
    made = po.dossier(answers, tmp_path / "account", forms=["svg", "pdf"])
    names = set(contents(made))
    assert {"account.md", "methods.md", "make.py", "manifest.json"} <= names
    assert {"figures/01-odds-ratios.svg", "figures/03-change.pdf"} <= names
    assert {f"tables/02-ageing.{end}" for end in ("csv", "html", "md", "tex")} <= names
    unrounded = pd.read_csv(made / "tables/01-odds-ratios-unrounded.csv")
    assert unrounded.estimate.tolist() == pytest.approx(po.table(answers["Odds ratios"]).estimate)
    account = (made / "account.md").read_text(encoding="utf-8")
    assert account.count("](figures/") == 3
    assert account.index("Figure 1") < account.index("Figure 2") < account.index("Figure 3")
    assert "Localio" in (made / "methods.md").read_text(encoding="utf-8")


def test_the_manifest_names_every_file_with_its_digest(answers, tmp_path):
    made = po.dossier(answers, tmp_path / "account", forms=["svg"])
    held = json.loads((made / "manifest.json").read_text(encoding="utf-8"))
    files = contents(made)
    del files["manifest.json"]
    assert held["files"] == {name: hashlib.sha256(b).hexdigest() for name, b in files.items()}
    assert held["made_with"].startswith("plainodds ")


def test_nothing_says_who_or_where(answers, tmp_path):
    for name, held in contents(po.dossier(answers, tmp_path / "account", forms=["svg"])).items():
        assert str(tmp_path).encode() not in held, name
        assert os.path.expanduser("~").encode() + b"/" not in held, name


def test_the_script_makes_the_same_dossier_byte_by_byte(answers, result, tmp_path):
    made = po.dossier(answers, tmp_path / "one", forms=["svg", "png"], size=(120, 120))
    scope = {}
    exec((made / "make.py").read_text(encoding="utf-8"), scope)
    again = scope["make"](tmp_path / "two", result)
    assert contents(again) == contents(made)


@pytest.mark.parametrize(
    "theme", ["slide", replace(po.THEMES["page"], name="ours", font_size=10.0, dashes=((), (2, 1)))]
)
def test_the_script_knows_the_theme(answers, result, tmp_path, theme):
    made = po.dossier(answers, tmp_path / "one", forms=["svg"], theme=theme)
    scope = {}
    exec((made / "make.py").read_text(encoding="utf-8"), scope)
    assert contents(scope["make"](tmp_path / "two", result)) == contents(made)


@pytest.mark.parametrize("writing", [{"language": "de"}, {"decimal": ","}, {"thousands": "\u2009"}])
def test_the_script_writes_as_was_written(answers, result, tmp_path, writing):
    with po.writing(**writing):
        made = po.dossier(answers, tmp_path / "one", forms=["svg"])
    scope = {}
    exec((made / "make.py").read_text(encoding="utf-8"), scope)
    assert contents(scope["make"](tmp_path / "two", result)) == contents(made)


def test_the_script_takes_a_fit_in_once(answers, fit, tmp_path):
    panels = po.panels(*answers.values())
    made = po.dossier({**answers, "all": panels}, tmp_path / "one", forms=["svg"])
    source = (made / "make.py").read_text(encoding="utf-8")
    assert source.count("po.FittedLogit(") == 1
    assert max(map(len, source.splitlines())) <= 100


def test_an_existing_folder_is_never_replaced_unasked(answers, tmp_path):
    place = tmp_path / "account"
    made = po.dossier(answers, place, forms=["svg"])
    before = contents(made)
    with pytest.raises(FileExistsError, match="overwrite=True"):
        po.dossier(answers, place)
    assert contents(made) == before
    po.dossier({"only": answers["change"]}, place, forms=["svg"], overwrite=True)
    assert "figures/01-only.svg" in contents(place)
    assert "figures/02-ageing.svg" not in contents(place)
    assert [path.name for path in tmp_path.iterdir()] == ["account"]


def test_a_folder_that_no_dossier_wrote_is_never_replaced(answers, tmp_path):
    place = tmp_path / "mine"
    place.mkdir()
    (place / "thesis.docx").write_text("mine")
    with pytest.raises(FileExistsError, match="is no dossier"):
        po.dossier(answers, place, overwrite=True)
    account = po.dossier(answers, tmp_path / "account", forms=["svg"])
    (account / "figures" / "notes.txt").write_text("mine")
    with pytest.raises(FileExistsError, match=r"figures/notes\.txt"):
        po.dossier(answers, account, overwrite=True)
    assert (account / "figures" / "notes.txt").read_text() == "mine"


@pytest.mark.parametrize("stop", [KeyboardInterrupt, OSError("the disk is full")])
def test_what_is_stopped_leaves_nothing_half_written(answers, tmp_path, monkeypatch, stop):
    written = []

    def save(answer, path, *args, **more):
        written.append(path)
        if len(written) == 3:
            raise stop
        path.write_text("figure")

    monkeypatch.setattr(module, "save", save)
    with pytest.raises(type(stop) if isinstance(stop, Exception) else stop):
        po.dossier(answers, tmp_path / "account")
    assert len(written) == 3
    assert list(tmp_path.iterdir()) == []


def test_an_old_dossier_stays_when_the_new_one_is_stopped(answers, tmp_path, monkeypatch):
    place = po.dossier(answers, tmp_path / "account", forms=["svg"])
    before = contents(place)
    monkeypatch.setattr(module, "save", lambda *args, **more: 1 / 0)
    with pytest.raises(ZeroDivisionError):
        po.dossier(answers, place, overwrite=True)
    assert contents(place) == before
    assert [path.name for path in tmp_path.iterdir()] == ["account"]


def test_answers_without_names_are_called_by_their_question(fit, tmp_path):
    soil = [fit.change("soil", "low", "high"), fit.change("age_years", 10, 20), fit.odds()]
    made = po.dossier(soil, tmp_path / "account", forms=["svg"])
    figures = sorted(path.name for path in (made / "figures").iterdir())
    assert figures == ["01-change.svg", "02-change-2.svg", "03-odds.svg"]


@pytest.mark.parametrize(
    ("given", "error", "message"),
    [
        ({}, ValueError, "at least one answer"),
        ([], ValueError, "at least one answer"),
        (["odds"], TypeError, "no picture"),
        ({"odds": 3}, TypeError, "no picture"),
    ],
)
def test_what_is_no_answer_is_refused_before_anything_is_written(tmp_path, given, error, message):
    with pytest.raises(error, match=message):
        po.dossier(given, tmp_path / "account")
    assert list(tmp_path.iterdir()) == []


def test_a_place_that_is_not_there_is_said(answers, tmp_path):
    with pytest.raises(FileNotFoundError, match="make it first"):
        po.dossier(answers, tmp_path / "no" / "such")


def test_small_counts_do_not_leave(fit, tmp_path):
    answer = fit.curve("age_years", by="soil")
    assert any(0 < n < 10 for each in answer.support for n in each.counts)
    made = po.dossier([answer], tmp_path / "account", forms=["svg"], smallest_cell=200)
    figure = (made / "figures/01-curve.svg").read_text(encoding="utf-8")
    counts = [int(n.replace(",", "")) for n in re.findall(r">([\d,]+) mains<", figure)]
    assert all(n >= 200 for n in counts)
    assert json.loads((made / "manifest.json").read_text())["smallest_cell"] == 200


@pytest.mark.parametrize("hostile", ["dollar", "tag", "quotes", "newline", "long"])
def test_hostile_labels_make_a_whole_dossier(result, tmp_path, hostile):
    hostile = HOSTILE[hostile]
    fit = po.FittedLogit(
        result,
        predictors={"age_years": po.Predictor(label=hostile, unit=hostile)},
        outcome=po.Outcome(event=hostile, case=hostile, cases=hostile),
    )
    made = po.dossier({hostile: fit.odds()}, tmp_path / "account", forms=["svg"])
    scope = {}
    exec((made / "make.py").read_text(encoding="utf-8"), scope)
    assert contents(scope["make"](tmp_path / "again", result)) == contents(made)


def test_letters_that_no_font_has_are_refused_and_leave_nothing(result, tmp_path):
    fit = po.FittedLogit(result, outcome=po.Outcome(event=HOSTILE["CJK"]))
    with pytest.raises(ValueError, match="has no letter for"):
        po.dossier([fit.odds()], tmp_path / "account")
    assert list(tmp_path.iterdir()) == []


def test_a_german_dossier_is_german_throughout(answers, tmp_path):
    with po.writing("de"):
        made = po.dossier(answers, tmp_path / "account", forms=["svg"])
    account = (made / "account.md").read_text(encoding="utf-8")
    assert not re.search(r"Read with care|Figure|Table|Predictor|Estimate", account)
    for number in (1, 2, 3):
        assert f"*Abbildung {number}.* " in account
        assert f"\nTabelle {number}.\n" in account
    assert account.count("Mit Vorsicht zu lesen:") == 3
    methods = (made / "methods.md").read_text(encoding="utf-8")
    assert methods.startswith("## Methoden\n")
    assert "\n## Literatur\n" in methods
    table = (made / "tables/01-odds-ratios.csv").read_text(encoding="utf-8")
    assert "Gruppe,Merkmal," in table
    # names of files and the script are the same in every language
    assert {each.name for each in made.iterdir()} == {
        "account.md", "figures", "make.py", "manifest.json", "methods.md", "tables"
    }  # fmt: skip
