"""The file of the open deal: opening, saving, the recovery file, changes made by others."""

from pathlib import Path

from PySide6.QtCore import QObject, QTimer, Signal

from workbench.deal.fresh import new_deal
from workbench.files.deal_file import read_deal, write_deal
from workbench.files.faults import UnreadableError
from workbench.session import recovery
from workbench.session.session import Session

KEEP_AFTER = 1000
"""Milliseconds from an edit to the recovery file; at most 2 s may be lost."""


class DeskFile(QObject):
    """Knows where the deal is kept and keeps what is not saved yet from being lost."""

    moved = Signal(object)
    """The deal has another file: carries its path or None."""
    troubled = Signal(object)
    """Something could not be done with a file: carries a sentence."""

    def __init__(self, session: Session, folder: Path, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._session = session
        self._folder = folder
        self.path: Path | None = None
        self._seen: bytes | None = None
        self._timer = QTimer(self)
        self._timer.setSingleShot(True)
        self._timer.setInterval(KEEP_AFTER)
        self._timer.timeout.connect(self.keep_now)
        session.deal_changed.connect(self._on_deal_changed)

    def open(self, path: Path) -> bool:
        """Open a deal file; the open deal stays if it cannot be read."""
        try:
            deal = read_deal(path)
            seen = path.read_bytes()
        except (UnreadableError, OSError) as error:
            faults = error.faults if isinstance(error, UnreadableError) else (str(error),)
            self.troubled.emit(f"{path.name} was not opened. {'; '.join(map(str, faults))}")
            return False
        self.forget()
        self._take(path.resolve(), seen)
        self._session.start(deal)
        return True

    def new(self) -> None:
        """A new deal with the places for the eight numbers."""
        self.forget()
        self._take(None, None)
        self._session.start(new_deal())

    def take_up(self, recovered: recovery.Recovered) -> None:
        """Go on with a deal that was left behind unsaved."""
        seen: bytes | None = None
        if recovered.path is not None and recovered.path.is_file():
            seen = recovered.path.read_bytes()
        self._take(recovered.path, seen)
        self._session.start(recovered.deal, clean=False)
        recovered.kept_in.unlink(missing_ok=True)
        self._timer.start()

    def save(self, path: Path | None = None) -> bool:
        """Write the deal to its file, or to another that becomes its file."""
        target = path or self.path
        if target is None:
            return False
        try:
            write_deal(target, self._session.deal)
            seen = target.read_bytes()
        except OSError as error:
            reason = error.strerror or "it cannot be written"
            self.troubled.emit(f"{target.name} was not saved: {reason[0].lower()}{reason[1:]}")
            return False
        self.forget()
        self._take(target.resolve(), seen)
        self._session.mark_clean()
        return True

    def changed_by_others(self) -> bool:
        """Whether the file is no longer as it was when last read or written here."""
        if self.path is None or self._seen is None:
            return False
        try:
            return self.path.read_bytes() != self._seen
        except OSError:
            return True

    def keep_now(self) -> None:
        """Write the recovery file, if there is anything that is not saved."""
        if not self._session.modified:
            self.forget()
            return
        try:
            recovery.keep(self._folder, self.path, self._session.deal)
        except OSError as error:
            self.troubled.emit(f"unsaved work cannot be kept safe: {error.strerror}")

    def forget(self) -> None:
        """Drop the recovery file of the open deal."""
        self._timer.stop()
        try:
            recovery.forget(self._folder, self.path)
        except OSError as error:
            self.troubled.emit(f"the recovery file cannot be removed: {error.strerror}")

    def _take(self, path: Path | None, seen: bytes | None) -> None:
        self.path, self._seen = path, seen
        self.moved.emit(path)

    def _on_deal_changed(self, revision: int) -> None:
        if not self._timer.isActive():
            self._timer.start()
