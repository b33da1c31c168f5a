"""What kind of row a formula gives, and the mixtures that are refused."""

from typing import get_args

import pytest

from workbench.engine import formula as f
from workbench.engine.formula import Fact, Formula, Given, Line, Look, Number
from workbench.engine.lines.line import Per
from workbench.engine.rows import _LOOKS, RowError, is_row, row_of

LINES: dict[str, Per] = {"month": "month", "year": "year", "date": "date", "once": "once"}
MONTH, YEAR, DATE, ONCE = (Line(key) for key in LINES)


@pytest.mark.parametrize(
    ("formula", "row"),
    [
        (Number(1.0), "once"),
        (MONTH, "month"),
        (Given("earn.vacancy"), "year"),
        (Given("leave.hold"), "once"),
        (Fact("contract"), "month"),
        (Fact("tied@i1"), "month"),
        (Fact("units"), "once"),
        (Fact("date_years"), "date"),
        (ONCE * 2 + 1, "once"),
        (MONTH * ONCE, "month"),
        (2 / YEAR, "year"),
        (DATE > ONCE, "date"),
        (f.where(ONCE <= 0, 0, YEAR), "year"),
        (f.running_sum(MONTH), "month"),
        (f.later_sum(YEAR), "year"),
        (f.running_sum(DATE), "date"),
        (f.year_sum(MONTH), "year"),
        (f.year_end(MONTH), "year"),
        (f.of_year(YEAR), "month"),
        (f.month_starts(MONTH), "date"),
        (f.over_dates(DATE), "once"),
        (f.before(YEAR, ONCE), "year"),
        (f.OnDates(MONTH, ONCE), "date"),
        (f.at_hold(YEAR), "once"),
        (f.FirstDate(DATE), "once"),
        (f.OnDate(ONCE, 12 * ONCE), "date"),
    ],
)
def test_rows(formula: Formula, row: Per) -> None:
    assert row_of(formula, LINES) == row


@pytest.mark.parametrize(
    ("formula", "words"),
    [
        (MONTH + YEAR, r"Pair mixes rows of kinds \['month', 'year'\]"),
        (DATE < MONTH, "Compare mixes rows"),
        (f.where(YEAR <= 0, ONCE, MONTH), "Where mixes rows"),
        (f.least(DATE, YEAR), "Pair mixes rows"),
        (f.running_sum(ONCE), "running_sum cannot look along a row of kind once"),
        (f.following(Number(1.0)), "following cannot look along a row of kind once"),
        (f.year_sum(YEAR), "year_sum cannot look along a row of kind year"),
        (f.year_end(DATE), "year_end cannot look along a row of kind date"),
        (f.of_year(MONTH), "of_year cannot look along a row of kind month"),
        (f.month_starts(YEAR), "month_starts cannot look along a row of kind year"),
        (f.over_dates(MONTH), "over_dates cannot look along a row of kind month"),
        (f.OnDates(YEAR, ONCE), "on_dates cannot look along a row of kind year"),
        (f.AtYear(MONTH, ONCE), "at_year cannot look along a row of kind month"),
        (f.FirstDate(MONTH), "first_date cannot look along a row of kind month"),
        (f.before(ONCE, 1), "before cannot look along a row of kind once"),
        (f.before(MONTH, MONTH), "Before wants a single figure, not a row of kind month"),
        (f.OnDates(MONTH, DATE), "OnDates wants a single figure, not a row of kind date"),
        (f.AtYear(YEAR, YEAR), "AtYear wants a single figure, not a row of kind year"),
        (f.OnDate(DATE, ONCE), "OnDate wants a single figure, not a row of kind date"),
        (f.OnDate(ONCE, MONTH), "OnDate wants a single figure, not a row of kind month"),
        # However deep it stands.
        (1 - f.at_hold(YEAR * f.year_sum(f.of_year(MONTH))), "of_year cannot look"),
    ],
)
def test_mixtures_are_refused(formula: Formula, words: str) -> None:
    with pytest.raises(RowError, match=words):
        row_of(formula, LINES)


@pytest.mark.parametrize("along", get_args(f.Along))
def test_every_look_knows_its_rows(along: f.Along) -> None:
    wanted, made = _LOOKS[along]
    fitting = Line(wanted or "month")
    assert row_of(Look(along, fitting), LINES) == (made or "month")


def test_inputs_that_are_year_rows() -> None:
    rows = ["earn.vacancy", "expenses@x9.growth", "loans@l2.rate", "other_income@i1.stated"]
    rows += ["stated.rent", "returns.equity", "spend.growth"]
    figures = ["leave.hold", "spaces@s1.count", "spaces@s1.market_rent.amount", "blend@b1.weight"]
    figures += ["steps@p1.change", "lines@a4.amount"]
    assert [path for path in [*rows, *figures] if is_row(path)] == rows


def test_an_input_that_no_deal_has() -> None:
    with pytest.raises(KeyError):
        is_row("earn.vacancies")
