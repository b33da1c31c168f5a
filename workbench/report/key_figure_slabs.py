"""Key figures cut into slabs."""

from dataclasses import replace

from workbench.charts.lettering import LEADING, printable, width
from workbench.charts.shapes import Line, Shape, Text
from workbench.charts.wrapping import wrap
from workbench.report import sheet
from workbench.report.document import KeyFigure, KeyFigures
from workbench.report.slabs import Slab


def key_figure_slabs(figures: KeyFigures, room: float) -> tuple[Slab, ...]:
    """Each figure with its label on the left, its value on the right, its note underneath."""
    slabs: list[Slab] = []
    for number, item in enumerate(figures.items):
        slab = _key_figure(item, room, figures.air)
        if number:
            slab = replace(slab, shapes=(*slab.shapes, Line(0, 0, room, 0, "rule", 0.5)))
        slabs.append(slab)
    return tuple(slabs)


def _key_figure(item: KeyFigure, room: float, air: float) -> Slab:
    size = sheet.KEY_VALUE_STRONG if item.strong else sheet.KEY_VALUE
    label_size = sheet.LOOKS["body"]
    value = printable(item.value)
    size *= min(1.0, room * 0.66 / width(value, size, "bold"))
    label_room = room - width(value, size, "bold") - sheet.CELL_GAP
    labels = wrap(printable(item.label), label_size, label_room, "bold")
    baseline = 4.0 + air / 2 + size * 0.86
    shapes: list[Shape] = [Text(room, baseline, value, size, "end", "bold")]
    shapes += [
        Text(0, baseline + place * label_size * LEADING, line, label_size, "start", "bold")
        for place, line in enumerate(labels)
    ]
    down = baseline + (len(labels) - 1) * label_size * LEADING
    for line in wrap(printable(item.note), sheet.NOTE, room) if item.note else ():
        down += sheet.NOTE * 1.3
        shapes.append(Text(0, down, line, sheet.NOTE, colour="muted"))
    return Slab(down + 5.5 + air / 2, tuple(shapes))
