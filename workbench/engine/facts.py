"""Facts: what compiling the rent roll, the works and the calendar makes for the lines to read."""

import datetime
import math
from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass

import numpy as np

from workbench.deal.checks_leases import is_dated
from workbench.deal.deal import Deal
from workbench.deal.earn import Space
from workbench.deal.inputs import YEARS
from workbench.deal.issues import Issue
from workbench.deal.spend import Works
from workbench.engine.calendar import MONTHS, month_starts, position
from workbench.engine.roll import (
    KINDS,
    NO_PIECES,
    Floats,
    SpaceTable,
    lease_positions,
    monthly,
    scatter,
    share_of_months,
    tables,
)


def blocked_facts(deal: Deal, wrong: Mapping[str, Issue]) -> Iterator[tuple[str, Issue]]:
    """Which facts cannot be made, and the first issue that stands in the way."""
    for path, issue in wrong.items():
        head, _, item = path.partition(".")[0].partition("@")
        names: tuple[str, ...] = ()
        if head == "spaces":
            names = _space_facts(deal, item, path.partition(".")[2])
        elif head in ("leases", "steps"):
            names = (*KINDS, *(f"tied@{one.id}" for one in deal.other_income if one.lease == item))
        elif head == "works":
            names = _WORKS
        elif path == "purchase.closing_date":
            names = _dated_facts(deal)
        elif issue.code == "areas_needed":
            names = ("area",)
        elif issue.code == "no_such_lease":
            names = (f"tied@{item}",)
        yield from ((name, issue) for name in names)


def _space_facts(deal: Deal, item: str, field: str) -> tuple[str, ...]:
    """What hangs on a field of a space; an area counts for rents given by area alone."""
    if field == "area":
        space = next(one for one in deal.spaces if one.id == item)
        rents = (space.market_rent, *(lease.rent for lease in space.leases))
        by_area = any(rent.of == "area" for rent in rents)
        return (*KINDS, "market_total", "area") if by_area else ("area",)
    return (*KINDS, *_COUNTED) if field in ("", "count") else (*KINDS, "market_total")


def _dated_facts(deal: Deal) -> tuple[str, ...]:
    """What hangs on the closing date in this deal."""
    leases = any(is_dated(lease) for space in deal.spaces for lease in space.leases)
    works = any(one.date is not None for one in deal.works)
    tied = (f"tied@{one.id}" for one in deal.other_income if one.lease is not None)
    return (*(KINDS if leases else ()), *(_WORKS if works else ()), *tied)


@dataclass(frozen=True, eq=False)
class Facts:
    """The facts of a deal with the rent roll they came from, to be built on after an edit.

    `roll` has each space's pieces as a table; None where an issue stands in the way of them.
    """

    spaces: tuple[Space, ...]
    closing: datetime.date | None
    roll: tuple[SpaceTable, ...] | None
    values: Mapping[str, Floats]
    blocked: frozenset[str]


def facts_of(deal: Deal, blocked: frozenset[str], earlier: Facts | None = None) -> Facts:
    """Everything the lines read that is not an input; not a number where an issue blocks it.

    What is blocked is not computed at all: a faulty date may lie beyond any calendar. What earlier
    facts hold of the same spaces, as objects, is taken over.
    """
    spaces, closing = deal.spaces, deal.purchase.closing_date
    values = dict(CALENDAR)
    near = earlier if earlier is not None and earlier.closing == closing else None
    roll: tuple[SpaceTable, ...] | None = None
    if not blocked & frozenset(KINDS):
        roll = tables(spaces, closing, near.roll if near is not None else None)
        if near is None or roll is not near.roll:
            values |= scatter(np.concatenate([NO_PIECES, *(one.table for one in roll)], axis=1))
    if near is not None and (near.spaces is spaces or (roll is not None and roll is near.roll)):
        values |= {name: near.values[name] for name in _ROLL if name not in near.blocked}
    for name, of in _COUNTED.items():
        if name not in blocked and name not in values:
            values[name] = _once(of(deal))
    if not blocked & frozenset(_WORKS):
        values |= _works_facts(deal)
    values |= _tied(deal, blocked)
    for name in blocked:
        values[name] = _once(math.nan) if name in _COUNTED else np.full((MONTHS, 1), math.nan)
    return Facts(spaces, closing, roll, values, blocked)


def _market_total(deal: Deal) -> float:
    return math.fsum(monthly(space, space.market_rent) for space in deal.spaces)


def _units(deal: Deal) -> float:
    return math.fsum(space.count or math.nan for space in deal.spaces)


def _area(deal: Deal) -> float:
    return math.fsum((space.count or math.nan) * (space.area or math.nan) for space in deal.spaces)


_COUNTED: Mapping[str, Callable[[Deal], float]] = {
    "market_total": _market_total,
    "units": _units,
    "area": _area,
}
_ROLL = (*KINDS, *_COUNTED)
_WORKS = ("works", "works_today")


def _works_facts(deal: Deal) -> dict[str, Floats]:
    facts = {name: np.zeros((MONTHS, 1)) for name in _WORKS}
    for works in deal.works:
        month = _month_of(works, deal.purchase.closing_date)
        if month is not None and month < MONTHS:
            name = "works_today" if works.todays_money else "works"
            facts[name][month] += math.nan if works.amount is None else works.amount
    return facts


def _month_of(works: Works, closing: datetime.date | None) -> int | None:
    if works.date is not None and closing is not None:
        return int(position(month_starts(closing), works.date))
    return None if works.year is None else 12 * (works.year - 1) + works.month - 1


def _tied(deal: Deal, blocked: frozenset[str]) -> dict[str, Floats]:
    """For each income tied to a lease, the share of each month's days under it."""
    closing = deal.purchase.closing_date
    facts: dict[str, Floats] = {}
    tied = [one for one in deal.other_income if one.lease is not None]
    if not tied:
        return facts
    leases = {lease.id: lease for space in deal.spaces for lease in space.leases}
    for one in tied:
        lease = leases.get(one.lease or "")
        if lease is not None and closing is not None and f"tied@{one.id}" not in blocked:
            span = lease_positions(lease, month_starts(closing))
            facts[f"tied@{one.id}"] = share_of_months(*span)
    return facts


def _once(figure: float) -> Floats:
    return np.array([figure])


CALENDAR: Mapping[str, Floats] = {
    "month_number": np.arange(1.0, MONTHS + 1)[:, np.newaxis],
    "month_of_year": np.tile(np.arange(1.0, 13), YEARS)[:, np.newaxis],
    "date_years": (np.arange(MONTHS + 1) / 12)[:, np.newaxis],
}
