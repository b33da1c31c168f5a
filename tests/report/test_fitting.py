"""Widths of columns."""

import pytest

from workbench.charts.lettering import width
from workbench.report import sheet
from workbench.report.document import Column, Table
from workbench.report.fitting import fitted

ROWS = (("a name", "1,234", "some words"), ("another", "12\n345,678", "more"))


def widths(*columns: Column, rows: tuple[tuple[str, ...], ...] = ROWS) -> tuple[float, ...]:
    return fitted(Table(columns, rows), 300.0)


def test_shares_divide_what_the_gaps_leave() -> None:
    found = widths(Column("", share=1), Column("", share=2), Column("", share=1))
    assert found == pytest.approx((70, 140, 70))
    assert sum(found) + 2 * sheet.CELL_GAP == pytest.approx(300)


def test_a_fitted_column_is_as_wide_as_its_widest_line() -> None:
    found = widths(Column(""), Column("", fit=True), Column(""))
    assert found[1] == pytest.approx(width("345,678", sheet.CELL), abs=0.1)
    assert found[0] == found[2] == pytest.approx((280 - found[1]) / 2)


def test_a_bold_row_is_measured_bold() -> None:
    table = Table((Column(""), Column("", fit=True)), (("a", "111"), ("b", "111")), frozenset({1}))
    assert fitted(table, 300.0)[1] == pytest.approx(width("111", sheet.CELL, "bold"), abs=0.1)


def test_a_title_may_take_two_lines() -> None:
    title = "Market rent a year"  # broken before or after its second word, whichever is narrower
    found = widths(Column(""), Column(title, fit=True), Column(""))
    assert found[1] == pytest.approx(width("rent a year", sheet.NOTE), abs=0.1)


def test_where_room_is_short_titles_are_broken_before_figures() -> None:
    titles = ("Gross rent of the whole year", "", "")
    columns = tuple(Column(title, "right", fit=True) for title in titles)
    figure = "123,456,789"
    found = fitted(Table((Column("name"), *columns), (("a", "1", figure, figure),)), 200.0)
    assert found[1] < width("the whole year", sheet.NOTE)
    assert min(found[2:]) >= width(figure, sheet.CELL)


def test_what_is_too_wide_even_then_is_narrowed_in_proportion() -> None:
    columns = (Column("n"), Column("", fit=True), Column("", fit=True))
    found = fitted(Table(columns, (("a", "1" * 60, "1" * 30),)), 300.0)
    assert sum(found) + 2 * sheet.CELL_GAP == pytest.approx(300)
    assert found[1] == pytest.approx(2 * found[2], rel=0.01)
    assert found[0] == pytest.approx(0.2 * 280)


def test_fitted_columns_alone_fill_the_room() -> None:
    found = fitted(Table((Column("", fit=True), Column("", fit=True)), (("aa", "aa"),)), 300.0)
    assert found == pytest.approx((145, 145))
