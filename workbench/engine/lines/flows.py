"""Lines of cash on dates: what is put in at closing, earned in between and taken out at the end."""

from collections.abc import Iterator

from workbench.engine.formula import (
    HOLD,
    Fact,
    Formula,
    Given,
    Line,
    Number,
    OnDate,
    OnDates,
    at_hold,
    month_starts,
    of_year,
    total,
    where,
    year_end,
    year_sum,
)
from workbench.engine.lines.line import Declared
from workbench.engine.shape import Shape

DEPOSITS = Given("purchase.deposits")
RETURNED = Given("purchase.escrows") + Given("purchase.working_capital")
CLOSING = Number(0.0)
MONTH = Fact("month_of_year")


def flow_lines(shape: Shape) -> Iterator[Declared]:
    yield from _sources_and_uses(shape)
    yield _dates(
        "unlevered_flows",
        "Flows before debt, by date",
        "price, purchase costs and initial works at closing; net cash flow at the deal's timing; "
        "the net exit at the end of the hold",
        OnDate(-Line("outlay"), CLOSING)
        + _on_dates(shape, _in_hold(Line("net_cash_flow")))
        + OnDate(Line("exit_net"), 12 * HOLD),
    )
    if not shape.loans:
        return
    yield Declared(
        "exit_to_equity",
        "Net exit after loans",
        "money",
        "once",
        "net exit less loan balances, with escrows and working capital back and deposits paid out",
        Line("exit_net") - at_hold(year_end(Line("loan_balance"))) + RETURNED - DEPOSITS,
    )
    loans = _in_hold(Line("debt_service") + Line("loan_repayment"))
    yield _dates(
        "levered_flows",
        "Flows after debt, by date",
        "cash to close; net cash flow at the deal's timing; loan payments so many months after "
        "closing; what the exit leaves after the loans",
        OnDate(-Line("equity"), CLOSING)
        + _on_dates(shape, _in_hold(Line("net_cash_flow")))
        + OnDates(loans, CLOSING)
        + OnDate(Line("exit_to_equity"), 12 * HOLD),
    )


def _dates(key: str, label: str, words: str, body: Formula) -> Declared:
    return Declared(key, label, "money", "date", words, body)


def _in_hold(months: Formula) -> Formula:
    return where(Fact("month_number") > 12 * HOLD, 0, months)


def _on_dates(shape: Shape, months: Formula) -> Formula:
    """Property flows on the dates that the deal's timing gives them."""
    if shape.timing == "month_end":
        return OnDates(months, CLOSING)
    if shape.timing == "month_start":
        return month_starts(months)
    year = of_year(year_sum(months))
    if shape.timing == "year_start":
        return month_starts(where(MONTH.is_(1), year, 0))
    return OnDates(where(MONTH.is_(12 if shape.timing == "year_end" else 6), year, 0), CLOSING)


def _sources_and_uses(shape: Shape) -> Iterator[Declared]:
    fees = [
        Given(f"loans@{one}.amount") * Given(f"loans@{one}.fee") + Given(f"loans@{one}.fee_amount")
        for one, *_ in shape.loans
    ]
    yield _once("loan_costs", "Loan costs", "fees of all loans", total(list(fees)))
    yield _once(
        "uses",
        "Uses of money at closing",
        "price, purchase costs, initial works, loan costs, escrows and working capital",
        Line("outlay") + Line("loan_costs") + RETURNED,
    )
    yield _once(
        "equity",
        "Cash to close",
        "uses less loans and deposits taken over",
        Line("uses") - Line("loan_amount") - DEPOSITS,
    )

    yield _once(
        "sources",
        "Sources of money at closing",
        "loans, deposits taken over and cash to close",
        Line("loan_amount") + DEPOSITS + Line("equity"),
    )


def _once(key: str, label: str, words: str, body: Formula) -> Declared:
    return Declared(key, label, "money", "once", words, body)
