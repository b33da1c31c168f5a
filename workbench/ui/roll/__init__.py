"""The grid of the rent roll: one row a lease, edited like a spreadsheet."""

from workbench.ui.roll.view import RollGrid

__all__ = ["RollGrid"]
