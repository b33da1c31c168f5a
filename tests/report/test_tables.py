"""Tables and key figures."""

from itertools import pairwise

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Text
from workbench.report.document import Column, KeyFigure, KeyFigures, Table
from workbench.report.key_figure_slabs import key_figure_slabs
from workbench.report.slabs import Slab, piled, stack_height
from workbench.report.tables import table_slabs

COLUMNS = (Column("What", share=0.6), Column("Amount", "right", 0.4))


def texts(slabs: tuple[Slab, ...]) -> list[Text]:
    return [shape for shape in piled(slabs) if isinstance(shape, Text)]


def test_numbers_end_at_one_edge_under_their_title() -> None:
    slabs = table_slabs(Table(COLUMNS, (("Rent", "1,000"), ("Costs", "−20"))), 300)
    right = [text for text in texts(slabs) if text.anchor == "end"]
    assert [text.text for text in right] == ["Amount", "1,000", "−20"]
    assert {text.x for text in right} == {300}


def test_rows_know_the_header_that_is_repeated() -> None:
    slabs = table_slabs(Table(COLUMNS, (("Rent", "1"), ("Costs", "2"))), 300)
    header, first, second = slabs
    assert header.keep_next
    assert first.header == second.header == (header,)


def test_a_table_without_titles_has_no_header() -> None:
    slabs = table_slabs(Table((Column(""), Column("")), (("a", "b"),)), 300)
    assert [text.text for text in texts(slabs)] == ["a", "b"]


def test_strong_rows_are_bold_under_a_dark_rule() -> None:
    table = Table(COLUMNS, (("a", "1"), ("b", "2"), ("sum", "3")), frozenset({2}))
    *_, row = table_slabs(table, 300)
    assert {shape.weight for shape in row.shapes if isinstance(shape, Text)} == {"bold"}
    assert [shape.colour for shape in row.shapes if isinstance(shape, Line)] == ["ink"]


def test_cells_wrap_and_their_row_stays_whole_unless_it_is_long() -> None:
    short = table_slabs(Table((Column(""),), (("word " * 20,),)), 200)
    assert 1 < len(short) <= 6
    assert [slab.keep_next for slab in short] == [True] * (len(short) - 1) + [False]
    long = table_slabs(Table((Column(""),), (("word " * 200,),)), 200)
    assert [slab.keep_next for slab in long[:3]] == [True, False, False]
    assert [slab.keep_next for slab in long[-3:]] == [False, True, False]
    for slab in (*short, *long):
        assert all(width(t.text, t.size) <= 200 for t in slab.shapes if isinstance(t, Text))


def test_cells_may_be_cut_after_some_lines() -> None:
    slabs = table_slabs(Table((Column(""),), (("word " * 200,),), most_lines=2), 200)
    assert len(slabs) == 2
    assert texts(slabs)[-1].text.endswith("…")


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
