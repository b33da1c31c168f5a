"""What is paid at closing."""

import datetime
from dataclasses import dataclass
from typing import Annotated, Literal

from workbench.deal.inputs import Input


@dataclass(frozen=True)
class PurchaseCost:
    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    amount: Annotated[
        float | None,
        Input(
            "Amount",
            "money",
            0,
            1e15,
            help="Money, or with basis price a fraction of the price (0.03 is 3 %).",
            needed=True,
        ),
    ] = None
    basis: Annotated[Literal["amount", "price"], Input("Basis", "choice")] = "amount"


@dataclass(frozen=True)
class Purchase:
    price: Annotated[
        float | None,
        Input("Price", "money", 0, 1e15, help="The asking or agreed price.", needed=True),
    ] = None
    closing_date: Annotated[
        datetime.date | None,
        Input("Closing date", "date", help="Needed as soon as anything else in the deal is dated."),
    ] = None
    costs: tuple[PurchaseCost, ...] = ()
    initial_works: Annotated[
        float,
        Input(
            "Initial works",
            "money",
            0,
            1e15,
            help="Paid at closing; not to be listed among the dated works again.",
        ),
    ] = 0.0
    escrows: Annotated[
        float,
        Input(
            "Escrows",
            "money",
            0,
            1e15,
            help="Paid in at closing, come back at the end of the hold; in the equity flows only.",
        ),
    ] = 0.0
    working_capital: Annotated[
        float,
        Input(
            "Working capital",
            "money",
            0,
            1e15,
            help="Put in at closing, comes back at the end of the hold; in the equity flows only.",
        ),
    ] = 0.0
    deposits: Annotated[
        float,
        Input(
            "Deposits taken over",
            "money",
            0,
            1e15,
            help="Tenants' deposits credited at closing (a source) and owed at the end of the "
            "hold; in the equity flows only, never income.",
        ),
    ] = 0.0
