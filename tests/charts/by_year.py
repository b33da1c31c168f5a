"""What the tests of the charts by year share: marks of amounts and checks of any picture."""

from hypothesis import strategies as st

from tests.charts.walls import money, overlapping, share, text_boxes
from workbench.charts.shapes import Line, Picture, Polyline, Rect, Text

__all__ = ["amounts", "check_picture", "money", "rooms", "share"]

amounts = st.one_of(st.none(), st.just(0.0), st.floats(-1e12, 1e12), st.floats(-10, 10))
rooms = st.sampled_from(
    [(491.0, 138.0, 7.6), (262.0, 200.0, 11.0), (1500.0, 500.0, 11.0), (60.0, 40.0, 11.0)]
)


def check_picture(picture: Picture) -> None:
    """Everything lies within the picture, no word covers another, one line says it all."""
    for shape in picture.shapes:
        for x, y in _points(shape):
            assert -1.0 <= x <= picture.width + 1.0
            assert -1.0 <= y <= picture.height + 1.0
    boxes = text_boxes(picture)
    assert not overlapping(boxes)
    assert all(left >= -0.01 and right <= picture.width + 0.01 for left, _, right, _ in boxes)
    assert picture.words
    assert "\n" not in picture.words
    keys = [region.key for region in picture.regions]
    assert len(keys) == len(set(keys))


def _points(shape: Rect | Line | Polyline | Text) -> list[tuple[float, float]]:
    if isinstance(shape, Rect):
        assert shape.width >= 0
        assert shape.height >= -1e-9
        return [(shape.x, shape.y), (shape.x + shape.width, shape.y + shape.height)]
    if isinstance(shape, Line):
        return [(shape.x1, shape.y1), (shape.x2, shape.y2)]
    return list(shape.points) if isinstance(shape, Polyline) else [(shape.x, shape.y)]
