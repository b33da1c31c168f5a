"""Looks along the row, by hand; rows first, trials last."""

from typing import get_args

import numpy as np
import numpy.typing as npt
import pytest

from workbench.engine.calendar import MONTHS
from workbench.engine.formula import Along
from workbench.engine.looks import LOOKS, at_year, before, first_date, on_date, on_dates, wide

Array = npt.NDArray[np.float64]


def column(*cells: float) -> Array:
    return np.array(cells, dtype=np.float64)[:, np.newaxis]


TWO = np.array([[1.0, 10.0], [2.0, 20.0], [-4.0, 40.0]])
"""Three cells of two trials."""


def test_each_look_has_its_function() -> None:
    assert set(LOOKS) == set(get_args(Along))


@pytest.mark.parametrize(
    ("along", "cells"),
    [
        ("running_sum", [[1, 10], [3, 30], [-1, 70]]),
        ("running_product", [[1, 10], [2, 200], [-8, 8000]]),
        ("running_least", [[1, 10], [1, 10], [-4, 10]]),
        ("later_sum", [[-2, 60], [-4, 40], [0, 0]]),
        ("following", [[2, 20], [-4, 40], [0, 0]]),
        ("month_starts", [[1, 10], [2, 20], [-4, 40], [0, 0]]),
        ("over_dates", [-1, 70]),
    ],
)
def test_looks_by_hand(along: str, cells: list[float]) -> None:
    assert LOOKS[along](TWO).tolist() == cells


def test_later_cells_are_summed_from_the_far_end() -> None:
    # 1e16 first and then ones: summed from the front and taken off, the ones would be lost.
    row = column(1e16, *[1.0] * 9)
    assert LOOKS["later_sum"](row)[0, 0] == 9.0


def test_a_sum_over_dates_is_the_last_running_sum_to_the_last_bit() -> None:
    rows = np.random.default_rng(3).normal(0, 1e6, (493, 5))
    for some in (rows, rows[:, :1]):
        assert np.array_equal(LOOKS["over_dates"](some), LOOKS["running_sum"](some)[-1])


def test_months_and_years() -> None:
    months = np.arange(1.0, 25.0)[:, np.newaxis] * np.array([1.0, 2.0])
    # 1 + … + 12 = 78; 13 + … + 24 = 222.
    assert LOOKS["year_sum"](months).tolist() == [[78, 156], [222, 444]]
    assert LOOKS["year_end"](months).tolist() == [[12, 24], [24, 48]]
    spread = LOOKS["of_year"](column(5.0, 7.0))
    assert spread[:, 0].tolist() == [5.0] * 12 + [7.0] * 12


def test_the_cell_before() -> None:
    assert before(column(1, 2, 3), 9.0).tolist() == [[9], [1], [2]]
    assert before(column(1, 2, 3), np.array([9.0])).tolist() == [[9], [1], [2]]
    # One of the two may differ from trial to trial, or both.
    assert before(column(1, 2, 3), np.array([8.0, 9.0])).tolist() == [[8, 9], [1, 1], [2, 2]]
    assert before(TWO, 0.0).tolist() == [[0, 0], [1, 10], [2, 20]]
    assert before(TWO, np.array([8.0, 9.0])).tolist() == [[8, 9], [1, 10], [2, 20]]


def test_months_on_dates() -> None:
    assert on_dates(column(1, 2), 9.0).tolist() == [[9], [1], [2]]
    assert on_dates(column(1, 2), np.array([8.0, 9.0])).tolist() == [[8, 9], [1, 1], [2, 2]]
    assert on_dates(TWO, np.array([9.0])).tolist() == [[9, 9], [1, 10], [2, 20], [-4, 40]]


@pytest.mark.parametrize("year", [2, 2.0, np.array([2.0])])
def test_the_cell_of_one_year(year: float | Array) -> None:
    assert at_year(TWO, year).tolist() == [2, 20]


@pytest.mark.parametrize("year", [0, 4, np.nan, np.array([-1.0])])
def test_a_year_that_the_row_has_not(year: float | Array) -> None:
    cells = at_year(TWO, year)
    assert cells.shape == (2,)
    assert np.isnan(cells).all()


def test_the_cells_of_a_year_for_each_trial() -> None:
    years = np.array([3.0, 1.0])
    assert at_year(TWO, years).tolist() == [-4, 10]
    assert at_year(column(5, 6, 7), years).tolist() == [7, 5]
    for none in (4.0, 0.0, np.nan):
        cells = at_year(TWO, np.array([none, 2.0]))
        assert np.isnan(cells[0]) and cells[1] == 20


def test_a_figure_on_a_date() -> None:
    row = on_date(np.array([5.0]), 24.0)
    assert row.shape == (MONTHS + 1, 1)
    assert np.flatnonzero(row[:, 0]).tolist() == [24] and row[24, 0] == 5
    both = on_date(np.array([5.0, 6.0]), np.array([12.0, 24.0]))
    assert both.sum(axis=0).tolist() == [5, 6]
    assert both[12].tolist() == [5, 0] and both[24].tolist() == [0, 6]
    assert np.isnan(on_date(np.array([5.0]), np.array([np.nan]))).all()


def test_years_to_the_first_date_that_is_not_negative() -> None:
    assert first_date(column(-3, -1, 0, -1, 4)).tolist() == [2 / 12]
    assert first_date(column(1, -1)).tolist() == [0.0]
    assert np.isnan(first_date(column(-3, -1)))[0]
    # A gap before it may hide an earlier one.
    assert np.isnan(first_date(column(-3, np.nan, 4)))[0]
    trials = first_date(np.array([[-1.0, -1.0], [2.0, -2.0]]))
    assert trials[0] == 1 / 12 and np.isnan(trials[1])


def test_a_single_figure_in_each_cell() -> None:
    assert wide(3.0, 4).tolist() == [[3.0]] * 4
    assert wide(np.array([3.0, 4.0]), 2).tolist() == [[3, 4], [3, 4]]
    assert wide(3.0, 0).tolist() == [3.0]
    assert wide(np.array([3.0, 4.0]), 0).tolist() == [3, 4]
