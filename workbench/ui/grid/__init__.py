"""The grid of deal years, and the pieces it shares with the grid of the rent roll."""

from workbench.ui.grid.rows import Band, GridRow, InputRow, LineRow
from workbench.ui.grid.view import YearGrid

__all__ = ["Band", "GridRow", "InputRow", "LineRow", "YearGrid"]
