"""Spaces and leases: dates in order, no overlap, rents that can be computed."""

import datetime
from collections.abc import Iterator
from itertools import pairwise

from workbench.deal.earn import Lease, Rent, Space, Step
from workbench.deal.issues import Issue


def is_dated(lease: Lease) -> bool:
    """Whether the lease has both its dates, so that its rent can be in hand."""
    return lease.start is not None and lease.end is not None


def check_space(space: Space) -> Iterator[Issue]:
    """What does not fit together within one space; nothing outside it matters."""
    yield from _check_rent(space, f"spaces@{space.id}.market_rent", space.market_rent)
    for lease in space.leases:
        yield from _check_lease(space, lease)
    yield from _check_order(space)
    undated = [lease for lease in space.leases if not is_dated(lease)]
    if undated and len(space.leases) > 1:
        yield Issue(f"leases@{undated[0].id}.start", "undated_beside_others")


def _check_rent(space: Space, path: str, rent: Rent) -> Iterator[Issue]:
    if rent.amount is None:
        yield Issue(f"{path}.amount", "missing", None, 0, 1e12)
    if rent.of == "area" and space.area is None:
        yield Issue(f"spaces@{space.id}.area", "area_needed", None, 0.01, 1e9)


def _check_lease(space: Space, lease: Lease) -> Iterator[Issue]:
    path = f"leases@{lease.id}"
    yield from _check_rent(space, f"{path}.rent", lease.rent)
    if (lease.start is None) != (lease.end is None):
        missing = "start" if lease.start is None else "end"
        yield Issue(f"{path}.{missing}", "date_missing", None)
    if lease.start is None or lease.end is None:
        if lease.break_date is not None:
            yield Issue(f"{path}.break_date", "needs_dated_lease", lease.break_date)
        if lease.steps:
            yield Issue(f"{path}.start", "steps_need_dates")
        return
    if lease.end < lease.start:
        yield Issue(f"{path}.end", "before_start", lease.end, other={"start": lease.start})
    if lease.break_date is not None and not lease.start <= lease.break_date < lease.end:
        yield Issue(
            f"{path}.break_date",
            "break_outside_lease",
            lease.break_date,
            other={"start": lease.start, "end": lease.end},
        )
    yield from _check_steps(lease, lease.start, lease.end)


def _check_steps(lease: Lease, start: datetime.date, end: datetime.date) -> Iterator[Issue]:
    seen: set[datetime.date] = set()
    for step in lease.steps:
        path = f"steps@{step.id}"
        yield from _check_step(step, path)
        if step.date is None:
            continue
        if not start <= step.date <= end:
            other = {"start": start, "end": end}
            yield Issue(f"{path}.date", "outside_lease", step.date, other=other)
        if step.date in seen:
            yield Issue(f"{path}.date", "same_date_twice", step.date)
        seen.add(step.date)


def _check_step(step: Step, path: str) -> Iterator[Issue]:
    if (step.amount is None) == (step.change is None):
        yield Issue(f"{path}.amount", "amount_or_change", step.amount)


def _check_order(space: Space) -> Iterator[Issue]:
    dated = sorted(
        ((lease.start, lease.end, lease) for lease in space.leases if lease.start and lease.end),
        key=lambda row: row[:2],
    )
    for (_, end, first), (start, _, second) in pairwise(dated):
        if start <= end:
            other = {"lease": first.id, "end": end}
            yield Issue(f"leases@{second.id}.start", "overlaps", start, other=other)
        elif first.break_date is not None:
            other = {"lease": second.id, "start": start}
            yield Issue(
                f"leases@{first.id}.break_date", "break_before_next", first.break_date, other=other
            )
