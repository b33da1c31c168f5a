"""A document laid out on pages: each page a picture of plain shapes, as large as the sheet."""

from collections.abc import Iterator
from dataclasses import dataclass, field
from itertools import pairwise

from workbench.charts.shapes import Picture, Shape, moved
from workbench.report import sheet
from workbench.report.blocks import section_slabs
from workbench.report.document import Document
from workbench.report.edges import foot, foot_height, running_head, title_block
from workbench.report.slabs import Mark, Slab, settled

_FOOT_GAP = 14.0
_RUNNING_HEAD = 26.0


@dataclass(frozen=True)
class Page(Picture):
    """A page, with the sections that begin on it and how far down."""

    marks: tuple[tuple[Mark, float], ...] = ()


@dataclass
class _Body:
    """What is gathered for one page."""

    shapes: list[Shape] = field(default_factory=list)
    marks: list[tuple[Mark, float]] = field(default_factory=list)

    def put(self, slab: Slab, down: float) -> None:
        self.shapes += [moved(shape, sheet.SIDE, down) for shape in slab.shapes]
        if slab.mark is not None:
            self.marks.append((slab.mark, down))


@dataclass(frozen=True)
class _Room:
    """Where the text of a page may stand, from the top of the sheet."""

    top: float
    bottom: float

    @property
    def height(self) -> float:
        return self.bottom - self.top


def lay_out(document: Document) -> tuple[Page, ...]:
    """The pages of a document."""
    paper = sheet.sheet_of(document.paper)
    head, head_height = title_block(document, paper.column)
    bottom = paper.height - sheet.BOTTOM - foot_height(document, paper.column) - _FOOT_GAP
    first = _Room(sheet.TOP + head_height, bottom)
    later = _Room(sheet.TOP + _RUNNING_HEAD, bottom)
    bodies = list(_pages(document, paper.column, first, later))
    pages: list[Page] = []
    for number, body in enumerate(bodies, start=1):
        top = head if number == 1 else running_head(document, paper.column)
        shapes = [moved(shape, sheet.SIDE, sheet.TOP) for shape in top]
        shapes += body.shapes
        shapes += foot(document, paper, f"page {number} of {len(bodies)}")
        marks = [(Mark(document.kind), sheet.TOP)] if number == 1 else []
        size = (paper.width, paper.height)
        pages.append(Page(*size, tuple(shapes), marks=(*marks, *body.marks)))
    return tuple(pages)


def _pages(document: Document, column: float, first: _Room, later: _Room) -> Iterator[_Body]:
    """The body of each page, placed on the sheet."""
    room = first
    page = _Body()
    down = room.top
    for section in document.sections:
        slabs = settled(section_slabs(section, column, later.height), later.height)
        for place, slab in enumerate(slabs):
            forced = section.new_page and place == 0
            empty = down == room.top
            need = _needed(slabs[place:], later.height) + (0.0 if empty else slab.space)
            if not empty and (forced or down + need > room.bottom):
                yield page
                page, room, empty = _Body(), later, True
                down = room.top
                for header in slab.header:
                    page.put(header, down)
                    down += header.height
            down += 0.0 if empty else slab.space
            page.put(slab, down)
            down += slab.height
    yield page


def _needed(slabs: tuple[Slab, ...], tallest: float) -> float:
    """The height that the first slab needs together with what it must be kept with."""
    need = slabs[0].height
    for before, slab in pairwise(slabs):
        if not before.keep_next:
            break
        need += slab.space + slab.height
    repeated = sum(header.height for header in slabs[0].header)
    return need if need + repeated <= tallest else slabs[0].height
