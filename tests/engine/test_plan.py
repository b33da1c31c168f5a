"""Compiling a deal: inputs as rows, facts, and what an issue stands in the way of."""

from dataclasses import replace
from typing import Any

import numpy as np
import pytest

from tests.engine.deals import changed, day, deal, lease, near, space, with_loan
from tests.oracle.test_random_deals import drawn
from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, OtherIncome, Rent, Step
from workbench.deal.spend import Expense, Works
from workbench.engine.calendar import MONTHS
from workbench.engine.facts import CALENDAR
from workbench.engine.plan import HARMLESS, Plan, compile_deal, expand
from workbench.engine.roll import KINDS
from workbench.files.deal_file import deal_from_raw
from workbench.text.messages import ISSUES

ROLL = frozenset(KINDS)
WORKS = frozenset({"works", "works_today"})
COUNTED = frozenset({"market_total", "units", "area"})


def fullest() -> Deal:
    """A deal that reads every fact."""
    steps = (Step("p1", day("2028-01-01"), change=0.1),)
    let = lease("2026-01-01", "2029-12-31", 100.0, steps=steps)
    return replace(
        deal(space(120.0, let, area=50.0), space(30.0, identity="s2", area=20.0, count=3)),
        other_income=(
            OtherIncome("i1", amount=24.0, lease="e1"),
            OtherIncome("i2", amount=1.0, basis="unit"),
        ),
        expenses=(Expense("x1", amount=2.0, basis="area"), Expense("x2", amount=3.0)),
        works=(
            Works("w1", amount=500.0, date=day("2028-03-15")),
            Works("w2", amount=70.0, year=2, month=5, todays_money=True),
        ),
    )


def unknown_facts(plan: Plan) -> set[str]:
    return {name for name, fact in plan.facts.items() if np.isnan(fact).any()}


def unknown_inputs(plan: Plan) -> set[str]:
    return {path for path, given in plan.inputs.items() if np.isnan(given).any()}


# Year rows


@pytest.mark.parametrize(
    ("row", "bad", "years"),
    [
        ({1: 0.5}, (), {1: 0.5, 2: 0.5, 41: 0.5}),
        ({1: 0.5, 3: 0.7}, (), {1: 0.5, 2: 0.5, 3: 0.7, 41: 0.7}),
        # However they are typed; the last one extends for ever.
        ({41: 0.9, 3: 0.7, 1: 0.5}, (), {2: 0.5, 40: 0.7, 41: 0.9}),
        ({2: 0.7}, (), {1: None, 2: 0.7, 41: 0.7}),
        ({}, (), {1: None, 41: None}),
        # A faulty year is unknown until the next one typed.
        ({1: 0.5, 3: 99.0, 6: 0.7}, (3,), {2: 0.5, 3: None, 5: None, 6: 0.7}),
        # Years that are none are left out.
        ({1: 0.5, 42: 0.9, 0: 0.1}, (42, 0), {1: 0.5, 41: 0.5}),
    ],
)
def test_a_year_row_written_out(
    row: dict[int, float], bad: tuple[int, ...], years: dict[int, float | None]
) -> None:
    out = expand(row, set(bad))
    assert out.shape == (41, 1)
    cells = {year: out[year - 1, 0] for year in years}
    found = {year: None if np.isnan(cell) else cell for year, cell in cells.items()}
    assert found == years


# Inputs


def test_inputs_are_rows_or_single_figures() -> None:
    plan = compile_deal(with_loan(fullest()))
    for path in ("earn.vacancy", "loans@l1.rate", "returns.required", "other_income@i1.growth"):
        assert plan.inputs[path].shape == (41, 1)
    for path in ("leave.hold", "purchase.price", "expenses@x1.amount", "loans@l1.fee"):
        assert plan.inputs[path].shape == (1,)
    assert plan.inputs["leave.hold"].tolist() == [5.0]
    assert set(plan.inputs) == set(plan.program.givens)
    assert not plan.blocked
    assert unknown_inputs(plan) == unknown_facts(plan) == set()


@pytest.mark.parametrize(
    ("path", "value", "issue", "blocked"),
    [
        ("purchase.price", None, "purchase.price", "purchase.price"),
        ("purchase.price", -1.0, "purchase.price", "purchase.price"),
        ("leave.hold", 0, "leave.hold", "leave.hold"),
        ("leave.exit_yield", None, "leave.exit_yield", "leave.exit_yield"),
        ("earn.vacancy.3", 1.5, "earn.vacancy.3", "earn.vacancy"),
        ("earn.vacancy.1", None, "earn.vacancy.1", "earn.vacancy"),
        ("expenses@x1.amount", None, "expenses@x1.amount", "expenses@x1.amount"),
        ("loans@l1.rate.1", 7.0, "loans@l1.rate.1", "loans@l1.rate"),
    ],
)
def test_a_faulty_input_is_not_a_number(path: str, value: Any, issue: str, blocked: str) -> None:
    plan = compile_deal(changed(with_loan(fullest()), {path: value}))
    assert unknown_inputs(plan) == set(plan.blocked) == {blocked}
    assert plan.blocked[blocked].path == issue
    assert plan.blocked[blocked] in plan.issues
    assert unknown_facts(plan) == set()


def test_the_first_faulty_year_is_named_and_later_typed_years_stand() -> None:
    plan = compile_deal(changed(fullest(), {"earn.vacancy": {1: 0.1, 4: -1.0, 2: 3.0, 9: 0.2}}))
    row = plan.inputs["earn.vacancy"][:, 0]
    assert np.flatnonzero(np.isnan(row)).tolist() == [1, 2, 3, 4, 5, 6, 7]
    assert row[0] == 0.1 and row[8] == 0.2
    assert plan.blocked["earn.vacancy"].path == "earn.vacancy.2"


def test_an_input_that_is_not_read_blocks_nothing() -> None:
    plan = compile_deal(changed(fullest(), {"leave.rent_multiple": -4.0}))
    assert [issue.path for issue in plan.issues] == ["leave.rent_multiple"]
    assert "leave.rent_multiple" not in plan.inputs and not plan.blocked


def test_a_year_beyond_the_last_leaves_all_figures() -> None:
    plan = compile_deal(changed(fullest(), {"earn.vacancy": {1: 0.1, 55: 0.2}}))
    assert [issue.code for issue in plan.issues] == ["no_such_year"]
    assert unknown_inputs(plan) == set()
    assert (plan.inputs["earn.vacancy"] == 0.1).all()


def test_a_switch_is_no_number_of_the_plan() -> None:
    assert "earn.count_empty_time_once" not in compile_deal(fullest()).inputs


# Facts


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


# Issues that leave the figures


@pytest.mark.parametrize(
    ("path", "value", "code"),
    [
        ("property.name", "x" * 5001, "too_long"),
        ("next_id", 1, "id_ahead"),
        ("drafts", {"earn.vacancy.3": "5,,0"}, "draft"),
        ("conventions.currency", "Dollar", "bad_currency"),
        ("steps@p1.date", day("2031-01-01"), "outside_lease"),
        ("loans@l1.interest_only_months", 80, "longer_than_term"),
        ("loans@l1.term_months", 500, "longer_than_amortisation"),
    ],
)
def test_harmless_issues_block_nothing(path: str, value: Any, code: str) -> None:
    base = changed(with_loan(fullest(), term_months=60), {path: value})
    plan = compile_deal(base)
    assert code in {issue.code for issue in plan.issues} <= HARMLESS
    assert not plan.blocked
    assert unknown_inputs(plan) == unknown_facts(plan) == set()


def test_harmless_codes_are_codes() -> None:
    assert set(ISSUES) >= HARMLESS


def test_a_harmless_issue_does_not_hide_another_of_its_path() -> None:
    # The term is too long for the amortisation, and no term at all.
    plan = compile_deal(changed(with_loan(fullest()), {"loans@l1.term_months": 601}))
    assert {issue.code for issue in plan.issues} == {"out_of_range", "longer_than_amortisation"}
    assert set(plan.blocked) == {"loans@l1.term_months"}


def test_valid_random_deals_block_nothing() -> None:
    for raw in drawn(8500, 15):
        plan = compile_deal(deal_from_raw(raw))
        assert not plan.blocked
        assert unknown_inputs(plan) == set()
        # Without the area of each space there is no area; then nothing reads it.
        assert unknown_facts(plan) <= {"area"}


def test_an_empty_deal_compiles() -> None:
    plan = compile_deal(Deal())
    assert {"purchase.price", "leave.hold", "earn.vacancy", "returns.required"} <= set(plan.blocked)
    assert plan.deal == Deal()
