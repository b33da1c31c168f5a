"""What the preview of the memo asks of its thread: the file, its pages, a page as an image."""

from dataclasses import dataclass
from pathlib import Path
from threading import Event

from PySide6.QtGui import QImage

from workbench.engine.result import Result
from workbench.text.locale import Locale, Paper
from workbench.ui.saving import fault_of


@dataclass(frozen=True)
class Made:
    """A finished memo: the file, width and height of each page, what its letters lack."""

    pdf: bytes
    sizes: tuple[tuple[float, float], ...]
    lacking: tuple[str, ...]


@dataclass(frozen=True)
class Memo:
    """Makes the memo of a deal's figures; None where that was called off."""

    result: Result
    locale: Locale
    paper: Paper | None

    def __call__(self, cancel: Event) -> Made | None:
        from pypdfium2 import PdfDocument

        from workbench.report.memo import build
        from workbench.report.pdf import draw

        document = None if cancel.is_set() else build(self.result, self.locale, self.paper)
        if document is None or cancel.is_set():
            return None
        drawn = draw(document)
        with PdfDocument(drawn.pdf) as pages:
            sizes = tuple(pages.get_page_size(number) for number in range(len(pages)))
        return Made(drawn.pdf, sizes, drawn.lacking)


@dataclass(frozen=True)
class Page:
    """Renders one page so many dots wide; None where that was called off."""

    pdf: bytes
    number: int
    width: int

    def __call__(self, cancel: Event) -> QImage | None:
        from pypdfium2 import PdfDocument

        if cancel.is_set():
            return None
        with PdfDocument(self.pdf) as pages:
            page = pages[self.number]
            bitmap = page.render(scale=self.width / page.get_width())
            shape = (bitmap.width, bitmap.height, bitmap.stride)
            return QImage(bytes(bitmap.buffer), *shape, QImage.Format.Format_BGR888).copy()


@dataclass(frozen=True)
class Writing:
    """Writes the file; why that failed, or an empty text."""

    path: Path
    pdf: bytes

    def __call__(self, cancel: Event) -> str:
        return fault_of(self.path, self.pdf)
