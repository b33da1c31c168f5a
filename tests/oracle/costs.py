"""Expenses, reserves and works by month, and the net cash flow in two tiers."""

from dataclasses import dataclass, field
from typing import Any

from tests.oracle.income import Income, quantity, stated_month
from tests.oracle.months import (
    MONTHS,
    day_of,
    growth_index,
    month_holding,
    month_starts,
    nil,
    year_of,
)
from tests.oracle.rent import closing_of


@dataclass
class Flows:
    """Property flows by month; costs positive; `balance` of the account at the month's end."""

    expenses: list[float] = field(default_factory=nil)
    reserves: list[float] = field(default_factory=nil)
    works: list[float] = field(default_factory=nil)
    balance: list[float] = field(default_factory=nil)
    noi: list[float] = field(default_factory=nil)
    net: list[float] = field(default_factory=nil)
    net_in_hand: list[float] = field(default_factory=nil)


def expense_growth(raw: dict[str, Any], line: dict[str, Any]) -> list[float]:
    """The line's own growth, else that of all expenses."""
    return growth_index(line.get("growth") or raw.get("spend", {}).get("growth"))


def expenses_of(raw: dict[str, Any], income: Income) -> list[float]:
    """Operating expenses of each month."""
    total = nil()
    for line in raw.get("expenses", []):
        index = expense_growth(raw, line)
        basis = line.get("basis", "year")
        for m in range(MONTHS):
            if line.get("stated"):
                total[m] += stated_month(line["stated"], m)
            elif basis == "egi":
                total[m] += line["amount"] * income.egi[m]
            else:
                total[m] += line["amount"] * quantity(raw, basis) * index[year_of(m)] / 12
    return total


def reserves_of(raw: dict[str, Any], income: Income) -> list[float]:
    """Reserves of each month, paid in or spent."""
    spend = raw.get("spend", {})
    amount, basis = spend.get("reserves", 0.0), spend.get("reserves_basis", "year")
    index = growth_index(spend.get("reserves_growth"))
    if basis == "egi":
        return [amount * income.egi[m] for m in range(MONTHS)]
    times = quantity(raw, basis)
    return [amount * times * index[year_of(m)] / 12 for m in range(MONTHS)]


def works_of(raw: dict[str, Any]) -> list[float]:
    """Works in the month in which they fall; those in today's money grown to their year."""
    starts = month_starts(closing_of(raw))
    index = growth_index(raw.get("spend", {}).get("works_growth"))
    total = nil()
    for work in raw.get("works", []):
        month: int | None
        if work.get("date"):
            month = month_holding(starts, day_of(work["date"]))
        else:
            month = 12 * (work["year"] - 1) + work.get("month", 1) - 1
        if month is not None:
            grown = index[year_of(month)] if work.get("todays_money", False) else 1.0
            total[month] += work["amount"] * grown
    return total


def run_account(
    opening: float, payments: list[float], works: list[float]
) -> tuple[list[float], list[float]]:
    """Works left to pay and balances: a month's payment goes in before works draw on it."""
    shortfalls, balances = [], []
    balance = opening
    for payment, work in zip(payments, works, strict=True):
        balance += payment
        drawn = min(work, max(balance, 0.0))
        balance -= drawn
        shortfalls.append(work - drawn)
        balances.append(balance)
    return shortfalls, balances


def flows_of(raw: dict[str, Any], income: Income, account_allowed: bool) -> Flows:
    """Net operating income and net cash flow; without the account where it is not allowed."""
    spend = raw.get("spend", {})
    flows = Flows(expenses=expenses_of(raw, income), works=works_of(raw))
    if spend.get("reserves_use", "spent") == "spent":
        flows.reserves = reserves_of(raw, income)
    elif account_allowed:
        flows.reserves = reserves_of(raw, income)
        opening = spend.get("reserves_opening", 0.0)
        flows.works, flows.balance = run_account(opening, flows.reserves, flows.works)
    above = spend.get("reserves_place", "below") == "above"
    for m in range(MONTHS):
        costs = flows.expenses[m] + flows.reserves[m] + flows.works[m]
        flows.noi[m] = income.egi[m] - flows.expenses[m]
        if above:
            flows.noi[m] -= flows.reserves[m]
        flows.net[m] = income.egi[m] - costs
        held = 0.0
        if income.egi[m] > 0:
            held = min(1.0, max(0.0, income.egi_in_hand[m] / income.egi[m]))
        flows.net_in_hand[m] = income.egi_in_hand[m] - held * costs
    return flows
