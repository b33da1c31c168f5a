"""The columns of the rent roll that a deal has something to say in."""

import datetime
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from typing import TypeAlias

from workbench.deal.checks_leases import is_dated
from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, Rent, Space
from workbench.engine.roll import last_day
from workbench.report.document import Column
from workbench.report.names import item_title, one_line
from workbench.report.rents import RentWords, decimals_by_unit, one_unit, yearly
from workbench.report.typed import decimals_of
from workbench.report.voice import Voice
from workbench.text import numbers
from workbench.text.numbers import MISSING

Cell: TypeAlias = Callable[[Space, Lease | None], str]

_VACANT = "no lease"
_LONGEST = 11
"""Characters of an amount a year; above it they are in thousands."""


@dataclass(frozen=True)
class RollColumn:
    """A column with what stands in it; `of_space` is said once for each space."""

    column: Column
    cell: Cell
    of_space: bool = False
    total: str = ""


def roll_columns(voice: Voice) -> tuple[RollColumn, ...]:
    """From left to right."""
    return (*_space_columns(voice), *_lease_columns(voice), *_rent_columns(voice))


def _space_columns(voice: Voice) -> Iterator[RollColumn]:
    spaces = voice.deal.spaces
    yield RollColumn(Column("Space", share=1.1), _space_name, total="All spaces")
    if any(space.count != 1 for space in spaces):
        units = voice.count(sum(space.count or 0 for space in spaces))
        yield _fitted("Units", lambda space, _: voice.count(space.count), units)
    if any(space.area is not None for space in spaces):
        title = f"Area of one, {voice.area_unit}"
        areas = [space.area for space in spaces if space.area is not None]
        decimals = min(decimals_of(voice, "area", areas), 1)
        yield _fitted(title, lambda space, _: voice.decimal(space.area, decimals))


def _lease_columns(voice: Voice) -> Iterator[RollColumn]:
    leases = [lease for space in voice.deal.spaces for lease in space.leases]
    if leases:
        yield RollColumn(Column("Tenant", share=1.2), _tenant)
    days: list[tuple[str, Callable[[Lease], datetime.date | None]]] = [
        ("Start", lambda lease: lease.start),
        ("End", lambda lease: lease.end),
    ]
    for title, of in days:
        if any(of(lease) is not None for lease in leases):
            yield RollColumn(Column(title, fit=True), _day_cell(voice, of))


def _day_cell(voice: Voice, of: Callable[[Lease], datetime.date | None]) -> Cell:
    def cell(space: Space, lease: Lease | None) -> str:
        day = None if lease is None else of(lease)
        return "" if day is None else voice.day(day)

    return cell


def _rent_columns(voice: Voice) -> Iterator[RollColumn]:
    """As entered and for all units a year, of the lease and of the market."""
    spaces = voice.deal.spaces
    leased = [lease.rent for space in spaces for lease in space.leases]
    rents = [*leased, *(space.market_rent for space in spaces)]
    say = RentWords(voice, one_unit(rents), decimals_by_unit(voice, rents))
    passing = [
        yearly(space, lease.rent)
        for space in spaces
        for lease in space.leases
        if runs_at_closing(voice.deal, lease)
    ]
    market = [yearly(space, space.market_rent) for space in spaces]
    sums = (_sum(passing), _sum(market))
    scale = numbers.scale_for(sums, voice.locale, _LONGEST)
    yearly_title = f"a year, {voice.unit(scale)}"

    def in_year(space: Space, rent: Rent | None) -> str:
        return "" if rent is None else voice.scaled(yearly(space, rent), scale)

    if leased:
        yield _fitted(say.title("Rent"), lambda _, lease: say.text(_rent(lease)), of_space=False)
        total = voice.scaled(sums[0], scale)
        title = f"Rent {yearly_title}"
        yield _fitted(title, lambda space, lease: in_year(space, _rent(lease)), total, False)
    yield _fitted(say.title("Market rent"), lambda space, _: say.text(space.market_rent))
    total = voice.scaled(sums[1], scale)
    title = f"Market rent {yearly_title}"
    yield _fitted(title, lambda space, _: in_year(space, space.market_rent), total)


def _rent(lease: Lease | None) -> Rent | None:
    return None if lease is None else lease.rent


def _fitted(title: str, cell: Cell, total: str = "", of_space: bool = True) -> RollColumn:
    return RollColumn(Column(title, "right", fit=True), cell, of_space, total)


def _space_name(space: Space, lease: Lease | None) -> str:
    parts = (item_title(space, "spaces"), one_line(space.use))
    return ", ".join(part for part in parts if part)


def _tenant(space: Space, lease: Lease | None) -> str:
    return _VACANT if lease is None else one_line(lease.tenant) or MISSING


def runs_at_closing(deal: Deal, lease: Lease) -> bool:
    """Whether rent is paid under a lease on the day of closing; one without dates always is."""
    closing, last = deal.purchase.closing_date, last_day(lease)
    if not is_dated(lease) or closing is None or lease.start is None or last is None:
        return True
    return lease.start <= closing <= last


def _sum(amounts: list[float | None]) -> float | None:
    known = [amount for amount in amounts if amount is not None]
    return sum(known) if len(known) == len(amounts) else None
