"""From the rent roll to effective gross income, by month, with the part that is in hand."""

from dataclasses import dataclass, field
from typing import Any

from tests.oracle.months import LAST_YEAR, MONTHS, Row, growth_index, nil, row_value, year_of
from tests.oracle.rent import Roll


@dataclass
class Income:
    """Amounts by month, all positive; `…_in_hand` is the part of the tier in hand."""

    in_hand: list[float] = field(default_factory=nil)
    expected: list[float] = field(default_factory=nil)
    empty_time: list[float] = field(default_factory=nil)
    concessions: list[float] = field(default_factory=nil)
    concessions_in_hand: list[float] = field(default_factory=nil)
    other: list[float] = field(default_factory=nil)
    other_in_hand: list[float] = field(default_factory=nil)
    marked: list[float] = field(default_factory=nil)
    marked_in_hand: list[float] = field(default_factory=nil)
    allowance: list[float] = field(default_factory=nil)
    credit_loss: list[float] = field(default_factory=nil)
    egi: list[float] = field(default_factory=nil)
    egi_in_hand: list[float] = field(default_factory=nil)


def quantity(raw: dict[str, Any], basis: str) -> float:
    """How often an amount counts: once, for each unit, or for each measure of area."""
    spaces = raw.get("spaces", [])
    if basis == "unit":
        return float(sum(space["count"] for space in spaces))
    if basis == "area":
        return float(sum(space["count"] * space["area"] for space in spaces))
    return 1.0


def stated_month(row: Row, month: int) -> float:
    """A twelfth of the year's typed amount."""
    return row_value(row, year_of(month)) / 12


def take_rent(income: Income, raw: dict[str, Any], roll: Roll) -> None:
    """Rent, empty time and concessions, computed or stated."""
    stated = raw.get("stated", {})
    for m in range(MONTHS):
        income.in_hand[m] = roll.in_hand[m]
        income.expected[m] = roll.expected[m]
        income.empty_time[m] = roll.empty_time[m]
        income.concessions[m] = income.concessions_in_hand[m] = roll.concessions[m]
        if stated.get("rent"):
            total = stated_month(stated["rent"], m)
            income.in_hand[m] = min(roll.in_hand[m], total)
            income.expected[m] = total - income.in_hand[m]
            income.empty_time[m] = 0.0
            income.concessions[m] = income.concessions_in_hand[m] = 0.0
        if stated.get("empty_time"):
            income.empty_time[m] = stated_month(stated["empty_time"], m)
        if stated.get("concessions"):
            income.concessions[m] = stated_month(stated["concessions"], m)
            income.concessions_in_hand[m] = 0.0


def take_other(income: Income, raw: dict[str, Any], roll: Roll) -> None:
    """Other income lines; in hand only for the days under the lease a line is tied to."""
    for m in range(MONTHS):
        income.other[m] = roll.penalties[m]
    for line in raw.get("other_income", []):
        index = growth_index(line.get("growth"))
        for m in range(MONTHS):
            if line.get("stated"):
                amount = stated_month(line["stated"], m)
            else:
                times = quantity(raw, line.get("basis", "year"))
                amount = line["amount"] * times * index[year_of(m)] / 12
            held = roll.under[line["lease"]][m] * amount if line.get("lease") else 0.0
            income.other[m] += amount
            income.other_in_hand[m] += held
            if line.get("in_allowance", False):
                income.marked[m] += amount
                income.marked_in_hand[m] += held


def base_of(income: Income, month: int) -> float:
    """What the allowance is charged on: gross rent and marked other income."""
    return income.in_hand[month] + income.expected[month] + income.marked[month]


def take_allowance(income: Income, raw: dict[str, Any]) -> None:
    """Vacancy allowance, by the year where empty time is counted once, else by the month."""
    earn, stated = raw.get("earn", {}), raw.get("stated", {}).get("vacancy_allowance")
    for year in range(1, LAST_YEAR + 1):
        months = range(12 * year - 12, 12 * year)
        rate = row_value(earn.get("vacancy"), year)
        base = sum(base_of(income, m) for m in months)
        empty = sum(income.empty_time[m] for m in months)
        of_year = max(0.0, rate * base - empty)
        for m in months:
            if stated:
                income.allowance[m] = stated_month(stated, m)
            elif earn.get("count_empty_time_once", True):
                income.allowance[m] = of_year * base_of(income, m) / base if base else 0.0
            else:
                net = base_of(income, m) - income.empty_time[m]
                income.allowance[m] = max(0.0, rate * net)


def take_credit_loss(income: Income, raw: dict[str, Any]) -> None:
    """Credit loss of a month on that month's base net of empty time and concessions."""
    earn, stated = raw.get("earn", {}), raw.get("stated", {}).get("credit_loss")
    for m in range(MONTHS):
        net = base_of(income, m) - income.empty_time[m] - income.concessions[m]
        rate = row_value(earn.get("credit_loss"), year_of(m))
        income.credit_loss[m] = stated_month(stated, m) if stated else rate * net


def take_sums(income: Income) -> None:
    """Effective gross income, and its part in hand."""
    for m in range(MONTHS):
        charged = income.allowance[m] + income.credit_loss[m]
        income.egi[m] = (
            income.in_hand[m]
            + income.expected[m]
            - income.empty_time[m]
            - income.concessions[m]
            + income.other[m]
            - charged
        )
        # The charges follow the income charged: base net of empty time, before concessions.
        net = base_of(income, m) - income.empty_time[m]
        held = income.in_hand[m] + income.marked_in_hand[m]
        income.egi_in_hand[m] = (
            income.in_hand[m]
            - income.concessions_in_hand[m]
            + income.other_in_hand[m]
            - (charged * held / net if net > 0 else 0.0)
        )


def income_of(raw: dict[str, Any], roll: Roll) -> Income:
    """All income lines of the deal, by month for 41 years."""
    income = Income()
    take_rent(income, raw, roll)
    take_other(income, raw, roll)
    take_allowance(income, raw)
    take_credit_loss(income, raw)
    take_sums(income)
    return income
