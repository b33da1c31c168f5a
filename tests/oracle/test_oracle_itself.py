"""Small cases worked by hand: the oracle must first be right itself.

No outside source: each expectation is the arithmetic written beside it.
"""

from datetime import date
from typing import Any

import pytest

from tests.oracle.costs import run_account
from tests.oracle.income import income_of
from tests.oracle.loans import level_payment, schedule
from tests.oracle.measures import irr, mirr, multiple
from tests.oracle.months import (
    add_months,
    day_of,
    discount_table,
    exit_discount,
    first_whole_month_after,
    flow_date,
    growth_index,
    month_starts,
    row_value,
)
from tests.oracle.oracle import figures
from tests.oracle.rent import Roll, rent_roll


def near(value: float) -> Any:
    return pytest.approx(value, rel=1e-12, abs=1e-9)


def one_space(leases: list[dict[str, Any]], market: float, **more: Any) -> dict[str, Any]:
    """A deal closing on 1 January 2024 with one unit; market rent a month, no growth."""
    rent = {"amount": market, "per": "month"}
    space = {"id": "s1", "count": 1, "market_rent": rent, "leases": leases}
    deal: dict[str, Any] = {
        "schema": 1,
        "purchase": {"price": 1000.0, "closing_date": "2024-01-01"},
        "spaces": [space],
        "earn": {"vacancy": {"1": 0.0}},
        "leave": {"hold": 1, "exit_yield": 0.1},
        "returns": {"required": {"1": 0.1}},
    }
    return {**deal, **more}


def lease(start: str, end: str, amount: float, **more: Any) -> dict[str, Any]:
    return {
        "id": "e2",
        "start": start,
        "end": end,
        "rent": {"amount": amount, "per": "month"},
        **more,
    }


# Calendar


def test_days_past_a_months_end_clip_to_its_last_day() -> None:
    starts = [date.fromordinal(x).isoformat() for x in month_starts(day_of("2023-01-31"))[:14]]
    assert starts[:4] == ["2023-01-31", "2023-02-28", "2023-03-31", "2023-04-30"]
    # Counted from closing, not from the clipped month before; 2024 is a leap year.
    assert starts[11:] == ["2023-12-31", "2024-01-31", "2024-02-29"]
    assert add_months(day_of("2023-01-15"), -2) == day_of("2022-11-15")


@pytest.mark.parametrize(
    ("last_day", "month"),
    [("2024-03-14", 2), ("2024-03-15", 3), ("2024-01-15", 1), ("2024-01-14", 0), ("2020-01-01", 0)],
)
def test_first_whole_month_begins_after_the_last_day(last_day: str, month: int) -> None:
    # Months begin on the 15th: January 15 (0), February 15 (1), March 15 (2), …
    starts = month_starts(day_of("2024-01-15"))
    assert first_whole_month_after(starts, day_of(last_day)) == month


def test_an_absent_year_follows_the_last_one_typed() -> None:
    row = {"1": 0.05, "3": 0.07}
    assert [row_value(row, year) for year in (1, 2, 3, 42)] == [0.05, 0.05, 0.07, 0.07]
    # From year 1 to 2: 1.05 × 0.9; to 3 the same again; to 4: 1.07 × 0.9.
    index = growth_index(row, {"1": 0.1})
    assert index[1:5] == near_list([1, 0.945, 0.893025, 0.893025 * 0.963])


def near_list(values: list[float]) -> Any:
    return pytest.approx(values, rel=1e-12)


@pytest.mark.parametrize(
    ("timing", "months", "factor"),
    [
        ("month_end", 19, 1.2 ** (-7 / 12) / 1.1),
        ("month_start", 18, 1.2 ** (-6 / 12) / 1.1),
        ("year_end", 24, 1 / 1.32),
        ("mid_year", 18, 1.2**-0.5 / 1.1),
        ("year_start", 12, 1 / 1.1),
    ],
)
def test_discount_at_each_timing(timing: str, months: int, factor: float) -> None:
    # Month 18 is the seventh of year 2; r is 10 % in year 1 and 20 % in year 2.
    table = discount_table({"1": 0.1, "2": 0.2})
    assert flow_date(timing, 18) == months
    assert table[months] == near(factor)


def test_the_extra_return_acts_in_every_year() -> None:
    # 1 / (1.12 × 1.22)
    assert exit_discount({"1": 0.1, "2": 0.2}, 0.02, 2) == near(1 / 1.3664)


# Rent


def test_a_lease_that_ends_inside_a_month() -> None:
    roll = rent_roll(one_space([lease("2023-05-01", "2024-02-10", 2900.0)], 5800.0))
    assert (roll.in_hand[0], roll.expected[0]) == (near(2900), 0.0)
    # February 2024: 10 of 29 days let at 2900; 19 of 29 empty at a market rent of 5800.
    assert roll.in_hand[1] == near(1000)
    assert roll.expected[1] == roll.empty_time[1] == near(3800)
    assert (roll.in_hand[2], roll.expected[2], roll.empty_time[2]) == (0.0, near(5800), 0.0)
    # Market rent of the let days, for stabilised income: 10/29 × 5800.
    assert roll.market_of_let[1] == near(2000)


def test_before_and_between_leases_a_space_is_empty() -> None:
    first = lease("2024-01-16", "2024-01-31", 310.0)
    second = {**lease("2024-03-01", "2024-03-31", 400.0), "id": "e3"}
    roll = rent_roll(one_space([second, first], 620.0))
    # January: 15 of 31 days empty (300), 16 of 31 let (160). February: empty (620).
    assert (roll.empty_time[0], roll.in_hand[0]) == (near(300), near(160))
    assert (roll.empty_time[1], roll.in_hand[1]) == (near(620), 0.0)
    assert (roll.in_hand[2], roll.empty_time[2]) == (near(400), 0.0)
    assert (roll.expected[3], roll.empty_time[3]) == (near(620), 0.0)
    assert roll.under["e2"][0] == near(16 / 31)


def test_a_lease_that_ended_before_closing_leaves_market_rent() -> None:
    roll = rent_roll(one_space([lease("2020-01-01", "2023-12-31", 1.0)], 500.0))
    assert (roll.expected[0], roll.empty_time[0], roll.in_hand[0]) == (near(500), 0.0, 0.0)


def test_steps_by_days_and_in_the_leases_own_terms() -> None:
    steps = [
        {"id": "p5", "date": "2024-07-01", "amount": 1500.0},
        {"id": "p4", "date": "2024-04-16", "change": 0.1},
        {"id": "p3", "date": "2024-01-01", "change": 9.0},
    ]
    deal = one_space([lease("2023-01-01", "2030-12-31", 0.0, steps=steps)], 0.0)
    deal["spaces"][0] |= {"count": 2, "area": 3.0}
    # 1200 a year for each unit of area: 2 × 3 × 1200 / 12 = 600 a month. The step on the
    # closing date is in the rent entered.
    deal["spaces"][0]["leases"][0]["rent"] = {"amount": 1200.0, "per": "year", "of": "area"}
    rent = rent_roll(deal).in_hand
    # April: 15 days at 600 and 15 at 660; from July 6 × 1500 / 12 = 750.
    assert [rent[m] for m in (0, 3, 4, 6)] == near_list([600, 630, 660, 750])


def test_free_months_are_calendar_months_from_the_start() -> None:
    roll = rent_roll(one_space([lease("2024-01-16", "2024-02-20", 3100.0, free_months=1)], 0.0))
    # Free from 16 January to 15 February: 16/31 × 3100 = 1600, then 15/29 × 3100.
    assert roll.concessions[:2] == near_list([1600, 15 / 29 * 3100])
    assert roll.in_hand[1] == near(20 / 29 * 3100)


def test_free_months_left_count_from_closing_and_end_with_the_lease() -> None:
    roll = rent_roll(one_space([lease("2023-10-16", "2024-02-29", 100.0, free_months=9)], 0.0))
    assert roll.concessions[:3] == near_list([100, 100, 0])
    assert sum(roll.in_hand) == near(200)


def test_a_break_ends_the_lease_and_its_penalty_falls_in_the_first_whole_month() -> None:
    broken = lease("2023-01-01", "2030-12-31", 310.0, break_date="2024-03-10", break_penalty=77.0)
    roll = rent_roll(one_space([broken], 620.0))
    # March: 10 of 31 days let (100), 21 of 31 empty (420); month 3 follows the break.
    assert (roll.in_hand[2], roll.empty_time[2]) == (near(100), near(420))
    assert [m for m, x in enumerate(roll.penalties) if x] == [3]
    broken["break_date"] = "2023-12-31"
    past = rent_roll(one_space([broken], 620.0))
    assert (sum(past.penalties), past.expected[0], past.empty_time[0]) == (0, near(620), 0)


def test_undated_units_reach_the_market_by_twelfths() -> None:
    undated = {"id": "e2", "rent": {"amount": 1200.0, "per": "month"}}
    deal = one_space([undated], 2400.0)
    deal["earn"]["growth"] = {"1": 0.5}
    roll = rent_roll(deal)
    # Month 3: 3/12 × 2400 + 9/12 × 1200; month 12 all at 2400 × 1.5.
    assert [roll.expected[m] for m in (0, 3, 12)] == near_list([1200, 1500, 3600])
    assert sum(roll.in_hand) == sum(roll.empty_time) == 0


# Allowance, credit loss, other income


def half_let() -> dict[str, Any]:
    """Rent 100 from March on; January and February empty at a market rent of 60."""
    tied = {"id": "i3", "amount": 240.0, "in_allowance": True, "lease": "e2"}
    deal = one_space([lease("2024-03-01", "2030-12-31", 100.0)], 60.0, other_income=[tied])
    deal["earn"] = {"vacancy": {"1": 0.2}, "credit_loss": {"1": 0.01}}
    return deal


def test_allowance_counting_empty_time_once() -> None:
    deal = half_let()
    income = income_of(deal, rent_roll(deal))
    # Base 2 × 60 + 10 × 100 + 240 = 1360; 0.2 × 1360 − 120 = 152, spread like the base:
    # January 80/1360, March 120/1360.
    assert income.allowance[0] == near(152 * 80 / 1360)
    assert income.allowance[2] == near(152 * 120 / 1360)
    # Credit loss of January: 1 % of 80 − 60 = 20; of March 1 % of 120.
    assert (income.credit_loss[0], income.credit_loss[2]) == (near(0.2), near(1.2))
    # Tied income is expected before the lease and in hand under it.
    assert (income.other_in_hand[0], income.other_in_hand[2]) == (0, near(20))
    assert income.egi_in_hand[0] == 0
    march = 120 - 1.2 - 152 * 120 / 1360
    assert (income.egi_in_hand[2], income.egi[2]) == (near(march), near(march))


def test_allowance_never_negative_and_with_the_switch_off() -> None:
    deal = half_let()
    deal["earn"]["vacancy"] = {"1": 0.05}
    # 0.05 × 1360 = 68 is less than the empty time of 120.
    assert sum(income_of(deal, rent_roll(deal)).allowance[:12]) == 0
    deal["earn"]["count_empty_time_once"] = False
    income = income_of(deal, rent_roll(deal))
    # January: 5 % of 80 − 60; March: 5 % of 120.
    assert (income.allowance[0], income.allowance[2]) == (near(1), near(6))


def test_stated_lines_replace_the_computed_ones() -> None:
    deal = half_let()
    deal["stated"] = {"rent": {"1": 960.0}, "concessions": {"1": 12.0}, "credit_loss": {"1": 24.0}}
    income = income_of(deal, rent_roll(deal))
    # 80 a month: nothing in hand in January, the lease's rent up to 80 in March.
    assert (income.in_hand[0], income.expected[0]) == (0, near(80))
    assert (income.in_hand[2], income.expected[2]) == (near(80), 0)
    assert (income.empty_time[0], income.concessions[0], income.credit_loss[0]) == (0, 1, 2)
    # Stated concessions are expected: March in hand 80 + 20 less all of allowance and loss,
    # 0.2 × (960 + 240) / 12 = 20 and 2.
    assert income.egi_in_hand[2] == near(78)
    assert income.egi[2] == near(77)


def test_costs_follow_effective_gross_income() -> None:
    deal = half_let()
    deal["expenses"] = [{"id": "x4", "amount": 120.0}]
    deal["conventions"] = {"timing": "year_end"}
    deal["spaces"].append({"id": "s5", "count": 1, "market_rent": {"amount": 720.0}})
    deal["earn"] = {"vacancy": {"1": 0.0}}
    deal["purchase"]["price"] = 100.0
    made = figures(deal)
    # January, February: EGI 60 + 20, none in hand. From March 100 + 20 of 180 in hand, so
    # that 2/3 of 10 a month falls on it: 10 × (120 − 20/3); all at the end of year 1.
    held = 10 * (120 - 20 / 3) / 1.1
    assert made["tiers"]["in_hand"] == near(held)
    assert made["ground_share"] == near(held / 100)
    whole = (2 * 80 + 10 * 180 - 120) / 1.1
    assert made["stack"] == [{"year": 1, "in_hand": near(held), "expected": near(whole - held)}]


# Reserve account, loans, measures


def test_the_reserve_account_by_hand() -> None:
    # 50 + 10 = 60. Then 60 + 10 − 100: all 70 drawn, 30 left to pay. Then 10 − 5, then 5 + 10.
    # The balances are Lindley's recursion B = max(0, B + payment − works).
    shortfalls, balances = run_account(50.0, [10.0] * 4, [0.0, 100.0, 5.0, 0.0])
    assert shortfalls == [0, 30, 0, 0]
    assert balances == [60, 0, 5, 15]


def test_the_account_returns_at_the_exit_and_a_perpetuity_has_none() -> None:
    deal = one_space([], 100.0, works=[{"id": "w2", "amount": 500.0, "year": 1, "month": 6}])
    spend = {"reserves": 360.0, "reserves_use": "account", "reserves_opening": 20.0}
    deal["spend"] = spend
    made = figures(deal)
    # By month 6 the account holds 20 + 6 × 30 = 200: 300 of the works are left; 6 × 30 return.
    assert made["statement"]["works"] == [near(-300)]
    assert made["statement"]["reserves"] == [near(-360)]
    assert made["exit"]["net"] == near(1200 / 0.1 + 180)
    deal["leave"]["method"] = "perpetuity"
    made = figures(deal)
    assert (made["statement"]["works"], made["statement"]["reserves"]) == ([-500], [0])
    assert made["statement"]["net_cash_flow"] == [near(700)]


def test_a_level_loan_of_two_payments() -> None:
    # 1 % a month: 1000 × 0.01 / (1 − 1.01^−2) = 507.512…; first interest 10, second 1 % of
    # 1000 + 10 − payment; the second payment clears it.
    payment = 1000 * 0.01 / (1 - 1 / 1.0201)
    loan = {"id": "l1", "amount": 1000.0, "rate": {"1": 0.12}, "amortisation_months": 2}
    made = schedule(loan, 1)
    assert made.service[:3] == near_list([payment, payment, 0])
    assert made.interest[1] == near((1010 - payment) * 0.01)
    assert made.balance[1:] == [0.0] * 11
    assert level_payment(1200.0, 0.0, 12) == 100


def test_interest_only_then_level_then_a_new_rate_and_maturity() -> None:
    loan = {
        "id": "l1",
        "amount": 1000.0,
        "rate": {"1": 0.12, "2": 0.24},
        "interest_only_months": 11,
        "amortisation_months": 3,
        "term_months": 13,
    }
    made = schedule(loan, 2)
    first = 1000 * 0.01 / (1 - 1.01**-3)
    left = 1010 - first
    # In year 2 at 2 % a month over the two payments that remain.
    second = left * 0.02 / (1 - 1.02**-2)
    assert made.service[10:13] == near_list([10, first, second])
    # At maturity, month 13, what is left is repaid outside debt service.
    assert made.repayment[12] == near(left * 1.02 - second)
    assert made.balance[12:] == [0.0] * 12
    # At the end of the hold or later it is repaid from the sale.
    assert schedule({**loan, "term_months": 12}, 1).repayment == [0.0] * 12


def test_internal_rates_by_hand() -> None:
    # −100 and 121 after two years: 10 %.
    assert irr([-100.0, *[0.0] * 23, 121.0]) == near(0.1)
    # −1 + 2.3/(1+i) − 1.32/(1+i)² has the roots 10 % and 20 %: no single rate.
    assert irr([-1.0, *[0.0] * 11, 2.3, *[0.0] * 11, -1.32]) is None
    assert irr([1.0, *[0.0] * 11, 2.0]) is None


def test_modified_rate_and_multiple() -> None:
    flows = [-100.0, *[0.0] * 11, -11.0, *[0.0] * 11, 132.0]
    # Paid 100 + 11/1.1 = 110; received 132: (132/110)^½ − 1.
    assert mirr(flows, 2, 0.1, 0.5) == near(1.2**0.5 - 1)
    assert multiple(flows) == near(132 / 111)
    flows[6] = 10.0
    # 10 received after half a year grows at 50 % for a year and a half.
    assert mirr(flows, 2, 0.1, 0.5) == near(((132 + 10 * 1.5**1.5) / 110) ** 0.5 - 1)


# Exit and the whole


@pytest.mark.parametrize("hold", [1, 7, 40])
def test_perpetuity_in_advance_has_a_closed_form(hold: int) -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_start"})
    deal["earn"]["depreciation"] = {"1": 0.02}
    deal["returns"]["required"] = {"1": 0.05}
    deal["leave"] = {"hold": hold, "method": "perpetuity"}
    made = figures(deal)
    # P = Σ R ((1−δ)/(1+r))^k = 120 / (1 − 0.98/1.05), whatever the hold.
    q = 0.98 / 1.05
    assert made["value"] == near(120 / (1 - q))
    assert made["exit_value_share"] == made["reference_share"] == near(q**hold)
    assert made["exit"]["price"] == near(120 * 0.98**hold / (1 - q))


def test_closed_form_with_an_as_new_price() -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_start"})
    deal["earn"]["depreciation"] = {"1": 0.02}
    deal["returns"]["required"] = {"1": 0.05}
    deal["leave"] = {"hold": 3, "method": "purchase_price"}
    q = 0.98 / 1.05
    # Σ_{k<3} 120 q^k + 1000 q³: the price of today wears as the rent does.
    assert figures(deal)["value"] == near(120 * (1 + q + q * q) + 1000 * q**3)


@pytest.mark.parametrize(("growth", "refused"), [(0.1, True), (0.099, False)])
def test_a_perpetuity_is_refused_where_growth_reaches_the_return(
    growth: float, refused: bool
) -> None:
    deal = one_space([], 10.0)
    deal["earn"]["growth"] = {"1": 0.0, "41": growth}
    deal["leave"]["method"] = "perpetuity"
    made = figures(deal)
    assert (made["exit"]["price"] is None) == refused
    assert (made["reference_share"] is None) == refused
    assert made["statement"]["noi"] == [near(120)]


def test_a_perpetuity_moves_year_41_on() -> None:
    deal = one_space([], 100.0, conventions={"timing": "year_end"})
    deal["earn"]["growth"] = {"1": 0.0, "41": 0.05}
    deal["expenses"] = [{"id": "x2", "amount": 240.0}]
    deal["leave"] = {"hold": 40, "method": "perpetuity"}
    # Year 41: 1200 − 240 = 960. Year 42 and on: 960 × 1.05 at the rent's growth, worth
    # 960 × 1.05 / (0.10 − 0.05) at the end of year 41.
    assert figures(deal)["exit"]["price"] == near((960 + 960 * 1.05 / 0.05) / 1.1)


def test_negative_income_has_no_price_but_a_statement() -> None:
    deal = one_space([], 10.0, expenses=[{"id": "x2", "amount": 130.0}])
    made = figures(deal)
    assert (made["value"], made["margin"], made["exit"]["price"]) == (None, None, None)
    assert made["statement"]["noi"] == [near(-10)]
    deal["leave"] |= {"method": "amount", "amount": 0.0}
    assert figures(deal)["exit"]["price"] == 0


def test_stabilised_income_and_off_market_rent() -> None:
    deal = one_space([lease("2023-01-01", "2025-02-28", 100.0)], 80.0)
    deal["conventions"] = {"timing": "year_end"}
    deal["earn"]["credit_loss"] = {"1": 0.01}
    deal["other_income"] = [{"id": "i3", "amount": 60.0, "in_allowance": True}]
    deal["expenses"] = [{"id": "x4", "amount": 0.1, "basis": "egi"}, {"id": "x5", "amount": 100.0}]
    deal["leave"] |= {"exit_income": "stabilised", "stabilised_vacancy": 0.05}
    # Year 2: market 960, vacancy 5 % of 960 + 60 = 51, other 60, credit loss as modelled 1 % of
    # 2 × 100 + 10 × 80 + 60 = 10.6: EGI 958.4; less 10 % of that and 100: 762.56.
    # The lease pays 2 × (100 − 80) above market in year 2, worth 40 / 1.1 at the exit.
    made = figures(deal)["exit"]
    assert made["income"] == near(762.56)
    assert made["price"] == near(762.56 / 0.1 + 40 / 1.1)
    assert made["yield"] == 0.1
    # Year 1, for trailing income: the credit loss is 1 % of 1200 + 60.
    deal["leave"]["method"] = "trailing_noi"
    assert figures(deal)["exit"]["income"] == near((960 - 51 + 60 - 12.6) * 0.9 - 100)


def test_a_whole_deal_by_hand() -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_end"})
    deal["earn"]["vacancy"] = {"1": 0.25}
    deal["purchase"] |= {
        "costs": [{"id": "c2", "amount": 0.02, "basis": "price"}],
        "initial_works": 30.0,
        "escrows": 5.0,
        "working_capital": 7.0,
        "deposits": 4.0,
    }
    deal["leave"] |= {"exit_yield": 0.09, "selling_cost": 0.01}
    deal["returns"] |= {"extra_on_exit": 0.15, "equity": {"1": 0.2}}
    deal["loans"] = [{"id": "l3", "amount": 600.0, "rate": {"1": 0.06}, "fee": 0.01}]
    deal["spend"] = {"reserves": 6.0, "reserves_place": "above"}
    made = figures(deal)
    # 120 − 30 of allowance − 6 = NOI 84; exit 84 / 0.09, less 1 %, over 1.25.
    net = 84 / 0.09 * 0.99
    assert made["value"] == near(84 / 1.1 + net / 1.25)
    assert made["margin"] == made["npv"]["unlevered"] == near(84 / 1.1 + net / 1.25 - 1050)
    assert made["irr"]["unlevered"] == near((84 + net) / 1050 - 1)
    # Uses 1000 + 20 + 6 + 30 + 5 + 7 = 1068; equity 1068 − 600 − 4 = 464.
    assert made["sources_uses"]["uses"]["total"] == near(1068)
    assert made["sources_uses"]["sources"]["equity"] == near(464)
    # Interest of 3 each month; at the end 84 + net − 600 − 3 + 5 + 7 − 4.
    paid = sum(3 * 1.2 ** (-k / 12) for k in range(1, 12))
    assert made["npv"]["levered"] == near(-464 - paid + (84 + net - 595) / 1.2)
    # The interest of month 12 is netted with the receipts of that day.
    assert made["equity_multiple"]["levered"] == near((84 + net - 595) / (464 + 33))
    assert made["cash_on_cash"] == [near(48 / 464)]
    assert made["dscr"] == {"noi": [near(84 / 36)], "ncf": [near(84 / 36)]}
    assert made["debt_yield"] == [near(0.14)]
    assert made["break_even_occupancy"]["with_reserves"] == near((36 + 6) / 120)
    assert made["break_even_occupancy"]["without_reserves"] == near(36 / 120)


def test_an_empty_roll_holds_nothing() -> None:
    assert sum(Roll().expected) == 0
