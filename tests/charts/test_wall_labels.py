"""Labels of the wall."""

from tests.charts.walls import BASE, price_line_of, said, text_named, wall_figures
from workbench.charts.shapes import Line, Text
from workbench.charts.wall import draw_wall


def years_shown(picture_rows: list[tuple[float, float]], leaving: float, high: float) -> list[str]:
    wall = draw_wall(wall_figures(picture_rows, leaving), 262, high)
    ends = [s for s in wall.shapes if isinstance(s, Text) and s.anchor == "end"]
    return sorted((s.text for s in ends), key=int)


def test_each_course_has_its_year_and_its_amount() -> None:
    wall = draw_wall(wall_figures(BASE, 2_036_988.0, 2.5e6), 262, 600)
    for year, (in_hand, expected) in enumerate(BASE, start=1):
        assert text_named(wall, str(year)).anchor == "end"
        amount = text_named(wall, f"{in_hand + expected:,.0f}")
        assert abs(amount.y - text_named(wall, str(year)).y) < 1


def test_each_fifth_year_above_fifteen() -> None:
    assert len(years_shown([(10.0, 0.0)] * 15, 10.0, 600)) == 15
    assert years_shown([(10.0, 0.0)] * 16, 10.0, 600) == ["5", "10", "15"]
    assert years_shown([(10.0, 0.0)] * 40, 10.0, 600) == [str(y) for y in range(5, 41, 5)]


def test_fewer_years_where_they_do_not_fit() -> None:
    assert years_shown([(10.0, 0.0)] * 10, 500.0, 600) == ["2", "4", "6", "8", "10"]
    assert years_shown([(10.0, 0.0)] * 10, 1_000.0, 600) == ["5", "10"]
    assert years_shown([(0.0, 0.0)] * 3 + [(1.0, 0.0)], 9.0, 500) == ["4"]


def test_no_years_at_all_where_not_one_fits() -> None:
    assert years_shown([(5.0, 0.0)] * 3, 1e5, 130) == []


def test_the_capstone_carries_share_and_amount() -> None:
    wall = draw_wall(wall_figures(BASE, 2_036_988.0), 262, 600)
    assert text_named(wall, "exit 63.1%").anchor == "middle"
    assert text_named(wall, "2,036,988").colour == "on_exit"


def test_a_low_capstone_has_its_label_beside_it() -> None:
    wall = draw_wall(wall_figures(BASE, 20_000.0), 262, 600)
    assert text_named(wall, "exit 1.6%").anchor == "start"


def test_the_label_on_the_capstone_keeps_clear_of_the_price() -> None:
    value = sum(a + b for a, b in BASE) + 2_036_988
    for price in (value - 1_018_494, value - 900_000, value - 1_200_000):
        wall = draw_wall(wall_figures(BASE, 2_036_988.0, price), 262, 600)
        line = price_line_of(wall)
        upper, lower = text_named(wall, "exit 63.1%"), text_named(wall, "2,036,988")
        assert line is not None
        assert not upper.y - 11 < line.y1 < lower.y + 2


def test_where_the_label_cannot_keep_clear_it_stays_in_the_middle() -> None:
    wall = draw_wall(wall_figures([(100.0, 0.0)], 8.0, 104.0), 262, 600)
    assert text_named(wall, "exit 7.4%").anchor == "middle"


def test_labels_moved_away_are_led_to_their_place() -> None:
    wall = draw_wall(wall_figures(BASE, 2_036_988.0, 3_229_000.0), 262, 600)
    line = price_line_of(wall)
    assert line is not None
    red = [s for s in wall.shapes if isinstance(s, Line) and s.colour == "price"]
    leaders = [leader for leader in red if leader is not line]
    assert [(leader.x1, leader.y1) for leader in leaders] == [(line.x2, line.y1)]
    assert text_named(wall, "value").y < text_named(wall, "price").y


def test_marks_wider_than_the_gutter_are_left_out() -> None:
    wall = draw_wall(wall_figures([(5e14 + 8, 0.0)], -5e14, 1.0), 150, 600)
    assert {"value", "8", "price", "1"} <= set(said(wall))
    assert not any(text.startswith("exit") for text in said(wall))
