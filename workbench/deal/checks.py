"""Everything that can be wrong in a deal that was read whole: a list of issues, never an error."""

import datetime
from collections.abc import Iterator, Sequence
from itertools import chain
from typing import Any

from workbench.deal.checks_leases import check_spaces
from workbench.deal.checks_records import check_records
from workbench.deal.checks_sections import check_sections
from workbench.deal.deal import Deal
from workbench.deal.inputs import DAYS, YEARS, Leaf, leaves
from workbench.deal.issues import Issue


def check(deal: Deal) -> list[Issue]:
    """All issues of a deal, single inputs first, then what does not fit together."""
    return [
        *chain.from_iterable(map(_check_leaf, leaves(deal))),
        *check_spaces(deal),
        *check_sections(deal),
        *check_records(deal),
    ]


def _check_leaf(leaf: Leaf) -> Iterator[Issue]:
    if leaf.field.is_row:
        yield from _check_row(leaf)
    elif leaf.value is None or leaf.value == "":
        if leaf.input.needed:
            yield Issue(leaf.path, "missing", None, *_bounds(leaf, leaf.value))
    elif isinstance(leaf.value, str):
        if leaf.input.high is not None and len(leaf.value) > leaf.input.high:
            yield Issue(leaf.path, "too_long", len(leaf.value), None, leaf.input.high)
    elif isinstance(leaf.value, datetime.date):
        if not DAYS[0] <= leaf.value <= DAYS[1]:
            other = {"first": DAYS[0], "last": DAYS[1]}
            yield Issue(leaf.path, "no_such_day", leaf.value, other=other)
    else:
        yield from _check_range(leaf, leaf.path, leaf.value)


def _check_row(leaf: Leaf) -> Iterator[Issue]:
    row = leaf.value
    if row is None:
        return
    if 1 not in row and (row or leaf.input.needed):
        low, high = _bounds(leaf, row)
        yield Issue(f"{leaf.path}.1", "missing", None, low, high)
    for year, value in row.items():
        if not 1 <= year <= YEARS:
            yield Issue(f"{leaf.path}.{year}", "no_such_year", year, 1, YEARS)
        yield from _check_range(leaf, f"{leaf.path}.{year}", value)


def _check_range(leaf: Leaf, path: str, value: float) -> Iterator[Issue]:
    low, high = _bounds(leaf, value)
    if (low is not None and not value >= low) or (high is not None and not value <= high):
        yield Issue(path, "out_of_range", value, low, high)


def _bounds(leaf: Leaf, value: Any) -> tuple[float | None, float | None]:
    """The declared range; a fraction of income or price is held to 0…1 though it sits in money."""
    if leaf.input.unit == "money" and is_fraction(leaf.owner, leaf.field.name):
        return 0.0, 1.0
    return leaf.input.low, leaf.input.high


def is_fraction(owner: Any, name: str) -> bool:
    """Whether an amount is a fraction by the basis beside it (share of income or of price)."""
    basis = getattr(owner, "reserves_basis" if name == "reserves" else "basis", None)
    return name in ("amount", "reserves") and basis in ("egi", "price")


def faulty(issues: Sequence[Issue]) -> dict[str, Issue]:
    """The first issue of each path, for whoever must do without the value."""
    found: dict[str, Issue] = {}
    for issue in issues:
        found.setdefault(issue.path, issue)
    return found
