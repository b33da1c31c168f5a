"""What a year grid shows: the text and the state of each cell, made when it is first asked for."""

from collections.abc import Mapping, Sequence
from functools import cached_property
from math import isfinite

from workbench.deal.deal import Deal
from workbench.deal.inputs import at_year
from workbench.deal.issues import Issue
from workbench.deal.paths import UnknownPathError, get
from workbench.engine.result import Result
from workbench.session.typed import in_percent, locale_of
from workbench.text import numbers
from workbench.ui.grid.calendar import hold_of
from workbench.ui.grid.cell import FOLLOWS, Cell, Kind, Mark
from workbench.ui.grid.rows import GridRow, InputRow, LineRow, label_of_row

MOST_TEXTS = 20_000
"""Texts kept from sheet to sheet."""
_LONGEST = 9
"""Characters of an amount in a column; above it the grid counts in thousands."""


class Sheet:
    """The cells of some rows over the years of one deal and its figures."""

    def __init__(self, deal: Deal, result: Result, rows: Sequence[GridRow]) -> None:
        self.deal = deal
        self.result = result
        self.rows = tuple(rows)
        self.years = hold_of(deal)
        self.locale = locale_of(deal)
        self.labels = tuple(label_of_row(row, deal, result) for row in self.rows)
        self._cells: dict[tuple[int, int], Cell] = {}
        self._texts: dict[tuple[str, float | None], str] = {}

    @cached_property
    def lines(self) -> Mapping[str, tuple[float | None, ...]]:
        """The lines shown, by year."""
        keys = {row.key for row in self.rows if isinstance(row, LineRow)}
        declared = self.result.declared
        return {
            key: tuple(
                float(value) if isfinite(value) else None
                for value in self.result.year(key)[0].tolist()
            )
            for key in keys
            if key in declared and declared[key].per in ("month", "year")
        }

    @cached_property
    def scale(self) -> numbers.Scale:
        """What amounts are counted in: it follows the largest one."""
        declared = self.result.declared
        amounts = [
            value
            for key, values in self.lines.items()
            if declared[key].unit == "money"
            for value in values[: self.years]
            if value is not None
        ]
        ends = (max(amounts), min(amounts)) if amounts else ()
        return numbers.scale_for(ends, self.locale, _LONGEST)

    @property
    def corner(self) -> str:
        """The currency with the scale, for the corner over the labels."""
        return f"{self.deal.conventions.currency} {self.scale.name}".strip()

    @cached_property
    def issues(self) -> Mapping[str, Issue]:
        """The first issue of each path, drafts aside."""
        found: dict[str, Issue] = {}
        for issue in self.result.plan.issues:
            if issue.code != "draft":
                found.setdefault(issue.path, issue)
        return found

    def cell(self, row: int, year: int) -> Cell:
        """A cell, made once."""
        place = row, year
        if place not in self._cells:
            self._cells[place] = self._made(self.rows[row], year)
        return self._cells[place]

    def _made(self, row: GridRow, year: int) -> Cell:
        match row:
            case InputRow(path=path):
                return self._input(path, year)
            case LineRow(key=key, bold=bold):
                value = self.value(row, year)
                kind: Kind = "strong" if bold else "figure"
                return Cell(self._text(key, value), "missing" if value is None else kind)
            case _:
                return Cell("", "band")

    def _input(self, path: str, year: int) -> Cell:
        draft = self.deal.drafts.get(f"{path}.{year}")
        if draft is not None:
            return Cell(draft, "typed", "draft")
        row = self._row(path)
        value = at_year(row, year)
        mark: Mark = "issue" if f"{path}.{year}" in self.issues else ""
        if value is None:
            return Cell("", "unset", mark)
        text = self._assumed(path, value)
        return Cell(text, "typed", mark) if year in row else Cell(FOLLOWS + text, "following", mark)

    def _row(self, path: str) -> Mapping[int, float]:
        return self._typed.get(path) or {}

    @cached_property
    def _typed(self) -> Mapping[str, Mapping[int, float] | None]:
        """What is typed in each year row that the deal has."""
        found: dict[str, Mapping[int, float] | None] = {}
        for row in self.rows:
            if isinstance(row, InputRow):
                try:
                    found[row.path] = get(self.deal, row.path)
                except UnknownPathError:
                    continue
        return found

    @cached_property
    def _percents(self) -> frozenset[str]:
        """The year rows that are typed in per cent."""
        return frozenset(path for path in self._typed if in_percent(self.deal, path))

    @cached_property
    def takes_entries(self) -> tuple[bool, ...]:
        """Which rows are inputs that the deal has."""
        return tuple(isinstance(row, InputRow) and row.path in self._typed for row in self.rows)

    def _assumed(self, path: str, value: float) -> str:
        if path in self._percents:
            return numbers.trimmed(numbers.hundredfold(value), self.locale, 1, 4)
        if value == round(value) or abs(value) >= 1e4:
            return numbers.compact(value, self.locale, _LONGEST)
        return numbers.trimmed(value, self.locale, 0, 2)

    def _text(self, key: str, value: float | None) -> str:
        """A figure's text, taken over from the sheet before where the figure is the same."""
        place = key, value
        if place not in self._texts:
            self._texts[place] = self._figure(key, value)
        return self._texts[place]

    def take_over(self, earlier: "Sheet") -> None:
        """Use the texts that another sheet has made, where figures are put in the same way."""
        alike = self.locale == earlier.locale and self.scale == earlier.scale
        if alike and len(earlier._texts) < MOST_TEXTS:
            self._texts = earlier._texts

    def _figure(self, key: str, value: float | None) -> str:
        declared = self.result.declared.get(key)
        match declared.unit if declared else "":
            case "money":
                return numbers.money(value, self.locale, self.scale)
            case "fraction":
                return numbers.percent(value, self.locale)
            case "index":
                return numbers.number(value, self.locale, 4)
            case _:
                return numbers.number(value, self.locale, 2)

    def value(self, row: GridRow, year: int) -> float | None:
        """The number behind a cell; of an input the one that holds in that year."""
        match row:
            case InputRow(path=path):
                return at_year(self._row(path), year)
            case LineRow(key=key) if key in self.lines:
                return self.lines[key][year - 1]
            case _:
                return None

    def percent(self, row: GridRow) -> bool:
        """Whether a row is typed and copied in per cent."""
        match row:
            case InputRow(path=path):
                return path in self._percents
            case LineRow(key=key):
                declared = self.result.declared.get(key)
                return declared is not None and declared.unit == "fraction"
            case _:
                return False

    def exists(self, row: InputRow) -> bool:
        """Whether the deal has this year row."""
        return row.path in self._typed
