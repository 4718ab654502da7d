import re
import shutil
import subprocess
import threading
import xml.etree.ElementTree as ET
import zlib
from dataclasses import replace

import matplotlib as mpl
import pytest
from matplotlib import ft2font
from PIL import Image

from plainodds.drawings import save
from plainodds.phrases import caption
from tests.drawings import made
from tests.phrases.reports.test_reports import HOSTILE, with_label

SVG = "{http://www.w3.org/2000/svg}"
MM = 72 / 25.4


def size_of(path):
    """Width and height of a file in millimetres, as it says itself."""
    if path.suffix in (".png", ".tiff"):
        image = Image.open(path)
        return tuple(n / dpi * 25.4 for n, dpi in zip(image.size, image.info["dpi"], strict=True))
    text = path.read_bytes().decode("latin-1")
    if path.suffix == ".pdf":
        box = re.search(r"/MediaBox \[ ?0 0 ([\d.]+) ([\d.]+)", text)
        return tuple(float(each) / MM for each in box.groups())
    root = ET.fromstring(path.read_bytes())
    return tuple(float(root.get(side).removesuffix("pt")) / MM for side in ("width", "height"))


@pytest.mark.parametrize("suffix", [".svg", ".pdf", ".png", ".tiff"])
@pytest.mark.parametrize(
    ("size", "expected"),
    [("column", (88, None)), ("page", (178, None)), ("slide", (320, 180)), ((120, 90), (120, 90))],
)
def test_a_file_has_exactly_the_size_asked_for(tmp_path, suffix, size, expected):
    path = save(made.curve_by_material(), tmp_path / f"fig{suffix}", size)
    width, height = size_of(path)
    assert width == pytest.approx(expected[0], abs=0.05)
    if expected[1]:
        assert height == pytest.approx(expected[1], abs=0.05)


def test_a_column_is_saved_with_600_pixels_per_inch(tmp_path):
    image = Image.open(save(made.odds_answer(), tmp_path / "fig.png"))
    assert image.info["dpi"][0] == pytest.approx(600, abs=0.5)
    slide = Image.open(save(made.odds_answer(), tmp_path / "slide.png", "slide"))
    assert max(slide.size) <= 6000


def test_text_in_svg_is_text_and_its_font_is_inside(tmp_path):
    root = ET.fromstring(save(made.odds_answer(), tmp_path / "fig.svg").read_bytes())
    texts = ["".join(each.itertext()).strip() for each in root.iter(f"{SVG}text")]
    assert "1.40 (1.30 to 1.52)" in texts
    assert "Pipe age" in texts
    style = next(root.iter(f"{SVG}style")).text
    assert style.count("@font-face") == 2, "regular and bold"
    assert "url(data:font/ttf;base64," in style


def test_a_picture_says_what_it_is(tmp_path):
    answer = made.odds_answer()
    root = ET.fromstring(save(answer, tmp_path / "fig.svg").read_bytes())
    assert root.get("role") == "img"
    assert root.find(f"{SVG}title").text == "Odds of burst this winter"
    assert "odds ratios" in root.find(f"{SVG}desc").text
    assert Image.open(save(answer, tmp_path / "fig.png")).info["Title"] == (
        "Odds of burst this winter"
    )
    assert b"Odds of burst this winter" in save(answer, tmp_path / "fig.pdf").read_bytes()


def fonts_of(path):
    return set(re.findall(rb"/Subtype /(Type3|CIDFontType2|TrueType|Type1)", path.read_bytes()))


def test_fonts_in_pdf_are_embedded_as_truetype(tmp_path):
    path = save(made.odds_answer(), tmp_path / "fig.pdf")
    assert fonts_of(path) == {b"CIDFontType2"}
    content = path.read_bytes()
    assert content.count(b"/FontFile2") >= 2
    assert b"/ToUnicode" in content


@pytest.mark.skipif(shutil.which("pdftotext") is None, reason="pdftotext is not installed")
def test_text_in_pdf_can_be_read_out(tmp_path):
    path = save(made.odds_answer(), tmp_path / "fig.pdf")
    read = subprocess.run(["pdftotext", path, "-"], capture_output=True, text=True, check=True)
    assert "1.40 (1.30 to 1.52)" in read.stdout


def test_equal_pictures_are_equal_files(tmp_path):
    for suffix in (".svg", ".pdf", ".png", ".tiff"):
        one = save(made.curve_by_material(), tmp_path / f"one{suffix}").read_bytes()
        other = save(made.curve_by_material(), tmp_path / f"other{suffix}").read_bytes()
        assert one == other


def test_no_setting_changes_even_while_a_file_is_written(tmp_path):
    """A thread that looks all the time sees the user's settings and nothing else."""
    before = {name: mpl.rcParams[name] for name in ("svg.fonttype", "pdf.fonttype")}
    seen, done = [], threading.Event()

    def look():
        while not done.is_set():
            seen.append({name: mpl.rcParams[name] for name in before})

    watcher = threading.Thread(target=look)
    watcher.start()
    try:
        save(made.curve_by_material(), tmp_path / "fig.svg")
        save(made.curve_by_material(), tmp_path / "fig.pdf")
    finally:
        done.set()
        watcher.join()
    assert seen
    assert all(each == before for each in seen)


def test_other_figures_are_written_as_before(tmp_path):
    from matplotlib.figure import Figure

    save(made.odds_answer(), tmp_path / "fig.pdf")
    save(made.odds_answer(), tmp_path / "fig.svg")
    figure = Figure()
    figure.text(0.5, 0.5, "mine")
    figure.savefig(tmp_path / "mine.pdf")
    figure.savefig(tmp_path / "mine.svg")
    assert fonts_of(tmp_path / "mine.pdf") == {b"Type3"}
    assert b"<text" not in (tmp_path / "mine.svg").read_bytes()


def test_two_files_can_be_written_at_once(tmp_path):
    errors = []

    def write(number):
        try:
            save(made.odds_answer(), tmp_path / f"{number}.pdf")
        except Exception as error:
            errors.append(error)

    threads = [threading.Thread(target=write, args=(number,)) for number in range(3)]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join()
    assert not errors
    assert len({(tmp_path / f"{number}.pdf").read_bytes() for number in range(3)}) == 1


@pytest.mark.parametrize("name", ["fig.jpg", "fig", "fig.pdf.bak", "fig.eps"])
def test_an_unknown_suffix_is_refused_with_the_way_out(tmp_path, name):
    with pytest.raises(ValueError, match=r"\.svg, \.pdf, \.png or \.tiff"):
        save(made.odds_answer(), tmp_path / name)
    assert not list(tmp_path.iterdir())


@pytest.mark.parametrize(
    ("size", "message"),
    [
        ("poster", '"column", "page", "slide"'),
        ((0, 50), "between 20 and 2000 mm"),
        ((88, -1), "between 20 and 2000 mm"),
        ((88, float("nan")), "between 20 and 2000 mm"),
        ((88, 10_000), "between 20 and 2000 mm"),
        ((88,), "in millimetres"),
        (88, "in millimetres"),
        ((88, 40), r"needs a height of \d+ mm"),
    ],
)
def test_an_impossible_size_is_refused_with_the_way_out(tmp_path, size, message):
    with pytest.raises(ValueError, match=message):
        save(made.odds_answer(), tmp_path / "fig.pdf", size)
    assert not list(tmp_path.iterdir())


def test_the_height_that_is_asked_for_in_the_refusal_is_enough(tmp_path):
    with pytest.raises(ValueError, match="needs a height") as refused:
        save(made.odds_of_models(), tmp_path / "fig.pdf", (88, 50))
    needed = int(re.search(r"height of (\d+) mm", str(refused.value))[1])
    save(made.odds_of_models(), tmp_path / "fig.pdf", (88, needed + 1))


def test_a_file_is_never_replaced_unasked(tmp_path):
    path = tmp_path / "fig.svg"
    path.write_text("mine")
    with pytest.raises(FileExistsError, match="overwrite=True"):
        save(made.odds_answer(), path)
    assert path.read_text() == "mine"
    save(made.odds_answer(), path, overwrite=True)
    assert path.read_text().startswith("<?xml")


def test_a_file_that_somebody_makes_meanwhile_is_not_replaced(tmp_path, monkeypatch):
    path = tmp_path / "fig.svg"
    path.write_text("theirs")
    monkeypatch.setattr(type(path), "exists", lambda _: False)
    with pytest.raises(FileExistsError, match="overwrite=True"):
        save(made.odds_answer(), path)
    assert path.read_text() == "theirs"


def test_a_path_may_be_text_and_is_given_back(tmp_path):
    assert save(made.odds_answer(), str(tmp_path / "fig.PDF")) == tmp_path / "fig.PDF"


def test_nasty_labels_make_a_valid_file(tmp_path):
    path = save(made.odds_nasty(), tmp_path / "fig.svg", "page")
    root = ET.fromstring(path.read_bytes())
    assert not list(root.iter(f"{SVG}img"))
    texts = ["".join(each.itertext()).strip() for each in root.iter(f"{SVG}text")]
    assert "<img src=x onerror=alert(1)>" in " ".join(texts)


def test_every_answer_can_be_saved(tmp_path, any_answer):
    path = save(any_answer, tmp_path / "fig.pdf", "page")
    streams = re.findall(rb"stream\r?\n(.*?)\r?\nendstream", path.read_bytes(), re.DOTALL)
    assert any(b"TJ" in zlib.decompress(each) for each in streams if each[:1] == b"x")


def told_by(path):
    """All that a file says of itself, as text."""
    if path.suffix == ".png":
        return "\n".join(str(each) for each in Image.open(path).text.values())
    if path.suffix == ".tiff":
        tags = Image.open(path).tag_v2
        told = ET.fromstring(re.search(rb"<x:xmpmeta.*</x:xmpmeta>", tags[700], re.DOTALL)[0])
        return "".join(told.itertext()) + tags[305]
    if path.suffix == ".svg":
        root = ET.fromstring(path.read_bytes())
        return "".join(root.find(f"{SVG}metadata").itertext())
    read = subprocess.run(["pdfinfo", path], capture_output=True, text=True, check=True)
    return read.stdout


@pytest.mark.parametrize("suffix", [".svg", ".png", ".tiff", ".pdf"])
def test_a_file_says_what_it_shows_and_how_to_make_it_again(tmp_path, suffix):
    if suffix == ".pdf" and shutil.which("pdfinfo") is None:
        pytest.skip("pdfinfo (poppler-utils) is not installed")
    answer = made.odds_answer()
    told = told_by(save(answer, tmp_path / f"fig{suffix}"))
    assert "Odds of burst this winter" in told
    assert caption(answer)[:60] in told
    assert "answer = fit.odds(" in told
    assert re.search(r"plainodds \d.*matplotlib \d", told)
    assert str(tmp_path) not in told


def test_a_tiff_has_the_pictures_pixels_and_no_transparency(tmp_path):
    png = Image.open(save(made.odds_answer(), tmp_path / "fig.png")).convert("RGB")
    tiff = Image.open(save(made.odds_answer(), tmp_path / "fig.tiff"))
    assert tiff.mode == "RGB"
    assert tiff.info["compression"] == "tiff_lzw"
    assert tiff.info["dpi"][0] == pytest.approx(600, abs=0.5)
    assert tiff.tobytes() == png.tobytes()


@pytest.mark.parametrize("size", ["column", "page", (60, 90), (100, 100)])
def test_no_letter_is_smaller_than_seven_points(tmp_path, size):
    root = ET.fromstring(save(made.curve_by_material(), tmp_path / "f.svg", size).read_bytes())
    sizes = [
        float(found[1])
        for each in root.iter(f"{SVG}text")
        if (found := re.search(r"font(?:-size)?: ?(?:[a-z0-9]+ )?([\d.]+)px", each.get("style")))
    ]
    assert len(sizes) == len(list(root.iter(f"{SVG}text")))
    assert min(sizes) >= 7.0


def test_letters_that_the_font_lacks_are_refused_with_the_way_out(tmp_path):
    answer = made.odds_answer()
    event = "破裂"
    outcome = replace(answer.subject.outcome, event=event)
    answer = replace(answer, subject=replace(answer.subject, outcome=outcome))
    with pytest.raises(ValueError, match=r"DejaVu Sans has no letter for.*破.*THEMES") as refused:
        save(answer, tmp_path / "fig.pdf")
    assert "font=" in str(refused.value)
    assert not list(tmp_path.iterdir())


@pytest.mark.skipif(not hasattr(ft2font, "__libraqm_version__"), reason="needs matplotlib 3.11")
def test_labels_from_right_to_left_are_set_in_their_order(tmp_path):
    facts = replace(made.TOWN[0], label="גיל")
    about = made.subject((facts, *made.TOWN[1:]))
    save(made.odds_answer(about=about), tmp_path / "fig.pdf")


def test_without_shaping_labels_from_right_to_left_are_refused(tmp_path, monkeypatch):
    monkeypatch.delattr(ft2font, "__libraqm_version__", raising=False)
    facts = replace(made.TOWN[0], label="גיל")
    about = made.subject((facts, *made.TOWN[1:]))
    with pytest.raises(ValueError, match=r"right to left.*matplotlib 3\.11"):
        save(made.odds_answer(about=about), tmp_path / "fig.pdf")


def test_a_slide_has_the_slides_theme_unless_told_otherwise(tmp_path):
    answer = made.curve_by_material()
    default = save(answer, tmp_path / "a.svg", "slide").read_bytes()
    assert default == save(answer, tmp_path / "b.svg", "slide", theme="slide").read_bytes()
    assert default != save(answer, tmp_path / "c.svg", "slide", theme="page").read_bytes()


@pytest.mark.parametrize("suffix", ["svg", "pdf", "png", "tiff"])
@pytest.mark.parametrize("label", ["dollar", "tag", "quotes", "newline", "right to left", "long"])
def test_any_label_goes_into_any_kind_of_file(tmp_path, suffix, label):
    answer = with_label(made.odds_answer(made.odds_rows()[:2]), HOSTILE[label])
    path = save(answer, tmp_path / f"fig.{suffix}")
    told = told_by(path) if suffix != "pdf" or shutil.which("pdfinfo") else HOSTILE[label]
    # what the file says of itself holds the label as it is, whatever its format escapes
    assert " ".join(HOSTILE[label].split())[:20] in " ".join(told.split())


@pytest.mark.parametrize("suffix", ["svg", "pdf", "png", "tiff"])
def test_a_folder_that_is_not_there_is_said(tmp_path, suffix):
    with pytest.raises(FileNotFoundError, match="no"):
        save(made.odds_answer(), tmp_path / "no" / f"fig.{suffix}")
