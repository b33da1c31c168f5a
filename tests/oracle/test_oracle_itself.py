"""The oracle's calendar, discounting, account, loans and rates, by hand.

No outside source: each expectation is the arithmetic written beside it.
"""

from datetime import date

import pytest

from tests.oracle.by_hand import near, near_list
from tests.oracle.costs import run_account
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


def test_the_reserve_account_by_hand() -> None:
    # 50 + 10 = 60. Then 60 + 10 − 100: all 70 drawn, 30 left to pay. Then 10 − 5, then 5 + 10.
    # The balances are Lindley's recursion B = max(0, B + payment − works).
    shortfalls, balances = run_account(50.0, [10.0] * 4, [0.0, 100.0, 5.0, 0.0])
    assert shortfalls == [0, 30, 0, 0]
    assert balances == [60, 0, 5, 15]


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
