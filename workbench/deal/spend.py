"""What the property costs: expenses, reserves, works."""

import datetime
from dataclasses import dataclass, field
from typing import Annotated, Literal

from workbench.deal.inputs import YEARS, Input, YearRow


@dataclass(frozen=True)
class Expense:
    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    amount: Annotated[
        float | None,
        Input(
            "Amount a year",
            "money",
            0,
            1e15,
            help="For year 1. With basis egi a fraction of effective gross income.",
            needed=True,
        ),
    ] = None
    basis: Annotated[
        Literal["year", "area", "unit", "egi"],
        Input(
            "Basis",
            "choice",
            help="Whole property, each square metre or foot of all units, each unit, or effective "
            "gross income of the month.",
        ),
    ] = "year"
    growth: Annotated[
        YearRow | None,
        Input(
            "Growth",
            "fraction",
            -0.9,
            10,
            help="From this year to the next; absent follows the growth of expenses.",
        ),
    ] = None
    stated: Annotated[
        YearRow | None,
        Input(
            "Stated amounts",
            "money",
            0,
            1e15,
            help="Replaces the computation: the amount of each year, typed positive, a twelfth "
            "each month.",
        ),
    ] = None


@dataclass(frozen=True)
class Works:
    """Dated works: on a date, or in a month of a deal year."""

    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    amount: Annotated[float | None, Input("Amount", "money", 0, 1e15, needed=True)] = None
    date: Annotated[
        datetime.date | None, Input("Date", "date", help="In place of year and month.")
    ] = None
    year: Annotated[int | None, Input("Deal year", "year", 1, YEARS)] = None
    month: Annotated[int, Input("Month of that year", "months", 1, 12)] = 1
    todays_money: Annotated[
        bool,
        Input(
            "In today's money",
            "switch",
            help="On: grows with the growth of works up to its year. Off: money of its date.",
        ),
    ] = False


@dataclass(frozen=True)
class Spend:
    growth: Annotated[
        YearRow,
        Input(
            "Growth of expenses",
            "fraction",
            -0.9,
            10,
            help="From this year to the next.",
            adverse=0.01,
        ),
    ] = field(default_factory=lambda: {1: 0.0})
    works_growth: Annotated[
        YearRow,
        Input("Growth of works", "fraction", -0.9, 10, help="From this year to the next."),
    ] = field(default_factory=lambda: {1: 0.0})
    reserves: Annotated[
        float,
        Input(
            "Reserves a year",
            "money",
            0,
            1e15,
            help="For year 1, a twelfth each month. With basis egi a fraction of effective gross "
            "income.",
        ),
    ] = 0.0
    reserves_basis: Annotated[
        Literal["year", "area", "unit", "egi"], Input("Basis of reserves", "choice")
    ] = "year"
    reserves_growth: Annotated[YearRow, Input("Growth of reserves", "fraction", -0.9, 10)] = field(
        default_factory=lambda: {1: 0.0}
    )
    reserves_place: Annotated[
        Literal["below", "above"],
        Input(
            "Reserves stand",
            "choice",
            help="above: deducted before net operating income, so yields, debt yield and cover "
            "move with it; below: deducted after it.",
        ),
    ] = "below"
    reserves_use: Annotated[
        Literal["spent", "account"],
        Input(
            "Reserves are",
            "choice",
            help="spent: they stand for works not listed and are gone. account: each month's "
            "payment goes in first, then dated works draw on the balance and only the shortfall "
            "is deducted; the balance comes back at the exit. With a perpetuity as the only exit "
            "method there is no account from closing on.",
        ),
    ] = "spent"
    reserves_opening: Annotated[
        float,
        Input(
            "Reserve balance taken over",
            "money",
            0,
            1e15,
            help="Comes with the property, within the price; only with an account.",
        ),
    ] = 0.0
