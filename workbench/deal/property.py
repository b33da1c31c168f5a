"""What the property is, who asks, and the conventions of the deal."""

import datetime
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Annotated, Literal, TypeAlias

from workbench.deal.inputs import Input

Timing: TypeAlias = Literal["month_end", "month_start", "year_end", "mid_year", "year_start"]
LocaleCode: TypeAlias = Literal[
    "en-US",
    "en-GB",
    "en-IN",
    "de-DE",
    "fr-FR",
    "es-ES",
    "it-IT",
    "nl-NL",
    "el-GR",
    "pl-PL",
    "sv-SE",
    "pt-BR",
    "ja-JP",
]
Series: TypeAlias = Literal["as_new", "same_buildings"]


@dataclass(frozen=True)
class Property:
    name: Annotated[str, Input("Name", "text", high=5000)] = ""
    kind: Annotated[str, Input("Kind of property", "text", high=5000)] = ""
    place: Annotated[str, Input("Place", "text", high=5000)] = ""
    year_built: Annotated[int | None, Input("Year built", "year", 1000, 2200)] = None
    description: Annotated[str, Input("Description", "text", high=5000)] = ""
    notes: Annotated[str, Input("Notes", "text", high=5000)] = ""
    pictures: tuple[str, ...] = ()
    """SHA-256 of each picture shown, in order; the bytes stand under `pictures` of the deal."""


@dataclass(frozen=True)
class About:
    purpose: Annotated[str, Input("Purpose", "text", high=5000)] = ""
    intended_users: Annotated[str, Input("Intended users", "text", high=5000)] = ""
    prepared_by: Annotated[str, Input("Prepared by", "text", high=5000)] = ""
    interest: Annotated[
        str,
        Input("Preparer's interest", "text", high=5000, help="What the preparer stands to gain."),
    ] = ""
    prepared_on: Annotated[datetime.date | None, Input("Prepared on", "date")] = None


@dataclass(frozen=True)
class Conventions:
    currency: Annotated[str, Input("Currency", "text", help="ISO 4217 code.")] = "USD"
    locale: Annotated[LocaleCode, Input("Locale of documents", "choice")] = "en-US"
    area_unit: Annotated[Literal["m2", "sqft"], Input("Unit of area", "choice")] = "m2"
    timing: Annotated[
        Timing,
        Input(
            "Timing of property flows",
            "choice",
            help="When the flows of a month count. With j the months of the year that have passed: "
            "month_end j = 1…12, month_start j = 0…11, year_end j = 12, mid_year j = 6, "
            "year_start j = 0, the same for every month of the year in the last three. "
            "Loans keep their own dates.",
        ),
    ] = "month_end"


Pictures: TypeAlias = Mapping[str, str]
"""SHA-256 in hex to the JPEG in base64."""
