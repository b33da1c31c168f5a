"""Legends."""

from workbench.charts.legend import SAMPLE, Entry, legend
from workbench.charts.masonry import Box
from workbench.charts.shapes import Rect, Text


def filled(box: Box) -> list[Rect]:
    return [Rect(box.x, box.y, box.width, box.height, "debt")]


ENTRIES = [Entry("what is owed", filled), Entry("what is earned", filled)]


def test_names_stand_beside_their_samples_on_one_line() -> None:
    shapes, tall = legend(ENTRIES, 10, 400)
    samples = [shape for shape in shapes if isinstance(shape, Rect)]
    names = [shape for shape in shapes if isinstance(shape, Text)]
    assert [name.text for name in names] == ["what is owed", "what is earned"]
    assert {name.y for name in names} == {15.0}
    assert tall == 18.0
    for sample, name in zip(samples, names, strict=True):
        assert sample.width == SAMPLE * 10
        assert sample.x + sample.width < name.x
    assert names[0].x < samples[1].x


def test_where_one_line_is_too_short_they_stand_under_one_another() -> None:
    shapes, tall = legend(ENTRIES, 10, 120)
    assert [shape.y for shape in shapes if isinstance(shape, Text)] == [15.0, 30.0]
    assert len({shape.x for shape in shapes if isinstance(shape, Rect)}) == 1
    assert tall == 33.0


def test_nothing_to_name_takes_no_room() -> None:
    assert legend([], 10, 400) == ([], 0.0)
