"""Lines of cost: expenses, reserves and their account, works, and what is left."""

from collections.abc import Iterator

from workbench.engine.formula import (
    Fact,
    Formula,
    Given,
    Line,
    before,
    greatest,
    least,
    of_year,
    running_least,
    running_sum,
    total,
    where,
)
from workbench.engine.lines.earn import NOTHING, index, scale, stated
from workbench.engine.lines.line import Declared
from workbench.engine.shape import ExpenseShape, Shape

INCOME = Line("effective_gross_income")
OPENING = Given("spend.reserves_opening")


def spend_lines(shape: Shape) -> Iterator[Declared]:
    yield from _expenses(shape)
    yield from _reserves(shape)
    yield from _works(shape)
    yield from _net(shape)
    yield from _tiers()


def _expenses(shape: Shape) -> Iterator[Declared]:
    for one in shape.expenses:
        yield Declared(
            f"expense@{one.id}",
            "Expense",
            "money",
            "month",
            _expense_words(one),
            -_expense(one),
            sign=-1,
        )
    yield Declared(
        "operating_expenses",
        "Operating expenses",
        "money",
        "month",
        "all expense lines; no debt service, income tax, depreciation or capital works",
        total([Line(f"expense@{one.id}") for one in shape.expenses]),
        sign=-1,
    )


def _expense_words(one: ExpenseShape) -> str:
    if one.stated:
        return "the stated amount, a twelfth each month"
    if one.basis == "egi":
        return "a share of the month's effective gross income"
    return "amount a year, grown, a twelfth each month"


def _expense(one: ExpenseShape) -> Formula:
    path = f"expenses@{one.id}"
    if one.stated:
        return stated(f"{path}.stated")
    if one.basis == "egi":
        return Given(f"{path}.amount") * INCOME
    growth = Given(f"{path}.growth") if one.own_growth else Given("spend.growth")
    return Given(f"{path}.amount") * scale(one.basis) / 12 * of_year(index(growth))


def _reserves(shape: Shape) -> Iterator[Declared]:
    paid: Formula = Given("spend.reserves")
    if shape.reserves_basis == "egi":
        paid = paid * INCOME
    else:
        growth = of_year(index(Given("spend.reserves_growth")))
        paid = paid * scale(shape.reserves_basis) / 12 * growth
    yield Declared(
        "reserves",
        "Reserves",
        "money",
        "month",
        {
            "spent": "put aside for works that are not listed, and spent",
            "account": "paid into the reserve account",
            "nil": "nil: an exit by perpetuity has no reserve account",
        }[shape.account],
        NOTHING if shape.account == "nil" else -paid,
        sign=-1,
    )


def _works(shape: Shape) -> Iterator[Declared]:
    grown = Fact("works_today") * of_year(index(Given("spend.works_growth")))
    yield Declared(
        "works_before_account",
        "Works",
        "money",
        "month",
        "dated works; those in today's money are grown to their year",
        -(Fact("works") + grown),
        sign=-1,
    )
    yield from _account(shape)


def _account(shape: Shape) -> Iterator[Declared]:
    """The balance after payment p and need w is max(0, balance before + p − w), all at once."""
    gross = Line("works_before_account")
    drawn: Formula = NOTHING
    if shape.account == "account":
        yield Declared(
            "reserve_path",
            "Reserve account, had it been allowed below nothing",
            "money",
            "month",
            "opening balance plus all payments less all works so far",
            OPENING + running_sum(gross - Line("reserves")),
            standing=True,
        )
        path = Line("reserve_path")
        yield Declared(
            "reserve_balance",
            "Reserve balance",
            "money",
            "month",
            "what the account holds at the month's end: each payment goes in first, then works "
            "draw on it as far as it reaches; no interest",
            path - least(0, running_least(path)),
            standing=True,
        )
        held = before(Line("reserve_balance"), OPENING) - Line("reserves")
        drawn = least(-gross, held)
    yield Declared(
        "works",
        "Works net of the reserve account",
        "money",
        "month",
        "dated works less what the reserve account pays of them",
        gross + drawn,
        sign=-1,
    )


def _net(shape: Shape) -> Iterator[Declared]:
    yield Declared(
        "noi",
        "Net operating income, reserves above"
        if shape.reserves_above
        else "Net operating income, reserves below",
        "money",
        "month",
        "effective gross income less operating expenses"
        + (" and reserves" if shape.reserves_above else "; reserves are deducted after it"),
        INCOME + Line("operating_expenses") + (Line("reserves") if shape.reserves_above else 0),
    )
    yield Declared(
        "net_cash_flow",
        "Net cash flow before debt",
        "money",
        "month",
        "effective gross income less expenses, reserves, and works net of the account",
        INCOME + Line("operating_expenses") + Line("reserves") + Line("works"),
    )
    reserves = Line("reserves") if shape.account == "spent" else NOTHING
    yield Declared(
        "net_cash_flow_without_account",
        "Net cash flow without a reserve account",
        "money",
        "month",
        "as net cash flow before debt, with works deducted when they fall and no reserve account",
        INCOME + Line("operating_expenses") + reserves + Line("works_before_account"),
    )


def _tiers() -> Iterator[Declared]:
    part = Line("effective_income_in_hand") / INCOME
    yield Declared(
        "share_of_costs_in_hand",
        "Share of costs that falls on rent in hand",
        "fraction",
        "month",
        "in-hand part of effective gross income, held to 0…1; nil where that income is not "
        "positive",
        where(INCOME <= 0, 0, greatest(0, least(1, part))),
    )
    yield Declared(
        "cash_in_hand",
        "Net cash flow in hand",
        "money",
        "month",
        "effective gross income in hand after its share of expenses, reserves and works",
        Line("effective_income_in_hand")
        + Line("share_of_costs_in_hand")
        * (Line("operating_expenses") + Line("reserves") + Line("works")),
    )
    yield Declared(
        "cash_expected",
        "Net cash flow expected",
        "money",
        "month",
        "what is left of net cash flow before debt",
        Line("net_cash_flow") - Line("cash_in_hand"),
    )
