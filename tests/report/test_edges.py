"""Title, running head and foot."""

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Shape, Text
from workbench.report import sheet
from workbench.report.document import Document
from workbench.report.edges import foot, foot_height, running_head, title_block

ROOM = 400.0
PLAIN = Document("Purchase memo", "Quarry\nLane", "Emberford", "M. Tarn", "14 March 2026", "F", ())
LONG = Document("Purchase memo", "Quarry " * 90, "Ember " * 90, "", "a date", "Caution. " * 60, ())


def texts(shapes: list[Shape]) -> list[Text]:
    return [shape for shape in shapes if isinstance(shape, Text)]


def test_the_title_is_cut_after_two_lines_and_fits() -> None:
    shapes, tall = title_block(LONG, ROOM)
    title = [text for text in texts(shapes) if text.size == sheet.TITLE]
    assert len(title) == 2
    assert title[1].text.endswith("…")
    assert all(width(text.text, text.size, text.weight) <= ROOM for text in title)
    assert tall > max(text.y for text in texts(shapes))


def test_a_document_without_a_subtitle_has_a_lower_title() -> None:
    bare = Document("Memo", "Title", "", "", "", "F", ())
    assert title_block(bare, ROOM)[1] < title_block(PLAIN, ROOM)[1]


def test_later_pages_begin_with_the_title_on_one_line() -> None:
    left, right, rule = running_head(PLAIN, ROOM)
    assert isinstance(left, Text)
    assert left.text == "Purchase memo · Quarry Lane"
    assert isinstance(right, Text)
    assert (right.text, right.x, right.anchor) == ("14 March 2026", ROOM, "end")
    assert isinstance(rule, Line)
    assert texts(running_head(LONG, ROOM))[0].text.endswith("…")


def test_the_foot_holds_the_whole_caution_and_the_number() -> None:
    paper = sheet.sheet_of("a4")
    shapes = texts(foot(LONG, paper, "page 3 of 9"))
    *lines, number = shapes
    assert " ".join(text.text for text in lines) == ("Caution. " * 60).strip()
    assert number.text == "page 3 of 9"
    assert number.y == lines[0].y
    assert max(text.y for text in shapes) <= paper.height - sheet.BOTTOM
    assert foot_height(LONG, paper.column) > foot_height(PLAIN, paper.column)
