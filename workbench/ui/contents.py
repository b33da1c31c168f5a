"""What stands on each page: its headline, forms, lists and the rows of its grid. Data, not code."""

from dataclasses import dataclass
from typing import Literal, TypeAlias

from workbench.deal.deal import Deal
from workbench.deal.paths import get

PageName: TypeAlias = Literal["Describe", "Earn", "Spend", "Borrow", "Leave", "Hand on"]

ASSUMED, FOLLOWS, CARRIED = "assumed", "follows", "carried on"


@dataclass(frozen=True)
class Row:
    """A row of the grid: an input by year, or a line."""

    key: str
    is_input: bool = False
    bold: bool = False


@dataclass(frozen=True)
class ListPart:
    """A list edited in place: which fields of each item are shown; `apart` on its own view."""

    title: str
    name: str
    fields: tuple[str, ...]
    apart: bool = False


@dataclass(frozen=True)
class Contents:
    """A page. `headline` is a line and the words before it; year 1 of a line by year."""

    name: PageName
    headline: str = ""
    words: str = ""
    first: tuple[str, ...] = ()
    more: tuple[str, ...] = ()
    lists: tuple[ListPart, ...] = ()
    bands: tuple[tuple[str, tuple[Row, ...]], ...] = ()


def pages(deal: Deal) -> tuple[Contents, ...]:
    """The pages of the window, in the order of the work."""
    return (
        _describe(deal),
        _earn(deal),
        _spend(deal),
        _borrow(deal),
        _leave(deal),
        Contents("Hand on"),
    )


def _inputs(*paths: str) -> tuple[Row, ...]:
    return tuple(Row(path, is_input=True) for path in paths)


def _lines(*keys: str) -> tuple[Row, ...]:
    """Lines; a star marks those that stand out."""
    return tuple(Row(key.strip("*"), bold=key.endswith("*")) for key in keys)


EIGHT = (
    "purchase.price",
    "spaces@s1.count",
    "spaces@s1.market_rent.amount",
    "earn.vacancy.1",
    "expenses@x2.amount",
    "leave.hold",
    "leave.exit_yield",
    "returns.required.1",
)
"""The numbers that a new deal starts from."""


def _is_new(deal: Deal) -> bool:
    """Whether the deal still has the places of a new one and not all of the eight numbers."""
    if [one.id for one in deal.spaces] != ["s1"] or [one.id for one in deal.expenses] != ["x2"]:
        return False
    return any(get(deal, path) is None for path in EIGHT)


def _describe(deal: Deal) -> Contents:
    first: tuple[str, ...] = (
        "property.name",
        "property.place",
        "purchase.price",
        "property.kind",
        "property.year_built",
        "purchase.closing_date",
    )
    if _is_new(deal):
        first = ("property.name", *EIGHT, "spaces@s1.market_rent.per")
    return Contents(
        "Describe",
        "outlay",
        "price, purchase costs and initial works",
        first,
        (
            "purchase.initial_works",
            "purchase.escrows",
            "purchase.working_capital",
            "purchase.deposits",
            "conventions.currency",
            "conventions.area_unit",
            "conventions.locale",
            "conventions.timing",
            "about.purpose",
            "about.intended_users",
            "about.prepared_by",
            "about.interest",
            "about.prepared_on",
            "property.description",
            "property.notes",
        ),
        (ListPart("Purchase costs", "costs", ("name", "amount", "basis")),),
    )


def _earn(deal: Deal) -> Contents:
    first: tuple[str, ...] = ()
    if len(deal.spaces) == 1:
        space = f"spaces@{deal.spaces[0].id}"
        first = (
            f"{space}.count",
            f"{space}.market_rent.amount",
            f"{space}.market_rent.per",
            f"{space}.area",
            f"{space}.market_rent.of",
        )
    growths = tuple(f"other_income@{one.id}.growth" for one in deal.other_income)
    return Contents(
        "Earn",
        "effective_gross_income",
        "effective gross income, year 1",
        (*first, "earn.series"),
        ("earn.count_empty_time_once",),
        (
            ListPart(
                "Other income",
                "other_income",
                ("name", "amount", "basis", "in_allowance", "lease"),
                apart=True,
            ),
        ),
        (
            (
                ASSUMED,
                _inputs(
                    "earn.growth",
                    "earn.depreciation",
                    "earn.vacancy",
                    "earn.credit_loss",
                    *growths,
                ),
            ),
            (
                FOLLOWS,
                _lines(
                    "rent_in_hand",
                    "rent_expected",
                    "empty_time",
                    "concessions",
                    "other_income",
                    "vacancy_allowance",
                    "credit_loss",
                    "effective_gross_income*",
                ),
            ),
            (CARRIED, _lines("operating_expenses", "noi*", "reserves", "works", "net_cash_flow*")),
        ),
    )


def _spend(deal: Deal) -> Contents:
    own = tuple(f"expenses@{one.id}.growth" for one in deal.expenses if one.growth is not None)
    each = tuple(f"expense@{one.id}" for one in deal.expenses)
    return Contents(
        "Spend",
        "operating_expenses",
        "operating expenses, year 1",
        ("spend.reserves", "spend.reserves_basis", "spend.reserves_use"),
        ("spend.reserves_place", "spend.reserves_opening"),
        (
            ListPart("Expenses", "expenses", ("name", "amount", "basis"), apart=True),
            ListPart(
                "Works",
                "works",
                ("name", "amount", "date", "year", "month", "todays_money"),
                apart=True,
            ),
        ),
        (
            (
                ASSUMED,
                _inputs("spend.growth", *own, "spend.reserves_growth", "spend.works_growth"),
            ),
            (FOLLOWS, _lines(*each, "operating_expenses*", "reserves", "works")),
            (CARRIED, _lines("effective_gross_income", "noi*", "net_cash_flow*")),
        ),
    )


def _borrow(deal: Deal) -> Contents:
    ids = [loan.id for loan in deal.loans]
    rates = tuple(f"loans@{one}.rate" for one in ids)
    each = tuple(f"{part}@{one}" for one in ids for part in ("interest", "principal", "balance"))
    cover = ("dscr_noi", "dscr_ncf", "debt_yield") if ids else ()
    return Contents(
        "Borrow",
        "equity",
        "cash to close",
        (),
        (),
        (
            ListPart(
                "Loans",
                "loans",
                (
                    "name",
                    "amount",
                    "rate",
                    "amortisation_months",
                    "interest_only_months",
                    "term_months",
                    "fee",
                ),
            ),
        ),
        (
            *(((ASSUMED, _inputs(*rates)),) if rates else ()),
            (FOLLOWS, _lines(*each, "debt_service*", "loan_repayment", *cover)),
            (CARRIED, _lines("net_cash_flow", "cash_flow_after_debt*", "cash_on_cash")),
        ),
    )


def _leave(deal: Deal) -> Contents:
    priced = any(
        part in ("price_per", "purchase_price")
        for part in (deal.leave.method, *(one.method for one in deal.leave.blend))
    )
    return Contents(
        "Leave",
        "exit_net",
        "net exit",
        ("leave.hold", "leave.exit_yield", "leave.method", "leave.selling_cost"),
        (
            "leave.exit_income",
            "leave.stabilised_vacancy",
            "leave.price_per",
            "leave.price_per_of",
            "leave.price_series",
            "leave.rent_multiple",
            "leave.amount",
            "returns.extra_on_exit",
            "returns.finance",
            "returns.reinvest",
        ),
        (ListPart("Blend", "blend", ("method", "weight"), apart=True),),
        (
            (
                ASSUMED,
                _inputs(
                    "returns.required",
                    *(("leave.price_growth",) if priced else ()),
                    "returns.equity",
                ),
            ),
            (
                FOLLOWS,
                _lines(
                    "noi_of_year",
                    "exit_price_of_year",
                    "net_exit_of_year*",
                    "reference_share_of_year",
                ),
            ),
            (CARRIED, _lines("value_in_hand_of_year", "value_expected_of_year", "net_cash_flow*")),
        ),
    )
