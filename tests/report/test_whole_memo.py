"""The whole memo of every kind of deal: nothing lost, nothing overlaps, all of it can be found."""

from collections.abc import Iterator
from functools import cache
from io import BytesIO
from itertools import product
from random import Random
from typing import Any

import pytest
from pypdf import PdfReader
from pypdf.generic import Destination

from tests.oracle.deals import random_deal
from tests.report.deals import LONG, collisions, pages_of, text_boxes
from tests.report.wholes import document_of, greek_raw, result_of, wholes
from workbench.charts.shapes import Line, Polyline, Rect
from workbench.deal.deal import Deal
from workbench.engine.figures import NOT_YET, STATEMENT
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.files.deal_file import deal_from_raw
from workbench.report.document import Document, Paper, SideBySide, Table, YearTable
from workbench.report.layout import Page, lay_out
from workbench.report.memo import build
from workbench.report.pdf import draw
from workbench.report.record import record
from workbench.text.locale import LOCALES

NAMES = (*sorted(wholes()),)
PAPERS: tuple[Paper, ...] = ("a4", "letter")
SECTIONS = (
    "What value and price rest on",
    "The figures behind it",
    "Sources and uses at closing",
    "The tiers, year by year",
    "Assumptions",
    "Evidence",
    "Rent roll",
    "Statement by year",
    "How the exit was derived",
    "Loans by year",
    "Measures and what they mean",
    "Reported statements",
    "Comparables",
    "Cautions",
)


@cache
def sheets(name: str, paper: Paper) -> tuple[Page, ...]:
    return lay_out(document_of(name, paper))


@cache
def pdf_of(name: str) -> bytes:
    return draw(document_of(name)).pdf


@cache
def said(name: str) -> tuple[str, ...]:
    return tuple(pages_of(pdf_of(name)))


def whole(name: str) -> str:
    return " ".join(said(name))


def check_sheet(page: Page) -> None:
    """No two texts overlap, and nothing leaves the sheet."""
    assert collisions(page) == []
    for left, top, right, bottom, text in text_boxes(page):
        assert left >= 51.9, text
        assert right <= page.width - 51.9, text
        assert top >= 30, text
        assert bottom <= page.height - 30, text
    for x, y in points(page):
        assert 0 <= x <= page.width
        assert 0 <= y <= page.height


def points(page: Page) -> Iterator[tuple[float, float]]:
    for shape in page.shapes:
        if isinstance(shape, Rect):
            yield shape.x, shape.y
            yield shape.x + shape.width, shape.y + shape.height
        elif isinstance(shape, Line):
            yield shape.x1, shape.y1
            yield shape.x2, shape.y2
        elif isinstance(shape, Polyline):
            yield from shape.points


@pytest.mark.parametrize(("name", "paper"), [*product(NAMES, PAPERS)])
def test_nothing_overlaps_or_leaves_the_sheet(name: str, paper: Paper) -> None:
    for page in sheets(name, paper):
        check_sheet(page)


@pytest.mark.parametrize("seed", range(24))
def test_random_deals_lay_out_as_well(seed: int) -> None:
    result = evaluate(compile_deal(deal_from_raw(random_deal(Random(seed)))))
    locale = LOCALES[sorted(LOCALES)[seed % len(LOCALES)]]
    for page in lay_out(build(result, locale)):
        check_sheet(page)


def with_long_texts(raw: Any) -> Any:
    """The same with a long text wherever there was one."""
    if isinstance(raw, dict):
        return {
            key: LONG if key in _TEXTS and isinstance(value, str) else with_long_texts(value)
            for key, value in raw.items()
        }
    return [with_long_texts(item) for item in raw] if isinstance(raw, list) else raw


_TEXTS = frozenset(
    {
        "name", "use", "tenant", "label", "reason", "source", "place", "noi_basis", "purpose",
        "intended_users", "prepared_by", "interest", "description", "notes",
    }
)  # fmt: skip


@pytest.mark.parametrize("paper", PAPERS)
def test_long_texts_lay_out_as_well(paper: Paper) -> None:
    deal = deal_from_raw(with_long_texts(greek_raw()))
    pages = lay_out(build(evaluate(compile_deal(deal)), LOCALES["el-GR"], paper))
    for page in pages:
        check_sheet(page)


@pytest.mark.parametrize("name", NAMES)
class TestEveryMemo:
    def test_each_page_has_its_number_and_the_caution(self, name: str) -> None:
        for number, text in enumerate(said(name), start=1):
            assert f"page {number} of {len(said(name))}" in text
            assert "Cautions in full on the last page." in text

    def test_bookmarks_lead_to_the_pages_of_their_headings(self, name: str) -> None:
        reader = PdfReader(BytesIO(pdf_of(name)))
        found = list(bookmarks(reader.outline))
        for mark in found:
            number = reader.get_destination_page_number(mark)
            assert number is not None
            title = " ".join(str(mark.title).split())
            assert title in said(name)[number]
        titles = [str(mark.title) for mark in found]
        sections = [section.title for section in document_of(name).sections if section.title]
        assert [title for title in titles if title in sections] == sections

    def test_market_value_is_only_ever_denied(self, name: str) -> None:
        text = whole(name).lower()
        place = text.find("market value")
        while place >= 0:
            assert "not " in text[max(0, place - 50) : place]
            place = text.find("market value", place + 1)

    def test_every_figure_of_the_statement_stands_in_the_text(self, name: str) -> None:
        figures = record(result_of(name))
        shown = {cell for table in year_tables(document_of(name)) for cell in cells_of(table)}
        for key in STATEMENT:
            for value in figures["statement"][key] if key not in NOT_YET else ():
                assert value is not None
                assert any(as_shown(value, by) in shown for by in (1, 1e3, 1e6)), (key, value)

    def test_sources_equal_uses_in_print(self, name: str) -> None:
        sources, uses = closing_tables(document_of(name))
        assert sources.rows[-1] == uses.rows[-1]
        assert " ".join(sources.rows[-1][1].split()) in whole(name)

    def test_measures_have_definitions(self, name: str) -> None:
        declared = result_of(name).declared
        for key in ("irr_unlevered", "margin", "payback", "expense_ratio"):
            words = declared[key].definition
            assert f"{words[0].upper()}{words[1:]}." in whole(name)


def bookmarks(outline: Any) -> Iterator[Destination]:
    for item in outline:
        if isinstance(item, list):
            yield from bookmarks(item)
        else:
            yield item


def year_tables(document: Document) -> Iterator[YearTable]:
    for section in document.sections:
        yield from (block for block in section.blocks if isinstance(block, YearTable))


def closing_tables(document: Document) -> tuple[Table, Table]:
    (section,) = (one for one in document.sections if one.title == "Sources and uses at closing")
    (both,) = section.blocks
    assert isinstance(both, SideBySide)
    (left,), (right,) = both.left, both.right
    assert isinstance(left, Table)
    assert isinstance(right, Table)
    return left, right


def cells_of(table: YearTable) -> Iterator[str]:
    for line in table.lines:
        yield from map(plain_text, line.cells)


def plain_text(text: str) -> str:
    """Digits and signs without the marks that group thousands."""
    for mark in (",", ".", "\u00a0", "\u202f"):
        text = text.replace(f"{mark}", "")
    return text


def as_shown(value: float, by: float) -> str:
    """Half away from zero, as every figure is rounded."""
    shown = int(abs(value) / by + 0.5)
    return f"−{shown}" if value < 0 and shown else str(shown)


@pytest.mark.parametrize(
    "name", ["weidenufer-parade", "quillon-court-flats", "ostrey-warehouse", "fullest"]
)
def test_every_section_is_there_in_order(name: str) -> None:
    titles = [section.title for section in document_of(name).sections]
    assert [title for title in titles if title in SECTIONS] == list(SECTIONS)


def test_sections_without_content_are_left_out() -> None:
    titles = {section.title for section in document_of("small").sections}
    assert titles.isdisjoint({"Loans by year", "Reported statements", "Comparables"})
    assert "Rent roll" not in {section.title for section in document_of("empty").sections}


def test_a_deal_of_nothing_says_so_and_does_not_fail() -> None:
    assert "The hold is not known, so there are no years to show." in whole("empty")
    assert "The hold is not known, so there is no sale." in whole("empty")


def test_headers_repeat_on_each_page_of_a_long_table() -> None:
    roll = [texts for texts in map(texts_of, sheets("long", "a4")) if "name withheld" in texts]
    assert len(roll) > 8
    assert all({"Space", "Tenant", "Start", "End"} <= texts for texts in roll)
    years = [texts for texts in map(texts_of, sheets("long", "a4")) if "Debt service" in texts]
    assert len(years) >= 3
    assert all({"USD thousand, year to", "USD, year to"} & texts for texts in years)


def texts_of(page: Page) -> set[str]:
    return {text for *_, text in text_boxes(page)}


def test_no_row_is_lost_in_a_long_roll() -> None:
    text = whole("long")
    for number in range(1, 301):
        assert f"Door {number}, " in text


def test_no_heading_stands_last_on_a_page() -> None:
    for name, paper in product(NAMES, PAPERS):
        for page in sheets(name, paper):
            lowest = max(bottom for *_, bottom, _ in body(page))
            for _, down in page.marks:
                assert lowest > down + 25


def body(page: Page) -> list[tuple[float, float, float, float, str]]:
    return [box for box in text_boxes(page) if box[3] < page.height - 60]


def test_the_name_of_a_residential_tenant_is_nowhere_in_the_file() -> None:
    assert "Six households" not in whole("fullest")
    assert "name withheld" in whole("fullest")
    assert "Sailmaker" in whole("fullest")
    for page in PdfReader(BytesIO(pdf_of("fullest"))).pages:
        assert "Six households" not in page.extract_text()


def test_the_file_has_the_date_of_the_deal_in_its_properties() -> None:
    metadata = PdfReader(BytesIO(pdf_of("fullest"))).metadata
    assert metadata is not None
    assert metadata.creation_date is not None
    assert metadata.creation_date.date() == wholes()["fullest"].about.prepared_on


def test_the_mark_of_missing_letters_stays_explained() -> None:
    deal = deal_from_raw(greek_raw() | {"property": {"name": "日本"}})
    assert isinstance(deal, Deal)
    document = build(evaluate(compile_deal(deal)), LOCALES["el-GR"])
    assert "□ stands for a character" in " ".join(pages_of(draw(document).pdf)[-1:])
