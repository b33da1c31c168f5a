"""Tables and key figures cut into slabs."""

import sys
from dataclasses import replace

from workbench.charts.lettering import CAP_HEIGHT, LEADING, Weight, printable, width
from workbench.charts.shapes import Anchor, Line, Role, Shape, Text
from workbench.charts.wrapping import wrap, wrap_short
from workbench.report import sheet
from workbench.report.document import Column, KeyFigure, KeyFigures, Table
from workbench.report.slabs import Slab

_GAP = 10.0
_PAD = 2.6
_WHOLE_ROW = 6
"""Rows of up to so many lines are kept on one page."""


def table_slabs(table: Table, room: float) -> tuple[Slab, ...]:
    """The heading of a table, repeated on each page, and its rows; long rows break by lines."""
    widths = _widths(table.columns, room)
    header: tuple[Slab, ...] = ()
    if any(column.title for column in table.columns):
        titles = tuple(column.title for column in table.columns)
        header = _row_slabs(table, titles, widths, "regular", "muted")
        ruled = Line(0, header[-1].height, room, header[-1].height, "ink", 0.6)
        header = (*header[:-1], replace(header[-1], shapes=(*header[-1].shapes, ruled)))
        header = tuple(replace(slab, keep_next=True) for slab in header)
    slabs = list(header)
    for number, row in enumerate(table.rows):
        strong = number in table.strong
        lines = _row_slabs(table, row, widths, "bold" if strong else "regular", "ink")
        if number:
            rule = Line(0, 0, room, 0, "ink" if strong else "rule", 0.6 if strong else 0.4)
            lines = (replace(lines[0], shapes=(*lines[0].shapes, rule)), *lines[1:])
        slabs += [replace(line, header=header) for line in lines]
    return tuple(slabs)


def _widths(columns: tuple[Column, ...], room: float) -> tuple[float, ...]:
    free = room - _GAP * (len(columns) - 1)
    total = sum(column.share for column in columns)
    return tuple(free * column.share / total for column in columns)


def _row_slabs(
    table: Table, row: tuple[str, ...], widths: tuple[float, ...], weight: Weight, colour: Role
) -> tuple[Slab, ...]:
    """One slab for each line of the row's longest cell."""
    size = sheet.CELL if colour == "ink" else sheet.NOTE
    most = table.most_lines or sys.maxsize
    cells = [
        wrap_short(printable(text), size, wide, most, weight)
        for text, wide in zip(row, widths, strict=True)
    ]
    count = max(len(cell) for cell in cells)
    tall = size * LEADING
    slabs: list[Slab] = []
    for place in range(count):
        above = _PAD if place == 0 else 0.0
        below = _PAD if place == count - 1 else 0.0
        baseline = above + (tall + CAP_HEIGHT * size) / 2
        texts: list[Shape] = []
        left = 0.0
        for column, cell, wide in zip(table.columns, cells, widths, strict=True):
            if place < len(cell):
                to_right = column.align == "right"
                x = left + wide if to_right else left
                anchor: Anchor = "end" if to_right else "start"
                texts.append(Text(x, baseline, cell[place], size, anchor, weight, colour))
            left += wide + _GAP
        keep = place < count - 1 and (count <= _WHOLE_ROW or place in (0, count - 2))
        slabs.append(Slab(above + tall + below, tuple(texts), keep_next=keep))
    return tuple(slabs)


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
    label_room = room - width(value, size, "bold") - _GAP
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
