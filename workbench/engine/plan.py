"""Compiling a deal: its shape's program, its inputs as rows, and the facts of roll and works."""

import datetime
import math
from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass
from itertools import pairwise

import numpy as np

from workbench.deal.checks import check, faulty
from workbench.deal.checks_leases import is_dated
from workbench.deal.deal import Deal
from workbench.deal.inputs import YEARS, YearRow, declared
from workbench.deal.issues import Issue
from workbench.deal.paths import locate, value_at
from workbench.deal.spend import Works
from workbench.engine.calendar import MONTHS, month_starts, position
from workbench.engine.printer import Program, program
from workbench.engine.roll import (
    KINDS,
    Floats,
    lease_positions,
    monthly,
    pieces,
    scatter,
    share_of_months,
)
from workbench.engine.shape import Shape, shape_of

HARMLESS = frozenset(
    {
        "too_long",
        "id_ahead",
        "draft",
        "path_lost",
        "bad_currency",
        "outside_lease",
        "longer_than_term",
        "longer_than_amortisation",
    }
)
"""Codes of issues that leave every figure as it is."""


@dataclass(frozen=True, eq=False)
class Plan:
    """A deal made ready: everything that does not change from trial to trial.

    `inputs` maps a key path to a row (41, 1) or a single figure (1,); `facts` likewise, months
    (492, 1). What an issue stands in the way of is not a number there; `blocked` maps it to the
    issue.
    """

    deal: Deal
    shape: Shape
    program: Program
    inputs: Mapping[str, Floats]
    facts: Mapping[str, Floats]
    issues: tuple[Issue, ...]
    blocked: Mapping[str, Issue]


def compile_deal(deal: Deal) -> Plan:
    """The plan of a deal. Any deal that was read whole compiles, whatever its issues."""
    shape = shape_of(deal)
    made = program(shape)
    issues = tuple(check(deal))
    wrong = faulty([one for one in issues if one.code not in HARMLESS])
    blocked: dict[str, Issue] = {}
    for name, issue in _blocked_facts(deal, wrong):
        blocked.setdefault(name, issue)
    facts = _facts(deal, blocked)
    inputs = {path: _given(deal, path, wrong, blocked) for path in made.givens}
    return Plan(deal, shape, made, inputs, facts, issues, blocked)


def _given(deal: Deal, path: str, wrong: Mapping[str, Issue], blocked: dict[str, Issue]) -> Floats:
    steps = locate(deal, path)
    value = value_at(deal, steps)
    owner = value_at(deal, steps[:-1])
    if declared(type(owner))[str(steps[-1])].is_row:
        bad = {year for year in value or {} if f"{path}.{year}" in wrong}
        named = (wrong.get(f"{path}.{year}") for year in sorted(bad | {1}))
        issue = next((one for one in named if one is not None), None)
        if issue is not None:
            blocked[path] = issue
        return expand(value or {}, bad)
    if path in wrong:
        blocked[path] = wrong[path]
        return np.array([np.nan])
    return np.array([math.nan if value is None else float(value)])


def expand(row: YearRow, bad: set[int] | frozenset[int] = frozenset()) -> Floats:
    """A year row written out, shape (41, 1): each year has the last value typed before it."""
    out = np.full((YEARS, 1), np.nan)
    years = sorted(year for year in row if 1 <= year <= YEARS)
    for year, following in pairwise([*years, YEARS + 1]):
        out[year - 1 : following - 1] = math.nan if year in bad else row[year]
    return out


def _blocked_facts(deal: Deal, wrong: Mapping[str, Issue]) -> Iterator[tuple[str, Issue]]:
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


def _facts(deal: Deal, blocked: Mapping[str, Issue]) -> dict[str, Floats]:
    """Everything the lines read that is not an input; not a number where an issue blocks it.

    What is blocked is not computed at all: a faulty date may lie beyond any calendar.
    """
    facts = dict(CALENDAR)
    if not blocked.keys() & KINDS:
        facts |= scatter(pieces(deal.spaces, deal.purchase.closing_date))
    facts |= {name: _once(of(deal)) for name, of in _COUNTED.items() if name not in blocked}
    if not blocked.keys() & _WORKS:
        facts |= _works_facts(deal)
    facts |= _tied(deal, blocked)
    for name in blocked:
        facts[name] = _once(math.nan) if name in _COUNTED else np.full((MONTHS, 1), math.nan)
    return facts


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


def _tied(deal: Deal, blocked: Mapping[str, Issue]) -> dict[str, Floats]:
    """For each income tied to a lease, the share of each month's days under it."""
    closing = deal.purchase.closing_date
    leases = {lease.id: lease for space in deal.spaces for lease in space.leases}
    facts = {}
    for one in deal.other_income:
        lease = leases.get(one.lease or "")
        if one.lease is not None and f"tied@{one.id}" not in blocked:
            facts[f"tied@{one.id}"] = np.zeros((MONTHS, 1))
            if lease is not None and is_dated(lease) and closing is not None:
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
