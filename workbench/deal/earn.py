"""What the property earns: spaces, leases, market rent, vacancy, other income."""

import datetime
from dataclasses import dataclass, field
from typing import Annotated, Literal

from workbench.deal.inputs import Input, YearRow
from workbench.deal.property import Series


@dataclass(frozen=True)
class Rent:
    amount: Annotated[float | None, Input("Rent", "money", 0, 1e12)] = None
    per: Annotated[Literal["month", "year"], Input("Per", "choice")] = "year"
    of: Annotated[
        Literal["unit", "area"],
        Input(
            "Of",
            "choice",
            help="unit: for each of the identical units; area: for each square metre or foot of "
            "each unit.",
        ),
    ] = "unit"


@dataclass(frozen=True)
class Step:
    """A dated change of a lease's rent: a new amount or a change in per cent, not both."""

    id: str
    date: Annotated[
        datetime.date | None,
        Input(
            "Date",
            "date",
            help="First day of the new rent, pro rata by days. A step on or before closing is "
            "taken to be in the rent entered and changes nothing.",
            needed=True,
        ),
    ] = None
    amount: Annotated[
        float | None, Input("New rent", "money", 0, 1e12, help="In the lease's own terms.")
    ] = None
    change: Annotated[
        float | None, Input("Change", "fraction", -1, 10, help="Of the rent before the step.")
    ] = None


@dataclass(frozen=True)
class Lease:
    """A lease over all units of its space. Without dates its rent is expected, not in hand.

    Days of the hold before the first dated lease, and between two of them, are empty time: market
    rent counts as expected and is taken off again. After the last one the space is at market rent
    from the first whole month; a lease that ended before closing leaves it so from closing.
    A space without leases is at market rent from closing.
    """

    id: str
    tenant: Annotated[str, Input("Tenant", "text", high=5000)] = ""
    start: Annotated[
        datetime.date | None,
        Input(
            "Start",
            "date",
            help="First day. Start and end are given together or both left out: a space whose one "
            "lease has no dates pays the rent entered, and in the month with index m = 0, 1, … "
            "min(m, 12)/12 of it stands at market rent instead; all of it is expected.",
        ),
    ] = None
    end: Annotated[datetime.date | None, Input("End", "date", help="Last day.")] = None
    rent: Rent = field(default_factory=Rent)
    """Rent at closing, or at the start where that is later."""
    steps: tuple[Step, ...] = ()
    break_date: Annotated[
        datetime.date | None,
        Input(
            "Tenant's break",
            "date",
            help="Last day if the tenant leaves at the first chance. The lease is taken to end "
            "there. The space is then at market rent from the first whole month after; the rest "
            "of the month is empty time.",
        ),
    ] = None
    break_penalty: Annotated[
        float,
        Input(
            "Break penalty",
            "money",
            0,
            1e12,
            help="Paid by the tenant who breaks: expected other income of the first whole month "
            "after the break, outside the vacancy allowance. Nothing where the break lies before "
            "closing.",
        ),
    ] = 0.0
    free_months: Annotated[
        int,
        Input(
            "Free months left",
            "months",
            0,
            120,
            help="Calendar months without rent, counted from closing or from the start where that "
            "is later, and never past the lease's last day; the rent of that time is a concession, "
            "taken off rent in hand.",
        ),
    ] = 0


@dataclass(frozen=True)
class Space:
    """One line of the rent roll: so many identical units."""

    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    use: Annotated[str, Input("Use", "text", high=5000)] = ""
    count: Annotated[
        int | None, Input("Units", "count", 1, 100_000, help="Identical units.", needed=True)
    ] = None
    area: Annotated[
        float | None, Input("Area of one unit", "area", 0.01, 1e9, help="In the deal's unit.")
    ] = None
    market_rent: Rent = field(default_factory=Rent)
    """What the space would let for at closing, for year 1."""
    leases: tuple[Lease, ...] = ()


@dataclass(frozen=True)
class Earn:
    growth: Annotated[
        YearRow,
        Input(
            "Market rent growth",
            "fraction",
            -0.9,
            10,
            help="Growth from this year to the next: the value of year t takes the index from "
            "year t to t+1.",
            adverse=-0.01,
        ),
    ] = field(default_factory=lambda: {1: 0.0})
    depreciation: Annotated[
        YearRow,
        Input(
            "Depreciation of rent",
            "fraction",
            -0.5,
            0.9,
            help="Economic wear of land and building together, from this year to the next. Taken "
            "off only where the growth is stated as of buildings as new.",
            adverse=0.005,
        ),
    ] = field(default_factory=lambda: {1: 0.0})
    series: Annotated[
        Series,
        Input(
            "Growth is stated for",
            "choice",
            help="as_new: rents of buildings as new, so depreciation comes off as well; "
            "same_buildings: already net of age.",
        ),
    ] = "as_new"
    vacancy: Annotated[
        YearRow,
        Input(
            "Vacancy allowance",
            "fraction",
            0,
            1,
            help="Of rent in hand, rent expected, recoveries and marked other income, before "
            "concessions.",
            adverse=0.02,
            needed=True,
        ),
    ] = field(default_factory=dict)
    credit_loss: Annotated[
        YearRow,
        Input(
            "Credit loss",
            "fraction",
            0,
            1,
            help="Of the same base, less empty time and concessions.",
            adverse=0.01,
        ),
    ] = field(default_factory=lambda: {1: 0.0})
    count_empty_time_once: Annotated[
        bool,
        Input(
            "Count empty time once",
            "switch",
            help="On: empty time already in the rent roll is taken off the vacancy allowance of "
            "its year. Off: the allowance is charged on the base less empty time.",
        ),
    ] = True


@dataclass(frozen=True)
class OtherIncome:
    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    amount: Annotated[
        float | None,
        Input("Amount a year", "money", 0, 1e15, help="At closing, for year 1.", needed=True),
    ] = None
    basis: Annotated[
        Literal["year", "unit", "area"],
        Input(
            "Basis",
            "choice",
            help="Whole property, each unit, or each square metre or foot of all units.",
        ),
    ] = "year"
    growth: Annotated[
        YearRow, Input("Growth", "fraction", -0.9, 10, help="From this year to the next.")
    ] = field(default_factory=lambda: {1: 0.0})
    in_allowance: Annotated[
        bool,
        Input("Vacancy and credit loss apply", "switch", help="Marked other income."),
    ] = False
    lease: Annotated[
        str | None,
        Input(
            "Tied to lease",
            "reference",
            help="Id of a dated lease: in hand for the share of each month's days that lies under "
            "it, expected otherwise. It is paid throughout.",
        ),
    ] = None
    stated: Annotated[
        YearRow | None,
        Input(
            "Stated amounts",
            "money",
            0,
            1e15,
            help="Replaces the computation: the amount of each year, a twelfth each month.",
        ),
    ] = None


@dataclass(frozen=True)
class Stated:
    """Lines whose amounts are typed for the whole property, a twelfth each month."""

    rent: Annotated[
        YearRow | None,
        Input(
            "Stated rent",
            "money",
            0,
            1e15,
            help="All rent of the year, before allowance. Each month the leases' rent, up to this "
            "amount, stays in hand and the rest is expected. Computed empty time and concessions "
            "are then nil unless stated too.",
        ),
    ] = None
    empty_time: Annotated[
        YearRow | None,
        Input("Stated empty time", "money", 0, 1e15, help="Typed positive, deducted; expected."),
    ] = None
    concessions: Annotated[
        YearRow | None,
        Input("Stated concessions", "money", 0, 1e15, help="Typed positive, deducted; expected."),
    ] = None
    vacancy_allowance: Annotated[
        YearRow | None,
        Input("Stated vacancy allowance", "money", 0, 1e15, help="Typed positive, deducted."),
    ] = None
    credit_loss: Annotated[
        YearRow | None,
        Input("Stated credit loss", "money", 0, 1e15, help="Typed positive, deducted."),
    ] = None
