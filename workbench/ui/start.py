"""Starting the window: the application, its looks, the deal, and what was left behind."""

import gc
import sys
import traceback
from pathlib import Path
from types import TracebackType

from PySide6.QtCore import QSettings, QStandardPaths, QTimer
from PySide6.QtWidgets import QApplication, QMessageBox

from workbench.deal.fresh import new_deal
from workbench.session.desk_file import DeskFile
from workbench.session.recovery import left_behind
from workbench.session.session import Session
from workbench.ui.about import AboutDialog
from workbench.ui.theme import apply_theme, load_font, system_prefers_dark
from workbench.ui.window import Window


def recovery_folder() -> Path:
    """Where unsaved work is kept."""
    place = QStandardPaths.StandardLocation.AppDataLocation
    return Path(QStandardPaths.writableLocation(place)) / "recovery"


def make_window(settings: QSettings, folder: Path) -> Window:
    """A window on a new deal."""
    session = Session(new_deal())
    file = DeskFile(session, folder)
    window = Window(session, file, settings)
    session.setParent(window)
    file.setParent(window)
    return window


def start(path: Path | None) -> int:
    """Open the window, on a deal file if one is named; returns when it is closed."""
    app = QApplication([sys.argv[0]])
    app.setApplicationName("Groundcourse")
    app.setOrganizationName("Groundcourse")
    load_font()
    settings = QSettings()
    dark = bool(settings.value("looks/dark", system_prefers_dark(app), type=bool))
    apply_theme(app, dark)
    window = make_window(settings, recovery_folder())
    sys.excepthook = _Hook(window)
    # Cyclic collection in a worker thread would destroy widgets there.
    gc.disable()
    collector = QTimer(window)
    collector.timeout.connect(_collect)
    collector.start(2000)
    window.show()
    if not settings.value("about/seen", False, type=bool):
        AboutDialog(window).exec()
        settings.setValue("about/seen", True)
    _offer_recovered(window)
    if path is not None:
        window.file.open(path)
    return app.exec()


def _collect() -> None:
    gc.collect(1)


def _offer_recovered(window: Window) -> None:
    for found in left_behind(recovery_folder()):
        name = found.path.name if found.path is not None else "a deal that was never saved"
        buttons = QMessageBox.StandardButton
        asked = QMessageBox.question(
            window,
            "Groundcourse",
            f"Unsaved work on {name} was left behind. Go on with it?",
            buttons.Yes | buttons.No | buttons.Discard,
        )
        if asked == buttons.Yes:
            window.file.take_up(found)
            return
        if asked == buttons.Discard:
            found.kept_in.unlink(missing_ok=True)


class _Hook:
    """Tells of an error that nobody caught, and keeps the work safe."""

    def __init__(self, window: Window) -> None:
        self._window = window

    def __call__(
        self, kind: type[BaseException], error: BaseException, trace: TracebackType | None
    ) -> None:
        traceback.print_exception(kind, error, trace)
        self._window.file.keep_now()
        QMessageBox.critical(
            self._window,
            "Groundcourse",
            f"Something went wrong inside the program ({kind.__name__}). Your work is kept safe; "
            "save it under another name and start anew.",
        )
