"""What views show, as HTML: they hand text over and get `Markup` back.

Labels, levels, column names and messages may be any text, and a notebook runs the HTML
that it is given. So every tag comes from `plainodds.elements`, which escapes text.
"""

from __future__ import annotations

from base64 import b64encode
from collections.abc import Iterable, Sequence
from dataclasses import dataclass

from plainodds.elements import Markup, element, joined
from plainodds.phrases import Words

__all__ = [
    "Column",
    "Markup",
    "Row",
    "banner",
    "code_block",
    "data_uri",
    "download",
    "element",
    "folded",
    "joined",
    "note",
    "notice",
    "picture",
    "still",
    "style_sheet",
    "table",
    "waiting",
    "words_block",
]


def style_sheet(rules: str, on_load: str | None = None) -> Markup:
    """A style element with rules of this package's own; no text of anybody else's goes in.

    `on_load` is a line of script of this package's own, carried out once the page has the rules.
    """
    return element("style", Markup(rules), onload=on_load)


def data_uri(content: bytes, media_type: str) -> str:
    """A file as the address of itself."""
    return f"data:{media_type};base64,{b64encode(content).decode('ascii')}"


def picture(
    png: bytes, alternative: str, width: int, height: int, style: str | None = None
) -> Markup:
    """A picture with its text alternative, at a size in CSS pixels that shrinks where it must."""
    return element(
        "img",
        src=data_uri(png, "image/png"),
        alt=alternative,
        width=width,
        height=height,
        decoding="sync",
        style=f"max-width:100%;height:auto;{style or ''}",
    )


def words_block(words: Words, *, title: str = "") -> Markup:
    """Sentences as paragraphs, the first one leading, and cautions as a list of their own."""
    lead, *rest = words.sentences or ("",)
    parts = [
        element("h4", title) if title else Markup(),
        element("p", lead, class_="plainodds-lead", role="status") if lead else Markup(),
        _sentences(rest),
    ]
    if words.cautions:
        cautions = (element("li", each) for each in words.cautions)
        parts.append(
            element(
                "div",
                element("h4", "Read with care"),
                element("ul", *cautions),
                class_="plainodds-cautions",
            )
        )
    return joined(parts)


_AS_PARAGRAPH = 4


def _sentences(rest: Sequence[str]) -> Markup:
    """A few sentences read as a paragraph; many are easier to find in as a list."""
    if not rest:
        return Markup()
    if len(rest) <= _AS_PARAGRAPH:
        return element("p", " ".join(rest))
    return element("ul", *(element("li", each) for each in rest))


@dataclass(frozen=True)
class Column:
    """One column of a table."""

    title: str
    is_number: bool = False


@dataclass(frozen=True)
class Row:
    """One row of a table: its first cell is its heading.

    A cell of several pieces is a tuple: where it has to be broken, that is between them.
    `opens` is the heading of a group of rows that this row begins.
    """

    cells: tuple[str | tuple[str, ...], ...]
    opens: str = ""
    class_: str | None = None


def table(
    caption: str,
    columns: Sequence[Column],
    rows: Iterable[Row],
    note: str = "",
    class_: str | None = None,
) -> Markup:
    """A table that assistive technology reads with its caption and headings."""
    heads = (
        element("th", each.title, scope="col", class_=_cell_class(each, heading=True))
        for each in columns
    )
    written = []
    for row in rows:
        if row.opens:
            group = element("th", row.opens, scope="colgroup", colspan=len(columns))
            written.append(element("tr", group, class_="plainodds-group"))
        first, *rest = row.cells
        cells = [element("th", *_parts(first), scope="row")]
        cells += [
            element("td", *_parts(cell, column.is_number), class_=_cell_class(column))
            for cell, column in zip(rest, columns[1:], strict=True)
        ]
        written.append(element("tr", *cells, class_=row.class_))
    return joined(
        [
            element(
                "table",
                element("caption", caption),
                element("thead", element("tr", *heads)),
                element("tbody", *written),
                class_=class_,
            ),
            element("p", note, class_="plainodds-note") if note else Markup(),
        ]
    )


def _parts(cell: str | tuple[str, ...], is_number: bool = False) -> list[str]:
    if isinstance(cell, str) and not is_number:
        return [cell]
    parts = (cell,) if isinstance(cell, str) else cell
    spans = [element("span", part) for part in parts if part]
    return [piece for span in spans for piece in (" ", span)][1:]


def _cell_class(column: Column, heading: bool = False) -> str | None:
    if not column.is_number:
        return None
    return "plainodds-number-head" if heading else "plainodds-number"


def notice(message: str, *, is_problem: bool) -> Markup:
    """A message that assistive technology speaks at once; empty where there is none."""
    if not message:
        return Markup()
    kind = "problem" if is_problem else "remark"
    heading = "Not possible: " if is_problem else "Please note: "
    return element(
        "div", element("strong", heading), message, role="alert", class_=f"plainodds-{kind}-text"
    )


def banner(heading: str, text: str) -> Markup:
    """A warning that stays as long as what it warns of."""
    return element(
        "div", element("strong", f"{heading}. "), text, role="status",
        class_="plainodds-warning-text",
    )  # fmt: skip


def folded(title: str, *inside: str) -> Markup:
    """What is opened by whoever wants to read it, beneath its title."""
    return element("details", element("summary", title), *inside)


def note(text: str) -> Markup:
    """A remark in small print."""
    return element("p", text, class_="plainodds-note")


def code_block(source: str) -> Markup:
    """Source that one click selects."""
    return joined(
        [
            element("p", "One click selects it all.", class_="plainodds-note"),
            element("pre", element("code", source), tabindex=0),
        ]
    )


def download(name: str, folder: str, content: bytes, media_type: str) -> Markup:
    """Say where a file was written, and offer it for download."""
    link = element("a", "Download it", href=data_uri(content, media_type), download=name)
    return element(
        "span", "Saved as ", element("strong", name), f" in {folder}. ", link, role="status"
    )


def still(shown: Markup, words: Words, remark: str = "") -> Markup:
    """An answer that does not move: its picture and its words."""
    small = "max-width:46em;font-size:92%"
    return element(
        "div",
        shown,
        element("p", " ".join(words.sentences), style="max-width:46em"),
        *([element("p", " ".join(words.cautions), style=small)] if words.cautions else []),
        *([element("p", remark, style=small)] if remark else []),
    )


# JupyterLab prefers the live view although it may be dead, and then has only an error to
# show. So the still waits beneath it, out of sight, until there is an error instead of a view.
_WAITING = """
.jp-OutputArea:has(.jupyter-widgets):not(:has(.plainodds-view)) .plainodds-waiting {
  display: block !important;
}
.jp-OutputArea:has(.plainodds-waiting):not(:has(.plainodds-view)) .jupyter-widgets {
  display: none;
}
"""


def waiting(shown: Markup) -> Markup:
    """Markup that JupyterLab shows in place of a view that has lost its kernel."""
    hidden = element("div", shown, class_="plainodds-waiting", style="display:none")
    return joined([style_sheet(_WAITING), hidden])
