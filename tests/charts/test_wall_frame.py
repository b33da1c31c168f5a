"""Where the wall stands."""

import pytest

from tests.charts.walls import BASE, wall_figures
from workbench.charts.wall_frame import exit_lines, frame_of, mark_labels
from workbench.charts.wall_stack import WallFigures, stack_of


def frame(figures: WallFigures, wide: float, high: float) -> tuple[bool, bool]:
    found = frame_of(figures, stack_of(figures), 11, (wide, high))
    return found.labelled, found.with_amounts


def test_labels_give_way_to_the_wall() -> None:
    figures = wall_figures(BASE, 2e6, 2.5e6)
    assert frame(figures, 262, 500) == (True, True)
    assert frame(figures, 44, 500) == (False, False)
    assert frame(figures, 262, 100) == (False, False)


def test_amounts_wider_than_value_and_price_give_way_first() -> None:
    figures = wall_figures([(5.0, -4.0)], 0.0, 1.0)
    wide = wall_figures([(5e14, -5e14)], 1.0, 1.0)
    assert frame(figures, 150, 500) == (True, True)
    assert frame(wide, 150, 500) == (True, False)


def test_the_ground_carries_wall_and_price() -> None:
    figures = wall_figures([(100.0, 0.0)], 100.0, 400.0)
    found = frame_of(figures, stack_of(figures), 11, (262, 500))
    assert found.y(0) == found.ground
    assert found.y(400) == pytest.approx(2 * 1.25 * 11)
    left, y, right, _ = found.across(7)
    assert (left, y, right) == (found.left - 7, 7, found.right + 7)


def test_nothing_to_scale() -> None:
    for amount in (0.0, 5e-324):
        figures = wall_figures([(amount, 0.0)], 0.0, 0.0)
        assert frame_of(figures, stack_of(figures), 11, (262, 500)).scale == 0


def test_marks_in_money() -> None:
    figures = wall_figures([(100.0, 0.0)], 300.0, 50.0)
    marks = {
        label.key: (label.at, label.lines) for label in mark_labels(figures, stack_of(figures))
    }
    assert marks == {
        "value": (400, ("value", "400")),
        "price": (50, ("price", "50")),
        "exit": (250, ("exit 75.0%", "300")),
    }


def test_marks_of_an_exit_below_zero_and_of_rents_alone() -> None:
    figures = wall_figures([(100.0, 0.0)], -40.0)
    marks = {label.key: label.at for label in mark_labels(figures, stack_of(figures))}
    assert marks == {"value": 60, "exit": -20}
    figures = wall_figures([(100.0, 0.0)], None)
    marks = {label.key: label.at for label in mark_labels(figures, stack_of(figures))}
    assert marks == {"rents": 100}
    assert exit_lines(figures) == ("exit", "0")
    assert mark_labels(wall_figures([], None), stack_of(wall_figures([], None))) == ()
