"""Income and debt service by year."""

from hypothesis import given, settings
from hypothesis import strategies as st

from tests.charts.by_year import amounts, check_picture, money, rooms
from tests.charts.walls import region, said
from workbench.charts.income import IncomeFigures, draw_income
from workbench.charts.shapes import Picture, Polyline, Rect

Row = tuple[float | None, ...]


def drawn(noi: Row, cash: Row, service: Row = (), width: float = 491.0) -> Picture:
    return draw_income(IncomeFigures(noi, cash, service, money, money), width, 138.0, 7.6)


BASE = drawn((100.0, 120.0, 140.0), (90.0, -20.0, 130.0), (80.0, 80.0, 60.0))


def steps(picture: Picture) -> list[Polyline]:
    return [shape for shape in picture.shapes if isinstance(shape, Polyline)]


def test_bars_are_in_proportion_and_side_by_side() -> None:
    unit = region(BASE, "noi.1").height / 100
    assert round(region(BASE, "noi.3").height / unit, 6) == 140
    assert round(region(BASE, "net_cash_flow.1").height / unit, 6) == 90
    left, right = region(BASE, "noi.2"), region(BASE, "net_cash_flow.2")
    assert left.x + left.width < right.x
    assert right.y >= left.y + left.height - 1e-6, "below zero it hangs from the ground"


def test_the_two_bars_differ_in_more_than_tone() -> None:
    bars = [shape for shape in BASE.shapes if isinstance(shape, Rect)]
    assert {bar.stroke for bar in bars if bar.fill == "income"} == {None}
    assert {bar.stroke for bar in bars if bar.fill == "panel"} == {"muted"}


def test_debt_service_is_a_line_that_steps_with_the_years() -> None:
    (line,) = steps(BASE)
    (x1, y1), (x2, y2), (x3, y3), (x4, y4), (x5, y5), (x6, y6) = line.points
    assert x1 < x2 == x3 < x4 == x5 < x6
    assert y1 == y2 == y3 == y4 < y5 == y6
    assert region(BASE, "debt_service.1").height == 6


def test_the_line_ends_where_nothing_more_is_paid() -> None:
    picture = drawn((9.0,) * 5, (9.0,) * 5, (5.0, 0.0, None, 4.0, 0.0))
    assert [len(line.points) for line in steps(picture)] == [2, 2]
    assert {r.key for r in picture.regions if "debt" in r.key} == {
        "debt_service.1",
        "debt_service.4",
    }


def test_without_a_loan_there_is_no_line_and_no_name_for_one() -> None:
    for service in ((), (0.0, 0.0)):
        picture = drawn((9.0, 8.0), (7.0, 6.0), service)
        assert steps(picture) == []
        assert "debt service" not in said(picture)
        assert picture.words.endswith("there is no debt service.")


def test_the_words_in_one_line() -> None:
    assert BASE.words == (
        "Net operating income is 100 in year 1 and 140 in year 3; net cash flow before debt is "
        "lowest in year 2, at −20; debt service is highest in year 1, at 80."
    )
    level = drawn((9.0,), (7.0,), (5.0000001,))
    assert level.words == (
        "Net operating income is 9 in year 1; net cash flow before debt is 7; debt service is 5 a "
        "year."
    )
    assert drawn((None, None), (None, None)).words == "Net operating income cannot be given."
    assert drawn((1.0,), (None,)).words == "Net operating income cannot be given."


def test_of_equal_amounts_the_first_year_is_named() -> None:
    picture = drawn((9.0,) * 3, (7.0,) * 3, (1.0, 5.0000001, 5.0000002))
    assert picture.words.endswith("debt service is highest in year 2, at 5.")


def test_a_small_picture_has_bars_and_no_words() -> None:
    picture = draw_income(IncomeFigures((5.0,), (4.0,), (3.0,), money, money), 60, 40)
    assert said(picture) == []
    assert {found.key for found in picture.regions} == {
        "noi.1",
        "net_cash_flow.1",
        "debt_service.1",
    }


@settings(deadline=None)
@given(st.lists(st.tuples(amounts, amounts, amounts), max_size=40), st.booleans(), rooms)
def test_any_figures_stay_inside(
    rows: list[tuple[float | None, float | None, float | None]],
    has_loan: bool,
    room: tuple[float, float, float],
) -> None:
    noi, cash, paid = (tuple(row[place] for row in rows) for place in range(3))
    figures = IncomeFigures(noi, cash, paid if has_loan else (), money, money)
    check_picture(draw_income(figures, *room))
