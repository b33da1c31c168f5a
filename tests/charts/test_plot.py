"""The frame of the charts by year."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from tests.charts.by_year import money
from workbench.charts.masonry import Box
from workbench.charts.plot import Plot, Room, ground, known, plot_of, region, ticks
from workbench.charts.shapes import Line, Text

ROOM = Room(400.0, 150.0, 8.0)


def frame(amounts: list[float], years: range, room: Room = ROOM) -> tuple[Plot, list[Text]]:
    plot, shapes = plot_of(room, amounts, years, money, 20.0)
    return plot, [shape for shape in shapes if isinstance(shape, Text)]


def names_of(years: range, room: Room = ROOM) -> list[str]:
    _, texts = frame([100.0], years, room)
    return [text.text for text in texts if text.anchor == "middle"]


@pytest.mark.parametrize(
    ("low", "high", "marks"),
    [
        (0.0, 284_000.0, (0, 100_000, 200_000, 300_000)),
        (0.0, 120.0, (0, 50, 100, 150)),
        (-30.0, 70.0, (-50, 0, 50, 100)),
        (-90.0, 0.0, (-100, -50, 0)),
        (0.0, 0.0, (0,)),
        (0.0, 0.3, (0, 1)),
    ],
)
def test_marks_are_round_and_hold_all_amounts(
    low: float, high: float, marks: tuple[float, ...]
) -> None:
    assert ticks(low, high, 3) == marks


@given(st.floats(-1e15, 0), st.floats(0, 1e15), st.integers(1, 5))
def test_marks_hold_all_amounts_and_are_not_many(low: float, high: float, most: int) -> None:
    marks = ticks(low, high, most)
    assert 0 in marks
    assert len(marks) <= most + 3
    if high - low > 1e-6:
        assert marks[0] <= low + 1e-12 * (high - low)
        assert marks[-1] >= high - 1e-12 * (high - low)


def test_heights_are_in_proportion() -> None:
    plot, _ = frame([100.0], range(1, 6))
    assert plot.y(0.0) == plot.bottom
    assert plot.y(100.0) == pytest.approx(plot.top)
    assert plot.y(50.0) == pytest.approx((plot.top + plot.bottom) / 2)


def test_each_year_has_its_place_and_its_bar_within_it() -> None:
    plot, _ = frame([100.0], range(1, 11))
    left, wide = plot.place(3)
    assert wide == pytest.approx((plot.right - plot.left) / 10)
    assert left == pytest.approx(plot.left + 2 * wide)
    bar = plot.bar(3, 0.0, 50.0, (0.25, 0.75))
    assert (bar.x, bar.width) == pytest.approx((left + wide / 4, wide / 2))
    assert (bar.y, bar.bottom) == (plot.y(50.0), plot.y(0.0))


def test_few_years_have_no_wider_bars_than_others() -> None:
    plot, _ = frame([100.0], range(1, 2))
    bar = plot.bar(1, 0.0, 100.0, (0.0, 1.0))
    assert bar.width == 64.0
    assert bar.x + 32 == pytest.approx((plot.left + plot.right) / 2)


def test_a_bar_below_zero_hangs_from_the_ground() -> None:
    plot, _ = frame([-40.0, 100.0], range(1, 3))
    bar = plot.bar(1, 0.0, -40.0, (0.0, 1.0))
    assert bar.y == plot.y(0.0) == ground(plot).y1
    assert bar.height > 0


def test_every_year_is_named_or_each_fifth_above_fifteen() -> None:
    assert names_of(range(1, 11)) == [str(year) for year in range(1, 11)]
    assert names_of(range(1, 41)) == ["5", "10", "15", "20", "25", "30", "35", "40"]
    assert names_of(range(16))[:3] == ["closing", "1", "2"]
    assert names_of(range(16), Room(250.0, 150.0, 8.0))[:3] == ["closing", "2", "4"]
    wide = Room(900.0, 150.0, 8.0)
    assert names_of(range(11), wide) == ["closing", *(str(year) for year in range(1, 11))]


def test_fewer_years_are_named_where_they_would_touch() -> None:
    narrow = Room(200.0, 150.0, 10.0)
    assert names_of(range(1, 16), narrow) == ["2", "4", "6", "8", "10", "12", "14"]
    assert names_of(range(1), narrow) == ["closing"]


def test_where_no_name_stands_clear_there_is_none() -> None:
    assert names_of(range(1), Room(128.0, 120.0, 8.0)) == ["closing"]
    _, texts = frame([1e20], range(1), Room(129.0, 120.0, 8.0))
    assert "closing" not in {text.text for text in texts}


def test_a_small_picture_has_no_words() -> None:
    plot, shapes = plot_of(Room(60.0, 40.0, 11.0), [5.0], range(1, 4), money, 0.0)
    assert not any(isinstance(shape, Text) for shape in shapes)
    assert plot.left == 2.0


def test_lines_of_the_scale_leave_the_ground_to_be_drawn_over_the_bars() -> None:
    plot, shapes = plot_of(ROOM, [100.0], range(1, 4), money, 20.0)
    levels = {shape.y1 for shape in shapes if isinstance(shape, Line)}
    assert plot.y(0.0) not in levels
    assert plot.y(80.0) in levels


def test_amounts_that_are_missing_or_not_finite_are_left_out() -> None:
    row = (1.0, None, float("nan"), float("inf"), 5.0)
    assert known(row) == [(0, 1.0), (4, 5.0)]


def test_a_low_bar_is_still_found_by_pointing() -> None:
    assert region("a", Box(1, 10, 5, 2)).height == 6
    assert region("a", Box(1, 10, 5, 2)).y == 8
    assert region("a", Box(1, 10, 5, 20)).height == 20
