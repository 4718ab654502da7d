"""Figure files beside the notebook: new names, nothing overwritten."""

import threading

import pytest

import plainodds as po
from plainodds.views.saving import FORMATS, save_beside
from tests.views.frontend import text_of


@pytest.mark.parametrize(
    ("kind", "begins"), [("svg", b"<?xml"), ("pdf", b"%PDF"), ("png", b"\x89PNG")]
)
def test_each_kind_is_what_it_says(fit, tmp_path, kind, begins):
    saved = save_beside(fit.profile(), "profile", kind, tmp_path)
    assert saved.path == tmp_path / f"profile.{kind}"
    assert saved.content.startswith(begins)
    assert saved.media_type == FORMATS[kind]


def test_no_file_is_ever_overwritten(fit, tmp_path):
    (tmp_path / "profile.svg").write_text("mine")
    names = [save_beside(fit.profile(), "profile", "svg", tmp_path).path.name for _ in range(2)]
    assert names == ["profile-2.svg", "profile-3.svg"]
    assert (tmp_path / "profile.svg").read_text() == "mine"


def test_two_that_save_at_once_get_names_of_their_own(fit, tmp_path):
    answer, names = fit.profile(), []
    threads = [
        threading.Thread(
            target=lambda: names.append(save_beside(answer, "profile", "png", tmp_path).path.name)
        )
        for _ in range(4)
    ]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join()
    assert sorted(names) == ["profile-2.png", "profile-3.png", "profile-4.png", "profile.png"]


def test_a_figure_that_fails_leaves_no_empty_file(tmp_path):
    with pytest.raises(TypeError):
        save_beside("no answer", "profile", "png", tmp_path)
    assert list(tmp_path.iterdir()) == []


def test_the_button_saves_beside_the_notebook_and_offers_the_file(fit, page, tmp_path, monkeypatch):
    monkeypatch.chdir(tmp_path)
    view = po.CurveView(fit)
    page.change(view._extras.kind, index=1)
    page.press(view._extras.save_button)
    assert [path.name for path in tmp_path.iterdir()] == ["curve-age_years-by-material.pdf"]
    said = view._extras.saved.value
    assert "Saved as curve-age_years-by-material.pdf" in text_of(said)
    assert 'download="curve-age_years-by-material.pdf"' in said
    assert 'href="data:application/pdf;base64,' in said


def test_a_folder_that_cannot_be_written_to_is_said(fit, page, tmp_path, monkeypatch):
    view = po.ProfileView(fit)
    gone = tmp_path / "gone"
    gone.mkdir()
    monkeypatch.chdir(gone)
    gone.rmdir()
    page.press(view._extras.save_button)
    assert "FileNotFoundError" in text_of(view._messages.value)
    assert view._extras.saved.value == ""


def test_the_message_goes_once_saving_works(fit, page, tmp_path, monkeypatch):
    view = po.ProfileView(fit)
    gone = tmp_path / "gone"
    gone.mkdir()
    monkeypatch.chdir(gone)
    gone.rmdir()
    page.press(view._extras.save_button)
    assert view.problem is not None
    monkeypatch.chdir(tmp_path)
    page.press(view._extras.save_button)
    assert view._messages.value == ""
    assert view.problem is None
    assert "Saved as" in view._extras.saved.value
