"""Figure files that a view writes beside the notebook."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import count
from pathlib import Path

from plainodds.answers.questions import Answer
from plainodds.drawings import save

__all__ = ["FORMATS", "SavedFile", "save_beside"]

FORMATS = {
    "svg": "image/svg+xml",
    "pdf": "application/pdf",
    "png": "image/png",
}
"""Kinds of files, and their media types."""


@dataclass(frozen=True)
class SavedFile:
    """A file that was written."""

    path: Path
    media_type: str

    @property
    def content(self) -> bytes:
        """What is in it."""
        return self.path.read_bytes()


def save_beside(answer: Answer, stem: str, kind: str, folder: Path | None = None) -> SavedFile:
    """Write an answer's figure under a name that no file has yet.

    Parameters
    ----------
    answer : Answer
    stem : str
        Beginning of the file's name; a number follows where the name is taken.
    kind : {"svg", "pdf", "png"}
    folder : Path, optional
        Default: where the kernel works, that is beside the notebook.

    Raises
    ------
    OSError
        If the folder cannot be written to.
    """
    path = _reserved(Path.cwd() if folder is None else folder, stem, kind)
    try:
        save(answer, path, overwrite=True)
    except BaseException:
        path.unlink(missing_ok=True)
        raise
    return SavedFile(path, FORMATS[kind])


def _reserved(folder: Path, stem: str, kind: str) -> Path:
    """Make an empty file of a new name, so that nobody else can take it meanwhile."""
    for number in count(1):
        path = folder / (f"{stem}.{kind}" if number == 1 else f"{stem}-{number}.{kind}")
        try:
            path.touch(exist_ok=False)
        except FileExistsError:
            continue
        return path
    raise AssertionError("unreachable")
