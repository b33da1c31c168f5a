"""How the deal is left: hold, exit method, required returns."""

from dataclasses import dataclass, field
from typing import Annotated, Literal, TypeAlias

from workbench.deal.inputs import Input, YearRow
from workbench.deal.property import Series

ExitMethod: TypeAlias = Literal[
    "forward_noi",
    "trailing_noi",
    "perpetuity",
    "price_per",
    "rent_multiple",
    "purchase_price",
    "amount",
]


@dataclass(frozen=True)
class ExitPart:
    """One method's part in a blend."""

    id: str
    method: Annotated[ExitMethod, Input("Method", "choice")] = "forward_noi"
    weight: Annotated[
        float | None, Input("Weight", "fraction", 0, 1, help="Weights sum to 1.", needed=True)
    ] = None


@dataclass(frozen=True)
class Leave:
    hold: Annotated[
        int | None, Input("Hold", "years", 1, 40, help="The sale falls at its end.", needed=True)
    ] = None
    method: Annotated[ExitMethod, Input("Exit method", "choice")] = "forward_noi"
    blend: tuple[ExitPart, ...] = ()
    """Where not empty, these methods and weights stand in place of the one method."""
    exit_yield: Annotated[
        float | None,
        Input(
            "Exit yield",
            "fraction",
            0.0001,
            1,
            help="Needed for forward_noi and trailing_noi.",
            adverse=0.005,
        ),
    ] = None
    exit_income: Annotated[
        Literal["modelled", "stabilised"],
        Input(
            "Exit income",
            "choice",
            help="modelled: net operating income as the deal computes it. stabilised: every space "
            "at market rent of the capitalised year, less the stabilised vacancy on that rent, "
            "recoveries and marked other income; other income and credit loss as modelled; "
            "expenses (and reserves above) as modelled but for those on effective gross income, "
            "which follow the stabilised one; then plus the value at the exit, at the required "
            "return and the deal's timing, of contract rent less free rent less market rent over "
            "what remains of dated leases (to the end of deal year 41).",
        ),
    ] = "modelled"
    stabilised_vacancy: Annotated[
        float | None, Input("Stabilised vacancy", "fraction", 0, 1, help="For stabilised income.")
    ] = None
    price_per: Annotated[
        float | None, Input("Price per unit or area today", "money", 0, 1e15, help="For price_per.")
    ] = None
    price_per_of: Annotated[Literal["unit", "area"], Input("Per", "choice")] = "unit"
    price_growth: Annotated[
        YearRow,
        Input(
            "Price growth",
            "fraction",
            -0.9,
            10,
            help="For price_per and purchase_price: from this year to the next, so that a sale at "
            "the end of year n has the growth of years 1…n.",
        ),
    ] = field(default_factory=lambda: {1: 0.0})
    price_series: Annotated[
        Series | None,
        Input(
            "Price growth is stated for",
            "choice",
            help="as_new: depreciation of rent comes off as well; absent: as for rent.",
        ),
    ] = None
    rent_multiple: Annotated[
        float | None,
        Input(
            "Multiple of gross rent",
            "multiple",
            0,
            1000,
            help="For rent_multiple: of rent in hand plus rent expected of the year after the "
            "sale.",
        ),
    ] = None
    amount: Annotated[
        float | None,
        Input("Exit price", "money", 0, 1e15, help="For amount: the property as it then stands."),
    ] = None
    selling_cost: Annotated[
        float, Input("Selling cost", "fraction", 0, 1, help="Of the exit price.")
    ] = 0.0


@dataclass(frozen=True)
class Returns:
    required: Annotated[
        YearRow,
        Input(
            "Required return",
            "fraction",
            -0.5,
            1,
            help="A year, effective, before debt and tax.",
            adverse=0.01,
            needed=True,
        ),
    ] = field(default_factory=dict)
    extra_on_exit: Annotated[
        float,
        Input(
            "Extra return on the exit",
            "fraction",
            -0.5,
            1,
            help="Added to the required return of every year when the net exit is discounted.",
        ),
    ] = 0.0
    equity: Annotated[
        YearRow | None,
        Input(
            "Required return on equity",
            "fraction",
            -0.5,
            1,
            help="For the levered net present value; absent: the required return.",
        ),
    ] = None
    finance: Annotated[
        float | None,
        Input(
            "Finance rate of MIRR",
            "fraction",
            -0.5,
            1,
            help="Absent: the required return of year 1.",
        ),
    ] = None
    reinvest: Annotated[
        float | None,
        Input(
            "Reinvestment rate of MIRR",
            "fraction",
            -0.5,
            1,
            help="Absent: the required return of year 1.",
        ),
    ] = None
