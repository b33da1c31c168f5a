"""Menus and shortcuts, declared as data; the sheet of shortcuts is made from the same."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING

from PySide6.QtCore import QObject
from PySide6.QtGui import QAction, QKeySequence
from PySide6.QtWidgets import QMenu, QMessageBox

from workbench.places import sample_deals
from workbench.ui.about import AboutDialog

if TYPE_CHECKING:
    from workbench.ui.window import Window

Keys = QKeySequence.StandardKey


@dataclass(frozen=True)
class Command:
    """One entry of a menu."""

    menu: str
    text: str
    do: Callable[[], object]
    keys: QKeySequence.StandardKey | str | None = None


class Menus(QObject):
    """The menu bar of a window."""

    def __init__(self, window: Window) -> None:
        super().__init__(window)
        self._window = window
        self.actions: dict[str, QAction] = {}
        self._menus: dict[str, QMenu] = {}
        for command in self._commands():
            if command.menu not in self._menus:
                self._menus[command.menu] = window.menuBar().addMenu(command.menu)
            action = QAction(command.text, window)
            if command.keys is not None:
                action.setShortcut(QKeySequence(command.keys))
            action.triggered.connect(command.do)
            self._menus[command.menu].addAction(action)
            self.actions[command.text.replace("&", "")] = action
        self._add_files()
        dark = self.actions["Dark"]
        dark.setCheckable(True)
        dark.setChecked(bool(window.settings.value("looks/dark", False, type=bool)))

    def _commands(self) -> list[Command]:
        window = self._window
        return [
            Command("&File", "&New deal", window.new_deal, Keys.New),
            Command("&File", "&Open…", window.open_dialog, Keys.Open),
            Command("&File", "&Save", window.save, Keys.Save),
            Command("&File", "Save &as…", window.save_as, Keys.SaveAs),
            Command("&File", "&Quit", window.close, Keys.Quit),
            Command("&Edit", "&Undo", window.session.undo, Keys.Undo),
            Command("&Edit", "&Redo", window.session.redo, Keys.Redo),
            Command("&Deal", "Go through what is to &mend", window.show_faults, "F8"),
            *[
                Command("&View", name, _ShowPage(window, place), f"Alt+{place + 1}")
                for place, name in enumerate(window.desk.names)
            ],
            Command("&View", "Dark", self._on_dark, None),
            Command("&Help", "&Keys", self._show_keys, "Ctrl+/"),
            Command("&Help", "&About Groundcourse", self._show_about, None),
        ]

    def _add_files(self) -> None:
        """Samples, and the recent files as they are when the menu opens."""
        file_menu = self._menus["&File"]
        before = self.actions["Save"]
        self._recent = QMenu("&Recent", file_menu)
        self._recent.aboutToShow.connect(self._fill_recent)
        file_menu.insertMenu(before, self._recent)
        samples = QMenu("S&amples", file_menu)
        for path in sorted(sample_deals().glob("*.deal")):
            action = samples.addAction(path.stem.replace("-", " ").capitalize())
            action.setData(str(path))
        samples.triggered.connect(self._on_file_chosen)
        self._recent.triggered.connect(self._on_file_chosen)
        file_menu.insertMenu(before, samples)

    def _fill_recent(self) -> None:
        self._recent.clear()
        for name in self._window.recent():
            self._recent.addAction(name).setData(name)
        if self._recent.isEmpty():
            self._recent.addAction("None yet").setEnabled(False)

    def _on_file_chosen(self, action: QAction) -> None:
        self._window.open_file(Path(str(action.data())))

    def show_state(self) -> None:
        """Name what undo and redo would do."""
        for text, label in (
            ("Undo", self._window.session.undo_label),
            ("Redo", self._window.session.redo_label),
        ):
            action = self.actions[text]
            action.setText(f"&{text} {label}" if label else f"&{text}")
            action.setEnabled(label is not None)

    def _on_dark(self) -> None:
        self._window.set_dark(self.actions["Dark"].isChecked())

    def _show_keys(self) -> None:
        lines = [
            f"{text}: {action.shortcut().toString()}"
            for text, action in self.actions.items()
            if not action.shortcut().isEmpty()
        ]
        QMessageBox.information(self._window, "Keys", "\n".join(lines))

    def _show_about(self) -> None:
        AboutDialog(self._window).exec()


class _ShowPage:
    """Shows one page when called."""

    def __init__(self, window: Window, place: int) -> None:
        self._window, self._place = window, place

    def __call__(self) -> None:
        self._window.show_page(self._place)
