"""Yearly lines, sources and uses, and what a lender reads from them."""

from typing import Any

from tests.oracle.deal import Deal
from tests.oracle.loans import costs_of
from tests.oracle.measures import ratio
from tests.oracle.months import nil, sum_years


def sources_uses(deal: Deal) -> dict[str, Any]:
    """The table at closing, balanced by equity."""
    price = deal.money("price")
    costs = 0.0
    for cost in deal.raw["purchase"].get("costs", []):
        of_price = cost.get("basis", "amount") == "price"
        costs += cost["amount"] * price if of_price else cost["amount"]
    uses = {
        "price": price,
        "purchase_costs": costs,
        "loan_costs": sum((costs_of(loan) for loan in deal.raw.get("loans", [])), 0.0),
        "initial_works": deal.money("initial_works"),
        "escrows": deal.money("escrows"),
        "working_capital": deal.money("working_capital"),
    }
    uses["total"] = sum(uses.values())
    loans = sum((loan.amount for loan in deal.loans), 0.0)
    deposits = deal.money("deposits")
    sources = {
        "loans": loans,
        "deposits": deposits,
        "equity": uses["total"] - loans - deposits,
        "total": uses["total"],
    }
    return {"sources": sources, "uses": uses}


def loan_months(deal: Deal, line: str) -> list[float]:
    """A line of all loans together, by month, nought after the hold."""
    total = nil()
    for loan in deal.loans:
        for k, amount in enumerate(getattr(loan, line)):
            total[k] += amount
    return total


def statement(deal: Deal) -> dict[str, list[float]]:
    """Lines by year, signed as they add up."""
    income, flows = deal.income, deal.flows
    lines = {
        "rent_in_hand": (1, income.in_hand),
        "rent_expected": (1, income.expected),
        "empty_time": (-1, income.empty_time),
        "concessions": (-1, income.concessions),
        "recoveries": (1, nil()),
        "other_income": (1, income.other),
        "vacancy_allowance": (-1, income.allowance),
        "credit_loss": (-1, income.credit_loss),
        "effective_gross_income": (1, income.egi),
        "operating_expenses": (-1, flows.expenses),
        "noi": (1, flows.noi),
        "reserves": (-1, flows.reserves),
        "leasing_costs": (-1, nil()),
        "works": (-1, flows.works),
        "net_cash_flow": (1, flows.net),
        "debt_service": (-1, loan_months(deal, "service")),
        "loan_repayment": (-1, loan_months(deal, "repayment")),
    }
    result = {
        key: [sign * x for x in sum_years(monthly, deal.hold)]
        for key, (sign, monthly) in lines.items()
    }
    last = ("net_cash_flow", "debt_service", "loan_repayment")
    result["cash_flow_after_debt"] = [sum(result[key][t] for key in last) for t in range(deal.hold)]
    return result


def lender_view(deal: Deal, lines: dict[str, list[float]], equity: float) -> dict[str, Any]:
    """Cover, debt yield, cash-on-cash and the loans, by year."""
    service = [-x for x in lines["debt_service"]]
    opening = []
    for year in range(deal.hold):
        opening.append(sum(x.amount if year == 0 else x.balance[12 * year - 1] for x in deal.loans))
    after_debt = lines["cash_flow_after_debt"]
    return {
        "cash_on_cash": [x / equity if equity > 0 else None for x in after_debt],
        "dscr": {
            "noi": [ratio(x, s) for x, s in zip(lines["noi"], service, strict=True)],
            "ncf": [ratio(x, s) for x, s in zip(lines["net_cash_flow"], service, strict=True)],
        },
        "debt_yield": [ratio(x, b) for x, b in zip(lines["noi"], opening, strict=True)],
        "loans": [
            {
                "id": loan.ident,
                "amount": loan.amount,
                "bound_by": "typed",
                "balance": [loan.balance[12 * t + 11] for t in range(deal.hold)],
                "service": sum_years(loan.service, deal.hold),
                "interest": sum_years(loan.interest, deal.hold),
            }
            for loan in deal.loans
        ],
    }


def break_even(lines: dict[str, list[float]]) -> dict[str, float | None]:
    """Occupancy of year 1 at which income covers expenses and debt service."""
    income = ("rent_in_hand", "rent_expected", "recoveries", "other_income")
    gross = sum(lines[key][0] for key in income)
    costs = -lines["operating_expenses"][0] - lines["debt_service"][0]
    return {
        "with_reserves": ratio(costs - lines["reserves"][0], gross),
        "without_reserves": ratio(costs, gross),
    }
