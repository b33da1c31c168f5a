"""Makes the PDF of a document."""

import unicodedata
from dataclasses import dataclass
from io import BytesIO

from reportlab.pdfgen.canvas import Canvas

from workbench.charts.lettering import lacking
from workbench.report.document import Document, texts
from workbench.report.layout import lay_out
from workbench.report.painter import paint, register_fonts

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
    canvas = Canvas(
        target, initialFontName="Lato-Regular", invariant=1, pageCompression=1, lang="en"
    )
    canvas.setTitle(_property(f"{document.kind}: {document.title}"))
    canvas.setAuthor(_property(document.author))
    canvas.setSubject(_property(document.foot))
    canvas.setCreator("Groundcourse")
    canvas.setProducer("Groundcourse")
    for page in pages:
        canvas.setPageSize((page.width, page.height))
        paint(canvas, page)
        canvas.showPage()
    canvas.save()
    return Drawn(target.getvalue(), lacking("".join(texts(document))))


def _property(text: str) -> str:
    """Text for the file's properties: nothing but characters, and not the whole of a long text."""
    shown = "".join(" " if c.isspace() else c for c in text)
    shown = "".join(c for c in shown if unicodedata.category(c) not in {"Cc", "Cs"})
    return shown[:_LONGEST_PROPERTY]
