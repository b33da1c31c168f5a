"""Tables and key figures."""

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Text
from workbench.report.document import Column, Table
from workbench.report.slabs import Slab, piled
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


def test_no_row_stands_alone_and_what_leads_to_a_sum_goes_with_it() -> None:
    rows = tuple((f"row {n}", str(n)) for n in range(12))
    table = Table(COLUMNS, rows, frozenset({8}))
    kept = [slab.keep_next or slab.prefer_next for slab in table_slabs(table, 300)][1:]
    assert kept == [place in (0, 5, 6, 7, 10) for place in range(12)]


def test_sums_that_follow_one_another_stand_together() -> None:
    rows = tuple((f"row {n}", str(n)) for n in range(9))
    table = Table(COLUMNS, rows, frozenset({4, 5}))
    kept = [slab.keep_next or slab.prefer_next for slab in table_slabs(table, 300)][1:]
    assert kept == [place in (0, 1, 2, 3, 4, 7) for place in range(9)]


def test_a_title_among_the_rows_stands_with_those_under_it() -> None:
    rows = tuple((f"row {n}", "" if n == 4 else str(n)) for n in range(9))
    table = Table(COLUMNS, rows, frozenset({4}))
    slabs = table_slabs(table, 300)[1:]
    kept = [slab.keep_next or slab.prefer_next for slab in slabs]
    assert kept == [place in (0, 4, 7) for place in range(9)]


def test_a_whole_table_is_kept_together() -> None:
    rows = tuple((f"row {n}", str(n)) for n in range(9))
    slabs = table_slabs(Table(COLUMNS, rows, whole=True), 300)
    kept = [slab.keep_next or slab.prefer_next for slab in slabs]
    assert kept == [True] * 9 + [False]


def test_a_note_stands_under_its_row_across_all_columns() -> None:
    table = Table(COLUMNS, (("Rent", "1"), ("Costs", "2")), notes=("", "as the owner has them"))
    slabs = table_slabs(table, 300)
    note = texts(slabs)[-1]
    assert (note.text, note.colour, note.x) == ("as the owner has them", "muted", 0)
    assert slabs[-2].keep_next
    assert slabs[-1].header == (slabs[0],)


def test_slanted_cells_are_paler_as_well() -> None:
    table = Table(COLUMNS, (("Rent", "1"),), slanted=frozenset({(0, 1)}))
    rent, amount = texts(table_slabs(table, 300))[2:]
    assert (rent.weight, rent.colour) == ("regular", "ink")
    assert (amount.weight, amount.colour) == ("italic", "muted")


def test_titles_of_fewer_lines_stand_on_the_last_line() -> None:
    table = Table((Column("one two three four five", share=0.2), Column("short")), (("a", "b"),))
    found = {text.text: text for text in texts(table_slabs(table, 200))}
    assert found["short"].y == max(text.y for text in found.values() if text.colour == "muted")


def test_a_fine_table_is_set_smaller() -> None:
    rows = (("Rent", "1"),)
    usual, fine = (table_slabs(Table(COLUMNS, rows, fine=fine), 300) for fine in (False, True))
    assert max(text.size for text in texts(fine)) < max(text.size for text in texts(usual))
