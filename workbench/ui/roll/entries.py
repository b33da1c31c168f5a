"""Texts into many cells of the rent roll at once: a deal in, a deal out.

Every list item that is made gets a fresh id.
"""

from collections.abc import Mapping
from dataclasses import dataclass, field, replace
from typing import Any

from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, Space
from workbench.deal.paths import put
from workbench.text.entry import NotTaken
from workbench.ui.roll.columns import COLUMNS, Column
from workbench.ui.roll.rows import RollRow, rows_of
from workbench.ui.roll.values import read_cell


@dataclass
class _Desk:
    """The pieces of a deal while many cells go in."""

    deal: Deal
    next_id: int
    drafts: dict[str, str]
    spaces: dict[str, Space] = field(default_factory=dict)
    leases: dict[str, Lease] = field(default_factory=dict)
    added: dict[str, list[str]] = field(default_factory=dict)
    """Leases made, by the id of their space."""
    new: list[str] = field(default_factory=list)
    """Spaces made, in order."""

    def id(self, letter: str) -> str:
        self.next_id += 1
        return f"{letter}{self.next_id - 1}"


def with_texts(deal: Deal, texts: Mapping[tuple[int, int], str]) -> Deal:
    """The deal with texts in cells by row and column; rows past the last are new spaces.

    What is not understood is kept as a draft. A new row without any text is left out.
    """
    desk = _Desk(deal, deal.next_id, dict(deal.drafts))
    rows = rows_of(deal)
    by_row: dict[int, dict[int, str]] = {}
    for (row, column), text in texts.items():
        by_row.setdefault(row, {})[column] = text
    for row, cells in sorted(by_row.items()):
        known = rows[row] if row < len(rows) else RollRow(None)
        if known.space is not None or any(text.strip() for text in cells.values()):
            _fill(desk, known, cells)
    return _gathered(desk)


def _fill(desk: _Desk, row: RollRow, cells: Mapping[int, str]) -> None:
    space, lease = row.space, row.lease
    if space is None:
        space = Space(desk.id("s"), count=1)
        desk.new.append(space.id)
    space = desk.spaces.get(space.id, space)
    for place, text in sorted(cells.items()):
        column = COLUMNS[place]
        empty = not text.strip()
        if column.of_lease:
            if lease is None and not empty:
                lease = Lease(desk.id("e"))
                desk.added.setdefault(space.id, []).append(lease.id)
            if lease is not None:
                lease = _put(desk, lease, f"leases@{lease.id}", column, text)
        elif not (empty and (not row.first or (row.space is None and place == _UNITS))):
            space = _put(desk, space, f"spaces@{space.id}", column, text)
    desk.spaces[space.id] = space
    if lease is not None:
        desk.leases[lease.id] = lease


_UNITS = next(place for place, column in enumerate(COLUMNS) if column.field == "count")
"""The units of a new row stay one where the cell for them is empty."""


def _put(desk: _Desk, record: Any, name: str, column: Column, text: str) -> Any:
    """The record with a text taken in, or as it was with the text as a draft."""
    path = f"{name}.{column.draft_field}"
    desk.drafts.pop(path, None)
    held = RollRow(record, record).value(column)
    value = read_cell(column, text, held, desk.deal)
    if isinstance(value, NotTaken):
        desk.drafts[path] = text
        return record
    return record if value == held else put(record, column.steps, value)


def _gathered(desk: _Desk) -> Deal:
    """The deal with the pieces in their places; spaces that did not change are the same objects."""
    spaces = [_space(desk, desk.spaces.get(old.id, old)) for old in desk.deal.spaces]
    spaces += [_space(desk, desk.spaces[identity]) for identity in desk.new]
    return replace(desk.deal, spaces=tuple(spaces), next_id=desk.next_id, drafts=desk.drafts)


def _space(desk: _Desk, space: Space) -> Space:
    leases = tuple(desk.leases.get(lease.id, lease) for lease in space.leases)
    leases += tuple(desk.leases[identity] for identity in desk.added.get(space.id, ()))
    same = len(leases) == len(space.leases) and all(
        one is other for one, other in zip(leases, space.leases, strict=True)
    )
    return space if same else replace(space, leases=leases)
