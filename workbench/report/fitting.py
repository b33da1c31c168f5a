"""How wide the columns of a table are."""

from workbench.charts.lettering import Weight, printable, width
from workbench.report import sheet
from workbench.report.document import Table

_MOST_FITTED = 0.8
"""The part of the room that fitted columns may take where others share the rest."""


def fitted(table: Table, room: float) -> tuple[float, ...]:
    """Widths of the columns, which with the gaps between them fill the room."""
    columns = table.columns
    gap = sheet.FINE_GAP if table.fine else sheet.CELL_GAP
    free = room - gap * (len(columns) - 1)
    natural = [
        _natural(table, place) if column.fit else 0.0 for place, column in enumerate(columns)
    ]
    shares = sum(column.share for column in columns if not column.fit)
    most = free * (_MOST_FITTED if shares else 1.0)
    taken = sum(natural)
    if taken and (taken > most or not shares):
        natural = [wide * most / taken for wide in natural]
        taken = most
    return tuple(
        wide if column.fit else (free - taken) * column.share / shares
        for column, wide in zip(columns, natural, strict=True)
    )


def _natural(table: Table, place: int) -> float:
    """The width of the widest cell of a column, or of its title on two lines."""
    size = sheet.FINE if table.fine else sheet.CELL
    title_size = sheet.FINE_NOTE if table.fine else sheet.NOTE
    title = _two_lines(printable(table.columns[place].title), title_size)
    cells = [
        max(width(line, size, _weight(table, number)) for line in printable(row[place]).split("\n"))
        for number, row in enumerate(table.rows)
    ]
    return max((title, *cells)) + 0.01


def _two_lines(title: str, size: float) -> float:
    """The least width that a title needs on no more than two lines."""
    words = title.split()
    breaks = [(" ".join(words[:at]), " ".join(words[at:])) for at in range(len(words) + 1)]
    return min(max(width(line, size) for line in pair) for pair in breaks)


def _weight(table: Table, number: int) -> Weight:
    return "bold" if number in table.strong else "regular"
