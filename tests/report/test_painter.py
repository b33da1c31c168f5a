"""Shapes on a page of a PDF: what is painted is looked at dot by dot."""

from io import BytesIO

import pypdfium2
import pytest
from reportlab.pdfgen.canvas import Canvas

from tests.report.deals import pages_of
from workbench.charts.palette import PRINT
from workbench.charts.shapes import Anchor, Line, Picture, Polyline, Rect, Shape, Text
from workbench.report.painter import paint


def painted(*shapes: Shape) -> bytes:
    target = BytesIO()
    canvas = Canvas(target, pagesize=(100, 50), invariant=1)
    paint(canvas, Picture(100, 50, shapes))
    canvas.save()
    return target.getvalue()


def dots(*shapes: Shape) -> "pypdfium2.PdfBitmap":
    return pypdfium2.PdfDocument(painted(*shapes))[0].render(scale=2).to_pil().convert("RGB")


def hex_at(image: "pypdfium2.PdfBitmap", x: float, y: float) -> str:
    red, green, blue = image.getpixel((int(2 * x), int(2 * y)))
    return f"#{red:02X}{green:02X}{blue:02X}"


def test_a_rectangle_lies_where_it_is_measured_from_the_top() -> None:
    image = dots(Rect(10, 5, 30, 10, "exit"))
    assert hex_at(image, 12, 7) == PRINT["exit"]
    assert hex_at(image, 38, 13) == PRINT["exit"]
    assert {hex_at(image, x, y) for x, y in ((8, 7), (42, 7), (12, 3), (12, 17))} == {"#FFFFFF"}


def test_an_outline_and_a_hatch_leave_gaps() -> None:
    outline = dots(Rect(10, 10, 30, 30, stroke="ink", stroke_width=2))
    assert hex_at(outline, 10, 25) == PRINT["ink"]
    assert hex_at(outline, 25, 25) == "#FFFFFF"
    hatch = dots(Rect(10, 10, 30, 30, hatch="ink"))
    inside = {hex_at(hatch, x / 2, 25) for x in range(22, 78)}
    assert "#FFFFFF" in inside
    assert len(inside) > 1
    outside = {hex_at(hatch, x, y) for x in range(100) for y in (2, 5, 45)}
    assert outside == {"#FFFFFF"}


def test_lines_are_dashed_only_where_asked() -> None:
    image = dots(Line(0, 10, 100, 10, "price", 2, (10, 10)), Line(0, 30, 100, 30, "ink", 2))
    assert hex_at(image, 5, 10) == PRINT["price"]
    assert hex_at(image, 15, 10) == "#FFFFFF"
    assert {hex_at(image, x, 30) for x in range(100)} == {PRINT["ink"]}


def test_polylines_open_and_filled() -> None:
    corners = ((10.0, 10.0), (50.0, 10.0), (50.0, 40.0))
    opened = dots(Polyline(corners, "ink", 2))
    assert hex_at(opened, 30, 10) == PRINT["ink"]
    assert hex_at(opened, 30, 25) == "#FFFFFF"
    filled = dots(Polyline(corners, "ink", 2, "expected"))
    assert hex_at(filled, 45, 20) == PRINT["expected"]


@pytest.mark.parametrize(
    ("anchor", "first", "last"), [("start", 50, 62), ("middle", 44, 56), ("end", 38, 50)]
)
def test_text_hangs_on_its_anchor(anchor: Anchor, first: int, last: int) -> None:
    image = dots(Text(50, 30, "□", 20, anchor))
    inked = [x / 2 for x in range(200) if any(image.getpixel((x, y))[0] < 99 for y in range(100))]
    assert first - 1 <= min(inked)
    assert max(inked) <= last + 1


def test_text_that_the_font_lacks_is_painted_as_a_mark() -> None:
    assert pages_of(painted(Text(5, 20, "a日\nb", 9))) == ["a□ b"]
