"""Every session lives in an application."""

import pytest
from PySide6.QtWidgets import QApplication


@pytest.fixture(autouse=True)
def application(qapp: QApplication) -> QApplication:
    return qapp
