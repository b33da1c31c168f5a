"""Slabs."""

from dataclasses import replace

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Text
from workbench.charts.wrapping import Run
from workbench.report.slabs import (
    Mark,
    Slab,
    heading_slabs,
    piled,
    settled,
    stack_height,
    subheading_slabs,
    text_slabs,
)


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


def test_headings_are_marked_for_the_outline_at_their_first_line() -> None:
    marks = [slab.mark for slab in heading_slabs("Cautions " * 20, 200)]
    assert marks[0] == Mark("Cautions " * 20)
    assert set(marks[1:]) == {None}
    first, *others = subheading_slabs("Bank", 200)
    assert first.mark == Mark("Bank", 1)
    assert all(slab.keep_next for slab in (first, *others))


def wished(count: int, header: tuple[Slab, ...] = ()) -> tuple[Slab, ...]:
    """So many slabs of 10, each of which prefers to stand with the next."""
    *most, last = (Slab(10, header=header, prefer_next=True) for _ in range(count))
    return (*most, replace(last, prefer_next=False))


def test_what_fits_a_page_is_kept_together() -> None:
    kept = [slab.keep_next for slab in settled((Slab(5), *wished(10)), 100)]
    assert kept == [False] + [True] * 9 + [False]


def test_of_what_does_not_fit_beginning_and_end_are_kept() -> None:
    kept = [slab.keep_next for slab in settled(wished(11), 100)]
    assert kept == [True] * 2 + [False] * 6 + [True] * 2 + [False]


def test_a_repeated_header_takes_its_room() -> None:
    kept = [slab.keep_next for slab in settled(wished(10, (Slab(1),)), 100)]
    assert not all(kept[:-1])


def test_orders_stand_whatever_fits() -> None:
    orders = tuple(replace(slab, keep_next=True) for slab in wished(11))
    assert all(slab.keep_next for slab in settled(orders, 100))
