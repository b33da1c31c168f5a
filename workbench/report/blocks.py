"""Every kind of block, cut into slabs for a column of some width."""

from dataclasses import replace

from workbench.charts.wrapping import Run
from workbench.report import sheet
from workbench.report.document import (
    Block,
    Figure,
    KeyFigures,
    Paragraph,
    Section,
    SideBySide,
    Subheading,
    Table,
    YearTable,
)
from workbench.report.key_figure_slabs import key_figure_slabs
from workbench.report.slabs import (
    Slab,
    heading_slabs,
    piled,
    stack_height,
    subheading_slabs,
    text_slabs,
)
from workbench.report.tables import table_slabs
from workbench.report.year_tables import year_table_slabs


def section_slabs(section: Section, room: float, tallest: float) -> tuple[Slab, ...]:
    """A section with its heading; `tallest` is what fits a page."""
    slabs = list(heading_slabs(section.title, room)) if section.title else []
    slabs += column_slabs(section.blocks, room, tallest)
    slabs[0] = replace(slabs[0], space=sheet.SECTION_SPACE)
    if section.together:
        slabs[:-1] = [replace(slab, prefer_next=True) for slab in slabs[:-1]]
    return tuple(slabs)


def column_slabs(blocks: tuple[Block, ...], room: float, tallest: float) -> tuple[Slab, ...]:
    """Blocks one under the other."""
    slabs: list[Slab] = []
    before: Block | None = None
    for block, following in zip(blocks, (*blocks[1:], None), strict=True):
        first, *others = _block_slabs(block, room, tallest)
        cut = [replace(first, space=_above(block, before)), *others]
        if _leads_on(before, block, following):
            cut[-1] = replace(cut[-1], keep_next=True)
        slabs += cut
        before = block
    return tuple(slabs)


def _above(block: Block, before: Block | None) -> float:
    """The space over a block; a title within a section stands near to what follows it."""
    if before is None:
        return 0.0
    if isinstance(before, Subheading):
        return sheet.UNDER_SUBHEADING
    if isinstance(block, Paragraph):
        return sheet.PARAGRAPH_SPACE
    return sheet.SUBHEADING_SPACE if isinstance(block, Subheading) else sheet.BLOCK_SPACE


def _leads_on(before: Block | None, block: Block, following: Block | None) -> bool:
    """Whether a paragraph does no more than introduce the table or picture after it."""
    opens = before is None or isinstance(before, Subheading)
    alone = following is None or isinstance(following, Paragraph)
    return isinstance(block, Paragraph) and opens and not alone


def _block_slabs(block: Block, room: float, tallest: float) -> tuple[Slab, ...]:
    if isinstance(block, Paragraph):
        return text_slabs(block.runs, sheet.LOOKS[block.look], room)
    if isinstance(block, KeyFigures):
        return key_figure_slabs(block, room)
    if isinstance(block, Table):
        return table_slabs(block, room)
    if isinstance(block, YearTable):
        return year_table_slabs(block, room)
    if isinstance(block, Subheading):
        return subheading_slabs(block.text, room)
    if isinstance(block, Figure):
        return (_figure(block, room),)
    return _side_by_side(block, room, tallest)


def _figure(figure: Figure, room: float) -> Slab:
    """The picture with its line under it, in one piece."""
    picture = Slab(figure.picture.height, figure.picture.shapes)
    if not figure.caption:
        return picture
    under = text_slabs((Run(figure.caption),), sheet.NOTE, room, "muted")
    whole = (picture, replace(under[0], space=3.0), *under[1:])
    return Slab(stack_height(whole), piled(whole))


def _side_by_side(block: SideBySide, room: float, tallest: float) -> tuple[Slab, ...]:
    """Two columns as one slab, or one after the other where they are higher than a page."""
    left_room, right_room = sheet.columns(room, block.share)
    left = column_slabs(block.left, left_room, tallest)
    right = column_slabs(block.right, right_room, tallest)
    high = max(stack_height(left), stack_height(right))
    if high > tallest:
        return column_slabs((*block.left, *block.right), room, tallest)
    beside = piled(right, left_room + sheet.COLUMN_GAP)
    return (Slab(high, (*piled(left), *beside)),)
