"""What is kept beside the assumptions: statements, comparables, cases."""

import datetime
from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Annotated, Literal

from workbench.deal.earn import Rent
from workbench.deal.inputs import Input


@dataclass(frozen=True)
class StatementLine:
    id: str
    line: Annotated[
        str, Input("Line", "reference", help="Key of a line, such as other_income or expense@x2.")
    ] = ""
    label: Annotated[str, Input("As the source calls it", "text", high=5000)] = ""
    amount: Annotated[
        float | None,
        Input(
            "Reported amount",
            "money",
            -1e15,
            1e15,
            help="Signed as it adds up: a cost is negative.",
        ),
    ] = None
    adjustment: Annotated[float, Input("Adjustment", "money", -1e15, 1e15)] = 0.0
    reason: Annotated[str, Input("Reason for the adjustment", "text", high=5000)] = ""


@dataclass(frozen=True)
class Statement:
    """Reported amounts of a period; with the adjustments they are the normalised ones."""

    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    kind: Annotated[
        Literal["past_year", "trailing_twelve_months", "budget", "pro_forma", "actual"],
        Input("Kind", "choice"),
    ] = "past_year"
    start: Annotated[datetime.date | None, Input("From", "date", help="First day.")] = None
    end: Annotated[datetime.date | None, Input("To", "date", help="Last day.")] = None
    source: Annotated[str, Input("Source", "text", high=5000)] = ""
    lines: tuple[StatementLine, ...] = ()


@dataclass(frozen=True)
class Comparable:
    """A letting or a sale elsewhere: evidence for market rent or exit yield."""

    id: str
    kind: Annotated[Literal["rent", "sale"], Input("Kind", "choice")] = "rent"
    date: Annotated[datetime.date | None, Input("Date", "date")] = None
    place: Annotated[str, Input("Place", "text", high=5000)] = ""
    area: Annotated[float | None, Input("Area", "area", 0.01, 1e9)] = None
    rent: Rent = field(default_factory=Rent)
    price: Annotated[float | None, Input("Price", "money", 0, 1e15)] = None
    noi: Annotated[float | None, Input("Net operating income", "money", -1e15, 1e15)] = None
    noi_basis: Annotated[str, Input("What that income includes", "text", high=5000)] = ""
    income_yield: Annotated[float | None, Input("Yield", "fraction", -1, 10)] = None
    source: Annotated[str, Input("Source", "text", high=5000)] = ""


@dataclass(frozen=True)
class Addition:
    """A list item that a case adds: the list's name, or `list@id.list` for a nested one."""

    to: str
    item: Mapping[str, object]


@dataclass(frozen=True)
class Case:
    """A named set of changes on the base; a path the base has lost is kept and reported."""

    id: str
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    set: Mapping[str, float | bool | str | None] = field(default_factory=dict)
    add: tuple[Addition, ...] = ()
    remove: tuple[str, ...] = ()
