"""Makes the memo of the open deal beside the window: sets it, renders its pages, writes it."""

from pathlib import Path

from PySide6.QtCore import QObject, Signal
from PySide6.QtGui import QImage

from workbench.session.session import Session
from workbench.session.typed import locale_of
from workbench.text.locale import Paper
from workbench.ui.jobs import Done, Jobs
from workbench.ui.memo_work import Made, Memo, Page, Writing


class MemoMaker(QObject):
    """One memo at a time. What belongs to an older deal or another paper is dropped."""

    begun = Signal(object)
    """Something is being done: carries what, in words."""
    ended = Signal(object)
    """It is done: carries what is to be said of that, in words, or an empty text."""
    made = Signal(object)
    """The memo is another one: carries a Made."""
    rendered = Signal(object)
    """A page of it: carries its number from 0 and its image."""
    failed = Signal(object)
    """It has not been written: carries why."""

    def __init__(self, session: Session, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self._jobs = Jobs(self)
        self._jobs.finished.connect(self._on_finished)
        self._memo: Made | None = None
        self._stands_for: tuple[int, Paper | None] | None = None
        self._awaited: tuple[int, Paper | None] | None = None
        self._making, self._writing = 0, 0
        self._rendering: dict[int, int] = {}
        self._target: Path | None = None

    def make(self, paper: Paper | None) -> None:
        """Make the memo anew, unless it stands or is being made for this deal and paper."""
        self._session.catch_up()
        wanted = (self._session.revision, paper)
        if wanted == (self._awaited or self._stands_for):
            return
        for job in (self._making, *self._rendering):
            self._jobs.cancel(job)
        result = self._session.result
        self._awaited = wanted
        self._making = self._jobs.start(Memo(result, locale_of(result.plan.deal), paper))
        self.begun.emit("Setting the memo…")

    def render(self, number: int, width: int) -> None:
        """Render a page of the memo, so many dots wide."""
        if self._memo is not None:
            job = self._jobs.start(Page(self._memo.pdf, number, width))
            self._rendering[job] = number

    def write(self, path: Path, paper: Paper | None) -> None:
        """Write the memo of the deal as it stands, once it is made."""
        if path.suffix == ".deal":
            self.failed.emit(f"{path.name} would be a deal file; give the memo another name.")
            return
        self._target = path
        self.make(paper)
        if self._awaited is None:
            self._start_writing()

    def close_down(self) -> None:
        """Leave off what is being done, and wait until nothing is."""
        self._jobs.close_down()

    def _on_finished(self, done: Done) -> None:
        number = self._rendering.pop(done.job, None)
        if done.error is not None:
            self._give_up(done.error)
        elif number is not None and isinstance(done.value, QImage):
            self.rendered.emit((number, done.value))
        elif done.job == self._making and isinstance(done.value, Made):
            self._take(done.value)
        elif done.job == self._writing:
            self._tell_written(str(done.value))

    def _give_up(self, error: Exception) -> None:
        """An error here is a defect: it goes where all of them go."""
        self._awaited = self._target = None
        self.ended.emit("This could not be done.")
        raise error

    def _take(self, memo: Made) -> None:
        self._memo, self._stands_for, self._awaited = memo, self._awaited, None
        self._rendering.clear()
        self.ended.emit("")
        self.made.emit(memo)
        self._start_writing()

    def _start_writing(self) -> None:
        if self._memo is not None and self._target is not None:
            self._writing = self._jobs.start(Writing(self._target, self._memo.pdf))
            self.begun.emit(f"Writing {self._target.name}…")

    def _tell_written(self, fault: str) -> None:
        name = "" if self._target is None else self._target.name
        self._target = None
        self.ended.emit("" if fault else f"Written: {name}")
        if fault:
            self.failed.emit(fault)
