"""Slabs: the pieces that pages are built of and that never break themselves."""

from dataclasses import dataclass, replace

from workbench.charts.lettering import CAP_HEIGHT, printable
from workbench.charts.shapes import Line, Role, Shape, Text, moved
from workbench.charts.wrapping import Run, TextLine, length, wrap_runs
from workbench.report import sheet

_GOOD_PART = 0.2
"""Of a page."""


@dataclass(frozen=True)
class Mark:
    """The beginning of a section, for the outline of the file; level 0 is a section's own."""

    title: str
    level: int = 0


@dataclass(frozen=True)
class Slab:
    """Shapes from a top left corner of their own, so high, with space above unless first."""

    height: float
    shapes: tuple[Shape, ...] = ()
    space: float = 0.0
    keep_next: bool = False
    """Whether the next slab must stand on the same page."""
    prefer_next: bool = False
    """Whether it should, where all that is kept together fits one page."""
    header: tuple["Slab", ...] = ()
    """What is repeated above it where it begins a page."""
    mark: Mark | None = None


def settled(slabs: tuple[Slab, ...], tallest: float) -> tuple[Slab, ...]:
    """Slabs whose preferences have become orders.

    Of what is too high for any page only a good beginning and end are kept together.
    """
    done: list[Slab] = []
    while len(done) < len(slabs):
        first = last = len(done)
        while last < len(slabs) - 1 and (slabs[last].keep_next or slabs[last].prefer_next):
            last += 1
        done += _settled(slabs[first : last + 1], tallest)
    return tuple(done)


def _settled(together: tuple[Slab, ...], tallest: float) -> list[Slab]:
    whole = stack_height(together)
    fits = whole + sum(header.height for header in together[0].header) <= tallest
    part = _GOOD_PART * tallest
    done: list[Slab] = []
    down = 0.0
    for slab in together:
        down += slab.height
        kept = slab.prefer_next and (fits or down <= part or whole - down <= part)
        done.append(replace(slab, keep_next=slab.keep_next or kept))
    return done


def stack_height(slabs: tuple[Slab, ...]) -> float:
    """How high slabs are one above the other."""
    return sum(slab.height + (slab.space if place else 0.0) for place, slab in enumerate(slabs))


def piled(slabs: tuple[Slab, ...], right: float = 0.0, down: float = 0.0) -> tuple[Shape, ...]:
    """The shapes of slabs one above the other."""
    shapes: list[Shape] = []
    for place, slab in enumerate(slabs):
        down += slab.space if place else 0.0
        shapes += [moved(shape, right, down) for shape in slab.shapes]
        down += slab.height
    return tuple(shapes)


def line_slab(line: TextLine, size: float, colour: Role = "ink") -> Slab:
    """One line of runs."""
    tall = sheet.line_height(size)
    baseline = (tall + CAP_HEIGHT * size) / 2
    shapes: list[Shape] = []
    right = 0.0
    for run in line:
        shapes.append(Text(right, baseline, run.text, size, "start", run.weight, colour))
        right += length((run,), size)
    return Slab(tall, tuple(shapes))


def text_slabs(
    runs: tuple[Run, ...], size: float, room: float, colour: Role = "ink"
) -> tuple[Slab, ...]:
    """The lines of a text; neither its first nor its last line stands alone on a page."""
    shown = tuple(replace(run, text=printable(run.text)) for run in runs)
    lines = [line_slab(line, size, colour) for line in wrap_runs(shown, size, room)]
    last = len(lines) - 1
    return tuple(
        replace(line, keep_next=place < last and (place == 0 or place == last - 1))
        for place, line in enumerate(lines)
    )


def heading_slabs(title: str, room: float) -> tuple[Slab, ...]:
    """A heading over a thin rule; it never stands last on a page."""
    lines = text_slabs((Run(title, "bold"),), sheet.HEADING, room)
    rule = Slab(5.0, (Line(0, 1.5, room, 1.5, "rule", 0.75),))
    return _leading((*lines, rule), Mark(title))


def subheading_slabs(title: str, room: float) -> tuple[Slab, ...]:
    """A title within a section; it never stands last on a page."""
    lines = text_slabs((Run(title, "bold"),), sheet.SUBHEADING, room)
    return _leading((*lines, Slab(2.0)), Mark(title, 1))


def _leading(slabs: tuple[Slab, ...], mark: Mark) -> tuple[Slab, ...]:
    first, *others = (replace(slab, keep_next=True) for slab in slabs)
    return (replace(first, mark=mark), *others)
