"""Tables by year, split into as many tables one under the other as the width asks for."""

from dataclasses import replace
from math import ceil

from workbench.charts.lettering import Weight, printable, width
from workbench.report import sheet
from workbench.report.document import Column, Table, YearLine, YearTable
from workbench.report.slabs import Slab
from workbench.report.tables import table_slabs

_MOST_LABEL = 0.32
"""The part of the width that labels may take before they are broken into lines."""
_MOST_COLUMN = 62.0
"""Columns of few years are not pulled apart over the whole page."""


def year_table_slabs(table: YearTable, room: float) -> tuple[Slab, ...]:
    """The years in even parts, each with its own heading; labels and columns line up."""
    label = min(_label_width(table), _MOST_LABEL * room)
    natural = _column_width(table)
    across = max(1, int((room - label) / (natural + sheet.FINE_GAP)))
    parts = ceil(len(table.years) / across)
    across = ceil(len(table.years) / parts)
    column = min((room - label) / across - sheet.FINE_GAP, max(natural, _MOST_COLUMN))
    slabs: list[Slab] = []
    for first in range(0, len(table.years), across):
        places = range(first, min(first + across, len(table.years)))
        wide = label + len(places) * (column + sheet.FINE_GAP)
        part = table_slabs(_part(table, places, label, column), wide)
        space = sheet.BLOCK_SPACE if first else 0.0
        slabs += [replace(part[0], space=space), *part[1:]]
    return tuple(slabs)


def _part(table: YearTable, places: range, label: float, column: float) -> Table:
    """The table of some of the years."""
    return Table(
        columns=(
            Column(table.corner, share=label),
            *(Column(table.years[place], "right", column) for place in places),
        ),
        rows=tuple((line.label, *(line.cells[place] for place in places)) for line in table.lines),
        strong=frozenset(number for number, line in enumerate(table.lines) if line.strong),
        fine=True,
        slanted=frozenset(
            (number, place - places.start + 1)
            for number, line in enumerate(table.lines)
            for place in line.following & set(places)
        ),
        in_groups=True,
    )


def _weight(line: YearLine) -> Weight:
    return "bold" if line.strong else "regular"


def _label_width(table: YearTable) -> float:
    labels = [width(printable(line.label), sheet.FINE, _weight(line)) for line in table.lines]
    return max((width(printable(table.corner), sheet.FINE_NOTE), *labels)) + 0.01


def _column_width(table: YearTable) -> float:
    headings = [
        width(line, sheet.FINE_NOTE) for year in table.years for line in printable(year).split("\n")
    ]
    cells = [
        width(printable(cell), sheet.FINE, _weight(line))
        for line in table.lines
        for cell in line.cells
    ]
    return max((*headings, *cells)) + 0.01
