"""Key figures."""

from itertools import pairwise

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Text
from workbench.report.document import KeyFigure, KeyFigures
from workbench.report.key_figure_slabs import key_figure_slabs
from workbench.report.slabs import Slab, piled, stack_height


def texts(slabs: tuple[Slab, ...]) -> list[Text]:
    return [shape for shape in piled(slabs) if isinstance(shape, Text)]


def test_key_figures_have_their_values_at_the_right_edge_on_the_label_s_line() -> None:
    item = KeyFigure("Value", "USD 3,807,784", "worth on these assumptions", strong=True)
    found = {text.text: text for text in texts(key_figure_slabs(KeyFigures((item,)), 240))}
    label, value, note = (found[text] for text in (item.label, item.value, item.note))
    assert (value.x, value.anchor) == (240, "end")
    assert label.y == value.y < note.y


def test_a_long_value_is_set_smaller_and_never_cut() -> None:
    value = "USD 123,456,789,012,345,678,901"
    (slab,) = key_figure_slabs(KeyFigures((KeyFigure("Value", value),)), 240)
    (shown,) = (s for s in slab.shapes if isinstance(s, Text) and s.anchor == "end")
    assert shown.text == value
    assert width(value, shown.size, "bold") <= 0.66 * 240 + 1e-6


def test_key_figures_are_parted_by_rules_and_grow_with_their_air() -> None:
    items = tuple(KeyFigure(f"Label {n}", str(n)) for n in range(3))
    tight, airy = (key_figure_slabs(KeyFigures(items, air), 240) for air in (0.0, 6.0))
    rules = [sum(isinstance(shape, Line) for shape in slab.shapes) for slab in tight]
    assert rules == [0, 1, 1]
    assert stack_height(airy) == stack_height(tight) + 18
    lines = [text.y for text in texts(tight) if text.anchor == "start"]
    assert all(lower > upper for upper, lower in pairwise(lines))
