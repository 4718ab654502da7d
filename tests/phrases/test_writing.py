"""Language and marks of numbers are asked for within a block, and nowhere else."""

import threading
from contextvars import copy_context
from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st
from matplotlib.text import Text

import plainodds as po
from plainodds.answers.excerpts import ExcerptAnswer
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.panels import PanelsAnswer
from plainodds.answers.questions import Answer
from plainodds.phrases import numbers
from plainodds.phrases.alternative import alternative
from plainodds.phrases.captions.caption import caption
from plainodds.phrases.languages import _KNOWN, Ways, language_of
from plainodds.phrases.methods.note import methods_note
from plainodds.phrases.saying import words
from plainodds.values import value
from tests.phrases import made, made_changes, test_change, test_curve, test_odds, test_pair
from tests.phrases.made_findings import MADE, answer_of, everything
from tests.phrases.made_pairs import pair_answer
from tests.phrases.reading import faults, unaccounted

ANSWERS = {
    "odds": made.odds_answer(made.odds_row(log=0.7), typical=0.23),
    "curve": made.curve_answer(),
    "profile": made.profile_answer(),
    "effects": made_changes.effects_answer(made_changes.effect_row()),
    "change": made_changes.change_answer(),
    "pair": pair_answer(),
}
TELLINGS = (po.words, po.caption, po.methods_note, po.alternative)
SWAP = str.maketrans({".": ",", ",": "."})
GERMAN_WORD = {
    "words": "Wahrscheinlichkeit", "caption": "logistische Regression",
    "methods_note": "Angepasst wurde", "alternative": "für „burst this winter“",
}  # fmt: skip


@pytest.fixture(params=ANSWERS)
def answer(request):
    return ANSWERS[request.param]


@pytest.mark.parametrize("tell", TELLINGS, ids=lambda each: each.__name__)
def test_every_text_of_every_answer_follows_the_language(answer, tell):
    english = str(tell(answer))
    with po.writing(language="de"):
        german = str(tell(answer))
    assert GERMAN_WORD[tell.__name__] in german
    assert GERMAN_WORD[tell.__name__] not in english
    assert str(tell(answer)) == english


def test_english_is_what_is_written_without_asking(answer):
    plain = [tell(answer) for tell in TELLINGS]
    with po.writing():
        assert [tell(answer) for tell in TELLINGS] == plain


def test_blocks_within_blocks_end_where_they_end():
    ratio = ANSWERS["odds"].rows[0].odds_ratio.estimate
    with po.writing("de"):
        assert numbers.ratio(ratio) == "2,01"
        with po.writing("en"):
            assert numbers.ratio(ratio) == "2.01"
            assert "chance of" in str(po.words(ANSWERS["odds"]))
            with po.writing("de", decimal="·"):
                assert numbers.ratio(ratio) == "2·01"
        assert "Wahrscheinlichkeit" in str(po.words(ANSWERS["odds"]))
    assert numbers.ratio(ratio) == "2.01"


def test_a_block_that_is_left_by_an_error_ends_too():
    with pytest.raises(RuntimeError), po.writing("de"):
        raise RuntimeError
    assert numbers.chance(0.042) == "4.2%"
    with pytest.raises(po.QuestionRefused), po.writing("de"):
        po.words(ANSWERS["odds"], "everybody")
    assert "chance of" in str(po.words(ANSWERS["odds"]))


def test_threads_do_not_see_each_others_language():
    told, both = {}, threading.Barrier(2, timeout=30)

    def tell(language):
        with po.writing(language):
            both.wait()
            told[language] = [str(po.words(ANSWERS["change"])) for _ in range(20)]
            both.wait()

    def unasked():
        told["unasked"] = str(po.words(ANSWERS["change"]))

    with po.writing("de"):
        threads = [threading.Thread(target=tell, args=(each,)) for each in ("en", "de")]
        threads.append(threading.Thread(target=unasked))
        for thread in threads:
            thread.start()
        for thread in threads:
            thread.join()
        german = str(po.words(ANSWERS["change"]))
    english = str(po.words(ANSWERS["change"]))
    assert set(told["en"]) == {english}
    assert set(told["de"]) == {german}
    assert told["unasked"] == english


def test_another_context_keeps_its_own():
    apart = copy_context()
    with po.writing("de"):
        assert apart.run(numbers.chance, 0.042) == "4.2%"


@pytest.mark.parametrize(
    ("stated", "message"),
    [
        ({"language": "fr"}, r"no language 'fr'.*'de' \(German\), 'en' \(English\)"),
        ({"language": "DE"}, "no language 'DE'"),
        ({"decimal": ""}, "decimal=''.*single character"),
        ({"decimal": ".,"}, "single character"),
        ({"thousands": "  "}, "thousands='  '"),
        ({"decimal": "5"}, "no letter, figure or sign"),
        ({"decimal": "e"}, "no letter, figure or sign"),
        ({"thousands": "-"}, "no letter, figure or sign"),
        ({"thousands": "\n"}, "no letter, figure or sign"),
        ({"decimal": 1}, "decimal=1"),
        ({"decimal": ",", "thousands": ","}, "both ','"),
    ],
)
def test_what_cannot_be_written_is_refused_before_the_block(stated, message):
    with pytest.raises(ValueError, match=message):
        po.writing(**stated)


def test_the_mark_that_is_not_stated_makes_way():
    for stated in ({"decimal": ","}, {"thousands": "."}):
        with po.writing(**stated):
            assert numbers.needed(1234.5) == "1.234"
            assert numbers.ratio(2.02) == "2,02"
    with po.writing("de", decimal="."):
        assert numbers.count(6000) == "6,000"
    with po.writing(thousands="'"):
        assert numbers.count(6000) == "6'000"


def test_a_space_between_thousands_does_not_break():
    with po.writing("de", thousands="\u202f"):
        told = po.words(ANSWERS["change"]).sentences[-1]
    assert "über 6\u202f000 Zeilen" in told


@value
class UntoldAnswer(Answer):
    """An answer that only English has words for."""

    question: None = None
    subject: None = None


@words.register
def _(answer: UntoldAnswer, audience: str = "plain") -> str:
    return "English words"


@pytest.fixture
def invented(monkeypatch):
    """A language that has small phrases, and words for odds ratios alone."""
    language = replace(language_of("de"), code="xx", name="Invented", **{
        name: Ways() for name in ("words", "caption", "methods_note", "alternative")
    })  # fmt: skip

    def told(answer: OddsAnswer, audience: str = "plain") -> str:
        return f"invented words in {audience}"

    language.words.register(told)
    monkeypatch.setitem(_KNOWN, "xx", language)
    return language


@pytest.mark.parametrize("tell", TELLINGS, ids=lambda each: each.__name__)
def test_what_a_language_cannot_tell_is_refused_and_never_english(tell, invented):
    with po.writing("xx"), pytest.raises(po.QuestionRefused) as refused:
        tell(ANSWERS["change"])
    told = str(refused.value)
    assert f"{tell.__name__}() of ChangeAnswer in Invented ('xx')" in told
    assert "writing('en')" in told


@pytest.mark.parametrize("tell", [words, caption, methods_note, alternative])
def test_an_answer_of_another_kind_is_refused_in_german(tell):
    assert words(UntoldAnswer()) == "English words"
    with po.writing("de"), pytest.raises(po.QuestionRefused, match="of UntoldAnswer in German"):
        tell(UntoldAnswer())


def test_what_only_passes_on_other_texts_is_told_in_every_language(invented):
    both = po.panels(ANSWERS["odds"], ANSWERS["curve"])
    with po.writing("xx"):
        assert po.words(ANSWERS["odds"]) == "invented words in plain"
        with pytest.raises(po.QuestionRefused, match="of CurveAnswer in Invented"):
            po.words(both)
        with pytest.raises(po.QuestionRefused, match="of PanelsAnswer in Invented"):
            po.alternative(both)


def kinds_of_answers():
    found = [Answer]
    for each in found:
        found += each.__subclasses__()
    return sorted(
        {each for each in found[1:] if each.__module__.startswith("plainodds.")},
        key=lambda each: each.__name__,
    )


@pytest.mark.parametrize("tell", TELLINGS, ids=lambda each: each.__name__)
@pytest.mark.parametrize("kind", kinds_of_answers(), ids=lambda each: each.__name__)
def test_german_has_a_way_for_every_kind_of_answer(kind, tell):
    way = getattr(language_of("de"), tell.__name__).of(object.__new__(kind))
    assert way is not None or kind in (PanelsAnswer, ExcerptAnswer)


@pytest.mark.parametrize("tell", TELLINGS, ids=lambda each: each.__name__)
def test_what_is_no_answer_is_refused_as_in_english(tell):
    with po.writing("de"), pytest.raises(TypeError):
        tell("an answer")


def test_code_and_tables_never_change(answer):
    odd_level = replace(answer, question=replace(answer.question, level=0.995))
    plain = po.code(odd_level), po.table(odd_level), po.to_json(odd_level)
    with po.writing("de"):
        told = po.code(odd_level), po.table(odd_level), po.to_json(odd_level)
    assert "0.995" in plain[0]
    assert told[0] == plain[0]
    assert told[1].equals(plain[1])
    assert told[2] == plain[2]


def test_report_tables_follow_the_marks_and_keep_their_words(answer):
    plain = po.report_table(answer).markdown()
    with po.writing(decimal=","):
        told = po.report_table(answer).markdown()
    assert told != plain
    assert back(told) == plain


def back(text):
    """A text with decimal commas, its numbers in English marks again."""
    figures = "0123456789"
    swapped = [
        each.translate(SWAP)
        if 0 < place < len(text) - 1 and text[place - 1] in figures and text[place + 1] in figures
        else each
        for place, each in enumerate(text)
    ]
    return "".join(swapped)


def told_in_english(answer):
    said = [po.words(answer, audience) for audience in ("plain", "technical")]
    return [
        *(each for one in said for each in (*one.sentences, *one.cautions)),
        alternative(answer),
    ]


GRIDS = {
    "odds": (
        [
            made.odds_answer(*test_odds.rows_of(log, se), typical=typical)
            for log, typical, se in test_odds.GRID[::5]
        ],
        test_odds.numbers_of,
    ),
    "curve": (list(test_curve.ANSWERS.values()), test_curve.numbers_of),
    "change": (
        [
            made_changes.change_answer(*etas, moves, se, others=others)
            for etas, moves, others, se in test_change.GRID[::5]
        ],
        test_change.numbers_of,
    ),
    "pair": ([test_pair.made(*case) for case in test_pair.GRID[::7]], test_pair.numbers_of),
}


@pytest.mark.parametrize("kind", GRIDS)
def test_english_with_decimal_commas_is_the_same_sentences_with_other_marks(kind):
    answers, numbers_of = GRIDS[kind]
    for answer in answers:
        plain = told_in_english(answer)
        with po.writing(decimal=","):
            told = told_in_english(answer)
        assert [back(each) for each in told] == plain
        known = numbers_of(answer)
        for audience in ("plain", "technical"):
            with po.writing(decimal=","):
                said = po.words(answer, audience)
            for sentence in said.sentences:
                assert faults(back(sentence)) == []
                assert unaccounted(back(sentence), [*known, 6]) == []


@pytest.mark.parametrize("found", everything(), ids=lambda each: each.topic)
def test_findings_with_decimal_commas_are_the_same_sentences_with_other_marks(found):
    answer = answer_of(found)
    plain = [*told_in_english(answer), po.caption(answer), po.report_table(answer).markdown()]
    with po.writing(decimal=","):
        told = [*told_in_english(answer), po.caption(answer), po.report_table(answer).markdown()]
    assert [back(each) for each in told] == plain


@given(st.floats(0, 1), st.floats(1e-6, 1e6), st.integers(0, 10**9))
def test_every_number_is_the_plain_one_with_its_marks_exchanged(p, size, whole):
    def written():
        return [
            numbers.chance(p), numbers.frequency(p), numbers.ratio(size), numbers.ratio(1 / size),
            numbers.quantity(size, "mm"), numbers.quantity(-size, "£"), numbers.signed(size),
            numbers.count(whole), numbers.needed(1 / max(p, 1e-9)), numbers.p_value(p),
            numbers.percentage_points(p), numbers.points_on_sides(-p, p), numbers.span(p / 2, p),
            numbers.cases_apart_in(p, 10_000), numbers.ratio_interval(1 / size, size),
            numbers.simple_fraction(size), numbers.confidence(min(p, 0.999)),
            numbers.frequency_span(p / 2, p, 10_000), numbers.frequencies([p, p / 2], 1_000),
            numbers.cases_on_sides(-p, p, 10_000), numbers.guarded_count(whole, 1_000),
        ]  # fmt: skip

    plain = written()
    with numbers.marking(numbers.Marks("·", "'")):
        told = written()
    for one, other in zip(plain, told, strict=True):
        assert other.replace("·", ".").replace("'", ",") == one.replace(", ", ", ")
        assert "." not in other


@pytest.mark.parametrize("decimal", [",", "·"])
def test_drawings_write_their_numbers_with_the_marks(answer, decimal):
    def texts():
        figure = po.draw(answer)
        return [each.get_text() for each in figure.findobj(Text) if each.get_visible()]

    plain = texts()
    with po.writing(decimal=decimal):
        told = texts()
    changed = [(one, other) for one, other in zip(plain, told, strict=True) if one != other]
    assert changed or decimal == "·"
    for one, other in changed:
        assert (back(other) if decimal == "," else other.replace("·", ".")) == one


@pytest.mark.parametrize(
    "found", [each for each in MADE if each.topic != "discrimination"], ids=lambda each: each.topic
)
def test_drawings_of_findings_write_their_numbers_with_the_marks(found):
    def texts():
        figure = po.draw(answer_of(found))
        return [each.get_text() for each in figure.findobj(Text) if each.get_visible()]

    plain = texts()
    with po.writing(decimal=","):
        told = texts()
    assert [back(each) for each in told] == plain


def test_every_language_has_a_code_and_marks_of_its_own():
    assert language_of("de").marks == numbers.Marks(",", ".")
    assert language_of("en").marks == numbers.Marks(".", ",")
