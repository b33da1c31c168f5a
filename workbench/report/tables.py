"""Tables cut into slabs."""

import sys
from dataclasses import dataclass, replace
from itertools import count, takewhile

from workbench.charts.lettering import CAP_HEIGHT, LEADING, Weight, printable
from workbench.charts.shapes import Anchor, Line, Role, Shape, Text
from workbench.charts.wrapping import wrap, wrap_short
from workbench.report import sheet
from workbench.report.document import Column, Table
from workbench.report.fitting import fitted
from workbench.report.slabs import Slab

_WHOLE_ROW = 6
"""Rows of up to so many lines are kept on one page."""
_WITH_SUM = 3
"""So many rows above a sum are kept on its page."""
_OVER_NOTE = 0.8


@dataclass(frozen=True)
class _Setting:
    """Measures of one table on one column of text."""

    table: Table
    room: float
    widths: tuple[float, ...]

    @property
    def gap(self) -> float:
        return sheet.FINE_GAP if self.table.fine else sheet.CELL_GAP

    @property
    def size(self) -> float:
        return sheet.FINE if self.table.fine else sheet.CELL

    @property
    def pad(self) -> float:
        return 1.7 if self.table.fine else 2.6


@dataclass(frozen=True)
class _Cell:
    """A cell's lines and how they are set."""

    column: Column
    lines: tuple[str, ...]
    weight: Weight
    colour: Role


def table_slabs(table: Table, room: float) -> tuple[Slab, ...]:
    """The heading of a table, repeated on each page, and its rows; long rows break by lines."""
    setting = _Setting(table, room, fitted(table, room))
    header = _header(setting)
    slabs = list(header)
    for number in range(len(table.rows)):
        lines = _row(setting, number)
        if _is_kept(table, number):
            lines[-1] = replace(lines[-1], prefer_next=True)
        slabs += [replace(line, header=header) for line in lines]
    return tuple(slabs)


def _is_kept(table: Table, number: int) -> bool:
    """Whether a row stands on the page of the next one.

    No first or last row is alone on a page, what stands just above a sum goes with it, and so does
    what stands under a title.
    """
    last = len(table.rows) - 1
    if number == last or table.whole or number in (0, last - 1) or _is_title(table, number):
        return number < last
    near = range(number + 1, number + (2 if number in table.strong else _WITH_SUM + 1))
    until_title = takewhile(lambda row: not _is_title(table, row), near)
    return not table.strong.isdisjoint(until_title)


def _is_title(table: Table, number: int) -> bool:
    """Whether a row does no more than name those under it."""
    return number in table.strong and not any(table.rows[number][1:])


def _header(setting: _Setting) -> tuple[Slab, ...]:
    """The titles over a dark rule; none where no column has one."""
    columns = setting.table.columns
    if not any(column.title for column in columns):
        return ()
    size = sheet.FINE_NOTE if setting.table.fine else sheet.NOTE
    cells = [
        _Cell(column, wrap(printable(column.title), size, wide), "regular", "muted")
        for column, wide in zip(columns, setting.widths, strict=True)
    ]
    slabs = _lines(setting, _hung(cells), size)
    ruled = Line(0, slabs[-1].height, setting.room, slabs[-1].height, "ink", 0.6)
    slabs[-1] = replace(slabs[-1], shapes=(*slabs[-1].shapes, ruled))
    return tuple(replace(slab, keep_next=True) for slab in slabs)


def _hung(cells: list[_Cell]) -> list[_Cell]:
    """Titles of fewer lines stand on the last line of the others."""
    tall = max(len(cell.lines) for cell in cells)
    return [replace(cell, lines=("",) * (tall - len(cell.lines)) + cell.lines) for cell in cells]


def _row(setting: _Setting, number: int) -> list[Slab]:
    table, size = setting.table, setting.size
    strong = number in table.strong
    most = table.most_lines or sys.maxsize
    cells: list[_Cell] = []
    for place, column, text, wide in zip(
        count(), table.columns, table.rows[number], setting.widths, strict=False
    ):
        slanted = (number, place) in table.slanted
        weight: Weight = "italic" if slanted else "bold" if strong else "regular"
        lines = wrap_short(printable(text), size, wide, most, weight)
        cells.append(_Cell(column, lines, weight, "muted" if slanted else "ink"))
    note = table.notes[number] if table.notes else ""
    slabs = _lines(setting, cells, size, below=0.0 if note else setting.pad)
    if number:
        rule = Line(0, 0, setting.room, 0, "ink" if strong else "rule", 0.6 if strong else 0.4)
        slabs[0] = replace(slabs[0], shapes=(*slabs[0].shapes, rule))
    return _with_note(setting, slabs, note) if note else slabs


def _lines(
    setting: _Setting,
    cells: list[_Cell],
    size: float,
    above: float | None = None,
    below: float | None = None,
) -> list[Slab]:
    """One slab for each line of the row's longest cell, with room above and below them all."""
    over = setting.pad if above is None else above
    under = setting.pad if below is None else below
    tall = size * LEADING
    most = max(len(cell.lines) for cell in cells)
    slabs: list[Slab] = []
    for place in range(most):
        top = over if place == 0 else 0.0
        bottom = under if place == most - 1 else 0.0
        baseline = top + (tall + CAP_HEIGHT * size) / 2
        texts: list[Shape] = []
        left = 0.0
        for cell, wide in zip(cells, setting.widths, strict=True):
            if place < len(cell.lines) and cell.lines[place]:
                to_right = cell.column.align == "right"
                x = left + wide if to_right else left
                anchor: Anchor = "end" if to_right else "start"
                line = cell.lines[place]
                texts.append(Text(x, baseline, line, size, anchor, cell.weight, cell.colour))
            left += wide + setting.gap
        keep = place < most - 1 and (most <= _WHOLE_ROW or place in (0, most - 2))
        slabs.append(Slab(top + tall + bottom, tuple(texts), keep_next=keep))
    return slabs


def _with_note(setting: _Setting, row: list[Slab], note: str) -> list[Slab]:
    """The row with its note, on the same page unless the note is long."""
    size = sheet.FINE_NOTE if setting.table.fine else sheet.NOTE
    cell = _Cell(Column(""), wrap(printable(note), size, setting.room), "regular", "muted")
    whole = replace(setting, widths=(setting.room,))
    return [
        *row[:-1],
        replace(row[-1], keep_next=True),
        *_lines(whole, [cell], size, above=_OVER_NOTE),
    ]
