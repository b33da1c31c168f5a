"""Lines over the hold."""

from dataclasses import replace
from datetime import date

from tests.fullest import fullest, small, small_raw
from tests.report.sections import changed, years_of
from workbench.deal.purchase import Purchase
from workbench.report.years import Row


def test_lines_by_year() -> None:
    years = years_of(fullest())
    assert len(years.line("noi")) == 10
    noi = years.result.figure("noi", 3)
    assert years.line("noi")[2] == noi
    assert years.label("noi") == "Net operating income, reserves below"
    assert years.row("noi", strong=True) == Row(years.label("noi"), years.line("noi"), strong=True)
    assert years.row("noi").until(2).values == years.line("noi")[:2]


def test_years_are_headed_by_number_and_by_the_month_of_their_end() -> None:
    assert years_of(fullest()).headings()[:2] == ("1\nDec 2027", "2\nDec 2028")
    assert years_of(fullest(), "sv-SE").headings()[0] == "1\n2027 Dec"
    assert years_of(small()).headings() == tuple(str(year) for year in range(1, 11))


def test_years_beyond_the_calendar_have_numbers_alone() -> None:
    years = years_of(fullest())
    late = replace(years.voice.deal, purchase=Purchase(closing_date=date(9995, 1, 1)))
    assert replace(years, voice=replace(years.voice, deal=late)).headings()[0] == "1"


def test_a_table_says_what_it_counts_in() -> None:
    assert years_of(fullest()).table([Row("a", (1.0,) * 10)]).corner == "USD, year to"
    assert years_of(small()).table([Row("a", (1.0,) * 10)]).corner == "USD, year"


def test_long_amounts_are_counted_in_thousands() -> None:
    rows = [Row("a", (-1_234_567_890.0, 5e5)), Row("b", (0.5, 0.25), "fraction", strong=True)]
    table = years_of(small()).table([*rows, Row("c", (1.234, None), "multiple")])
    assert table.corner == "USD thousand, year"
    assert [line.cells for line in table.lines] == [
        ("−1,234,568", "500"),
        ("50.0%", "25.0%"),
        ("1.23", "—"),
    ]
    assert [line.strong for line in table.lines] == [False, True, False]


def test_an_amount_beyond_every_scale_is_shortened() -> None:
    table = years_of(small()).table([Row("a", (1e40, 5.0))])
    assert table.lines[0].cells == ("1.0E40", "0")


def test_a_hold_that_is_not_known_has_no_years() -> None:
    years = years_of(changed(small_raw(), leave={"hold": None}))
    assert years.count == 0
    assert years.line("noi") == ()
