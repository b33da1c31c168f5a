"""Charts by year: income and debt service, the loan under the price, tiers by year."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass

from PySide6.QtGui import QShowEvent
from PySide6.QtWidgets import QWidget

from workbench.charts.income import draw_income
from workbench.charts.loan import draw_loan
from workbench.charts.shapes import Picture, Text
from workbench.charts.tiers import draw_tiers
from workbench.engine.result import Result
from workbench.report.chart_figures import income_figures, loan_figures, tier_figures
from workbench.report.voice import Voice
from workbench.report.years import Years
from workbench.session.session import Session
from workbench.session.typed import locale_of
from workbench.text.numbers import MISSING
from workbench.ui.picture_view import Layout, PictureView

_NO_YEARS = "The hold is not known, so there are no years to show."
_LETTERS = 11.0


@dataclass(frozen=True)
class Chart:
    """A chart: its name, how its years become a layout, and the lines behind its regions."""

    name: str
    layout: Callable[[Years], Layout]
    lines: Mapping[str, str]


def _income(years: Years) -> Layout:
    figures = income_figures(years)
    return lambda width, height: draw_income(figures, width, height, _LETTERS)


def _loan(years: Years) -> Layout:
    figures = loan_figures(years)
    return lambda width, height: draw_loan(figures, width, height, _LETTERS)


def _tiers(years: Years) -> Layout:
    figures = tier_figures(years)
    return lambda width, height: draw_tiers(figures, width, height, _LETTERS)


INCOME = Chart(
    "Income and debt service by year",
    _income,
    {"noi": "noi", "net_cash_flow": "net_cash_flow", "debt_service": "debt_service"},
)
LOAN = Chart(
    "Loan under price",
    _loan,
    {
        "loan_balance": "loan_balance",
        "price": "purchase.price",
        "exit_price_of_year": "exit_price_of_year",
    },
)
TIERS = Chart("Tiers by year", _tiers, {"in_hand": "cash_in_hand", "expected": "cash_expected"})


class ChartView(PictureView):
    """A chart of the open deal. `asked` carries a line and a year, or an input and None."""

    def __init__(self, session: Session, chart: Chart, parent: QWidget | None = None) -> None:
        super().__init__(chart.name, parent)
        self._session = session
        self._chart = chart
        self._years: Years | None = None
        session.result_changed.connect(self._on_result_changed)

    def sentence(self, key: str) -> str:
        if self._years is None:
            return ""
        line, year = self._figure(key)
        result, voice = self._years.result, self._years.voice
        if line == "purchase.price":
            return f"Price: {voice.money(result.given(line))}."
        amount = result.figure(line, year)
        if line == "debt_service" and amount is not None:
            amount = -amount
        label, when = result.declared[line].label, "at closing" if year is None else f"year {year}"
        return f"{label}, {when}: {MISSING if amount is None else voice.money(amount)}."

    def meaning(self, key: str) -> object:
        return self._figure(key)

    def _figure(self, key: str) -> tuple[str, int | None]:
        """The line and the year behind a region; what is owed at closing is a line of its own."""
        head, _, number = key.partition(".")
        if key == "loan_balance.0":
            return "loan_amount", None
        return self._chart.lines[head], int(number) if number else None

    def showEvent(self, event: QShowEvent) -> None:
        super().showEvent(event)
        self._catch_up()

    def _on_result_changed(self, result: object) -> None:
        if self.isVisible():
            self._catch_up()

    def _catch_up(self) -> None:
        """Show the figures as they stand, unless they are shown already."""
        result = self._session.result
        if self._years is not None and self._years.result is result:
            return
        self._years = _years_of(result)
        self.show_layout(self._chart.layout(self._years) if self._years.count else _no_years)


def _years_of(result: Result) -> Years:
    deal = result.plan.deal
    hold = result.given("leave.hold")
    return Years(result, Voice(deal, locale_of(deal)), int(hold or 0))


def _no_years(width: float, height: float) -> Picture:
    words = Text(8.0, 20.0, _NO_YEARS, _LETTERS, colour="muted")
    return Picture(width, height, (words,), words=_NO_YEARS)
