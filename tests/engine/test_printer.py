"""The generated function: order of lines, what it computes once, what it refuses."""

from collections.abc import Iterator

import numpy as np
import pytest

from tests.engine.deals import changed, deal, lease, space, with_loan
from tests.oracle.test_random_deals import drawn
from workbench.engine import formula as f
from workbench.engine import printer
from workbench.engine.facts import CALENDAR
from workbench.engine.formula import Fact, Formula, Given, Line, Number
from workbench.engine.lines import Declared, Output
from workbench.engine.lines.line import Per, Unless
from workbench.engine.plan import compile_deal
from workbench.engine.printer import (
    ROWS,
    condition_key,
    formulas_below,
    formulas_of,
    in_order,
    program,
)
from workbench.engine.result import evaluate
from workbench.engine.roll import Floats
from workbench.engine.rows import RowError
from workbench.engine.shape import shape_of
from workbench.files.deal_file import deal_from_raw

SHAPE = shape_of(with_loan(deal()))


def line(key: str, body: Formula | Output, per: Per = "once", *unless: Unless) -> Declared:
    return Declared(key, key, "money", per, key, body, unless)


def keyed(*lines: Declared) -> dict[str, Declared]:
    return {one.key: one for one in lines}


@pytest.fixture
def declaring(monkeypatch: pytest.MonkeyPatch) -> Iterator[list[Declared]]:
    """Lines of a test's own in place of the engine's."""
    lines: list[Declared] = []
    monkeypatch.setattr(printer, "declare", lambda shape: tuple(lines))
    program.cache_clear()
    yield lines
    program.cache_clear()


# Order


def test_each_line_comes_after_those_it_needs() -> None:
    for raw in drawn(8200, 12):
        made = program(shape_of(deal_from_raw(raw)))
        done: set[str] = set()
        for key, one in made.lines.items():
            needs = {leaf.key for leaf in formulas_below(one) if isinstance(leaf, Line)}
            assert needs <= done, key
            done.add(key)


def test_order_by_hand() -> None:
    declared = keyed(
        line("a", Line("c") + 1),
        line("b", Number(1.0)),
        line("c", Line("d") * Line("b")),
        line("d", Number(2.0), "once", (Line("b") <= 0, "none")),
    )
    assert [one.key for one in in_order(declared, None)] == ["b", "d", "c", "a"]
    assert [one.key for one in in_order(declared, frozenset({"d"}))] == ["b", "d"]


@pytest.mark.parametrize(
    ("lines", "circle"),
    [
        ([line("a", Line("a") + 1)], "a → a"),
        ([line("a", Line("b") + 1), line("b", Line("c") + 1), line("c", Line("a") * 2)], "a → b"),
        # Through a condition, or through what a kernel is given.
        ([line("a", Number(1.0), "once", (Line("b") <= 0, "x")), line("b", Line("a"))], "a → b"),
        ([line("a", Output("irr", "rate", (Line("b"),))), line("b", Line("a"))], "a → b → a"),
    ],
)
def test_a_circle_is_named(lines: list[Declared], circle: str) -> None:
    with pytest.raises(ValueError, match=f"in a circle: {circle}"):
        in_order(keyed(*lines), None)


def test_formulas_of_a_declaration() -> None:
    condition = Line("b") <= 0
    assert formulas_of(line("a", Line("c"), "once", (condition, "x"))) == [Line("c"), condition]
    kernel = line("a", Output("irr", "rate", (Line("c"), Number(1.0))), "once", (condition, "x"))
    assert formulas_of(kernel) == [Line("c"), Number(1.0), condition]
    assert list(formulas_below(kernel)) == [Line("c"), Line("b")]


# One function for a shape


def test_one_program_for_a_shape() -> None:
    first = compile_deal(with_loan(deal()))
    other = with_loan(deal(space(99.0, lease("2026-05-05", "2031-01-01", 5.0))), amount=1.0)
    assert compile_deal(changed(other, {"leave.hold": 30})).program is first.program
    moved = compile_deal(changed(other, {"conventions.timing": "year_end"}))
    assert moved.program is not first.program
    assert program(SHAPE, frozenset({"noi"})) is program(SHAPE, frozenset({"noi"}))


def test_givens_are_all_inputs_that_the_lines_read() -> None:
    made = program(SHAPE)
    read = {
        leaf.path
        for one in made.lines.values()
        for leaf in formulas_below(one)
        if isinstance(leaf, Given)
    }
    assert set(made.givens) == read
    assert len(made.givens) == len(read)
    assert {"purchase.price", "leave.hold", "returns.required", "loans@l1.rate"} <= read


@pytest.mark.parametrize("seed", range(6))
def test_a_wanted_subset_equals_the_full_program(seed: int) -> None:
    plan = compile_deal(deal_from_raw(drawn(8300 + seed, 1)[0]))
    full = evaluate(plan).values
    for key in ("noi", "value", "exit_price", "debt_service", "rent_index"):
        made = program(plan.shape, frozenset({key}))
        some = evaluate(plan, wanted=[key]).values
        assert key in some and set(made.lines) < set(plan.program.lines)
        assert set(made.givens) <= set(plan.program.givens)
        for name, values in some.items():
            assert np.array_equal(values, full[name], equal_nan=True), name


def test_a_subset_computes_no_more_than_it_needs() -> None:
    assert set(program(SHAPE, frozenset({"rent_index"})).lines) == {"rent_index"}
    assert "irr(" not in program(SHAPE, frozenset({"noi"})).source
    both = program(SHAPE, frozenset({"noi_of_year", "balance@l1"}))
    assert set(both.lines) == {"noi_of_year", "balance@l1"}
    assert "loans@l1.rate" in both.givens and "returns.required" not in both.givens


def test_every_array_has_the_row_of_its_line() -> None:
    for raw in drawn(8400, 12):
        plan = compile_deal(deal_from_raw(raw))
        values = evaluate(plan).values
        for key, one in plan.program.lines.items():
            shape = (1,) if one.per == "once" else (ROWS[one.per], 1)
            assert values[key].shape == shape, key


# What is written


def run(lines: list[Declared], **given: float) -> dict[str, Floats]:
    made = printer.program(SHAPE)
    assert list(made.lines) == [one.key for one in lines]
    with np.errstate(all="ignore"):
        return made.run({path: np.array([value]) for path, value in given.items()}, CALENDAR)


def test_signs_and_choices(declaring: list[Declared]) -> None:
    a, b = Number(7.0) * f.formula(1), Line("b")
    declaring += [
        line("b", Number(2.0)),
        line("sum", a + b),
        line("difference", a - b),
        line("product", a * b),
        line("quotient", a / b),
        line("power", a**b),
        line("minus", -b),
        line("least", f.least(a, b)),
        line("greatest", f.greatest(a, b)),
        line("less", f.where(b < 2, 1, 0)),
        line("at_most", f.where(b <= 2, 1, 0)),
        line("more", f.where(b > 2, 1, 0)),
        line("same", f.where(b.is_(2), 1, 0)),
    ]
    found = {key: float(values[0]) for key, values in run(declaring).items()}
    signs = {"b": 2, "sum": 9, "difference": 5, "product": 14, "quotient": 3.5, "power": 49}
    choices = {"minus": -2, "least": 2, "greatest": 7}
    assert found == signs | choices | {"less": 0, "at_most": 1, "more": 0, "same": 1}


def test_brackets_are_never_needed(declaring: list[Declared]) -> None:
    a, b = Line("a"), Line("b")
    declaring += [
        line("a", Number(7.0)),
        line("b", Number(2.0)),
        line("c", (a - (b - 1)) * (a / (b / 4)) - (-b) ** (b + 1)),
    ]
    # (7 − 1) × 14 − (−2)³ = 84 + 8
    assert run(declaring)["c"][0] == 92


def test_a_formula_met_twice_is_computed_once(declaring: list[Declared]) -> None:
    twice = f.running_sum(Fact("month_number") * 2)
    declaring += [line("a", twice + 1, "month"), line("b", 1 / twice, "month")]
    run(declaring)
    assert printer.program(SHAPE).source.count("running_sum") == 1
    kernel = (f.OnDates(Fact("month_number"), Number(-5.0)),)
    declaring[:] = [
        line("a", Output("irr", "rate", kernel)),
        line("b", Output("irr", "rate", kernel)),
    ]
    program.cache_clear()
    run(declaring)
    assert printer.program(SHAPE).source.count("kernels[") == 1


def test_a_condition_takes_the_figure_away_and_is_kept(declaring: list[Declared]) -> None:
    unless = ((Given("leave.hold") <= 3, "short"), (Given("leave.hold") > 9, "long"))
    declaring += [line("a", Number(1.0), "once", *unless), line("b", Line("a") + 1)]
    for hold, met in ((2.0, [True, False]), (5.0, [False, False]), (10.0, [False, True])):
        values = run(declaring, **{"leave.hold": hold})
        assert [bool(values[condition_key("a", n)][0]) for n in (0, 1)] == met
        assert np.isnan(values["a"][0]) == np.isnan(values["b"][0]) == any(met)


def test_a_single_figure_stands_in_each_cell(declaring: list[Declared]) -> None:
    declaring += [
        line("a", Number(3.0), "month"),
        line("b", Given("leave.hold") * 2, "year"),
        line("c", Line("a") * f.of_year(Line("b")), "month"),
    ]
    values = run(declaring, **{"leave.hold": 5.0})
    assert values["a"].shape == (492, 1) and (values["a"] == 3).all()
    assert values["b"].shape == (41, 1) and (values["b"] == 10).all()
    assert (values["c"] == 30).all()


@pytest.mark.parametrize(("per", "row"), [("year", "month"), ("once", "month"), ("date", "month")])
def test_a_body_of_another_row_is_refused(declaring: list[Declared], per: Per, row: str) -> None:
    declaring += [line("a", Fact("month_number"), per)]
    with pytest.raises(RowError, match=f"a line by {per} has a formula by {row}"):
        printer.program(SHAPE)


def test_a_mixture_is_refused(declaring: list[Declared]) -> None:
    declaring += [line("a", Fact("month_number") * Given("earn.vacancy"), "month")]
    with pytest.raises(RowError, match="mixes rows"):
        printer.program(SHAPE)
