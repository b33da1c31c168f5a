"""Labels moved apart."""

from itertools import pairwise

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.charts.gutter import Label, Span, lettered, spread


def test_labels_that_fit_stay_where_they_are() -> None:
    assert spread([(10, 10), (30, 10), (50, 10)], Span(0, 100)) == (10, 30, 50)


def test_two_at_one_place_share_the_move() -> None:
    assert spread([(50, 10), (50, 10)], Span(0, 100)) == (45, 55)


def test_a_third_joins_those_it_is_pushed_against() -> None:
    # wanted 50, 50, 52 with height 10: the group of three is centred on their mean
    assert spread([(50, 10), (50, 10), (52, 10)], Span(0, 100)) == pytest.approx(
        (40 + 2 / 3, 50 + 2 / 3, 60 + 2 / 3)
    )


def test_labels_stay_inside_the_room() -> None:
    assert spread([(0, 10), (1, 10)], Span(0, 100)) == (5, 15)
    assert spread([(99, 10), (100, 10)], Span(0, 100)) == (85, 95)


def test_no_labels() -> None:
    assert spread([], Span(0, 10)) == ()


@settings(deadline=None)
@given(st.lists(st.tuples(st.floats(-50, 250), st.floats(1, 18)), max_size=11))
def test_never_overlapping_never_outside(wanted: list[tuple[float, float]]) -> None:
    ordered = sorted(wanted)
    middles = spread(ordered, Span(0, 200))
    edges = [(m - tall / 2, m + tall / 2) for m, (_, tall) in zip(middles, ordered, strict=True)]
    assert all(top >= -1e-6 and bottom <= 200 + 1e-6 for top, bottom in edges)
    for (_, bottom), (top, _) in pairwise(edges):
        assert top >= bottom - 1e-6


def test_the_lines_of_a_label_stand_around_its_middle() -> None:
    one, two = lettered(Label("x", 0, ("a", "b")), 5, 100, 10, "end")
    assert (one.x, one.anchor) == (5, "end")
    assert two.y - one.y == 12.5
    assert one.y < 100 < two.y
