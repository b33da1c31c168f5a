"""Loans by month: payments fall 1, 2, 3 … months after closing."""

from dataclasses import dataclass, field
from typing import Any

from tests.oracle.months import row_value, year_of


@dataclass(frozen=True)
class Schedule:
    """Interest, service, repayment at maturity and balance of payment 1 … 12N."""

    ident: str
    amount: float
    interest: list[float] = field(default_factory=list)
    service: list[float] = field(default_factory=list)
    repayment: list[float] = field(default_factory=list)
    balance: list[float] = field(default_factory=list)


def level_payment(balance: float, monthly_rate: float, payments: int) -> float:
    """The equal payment that repays a balance: B·i / (1 − (1+i)^−n)."""
    if monthly_rate == 0:
        return float(balance / payments)
    return float(balance * monthly_rate / (1 - (1 + monthly_rate) ** -payments))


def principal_due(loan: dict[str, Any], payment: int, balance: float, monthly_rate: float) -> float:
    """Scheduled principal of a payment: none in interest-only, the rest in the last one."""
    amortisation = loan.get("amortisation_months")
    interest_only = loan.get("interest_only_months", 0)
    if amortisation is None or payment <= interest_only or balance == 0:
        return 0.0
    left = interest_only + amortisation - payment + 1
    if left <= 1:
        return balance
    # The level payment is struck anew each time, so that a new rate recasts it by itself.
    return level_payment(balance, monthly_rate, left) - balance * monthly_rate


def maturity(loan: dict[str, Any], hold: int) -> int:
    """Months to maturity; a loan without amortisation or term runs to the sale."""
    if loan.get("term_months") is not None:
        return int(loan["term_months"])
    if loan.get("amortisation_months") is None:
        return 12 * hold
    return int(loan.get("interest_only_months", 0) + loan["amortisation_months"])


def schedule(loan: dict[str, Any], hold: int) -> Schedule:
    """Run a loan to the sale; a maturity at the sale or later is repaid out of it."""
    result = Schedule(loan["id"], loan["amount"])
    balance = loan["amount"]
    matures = maturity(loan, hold)
    for payment in range(1, 12 * hold + 1):
        rate = row_value(loan["rate"], year_of(payment - 1)) / 12
        interest = balance * rate
        principal = principal_due(loan, payment, balance, rate)
        balance -= principal
        repaid = balance if payment >= matures and payment < 12 * hold else 0.0
        balance -= repaid
        result.interest.append(interest)
        result.service.append(interest + principal)
        result.repayment.append(repaid)
        result.balance.append(balance)
    return result


def costs_of(loan: dict[str, Any]) -> float:
    """Fees at closing."""
    return float(loan.get("fee", 0.0) * loan["amount"] + loan.get("fee_amount", 0.0))
