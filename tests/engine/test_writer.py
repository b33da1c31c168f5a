"""Expressions written out cell by cell: small cases by hand."""

from dataclasses import replace

import pytest

from tests.engine.deals import changed, deal, evaluated, fullest, near
from workbench.deal.spend import Expense
from workbench.engine import formula as f
from workbench.engine.formula import Fact, Formula, Line, Number
from workbench.engine.operands import Ref, Token
from workbench.engine.working import working, working_at
from workbench.engine.writer import Writer


def written(writer: Writer, tokens: tuple[Token, ...]) -> str:
    """The expression with operands as their keys, or as their way of gathering."""
    text = ""
    for token in tokens:
        if isinstance(token, Ref):
            operand = writer.operands[token.number - 1]
            text += operand.key if operand.how == "one" else f"{operand.how}[{operand.key}]"
        else:
            text += token if isinstance(token, str) else f"{token:g}"
    return text


@pytest.mark.parametrize(
    ("formula", "text"),
    [
        (Line("value") - (Line("outlay") - Line("margin")), "value − (outlay − margin)"),
        ((Line("value") - Line("outlay")) - Line("margin"), "value − outlay − margin"),
        ((Line("value") + 1) * Line("outlay"), "(value + 1) × outlay"),
        (Line("value") * 2 + Line("outlay"), "value × 2 + outlay"),
        (Line("value") / (Line("outlay") * 2), "value ÷ (outlay × 2)"),
        (Line("value") ** (1 / Line("outlay")), "value ^ (1 ÷ outlay)"),
        (-(Line("value") + Line("outlay")), "−(value + outlay)"),
        (f.least(Line("value"), 3), "least(value; 3)"),
        (f.where(Line("value") > 0, Line("outlay"), Line("margin")), "outlay"),
        (f.where(Line("value") < 0, Line("outlay"), Line("margin")), "margin"),
        (f.at_hold(Line("noi_of_year")), "noi_of_year"),
        (f.OnDate(Line("value"), Number(0.0)), "value"),
        (f.over_dates(Line("unlevered_flows")), "sum[unlevered_flows]"),
        (f.FirstDate(f.running_sum(Line("unlevered_flows"))), "first[]"),
    ],
)
def test_expressions(formula: Formula, text: str) -> None:
    writer = Writer(evaluated(deal()))
    assert written(writer, writer.cell(formula, 0)) == text


@pytest.mark.parametrize(
    ("formula", "at", "text"),
    [
        (f.following(Line("noi_of_year")), 3, "noi_of_year"),
        (f.later_sum(Line("noi_of_year")), 3, "sum[noi_of_year]"),
        (f.running_product(Line("rent_index")), 3, "product[rent_index]"),
        (f.running_least(Line("noi_of_year")), 3, "least[noi_of_year]"),
        (f.before(Line("noi_of_year"), 7), 0, "7"),
        (f.before(Line("noi_of_year"), 7), 1, "noi_of_year"),
        (f.OnDates(Line("noi"), Number(7.0)), 0, "7"),
        (f.OnDates(Line("noi"), Number(7.0)), 1, "noi"),
        (f.month_starts(Line("noi")), 491, "noi"),
        (f.month_starts(Line("noi")), 492, "0"),
        (f.OnDate(Line("value"), Number(12.0)), 0, "0"),
        (f.year_end(Line("noi")), 2, "noi"),
        (f.of_year(Line("noi_of_year")), 30, "noi_of_year"),
        (f.year_sum(Line("noi")), 2, "noi"),
        (f.year_sum(Line("noi") * f.of_year(Line("rent_index"))), 2, "noi × rent_index"),
        (f.year_sum(f.of_year(Line("rent_index")) + 1), 2, "12 × (rent_index + 1)"),
    ],
)
def test_looks_at_one_cell(formula: Formula, at: int, text: str) -> None:
    writer = Writer(evaluated(deal()))
    assert written(writer, writer.cell(formula, at)) == text


def test_which_cell_an_operand_is() -> None:
    writer = Writer(evaluated(deal()))
    writer.cell(f.following(Line("noi_of_year")), 3)
    writer.cell(f.of_year(Line("rent_index")), 30)
    writer.cell(f.month_starts(Line("noi")), 0)
    places = [(one.key, one.span, one.at) for one in writer.operands]
    # Cells count from 0, places from 1: cell 3 is year 4, cell 30 lies in year 3.
    assert places == [("noi_of_year", "year", 5), ("rent_index", "year", 3), ("noi", "month", 1)]


def test_which_cells_are_gathered() -> None:
    writer = Writer(evaluated(deal()))
    writer.cell(f.later_sum(Line("noi_of_year")), 38)
    writer.cell(f.running_least(Line("noi_of_year")), 1)
    later, so_far = writer.operands
    assert [cell.at for cell in later.cells] == [40, 41]
    assert [cell.at for cell in so_far.cells] == [1, 2]


def test_an_operand_met_twice_has_one_number() -> None:
    writer = Writer(evaluated(deal()))
    first, second = writer.cell(Line("value"), 0), writer.cell(Line("value"), 0)
    assert first == second == (Ref(1),)


def test_a_comparison_is_no_figure() -> None:
    writer = Writer(evaluated(deal()))
    with pytest.raises(TypeError, match="Compare has no cell"):
        writer.cell(Line("value") < 1, 0)


def test_a_sum_never_positive_has_no_first_date() -> None:
    writer = Writer(evaluated(changed(deal(), {"purchase.price": 1e9})))
    writer.cell(f.FirstDate(f.running_sum(Line("unlevered_flows"))), 0)
    (operand,) = writer.operands
    assert len(operand.cells) == 493
    assert operand.value != operand.value


def test_a_fact_of_the_roll_says_which_leases() -> None:
    writer = Writer(evaluated(fullest()))
    writer.cell(f.year_sum(Fact("contract")), 1)
    (operand,) = writer.operands
    # 110 a month after the step of 1 January 2028.
    assert (operand.kind, operand.key, operand.at) == ("fact", "contract", 2)
    assert [(cell.key, cell.value) for cell in operand.cells] == [("e1", near(1320))]


def test_balances_of_a_year_are_those_of_its_end() -> None:
    base = changed(fullest(), {"spend.reserves": 120.0, "spend.reserves_use": "account"})
    result = evaluated(replace(base, expenses=(Expense("x1", amount=1.0),)))
    for key in ("reserve_path", "reserve_balance"):
        shown = working(result, key, 1)
        # Ten a month and no works in year 1.
        assert shown.value == near(120)
        assert shown.value == working_at(result, key, "month", 12).value
    opening, paid = working(result, "reserve_path", 1).operands
    assert opening.value == 0
    assert [cell.at for cell in paid.cells] == list(range(1, 13)) and paid.value == near(120)
