"""Writing a file at a chosen place, and telling why it failed."""

from pathlib import Path

import pytest
from PySide6.QtWidgets import QFileDialog, QMessageBox, QWidget
from pytestqt.qtbot import QtBot

from workbench.ui.saving import ask_path, fault_of, write_or_tell


def choosing(monkeypatch: pytest.MonkeyPatch, name: str) -> list[tuple[str, ...]]:
    """Let the user choose that name in every dialog; gives what the dialogs were told."""
    told: list[tuple[str, ...]] = []

    def choose(parent: QWidget, *words: str) -> tuple[str, str]:
        told.append(words)
        return name, ""

    monkeypatch.setattr(QFileDialog, "getSaveFileName", choose)
    return told


def warned(monkeypatch: pytest.MonkeyPatch) -> list[str]:
    """What is told in messages from now on."""
    told: list[str] = []

    def warn(parent: QWidget, title: str, sentence: str) -> None:
        told.append(sentence)

    monkeypatch.setattr(QMessageBox, "warning", warn)
    return told


@pytest.fixture
def widget(qtbot: QtBot) -> QWidget:
    made = QWidget()
    qtbot.addWidget(made)
    return made


@pytest.mark.parametrize(
    ("chosen", "path"),
    [("a/wall", Path("a/wall.svg")), ("a/wall.xml", Path("a/wall.xml")), ("", None)],
)
def test_a_place_is_asked_for(
    widget: QWidget, monkeypatch: pytest.MonkeyPatch, chosen: str, path: Path | None
) -> None:
    told = choosing(monkeypatch, chosen)
    assert ask_path(widget, "Save", "value wall", "SVG picture", ".svg") == path
    assert told == [("Save", "value wall.svg", "SVG picture (*.svg)")]


def test_a_file_is_written_whole(
    widget: QWidget, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    told = warned(monkeypatch)
    assert write_or_tell(widget, tmp_path / "a.svg", b"whole")
    assert (tmp_path / "a.svg").read_bytes() == b"whole"
    assert told == []


def test_what_failed_is_told_in_words(
    widget: QWidget, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    told = warned(monkeypatch)
    target = tmp_path / "lost" / "a.svg"
    sentence = "a.svg has not been written: no such file or directory."
    assert fault_of(target, b"whole") == sentence
    assert not write_or_tell(widget, target, b"whole")
    assert told == [sentence]
