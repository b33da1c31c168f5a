"""Blocks in a column."""

from workbench.charts.shapes import Picture, Rect, Text
from workbench.report import sheet
from workbench.report.blocks import column_slabs, section_slabs
from workbench.report.document import Column, Figure, Section, SideBySide, Table, plain
from workbench.report.slabs import piled, stack_height

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
    table = Table((Column(""),), (("a",), ("b",), ("c",)))
    loose = section_slabs(Section("Title", (table,)), 300, 600)
    kept = section_slabs(Section("Title", (table,), together=True), 300, 600)
    assert [slab.keep_next for slab in loose][-3:] == [False, False, False]
    assert [slab.keep_next for slab in kept] == [True] * (len(kept) - 1) + [False]
