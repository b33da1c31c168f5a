"""Tiers by year."""

from hypothesis import given, settings
from hypothesis import strategies as st

from tests.charts.by_year import amounts, check_picture, money, rooms
from tests.charts.walls import hatched, region, said
from workbench.charts.shapes import Picture, Rect
from workbench.charts.tiers import TierFigures, draw_tiers

Row = tuple[float | None, ...]


def drawn(in_hand: Row, expected: Row) -> Picture:
    return draw_tiers(TierFigures(in_hand, expected, money, money), 491.0, 138.0, 7.6)


BASE = drawn((100.0, 60.0, 0.0), (20.0, 70.0, 140.0))


def test_expected_stands_on_in_hand_in_proportion() -> None:
    low, high = region(BASE, "in_hand.2"), region(BASE, "expected.2")
    assert abs(high.y + high.height - low.y) < 1e-9
    assert abs(high.height / low.height - 70 / 60) < 1e-9
    assert (low.x, low.width) == (high.x, high.width)


def test_what_is_nothing_is_not_drawn() -> None:
    assert "in_hand.3" not in {found.key for found in BASE.regions}


def test_tiers_have_the_tones_of_the_wall() -> None:
    fills = {shape.fill for shape in BASE.shapes if isinstance(shape, Rect)}
    assert {"in_hand", "expected"} <= fills
    assert said(BASE)[:2] == ["rent in hand", "rent expected"]
    assert "rent in hand" not in said(drawn((0.0,), (5.0,)))


def test_what_is_below_zero_hangs_hatched_from_the_ground() -> None:
    picture = drawn((50.0, -30.0), (-20.0, -40.0))
    ground = region(picture, "in_hand.1").y + region(picture, "in_hand.1").height
    assert abs(region(picture, "expected.1").y - ground) < 1e-9
    upper, lower = region(picture, "in_hand.2"), region(picture, "expected.2")
    assert abs(upper.y - ground) < 1e-9
    assert abs(lower.y - (upper.y + upper.height)) < 1e-9
    assert len(hatched(picture)) == 3 + 1, "one of them stands in the legend"
    assert "below zero" in said(picture)


def test_the_words_in_one_line() -> None:
    assert BASE.words == (
        "Net cash flow before debt is 100 in hand and 20 expected in year 1, 0 in hand and 140 "
        "expected in year 3."
    )
    assert drawn((1.0,), (2.0,)).words == (
        "Net cash flow before debt is 1 in hand and 2 expected in year 1."
    )
    assert drawn((), ()).words == "Net cash flow cannot be given."
    assert drawn((None, 1.0), (2.0, 2.0)).words == "Net cash flow cannot be given."


def test_a_small_picture_has_no_words() -> None:
    picture = draw_tiers(TierFigures((5.0,), (4.0,), money, money), 60, 40)
    assert said(picture) == []
    assert {found.key for found in picture.regions} == {"in_hand.1", "expected.1"}


@settings(deadline=None)
@given(st.lists(st.tuples(amounts, amounts), max_size=40), rooms)
def test_any_figures_stay_inside(
    rows: list[tuple[float | None, float | None]], room: tuple[float, float, float]
) -> None:
    in_hand, expected = (tuple(row[place] for row in rows) for place in range(2))
    check_picture(draw_tiers(TierFigures(in_hand, expected, money, money), *room))
