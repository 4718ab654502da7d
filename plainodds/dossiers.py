"""Everything that answers leave behind, in one folder."""

from __future__ import annotations

import hashlib
import json
import os
import re
import shutil
import tempfile
from collections.abc import Iterable, Iterator, Mapping
from pathlib import Path
from typing import Any, Literal, TypeAlias

from plainodds.answers.disclosure import SMALLEST_CELL, guarded
from plainodds.answers.panels import PanelsAnswer, panel_letter
from plainodds.answers.questions import Answer
from plainodds.answers.tables import table
from plainodds.drawings.draw import drawing_of
from plainodds.drawings.save import Size, save
from plainodds.drawings.theme import Theme
from plainodds.phrases import alternative, caption, methods_note, words
from plainodds.phrases.languages import spoken_now
from plainodds.phrases.lexicon import message
from plainodds.phrases.reports.report import report_of
from plainodds.phrases.script import script
from plainodds.phrases.versions import versions

__all__ = ["dossier"]

Form: TypeAlias = Literal["svg", "pdf", "png", "tiff"]

_MANIFEST = "manifest.json"
_TABLES = {"html": "html", "markdown": "md", "latex": "tex", "csv": "csv"}


@spoken_now()
def dossier(
    answers: Mapping[str, Answer] | Iterable[Answer],
    folder: str | os.PathLike[str],
    *,
    forms: Iterable[Form] = ("svg", "pdf", "png"),
    size: Size = "page",
    theme: str | Theme | None = None,
    smallest_cell: int = SMALLEST_CELL,
    overwrite: bool = False,
) -> Path:
    """Write figures, captions, tables, words, methods and a script into one folder.

    The folder appears as a whole or not at all: it is made under another name beside its
    place and moved there once complete.

    Parameters
    ----------
    answers : mapping of name to Answer, or iterable of Answer
        A name begins the names of the answer's files; without names they are numbered.
    folder : path-like
        Must not exist, unless `overwrite` is True.
    forms : iterable of {"svg", "pdf", "png", "tiff"}
        Which files are made of each figure.
    size, theme
        As in `plainodds.save`.
    smallest_cell : int
        Counts of fewer rows are merged or withheld. What follows from several answers laid
        side by side is not looked for: local rules on disclosure come first.
    overwrite : bool
        Whether a dossier of that name is replaced. A folder in which there is anything that
        no dossier wrote is never replaced.

    Returns
    -------
    pathlib.Path
        The folder.

    Raises
    ------
    ValueError
        If there are no answers, or a figure cannot have that size or form.
    FileExistsError
        If the folder exists and may not be replaced.
    OSError
        If it cannot be written.

    Examples
    --------
    >>> import tempfile, numpy as np, statsmodels.api as sm, plainodds as po
    >>> x = np.repeat([0.0, 1.0, 2.0, 3.0], 10)
    >>> y = np.tile([0, 0, 1, 0, 1, 1, 0, 1, 1, 1], 4)
    >>> fit = po.FittedLogit(sm.Logit(y, sm.add_constant(x)).fit(disp=False))
    >>> with tempfile.TemporaryDirectory() as place:
    ...     made = dossier({"odds": fit.odds()}, f"{place}/account", forms=["svg"])
    ...     sorted(path.name for path in made.iterdir())
    ['account.md', 'figures', 'make.py', 'manifest.json', 'methods.md', 'tables']
    """
    given = _given(answers)
    named = _filed(given)
    wanted = tuple(forms)
    options = _unusual(forms=wanted, size=size, theme=theme, smallest_cell=smallest_cell)
    target = Path(folder)
    _refuse_to_replace(target, overwrite)
    # beside its place, so that it can be moved there in one step
    making = Path(tempfile.mkdtemp(prefix=f".{target.name}-", dir=_parent(target)))
    try:
        safe = {name: guarded(answer, smallest_cell) for name, answer in named.items()}
        _write(making, safe, wanted, size, theme)
        _put(making / "make.py", script(given, options))
        _write_manifest(making, safe, smallest_cell)
        making.chmod(0o755)
        _move(making, target)
    except BaseException:
        shutil.rmtree(making, ignore_errors=True)
        raise
    return target


_USUAL = {
    "forms": ("svg", "pdf", "png"),
    "size": "page",
    "theme": None,
    "smallest_cell": SMALLEST_CELL,
}


def _unusual(**options: Any) -> dict[str, Any]:
    """Arguments that are not the defaults."""
    return {name: held for name, held in options.items() if held != _USUAL[name]}


def _given(answers: Mapping[str, Answer] | Iterable[Answer]) -> dict[str, Answer]:
    """Answers by name; those without one are called by their question, and counted."""
    if isinstance(answers, Mapping):
        given = {str(name): answer for name, answer in answers.items()}
    else:
        given = {}
        for answer in [answers] if isinstance(answers, Answer) else answers:
            stem = type(answer.question).method if isinstance(answer, Answer) else "answer"
            number = 1 + sum(name.split(" ")[0] == stem for name in given)
            given[stem if number == 1 else f"{stem} {number}"] = answer
    if not given:
        raise ValueError("A dossier needs at least one answer: dossier({'odds': fit.odds()}, …).")
    for answer in given.values():
        drawing_of(answer)  # refuses what is no answer before anything is written
    return given


def _filed(given: Mapping[str, Answer]) -> dict[str, Answer]:
    """Answers by the beginnings of their files' names, numbered in order."""
    width = max(2, len(str(len(given))))
    filed = {}
    for place, (name, answer) in enumerate(given.items(), 1):
        slug = re.sub(r"[^a-z0-9]+", "-", name.lower()).strip("-")[:60]
        filed[f"{place:0{width}}-{slug or 'answer'}"] = answer
    return filed


def _parent(target: Path) -> Path:
    parent = target.absolute().parent
    if not parent.is_dir():
        raise FileNotFoundError(f"{parent} is no folder; make it first, or choose another place.")
    return parent


def _refuse_to_replace(target: Path, overwrite: bool) -> None:
    if not target.exists() and not target.is_symlink():
        return
    if not overwrite:
        raise FileExistsError(
            f"{target} exists already. Choose another name, or pass overwrite=True to replace it."
        )
    known = _listed(target)
    if known is None:
        raise FileExistsError(
            f"{target} is no dossier, so it is not replaced. Choose another name, or take it away."
        )
    strange = sorted(
        path.relative_to(target).as_posix()
        for path in target.rglob("*")
        if not path.is_dir() and path.relative_to(target).as_posix() not in known
    )
    if strange:
        raise FileExistsError(
            f"{target} holds {strange[0]!r}, which no dossier wrote, so it is not replaced. Move "
            "it elsewhere first."
        )


def _listed(target: Path) -> set[str] | None:
    """The files that a dossier's manifest names, itself among them; None without one."""
    try:
        held = json.loads((target / _MANIFEST).read_text(encoding="utf-8"))
        return {*held["files"], _MANIFEST}
    except (OSError, ValueError, TypeError, KeyError):
        return None


def _write(
    folder: Path,
    answers: Mapping[str, Answer],
    forms: tuple[str, ...],
    size: Size,
    theme: str | Theme | None,
) -> None:
    figures, tables = folder / "figures", folder / "tables"
    figures.mkdir()
    tables.mkdir()
    for name, answer in answers.items():
        for form in forms:
            save(answer, figures / f"{name}.{form}", size, theme=theme)
        for part, each in _tabled(name, answer):
            report = report_of(each)
            for form, suffix in _TABLES.items():
                _put(tables / f"{part}.{suffix}", getattr(report, form)())
            _put(tables / f"{part}-unrounded.csv", table(each).to_csv(index=False))
    _put(folder / "account.md", "\n".join(_account(answers, forms)))
    _put(folder / "methods.md", "\n".join(_methods(answers)))


def _tabled(name: str, answer: Answer) -> list[tuple[str, Answer]]:
    """What has tables of its own: an answer, or each panel of several."""
    if not isinstance(answer, PanelsAnswer):
        return [(name, answer)]
    return [
        (f"{name}-{panel_letter(place).lower()}", each) for place, each in enumerate(answer.answers)
    ]


def _put(path: Path, text: str) -> None:
    # bytes, so that line ends are the same on every system
    path.write_bytes(text.encode("utf-8"))


def _account(answers: Mapping[str, Answer], forms: tuple[str, ...]) -> Iterator[str]:
    """Figures with their captions, words and tables, one answer after the other."""
    for number, (name, answer) in enumerate(answers.items(), 1):
        told = words(answer)
        yield f"## {number}. {_plain(drawing_of(answer).title(answer))}"
        yield ""
        yield from _told(told.sentences)
        if told.cautions:
            yield message("Read with care:")
            yield ""
            yield from (f"- {_plain(each)}" for each in told.cautions)
            yield ""
        shown = next((form for form in ("svg", "png") if form in forms), None)
        if shown is not None:
            described = _plain(alternative(answer)).replace("[", "(").replace("]", ")")
            yield f"![{described}](figures/{name}.{shown})"
            yield ""
        yield f"*{message('Figure {}.', number)}* {_plain(caption(answer))}"
        yield ""
        for _, each in _tabled(name, answer):
            yield message("Table {}.", number)
            yield ""
            yield report_of(each).markdown()


_AS_PARAGRAPH = 8


def _told(sentences: tuple[str, ...]) -> Iterator[str]:
    """The first sentence by itself; the others as a paragraph, or as a list where they are many."""
    first, *rest = map(_plain, sentences or ("",))
    yield first
    yield ""
    if len(rest) <= _AS_PARAGRAPH:
        yield " ".join(rest)
    else:
        yield from (f"- {each}" for each in rest)
    yield ""


def _methods(answers: Mapping[str, Answer]) -> Iterator[str]:
    """What was computed and how, said once where several answers share it."""
    notes = [methods_note(answer) for answer in answers.values()]
    yield f"## {message('Methods')}"
    yield ""
    yield " ".join(map(_plain, dict.fromkeys(each for note in notes for each in note.sentences)))
    yield ""
    yield f"## {message('References')}"
    yield ""
    for each in sorted({each for note in notes for each in note.references}):
        yield f"- {_plain(each)}"


def _plain(text: str) -> str:
    """Text that Markdown shows as it is."""
    return re.sub(r"([\\`*_{}\[\]<>#|~$&])", r"\\\1", " ".join(text.split()))


def _write_manifest(folder: Path, answers: Mapping[str, Answer], smallest_cell: int) -> None:
    files = {
        path.relative_to(folder).as_posix(): hashlib.sha256(path.read_bytes()).hexdigest()
        for path in sorted(folder.rglob("*"))
        if path.is_file()
    }
    held = {
        "made_with": versions("plainodds", "statsmodels", "numpy", "matplotlib"),
        "smallest_cell": smallest_cell,
        "answers": {
            name: {"kind": type(answer.question).method, "title": drawing_of(answer).title(answer)}
            for name, answer in answers.items()
        },
        "files": files,
    }
    _put(folder / _MANIFEST, json.dumps(held, indent=2, ensure_ascii=False) + "\n")


def _move(made: Path, target: Path) -> None:
    """Put the new folder in its place; an old one is put back if that fails."""
    if not target.exists():
        made.rename(target)
        return
    aside = Path(tempfile.mkdtemp(prefix=f".{target.name}-old-", dir=target.absolute().parent))
    old = aside / "old"
    target.rename(old)
    try:
        made.rename(target)
    except BaseException:
        old.rename(target)
        raise
    finally:
        shutil.rmtree(aside, ignore_errors=True)
