"""All kinds of answers, by name, and what can be measured on a picture."""

from collections.abc import Callable

import pytest
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.text import Text

from tests.drawings import made

ANSWERS: dict[str, Callable] = {
    "odds": made.odds_answer,
    "odds of one row": lambda: made.odds_answer(made.odds_rows()[:1]),
    "odds of models": made.odds_of_models,
    "odds of four models": lambda: made.odds_of_models(("crude", "aged", "soiled", "adjusted")),
    "odds without intervals": made.odds_without_intervals,
    "odds with giants": made.odds_with_giants,
    "odds with nasty labels": made.odds_nasty,
    "odds printed": made.odds_printed,
    "odds printed, by level": lambda: made.odds_printed(made.odds_by_level()),
    "odds printed, of one row": lambda: made.odds_printed(made.odds_answer(made.odds_rows()[:1])),
    "odds printed, of models": lambda: made.odds_printed(made.odds_of_models()),
    "odds printed, of four models": lambda: made.odds_printed(
        made.odds_of_models(("crude", "aged", "soiled", "adjusted for everything known"))
    ),
    "odds printed without intervals": lambda: made.odds_printed(
        made.odds_without_intervals(), tests=False
    ),
    "odds printed without counts": lambda: made.odds_printed(counts=False, tests=False),
    "odds printed with giants": lambda: made.odds_printed(made.odds_with_giants()),
    "odds printed with nasty labels": lambda: made.odds_printed(made.odds_nasty()),
    "curve": made.curve_by_material,
    "curve alone": made.curve_alone,
    "curve of six": made.curve_of_six,
    "curve, slope": lambda: made.curve_by_material("slope"),
    "curve, odds": lambda: made.curve_by_material("odds"),
    "curve, log odds": lambda: made.curve_by_material("linear_predictor"),
    "curve without intervals": lambda: made.curve_by_material(intervals=False),
    "curve with a giant band": made.curve_with_giant_band,
    "curve with nasty labels": made.curve_nasty,
    "levels": made.curve_of_levels,
    "levels alone": lambda: made.curve_of_levels(by=False),
    "levels, odds": lambda: made.curve_of_levels("odds"),
    "levels, yes or no": made.curve_yes_no,
    "levels without intervals": lambda: made.curve_of_levels(intervals=False),
    "many levels": made.curve_of_many_levels,
    "profile": made.profile_answer,
    "profile alone": lambda: made.profile_answer(compared=False),
    "profile of equals": lambda: made.profile_answer(eta=-2.5),
    "profile beyond": lambda: made.profile_answer(verdict="beyond"),
    "profile without intervals": lambda: made.profile_answer(se=None),
    "profile with a giant band": lambda: made.profile_answer(se=9.0),
    "profile near certainty": lambda: made.profile_answer(eta=9.0, se=1.0),
    "profile with nasty labels": made.profile_nasty,
}


@pytest.fixture(params=ANSWERS)
def any_answer(request):
    return ANSWERS[request.param]()


def texts_of(figure):
    """Texts that are seen, with their boxes in pixels; the figure is drawn for that."""
    canvas = FigureCanvasAgg(figure)
    figure.draw_without_rendering()
    renderer = canvas.get_renderer()
    seen = [text for text in figure.findobj(Text) if text.get_visible() and text.get_text()]
    # ticks outside the axis limits are kept, but not drawn
    width, height = figure.bbox.width, figure.bbox.height
    boxes = []
    for text in seen:
        axis_tick = not text.get_clip_on() and type(text) is Text
        box = text.get_window_extent(renderer)
        if axis_tick and not _is_drawn_tick(text, figure):
            continue
        boxes.append((text, box))
    return boxes, width, height


def _is_drawn_tick(text, figure):
    for axes in figure.axes:
        for axis in (axes.xaxis, axes.yaxis):
            low, high = sorted(axis.get_view_interval())
            for tick in axis.get_major_ticks():
                if text is tick.label1:
                    return tick.label1.get_visible() and low <= tick.get_loc() <= high
    return False


def words_on(figure):
    """Every text that is seen, in one string per text, figure spaces as plain ones."""
    boxes, _, _ = texts_of(figure)
    return [
        text.get_text().replace("\u2007", " ").replace("\u2008", " ").strip() for text, _ in boxes
    ]
