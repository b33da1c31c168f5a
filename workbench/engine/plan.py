"""Compiling a deal: its shape's program, its inputs as rows, and the facts of roll and works."""

import datetime
import math
from collections.abc import Iterator, Mapping
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
    wrong = {path: one for path, one in faulty(issues).items() if one.code not in HARMLESS}
    blocked = dict(_blocked_facts(deal, wrong))
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
        head = path.partition("@")[0].partition(".")[0]
        if head in ("spaces", "leases", "steps"):
            for name in _ROLL:
                yield name, issue
        if head == "works":
            yield from (("works", issue), ("works_today", issue))
        if issue.code == "closing_date_needed":
            for name in (*_ROLL, "works", "works_today"):
                yield name, issue
        if issue.code == "areas_needed":
            yield "area", issue
        if issue.code == "no_such_lease":
            yield f"tied@{path.partition('@')[2].partition('.')[0]}", issue


_ROLL = (*KINDS, "market_total", "units")


def _facts(deal: Deal, blocked: Mapping[str, Issue]) -> dict[str, Floats]:
    """Everything the lines read that is not an input; not a number where an issue blocks it."""
    unknown = {name: np.full((MONTHS, 1), np.nan) for name in blocked}
    return {**CALENDAR, **_roll_facts(deal), **_works_facts(deal), **_tied(deal), **unknown}


def _roll_facts(deal: Deal) -> dict[str, Floats]:
    spaces = deal.spaces
    counts = [math.nan if space.count is None else float(space.count) for space in spaces]
    areas = [math.nan if space.area is None else space.area for space in spaces]
    market = [monthly(space, space.market_rent) for space in spaces]
    return {
        **scatter(pieces(spaces, deal.purchase.closing_date)),
        "market_total": _once(math.fsum(market)),
        "units": _once(math.fsum(counts)),
        "area": _once(math.fsum(count * area for count, area in zip(counts, areas, strict=True))),
    }


def _works_facts(deal: Deal) -> dict[str, Floats]:
    facts = {name: np.zeros((MONTHS, 1)) for name in ("works", "works_today")}
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


def _tied(deal: Deal) -> dict[str, Floats]:
    """For each income tied to a lease, the share of each month's days under it."""
    closing = deal.purchase.closing_date
    leases = {lease.id: lease for space in deal.spaces for lease in space.leases}
    facts = {}
    for one in deal.other_income:
        lease = leases.get(one.lease or "")
        if one.lease is not None:
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
