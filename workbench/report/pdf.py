"""Makes the PDF of a document."""

import datetime
import unicodedata
from dataclasses import dataclass
from io import BytesIO

from reportlab.pdfgen.canvas import Canvas

from workbench.charts.lettering import lacking
from workbench.report.document import Document, texts
from workbench.report.layout import Page, lay_out
from workbench.report.painter import FIRST_FONT, paint, register_fonts

_LONGEST_PROPERTY = 300


@dataclass(frozen=True)
class Drawn:
    """A finished file, and the characters of its text that the font lacks and a mark replaces."""

    pdf: bytes
    lacking: tuple[str, ...]


def draw(document: Document) -> Drawn:
    """The PDF of a document; the same document always gives the same bytes."""
    pages = lay_out(document)
    target = BytesIO()
    register_fonts()
    canvas = Canvas(target, initialFontName=FIRST_FONT, invariant=1, pageCompression=1, lang="en")
    _describe(canvas, document)
    for number, page in enumerate(pages, start=1):
        canvas.setPageSize((page.width, page.height))
        paint(canvas, page)
        _mark(canvas, page, number)
        canvas.showPage()
    canvas.showOutline()
    canvas.save()
    return Drawn(target.getvalue(), lacking("".join(texts(document))))


def _describe(canvas: Canvas, document: Document) -> None:
    """The file's properties; viewers show the title in place of the file's name."""
    canvas.setTitle(_property(f"{document.kind}: {document.title}"))
    canvas.setAuthor(_property(document.author))
    canvas.setSubject(_property(document.foot))
    canvas.setCreator("Groundcourse")
    canvas.setProducer("Groundcourse")
    canvas.setViewerPreference("DisplayDocTitle", "true")
    if document.made_on is not None:
        stamp = _stamp(document.made_on)
        canvas.setDateFormatter(lambda *_: stamp)


def _stamp(day: datetime.date) -> str:
    """A day as the date of a PDF, at noon so that no zone moves it to another day."""
    return f"D:{day.year:04}{day.month:02}{day.day:02}120000+00'00'"


def _mark(canvas: Canvas, page: Page, number: int) -> None:
    """Entries of the outline that lead to the headings of a page."""
    for place, (mark, down) in enumerate(page.marks):
        key = f"page{number}.{place}"
        canvas.bookmarkPage(key, fit="XYZ", left=0, top=page.height - down, zoom=0)
        canvas.addOutlineEntry(_property(mark.title), key, mark.level)


def _property(text: str) -> str:
    """Text for the file's properties: nothing but characters, and not the whole of a long text."""
    shown = "".join(" " if c.isspace() else c for c in text)
    shown = "".join(c for c in shown if unicodedata.category(c) not in {"Cc", "Cs"})
    return shown[:_LONGEST_PROPERTY]
