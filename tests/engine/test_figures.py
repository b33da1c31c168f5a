"""The figures that leave the engine: which, from where, and the reasons of missing ones."""

from dataclasses import replace
from typing import Any

import pytest

from tests.engine.deals import changed, deal, evaluated, lease, near, space, with_loan
from tests.oracle.test_random_deals import drawn
from workbench.deal.borrow import Loan
from workbench.deal.deal import Deal
from workbench.deal.purchase import Purchase
from workbench.deal.spend import Expense
from workbench.engine.figures import NOT_YET, STATEMENT, Figure, Read, figures_of, read_figures
from workbench.files.deal_file import deal_from_raw


def read(base: Deal) -> dict[str, Read]:
    return {".".join(one.figure.place): one for one in read_figures(evaluated(base))}


def values(base: Deal) -> dict[str, Any]:
    return {place: one.value for place, one in read(base).items()}


def test_places_are_unique_and_none_lies_within_another() -> None:
    for raw in drawn(9200, 20):
        places = [figure.place for figure in figures_of(deal_from_raw(raw))]
        assert len(places) == len(set(places))
        inner = {place[:depth] for place in places for depth in range(1, len(place))}
        assert not inner & set(places)


def test_the_statement_is_in_order() -> None:
    places = [figure.place for figure in figures_of(deal()) if figure.place[0] == "statement"]
    assert places == [("statement", key) for key in STATEMENT]
    assert set(STATEMENT) > NOT_YET


def test_each_loan_has_its_figures() -> None:
    loans = (Loan("l1", amount=1.0, rate={1: 0.1}), Loan("l7", amount=2.0, rate={1: 0.1}))
    found = [one for one in figures_of(replace(deal(), loans=loans)) if one.place[0] == "loans"]
    assert [one.place[1:] for one in found] == [
        (loan, name)
        for loan in ("l1", "l7")
        for name in ("amount", "balance", "service", "interest")
    ]
    assert found[0] == Figure(("loans", "l1", "amount"), "loans@l1.amount", "given")
    assert found[5] == Figure(("loans", "l7", "balance"), "balance@l7", "year_end")


def test_a_deal_by_hand() -> None:
    base = with_loan(deal(), amount=600.0, rate={1: 0.1}, amortisation_months=None)
    base = replace(
        base,
        purchase=Purchase(price=1000.0, deposits=30.0, escrows=20.0, initial_works=50.0),
        expenses=(Expense("x1", amount=24.0),),
        conventions=replace(base.conventions, timing="year_end"),
    )
    base = changed(base, {"leave.hold": 2, "earn.vacancy.1": 0.1})
    found = values(base)
    # Rent 120, allowance 12, expenses 24: 84 a year; the exit at 84 ÷ 8 % = 1050.
    assert found["price"] == 1000 and found["hold_years"] == 2
    assert found["statement.rent_expected"] == near([120, 120])
    assert found["statement.vacancy_allowance"] == near([-12, -12])
    assert found["statement.operating_expenses"] == near([-24, -24])
    assert found["statement.noi"] == found["statement.net_cash_flow"] == near([84, 84])
    assert found["statement.recoveries"] == found["statement.leasing_costs"] == [0.0, 0.0]
    assert found["statement.debt_service"] == near([-60, -60])
    assert found["statement.cash_flow_after_debt"] == near([24, 24])
    assert (found["exit.price"], found["exit.net"]) == (near(1050), near(1050))
    assert (found["exit.yield"], found["exit.income"]) == (0.08, near(84))
    assert found["exit.present_value"] == found["tiers.exit"] == near(1050 / 1.21)
    assert found["stack.expected"] == near([84 / 1.1, 84 / 1.21])
    assert found["stack.in_hand"] == [0.0, 0.0]
    assert found["tiers.expected"] == near(84 / 1.1 + 84 / 1.21)
    worth = 84 / 1.1 + (84 + 1050) / 1.21
    assert found["value"] == near(worth)
    assert found["margin"] == found["npv.unlevered"] == near(worth - 1050)
    assert found["exit_value_share"] == near(1050 / 1.21 / worth)
    # 84 a year for ever at 10 % is worth 840, 840/1.21 of it after year 2.
    assert found["reference_share"] == near(1 / 1.21)
    assert found["ground_share"] == 0.0
    assert found["dscr.noi"] == found["dscr.ncf"] == near([1.4, 1.4])
    assert found["debt_yield"] == near([0.14, 0.14])
    assert found["loans.l1.balance"] == near([600, 600])
    assert found["loans.l1.service"] == found["loans.l1.interest"] == near([60, 60])
    # Cash to close: 1000 + 50 + 20 − 600 − 30.
    assert found["sources_uses.sources.equity"] == near(440)
    assert found["sources_uses.sources.deposits"] == 30
    assert found["sources_uses.sources.total"] == found["sources_uses.uses.total"] == near(1070)
    assert found["cash_on_cash"] == near([24 / 440, 24 / 440])
    assert found["break_even_occupancy.with_reserves"] == near((24 + 60) / 120)
    assert found["equity_multiple.unlevered"] == near((84 + 84 + 1050) / 1050)
    # Rent comes at the year's end, interest of 5 is due each month: out go 440 and 22 times 5,
    # back come 84 − 5 twice and 1050 − 600 + 20 − 30.
    assert found["equity_multiple.levered"] == near((79 * 2 + 440) / (440 + 110))
    assert found["measures.going_in_yield"] == near(0.084)
    assert found["measures.yield_on_cost"] == near(0.08)
    assert found["measures.gross_rent_multiple"] == near(1000 / 120)
    assert found["measures.expense_ratio"] == near(24 / 108)
    assert found["measures.worst_cash_year"] == near(24)
    assert found["measures.payback"] == near(2)
    # The margin is below nothing, so that discounted flows never add up to the outlay.
    missing = {place: one.reasons for place, one in read(base).items() if one.value is None}
    assert {place: [why.code for _, why in reasons] for place, reasons in missing.items()} == {
        "measures.discounted_payback": ["not_paid_back"]
    }


def test_balances_are_those_of_the_years_end() -> None:
    base = with_loan(deal(), amount=600.0, rate={1: 0.0}, amortisation_months=120)
    assert values(base)["loans.l1.balance"] == near([540, 480, 420, 360, 300])


def test_rent_in_hand_makes_a_ground_share() -> None:
    found = values(deal(space(10.0, lease("2026-01-01", "2027-12-31", 10.0))))
    # 10 at the end of each month of year 1, at 10 % a year.
    worth = sum(10 / 1.1 ** (month / 12) for month in range(1, 13))
    assert found["stack.in_hand"][0] == near(worth)
    assert found["stack.in_hand"][1:] == [0.0] * 4
    assert found["ground_share"] == near(worth / 1000)


def test_without_a_loan_levered_figures_say_so() -> None:
    levered = ["irr.levered", "mirr.levered", "equity_multiple.levered", "npv.levered"]
    found = read(deal())
    for place in levered:
        assert found[place].value is None
        assert [(year, why.code) for year, why in found[place].reasons] == [(None, "no_loan")]
    assert found["dscr.noi"].value == [None] * 5
    assert [(year, why.code) for year, why in found["dscr.noi"].reasons] == [
        (year, "no_debt_service") for year in range(1, 6)
    ]


def test_years_are_those_of_the_hold() -> None:
    for hold, years in ((1, 1), (40, 40), (0, 0), (41, 0), (None, 0)):
        found = values(changed(deal(), {"leave.hold": hold}))
        assert len(found["statement.noi"]) == len(found["statement.recoveries"]) == years
        assert len(found["stack.in_hand"]) == years


def test_one_year_may_be_missing_alone() -> None:
    owing = changed(with_loan(deal()), {"loans@l1.term_months": 24})
    found = read(owing)["debt_yield"]
    assert [value is None for value in found.value] == [False, False, True, True, True]
    assert [(year, why.code) for year, why in found.reasons] == [
        (year, "no_loan_balance") for year in (3, 4, 5)
    ]


@pytest.mark.parametrize("price", [None, -1.0])
def test_an_input_that_is_missing_or_out_of_range(price: float | None) -> None:
    found = read(changed(deal(), {"purchase.price": price}))
    for place in ("price", "sources_uses.uses.price"):
        assert found[place].value is None
        ((year, why),) = found[place].reasons
        assert year is None and why.issue is not None and why.issue.path == "purchase.price"
    assert found["value"].value is not None
