import io

import numpy as np
import pytest
from matplotlib.figure import Figure
from PIL import Image

import plainodds as po
from plainodds.drawings import Picture
from plainodds.drawings.change import ChangeDrawing
from plainodds.drawings.change_layout import axis_limits
from plainodds.drawings.change_marks import counts_of, legend_of
from plainodds.drawings.draw import draw, figure_for, height_for
from plainodds.drawings.theme import theme_of
from tests.drawings import made_effects as made
from tests.drawings.seen import assert_readable, words_on

THEME = theme_of("page")


def drawn(answer, width=500):
    height = ChangeDrawing.natural_height(answer, THEME, width)
    figure = Figure(figsize=(width / 72, height / 72))
    return ChangeDrawing(figure.add_axes((0, 0, 1, 1)), answer, THEME)


def marks_shown(drawing):
    return {kind: len(line.get_xdata()) for kind, line in drawing.marks.lines.items()}


def test_both_chances_are_marked_with_their_intervals():
    answer = made.change_answer()
    bridge = drawn(answer).bridge
    assert list(bridge.points.get_xdata()) == [answer.start.estimate, answer.end.estimate]
    ends = [(s[0][0], s[1][0]) for s in bridge.intervals.get_segments()]
    assert ends == [(each.lower, each.upper) for each in (answer.start, answer.end)]


@pytest.mark.parametrize("answer", [made.change_answer(), made.change_of_material()])
def test_the_bridge_leads_from_the_first_chance_to_the_second(answer):
    bridge = drawn(answer).bridge
    start, end = answer.start.estimate, answer.end.estimate
    assert bridge.shaft.get_xdata()[0] == start
    (head,) = bridge.head.get_paths()
    tip, *back = head.vertices[:3]
    assert tip[0] == end
    assert all((x < end) == (start < end) for x, _ in back)


def test_the_band_is_the_interval_of_the_difference_about_the_start():
    answer = made.change_answer()
    (band,) = drawn(answer).bridge.band.get_paths()
    difference = answer.comparison.risk_difference
    assert band.vertices[:, 0].min() == pytest.approx(answer.start.estimate + difference.lower)
    assert band.vertices[:, 0].max() == pytest.approx(answer.start.estimate + difference.upper)


def test_the_start_is_still_marked_where_the_band_is():
    """So that it is seen whether no difference is within the interval."""
    answer = made.change_answer(difference=0.09)
    bridge = drawn(answer).bridge
    post = bridge.posts.get_segments()[0]
    (band,) = bridge.band.get_paths()
    assert set(post[:, 0]) == {answer.start.estimate}
    assert post[:, 1].max() > band.vertices[:, 1].max()


def test_the_difference_is_said_in_percentage_points_with_its_interval():
    words = words_on(drawn(made.change_answer()).axes.figure)
    assert "+7 percentage points" in words or "+7.0 percentage points" in words
    assert "(3 to 11)" in words
    assert "24%" in words
    assert "Pipe age 20 years" in words
    assert "Pipe age 60 years" in words


@pytest.mark.parametrize(
    ("start", "end", "marks"),
    [
        (0.24, 0.31, {"both": 24, "more": 7, "fewer": 0, "neither": 69}),
        (0.31, 0.24, {"both": 24, "more": 0, "fewer": 7, "neither": 69}),
        (0.036, 0.080, {"both": 36, "more": 44, "fewer": 0, "neither": 920}),
        (0.30, 0.3004, {"both": 300, "more": 0, "fewer": 0, "neither": 700}),
        (0.301, 0.304, {"both": 301, "more": 3, "fewer": 0, "neither": 696}),
        (0.0002, 0.0007, {"both": 0, "more": 1, "fewer": 0, "neither": 999}),
        (0.00001, 0.00002, {"both": 0, "more": 0, "fewer": 0, "neither": 1000}),
        (0.93, 0.9999, {"both": 930, "more": 70, "fewer": 0, "neither": 0}),
    ],
)
def test_the_marks_are_as_many_as_the_legend_says(start, end, marks):
    answer = made.change_answer(start, end, difference=0.0001)
    drawing = drawn(answer)
    assert marks_shown(drawing) == marks
    counts = counts_of(answer)
    assert sum(marks.values()) == counts.over
    assert (counts.start, counts.end) == (round(start * counts.over), round(end * counts.over))
    words = words_on(drawing.axes.figure)
    for kind, number, _ in legend_of(answer)[1]:
        assert number == marks[kind]
        assert f"{number:,}" in words
    assert any(text.startswith(f"Of {counts.over:,} pipes, burst this winter") for text in words)


def test_no_two_marks_share_a_place():
    for answer in (made.change_answer(), made.change_answer(0.036, 0.08)):
        lines = drawn(answer).marks.lines.values()
        places = {
            (round(x, 3), round(y, 3))
            for line in lines
            for x, y in zip(*line.get_data(), strict=True)
        }
        assert len(places) == counts_of(answer).over


def test_marks_of_one_kind_stand_together_in_reading_order():
    drawing = drawn(made.change_answer())
    both, more = (drawing.marks.lines[kind] for kind in ("both", "more"))
    assert both.get_ydata()[-1] >= more.get_ydata()[0]
    rows = np.unique(np.round(np.concatenate([both.get_ydata(), more.get_ydata()]), 3))
    assert len(rows) == 4, "31 marks fill three lines of ten and begin a fourth"


def test_kinds_of_marks_differ_by_shape_and_by_shade():
    lines = drawn(made.change_answer()).marks.lines
    assert len({line.get_marker() for line in lines.values()}) == 4
    assert lines["fewer"].get_markerfacecolor() == "none"
    assert lines["more"].get_markerfacecolor() != "none"
    shades = {lines[kind].get_markeredgecolor() for kind in ("both", "more", "neither")}
    assert len(shades) == 3


def test_the_key_shows_the_marks_that_are_used():
    for answer, kind, other in (
        (made.change_answer(), "more", "fewer"), (made.change_of_material(), "fewer", "more"),
    ):  # fmt: skip
        marks = drawn(answer).marks
        assert len(marks.keys[kind].get_xdata()) == 1
        assert len(marks.keys[other].get_xdata()) == 0
        assert marks.keys[kind].get_marker() == marks.lines[kind].get_marker()


def test_the_legend_is_in_words():
    _, lines = legend_of(made.change_answer())
    assert [words for _, _, words in lines] == [
        "at 20 years and at 60 years alike",
        "more at 60 years: 31 instead of 24",
        "neither at 20 years nor at 60 years",
    ]
    _, lines = legend_of(made.change_of_material())
    assert lines[1] == ("fewer", 7, "fewer for PVC: 24 instead of 31")
    _, lines = legend_of(made.change_by_shift())
    assert lines[0][2] == "before the change and after it alike"
    _, lines = legend_of(made.change_answer(0.3, 0.3))
    assert lines[1] == ("more", 0, "more or fewer: the difference is under 1 in 100")


def test_a_bare_number_or_a_yes_is_not_left_to_speak_for_itself():
    _, lines = legend_of(made.CHANGES["change of a yes or no"]())
    assert lines[1][2].startswith("more after the change")


def test_the_axis_is_in_percent_and_holds_all_that_is_a_chance():
    for make in made.CHANGES.values():
        answer = make()
        lower, upper = axis_limits(answer)
        for each in (answer.start, answer.end):
            assert lower <= (each.lower if each.lower is not None else each.estimate)
            assert (each.upper if each.upper is not None else each.estimate) <= upper
        drawing = drawn(answer)
        assert drawing.axes.get_xlim() == (lower, upper)
        labels = [text.get_text() for text in drawing.axes.get_xticklabels()]
        assert len(labels) >= 2
        assert all(label.endswith("%") for label in labels)


@pytest.mark.parametrize(
    ("start", "end", "shown"),
    [(0.03, 0.08, 0.0), (0.0002, 0.0007, 0.0), (0.93, 0.99, 1.0), (0.3, 0.7, 0.0)],
)
def test_the_axis_runs_from_nought_or_up_to_all(start, end, shown):
    answer = made.change_answer(start, end, difference=0.0001)
    lower, upper = axis_limits(answer)
    assert lower < shown < upper
    assert upper - lower < 1.1


def test_a_chance_beyond_the_data_is_hollow_with_a_broken_interval():
    answer = made.change_answer(
        moves=(("age_years", made.Move(20.0, 400.0)),), beyond=("age_years",)
    )
    drawing = drawn(answer)
    assert list(drawing.bridge.points.get_xdata()) == [answer.start.estimate]
    assert list(drawing.bridge.loose_points.get_xdata()) == [answer.end.estimate]
    assert len(drawing.bridge.loose_intervals.get_segments()) == 1
    assert any("Hollow point" in text for text in words_on(drawing.axes.figure))
    assert not any("Hollow" in text for text in words_on(drawn(made.change_answer()).axes.figure))


def test_a_band_that_would_leave_the_chances_is_pointed():
    answer = made.change_answer(0.05, 0.09, difference=0.12)
    drawing = drawn(answer)
    (band,) = drawing.bridge.band.get_paths()
    assert band.vertices[:, 0].min() == 0.0
    assert (band.vertices[:-1, 0] == 0.0).sum() == 1
    assert any("Pointed band" in text for text in words_on(drawing.axes.figure))


def test_without_intervals_there_are_points_and_the_reason():
    drawing = drawn(made.change_answer(half=None))
    assert len(drawing.bridge.points.get_xdata()) == 2
    assert len(drawing.bridge.intervals.get_segments()) == 0
    assert len(drawing.bridge.band.get_paths()) == 0
    words = " ".join(words_on(drawing.axes.figure)).replace("\n", " ")
    assert made.NO_INTERVAL in words
    assert "interval" not in words.replace(made.NO_INTERVAL, "")


def test_no_change_has_no_arrowhead():
    drawing = drawn(made.change_answer(0.3, 0.3))
    assert len(drawing.bridge.head.get_paths()) == 0
    assert marks_shown(drawing) == {"both": 30, "more": 0, "fewer": 0, "neither": 70}


def test_it_is_said_over_whom_or_where_the_chances_hold():
    averaged = words_on(drawn(made.change_answer()).axes.figure)
    assert averaged[0] == "Average chance of burst this winter"
    assert any("Averaged over" in text for text in averaged)
    held = words_on(drawn(made.change_at_a_profile()).axes.figure)
    assert held[0] == "Chance of burst this winter"
    assert any("At typical values: material PVC" in text.replace("\n", " ") for text in held)


@pytest.mark.parametrize("name", made.CHANGES)
@pytest.mark.parametrize(("width", "height"), [(350, None), (600, 400)])
def test_nothing_meets_and_nothing_is_cut_off_on_the_screen(name, width, height):
    picture = Picture("screen", width, height)
    picture.show(made.CHANGES[name]())
    assert_readable(picture.figure)


@pytest.mark.parametrize("name", made.CHANGES)
def test_nothing_meets_and_nothing_is_cut_off_in_print(name):
    answer, theme, width = made.CHANGES[name](), THEME.scaled(7 / 9), 88 / 25.4 * 72
    height = height_for(ChangeDrawing, answer, theme, width)
    figure, _ = figure_for(ChangeDrawing, answer, theme, width, height, dpi=150)
    assert_readable(figure)
    assert_readable(draw(answer))


@pytest.mark.parametrize("width", [350, 600])
@pytest.mark.parametrize("name", made.CHANGES)
def test_marks_stay_within_the_picture_and_off_the_texts(name, width):
    picture = Picture("screen", width, 560)
    picture.show(made.CHANGES[name]())
    figure = picture.figure
    figure.draw_without_rendering()
    drawing = picture._drawing
    renderer = figure.canvas.get_renderer()
    texts = [
        drawing.marks.heading,
        *drawing.marks.words,
        *drawing.marks.counts,
        drawing._notes.artist,
    ]
    boxes = [text.get_window_extent(renderer) for text in texts if text.get_text()]
    plot = drawing.axes.get_window_extent()
    for line in drawing.marks.lines.values():
        for x, y in line.get_transform().transform(np.column_stack(line.get_data())):
            assert 0 < x < figure.bbox.width
            assert 0 < y < plot.y0
            assert not any(box.contains(x, y) for box in boxes)


@pytest.mark.parametrize(
    ("first", "second"),
    [
        (made.change_answer(), made.change_answer(0.2, 0.5)),
        (made.change_answer(), made.change_answer(0.036, 0.08)),
        (made.change_answer(0.036, 0.08), made.change_of_material()),
        (made.change_answer(), made.change_answer(half=None)),
        (made.change_answer(half=None), made.change_by_shift()),
        (made.change_nasty(), made.change_answer()),
        (made.change_answer(0.3, 0.3), made.change_answer(0.93, 0.99, difference=0.02)),
    ],
)
@pytest.mark.parametrize("width", [360, 600])
def test_a_picture_that_was_moved_is_the_picture_built_for_the_answer(first, second, width):
    moved, built = Picture("screen", width, 640), Picture("screen", width, 640)
    moved.show(first)
    figure = moved.figure
    moved.png(1)
    moved.show(second)
    built.show(second)
    assert moved.figure is figure
    assert moved.rebuilt == 1
    pictures = [np.asarray(Image.open(io.BytesIO(each.png(1)))) for each in (moved, built)]
    assert (pictures[0] == pictures[1]).all()


def test_a_picture_keeps_its_height_from_a_hundred_marks_to_a_thousand():
    picture, heights = Picture("screen", 600), set()
    for answer in (made.change_answer(0.24, 0.31), made.change_answer(0.04, 0.31)):
        picture.show(answer)
        heights.add(picture.height_px)
    assert {counts_of(made.change_answer(*each)).over for each in ((0.24, 0.31), (0.04, 0.31))} == {
        100, 1000,
    }  # fmt: skip
    assert len(heights) == 1


def test_changes_are_drawn_and_saved_like_any_answer(tmp_path):
    answer = made.fit().change("soil", "low", "high")
    assert words_on(po.draw(answer))[0] == "Average chance of burst this winter"
    assert "percentage points" in po.save(answer, tmp_path / "change.svg").read_text()


def test_chances_too_rare_for_percents_are_told_apart_as_frequencies():
    words = words_on(drawn(made.CHANGES["rare change"]()).axes.figure)
    assert "2 in 10,000" in words
    assert "7 in 10,000" in words
    assert any("1 instead of under 1" in text.replace("\n", " ") for text in words)


def test_a_long_name_does_not_cut_off_its_value():
    words = words_on(drawn(made.change_nasty(), 380).axes.figure)
    assert any(text.endswith("\n20 $_") for text in words)
    assert any(text.endswith("\n60 $_") for text in words)
