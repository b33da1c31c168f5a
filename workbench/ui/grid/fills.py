"""What a fill or a ramp puts where; a sentence where it cannot be done."""

from collections.abc import Callable, Mapping, Sequence
from typing import TypeAlias

from workbench.ui.grid.edits import ramp

Chosen: TypeAlias = Mapping[int, Sequence[int]]
"""The chosen columns of each row, in order."""
Read: TypeAlias = Callable[[int, int], float | None]
"""The value in a row and a column."""
Filled: TypeAlias = dict[tuple[int, int], float]

NOTHING_CHOSEN = "Choose the cell to fill from and the years to its right."
NO_ROWS_UNDER = "Choose the row to fill from and the rows under it."
OTHER_UNITS = "These rows have different units; none is filled from another."
NO_VALUE = "There is no value to fill from."
NO_ENDS = "A ramp needs two ends with values and a year between them."


def filled_right(chosen: Chosen, read: Read) -> Filled | str:
    """The first chosen year of each row in its other ones; a single year takes the one before."""
    if all(len(columns) == 1 for columns in chosen.values()):
        before = {row: (columns[0] - 1, columns[0]) for row, columns in chosen.items()}
        chosen = {row: columns for row, columns in before.items() if columns[0] >= 0}
        if not chosen:
            return NOTHING_CHOSEN
    values: Filled = {}
    for row, columns in chosen.items():
        value = read(row, columns[0])
        if value is not None:
            values |= {(row, column): value for column in columns[1:]}
    return values or NO_VALUE


def filled_down(chosen: Chosen, read: Read, units: Sequence[str | None]) -> Filled | str:
    """The topmost chosen row in the others, of one unit; a single row takes the one above.

    A row without a unit, None, is not an input.
    """
    rows = sorted(chosen)
    if len(rows) == 1 and rows[0] > 0 and units[rows[0] - 1] is not None:
        rows = [rows[0] - 1, *rows]
    if len(rows) < 2:
        return NO_ROWS_UNDER
    if len({units[row] for row in rows}) > 1:
        return OTHER_UNITS
    values: Filled = {}
    for row in rows[1:]:
        for column in chosen[row]:
            value = read(rows[0], column)
            if value is not None:
                values[row, column] = value
    return values or NO_VALUE


def ramped(chosen: Chosen, read: Read) -> Filled | str:
    """Equal steps between the first and the last chosen year of each row."""
    values: Filled = {}
    for row, columns in chosen.items():
        span = range(columns[0], columns[-1] + 1)
        first, last = read(row, span[0]), read(row, span[-1])
        if len(span) < 3 or first is None or last is None:
            return NO_ENDS
        steps = ramp(first, last, len(span))
        values |= {(row, column): step for column, step in zip(span, steps, strict=True)}
    return values
