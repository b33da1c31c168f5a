"""The rows of the rent roll: one a lease, one a space without leases, and one for what is new."""

from collections.abc import Sequence
from dataclasses import dataclass
from typing import TypeAlias

from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, Space
from workbench.deal.paths import value_at
from workbench.ui.roll.columns import Column

Key: TypeAlias = tuple[str, str]
"""The ids of the space and of the lease; empty where there is none."""

NEW: Key = ("", "")


@dataclass(frozen=True)
class RollRow:
    """A row. `first` is false of further leases of the same space."""

    space: Space | None
    lease: Lease | None = None
    first: bool = True

    @property
    def key(self) -> Key:
        return (self.space.id if self.space else "", self.lease.id if self.lease else "")

    def record(self, column: Column) -> Space | Lease | None:
        """What a column's input belongs to; None where it does not exist yet."""
        return self.lease if column.of_lease else self.space

    def value(self, column: Column) -> object:
        """What a cell holds; None where it holds nothing."""
        record = self.record(column)
        return None if record is None else value_at(record, column.steps)

    def path(self, column: Column) -> str:
        """The key path of a cell; empty where its record does not exist yet."""
        record = self.record(column)
        if record is None:
            return ""
        return f"{'leases' if column.of_lease else 'spaces'}@{record.id}.{column.draft_field}"

    def shows(self, path: str, column: Column) -> bool:
        """Whether a cell shows the input of a key path."""
        own = self.path(column)
        both = (own, f"{own.removesuffix('per')}of") if column.content == "basis" else (own,)
        return bool(own) and path in both


def rows_of(deal: Deal) -> list[RollRow]:
    """The rows in display order, with an empty one at the end."""
    rows: list[RollRow] = []
    for space in deal.spaces:
        if not space.leases:
            rows.append(RollRow(space))
        rows.extend(RollRow(space, lease, place == 0) for place, lease in enumerate(space.leases))
    return [*rows, RollRow(None)]


def name_of_row(rows: Sequence[RollRow], row: int) -> str:
    """What a row is called in a sentence."""
    space = rows[row].space
    return (space.name if space is not None else "") or f"row {row + 1}"
