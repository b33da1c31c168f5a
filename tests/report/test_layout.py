"""Pages."""

from dataclasses import replace

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.report.deals import collisions, text_boxes
from workbench.charts.shapes import Picture, Text
from workbench.report.document import Column, Document, Paper, Section, Subheading, Table, plain
from workbench.report.layout import lay_out
from workbench.report.slabs import Mark

FOOT = "Arithmetic on assumptions, not market value."
DOCUMENT = Document(
    "Purchase memo", "Quarry Lane", "Emberford", "M. Tarn", "14 March 2026", FOOT, ()
)
PARAGRAPH = plain("The rents of the next few years can be checked against leases. " * 4)


def document(*sections: Section) -> Document:
    return replace(DOCUMENT, sections=sections)


def said(page: Picture) -> list[str]:
    return [shape.text for shape in page.shapes if isinstance(shape, Text)]


@pytest.mark.parametrize(("paper", "size"), [("a4", (595.28, 841.89)), ("letter", (612.0, 792.0))])
def test_pages_have_the_size_of_the_paper(paper: Paper, size: tuple[float, float]) -> None:
    (page,) = lay_out(replace(document(Section("One", (PARAGRAPH,))), paper=paper))
    assert (page.width, page.height) == size


def test_every_page_has_its_number_and_the_caution() -> None:
    pages = lay_out(document(Section("One", (PARAGRAPH,) * 60)))
    assert len(pages) > 2
    for number, page in enumerate(pages, start=1):
        assert f"page {number} of {len(pages)}" in said(page)
        assert FOOT in said(page)


def test_the_first_page_has_the_title_and_later_ones_a_running_head() -> None:
    first, second = lay_out(document(Section("", (PARAGRAPH,)), Section("Two", (PARAGRAPH,), True)))
    assert {"Purchase memo", "Quarry Lane", "Emberford", "14 March 2026"} <= set(said(first))
    assert {"Purchase memo · Quarry Lane", "14 March 2026"} <= set(said(second))
    assert "Two" in said(second)


def test_no_page_is_forced_open_before_the_first_section() -> None:
    assert len(lay_out(document(Section("One", (PARAGRAPH,), new_page=True)))) == 1


def test_a_document_without_a_subtitle_or_sections() -> None:
    (page,) = lay_out(replace(DOCUMENT, subtitle=""))
    assert "Quarry Lane" in said(page)


@pytest.mark.parametrize("filling", range(30, 48))
def test_a_heading_never_stands_last_on_a_page(filling: int) -> None:
    lines = tuple(plain("One line of text.") for _ in range(filling))
    pages = lay_out(document(Section("First", lines), Section("Heading", (PARAGRAPH,))))
    (page,) = [page for page in pages if "Heading" in said(page)]
    after = said(page)[said(page).index("Heading") + 1 :]
    assert sum("rents" in text or "leases" in text for text in after) >= 2


def test_a_section_kept_together_moves_as_a_whole() -> None:
    lines = tuple(plain("One line of text.") for _ in range(35))
    kept = Section("Kept", tuple(plain(f"kept {n}") for n in range(10)), together=True)
    pages = lay_out(document(Section("First", lines), kept))
    assert [sum("kept" in text for text in said(page)) for page in pages] == [0, 10]


def test_a_section_too_long_to_be_kept_together_breaks() -> None:
    kept = Section("Kept", tuple(plain(f"kept {n}") for n in range(100)), together=True)
    pages = lay_out(document(kept))
    assert len(pages) > 1
    assert sum("kept" in text for page in pages for text in said(page)) == 100


def test_the_header_of_a_table_is_repeated() -> None:
    rows = tuple((f"row {n}", str(n)) for n in range(100))
    table = Table((Column("What"), Column("How much", "right")), rows)
    pages = lay_out(document(Section("One", (table,))))
    assert len(pages) > 1
    assert all(said(page).count("How much") == 1 for page in pages)
    assert all(collisions(page) == [] for page in pages)
    assert sum("row" in text for page in pages for text in said(page)) == 100


def test_pages_know_where_sections_begin() -> None:
    sections = (
        Section("One", (Subheading("Within"), PARAGRAPH)),
        Section("Two", (PARAGRAPH,), True),
    )
    first, second = lay_out(document(*sections))
    assert [mark for mark, _ in first.marks] == [
        Mark("Purchase memo"), Mark("One"), Mark("Within", 1),
    ]  # fmt: skip
    assert [mark for mark, _ in second.marks] == [Mark("Two")]
    for page in (first, second):
        for mark, down in page.marks[-1:]:
            (text,) = (t for t in page.shapes if isinstance(t, Text) and t.text == mark.title)
            assert down < text.y < down + 25


@pytest.mark.parametrize("filling", range(20, 44, 3))
def test_what_is_too_long_to_be_kept_whole_begins_where_a_good_part_fits(filling: int) -> None:
    lines = tuple(plain("One line of text.") for _ in range(filling))
    rows = tuple((f"row {n}",) for n in range(60))
    table = Section("Long", (Table((Column("Header"),), rows, whole=True),))
    pages = lay_out(document(Section("First", lines), table))
    (page,) = [page for page in pages if "Long" in said(page)]
    after = said(page)[said(page).index("Long") + 1 :]
    assert sum("row" in text for text in after) >= 5


words = st.text(alphabet="ab cdefg W\n,.", max_size=400)
tables = st.lists(st.tuples(words, words), min_size=1, max_size=8).map(
    lambda rows: Table((Column("left"), Column("right", "right")), tuple(rows))
)
sections = st.builds(
    Section,
    st.sampled_from(["", "A heading", "A heading so long that it takes two lines " * 3]),
    st.lists(st.one_of(words.map(plain), tables), min_size=1, max_size=4).map(tuple),
    st.booleans(),
    st.booleans(),
)


@settings(max_examples=60, deadline=None)
@given(st.lists(sections, max_size=5), words, words)
def test_nothing_overlaps_or_leaves_the_sheet(
    made: list[Section], title: str, subtitle: str
) -> None:
    whole = replace(DOCUMENT, title=title, subtitle=subtitle, sections=tuple(made))
    for page in lay_out(whole):
        assert collisions(page) == []
        for left, top, right, bottom, text in text_boxes(page):
            assert left >= 51, text
            assert right <= page.width - 51, text
            assert top >= 30, text
            assert bottom <= page.height - 30, text
