from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from matplotlib.colors import to_rgb
from matplotlib.figure import Figure

from plainodds.answers.surface import Surface
from plainodds.drawings.pair import PairDrawing
from plainodds.drawings.pair_contours import (
    contours_of,
    cut,
    label_place,
    levels_of,
    sign_lines,
)
from plainodds.drawings.pair_map import MapPanel, tints
from plainodds.drawings.theme import THEMES, theme_of
from tests.drawings import made_pairs as pairs
from tests.drawings.made import AGE, PRESSURE
from tests.drawings.seen import words_on
from tests.drawings.sight import contrast, luminance

THEME = theme_of("page")


def drawn(answer, width=560.0, theme=THEME):
    height = PairDrawing.natural_height(answer, theme, width)
    figure = Figure(figsize=(width / 72, height / 72))
    drawing = PairDrawing(figure.add_axes((0, 0, 1, 1)), answer, theme)
    assert isinstance(drawing.together, MapPanel)
    return drawing.together


def plane(supported=None, points=21):
    """A surface that rises evenly across, with no interaction."""
    at = tuple(np.linspace(0, 1, points).tolist())
    rows = tuple(tuple(0.1 + 0.5 * x for x in at) for _ in at)
    none = tuple((0.0,) * points for _ in at)
    held = np.ones((points, points), dtype=bool) if supported is None else supported
    return Surface(at, at, rows, none, tuple(map(tuple, held.tolist())))


def estimate_at(surface, points):
    """The surface at points, by linear interpolation along both axes."""
    z = np.asarray(surface.estimate)
    i, f = _place(surface.a_at, points[:, 0])
    j, g = _place(surface.b_at, points[:, 1])
    low = z[j, i] * (1 - f) + z[j, i + 1] * f
    high = z[j + 1, i] * (1 - f) + z[j + 1, i + 1] * f
    return low * (1 - g) + high * g


def _place(at, x):
    grid = np.asarray(at)
    place = np.clip(np.searchsorted(grid, x, side="right") - 1, 0, len(grid) - 2)
    return place, (x - grid[place]) / (grid[place + 1] - grid[place])


def is_held(surface, points):
    """Whether all corners of a point's cell, or three of them, are supported."""
    held = np.asarray(surface.supported)
    i, _ = _place(surface.a_at, points[:, 0])
    j, _ = _place(surface.b_at, points[:, 1])
    corners = np.stack([held[j, i], held[j, i + 1], held[j + 1, i], held[j + 1, i + 1]])
    return corners.sum(axis=0) >= 3


# ---------------------------------------------------------------- contours


def test_a_contour_lies_where_the_surface_has_its_level():
    surface = plane()
    (line,) = contours_of(surface, (0.35,)).lines[0]
    assert line[:, 0] == pytest.approx(0.5)


@pytest.mark.parametrize("scale", ["probability", "odds"])
def test_contours_of_a_surface_lie_at_their_levels(scale):
    surface = pairs.map_answer(scale).surface
    levels = levels_of(surface, scale)
    assert 4 <= len(levels) <= 9
    for level, lines in zip(levels, contours_of(surface, levels).lines, strict=True):
        for line in lines:
            assert estimate_at(surface, line) == pytest.approx(level, rel=0.02)


def test_no_contour_is_drawn_where_nobody_is():
    surface = pairs.map_answer().surface
    found = contours_of(surface, levels_of(surface, "probability"))
    lines = [line for own in found.lines for line in own] + sign_lines(surface)
    assert len(lines) > 5
    for line in lines:
        inner = (line[1:] + line[:-1]) / 2
        assert is_held(surface, inner).all()


def test_nothing_is_drawn_of_a_surface_without_support():
    surface = plane(np.zeros((21, 21), dtype=bool))
    found = contours_of(surface, levels_of(surface, "probability"))
    assert (found.levels, found.lines, found.region) == ((), (), None)


def test_what_is_not_a_number_is_not_drawn():
    surface = plane()
    rows = [list(row) for row in surface.estimate]
    rows[10] = [np.nan] * 21
    surface = replace(surface, estimate=tuple(map(tuple, rows)))
    for line in contours_of(surface, (0.35,)).lines[0]:
        assert np.isfinite(line).all()
        assert (np.abs(line[:, 1] - 0.5) >= 0.05 - 1e-9).all()


def test_the_edge_is_that_of_the_supported_region():
    held = np.zeros((21, 21), dtype=bool)
    held[5:16, 8:13] = True
    region = contours_of(plane(held), ()).region
    low, high = region.vertices.min(axis=0), region.vertices.max(axis=0)
    assert [*low, *high] == pytest.approx([0.4, 0.25, 0.6, 0.75])


def test_levels_are_round_chances_and_closer_where_chances_are_small():
    assert levels_of(plane(), "probability") == pytest.approx((0.2, 0.3, 0.4, 0.5))
    rare = pairs.map_answer(shift=-4.0).surface
    assert levels_of(rare, "probability") == (0.0002, 0.0005, 0.001, 0.002, 0.005, 0.01)


def test_levels_of_odds_are_simple_fractions():
    levels = levels_of(pairs.map_answer("odds").surface, "odds")
    assert {1 / 8, 1 / 4} <= set(levels)


def test_the_interaction_changes_its_sign_where_the_chance_bends_the_other_way():
    # without a shared term the cross partial is that of the logistic curve: 0 at a half
    surface = pairs.map_answer(joint=0.0, shift=2.2).surface
    for line in sign_lines(surface):
        assert estimate_at(surface, line) == pytest.approx(0.5, abs=0.01)


def test_noise_has_no_sign():
    assert sign_lines(pairs.map_answer("odds", joint=0.0).surface) == []
    assert sign_lines(plane()) == []


# ---------------------------------------------------------------- labels


def test_a_label_stands_where_its_line_bends_least():
    x = np.linspace(0, 200, 1001)
    line = np.column_stack([x, np.where(x < 80, 100.0, 100 + 4 * np.sin(x - 80))])
    left, low, right, high = label_place([line], (20, 8), (0, 0, 300, 300), [])
    assert right < 81
    assert (low + high) / 2 == pytest.approx(100)
    assert right - left == pytest.approx(20)


def test_a_label_keeps_clear_of_what_is_taken_and_of_the_border():
    line = np.column_stack([np.linspace(0, 200, 101), np.full(101, 100.0)])
    taken = (60, 80, 140, 120)
    left, _, right, _ = label_place([line], (20, 8), (0, 0, 200, 200), [taken])
    assert right <= 60 or left >= 140
    assert label_place([line], (20, 8), (0, 0, 200, 102), []) is None
    assert label_place([line], (20, 8), (0, 0, 200, 200), [(0, 0, 200, 200)]) is None


def test_a_line_too_short_has_no_label():
    line = np.array([[0.0, 0.0], [10.0, 0.0]])
    assert label_place([line], (20, 8), (-50, -50, 50, 50), []) is None


numbers = st.floats(0, 100)


@given(
    st.lists(st.tuples(numbers, numbers), min_size=2, max_size=12, unique=True),
    st.lists(st.tuples(numbers, numbers, numbers, numbers), max_size=4),
)
@settings(deadline=None)
def test_what_is_left_of_a_line_is_outside_of_all_boxes(points, corners):
    boxes = [(min(a, c), min(b, d), max(a, c), max(b, d)) for a, b, c, d in corners]
    for piece in cut([np.asarray(points)], boxes):
        assert len(piece) > 1
        for left, low, right, high in boxes:
            x, y = piece.T
            assert not ((x > left) & (y > low) & (x < right) & (y < high)).any()


def test_a_line_of_few_points_is_cut_between_them():
    (first, second) = cut([np.array([[0.0, 0.0], [100.0, 0.0]])], [(40, -5, 60, 5)])
    assert first[-1, 0] <= 40 + 1e-9
    assert second[0, 0] >= 60 - 1e-9


# ---------------------------------------------------------------- the map


def test_contours_are_named_in_percent_and_the_line_of_sign_in_words():
    answer = pairs.map_answer()
    panel = drawn(answer)
    shown = {name for name, text in panel.labels.items() if text.get_visible()}
    assert {"5%", "10%", "20%"} <= shown
    assert "interaction\nchanges sign" in shown
    assert shown <= set(words_on(panel.axes.figure))


def test_contours_of_odds_are_named_as_simple_fractions():
    shown = drawn(pairs.map_answer("odds", joint=0.0)).labels
    assert {"1/8", "1/16"} <= set(shown)
    assert not any("sign" in name for name in shown)


def test_a_name_stands_on_its_own_contour():
    answer = pairs.map_answer()
    panel = drawn(answer)
    panel.axes.figure.draw_without_rendering()
    for name, text in panel.labels.items():
        if name.endswith("%"):
            seen = text.get_transform().transform([text.get_position()])
            at = panel.axes.transData.inverted().transform(seen)
            assert estimate_at(answer.surface, at)[0] == pytest.approx(
                float(name[:-1]) / 100, rel=0.1
            )


def test_the_line_of_sign_is_broken_and_no_contour_is():
    panel = drawn(pairs.map_answer())
    assert panel.sign.get_segments()
    assert panel.sign.get_linestyle()[0][1] is not None
    assert panel.contours.get_linestyle()[0][1] is None


def test_the_four_combinations_compared_are_joined_to_a_frame():
    panel = drawn(pairs.map_answer())
    corners = list(zip(*panel.frame.get_data(), strict=True))
    a, b = ((f.quartiles[0], f.quartiles[2]) for f in (AGE, PRESSURE))
    assert set(corners) == {(x, y) for x in a for y in b}
    assert corners[0] == corners[-1]
    assert panel.frame.get_marker() == "o"


def test_slopes_compare_no_combinations():
    assert len(drawn(pairs.map_answer(number="slope")).frame.get_xdata()) == 0


def test_what_is_not_supported_is_hatched_and_said_to_be_empty():
    answer = pairs.map_answer()
    panel = drawn(answer)
    assert panel.hatch.get_segments()
    assert panel.hatch.get_zorder() < panel.areas.get_zorder()
    assert "no pipes here" in words_on(panel.axes.figure)
    held = tuple((True,) * 60 for _ in range(60))
    everywhere = replace(answer, surface=replace(answer.surface, supported=held))
    panel = drawn(everywhere)
    assert not panel.hatch.get_segments()
    assert "no pipes here" not in words_on(panel.axes.figure)


def test_the_map_is_as_wide_and_high_as_its_surface():
    answer = pairs.map_answer()
    panel = drawn(answer)
    assert panel.axes.get_xlim() == (answer.surface.a_at[0], answer.surface.a_at[-1])
    assert panel.axes.get_ylim() == (answer.surface.b_at[0], answer.surface.b_at[-1])
    assert {"Pipe age (years)", "Pressure (m)"} <= set(words_on(panel.axes.figure))


def test_names_of_contours_are_kept_as_the_map_moves():
    panel = drawn(pairs.map_answer())
    held = dict(panel.labels)
    panel.update(pairs.map_answer(shift=0.2))
    assert all(panel.labels[name] is text for name, text in held.items())


@pytest.mark.parametrize("name", THEMES)
@pytest.mark.parametrize("count", [2, 6, 10])
def test_higher_is_darker_in_grey_too_and_names_can_be_read_on_every_tint(name, count):
    theme = THEMES[name]
    rgb = [np.array(to_rgb(each)) for each in tints(theme, count)]
    steps = np.diff([luminance(each) for each in rgb])
    on_white = luminance(np.array(to_rgb(theme.paper))) > 0.5
    assert (steps < 0).all() if on_white else (steps > 0).all()
    assert min(contrast(np.array(to_rgb(theme.ink)), each) for each in rgb) > 4.5
