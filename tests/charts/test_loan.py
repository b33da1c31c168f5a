"""Loan under price."""

from hypothesis import given, settings
from hypothesis import strategies as st

from tests.charts.by_year import amounts, check_picture, money, rooms, share
from tests.charts.walls import price_line_of, region, said
from workbench.charts.loan import LoanFigures, draw_loan
from workbench.charts.shapes import Line, Picture, Rect

Row = tuple[float | None, ...]


def drawn(balance: Row, price: float | None, sale: Row) -> Picture:
    figures = LoanFigures(balance, price, sale, money, money, share)
    return draw_loan(figures, 491.0, 138.0, 7.6)


BASE = drawn((600.0, 500.0, 400.0), 1000.0, (None, 1100.0, 800.0))


def test_the_loan_stands_under_the_price_in_proportion() -> None:
    unit = region(BASE, "loan_balance.0").height / 600
    assert round(region(BASE, "loan_balance.2").height / unit, 6) == 400
    *_, line = (shape for shape in BASE.shapes if isinstance(shape, Line) and shape.dashes)
    bottom = region(BASE, "loan_balance.0").y + region(BASE, "loan_balance.0").height
    assert round((bottom - line.y1) / unit, 6) == 1000
    assert line.colour == "price"


def test_prices_of_a_sale_are_dots_joined_year_by_year() -> None:
    dots = [s for s in BASE.shapes if isinstance(s, Rect) and s.fill == "exit"]
    joins = [s for s in BASE.shapes if isinstance(s, Line) and s.colour == "muted"]
    assert len(dots) == 2 + 1, "one of them stands in the legend"
    assert len(joins) == 1 + 1
    assert region(BASE, "exit_price_of_year.1").y < region(BASE, "exit_price_of_year.2").y


def test_a_year_without_a_price_leaves_a_gap() -> None:
    picture = drawn((6.0,) * 5, 10.0, (None, 9.0, None, 8.0, 7.0))
    joins = [s for s in picture.shapes if isinstance(s, Line) and s.colour == "muted"]
    assert len(joins) == 1 + 1


def test_closing_has_a_place_of_its_own() -> None:
    assert "closing" in said(BASE)
    assert region(BASE, "loan_balance.0").x < region(BASE, "loan_balance.1").x


def test_the_words_in_one_line() -> None:
    assert BASE.words == (
        "Loans of 600 at closing are 60.0% of the price; 400 is owed at the end of year 2, 50.0% "
        "of the price of a sale then."
    )
    bare = drawn((600.0, 500.0), None, (None, None))
    assert bare.words == "Loans of 600 at closing; 500 is owed at the end of year 1."
    assert "price" not in " ".join(said(bare))
    assert price_line_of(bare) is None
    free = drawn((600.0, 500.0), 0.0, (None, -5.0))
    assert free.words == "Loans of 600 at closing; 500 is owed at the end of year 1."


def test_the_words_say_when_all_is_repaid() -> None:
    picture = drawn((600.0, 500.0, 0.0, 0.0), 1000.0, (None, 9.0, 9.0, 9.0))
    assert picture.words == (
        "Loans of 600 at closing are 60.0% of the price; nothing is owed after year 2."
    )


def test_zero_loans() -> None:
    picture = drawn((0.0, 0.0), 10.0, (None, 11.0))
    assert picture.words == "No loan is owed."
    assert "loans owed" not in said(picture)
    assert drawn((None,), None, (None,)).words == "No loan is owed."


def test_a_small_picture_has_no_words() -> None:
    picture = draw_loan(LoanFigures((5.0,), 9.0, (None,), money, money, share), 60, 40)
    assert said(picture) == []
    assert {found.key for found in picture.regions} == {"loan_balance.0", "price"}


@settings(deadline=None)
@given(
    st.lists(st.tuples(amounts, amounts), min_size=1, max_size=41),
    st.one_of(st.none(), st.floats(0, 1e12)),
    rooms,
)
def test_any_figures_stay_inside(
    rows: list[tuple[float | None, float | None]],
    price: float | None,
    room: tuple[float, float, float],
) -> None:
    balance, sale = (tuple(row[place] for row in rows) for place in range(2))
    figures = LoanFigures(balance, price, (None, *sale[1:]), money, money, share)
    check_picture(draw_loan(figures, *room))
