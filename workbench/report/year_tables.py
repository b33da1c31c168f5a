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
_LEAST_LABEL = 0.2
"""The same where it makes for fewer tables."""
_MOST_COLUMN = 62.0
"""Columns of few years are not pulled apart over the whole page."""
_WHOLE = 14
"""A table of up to so many rows is kept on one page."""


def year_table_slabs(table: YearTable, room: float) -> tuple[Slab, ...]:
    """The years in even parts, each with its own heading; labels and columns line up."""
    natural = _column_width(table)
    widest = _label_width(table)
    choices = [min(widest, share * room) for share in (_MOST_LABEL, _LEAST_LABEL)]
    label = min(choices, key=lambda wide: _parts(table, room - wide, natural))
    parts = _parts(table, room - label, natural)
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


def _parts(table: YearTable, room: float, column: float) -> int:
    """How many tables it takes."""
    across = max(1, int(room / (column + sheet.FINE_GAP)))
    return ceil(len(table.years) / across)


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
        whole=len(table.lines) <= _WHOLE,
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
