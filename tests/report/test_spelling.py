"""Every formula of every shape has words, and places in time read naturally."""

import pytest

from tests.oracle.test_random_deals import drawn
from workbench.engine import formula as f
from workbench.engine.lines import Output
from workbench.engine.plan import compile_deal
from workbench.engine.printer import formulas_of
from workbench.engine.result import evaluate
from workbench.files.deal_file import deal_from_raw
from workbench.report.spelling import Speller, when


@pytest.mark.parametrize("number", range(12))
def test_every_formula_has_words(number: int) -> None:
    deal = deal_from_raw(drawn(8100 + number, 1)[0])
    result = evaluate(compile_deal(deal))
    speller = Speller(deal, result.declared)
    for line in result.declared.values():
        words = [speller.formula(one) for one in formulas_of(line)]
        assert all(words)
        assert "{}" not in "".join(words)
        assert isinstance(line.body, Output) or len(words) == 1 + len(line.unless)


def spelled(node: f.Formula) -> str:
    deal = deal_from_raw({"schema": 1})
    return Speller(deal, evaluate(compile_deal(deal)).declared).formula(node)


def test_brackets_stand_where_they_must() -> None:
    a, b = f.Given("purchase.price"), f.Given("leave.exit_yield")
    assert spelled((a + b) * 2) == "(Price + Exit yield) × 2"
    assert spelled(a - (b - 1)) == "Price − (Exit yield − 1)"
    assert spelled(a / (b / 2)) == "Price ÷ (Exit yield ÷ 2)"
    assert spelled(-(a + b)) == "−(Price + Exit yield)"
    assert spelled(f.least(a, b)) == "least(Price; Exit yield)"
    assert spelled(f.where(a <= 0, 1, b)) == "(1 where Price ≤ 0, else Exit yield)"


@pytest.mark.parametrize(
    ("span", "at", "words"),
    [
        ("year", 3, "year 3"),
        ("month", 120, "month 120"),
        ("date", 0, "at closing"),
        ("date", 1, "1 month after closing"),
        ("date", 12, "12 months after closing"),
        ("once", None, ""),
    ],
)
def test_places_in_time(span: str, at: int | None, words: str) -> None:
    assert when(span, at) == words  # type: ignore[arg-type]
