"""Printed tables in German: nothing English but what the analyst wrote, every mark German."""

import re
from dataclasses import replace

import pytest

import plainodds as po
from plainodds.answers.questions import Answer
from plainodds.phrases.languages import language_of, spoken_now, telling_in
from plainodds.phrases.unbounded import odds_ratio_figures, unbounded_note
from tests.drawings import made as drawn
from tests.phrases import made, made_changes, made_findings, made_pairs
from tests.phrases.german.reading import with_german_labels

INF = float("inf")
ENGLISH = re.compile(
    r"\b(the|of|with|without|and|intervals?|to|references?|[Ee]stimates?|[Pp]redictors?|rows?|"
    r"tests?|degrees?|freedom|under|chances?|more|less|fewer|or|for|by|at|not|known|none|cases?|"
    r"[Ff]igures?|[Vv]alues?|[Gg]roups?|[Cc]ompared|[Tt]ables?|yes|no|there|have|model|models|"
    r"[Ee]vents?|[Dd]ifference|[Pp]ercentage|points|[Oo]ther|profile|against|given|per|from|"
    r"interaction|held|averaged|index|shared|term|is|are)\b"
)
ENGLISH_MARKS = re.compile(r"\d\.\d{1,2}(?!\d)|\d\.\d{4}|\d,\d{3}\.|\d%")

ODDS = made.odds_answer(
    made.odds_row("material", "CI", "DI", 0.2, 0.1, per_step=False),
    made.odds_row("material", "CI", "PVC", -0.7, 0.1, per_step=False),
    made.odds_row(),
)
PROFILE = made.profile_answer()


def labelled(answer):
    """An answer whose labels are words of no language, so that all others are the table's."""
    predictors = tuple(
        replace(
            facts,
            label=f"Xyl{place}",
            unit="kg" if facts.unit else "",
            level_labels=tuple(f"Qo{n}" for n in range(len(facts.levels))),
        )
        for place, facts in enumerate(answer.subject.predictors)
    )
    outcome = replace(answer.subject.outcome, event="Zan", case="Rul", cases="Rulo")
    said = replace(answer, subject=replace(answer.subject, predictors=predictors, outcome=outcome))
    if isinstance(getattr(said, "lines", None), Answer):
        said = replace(said, lines=labelled(said.lines))
    return said


def starred(answer):
    """A curve that leaves the data."""
    lines = tuple(replace(each, supported=(False,) * len(each.at)) for each in answer.lines)
    return replace(answer, lines=lines)


def asked(answer, **changed):
    return replace(answer, question=replace(answer.question, **changed))


def of_subject(answer, **changed):
    return replace(answer, subject=replace(answer.subject, **changed))


MADE = {
    "odds": ODDS,
    "odds from the likelihood": asked(ODDS, interval="likelihood"),
    "odds with counts and tests": drawn.odds_printed(),
    "odds of models": drawn.odds_printed(drawn.odds_of_models()),
    "odds by level": drawn.odds_printed(drawn.odds_by_level()),
    "odds with few events": drawn.odds_printed(drawn.odds_nasty()),
    "curve": made.curve_answer(),
    "curve by levels": drawn.curve_by_material(),
    "curve of averages": drawn.curve_by_material(others="observed"),
    "curve of log odds": drawn.curve_alone("linear_predictor"),
    "curve of slopes": drawn.curve_alone("slope"),
    "curve beyond the data": starred(made.curve_answer()),
    "profile": PROFILE,
    "two profiles": drawn.profile_answer(),
    "effects": made_changes.effects_answer(made_changes.level_row(), made_changes.effect_row()),
    "change": made_changes.change_answer(),
    "pair": made_pairs.pair_answer(),
    "soundness": made_findings.answer_of(*made_findings.everything()),
}
EVERY_KIND = pytest.mark.parametrize("name", MADE)
SETTINGS = {
    "as it is": {},
    "no intervals": {"no_interval": "Die Anpassung ist bestraft."},
    "case-control": {"sampling": "case-control"},
    "reweighed": {"sampling": "case-control", "prevalence": 0.02},
    "offset": {"offset": 1.5},
}


def german(answer, **options):
    with po.writing("de"):
        return po.report_table(answer, **options)


def texts(table):
    return [
        table.title,
        *table.columns,
        *(c for row in table.rows for c in row.cells),
        *table.notes,
    ]


def rows_of(table):
    return {row.cells[0]: row.cells[1:] for row in table.rows if row.kind != "heading"}


@EVERY_KIND
@pytest.mark.parametrize("setting", SETTINGS)
def test_nothing_is_english_and_no_number_has_english_marks(name, setting):
    table = german(of_subject(labelled(MADE[name]), **SETTINGS[setting]))
    for text in texts(table):
        assert not ENGLISH.search(text), text
        assert not ENGLISH_MARKS.search(text), text


@EVERY_KIND
@pytest.mark.parametrize("stakes", ["health", "safety", "money", "rights"])
def test_what_is_at_stake_is_said_in_german(name, stakes):
    answer = labelled(MADE[name])
    outcome = replace(answer.subject.outcome, stakes=stakes)
    notes = german(of_subject(answer, outcome=outcome)).notes
    assert "Eine Wahrscheinlichkeit spricht von vielen gleichartigen Fällen (Rulo)" in notes[-2]
    assert not any(map(ENGLISH.search, notes))


@EVERY_KIND
def test_a_table_has_the_same_shape_in_both_languages(name):
    told, plain = german(MADE[name]), po.report_table(MADE[name])
    assert told != plain
    assert len(told.columns) == len(plain.columns)
    assert len(told.notes) == len(plain.notes)
    shape = [(row.kind, row.within, len(row.cells)) for row in plain.rows]
    assert [(row.kind, row.within, len(row.cells)) for row in told.rows] == shape


@EVERY_KIND
def test_a_table_keeps_its_language_wherever_it_is_written(name):
    table = german(MADE[name])
    with po.writing("de"):
        within = [table.written(form) for form in ("html", "markdown", "latex", "csv")]
    assert [table.written(form) for form in ("html", "markdown", "latex", "csv")] == within
    assert table.csv().splitlines()[1].startswith("Gruppe,")


def test_odds_ratios_with_their_reference():
    table = german(with_german_labels(ODDS))
    assert table.columns == ("Merkmal", "Odds Ratio (95-%-Intervall)", "p-Wert")
    assert rows_of(table)["Grauguss"] == ("1 (Referenz)", "")
    assert rows_of(table)["Duktilguss"] == ("1,22 (1,004 bis 1,486)", "0,046")
    assert rows_of(table)["PVC"][1] == "unter 0,001"
    assert table.notes == (
        "Intervalle nach Wald. Grundlage: logistische Regression, angepasst an 6.000 Fälle "
        "(Rohre), davon 10\u00a0% mit „Rohrbruch in diesem Winter“.",
    )


def test_the_level_of_intervals_stands_in_the_heading():
    assert german(asked(ODDS, level=0.995)).columns[1] == "Odds Ratio (99,5-%-Intervall)"


def test_tests_and_counts_of_several_models():
    table = german(drawn.odds_printed(drawn.odds_of_models()))
    assert table.columns[:4] == (
        "Merkmal", "Ereignisse", "Pipes", "crude: Odds Ratio (95-%-Intervall)"
    )  # fmt: skip
    name = (
        "Test auf Wechselwirkung mit Material, Modell „adjusted“, Wald-Test bei 2 Freiheitsgraden"
    )
    assert rows_of(table)[name] == ("", "", "", "p-Wert 0,031")
    assert "Anzahlen aus dem Modell „crude“" in table.notes[0]
    assert "Die Odds Ratios zu Pipe age hängen ab von Material." in table.notes[0]


def test_what_the_analyst_did_not_name_is_named_in_german():
    outcome = replace(ODDS.subject.outcome, case="case", cases="cases")
    table = german(of_subject(drawn.odds_printed(), outcome=outcome))
    assert table.columns[2] == "Fälle"
    table = german(of_subject(MADE["curve beyond the data"], outcome=outcome))
    assert "* Die Daten haben dort wenige Fälle oder keine." in table.notes
    table = german(MADE["curve beyond the data"])
    assert "* Die Daten haben dort wenige Fälle (pipes) oder keine." in table.notes


def test_a_profile_with_its_ledger():
    table = german(with_german_labels(PROFILE))
    assert table.columns == ("Kennzahl", "Schätzung (95-%-Intervall)")
    assert rows_of(table)["Log-Odds"] == ("−1,50 (−1,89 bis −1,11)",)
    assert rows_of(table)["Rohralter = 60 Jahre"][0].startswith("+0,90 (+0,51 bis")
    assert table.notes[0].startswith("Das Profil: Rohralter = 60 Jahre, ")


def test_two_predictors_together():
    table = german(with_german_labels(MADE["pair"]))
    rows = rows_of(table)
    first = "Werkstoff = Grauguss, Auskleidung = nein (30 mit Ereignis, von 300)"
    assert rows[first][0].endswith("; 1 (Referenz)")
    assert rows["Differenz der Differenzen, Prozentpunkte, gemittelt"] == (
        "+14 (10 bis 18)", "unter 0,001"
    )  # fmt: skip
    assert "Maße des Addierens, aus Odds" in [row.cells[0] for row in table.rows]


def test_the_number_needed_and_those_averaged_over():
    notes = german(with_german_labels(MADE["change"])).notes
    assert notes[0] == (
        "Nötige Zahl (number needed) 10 für ein Ereignis mehr (95-%-Intervall 8,4 bis 13 für eines "
        "mehr)."
    )
    assert notes[1].startswith("Jeder Fall (Rohr) behält seine eigenen Werte der übrigen Merkmale;")


def test_what_has_no_finite_estimate():
    row = made.odds_row(log=INF)
    above = replace(row, odds_ratio=replace(row.odds_ratio, lower=2.28, upper=None))
    below = replace(row, log_odds_ratio=replace(row.log_odds_ratio, estimate=-INF))
    below = replace(below, odds_ratio=replace(row.odds_ratio, lower=None, upper=0.42))
    with telling_in(language_of("de")), po.writing("de"), spoken_now():
        assert odds_ratio_figures(above) == ("kein endlicher Wert", "2,28 oder mehr")
        assert odds_ratio_figures(below) == ("kein Wert über 0", "0,42 oder weniger")
        assert unbounded_note().startswith("Kein endlicher Wert: ")
    assert odds_ratio_figures(above) == ("no finite value", "2.28 or more")


def test_german_quotation_marks_are_written_in_latex_without_a_package():
    assert "für ,,burst this winter``" in german(ODDS).latex()
