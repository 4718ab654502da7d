"""What a view gives away at the press of a button: its code, its figure's file."""

from __future__ import annotations

from collections.abc import Callable
from contextlib import AbstractContextManager

import ipywidgets as widgets

from plainodds.answers.questions import Answer
from plainodds.phrases import code
from plainodds.views import markup
from plainodds.views.parts import block, html
from plainodds.views.saving import FORMATS, save_beside

__all__ = ["Extras"]

_SHOW, _HIDE = "Show the code", "Hide the code"


class Extras:
    """The buttons under a view.

    Parameters
    ----------
    answer : callable
        Gives the answer that is shown.
    exactly : callable
        Does something with the answer as it is given away, now or when it is computed.
    stem : callable
        Gives the beginning of a file's name.
    guarded : callable
        Gives the context within which callbacks run.
    """

    def __init__(
        self,
        answer: Callable[[], Answer],
        exactly: Callable[[Callable[[Answer], None]], None],
        stem: Callable[[], str],
        guarded: Callable[[], AbstractContextManager[None]],
    ) -> None:
        self._answer, self._exactly = answer, exactly
        self._stem, self._guarded = stem, guarded
        self.code_button = widgets.Button(description=_SHOW)
        self.code = html("code")
        self.save_button = widgets.Button(description="Save the picture")
        self.kind = widgets.Dropdown(
            description="as", options=[(kind.upper(), kind) for kind in FORMATS]
        )
        self.saved = html("saved")
        self.code_button.on_click(self._on_code)
        self.save_button.on_click(self._on_save)
        saving = widgets.HBox([self.save_button, self.kind])
        saving.add_class("plainodds-buttons")
        save = block(saving, name="save")
        buttons = widgets.HBox([self.code_button, save])
        buttons.add_class("plainodds-buttons")
        self.widget = block(buttons, self.saved, self.code, name="extras")

    @property
    def shows_code(self) -> bool:
        """Whether the code is open."""
        return bool(self.code_button.description == _HIDE)

    def follow(self, answer: Answer) -> None:
        """Keep open code up to date."""
        if self.shows_code:
            self.code.value = markup.code_block(code(answer))

    def _on_code(self, _: widgets.Button) -> None:
        with self._guarded():
            if self.shows_code:
                self.code_button.description, self.code.value = _SHOW, ""
                return
            self.code.value = markup.code_block(code(self._answer()))
            self.code_button.description = _HIDE

    def _on_save(self, _: widgets.Button) -> None:
        with self._guarded():
            self._exactly(self._save)

    def _save(self, answer: Answer) -> None:
        saved = save_beside(answer, self._stem(), self.kind.value)
        self.saved.value = markup.download(
            saved.path.name, str(saved.path.parent), saved.content, saved.media_type
        )
