"""Tables by year, split by the width."""

import pytest

from workbench.charts.lettering import width
from workbench.charts.shapes import Line, Text
from workbench.report import sheet
from workbench.report.document import YearLine, YearTable
from workbench.report.slabs import Slab, piled
from workbench.report.year_tables import year_table_slabs

ROOM = 491.28


def table(years: int, cell: str = "123,456", label: str = "Rent", rows: int = 2) -> YearTable:
    lines = tuple(YearLine(f"{label} {n}", (cell,) * years, n == rows) for n in range(1, rows + 1))
    return YearTable("EUR, year", tuple(str(year + 1) for year in range(years)), lines)


def texts(slabs: tuple[Slab, ...]) -> list[Text]:
    return [shape for shape in piled(slabs) if isinstance(shape, Text)]


def bands(slabs: tuple[Slab, ...]) -> list[list[str]]:
    """The years in each heading."""
    found: list[list[str]] = []
    for text in texts(slabs):
        if text.text == "EUR, year":
            found.append([])
        elif text.colour == "muted":
            found[-1].append(text.text)
    return found


def test_ten_years_stand_side_by_side() -> None:
    assert bands(year_table_slabs(table(10), ROOM)) == [[str(year) for year in range(1, 11)]]


def test_many_years_are_split_evenly_with_their_headings() -> None:
    found = bands(year_table_slabs(table(40), ROOM))
    assert [len(band) for band in found] == [10, 10, 10, 10]
    assert [year for band in found for year in band] == [str(year) for year in range(1, 41)]
    assert [len(band) for band in bands(year_table_slabs(table(15), ROOM))] == [8, 7]


def test_labels_are_broken_where_that_makes_for_fewer_tables() -> None:
    long = table(10, label="A line whose name is a good deal longer than others")
    assert len(bands(year_table_slabs(long, ROOM))) == 1
    labels = [text.text for text in texts(year_table_slabs(long, ROOM)) if text.anchor == "start"]
    assert max(width(label, sheet.FINE, "bold") for label in labels) <= 0.2 * ROOM


def test_columns_of_all_parts_line_up() -> None:
    edges = {
        text.x
        for text in texts(year_table_slabs(table(15), ROOM))
        if text.anchor == "end" and text.colour == "ink"
    }
    assert len(edges) == 8


def test_few_years_are_not_pulled_apart() -> None:
    (edge,) = {text.x for text in texts(year_table_slabs(table(1), ROOM)) if text.anchor == "end"}
    assert edge < 120


def test_a_very_long_amount_has_a_table_for_each_year_and_stays_inside() -> None:
    slabs = year_table_slabs(table(3, "1" * 200), ROOM)
    assert len(bands(slabs)) == 3
    assert max(text.x for text in texts(slabs)) <= ROOM + 0.01


def test_each_part_repeats_its_own_heading() -> None:
    slabs = year_table_slabs(table(20, rows=30), ROOM)
    headers = {slab.header for slab in slabs if slab.header}
    assert len(headers) == 2
    assert {texts(header)[1].text for header in headers} == {"1", "11"}


@pytest.mark.parametrize(("rows", "whole"), [(14, True), (15, False)])
def test_a_short_part_is_kept_on_one_page(rows: int, whole: bool) -> None:
    slabs = year_table_slabs(table(10, rows=rows), ROOM)
    assert all(slab.keep_next or slab.prefer_next for slab in slabs[:-1]) == whole


def test_values_that_follow_are_told_apart_in_each_part() -> None:
    line = YearLine("Growth", tuple(str(n) for n in range(20)), following=frozenset({1, 11}))
    made = YearTable("year", tuple(f"y{n}" for n in range(20)), (line,))
    slanted = [text.text for text in texts(year_table_slabs(made, 300)) if text.weight == "italic"]
    assert slanted == ["1", "11"]


def test_sums_have_a_dark_rule() -> None:
    shapes = piled(year_table_slabs(table(4), ROOM))
    assert [s.colour for s in shapes if isinstance(s, Line)] == ["ink", "ink"]
