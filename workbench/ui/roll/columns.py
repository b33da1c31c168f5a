"""The columns of the rent roll: which input each one holds, and how it is read and written."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Literal, TypeAlias

from workbench.deal.deal import Deal

Content: TypeAlias = Literal["text", "whole", "area", "money", "date", "basis"]


@dataclass(frozen=True)
class Column:
    """One column. `field` is the key path below the space or the lease."""

    title: str
    field: str
    content: Content
    of_lease: bool = False
    width: int = 84
    also: tuple[str, ...] = ()
    """Other headings under which spreadsheets have it."""

    @property
    def steps(self) -> tuple[str, ...]:
        return tuple(self.field.split("."))

    @property
    def draft_field(self) -> str:
        """The field whose path keeps a draft."""
        return f"{self.field}.per" if self.content == "basis" else self.field

    @property
    def is_number(self) -> bool:
        return self.content in ("whole", "area", "money")


COLUMNS = (
    Column("Space", "name", "text", width=140, also=("name", "premises")),
    Column("Use", "use", "text", width=92, also=("type",)),
    Column("Units", "count", "whole", width=52, also=("count", "number of units")),
    Column("Area", "area", "area", width=64, also=("size",)),
    Column("Market rent", "market_rent.amount", "money", width=84),
    Column("Market rent per", "market_rent", "basis", width=88),
    Column("Tenant", "tenant", "text", of_lease=True, width=150, also=("occupier", "lessee")),
    Column("Start", "start", "date", of_lease=True, width=92, also=("lease start", "from")),
    Column("End", "end", "date", of_lease=True, width=92, also=("lease end", "expiry", "to")),
    Column("Rent", "rent.amount", "money", of_lease=True, width=84, also=("contract rent",)),
    Column("Rent per", "rent", "basis", of_lease=True, width=88),
    Column("Free months", "free_months", "whole", of_lease=True, width=60, also=("rent free",)),
    Column("Break", "break_date", "date", of_lease=True, width=92, also=("break date",)),
)

AREA_UNITS: Mapping[str, str] = {"m2": "m²", "sqft": "sq ft"}


def heading(column: Column, deal: Deal) -> str:
    """The title with the unit of its figures in a second line."""
    match column.content:
        case "money":
            return f"{column.title}\n{deal.conventions.currency}"
        case "area":
            return f"{column.title}\n{AREA_UNITS[deal.conventions.area_unit]}"
        case _:
            first, _, rest = column.title.rpartition(" ")
            return f"{first}\n{rest}" if first else column.title


def known_titles() -> Mapping[str, int]:
    """Every heading a column is known by, in small letters, with the column's place."""
    return {
        name.casefold(): place
        for place, column in enumerate(COLUMNS)
        for name in (column.title, *column.also)
    }


def columns_named(line: tuple[str, ...]) -> list[int | None] | None:
    """The columns that a line of headings names; None where the line is no such line.

    Two known headings are asked for, and more known than unknown ones.
    """
    known = known_titles()
    words = [" ".join(cell.split()).casefold() for cell in line]
    found = [known.get(word.partition(" (")[0]) for word in words]
    hits = sum(place is not None for place in found)
    filled = sum(bool(word) for word in words)
    return found if hits >= 2 and 2 * hits > filled else None
