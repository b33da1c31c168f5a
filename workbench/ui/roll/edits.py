"""Edits of the rent roll: a deal in, a deal out. Every list item that is made gets a fresh id."""

from collections.abc import Collection, Mapping, Sequence
from dataclasses import dataclass, field, replace
from typing import Any

from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, Space
from workbench.deal.paths import put
from workbench.text.entry import NotTaken
from workbench.ui.roll.columns import COLUMNS, Column
from workbench.ui.roll.rows import Key, RollRow, rows_of
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


def with_new_row(deal: Deal, before: str) -> Deal:
    """The deal with an empty space before another; at the end where there is no such space."""
    made = Space(f"s{deal.next_id}", count=1)
    place = _place(deal, before)
    spaces = (*deal.spaces[:place], made, *deal.spaces[place:])
    return replace(deal, spaces=spaces, next_id=deal.next_id + 1)


def with_new_lease(deal: Deal, space_id: str) -> Deal:
    """The deal with one more lease of a space, without dates."""
    made = Lease(f"e{deal.next_id}")
    spaces = tuple(
        replace(space, leases=(*space.leases, made)) if space.id == space_id else space
        for space in deal.spaces
    )
    return replace(deal, spaces=spaces, next_id=deal.next_id + 1)


def with_copies(deal: Deal, ids: Collection[str]) -> Deal:
    """The deal with copies of spaces after the last of them, leases and steps included."""
    desk = _Desk(deal, deal.next_id, {})
    copies = [_copy(desk, space) for space in deal.spaces if space.id in ids]
    place = max(n for n, space in enumerate(deal.spaces) if space.id in ids) + 1
    spaces = (*deal.spaces[:place], *copies, *deal.spaces[place:])
    return replace(deal, spaces=spaces, next_id=desk.next_id)


def _copy(desk: _Desk, space: Space) -> Space:
    identity = desk.id("s")
    leases = tuple(
        replace(
            lease,
            id=desk.id("e"),
            steps=tuple(replace(step, id=desk.id("p")) for step in lease.steps),
        )
        for lease in space.leases
    )
    return replace(space, id=identity, leases=leases)


def without_rows(deal: Deal, keys: Collection[Key]) -> Deal:
    """The deal without some rows: their leases, and the spaces that lose all their rows."""
    gone = set(keys)
    spaces: list[Space] = []
    for space in deal.spaces:
        kept = tuple(one for one in space.leases if (space.id, one.id) not in gone)
        if (space.id, "") in gone or (space.leases and not kept):
            continue
        spaces.append(space if len(kept) == len(space.leases) else replace(space, leases=kept))
    return _without_lost_drafts(replace(deal, spaces=tuple(spaces)), deal)


def without_leases(deal: Deal, ids: Collection[str]) -> Deal:
    """The deal without some leases; their spaces stay."""
    spaces = tuple(
        replace(space, leases=tuple(one for one in space.leases if one.id not in ids))
        if any(one.id in ids for one in space.leases)
        else space
        for space in deal.spaces
    )
    return _without_lost_drafts(replace(deal, spaces=spaces), deal)


def _without_lost_drafts(deal: Deal, before: Deal) -> Deal:
    """The deal without drafts of what is no longer there."""
    if not deal.drafts:
        return deal
    lost = _names(before) - _names(deal)
    kept = {path: text for path, text in deal.drafts.items() if path.partition(".")[0] not in lost}
    return replace(deal, drafts=kept)


def _names(deal: Deal) -> set[str]:
    leases = [lease for space in deal.spaces for lease in space.leases]
    return {
        *(f"spaces@{space.id}" for space in deal.spaces),
        *(f"leases@{lease.id}" for lease in leases),
        *(f"steps@{step.id}" for lease in leases for step in lease.steps),
    }


def with_moved(deal: Deal, ids: Collection[str], down: bool) -> Deal:
    """The deal with spaces moved by one place; those at the end they move to stay there."""
    spaces: Sequence[Space] = deal.spaces if not down else deal.spaces[::-1]
    moved: list[Space] = []
    for space in spaces:
        if space.id in ids and moved and moved[-1].id not in ids:
            moved.insert(-1, space)
        else:
            moved.append(space)
    return replace(deal, spaces=tuple(moved if not down else moved[::-1]))


def _place(deal: Deal, identity: str) -> int:
    ids = [space.id for space in deal.spaces]
    return ids.index(identity) if identity in ids else len(ids)
