"""Blocks in a column."""

from workbench.charts.shapes import Picture, Rect, Text
from workbench.report import sheet
from workbench.report.blocks import column_slabs, section_slabs
from workbench.report.document import (
    Block,
    Column,
    Figure,
    Section,
    SideBySide,
    Subheading,
    Table,
    YearLine,
    YearTable,
    plain,
)
from workbench.report.slabs import piled, stack_height

TABLE = Table((Column(""),), (("row",),))
PICTURE = Figure(Picture(100, 80, (Rect(0, 0, 100, 80, "ink"),)))


def test_blocks_have_space_between_them() -> None:
    slabs = column_slabs((plain("a"), plain("b"), PICTURE), 300, 600)
    assert [slab.space for slab in slabs] == [0, sheet.PARAGRAPH_SPACE, sheet.BLOCK_SPACE]
    assert slabs[2].height == 80


def test_columns_stand_side_by_side() -> None:
    block = SideBySide((plain("left"),), (PICTURE,), 0.5)
    (slab,) = column_slabs((block,), 324, 600)
    assert slab.height == 80
    rect = next(shape for shape in slab.shapes if isinstance(shape, Rect))
    assert rect.x == 150 + sheet.COLUMN_GAP


def test_columns_higher_than_a_page_stand_one_after_the_other() -> None:
    block = SideBySide((plain("left"),), (PICTURE,), 0.5)
    slabs = column_slabs((block,), 324, 79)
    assert len(slabs) == 2
    assert stack_height(slabs) > 80


def test_a_section_begins_with_its_heading() -> None:
    slabs = section_slabs(Section("Title", (plain("a"),)), 300, 600)
    assert slabs[0].space == sheet.SECTION_SPACE
    assert [s.text for s in piled(slabs) if isinstance(s, Text)] == ["Title", "a"]
    (bare,) = section_slabs(Section("", (plain("a"),)), 300, 600)
    assert bare.space == sheet.SECTION_SPACE


def test_a_section_may_be_kept_together() -> None:
    table = Table((Column(""),), tuple((letter,) for letter in "abcdef"))
    loose = section_slabs(Section("Title", (table,)), 300, 600)
    kept = section_slabs(Section("Title", (table,), together=True), 300, 600)
    assert [slab.prefer_next for slab in loose][-6:] == [True, False, False, False, True, False]
    assert [slab.prefer_next for slab in kept] == [True] * (len(kept) - 1) + [False]


def kept(*blocks: Block) -> list[bool]:
    return [slab.keep_next for slab in column_slabs(blocks, 300, 600)]


def test_a_line_under_a_picture_is_never_parted_from_it() -> None:
    (slab,) = column_slabs((Figure(PICTURE.picture, "What it shows. " * 12),), 300, 600)
    texts = [shape for shape in slab.shapes if isinstance(shape, Text)]
    assert len(texts) > 1
    assert all(80 < text.y <= slab.height for text in texts)
    assert {text.colour for text in texts} == {"muted"}


def test_a_title_within_a_section_stands_near_to_what_it_is_of() -> None:
    slabs = column_slabs((plain("a"), Subheading("Title"), TABLE), 300, 600)
    assert slabs[1].space == sheet.SUBHEADING_SPACE
    assert slabs[3].space == sheet.UNDER_SUBHEADING
    assert slabs[1].keep_next
    assert slabs[2].keep_next


def test_a_paragraph_that_introduces_a_table_stands_with_it() -> None:
    assert kept(plain("a"), TABLE)[0]
    assert kept(Subheading("Title"), plain("a"), TABLE)[2]
    assert not kept(plain("a"), plain("b"))[0]
    assert not kept(TABLE, plain("a"), TABLE)[1], "it belongs to the table above"


def test_tables_by_year_are_blocks_too() -> None:
    table = YearTable("year", ("1", "2"), (YearLine("Rent", ("5", "6")),))
    said = [s.text for s in piled(column_slabs((table,), 300, 600)) if isinstance(s, Text)]
    assert said == ["year", "1", "2", "Rent", "5", "6"]
