"""Shapes painted with Qt: looked at dot by dot, and held against the same shapes on paper."""

import subprocess
import sys
from io import BytesIO
from threading import Event
from xml.etree import ElementTree

import pytest
from PySide6.QtCore import QByteArray
from PySide6.QtGui import QGuiApplication, QImage, QPainter
from PySide6.QtSvg import QSvgRenderer
from PySide6.QtWidgets import QApplication
from reportlab.pdfgen.canvas import Canvas

from workbench.charts.lettering import Weight
from workbench.charts.palette import DARK, PRINT
from workbench.charts.shapes import Anchor, Line, Picture, Polyline, Rect, Shape, Text
from workbench.report.painter import paint
from workbench.ui.memo_work import Page
from workbench.ui.painter import copy_picture, to_image, to_png, to_svg

SCALE = 4


def painted(*shapes: Shape) -> QImage:
    return to_image(Picture(100, 50, shapes), PRINT, SCALE)


def on_paper(*shapes: Shape) -> QImage:
    """The same shapes as the PDF has them."""
    target = BytesIO()
    canvas = Canvas(target, pagesize=(100, 50), invariant=1)
    paint(canvas, Picture(100, 50, shapes))
    canvas.save()
    image = Page(target.getvalue(), 0, 100 * SCALE)(Event())
    assert image is not None
    return image


def from_svg(*shapes: Shape) -> QImage:
    data = to_svg(Picture(100, 50, shapes))
    image = QImage(100 * SCALE, 50 * SCALE, QImage.Format.Format_RGB32)
    image.fill(0)
    with QPainter(image) as painter:
        QSvgRenderer(QByteArray(data)).render(painter)
    return image


def tone(image: QImage, x: float, y: float) -> str:
    return image.pixelColor(int(SCALE * x), int(SCALE * y)).name().upper()


def inked(image: QImage) -> tuple[int, int, int, int]:
    """Left, top, right and bottom of what is dark, in dots."""
    dark = [
        (x, y)
        for y in range(image.height())
        for x in range(image.width())
        if image.pixelColor(x, y).red() < 128
    ]
    across, down = [x for x, _ in dark], [y for _, y in dark]
    return min(across), min(down), max(across), max(down)


def test_a_rectangle_is_filled_and_outlined_where_it_is_measured(qapp: QApplication) -> None:
    image = painted(Rect(10, 5, 30, 10, "exit"), Rect(60, 5, 30, 30, stroke="ink", stroke_width=2))
    assert (image.width(), image.height()) == (400, 200)
    assert {tone(image, x, y) for x, y in ((10.3, 5.3), (39.6, 14.6))} == {PRINT["exit"]}
    assert {tone(image, x, y) for x, y in ((9.5, 7), (40.5, 7), (12, 4.5), (12, 15.5))} == {
        PRINT["paper"]
    }
    assert (tone(image, 60, 20), tone(image, 75, 20)) == (PRINT["ink"], PRINT["paper"])


def test_a_hatch_stays_within_its_area_and_goes_on_next_door(qapp: QApplication) -> None:
    image = painted(Rect(10, 10, 30, 30, hatch="ink"))
    inside = [tone(image, x, 25) for x in range(11, 40)]
    assert PRINT["paper"] in inside and len(set(inside)) > 1
    outside = {tone(image, x, y) for x in range(100) for y in (2, 8, 42)}
    assert outside == {PRINT["paper"]}
    whole, halves = (
        painted(Rect(10, 10, 30, 30, hatch="ink")),
        painted(Rect(10, 10, 30, 13, hatch="ink"), Rect(10, 23, 30, 17, hatch="ink")),
    )
    row = [tone(whole, x / 4, 35) for x in range(40, 160)]
    assert [tone(halves, x / 4, 35) for x in range(40, 160)] == row


def test_the_hatch_rises_to_the_right(qapp: QApplication) -> None:
    image = painted(Rect(0, 0, 50, 50, hatch="ink"))
    at = {x for x in range(100) if image.pixelColor(x, 100).red() < 160}
    higher = {x for x in range(100) if image.pixelColor(x, 96).red() < 160}
    assert at and {x + 4 for x in at if x < 90} == {x for x in higher if 4 <= x < 94}


def test_lines_have_flat_ends_and_dashes_only_where_asked(qapp: QApplication) -> None:
    image = painted(Line(0, 10, 90, 10, "price", 4, (10, 10)), Line(10, 30, 90, 30, "ink", 4))
    assert tone(image, 9.5, 10) == PRINT["price"]
    assert {tone(image, x, 10) for x in (10.5, 19.5)} == {PRINT["paper"]}
    assert {tone(image, x, 30) for x in range(10, 90)} == {PRINT["ink"]}
    assert {tone(image, x, 30) for x in (9.5, 90.5)} == {PRINT["paper"]}


def test_polylines_open_and_filled(qapp: QApplication) -> None:
    corners = ((10.0, 10.0), (50.0, 10.0), (50.0, 40.0))
    opened, filled = (
        painted(Polyline(corners, "ink", 2)),
        painted(Polyline(corners, "ink", 2, "expected")),
    )
    assert (tone(opened, 30, 10), tone(opened, 45, 20)) == (PRINT["ink"], PRINT["paper"])
    assert tone(filled, 45, 20) == PRINT["expected"]


@pytest.mark.parametrize("anchor", ["start", "middle", "end"])
@pytest.mark.parametrize("weight", ["regular", "bold", "italic"])
@pytest.mark.parametrize("size", [7.6, 10.12, 11.0])
def test_text_stands_where_it_stands_on_paper(
    qapp: QApplication, anchor: Anchor, weight: Weight, size: float
) -> None:
    text = Text(50, 30.3, "AVHEx 1,85%", size, anchor, weight)
    wanted = inked(on_paper(text))
    assert inked(painted(text)) == pytest.approx(wanted, abs=1)
    assert inked(from_svg(text)) == pytest.approx(wanted, abs=1)


def test_what_the_letters_lack_is_a_mark(qapp: QApplication) -> None:
    assert painted(Text(5, 20, "a日\nb", 9)) == painted(Text(5, 20, "a□ b", 9))
    assert painted(Text(5, 20, "a日b", 9)) != painted(Text(5, 20, "ab", 9))


def test_every_kind_of_shape_lies_in_the_svg_as_on_paper(qapp: QApplication) -> None:
    shapes = (
        Rect(5, 5, 20, 20, "exit", stroke="ink"),
        Line(30, 5, 60, 25, "price", 2, (4, 2)),
        Polyline(((65.0, 5.0), (90.0, 5.0), (90.0, 30.0)), "debt", 1, "income"),
    )
    image, other = painted(*shapes), from_svg(*shapes)
    places = [(x, y) for x in range(2, 100, 3) for y in range(2, 50, 3)]
    far = [p for p in places if tone(image, *p) != tone(other, *p)]
    assert len(far) <= len(places) // 50


def test_files_carry_the_picture_in_words(qapp: QApplication) -> None:
    picture = Picture(60, 40, (Text(5, 20, "exit", 9),), words="Value wall. Exit 2,000.")
    png = QImage.fromData(QByteArray(to_png(picture)))
    assert (png.width(), png.height()) == (180, 120)
    assert png.text("Description") == "Value wall. Exit 2,000."
    svg = ElementTree.fromstring(to_svg(picture))
    space = "{http://www.w3.org/2000/svg}"
    assert svg.findtext(f"{space}title") == "Value wall"
    assert svg.findtext(f"{space}desc") == "Value wall. Exit 2,000."
    assert svg.get("viewBox") == "0 0 60 40"
    assert svg.find(f".//{space}text") is None, "letters need a font where the file is read"


def test_other_tones(qapp: QApplication) -> None:
    assert tone(to_image(Picture(10, 10, ()), DARK, SCALE), 5, 5) == DARK["paper"]


def test_a_copy_can_be_pasted(qapp: QApplication) -> None:
    copy_picture(Picture(60, 40, (Rect(0, 0, 60, 40, "exit"),)))
    image = QGuiApplication.clipboard().image()
    assert (image.width(), image.height()) == (180, 120)
    assert image.pixelColor(90, 60).name().upper() == PRINT["exit"]


COPY = """
from PySide6.QtWidgets import QApplication
from workbench.charts.shapes import Picture
from workbench.ui.painter import copy_picture
application = QApplication([])
copy_picture(Picture(60, 40, ()))
"""


def test_a_program_ends_in_peace_with_a_copy_on_the_clipboard() -> None:
    done = subprocess.run([sys.executable, "-c", COPY], capture_output=True, check=False)
    assert (done.returncode, done.stderr) == (0, b"")
