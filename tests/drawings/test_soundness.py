"""A finding drawn: its heading, its place, and how one picture follows another."""

import io
from dataclasses import replace

import numpy as np
import pytest
import statsmodels.formula.api as smf
from matplotlib.figure import Figure
from matplotlib.text import Text
from PIL import Image

import plainodds as po
from plainodds.answers.checks.finding import CONCERNS, TOPICS
from plainodds.drawings import Picture
from plainodds.drawings.draw import draw, figure_for, height_for
from plainodds.drawings.soundness import SoundnessDrawing
from plainodds.drawings.theme import theme_of
from plainodds.errors import QuestionRefused
from plainodds.phrases.checks.headings import concern_sign
from tests.answers.checks.fits import invented
from tests.drawings import made_findings as made
from tests.drawings.seen import assert_readable, boxes_on, words_on
from tests.published.data import births, vasoconstriction

THEME = theme_of("page")


# --- what is shown ------------------------------------------------------------------


def test_the_heading_is_the_topic_and_what_it_weighs():
    words = words_on(draw(made.answer(made.shape())))
    assert words[0] == "Shape along pipe age"
    assert {"■", "don't explain yet"} <= set(words)


@pytest.mark.parametrize("concern", CONCERNS)
def test_each_concern_has_a_sign_and_words(concern):
    finding = replace(made.calibration(), concern=concern)
    words = words_on(draw(made.answer(finding)))
    assert concern in words
    assert concern_sign(concern) in words


def test_the_finding_that_the_question_wants_is_the_one_drawn():
    both = (made.shape(), made.calibration(), made.shape(predictor="pressure_m"))
    asked = {
        "Shape along pressure": {"show": "shape", "predictor": "pressure_m"},
        "Shape along pipe age": {"show": "shape"},
        "Chances against what happened": {"show": "calibration"},
    }
    for heading, question in asked.items():
        answer = made.answer(*both, **question)
        assert words_on(draw(answer))[0] == heading
        assert SoundnessDrawing.title(answer) == heading


def test_a_finding_that_is_not_there_is_refused():
    with pytest.raises(QuestionRefused, match="no such finding"):
        draw(made.answer(made.shape(), show="calibration"))


def test_there_is_a_picture_of_every_topic():
    evidenced = {
        answer.findings[0].topic
        for answer in (make() for make in made.FINDINGS.values())
        if answer.findings[0].evidence is not None
    }
    assert evidenced == set(TOPICS)


# --- nothing meets, nothing is cut off ---------------------------------------------


@pytest.mark.parametrize("name", made.FINDINGS)
@pytest.mark.parametrize("width", [300, 640])
def test_nothing_meets_nothing_is_cut_off_and_nothing_is_too_small_on_the_screen(name, width):
    picture = Picture("screen", width)
    picture.show(made.FINDINGS[name]())
    assert_readable(picture.figure)
    for text in picture.figure.findobj(Text):
        if text.get_text():
            assert text.get_fontsize() >= theme_of("screen").small - 1e-9


@pytest.mark.parametrize("name", [name for name in made.FINDINGS if "nasty" in name])
def test_nothing_meets_and_nothing_is_cut_off_in_print(name):
    answer, theme, width = made.FINDINGS[name](), THEME.scaled(7 / 9), 88 / 25.4 * 72
    height = height_for(SoundnessDrawing, answer, theme, width)
    figure, _ = figure_for(SoundnessDrawing, answer, theme, width, height, dpi=150)
    assert_readable(figure)


@pytest.mark.parametrize("name", ["shape", "calibration with optimism", "influence", "separation"])
def test_a_picture_of_a_given_height_is_readable(name):
    picture = Picture("screen", 600, 420)
    picture.show(made.FINDINGS[name]())
    assert_readable(picture.figure)


@pytest.mark.parametrize("name", ["shape", "influence", "levels", "missing, not known"])
def test_a_picture_keeps_to_the_place_of_the_axes_it_was_given(name):
    figure = Figure(figsize=(12, 7), dpi=300)
    left, right = figure.subplots(1, 2)
    right.set_axis_off()
    assert draw(made.FINDINGS[name](), ax=left) is figure
    slot = left.get_position(original=True)
    width, height = figure.bbox.width, figure.bbox.height
    for text, box in boxes_on(figure):
        assert slot.x0 * width - 4 <= box.x0 <= box.x1 <= slot.x1 * width + 4, text
        assert slot.y0 * height - 4 <= box.y0 <= box.y1 <= slot.y1 * height + 4, text


@pytest.mark.parametrize("theme", ["page", "screen dark"])
def test_inks_are_those_of_the_theme(theme):
    picture = Picture(theme, 600)
    picture.show(made.answer(made.influence()))
    known = {theme_of(theme).ink, theme_of(theme).faint}
    texts = [text for text in picture.figure.findobj(Text) if text.get_text()]
    assert {text.get_color() for text in texts} <= known


# --- one picture after the other ----------------------------------------------------

PAIRS = {
    "shape": (made.shape(), made.shape(-0.05, "nothing found", "pressure_m", high=90.0)),
    "calibration": (made.calibration(made.OPTIMISM), made.calibration(shift=0.0, top=0.9)),
    "discrimination": (made.discrimination(), made.discrimination(30.0, 2500.0)),
    "influence": (made.influence(), made.influence((), "nothing found", others=20)),
    "separation": (made.separation(), made.separation(unbounded=(("age_years", np.inf),))),
    "levels": (made.levels(), made.levels(made.COUNTS[3:], 0, "nothing found")),
    "amount": (made.amount(), made.amount(9000.0, 3000.0, 3, "nothing found")),
    "missing": (made.missing(), made.missing(known=69, share=0.2)),
    "collinearity": (made.collinearity(), made.collinearity((("soil", 1.1),), False)),
    "standard errors": (made.standard_errors(), made.standard_errors((made.wide(),), 8.0)),
    "dependence": (made.dependence(), made.dependence(made.PAIRS[:2], True, "")),
    "convergence": (made.convergence(), made.convergence(np.inf)),
    "overall": (made.overall(), made.overall(0.5, 0.0001, "keep in mind")),
    "what is not known": (made.not_known("missing"), made.not_known("overall", "no outcome")),
}


@pytest.mark.parametrize("name", PAIRS)
def test_another_finding_of_the_topic_moves_the_artists(name):
    one, other = (made.answer(finding) for finding in PAIRS[name])
    picture, built = Picture("screen", 600, 700), Picture("screen", 600, 700)
    picture.show(one)
    figure = picture.figure
    picture.show(other)
    built.show(other)
    assert picture.figure is figure
    assert picture.rebuilt == 1
    moved, new = (np.asarray(Image.open(io.BytesIO(each.png(1)))) for each in (picture, built))
    assert (moved == new).all()
    picture.show(one)
    assert words_on(picture.figure) != words_on(built.figure)


def test_another_topic_is_another_structure():
    structures = {
        SoundnessDrawing.structure(answer)
        for answer in (make() for make in made.FINDINGS.values())
        if answer.findings[0].evidence is not None and "nasty" not in answer.subject.outcome.event
    }
    assert len({name for name, _, _ in structures}) == len(TOPICS) + 1


def test_a_picture_follows_from_topic_to_topic():
    answer = made.answer(made.shape(), made.levels(), made.discrimination(), made.convergence())
    picture = Picture("screen", 600)
    for topic in ("shape", "levels", "convergence", "discrimination", "shape"):
        picture.show(replace(answer, question=replace(answer.question, show=topic)))
        assert_readable(picture.figure)
    assert words_on(picture.figure)[0] == "Shape along pipe age"


def test_separation_without_a_level_to_blame_needs_other_axes():
    one, other = made.separation(), made.separation("complete", ())
    structures = {SoundnessDrawing.structure(made.answer(finding)) for finding in (one, other)}
    assert len(structures) == 2


# --- real fits ----------------------------------------------------------------------


def real_fits():
    rows = invented(400, bend=0.5)
    rare = rows.head(14).assign(group="rare", y=0)
    separated = [*rows.to_dict("records"), *rare.to_dict("records")]
    return {
        "births": (
            "low ~ age + lwt + race + smoke + ht + ui", births(), {"optimism": "bootstrap"},
        ),
        "vasoconstriction": ("Y ~ np.log(Volume) + np.log(Rate)", vasoconstriction(), {}),
        "separated": (
            "y ~ x + w + group", type(rows)(separated), {"groups": np.arange(414) // 4}
        ),
    }  # fmt: skip


@pytest.mark.parametrize("name", ["births", "vasoconstriction", "separated"])
@pytest.mark.filterwarnings("ignore")
def test_every_finding_of_a_real_fit_can_be_drawn(name):
    formula, frame, asked = real_fits()[name]
    fit = po.FittedLogit(smf.logit(formula, frame).fit(disp=0))
    answer = fit.soundness(repeats=5, **asked)
    assert_readable(po.draw(answer))
    for finding in answer.findings:
        predictor = finding.about[0] if finding.about else ""
        question = replace(answer.question, show=finding.topic, predictor=predictor)
        picture = Picture("screen", 380)
        picture.show(replace(answer, question=question))
        assert_readable(picture.figure)


def test_the_rows_that_the_literature_names_are_named():
    """Pregibon 1981: cases 4 and 18 of the vasoconstriction data."""
    fit = po.FittedLogit(
        smf.logit("Y ~ np.log(Volume) + np.log(Rate)", vasoconstriction()).fit(disp=0)
    )
    words = words_on(po.draw(fit.soundness(show="influence")))
    assert {"4", "18", "Row 4", "Row 18"} <= set(words)


def test_findings_are_saved_like_any_answer(tmp_path):
    for suffix in ("svg", "pdf", "png"):
        path = po.save(made.answer(made.shape()), tmp_path / f"shape.{suffix}")
        assert path.stat().st_size > 1000
    assert "Shape along pipe age" in (tmp_path / "shape.svg").read_text()
