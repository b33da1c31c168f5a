"""Loans."""

from dataclasses import dataclass, field
from typing import Annotated

from workbench.deal.inputs import Input, YearRow


@dataclass(frozen=True)
class Loan:
    """A loan drawn at closing; payments fall 1, 2, 3 … months after it."""

    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    amount: Annotated[float | None, Input("Amount", "money", 0, 1e15, needed=True)] = None
    rate: Annotated[
        YearRow,
        Input(
            "Interest rate",
            "fraction",
            0,
            1,
            help="A year, paid monthly (a twelfth each month). A new rate recasts the level "
            "payment over the amortisation that remains.",
            adverse=0.01,
            needed=True,
        ),
    ] = field(default_factory=dict)
    amortisation_months: Annotated[
        int | None,
        Input(
            "Amortisation",
            "months",
            1,
            600,
            help="Level payments that would repay the loan, counted from the end of interest-only; "
            "absent: interest only to the end.",
        ),
    ] = None
    interest_only_months: Annotated[int, Input("Interest-only months", "months", 0, 600)] = 0
    term_months: Annotated[
        int | None,
        Input(
            "Term",
            "months",
            1,
            600,
            help="Months to maturity, when what is left is repaid: before the end of the hold out "
            "of cash (outside debt service), at it or later out of the sale. Absent: interest-only "
            "months plus amortisation; without amortisation the loan runs to the sale.",
        ),
    ] = None
    fee: Annotated[float, Input("Fee", "fraction", 0, 1, help="Of the amount, at closing.")] = 0.0
    fee_amount: Annotated[float, Input("Fixed fee", "money", 0, 1e15, help="At closing.")] = 0.0
