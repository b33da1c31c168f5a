"""The figures that leave the program, each by its place in the record and the line behind it."""

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any, Literal, TypeAlias

from workbench.deal.deal import Deal
from workbench.engine.result import Reason, Result

How: TypeAlias = Literal["once", "year", "year_end", "given", "nothing"]

STATEMENT = (
    "rent_in_hand",
    "rent_expected",
    "empty_time",
    "concessions",
    "recoveries",
    "other_income",
    "vacancy_allowance",
    "credit_loss",
    "effective_gross_income",
    "operating_expenses",
    "noi",
    "reserves",
    "leasing_costs",
    "works",
    "net_cash_flow",
    "debt_service",
    "loan_repayment",
    "cash_flow_after_debt",
)
"""The lines of the statement, in order."""

NOT_YET = frozenset({"recoveries", "leasing_costs"})
"""Lines of the statement that this schema has no inputs for; they are nothing in every year."""

_MEASURES = (
    "payback",
    "discounted_payback",
    "profitability_index",
    "going_in_yield",
    "yield_on_cost",
    "gross_rent_multiple",
    "expense_ratio",
    "worst_cash_year",
)


@dataclass(frozen=True)
class Figure:
    """One place in the record: keys down to it, and the line or input it is read from.

    `how`: *once* a single figure, *year* one for each year of the hold with months summed,
    *year_end* the month at each year's end, *given* an input, *nothing* 0 in each year.
    """

    place: tuple[str, ...]
    key: str
    how: How


def figures_of(deal: Deal) -> Iterator[Figure]:
    """Every figure of the record, in the order of printing."""
    yield Figure(("price",), "purchase.price", "given")
    for key in ("value", "margin"):
        yield Figure((key,), key, "once")
    yield Figure(("hold_years",), "leave.hold", "given")
    for key in ("exit_value_share", "reference_share", "ground_share"):
        yield Figure((key,), key, "once")
    for tier, key in (
        ("in_hand", "value_in_hand"),
        ("expected", "value_expected"),
        ("exit", "exit_present_value"),
    ):
        yield Figure(("tiers", tier), key, "once")
    yield Figure(("stack", "in_hand"), "value_in_hand_of_year", "year")
    yield Figure(("stack", "expected"), "value_expected_of_year", "year")
    for name in ("price", "net", "present_value", "yield", "income"):
        yield Figure(("exit", name), f"exit_{name}", "once")
    for key in STATEMENT:
        yield Figure(("statement", key), key, "nothing" if key in NOT_YET else "year")
    yield from _measures(deal)
    for side, name, key, how in _CLOSING:
        yield Figure(("sources_uses", side, name), key, how)


def _measures(deal: Deal) -> Iterator[Figure]:
    for measure in ("irr", "mirr", "equity_multiple"):
        for side in ("unlevered", "levered"):
            yield Figure((measure, side), f"{measure}_{side}", "once")
    yield Figure(("npv", "unlevered"), "margin", "once")
    yield Figure(("npv", "levered"), "npv_levered", "once")
    yield Figure(("cash_on_cash",), "cash_on_cash", "year")
    yield Figure(("dscr", "noi"), "dscr_noi", "year")
    yield Figure(("dscr", "ncf"), "dscr_ncf", "year")
    yield Figure(("debt_yield",), "debt_yield", "year")
    for loan in deal.loans:
        yield Figure(("loans", loan.id, "amount"), f"loans@{loan.id}.amount", "given")
        yield Figure(("loans", loan.id, "balance"), f"balance@{loan.id}", "year_end")
        yield Figure(("loans", loan.id, "service"), f"service@{loan.id}", "year")
        yield Figure(("loans", loan.id, "interest"), f"interest@{loan.id}", "year")
    for name in ("with_reserves", "without_reserves"):
        yield Figure(("break_even_occupancy", name), f"break_even_{name}", "once")
    for key in _MEASURES:
        yield Figure(("measures", key), key, "once")


_CLOSING: tuple[tuple[str, str, str, How], ...] = (
    ("sources", "loans", "loan_amount", "once"),
    ("sources", "deposits", "purchase.deposits", "given"),
    ("sources", "equity", "equity", "once"),
    ("sources", "total", "sources", "once"),
    ("uses", "price", "purchase.price", "given"),
    ("uses", "purchase_costs", "purchase_costs", "once"),
    ("uses", "loan_costs", "loan_costs", "once"),
    ("uses", "initial_works", "purchase.initial_works", "given"),
    ("uses", "escrows", "purchase.escrows", "given"),
    ("uses", "working_capital", "purchase.working_capital", "given"),
    ("uses", "total", "uses", "once"),
)


@dataclass(frozen=True)
class Read:
    """A figure as read: a number, a list by year, or None; with the reasons of what is missing."""

    figure: Figure
    value: Any
    reasons: tuple[tuple[int | None, Reason], ...]


def read_figures(result: Result) -> Iterator[Read]:
    """Every figure of the record with its value, and a reason for each that cannot be given."""
    deal = result.plan.deal
    hold = deal.leave.hold or 0
    years = range(1, hold + 1) if 1 <= hold <= 40 else range(0)
    for figure in figures_of(deal):
        if figure.how in ("once", "given"):
            yield _read_one(result, figure)
        elif figure.how == "nothing":
            yield Read(figure, [0.0 for _ in years], ())
        else:
            yield _read_years(result, figure, years)


def _read_one(result: Result, figure: Figure) -> Read:
    if figure.how == "given":
        value = result.given(figure.key)
        why = () if value is not None else ((None, result.why_not_given(figure.key)),)
        return Read(figure, value, why)
    if figure.key not in result.declared:
        return Read(figure, None, ((None, Reason("no_loan", figure.key)),))
    value = result.figure(figure.key)
    return Read(figure, value, () if value is not None else ((None, result.reason(figure.key)),))


def _read_years(result: Result, figure: Figure, years: range) -> Read:
    if figure.how == "year_end":
        values = [result.year_end(figure.key, year) for year in years]
    else:
        values = [result.figure(figure.key, year) for year in years]
    missing = [year for year, value in zip(years, values, strict=True) if value is None]
    return Read(figure, values, tuple((year, result.reason(figure.key, year)) for year in missing))
