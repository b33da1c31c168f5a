"""Bricks."""

import pytest

from workbench.charts.masonry import Bond, Box, lay
from workbench.charts.shapes import Line, Rect, Shape

BOND = Bond("in_hand", 20, 1.0)


def uprights(shapes: tuple[Shape, ...]) -> list[tuple[float, float]]:
    return [(s.x1, s.y1) for s in shapes if isinstance(s, Line) and s.x1 == s.x2]


def beds(shapes: tuple[Shape, ...]) -> list[float]:
    return [s.y1 for s in shapes if isinstance(s, Line) and s.y1 == s.y2]


def test_one_filled_area_under_its_joints() -> None:
    shapes = lay(Box(0, 0, 100, 30), 3, BOND, 0)
    assert shapes[0] == Rect(0, 0, 100, 30, "in_hand")
    assert all(isinstance(shape, Line) and shape.colour == "paper" for shape in shapes[1:])


def test_rows_are_laid_in_running_bond_counted_from_below() -> None:
    shapes = lay(Box(0, 0, 100, 30), 3, BOND, 0)
    assert beds(shapes) == [10, 20]
    rows = {top: [x for x, y in uprights(shapes) if y == top] for top in (20, 10, 0)}
    assert rows[20] == rows[0] == [20, 40, 60, 80]
    assert rows[10] == [10, 30, 50, 70, 90]


def test_no_slivers_at_the_ends() -> None:
    shapes = lay(Box(0, 0, 43, 10), 1, BOND, 0)
    assert [x for x, _ in uprights(shapes)] == [20]


@pytest.mark.parametrize(
    ("tall", "has_beds", "has_uprights"), [(9, True, True), (5, False, True), (2, False, False)]
)
def test_low_rows_lose_their_joints(tall: float, has_beds: bool, has_uprights: bool) -> None:
    shapes = lay(Box(0, 0, 100, tall), 2, BOND, 0)
    assert bool(beds(shapes)) == has_beds
    assert bool(uprights(shapes)) == has_uprights


def test_the_far_sides_of_a_box() -> None:
    assert (Box(1, 2, 3, 4).right, Box(1, 2, 3, 4).bottom) == (4, 6)
