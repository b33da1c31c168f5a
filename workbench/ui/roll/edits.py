"""Edits of whole rows of the rent roll: a deal in, a deal out."""

from collections.abc import Collection, Iterator, Sequence
from dataclasses import replace
from itertools import count

from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, Space
from workbench.ui.roll.rows import Key


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
    fresh = count(deal.next_id)
    copies = [_copy(fresh, space) for space in deal.spaces if space.id in ids]
    place = max(n for n, space in enumerate(deal.spaces) if space.id in ids) + 1
    spaces = (*deal.spaces[:place], *copies, *deal.spaces[place:])
    return replace(deal, spaces=spaces, next_id=next(fresh))


def _copy(fresh: Iterator[int], space: Space) -> Space:
    identity = f"s{next(fresh)}"
    leases = tuple(
        replace(
            lease,
            id=f"e{next(fresh)}",
            steps=tuple(replace(step, id=f"p{next(fresh)}") for step in lease.steps),
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
