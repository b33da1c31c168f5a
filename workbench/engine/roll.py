"""The rent roll, compiled: every lease, gap and market tenancy becomes pieces of constant rent.

A piece is so much a month from one position to another along the deal months. All that the engine
needs of the roll are sums of pieces of one kind, month by month; they are computed by scattering
the pieces' ends into differences and summing those once, whatever the number of spaces.
"""

import datetime
from collections.abc import Iterable, Iterator, Sequence
from dataclasses import dataclass
from math import ceil
from operator import is_
from typing import Literal, TypeAlias

import numpy as np
from numpy.typing import NDArray

from workbench.deal.dates import add_months
from workbench.deal.earn import Lease, Rent, Space
from workbench.engine.calendar import MONTHS, month_starts, position

Floats: TypeAlias = NDArray[np.float64]
Kind: TypeAlias = Literal["contract", "free", "undated", "market", "gap", "let", "penalty"]

KINDS: tuple[Kind, ...] = ("contract", "free", "undated", "market", "gap", "let", "penalty")
"""contract: rent under dated leases. free: the part of it in free months. undated: rent of undated
units until they turn. market: market rent today of space at market. gap: market rent today of
space that stands empty. let: market rent today of space under dated leases. penalty: break
penalties, in one month."""


@dataclass(frozen=True)
class Piece:
    """So much a month from position `start` to position `end`, of one lease or space."""

    kind: Kind
    of: str
    start: float
    end: float
    amount: float


def monthly(space: Space, rent: Rent) -> float:
    """A rent in money a month for the whole space; not a number where something is missing."""
    if rent.amount is None or space.count is None:
        return float("nan")
    measure = space.count * (1.0 if rent.of == "unit" else space.area or float("nan"))
    return rent.amount * measure / (12.0 if rent.per == "year" else 1.0)


def pieces(spaces: Sequence[Space], closing: datetime.date | None) -> list[Piece]:
    """All pieces of the roll. Dated leases need the closing date."""
    return [piece for space in spaces for piece in space_pieces(space, closing)]


def space_pieces(space: Space, closing: datetime.date | None) -> Iterator[Piece]:
    """The pieces of one space: its leases in order, the gaps, and market rent after the last."""
    market = monthly(space, space.market_rent)
    dated = [lease for lease in space.leases if lease.start and lease.end]
    if not dated or closing is None:
        if space.leases:
            yield from _undated(space, space.leases[0], market)
        else:
            yield Piece("market", space.id, 0.0, MONTHS, market)
        return
    starts = month_starts(closing)
    free_from = 0.0
    for lease in sorted(dated, key=lambda one: one.start or closing):
        begin, end = lease_positions(lease, starts)
        if begin > free_from:
            yield Piece("gap", space.id, free_from, begin, market)
        if end > begin:
            yield Piece("let", lease.id, begin, end, market)
            yield from _contract(space, lease, starts, closing)
        free_from = max(end, free_from)
    turn = ceil(free_from)
    if turn > free_from:
        yield Piece("gap", space.id, free_from, turn, market)
    if turn < MONTHS:
        yield Piece("market", space.id, turn, MONTHS, market)
        yield from _penalty(lease, closing, turn)


def last_day(lease: Lease) -> datetime.date | None:
    """The day until which the lease's rent is in hand: its end, or the tenant's break before it."""
    if lease.break_date is not None and lease.end is not None:
        return min(lease.end, lease.break_date)
    return lease.end


def lease_positions(lease: Lease, starts: list[int]) -> tuple[float, float]:
    """From where to where a dated lease runs along the deal months."""
    last = last_day(lease)
    if lease.start is None or last is None:
        raise ValueError("the lease has no dates")
    end = position(starts, last + datetime.timedelta(days=1))
    return min(position(starts, lease.start), end), end


def _undated(space: Space, lease: Lease, market: float) -> Iterator[Piece]:
    """A twelfth of the units turns to market rent at each of months 1…12."""
    rent = monthly(space, lease.rent)
    for month in range(1, 13):
        yield Piece("undated", lease.id, 0.0, month, rent / 12)
        yield Piece("market", space.id, month, MONTHS, market / 12)


def _contract(
    space: Space, lease: Lease, starts: list[int], closing: datetime.date
) -> Iterator[Piece]:
    begin, end = lease_positions(lease, starts)
    free_until = _free_until(lease, starts, closing)
    for start, stop, amount in rent_spans(space, lease, starts, closing):
        start, stop = max(start, begin), min(stop, end)
        if stop > start:
            yield Piece("contract", lease.id, start, stop, amount)
        if min(stop, free_until) > start:
            yield Piece("free", lease.id, start, min(stop, free_until), amount)


def rent_spans(
    space: Space, lease: Lease, starts: list[int], closing: datetime.date
) -> Iterator[tuple[float, float, float]]:
    """Start, end and monthly rent of each stretch between the lease's steps."""
    amount = monthly(space, lease.rent)
    start = 0.0
    later = [step for step in lease.steps if step.date is not None and step.date > closing]
    for step in sorted(later, key=lambda one: one.date or closing):
        at = position(starts, step.date or closing)
        yield start, at, amount
        start = at
        if step.amount is not None:
            amount = monthly(space, Rent(step.amount, lease.rent.per, lease.rent.of))
        else:
            amount *= 1 + (step.change or 0.0)
    yield start, float(MONTHS), amount


def _free_until(lease: Lease, starts: list[int], closing: datetime.date) -> float:
    first = max(lease.start or closing, closing)
    return position(starts, add_months(first, lease.free_months)) if lease.free_months else 0.0


def _penalty(lease: Lease, closing: datetime.date, month: int) -> Iterator[Piece]:
    if lease.break_date is not None and lease.break_date >= closing and lease.break_penalty:
        yield Piece("penalty", lease.id, month, month + 1, lease.break_penalty)


@dataclass(frozen=True, eq=False)
class SpaceTable:
    """The pieces of one space as a table: rows of kind, start, end and amount."""

    space: Space
    table: Floats


def tables(
    spaces: tuple[Space, ...],
    closing: datetime.date | None,
    earlier: tuple[SpaceTable, ...] | None = None,
) -> tuple[SpaceTable, ...]:
    """The pieces of all spaces; spaces that an earlier roll of the same closing has are kept."""
    earlier = earlier or ()
    held = [one.space for one in earlier]
    if len(held) == len(spaces) and all(map(is_, held, spaces)):
        return earlier
    known = {id(one.space): one for one in earlier}
    return tuple(known.get(id(space)) or _space_table(space, closing) for space in spaces)


def _space_table(space: Space, closing: datetime.date | None) -> SpaceTable:
    return SpaceTable(space, table_of(space_pieces(space, closing)))


def table_of(all_pieces: Iterable[Piece]) -> Floats:
    """Pieces as a table, shape (4, pieces): the kind's place in KINDS, start, end and amount."""
    rows = [(_KIND[one.kind], one.start, one.end, one.amount) for one in all_pieces]
    return np.array([*zip(*rows, strict=True)], dtype=np.float64) if rows else NO_PIECES


NO_PIECES = np.empty((4, 0))
_KIND = {kind: float(row) for row, kind in enumerate(KINDS)}


def scatter(table: Floats) -> dict[str, Floats]:
    """Month by month sums of each kind of a table of pieces, shape (492, 1).

    A piece from a = i + f adds 1 − f of its amount in month i and all of it from i + 1 on; its end
    takes the same away. Where no piece of a kind is alive the sum is exactly 0.
    """
    kind, start, end, amount = table
    width = MONTHS + 2
    size = len(KINDS) * width
    base = kind.astype(np.int64) * width
    first, last = np.floor(start).astype(np.int64), np.floor(end).astype(np.int64)
    f, h = start - first, end - last
    where = np.concatenate([base + first, base + first + 1, base + last, base + last + 1])
    change = np.concatenate([amount * (1 - f), amount * f, -amount * (1 - h), -amount * h])
    sums = np.bincount(where, change, size).reshape(len(KINDS), width).cumsum(axis=1)
    ends = np.concatenate([base + first, base + np.ceil(end).astype(np.int64)])
    count = np.repeat([1.0, -1.0], len(kind))
    alive = np.bincount(ends, count, size).reshape(len(KINDS), width).cumsum(axis=1)
    sums = np.where(alive > 0.5, sums, 0.0)[:, :MONTHS]
    return {name: sums[row][:, np.newaxis] for row, name in enumerate(KINDS)}


def share_of_months(start: float, end: float) -> Floats:
    """The share of each month's days between two positions, shape (492, 1)."""
    month = np.arange(MONTHS, dtype=np.float64)
    share: Floats = np.minimum(month + 1, end) - np.maximum(month, start)
    return np.maximum(share, 0.0)[:, np.newaxis]


def piece_in_year(piece: Piece, year: int) -> float:
    """What one piece adds up to in a deal year."""
    length = min(piece.end, 12.0 * year) - max(piece.start, 12.0 * (year - 1))
    return piece.amount * max(length, 0.0)
