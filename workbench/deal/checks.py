"""Everything that can be wrong in a deal that was read whole: a list of issues, never an error."""

import datetime
from collections.abc import Iterator, Sequence
from dataclasses import dataclass, replace
from itertools import chain
from typing import Any

from workbench.deal.checks_leases import check_space
from workbench.deal.checks_records import (
    check_ids,
    check_pictures,
    check_records,
    highest_id,
)
from workbench.deal.checks_sections import check_sections
from workbench.deal.deal import Deal
from workbench.deal.earn import Space
from workbench.deal.inputs import DAYS, YEARS, Leaf, leaves
from workbench.deal.issues import Issue


@dataclass(frozen=True)
class Checked:
    """The issues of a deal by part, so that after an edit only changed parts are looked at again.

    A space or the pictures are the same part as before where they are the same object.
    """

    deal: Deal
    spaces: tuple["CheckedSpace", ...]
    picture_issues: tuple[Issue, ...]
    roll_issues: tuple[Issue, ...]
    rest: tuple[Issue, ...]
    highest: tuple[int, str]
    """The highest number of the rent roll's ids, with that id."""

    @property
    def issues(self) -> tuple[Issue, ...]:
        """All issues of the deal, those of the rent roll last."""
        return (*self.rest, *self.picture_issues, *self.roll_issues)


@dataclass(frozen=True)
class CheckedSpace:
    """A space with its own issues and the highest number of its ids, with that id."""

    space: Space
    issues: tuple[Issue, ...]
    highest: tuple[int, str]


def check(deal: Deal) -> list[Issue]:
    """All issues of a deal."""
    return list(check_parts(deal).issues)


def check_parts(deal: Deal, earlier: Checked | None = None) -> Checked:
    """The issues of a deal by part, taking over what an earlier check found of the same objects."""
    if earlier is not None and deal.spaces is earlier.deal.spaces:
        spaces, roll, highest = earlier.spaces, earlier.roll_issues, earlier.highest
    else:
        spaces = _check_spaces(deal, earlier)
        roll = tuple(issue for one in spaces for issue in one.issues)
        highest = max((one.highest for one in spaces), default=(0, ""))
    if earlier is not None and deal.pictures is earlier.deal.pictures:
        pictures = earlier.picture_issues
    else:
        pictures = tuple(check_pictures(deal))
    outside = replace(deal, spaces=())
    rest = (
        *chain.from_iterable(map(_check_leaf, leaves(outside))),
        *(() if deal.spaces else (Issue("spaces", "no_spaces"),)),
        *check_sections(deal),
        *check_ids(deal.next_id, max(highest, highest_id(outside))),
        *check_records(deal),
    )
    return Checked(deal, spaces, pictures, roll, rest, highest)


def _check_spaces(deal: Deal, earlier: Checked | None) -> tuple[CheckedSpace, ...]:
    known = {id(one.space): one for one in earlier.spaces} if earlier is not None else {}
    return tuple(known.get(id(space)) or _checked_space(space) for space in deal.spaces)


def _checked_space(space: Space) -> CheckedSpace:
    single = chain.from_iterable(map(_check_leaf, leaves(space, f"spaces@{space.id}")))
    own = (int(space.id[1:]), space.id)
    return CheckedSpace(space, (*single, *check_space(space)), max(own, highest_id(space)))


def _check_leaf(leaf: Leaf) -> Iterator[Issue]:
    if leaf.field.is_row:
        yield from _check_row(leaf)
    elif leaf.value is None or leaf.value == "":
        if leaf.input.needed and not _is_stated(leaf):
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


def _is_stated(leaf: Leaf) -> bool:
    """Whether stated amounts stand in place of this one."""
    return leaf.field.name == "amount" and getattr(leaf.owner, "stated", None) is not None


def _check_row(leaf: Leaf) -> Iterator[Issue]:
    row = leaf.value
    if row is None:
        return
    if 1 not in row:
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
