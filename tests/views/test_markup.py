"""HTML is made in one place, and whatever is text is escaped there."""

from html.parser import HTMLParser

import pytest

from plainodds.phrases import Words
from plainodds.views import markup

HOSTILE = "<img src=x onerror=alert(1)>"
QUOTES = "\"'><script>alert(1)</script>"


class Tags(HTMLParser):
    """Every element that a browser would make, and what each attribute holds."""

    def __init__(self, text):
        super().__init__()
        self.made = []
        self.feed(text)

    def handle_starttag(self, tag, attributes):
        self.made.append((tag, dict(attributes)))


def tags(text):
    return [tag for tag, _ in Tags(text).made]


def made_with(text):
    return {
        "element": markup.element("p", text, title=text),
        "picture": markup.picture(b"png", text, 10, 20),
        "words_block": markup.words_block(Words((text, text), (text,)), title=text),
        "table": markup.table(
            text,
            [markup.Column(text), markup.Column(text, is_number=True)],
            [markup.Row((text, text), opens=text), markup.Row((text, (text, text)))],
            note=text,
        ),
        "notice": markup.notice(text, is_problem=True),
        "banner": markup.banner(text, text),
        "note": markup.note(text),
        "code_block": markup.code_block(text),
        "download": markup.download(text, text, b"file", "image/png"),
        "still": markup.still(markup.note(text), Words((text,), (text,)), text),
        "waiting": markup.waiting(markup.note(text)),
    }


@pytest.mark.parametrize("hostile", [HOSTILE, QUOTES])
@pytest.mark.parametrize("name", made_with(""))
def test_text_makes_no_elements_of_its_own(name, hostile):
    harmless = made_with("harmless")[name]
    assert tags(made_with(hostile)[name]) == tags(harmless)
    for (_, attributes), (_, expected) in zip(
        Tags(made_with(hostile)[name]).made, Tags(harmless).made, strict=True
    ):
        assert attributes.keys() == expected.keys()


def test_the_text_itself_is_what_a_person_reads():
    class Text(HTMLParser):
        read = ""

        def handle_data(self, data):
            self.read += data

    parser = Text()
    parser.feed(markup.element("p", HOSTILE))
    assert parser.read == HOSTILE


def test_markup_passes_and_what_is_put_together_from_it_by_hand_does_not():
    inner = markup.element("b", "x")
    assert markup.element("p", inner) == "<p><b>x</b></p>"
    assert markup.element("p", f"{inner}!") == "<p>&lt;b&gt;x&lt;/b&gt;!</p>"


def test_a_picture_has_its_text_its_size_and_shrinks_where_there_is_no_room():
    ((tag, attributes),) = Tags(markup.picture(b"png", "Chance of a burst", 590, 350)).made
    assert tag == "img"
    assert attributes["alt"] == "Chance of a burst"
    assert (attributes["width"], attributes["height"]) == ("590", "350")
    assert attributes["src"] == "data:image/png;base64,cG5n"
    assert attributes["decoding"] == "sync"
    assert attributes["style"] == "max-width:100%;height:auto;"


def test_a_table_has_a_caption_and_headings_of_columns_rows_and_groups():
    columns = [markup.Column("Change"), markup.Column("Odds ratio", is_number=True)]
    rows = [markup.Row(("PVC", "0.50"), opens="Material"), markup.Row(("lead", "2.00"))]
    made = Tags(markup.table("Odds", columns, rows)).made
    assert [tag for tag, _ in made[:3]] == ["table", "caption", "thead"]
    assert [held.get("scope") for tag, held in made if tag == "th"] == [
        "col", "col", "colgroup", "row", "row",
    ]  # fmt: skip


def test_an_alert_is_only_there_while_there_is_something_to_say():
    assert markup.notice("", is_problem=True) == ""
    assert Tags(markup.notice("x", is_problem=True)).made[0][1]["role"] == "alert"
    assert Tags(markup.notice("x", is_problem=False)).made[0][1]["role"] == "alert"


def test_a_problem_and_a_remark_are_told_apart_by_words():
    problem, remark = (markup.notice("x", is_problem=each) for each in (True, False))
    assert "Not possible" in problem
    assert "Not possible" not in remark


def test_what_is_folded_has_a_title_and_both_are_escaped():
    written = markup.folded(HOSTILE, markup.element("p", HOSTILE), HOSTILE)
    assert tags(written) == ["details", "summary", "p"]


def test_a_file_is_offered_under_its_own_name():
    link = next(
        held for tag, held in Tags(markup.download("a.svg", "/", b"x", "image/svg+xml")).made
        if tag == "a"
    )  # fmt: skip
    assert link == {"href": "data:image/svg+xml;base64,eA==", "download": "a.svg"}


def test_a_waiting_still_is_out_of_sight_until_the_style_shows_it():
    made = Tags(markup.waiting(markup.note("x"))).made
    assert [tag for tag, _ in made] == ["style", "div", "p"]
    assert made[1][1]["style"] == "display:none"
