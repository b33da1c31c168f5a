"""Work beside the window: one thread, results by number, nothing left running at the end."""

import gc
from collections.abc import Callable
from dataclasses import dataclass
from functools import partial
from threading import Event
from typing import TypeAlias

from PySide6.QtCore import QObject, QThreadPool, Signal

Work: TypeAlias = Callable[[Event], object]
"""Runs beside the window; looks at the event now and then and leaves off where it is set."""


@dataclass(frozen=True)
class Done:
    """A finished job: what it came to, or the error that ended it."""

    job: int
    value: object
    error: Exception | None = None


class Jobs(QObject):
    """Runs jobs one after another. Lives in the thread of the window and outlives its jobs.

    Listen to it with methods of a QObject: what is under way to one that is gone is dropped.

    While a job runs Python's cyclic collection is off: in the job's thread it would destroy
    widgets that the window has let go.
    """

    finished = Signal(object)
    """Carries a Done, in the window's thread."""

    def __init__(self, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._pool = QThreadPool(self)
        self._pool.setMaxThreadCount(1)
        self._last = 0
        self._running: dict[int, Event] = {}
        self._collects = False
        self._closed = False
        self.finished.connect(self._on_finished)

    def start(self, work: Work) -> int:
        """Queue a job; its number comes back with what it came to."""
        self._last += 1
        if not self._closed:
            if not self._running and gc.isenabled():
                self._collects = True
                gc.disable()
            cancel = self._running[self._last] = Event()
            self._pool.start(partial(self._run, self._last, work, cancel))
        return self._last

    def cancel(self, job: int) -> None:
        """Ask a job to leave off; what it comes to is still told."""
        if job in self._running:
            self._running[job].set()

    def close_down(self) -> None:
        """Leave off all jobs and wait until none runs; none can be started after that."""
        self._closed = True
        self._pool.clear()
        for cancel in self._running.values():
            cancel.set()
        self._pool.waitForDone()
        self._running.clear()
        self._let_collect()

    def _run(self, job: int, work: Work, cancel: Event) -> None:
        """In the job's thread."""
        try:
            done = Done(job, work(cancel))
        except Exception as error:
            done = Done(job, None, error)
        if not self._closed:
            self.finished.emit(done)

    def _on_finished(self, done: Done) -> None:
        self._running.pop(done.job, None)
        if not self._running:
            self._let_collect()

    def _let_collect(self) -> None:
        if self._collects:
            self._collects = False
            gc.enable()
