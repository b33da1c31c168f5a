"""What stands on what."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.charts.wall_stack import WallCourse, WallFigures, stack_of


def figures(rows: list[tuple[float, float]], leaving: float | None) -> WallFigures:
    courses = tuple(WallCourse(year, a, b) for year, (a, b) in enumerate(rows, start=1))
    return WallFigures(courses, leaving, None, None, None, str, str)


def test_year_one_at_the_ground_and_the_exit_on_top() -> None:
    stack = stack_of(figures([(60, 40), (30, 50)], 200))
    assert [(c.year, c.low, c.high, c.is_exit) for c in stack.courses] == [
        (1, 0, 100, False),
        (2, 100, 180, False),
        (3, 180, 380, True),
    ]
    assert [piece.key for piece in stack.courses[0].pieces] == ["in_hand.1", "expected.1"]
    assert stack.courses[2].pieces[0].key == "exit"
    assert (stack.top, stack.depth, stack.trench) == (380, 0, ())


def test_below_zero_goes_down_and_the_wall_starts_at_the_bottom() -> None:
    stack = stack_of(figures([(-30, 20), (50, -10)], 100))
    assert [(c.pieces[0].key, c.high, c.low) for c in stack.trench] == [
        ("in_hand.1", 0, -30),
        ("expected.2", -30, -40),
    ]
    assert [(c.year, c.low, c.high) for c in stack.courses] == [
        (1, -40, -20),
        (2, -20, 30),
        (3, 30, 130),
    ]
    assert (stack.depth, stack.top) == (40, 130)


def test_only_losses() -> None:
    stack = stack_of(figures([(-30, 0)], -20))
    assert stack.courses == ()
    assert (stack.depth, stack.top) == (50, -50)
    assert stack.trench[-1].is_exit


def test_nothing_and_a_missing_exit() -> None:
    assert stack_of(figures([], None)).courses == ()
    assert stack_of(figures([(0, 0)], 0)).top == 0
    assert stack_of(figures([(1, 0)], None)).top == 1


amounts = st.floats(-1e9, 1e9)


@settings(deadline=None)
@given(st.lists(st.tuples(amounts, amounts), max_size=40), amounts)
def test_the_top_is_always_the_value(rows: list[tuple[float, float]], leaving: float) -> None:
    value = sum(a + b for a, b in rows) + leaving
    assert stack_of(figures(rows, leaving)).top == pytest.approx(value, rel=1e-9, abs=1e-3)
