"""Writing a file that the user has chosen a place for; what fails is told in words."""

from pathlib import Path

from PySide6.QtWidgets import QFileDialog, QMessageBox, QWidget

from workbench.files.atomic import write_atomically
from workbench.files.faults import system_fault


def ask_path(parent: QWidget, title: str, name: str, kind: str, suffix: str) -> Path | None:
    """Where to write; None if the user thinks better of it. The suffix is added where none is."""
    chosen, _ = QFileDialog.getSaveFileName(parent, title, name + suffix, f"{kind} (*{suffix})")
    if not chosen:
        return None
    path = Path(chosen)
    return path if path.suffix else path.with_name(path.name + suffix)


def fault_of(path: Path, data: bytes) -> str:
    """Write the whole file or nothing; why it could not be written, or an empty text."""
    try:
        write_atomically(path, data)
    except OSError as error:
        return f"{path.name} has not been written: {system_fault(error).sentence}."
    return ""


def write_or_tell(parent: QWidget, path: Path, data: bytes) -> bool:
    """Write the file, or tell in a message why that failed."""
    fault = fault_of(path, data)
    if fault:
        QMessageBox.warning(parent, "Not written", fault)
    return not fault
