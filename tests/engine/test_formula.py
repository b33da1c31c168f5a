"""Expression trees: how operators build them, and what they leave out."""

import pytest

from workbench.engine import formula as f
from workbench.engine.formula import Compare, Fact, Formula, Given, Line, Look, Number, Pair

A, B = Line("a"), Line("b")
ONE, NIL = Number(1.0), Number(0.0)


@pytest.mark.parametrize(
    ("built", "tree"),
    [
        (A + B, Pair("+", A, B)),
        (A + 2, Pair("+", A, Number(2.0))),
        (2 + A, Pair("+", Number(2.0), A)),
        (A - B, Pair("−", A, B)),
        (2 - A, Pair("−", Number(2.0), A)),
        (A * B, Pair("×", A, B)),
        (2 * A, Pair("×", Number(2.0), A)),
        (A / B, Pair("÷", A, B)),
        (2 / A, Pair("÷", Number(2.0), A)),
        (A**B, Pair("^", A, B)),
        (A**0.5, Pair("^", A, Number(0.5))),
        (-A, Pair("−", NIL, A)),
        (A < B, Compare("<", A, B)),
        (A <= 1, Compare("≤", A, ONE)),
        (A > 1, Compare(">", A, ONE)),
        (A.is_(1), Compare("=", A, ONE)),
        (f.least(A, 1), Pair("least", A, ONE)),
        (f.greatest(0, A), Pair("greatest", NIL, A)),
        (f.where(A < 1, 0, B), f.Where(Compare("<", A, ONE), NIL, B)),
        (f.before(A, 1), f.Before(A, ONE)),
        (f.at_hold(A), f.AtYear(A, Given("leave.hold"))),
        (f.at_year(A, 41), f.AtYear(A, Number(41.0))),
    ],
)
def test_operators(built: Formula, tree: Formula) -> None:
    assert built == tree


@pytest.mark.parametrize(
    ("built", "left"),
    [
        (A + 0, A),
        (0 + A, A),
        (A - 0, A),
        (1 * A, A),
        (A * 1, A),
        (A / 1, A),
        (-NIL, NIL),
    ],
)
def test_a_pair_that_would_say_nothing_is_left_out(built: Formula, left: Formula) -> None:
    assert built == left


@pytest.mark.parametrize(
    ("built", "tree"),
    [
        # Not nothing: where a cannot be given, neither can the product.
        (0 * A, Pair("×", NIL, A)),
        (1 / A, Pair("÷", ONE, A)),
        (0 / A, Pair("÷", NIL, A)),
        (A + 1, Pair("+", A, ONE)),
        (A**1, Pair("^", A, ONE)),
        (f.least(A, 0), Pair("least", A, NIL)),
    ],
)
def test_what_says_something_is_kept(built: Formula, tree: Formula) -> None:
    assert built == tree


@pytest.mark.parametrize(
    ("look", "along"),
    [
        (f.running_sum, "running_sum"),
        (f.running_product, "running_product"),
        (f.running_least, "running_least"),
        (f.later_sum, "later_sum"),
        (f.following, "following"),
        (f.year_sum, "year_sum"),
        (f.year_end, "year_end"),
        (f.of_year, "of_year"),
        (f.month_starts, "month_starts"),
        (f.over_dates, "over_dates"),
    ],
)
def test_looks(look: object, along: f.Along) -> None:
    assert callable(look)
    assert look(A) == Look(along, A)


def test_totals() -> None:
    assert f.total([]) == NIL
    assert f.total([A]) == A
    assert f.total([A, B, A]) == Pair("+", Pair("+", A, B), A)
    assert f.total([NIL, A]) == A


def test_leaves_in_reading_order_with_repeats() -> None:
    tree = f.where(A.is_(Given("x.y")), f.before(Fact("c"), B) * 2, f.at_hold(A) + 1)
    assert list(tree.leaves()) == [A, Given("x.y"), Fact("c"), B, A, Given("leave.hold")]
    assert list(NIL.leaves()) == []


def test_equal_formulas_are_one_key() -> None:
    assert len({A + B, A + B, B + A}) == 2
