"""Plain shapes."""

from workbench.charts.shapes import Line, Polyline, Rect, Text, moved


def test_a_moved_shape_keeps_everything_but_its_place() -> None:
    assert moved(Rect(1, 2, 3, 4, "ink"), 10, 20) == Rect(11, 22, 3, 4, "ink")
    assert moved(Text(1, 2, "a", 9), 10, 20) == Text(11, 22, "a", 9)
    assert moved(Line(1, 2, 3, 4, "rule"), 10, 20) == Line(11, 22, 13, 24, "rule")
    assert moved(Polyline(((1, 2), (3, 4)), "ink"), 10, 20) == Polyline(((11, 22), (13, 24)), "ink")
