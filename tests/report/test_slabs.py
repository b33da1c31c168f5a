"""Slabs."""

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Text
from workbench.charts.wrapping import Run
from workbench.report.slabs import Slab, heading_slabs, piled, stack_height, text_slabs


def test_slabs_stand_one_above_the_other_with_their_space_but_for_the_first() -> None:
    slabs = (
        Slab(10, (Text(1, 2, "a", 9),), space=5),
        Slab(20, (Text(1, 2, "b", 9),), space=3),
    )
    assert stack_height(slabs) == 33
    one, two = piled(slabs, 100, 1000)
    assert (one, two) == (Text(101, 1002, "a", 9), Text(101, 1015, "b", 9))


def test_neither_first_nor_last_line_stands_alone() -> None:
    slabs = text_slabs((Run("one two three four five six seven eight nine ten"),), 10, 50)
    assert len(slabs) > 4
    assert [slab.keep_next for slab in slabs] == [True] + [False] * (len(slabs) - 3) + [True, False]
    assert [slab.keep_next for slab in text_slabs((Run("one"),), 10, 50)] == [False]


def test_runs_stand_side_by_side_in_their_weights() -> None:
    (slab,) = text_slabs((Run("worth "), Run("1,000", "bold"), Run(".")), 10, 500)
    texts = [shape for shape in slab.shapes if isinstance(shape, Text)]
    assert [text.weight for text in texts] == ["regular", "bold", "regular"]
    assert texts[1].x == width("worth ", 10)
    assert texts[2].x == texts[1].x + width("1,000", 10, "bold")


def test_unknown_characters_are_marked_before_they_are_measured() -> None:
    (slab,) = text_slabs((Run("日\u200b本"),), 10, 500)
    assert [shape.text for shape in slab.shapes if isinstance(shape, Text)] == ["□□"]


def test_a_heading_keeps_with_what_follows() -> None:
    slabs = heading_slabs("Cautions", 200)
    assert all(slab.keep_next for slab in slabs)
    assert isinstance(slabs[-1].shapes[0], Line)
