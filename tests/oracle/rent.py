"""Rent of each space, day by day: under a lease, empty, or at market rent."""

from dataclasses import dataclass, field
from typing import Any

from tests.oracle.months import (
    MONTHS,
    Row,
    add_months,
    day_of,
    first_whole_month_after,
    growth_index,
    month_starts,
    nil,
    row_value,
    year_of,
)

# Without a closing date nothing is dated, so that any day will do.
ANY_DAY = "2001-01-01"


@dataclass(frozen=True)
class DatedLease:
    """A lease with dates: days as numbers, the rent as entered and its monthly factor."""

    first: int
    last: int
    amount: float
    factor: float
    steps: list[tuple[int, float | None, float]]
    free_before: int


@dataclass(frozen=True)
class Roll:
    """Rent of all spaces by month; `under` is the share of each month's days by lease."""

    market: list[float] = field(default_factory=nil)
    in_hand: list[float] = field(default_factory=nil)
    expected: list[float] = field(default_factory=nil)
    empty_time: list[float] = field(default_factory=nil)
    concessions: list[float] = field(default_factory=nil)
    market_of_let: list[float] = field(default_factory=nil)
    penalties: list[float] = field(default_factory=nil)
    under: dict[str, list[float]] = field(default_factory=dict)


def closing_of(raw: dict[str, Any]) -> int:
    """Number of the closing day."""
    return day_of(raw.get("purchase", {}).get("closing_date") or ANY_DAY)


def monthly_factor(rent: dict[str, Any], space: dict[str, Any]) -> float:
    """What turns the amount of a rent, in its own terms, into money a month for the space."""
    factor = float(space["count"])
    if rent.get("of", "unit") == "area":
        factor *= space["area"]
    if rent.get("per", "year") == "year":
        factor /= 12
    return factor


def wear_of(raw: dict[str, Any]) -> Row | None:
    """Depreciation of rent; rents of the same buildings are already net of age."""
    earn = raw.get("earn", {})
    if earn.get("series", "as_new") == "same_buildings":
        return None
    wear: Row | None = earn.get("depreciation")
    return wear


def market_index(raw: dict[str, Any]) -> list[float]:
    """Index of market rent by year."""
    return growth_index(raw.get("earn", {}).get("growth"), wear_of(raw))


def net_growth(raw: dict[str, Any], year: int) -> float:
    """Factor of market rent from a year to the next."""
    growth = raw.get("earn", {}).get("growth")
    return (1 + row_value(growth, year)) * (1 - row_value(wear_of(raw), year))


def dated_lease(lease: dict[str, Any], space: dict[str, Any], closing: int) -> DatedLease:
    """Days of a lease, up to its end or the tenant's break."""
    first, last = day_of(lease["start"]), day_of(lease["end"])
    if lease.get("break_date"):
        last = min(last, day_of(lease["break_date"]))
    steps = [
        (day_of(step["date"]), step.get("amount"), step.get("change") or 0.0)
        for step in lease.get("steps", [])
    ]
    return DatedLease(
        first=first,
        last=last,
        amount=lease["rent"]["amount"],
        factor=monthly_factor(lease["rent"], space),
        # A step on or before closing is in the rent entered.
        steps=sorted((s for s in steps if s[0] > closing), key=lambda s: s[0]),
        free_before=add_months(max(closing, first), lease.get("free_months", 0)),
    )


def rent_on(lease: DatedLease, day: int) -> float:
    """Monthly rent in force on a day."""
    amount = lease.amount
    for date, new_amount, change in lease.steps:
        if date <= day:
            amount = new_amount if new_amount is not None else amount * (1 + change)
    return amount * lease.factor


def add_undated(roll: Roll, rent: float, market: list[float]) -> None:
    """A twelfth reaches its first market month at each of months 1 … 12; all expected."""
    for month in range(MONTHS):
        at_market = min(month, 12) / 12
        roll.expected[month] += at_market * market[month] + (1 - at_market) * rent


def add_dated(
    roll: Roll, leases: dict[str, DatedLease], market: list[float], starts: list[int]
) -> None:
    """Each day of each month is let, empty (until the first whole month after) or at market."""
    at_market_from = first_whole_month_after(starts, max(x.last for x in leases.values()))
    for month in range(MONTHS):
        days = starts[month + 1] - starts[month]
        for day in range(starts[month], starts[month + 1]):
            let = [k for k, x in leases.items() if x.first <= day <= x.last]
            if let:
                lease = leases[let[0]]
                rent = rent_on(lease, day) / days
                roll.in_hand[month] += rent
                if day < lease.free_before:
                    roll.concessions[month] += rent
                roll.market_of_let[month] += market[month] / days
                roll.under[let[0]][month] += 1 / days
            else:
                roll.expected[month] += market[month] / days
                if month < at_market_from:
                    roll.empty_time[month] += market[month] / days


def add_penalties(roll: Roll, space: dict[str, Any], closing: int, starts: list[int]) -> None:
    """Penalty in the first whole month after the break; none for a break before closing."""
    for lease in space.get("leases", []):
        if lease.get("break_date") and day_of(lease["break_date"]) >= closing:
            month = first_whole_month_after(starts, day_of(lease["break_date"]))
            if month < MONTHS:
                roll.penalties[month] += lease.get("break_penalty", 0.0)


def rent_roll(raw: dict[str, Any]) -> Roll:
    """The rent of every space, month by month for 41 years."""
    closing = closing_of(raw)
    starts = month_starts(closing)
    index = market_index(raw)
    roll = Roll()
    for space in raw.get("spaces", []):
        today = space["market_rent"]["amount"] * monthly_factor(space["market_rent"], space)
        market = [today * index[year_of(month)] for month in range(MONTHS)]
        for month in range(MONTHS):
            roll.market[month] += market[month]
        leases = space.get("leases", [])
        dated = {x["id"]: dated_lease(x, space, closing) for x in leases if x.get("start")}
        for key in dated:
            roll.under[key] = nil()
        if dated:
            add_dated(roll, dated, market, starts)
        elif leases:
            rent = leases[0]["rent"]
            add_undated(roll, rent["amount"] * monthly_factor(rent, space), market)
        else:
            for month in range(MONTHS):
                roll.expected[month] += market[month]
        add_penalties(roll, space, closing, starts)
    return roll
