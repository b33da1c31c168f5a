"""Facts of roll, works and calendar, and what an issue stands in the way of."""

from dataclasses import replace
from typing import Any

import numpy as np
import pytest

from tests.engine.deals import (
    changed,
    day,
    deal,
    fullest,
    near,
    space,
    unknown_facts,
    unknown_inputs,
)
from workbench.deal.earn import Lease, Rent
from workbench.deal.spend import Works
from workbench.engine.calendar import MONTHS
from workbench.engine.facts import CALENDAR
from workbench.engine.plan import compile_deal
from workbench.engine.roll import KINDS

ROLL = frozenset(KINDS)
WORKS = frozenset({"works", "works_today"})
COUNTED = frozenset({"market_total", "units", "area"})


def test_facts_by_hand() -> None:
    facts = compile_deal(fullest()).facts
    assert facts["units"] == near([1 + 3])
    assert facts["area"] == near([50 + 3 * 20])
    assert facts["market_total"] == near([120 + 3 * 30])
    # 15 March 2028 lies in month 14; month 5 of year 2 is month 16.
    assert np.flatnonzero(facts["works"]).tolist() == [14] and facts["works"][14, 0] == 500
    assert np.flatnonzero(facts["works_today"]).tolist() == [16]
    # The lease runs for 36 months of the hold.
    assert facts["tied@i1"][:, 0].tolist() == [1.0] * 36 + [0.0] * (MONTHS - 36)
    assert facts["contract"][[0, 11, 12, 35, 36], 0] == near([100, 100, 110, 110, 0])
    assert all(fact.shape in ((MONTHS, 1), (1,), (MONTHS + 1, 1)) for fact in facts.values())


def test_works_of_one_month_add_up_and_late_ones_do_not_fall() -> None:
    several = (
        Works("w1", amount=5.0, year=1, month=12),
        Works("w2", amount=7.0, date=day("2027-12-31")),
        Works("w3", amount=1.0, date=day("2068-01-01")),
        Works("w4", amount=2.0, date=day("2067-12-31")),
    )
    works = compile_deal(replace(deal(), works=several)).facts["works"][:, 0]
    assert {month: works[month] for month in np.flatnonzero(works)} == {11: 12.0, 491: 2.0}


def test_the_calendar() -> None:
    number, month, years = (
        CALENDAR[name][:, 0] for name in ("month_number", "month_of_year", "date_years")
    )
    assert number.tolist() == list(range(1, MONTHS + 1))
    assert month[:14].tolist() == [*range(1, 13), 1, 2] and len(month) == MONTHS
    assert years[[0, 6, 12, MONTHS]].tolist() == [0.0, 0.5, 1.0, 41.0]


@pytest.mark.parametrize(
    ("path", "value", "blocked"),
    [
        ("spaces@s2.count", None, ROLL | COUNTED),
        ("spaces@s2.count", 0, ROLL | COUNTED),
        ("spaces@s1.market_rent.amount", None, ROLL | {"market_total"}),
        ("spaces@s1.market_rent.amount", -5.0, ROLL | {"market_total"}),
        # No rent is given by area, so that the rents stand.
        ("spaces@s2.area", -1.0, {"area"}),
        ("spaces@s2.area", None, {"area"}),
        ("leases@e1.rent.amount", None, ROLL | {"tied@i1"}),
        ("leases@e1.end", day("2025-01-01"), ROLL | {"tied@i1"}),
        ("leases@e1.end", None, ROLL | {"tied@i1"}),
        ("leases@e1.free_months", 500, ROLL | {"tied@i1"}),
        ("steps@p1.change", None, ROLL),
        ("steps@p1.date", None, ROLL),
        ("works@w1.amount", None, WORKS),
        ("works@w2.year", None, WORKS),
        ("works@w2.month", 13, WORKS),
        ("works@w1.date", day("2020-01-01"), WORKS),
        ("purchase.closing_date", None, ROLL | WORKS | {"tied@i1"}),
        ("purchase.closing_date", day("0999-01-01"), ROLL | WORKS | {"tied@i1"}),
        ("other_income@i1.lease", "e7", {"tied@i1"}),
    ],
)
def test_what_an_issue_stands_in_the_way_of(path: str, value: Any, blocked: set[str]) -> None:
    plan = compile_deal(changed(fullest(), {path: value}))
    assert unknown_facts(plan) == set(plan.blocked) == blocked
    assert all(issue in plan.issues for issue in plan.blocked.values())
    assert unknown_inputs(plan) == set()


@pytest.mark.parametrize("rent", ["spaces@s1.market_rent.of", "leases@e1.rent.of"])
def test_an_area_blocks_the_rents_that_are_given_by_area(rent: str) -> None:
    plan = compile_deal(changed(fullest(), {rent: "area", "spaces@s1.area": None}))
    assert set(plan.blocked) == ROLL | {"market_total", "area"}


def test_works_alone_need_the_closing_date_for_themselves() -> None:
    base = changed(replace(deal(), works=fullest().works), {"purchase.closing_date": None})
    assert set(compile_deal(base).blocked) == WORKS
    undated = replace(
        base, works=fullest().works[1:], spaces=(space(1.0, Lease("e1", rent=Rent(2.0))),)
    )
    assert not compile_deal(undated).blocked


def test_without_spaces_there_is_no_roll() -> None:
    plan = compile_deal(replace(deal(), spaces=()))
    assert [issue.code for issue in plan.issues] == ["no_spaces"]
    assert unknown_facts(plan) == set(plan.blocked) == ROLL | COUNTED


def test_two_issues_in_one_way_name_the_first() -> None:
    both = changed(fullest(), {"spaces@s1.count": None, "spaces@s2.count": -1})
    assert compile_deal(both).blocked["units"].path == "spaces@s1.count"
