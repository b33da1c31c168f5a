"""What items and lines are called."""

from tests.fullest import fullest, small
from tests.report.sections import changed
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.report.names import item_title, line_title, one_line


def test_a_text_on_one_line() -> None:
    assert one_line(" Upper\n  lower ") == "Upper lower"


def test_an_item_is_called_by_its_name_or_its_kind_and_id() -> None:
    assert item_title(fullest().loans[0], "loans") == "Bank"
    assert item_title(small().spaces[0], "spaces") == "Space s1"
    assert item_title(small().spaces[0]) == "S1"


def test_a_very_long_name_is_cut() -> None:
    deal = changed(expenses=[{"id": "x16", "name": "n" * 500, "amount": 1.0}])
    assert len(item_title(deal.expenses[0])) == 120


def test_lines_of_an_item_have_its_name() -> None:
    result = evaluate(compile_deal(fullest()))
    assert line_title(result, "expense@x16") == "Repairs"
    assert line_title(result, "service@l21") == "Bank"
    assert line_title(result, "noi") == "Net operating income, reserves below"
    assert line_title(result, "balance@l21") == "Balance"
