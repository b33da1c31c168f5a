"""The value wall: heights are present values, measured from the ground."""

from itertools import pairwise

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.charts.walls import (
    BASE,
    ground_of,
    hatched,
    overlapping,
    price_line_of,
    region,
    said,
    text_boxes,
    wall_figures,
)
from workbench.charts.shapes import Line, Rect
from workbench.charts.wall import draw_wall

EXIT = 2_036_988.0
PRICE = 2_500_000.0


def test_heights_are_in_proportion_to_present_value() -> None:
    wall = draw_wall(wall_figures(BASE, EXIT, PRICE), 262, 600)
    unit = region(wall, "exit").height / EXIT
    assert region(wall, "in_hand.1").height == pytest.approx(226_927 * unit)
    assert region(wall, "in_hand.2").height == pytest.approx((205_000 + 8_981) * unit)
    assert ground_of(wall) == pytest.approx(
        region(wall, "in_hand.1").y + region(wall, "in_hand.1").height
    )
    line = price_line_of(wall)
    assert line is not None
    assert ground_of(wall) - line.y1 == pytest.approx(PRICE * unit)
    value = sum(a + b for a, b in BASE) + EXIT
    assert ground_of(wall) - region(wall, "exit").y == pytest.approx(value * unit)


def test_in_hand_lies_left_of_expected_in_proportion() -> None:
    wall = draw_wall(wall_figures(BASE, EXIT), 262, 600)
    left, right = region(wall, "in_hand.4"), region(wall, "expected.4")
    assert (left.y, left.height) == (right.y, right.height)
    assert left.x + left.width == pytest.approx(right.x)
    assert left.width / right.width == pytest.approx(150_000 / 40_521)


def test_tiers_are_told_apart_by_length_of_brick() -> None:
    def longest(rows: list[tuple[float, float]]) -> float:
        wall = draw_wall(wall_figures(rows, None), 262, 100, 11)
        joints = [s for s in wall.shapes if isinstance(s, Line) and s.colour == "paper"]
        lowest = max(joint.y2 for joint in joints)
        xs = sorted(j.x1 for j in joints if j.x1 == j.x2 and j.y2 == lowest)
        return max(b - a for a, b in pairwise(xs))

    assert longest([(100.0, 0.0)]) > 2 * longest([(0.0, 100.0)])


def test_the_exit_is_of_larger_stones_that_stand_out() -> None:
    wall = draw_wall(wall_figures(BASE, EXIT), 262, 600)
    cap, course = region(wall, "exit"), region(wall, "in_hand.1")
    assert cap.x == course.x - 4
    assert cap.width == course.width + 8


def test_a_course_under_eight_pixels_is_one_row() -> None:
    for high in (10.0, 12.0, 14.0, 20.0, 21.5, 28.0, 40.0):
        wall = draw_wall(wall_figures([(1.0, 0.0)], None), 40, high)
        beds = [s for s in wall.shapes if isinstance(s, Line) and s.colour == "paper"]
        rows = 1 + len({bed.y1 for bed in beds if bed.y1 == bed.y2})
        assert rows == max(1, int(region(wall, "in_hand.1").height / 8))


def test_losses_go_into_a_hatched_trench_and_the_top_is_the_value() -> None:
    figures = wall_figures([(-120_000.0, -80_000.0), (50_000.0, -30_000.0)], 1_000_000.0, 600_000.0)
    wall = draw_wall(figures, 262, 600)
    ground = ground_of(wall)
    unit = region(wall, "exit").height / 1_000_000
    assert [rect.height for rect in hatched(wall)] == pytest.approx(
        [120_000 * unit, 80_000 * unit, 30_000 * unit]
    )
    assert hatched(wall)[0].y == pytest.approx(ground)
    bottom = hatched(wall)[-1].y + hatched(wall)[-1].height
    first = region(wall, "in_hand.2")
    assert first.y + first.height == pytest.approx(bottom)
    assert ground - region(wall, "exit").y == pytest.approx(820_000 * unit)
    line = price_line_of(wall)
    assert line is not None
    assert ground - line.y1 == pytest.approx(600_000 * unit)
    assert "Hatched: −230,000 below zero (years 1–2)." in wall.words


def test_a_value_below_zero_lies_below_the_ground_and_has_no_shares() -> None:
    wall = draw_wall(wall_figures([(20.0, -180.0), (20.0, -130.0)], 100.0, 500.0), 262, 500)
    assert region(wall, "exit").y > ground_of(wall)
    assert "−170" in said(wall)
    assert "exit" in said(wall)
    assert not any("%" in text for text in said(wall))
    assert "The value is not above zero, so there are no shares." in said(wall)


def test_without_an_exit_price_the_wall_shows_what_there_is_and_says_so() -> None:
    figures = wall_figures(BASE, None, PRICE, exit_reason="The exit yield is missing.")
    wall = draw_wall(figures, 262, 500)
    assert "rents alone" in said(wall)
    assert "value" not in said(wall)
    assert "No exit price. The exit yield is missing." in said(wall)
    assert {found.key for found in wall.regions} >= {"in_hand.1", "expected.6"}


def test_a_wall_without_price_has_no_line() -> None:
    assert price_line_of(draw_wall(wall_figures(BASE, EXIT), 262, 500)) is None


def test_the_words_say_it_all() -> None:
    wall = draw_wall(wall_figures(BASE, EXIT, PRICE, has_leases=False), 44, 300)
    assert said(wall) == []
    assert wall.words == (
        "Value wall. Value 3,229,837. Price 2,500,000. Rent in hand 901,927, "
        "rent expected 290,922. Exit 2,036,988, 63.1%. No leases entered: no rent is in hand."
    )


def test_the_words_of_an_empty_wall() -> None:
    assert draw_wall(wall_figures([], None), 262, 500).words == (
        "Value wall. Rent in hand 0, rent expected 0. No exit price. Nothing to stack yet."
    )
    loss = draw_wall(wall_figures([(0.0, 0.0)], -1.0, has_leases=False), 262, 500)
    assert "Exit −1. No leases entered" in loss.words


@pytest.mark.parametrize("size", [(262, 500), (247, 430), (400, 900), (180, 260), (1200, 400)])
@pytest.mark.parametrize("hold", [1, 2, 7, 15, 16, 40])
def test_no_label_covers_another_or_is_cut(size: tuple[float, float], hold: int) -> None:
    rows = [(max(0.0, 60_000.0 - 4_000 * year), 20_000.0 + 900 * year) for year in range(hold)]
    value = sum(a + b for a, b in rows) + 900_000
    for price in (0.0, value / 3, value * 0.99, value, value * 3, value * 200):
        wall = draw_wall(wall_figures(rows, 900_000.0, price), *size)
        boxes = text_boxes(wall)
        assert not overlapping(boxes)
        assert all(left >= -0.01 and right <= size[0] + 0.01 for left, _, right, _ in boxes)
        assert all(top >= -0.01 and bottom <= size[1] + 0.01 for _, top, _, bottom in boxes)


amounts = st.one_of(st.just(0.0), st.floats(-1e12, 1e12), st.floats(-10, 10))


@settings(deadline=None)
@given(
    st.lists(st.tuples(amounts, amounts), max_size=40),
    st.one_of(st.none(), amounts),
    st.one_of(st.none(), st.floats(0, 1e13)),
    st.sampled_from([(1.0, 1.0), (10.0, 400.0), (44.0, 300.0), (262.0, 500.0), (4000.0, 3000.0)]),
    st.sampled_from([6.0, 11.0, 22.0]),
)
def test_any_figures_at_any_size_stay_inside_the_picture(
    rows: list[tuple[float, float]],
    leaving: float | None,
    price: float | None,
    room: tuple[float, float],
    size: float,
) -> None:
    wall = draw_wall(wall_figures(rows, leaving, price), *room, size)
    assert len(wall.shapes) < 30_000
    for shape in wall.shapes:
        if isinstance(shape, Rect):
            assert shape.height >= -1e-6
            assert shape.width >= -1e-6
            assert shape.x >= -1e-6
            assert shape.x + shape.width <= room[0] + 1e-6
            assert shape.y >= -1e-6
            assert shape.y + shape.height <= room[1] + 1e-6
    if room[0] >= 262:
        assert not overlapping(text_boxes(wall))
