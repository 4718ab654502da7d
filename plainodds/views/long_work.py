"""Work that takes its time: in a thread of its own, with a bar and a button that stops it.

JupyterLab delivers what is done to widgets one after the other: while a callback
computes, the press of a button waits. So a callback must not compute for long. It starts
a thread and returns; the thread computes without the lock, and takes it to show what it
found.
"""

from __future__ import annotations

import threading
import time
from collections.abc import Callable, Hashable
from dataclasses import dataclass
from typing import Any

import ipywidgets as widgets

from plainodds.answers.progress import Progress, Stopped
from plainodds.views import markup
from plainodds.views.parts import block, html

__all__ = ["LongWork", "Work"]

_BETWEEN_REPORTS = 0.1


@dataclass(frozen=True)
class Work:
    """Something to be computed before a question can be answered.

    Attributes
    ----------
    key : hashable
        Work of the same key is the same work.
    said : str
        What is going on, for people.
    run : callable
        Computes, telling its progress; reads nothing that others change.
    keep : callable
        Keeps what `run` found.
    """

    key: Hashable
    said: str
    run: Callable[[Progress], Any]
    keep: Callable[[Any], None]


class LongWork:
    """Runs one piece of work at a time, and shows how far it is.

    Parameters
    ----------
    on_stop : callable
        Called when the button is pressed, with no lock held.

    Attributes
    ----------
    widget : Box
        Empty while nothing runs.
    """

    def __init__(self, on_stop: Callable[[], None]) -> None:
        self._on_stop = on_stop
        self._running: _Run | None = None
        self._said = html("work-said")
        self.stop_button = widgets.Button(description="Stop")
        self.stop_button.add_class("plainodds-stop")
        self.stop_button.on_click(self._pressed)
        self.widget = block(name="work")

    @property
    def key(self) -> Hashable | None:
        """What is being worked on."""
        return None if self._running is None else self._running.work.key

    def run_here(self, work: Work) -> Any:
        """Run in this thread, to its end.

        Raises
        ------
        Stopped
            At the press of the button, if it arrives meanwhile.
        """
        run = self._begun(work)
        try:
            return work.run(run.progress)
        finally:
            self._ended(run)

    def start(self, work: Work, then: Callable[[Callable[[], Any]], None]) -> None:
        """Run in a thread of its own, instead of what is running.

        Parameters
        ----------
        work : Work
        then : callable
            Called in that thread with what gives the result, or raises what the work
            raised; not called once the work has been abandoned.
        """
        run = self._begun(work)

        def in_thread() -> None:
            try:
                result = work.run(run.progress)
            except BaseException as error:
                outcome = _raising(error)
            else:
                outcome = _giving(result)
            if not run.stopped.is_set():
                then(outcome)
            self._ended(run)

        run.thread = threading.Thread(target=in_thread, daemon=True, name="plainodds")
        run.thread.start()

    def abandon(self) -> None:
        """Let what is running come to nothing."""
        run = self._running
        if run is not None:
            run.stopped.set()
            self._ended(run)

    def wait(self) -> None:
        """Wait until nothing runs any more."""
        while (run := self._running) is not None and run.thread is not None:
            run.thread.join()

    def _begun(self, work: Work) -> _Run:
        self.abandon()
        run = _Run(work, self._told)
        self._running = run
        self._said.value = _bar(work.said, 0, 0)
        self.widget.children = (self._said, self.stop_button)
        return run

    def _ended(self, run: _Run) -> None:
        if self._running is run:
            self._running = None
            self.widget.children = ()

    def _told(self, run: _Run, done: int, parts: int) -> None:
        if self._running is run:
            self._said.value = _bar(run.work.said, done, parts)

    def _pressed(self, _: widgets.Button) -> None:
        # whoever computes may hold the lock: only the flag reaches him
        run = self._running
        if run is not None:
            run.stopped.set()
            self._on_stop()


class _Run:
    """One piece of work under way."""

    def __init__(self, work: Work, told: Callable[[_Run, int, int], None]) -> None:
        self.work = work
        self.stopped = threading.Event()
        self.thread: threading.Thread | None = None
        self._told, self._last = told, 0.0

    def progress(self, done: int, parts: int) -> None:
        """Show how far the work is, now and then; stop it where that is wanted."""
        if self.stopped.is_set():
            raise Stopped
        now = time.monotonic()
        if now - self._last > _BETWEEN_REPORTS:
            self._last = now
            self._told(self, done, parts)


def _giving(result: Any) -> Callable[[], Any]:
    return lambda: result


def _raising(error: BaseException) -> Callable[[], Any]:
    def outcome() -> Any:
        raise error

    return outcome


def _bar(said: str, done: int, parts: int) -> markup.Markup:
    """How far the work is; a bar without a value says that it is going on."""
    value, most = (done, parts) if parts else (None, None)
    text = f"{said}: {done} of {parts}" if parts else f"{said} …"
    return markup.joined(
        [
            markup.element("span", text, role="status"),
            markup.element("progress", value=value, max=most, aria_label=said),
        ]
    )
