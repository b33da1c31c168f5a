"""The shape of a deal: what decides which lines there are and how they are computed.

Two deals of one shape differ in numbers alone, so that everything generated from the lines is made
once per shape and kept.
"""

from dataclasses import dataclass, fields
from typing import Literal, TypeAlias

from workbench.deal.checks_sections import exit_methods
from workbench.deal.deal import Deal
from workbench.deal.earn import Stated
from workbench.deal.leave import ExitMethod
from workbench.deal.property import Timing

Account: TypeAlias = Literal["spent", "account", "nil"]


@dataclass(frozen=True)
class IncomeShape:
    id: str
    basis: str
    marked: bool
    tied: bool
    stated: bool


@dataclass(frozen=True)
class ExpenseShape:
    id: str
    basis: str
    own_growth: bool
    stated: bool


@dataclass(frozen=True)
class Part:
    """One exit method with the path of its weight; the only method has none."""

    method: ExitMethod
    weight: str | None


@dataclass(frozen=True)
class Shape:
    timing: Timing
    rent_as_new: bool
    price_as_new: bool
    count_once: bool
    stated: frozenset[str]
    income: tuple[IncomeShape, ...]
    expenses: tuple[ExpenseShape, ...]
    reserves_basis: str
    reserves_above: bool
    account: Account
    costs: tuple[tuple[str, str], ...]
    loans: tuple[tuple[str, bool, bool], ...]
    """Id, whether it amortises, whether it has a term of its own."""
    exits: tuple[Part, ...]
    stabilised: bool
    price_per_of: str
    own_equity_return: bool
    own_finance_rate: bool
    own_reinvest_rate: bool


def shape_of(deal: Deal) -> Shape:
    """The shape of a deal."""
    rent_as_new = deal.earn.series == "as_new"
    price_series = deal.leave.price_series or deal.earn.series
    returns = deal.returns
    return Shape(
        timing=deal.conventions.timing,
        rent_as_new=rent_as_new,
        price_as_new=price_series == "as_new",
        count_once=deal.earn.count_empty_time_once,
        stated=frozenset(
            spec.name for spec in fields(Stated) if getattr(deal.stated, spec.name) is not None
        ),
        income=tuple(
            IncomeShape(
                one.id, one.basis, one.in_allowance, one.lease is not None, one.stated is not None
            )
            for one in deal.other_income
        ),
        expenses=tuple(
            ExpenseShape(one.id, one.basis, one.growth is not None, one.stated is not None)
            for one in deal.expenses
        ),
        reserves_basis=deal.spend.reserves_basis,
        reserves_above=deal.spend.reserves_place == "above",
        account=_account(deal),
        costs=tuple((cost.id, cost.basis) for cost in deal.purchase.costs),
        loans=tuple(
            (loan.id, loan.amortisation_months is not None, loan.term_months is not None)
            for loan in deal.loans
        ),
        exits=_exits(deal),
        stabilised=deal.leave.exit_income == "stabilised",
        price_per_of=deal.leave.price_per_of,
        own_equity_return=returns.equity is not None,
        own_finance_rate=returns.finance is not None,
        own_reinvest_rate=returns.reinvest is not None,
    )


def _account(deal: Deal) -> Account:
    """With a perpetuity as the only method there is no reserve account, from closing on."""
    if deal.spend.reserves_use == "spent":
        return "spent"
    return "nil" if set(exit_methods(deal)) == {"perpetuity"} else "account"


def _exits(deal: Deal) -> tuple[Part, ...]:
    if not deal.leave.blend:
        return (Part(deal.leave.method, None),)
    return tuple(Part(part.method, f"blend@{part.id}.weight") for part in deal.leave.blend)
