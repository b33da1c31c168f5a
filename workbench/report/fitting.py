"""How wide the columns of a table are."""

from collections.abc import Callable

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
    shares = sum(column.share for column in columns if not column.fit)
    natural = _natural_widths(table, free * _MOST_FITTED if shares else free, bool(shares))
    left = free - sum(natural)
    return tuple(
        wide if column.fit else left * column.share / shares
        for column, wide in zip(columns, natural, strict=True)
    )


def _natural_widths(table: Table, most: float, has_others: bool) -> list[float]:
    """Widths of the fitted columns, 0 for the others.

    Titles are broken into more lines before any figure has to be.
    """
    natural: list[float] = []
    for title_width in (_two_lines, _longest_word):
        natural = [
            _natural(table, place, title_width) if column.fit else 0.0
            for place, column in enumerate(table.columns)
        ]
        if sum(natural) <= most:
            break
    taken = sum(natural)
    if taken and (taken > most or not has_others):
        return [wide * most / taken for wide in natural]
    return natural


def _natural(table: Table, place: int, title_width: Callable[[str, float], float]) -> float:
    """The width of the widest cell of a column, or of its title."""
    size = sheet.FINE if table.fine else sheet.CELL
    title_size = sheet.FINE_NOTE if table.fine else sheet.NOTE
    title = title_width(printable(table.columns[place].title), title_size)
    cells = [
        max(width(line, size, _weight(table, number)) for line in printable(row[place]).split("\n"))
        for number, row in enumerate(table.rows)
    ]
    return max((title, *cells)) + 0.01


def _longest_word(title: str, size: float) -> float:
    return max((width(word, size) for word in title.split()), default=0.0)


def _two_lines(title: str, size: float) -> float:
    """The least width that a title needs on no more than two lines."""
    words = title.split()
    breaks = [(" ".join(words[:at]), " ".join(words[at:])) for at in range(len(words) + 1)]
    return min(max(width(line, size) for line in pair) for pair in breaks)


def _weight(table: Table, number: int) -> Weight:
    return "bold" if number in table.strong else "regular"
