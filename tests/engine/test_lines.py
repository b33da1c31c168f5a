"""Every line of every shape that the random deals have, and of some made to have the rest."""

import re
from collections.abc import Iterator
from dataclasses import replace
from typing import get_args

import pytest

from tests.engine.deals import changed, deal, lease, space, with_loan
from tests.oracle.test_random_deals import drawn
from workbench.deal.deal import Deal
from workbench.deal.earn import OtherIncome
from workbench.deal.inputs import leaves
from workbench.engine import formula as f
from workbench.engine.figures import figures_of
from workbench.engine.formula import Fact, Formula, Given, Line
from workbench.engine.kernels import KERNELS
from workbench.engine.lines import Declared, Output, declare
from workbench.engine.lines.line import Per
from workbench.engine.plan import compile_deal
from workbench.engine.printer import formulas_below, formulas_of
from workbench.engine.result import evaluate
from workbench.engine.rows import row_of
from workbench.engine.shape import Shape, shape_of
from workbench.files.deal_file import deal_from_raw
from workbench.text.messages import REASONS

DEALS = [deal_from_raw(raw) for raw in drawn(8600, 80)] + [deal(), Deal()]
SHAPES: dict[Shape, Deal] = {shape_of(one): one for one in DEALS}

LEAVES = (f.Number, f.Line, f.Given, f.Fact)
CELLS = (f.Pair, f.Compare, f.Where)
LOOKING = (f.Look, f.Before, f.AtYear, f.OnDates, f.FirstDate, f.OnDate)
PRINTABLE = (*LEAVES, *CELLS, *LOOKING)
UNITS = {"money", "fraction", "index", "multiple", "years"}
KEY = re.compile(r"[a-z][a-z_]*(@[a-z]\d+)?")


def every_line() -> Iterator[Declared]:
    for shape in SHAPES:
        yield from declare(shape)


def per_of(shape: Shape) -> dict[str, Per]:
    return {line.key: line.per for line in declare(shape)}


def nodes(formula: Formula) -> Iterator[Formula]:
    yield formula
    for part in formula.parts():
        yield from nodes(part)


def test_there_are_many_shapes() -> None:
    assert len(SHAPES) > 75


def test_each_line_says_what_it_is() -> None:
    for line in every_line():
        assert KEY.fullmatch(line.key), line
        assert line.label and line.definition and line.source, line
        assert line.label[0].isupper() and not line.label.endswith("."), line
        assert not line.definition[0].isupper() and not line.definition.endswith("."), line
        assert line.unit in UNITS, line
        assert line.per in get_args(Per), line
        assert line.sign in (1, -1), line
        assert line.per == "month" or not line.standing, line


def test_keys_are_unique() -> None:
    for shape in SHAPES:
        keys = [line.key for line in declare(shape)]
        assert len(keys) == len(set(keys))


def test_a_line_of_one_key_is_of_one_kind() -> None:
    """What a key means does not hang on the deal: neither its unit nor its row nor its sign."""
    kinds: dict[str, set[object]] = {}
    for line in every_line():
        key = line.key.partition("@")[0]
        kinds.setdefault(key, set()).add((line.unit, line.per, line.sign, line.standing))
    assert {key: found for key, found in kinds.items() if len(found) > 1} == {}


def test_the_row_of_each_formula_fits() -> None:
    for shape in SHAPES:
        rows = per_of(shape)
        for line in declare(shape):
            if not isinstance(line.body, Output):
                assert row_of(line.body, rows) in (line.per, "once"), line.key
            for condition, _ in line.unless:
                assert row_of(condition, rows) in (line.per, "once"), line.key


def test_kernels_give_what_lines_ask_of_them() -> None:
    for line in every_line():
        if isinstance(line.body, Output):
            assert line.body.name in KERNELS[line.body.kernel].outputs


def test_lines_read_only_lines_inputs_and_facts_that_are_there() -> None:
    for shape, one in list(SHAPES.items())[::3]:
        rows, plan = per_of(shape), compile_deal(one)
        paths = {leaf.path for leaf in leaves(one)}
        for line in declare(shape):
            for leaf in formulas_below(line):
                match leaf:
                    case Line(key=key):
                        assert key in rows
                    case Given(path=path):
                        assert path in paths
                    case Fact(name=name):
                        assert name in plan.facts


def test_inputs_and_lines_share_no_name() -> None:
    for shape, one in SHAPES.items():
        assert {leaf.path for leaf in leaves(one)} & set(per_of(shape)) == set()


def test_figures_are_lines_or_inputs() -> None:
    for shape, one in SHAPES.items():
        rows = per_of(shape)
        inputs = {leaf.path for leaf in leaves(one)}
        leaf_paths = {leaf for line in declare(shape) for leaf in formulas_below(line)}
        read = {leaf.path for leaf in leaf_paths if isinstance(leaf, Given)}
        for figure in figures_of(one):
            levered = "levered" in figure.place and figure.key not in rows
            match figure.how:
                case "given":
                    assert figure.key in inputs & read
                case "once":
                    assert rows.get(figure.key) == "once" or (levered and not one.loans)
                case "year":
                    assert rows[figure.key] in ("month", "year")
                case "year_end":
                    assert rows[figure.key] == "month"
                case "nothing":
                    assert figure.key not in rows


def test_every_reason_has_words() -> None:
    codes = {code for line in every_line() for _, code in line.unless}
    assert codes < set(REASONS)
    # And each code of a condition is some line's.
    others = {"waits_for", "too_large", "no_loan", "no_rate"}
    assert set(REASONS) - others == codes


def test_deductions_are_signed_as_they_add_up() -> None:
    for line in every_line():
        if line.sign == -1:
            assert line.unit == "money" and line.per == "month"
    negative = {line.key.partition("@")[0] for line in every_line() if line.sign == -1}
    assert negative == {
        "empty_time",
        "concessions",
        "vacancy_allowance",
        "credit_loss",
        "expense",
        "operating_expenses",
        "reserves",
        "works_before_account",
        "works",
    }
    for one in DEALS[:20]:
        result = evaluate(compile_deal(one))
        for key in negative & set(result.values) - {"credit_loss"}:
            assert (result.values[key] <= 1e-9).all(), key


def test_balances_are_the_lines_that_stand() -> None:
    standing = {line.key.partition("@")[0] for line in every_line() if line.standing}
    assert standing == {"balance", "loan_balance", "reserve_path", "reserve_balance"}


def test_a_condition_reads_nothing_that_its_own_line_computes() -> None:
    for line in every_line():
        for condition, _ in line.unless:
            assert line.key not in {
                leaf.key for leaf in condition.leaves() if isinstance(leaf, Line)
            }


def test_the_tree_holds_only_what_a_row_can_print() -> None:
    for line in every_line():
        for formula in formulas_of(line):
            assert all(isinstance(node, PRINTABLE) for node in nodes(formula))


# Which lines there are


def keys_of(one: Deal) -> set[str]:
    return {line.key for line in declare(shape_of(one))}


def test_without_loans_there_are_no_levered_lines() -> None:
    plain, owing = keys_of(deal()), keys_of(with_loan(deal()))
    assert plain < owing
    assert {key for key in owing - plain if "@" not in key} == {
        "exit_to_equity",
        "levered_flows",
        "irr_levered",
        "money_out_levered",
        "money_back_levered",
        "equity_multiple_levered",
        "mirr_levered",
        "equity_discount_of_year",
        "npv_levered",
    }
    assert {key.partition("@")[0] for key in owing - plain if "@" in key} == {
        "balance",
        "interest",
        "principal",
        "repayment",
        "service",
    }


@pytest.mark.parametrize(
    ("changes", "more", "less"),
    [
        ({"leave.method": "trailing_noi"}, {"trailing_noi_price"}, {"forward_noi_price"}),
        ({"leave.method": "amount"}, set(), {"forward_noi_price", "price_index"}),
        ({"leave.method": "purchase_price"}, {"price_index"}, {"forward_noi_price"}),
        ({"leave.exit_income": "stabilised"}, {"stabilised_noi", "off_market_value"}, set()),
        ({"leave.exit_income": "stabilised", "leave.method": "amount"}, set(), {"stabilised_noi"}),
        ({"spend.reserves_use": "account"}, {"reserve_balance", "reserve_path"}, set()),
        (
            {"spend.reserves_use": "account", "leave.method": "perpetuity"},
            set(),
            {"reserve_balance", "reserve_path"},
        ),
    ],
)
def test_only_the_lines_of_the_choices_made(
    changes: dict[str, object], more: set[str], less: set[str]
) -> None:
    made = keys_of(changed(deal(), changes))
    assert made >= more and not made & less


def test_a_line_for_each_item() -> None:
    base = deal(space(1.0, lease("2026-01-01", "2030-01-01", 1.0)))
    incomes = tuple(OtherIncome(f"i{n}", amount=1.0) for n in (3, 5))
    made = keys_of(replace(base, other_income=incomes))
    assert {"other_income@i3", "other_income@i5", "other_income"} <= made
    assert "other_income@i4" not in made
