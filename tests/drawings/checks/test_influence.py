"""Rows that carry the result."""

import math
from dataclasses import replace

import numpy as np
import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, points_of, text_of
from tests.drawings.seen import words_on


def test_every_pattern_stands_at_its_chance_and_misfit():
    finding = made.influence()
    held = finding.evidence
    shown = board_of(made.answer(finding)).discs["patterns"].get_offsets()
    assert shown == pytest.approx(np.column_stack([held.probability, held.delta_chi2]))


def test_a_marks_area_grows_with_what_leaving_it_out_does():
    finding = made.influence()
    sizes = board_of(made.answer(finding)).discs["patterns"].get_sizes()
    order = np.argsort(finding.evidence.delta_beta)
    assert (np.diff(sizes[order]) >= 0).all()
    # from the least area on in proportion
    least = sizes - sizes.min()
    beta = np.asarray(finding.evidence.delta_beta)
    assert least / least.max() == pytest.approx(
        (beta - beta.min()) / (beta.max() - beta.min()), abs=1e-6
    )


def test_those_that_stand_out_have_a_shape_and_their_rows_names():
    board = board_of(made.answer(made.influence()))
    ring, diamond = (board.discs[name].get_paths()[0] for name in ("patterns", "standing out"))
    assert len(ring.vertices) != len(diamond.vertices)
    written = {text.get_text(): text for text in board.texts}
    assert {"4", "18", "a, b, c, …"} <= set(written)
    assert len(board.discs["standing out"].get_offsets()) == 3


def test_a_name_stands_beside_its_mark():
    drawing = drawn(made.answer(made.influence()))
    axes = drawing.axes
    axes.figure.draw_without_rendering()
    (name,) = (text for text in drawing.board.texts if text.get_text() == "4")
    mark = axes.transData.transform((0.07, 13.5))
    box = name.get_window_extent()
    nearest = (np.clip(mark[0], box.x0, box.x1), np.clip(mark[1], box.y0, box.y1))
    away = math.dist(mark, nearest) / axes.figure.dpi * 72
    assert away < 3 * 9


def test_odds_ratios_go_from_all_rows_to_those_without_the_pattern():
    board = board_of(made.answer(made.influence()))
    everywhere, one_step, refitted = (
        sorted(x for x, _ in points_of(board.lines[name]))
        for name in ("with all rows", "without: one step", "without: fitted anew")
    )
    assert len(everywhere) == len(one_step) == 3
    assert len(refitted) == 2, "one could not be fitted anew"
    # on a logarithmic axis, equal ratios are equally long
    known = dict(zip((0.4, 1.4), everywhere[::2], strict=True))
    unit = (known[1.4] - known[0.4]) / math.log(1.4 / 0.4)
    assert refitted == pytest.approx(
        [known[0.4] + unit * math.log(each / 0.4) for each in (0.9, 2.0)]
    )


def test_one_step_is_hollow_and_a_new_fit_is_filled():
    lines = board_of(made.answer(made.influence())).lines
    one_step, refitted = lines["without: one step"], lines["without: fitted anew"]
    assert one_step.get_markerfacecolor() == "#ffffff"
    assert refitted.get_markerfacecolor() == one_step.get_markeredgecolor()
    assert lines["with all rows"].get_marker() != refitted.get_marker()


def test_figures_tell_both_odds_ratios():
    words = words_on(drawn(made.answer(made.influence())).axes.figure)
    assert "1.40 → 2.00" in words
    assert "0.40 → 0.90" in words
    assert "1.40 → about 1.70" in words, "one step only"


def test_the_predictor_asked_for_is_shown():
    answer = made.answer(made.influence(), predictor="material")
    words = words_on(drawn(answer).axes.figure)
    assert "0.40 → 0.20" in words
    assert "1.40 → 2.00" not in words


def test_an_odds_ratio_without_an_end_becomes_an_arrow():
    pattern = made.pattern("4", 0.1, 9.0, 2.0, (made.moved(refitted=math.inf),))
    lines = board_of(made.answer(made.influence((pattern,)))).lines
    assert len(lines["beyond >"].get_xdata()) == 1
    assert lines["beyond >"].get_marker() == ">"
    assert len(lines["without: fitted anew"].get_xdata()) == 0


def test_without_any_that_stands_out_there_are_no_odds_ratios():
    words = text_of(made.answer(made.influence((), "nothing found")))
    assert "Odds ratio" not in words


def test_measures_that_are_not_finite_are_left_out():
    pattern = made.pattern("4", 0.1, math.inf, math.inf, (made.moved(),))
    finding = made.influence((pattern,))
    held = replace(
        finding.evidence, probability=(0.5, 0.6), delta_chi2=(1.0, math.nan), delta_beta=(0.1, 0.2)
    )
    board = board_of(made.answer(replace(finding, evidence=held)))
    assert len(board.discs["patterns"].get_offsets()) == 1
    assert len(board.discs["standing out"].get_offsets()) == 0


def test_it_is_said_how_many_are_shown():
    words = text_of(made.answer(made.influence(thinned=True)))
    assert "63 of 63 are shown" in words
