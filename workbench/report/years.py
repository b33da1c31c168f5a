"""The years of the hold: what lines come to in each of them, and tables of that."""

from collections.abc import Sequence
from dataclasses import dataclass, replace
from datetime import MAXYEAR
from typing import Literal, TypeAlias

from workbench.engine.result import Result
from workbench.report.document import YearLine, YearTable
from workbench.report.voice import Voice
from workbench.text import numbers
from workbench.text.years import month_and_year, year_span

Unit: TypeAlias = Literal["money", "fraction", "multiple"]
Amounts: TypeAlias = tuple[float | None, ...]

_LONGEST = 10
"""Characters of an amount in a column of a year; above it the table is in thousands."""


@dataclass(frozen=True)
class Row:
    """A row of figures by year."""

    label: str
    values: Amounts
    unit: Unit = "money"
    strong: bool = False

    def until(self, year: int) -> "Row":
        """The same without the years after one."""
        return replace(self, values=self.values[:year])


@dataclass(frozen=True)
class Years:
    """Lines of a result over the hold, in the words of a reader."""

    result: Result
    voice: Voice
    count: int
    """The hold; 0 where it is not known."""

    def line(self, key: str) -> Amounts:
        """A line in each year: months summed, a balance as it stands at the year's end."""
        return tuple(self.result.figure(key, year + 1) for year in range(self.count))

    def label(self, key: str) -> str:
        return self.result.declared[key].label

    def row(self, key: str, unit: Unit = "money", strong: bool = False) -> Row:
        """A line under its own name."""
        return Row(self.label(key), self.line(key), unit, strong)

    def headings(self) -> tuple[str, ...]:
        """Each year's number, with the month of its end where there is a closing date."""
        closing = self.voice.deal.purchase.closing_date
        numbered = [str(year + 1) for year in range(self.count)]
        if closing is None or closing.year + self.count > MAXYEAR:
            return tuple(numbered)
        ends = (year_span(closing, int(year))[1] for year in numbered)
        locale = self.voice.locale
        return tuple(
            f"{year}\n{month_and_year(end, locale)}"
            for year, end in zip(numbered, ends, strict=True)
        )

    def table(self, rows: Sequence[Row]) -> YearTable:
        """The rows as a table, amounts in units or, where they are long, in thousands."""
        amounts = [value for row in rows if row.unit == "money" for value in row.values]
        scale = numbers.scale_for(tuple(amounts), self.voice.locale, _LONGEST)
        headings = self.headings()
        corner = self.voice.unit(scale) + (", year to" if "\n" in headings[0] else ", year")
        return YearTable(corner, headings, tuple(self._line(row, scale) for row in rows))

    def _line(self, row: Row, scale: numbers.Scale) -> YearLine:
        cells = tuple(self._cell(value, row.unit, scale) for value in row.values)
        return YearLine(row.label, cells, row.strong)

    def _cell(self, value: float | None, unit: Unit, scale: numbers.Scale) -> str:
        if unit == "money":
            return self.voice.scaled(value, scale)
        return self.voice.share(value) if unit == "fraction" else self.voice.ratio(value)
