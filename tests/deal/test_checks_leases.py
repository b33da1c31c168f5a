"""Spaces and leases: what their dates, rents and steps must be to each other."""

from dataclasses import replace
from datetime import date, timedelta
from typing import Any

import pytest

from tests.fullest import fullest, small
from workbench.deal.changes import set_value
from workbench.deal.checks import check
from workbench.deal.checks_leases import is_dated
from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, Rent, Space, Step
from workbench.deal.issues import Issue

A_DAY = timedelta(days=1)
START, END = date(2024, 1, 1), date(2029, 6, 30)
RENT = Rent(1000.0)


def space(*leases: Lease, **more: Any) -> Space:
    return Space("s1", "Shop", count=1, area=100.0, market_rent=RENT, leases=leases, **more)


def lease(identity: str = "e2", start: date | None = START, end: date | None = END) -> Lease:
    return Lease(identity, "A", start, end, RENT)


def roll(*spaces: Space) -> Deal:
    """A deal that is sound but for its rent roll."""
    deal = set_value(replace(small(), next_id=99), "purchase.closing_date", START)
    return replace(deal, spaces=spaces)


def issues(*leases: Lease) -> list[Issue]:
    return check(roll(space(*leases)))


def test_sound_leases_have_no_issue() -> None:
    assert check(fullest()) == []
    assert issues() == []
    assert issues(lease()) == []


@pytest.mark.parametrize(
    ("start", "end", "expected"),
    [(START, END, True), (START, None, False), (None, END, False), (None, None, False)],
)
def test_a_lease_is_dated_by_both_dates(
    start: date | None, end: date | None, expected: bool
) -> None:
    assert is_dated(lease(start=start, end=end)) is expected


def test_a_deal_needs_a_space() -> None:
    assert check(roll()) == [Issue("spaces", "no_spaces")]


@pytest.mark.parametrize("path", ["spaces@s6.market_rent", "leases@e2.rent"])
def test_a_rent_needs_its_amount(path: str) -> None:
    found = check(set_value(fullest(), f"{path}.amount", None))
    assert found == [Issue(f"{path}.amount", "missing", None, 0, 1e12)]


def test_a_rent_by_area_needs_the_area() -> None:
    by_area = replace(space(), area=None, market_rent=Rent(10.0, "year", "area"))
    found = check(roll(by_area))
    assert found == [Issue("spaces@s1.area", "area_needed", None, 0.01, 1e9)]
    let = replace(space(replace(lease(), rent=Rent(10.0, "year", "area"))), area=None)
    assert check(roll(let)) == found


@pytest.mark.parametrize(("start", "end", "at"), [(START, None, "end"), (None, END, "start")])
def test_a_lease_has_both_dates_or_neither(start: date | None, end: date | None, at: str) -> None:
    found = issues(lease(start=start, end=end))
    assert found == [Issue(f"leases@e2.{at}", "date_missing")]


def test_a_break_needs_a_dated_lease() -> None:
    undated = replace(lease(start=None, end=None), break_date=END)
    assert issues(undated) == [Issue("leases@e2.break_date", "needs_dated_lease", END)]


def test_steps_need_a_dated_lease() -> None:
    undated = replace(lease(start=None, end=None), steps=(Step("p3", START, 5.0),))
    assert issues(undated) == [Issue("leases@e2.start", "steps_need_dates")]


def test_a_lease_ends_on_its_first_day_or_later() -> None:
    assert issues(lease(end=START)) == []
    ended = START - A_DAY
    expected = Issue("leases@e2.end", "before_start", ended, other={"start": START})
    assert issues(lease(end=ended)) == [expected]


@pytest.mark.parametrize(
    ("day", "sound"), [(START - A_DAY, False), (START, True), (END - A_DAY, True), (END, False)]
)
def test_a_break_lies_within_the_lease(day: date, sound: bool) -> None:
    found = issues(replace(lease(), break_date=day))
    other = {"start": START, "end": END}
    wrong = [Issue("leases@e2.break_date", "break_outside_lease", day, other=other)]
    assert found == ([] if sound else wrong)


@pytest.mark.parametrize(
    ("day", "sound"), [(START - A_DAY, False), (START, True), (END, True), (END + A_DAY, False)]
)
def test_a_step_lies_within_the_lease(day: date, sound: bool) -> None:
    found = issues(replace(lease(), steps=(Step("p3", day, change=0.02),)))
    other = {"start": START, "end": END}
    wrong = [Issue("steps@p3.date", "outside_lease", day, other=other)]
    assert found == ([] if sound else wrong)


def test_one_step_a_day() -> None:
    day = date(2026, 1, 1)
    steps = (Step("p3", day, 5.0), Step("p4", day + A_DAY, 6.0), Step("p5", day, 7.0))
    found = issues(replace(lease(), steps=steps))
    assert found == [Issue("steps@p5.date", "same_date_twice", day)]


def test_steps_without_a_date_are_not_on_the_same_day() -> None:
    steps = (Step("p3", None, 5.0), Step("p4", None, 6.0))
    assert {one.code for one in issues(replace(lease(), steps=steps))} == {"missing"}


@pytest.mark.parametrize(
    ("amount", "change", "sound"),
    [(None, None, False), (5.0, 0.02, False), (5.0, None, True), (None, 0.02, True)],
)
def test_a_step_is_an_amount_or_a_change(
    amount: float | None, change: float | None, sound: bool
) -> None:
    found = issues(replace(lease(), steps=(Step("p3", START, amount, change),)))
    assert found == ([] if sound else [Issue("steps@p3.amount", "amount_or_change", amount)])


@pytest.mark.parametrize("turned", [False, True])
def test_leases_of_a_space_do_not_overlap(turned: bool) -> None:
    """Whatever their order in the file."""
    second = lease("e3", END, END + 9 * A_DAY)
    both = (second, lease()) if turned else (lease(), second)
    other = {"lease": "e2", "end": END}
    assert issues(*both) == [Issue("leases@e3.start", "overlaps", END, other=other)]


def test_a_lease_may_begin_the_day_after() -> None:
    assert issues(lease(), lease("e3", END + A_DAY, END + 9 * A_DAY)) == []


def test_leases_with_the_same_dates_overlap() -> None:
    assert [one.code for one in issues(lease(), lease("e3"))] == ["overlaps"]


def test_leases_of_different_spaces_may_overlap() -> None:
    other = replace(space(lease("e3")), id="s9")
    assert check(roll(space(lease()), other)) == []


def test_only_the_last_lease_has_a_break() -> None:
    begun = END + A_DAY
    broken = replace(lease(), break_date=date(2027, 1, 1))
    found = issues(broken, lease("e3", begun, begun + A_DAY))
    other = {"lease": "e3", "start": begun}
    assert found == [
        Issue("leases@e2.break_date", "break_before_next", date(2027, 1, 1), other=other)
    ]


def test_an_undated_lease_stands_alone() -> None:
    undated = lease("e4", None, None)
    assert issues(undated) == []
    assert issues(lease(), undated) == [Issue("leases@e4.start", "undated_beside_others")]
    assert issues(undated, lease("e5", None, None)) == [
        Issue("leases@e4.start", "undated_beside_others")
    ]
