"""Workings hang together: what an operand names has a working of its own with the same value.

That each figure comes back from its printed operands is tested with the command that prints them.
"""

import math

import pytest

from tests.oracle.test_random_deals import drawn
from workbench.engine.figures import figures_of
from workbench.engine.operands import Ref
from workbench.engine.plan import compile_deal
from workbench.engine.result import Result, evaluate
from workbench.engine.working import working, working_at
from workbench.files.deal_file import deal_from_raw


def computed(seed: int) -> Result:
    return evaluate(compile_deal(deal_from_raw(drawn(seed, 1)[0])))


@pytest.mark.parametrize("seed", range(7100, 7112))
def test_operands_have_workings_of_the_same_value(seed: int) -> None:
    result = computed(seed)
    hold = result.plan.deal.leave.hold or 1
    seen = set()
    for figure in figures_of(result.plan.deal):
        if figure.how in ("given", "nothing") or figure.key not in result.declared:
            continue
        by_year = result.declared[figure.key].per != "once"
        waiting = [(figure.key, "year" if by_year else "once", hold if by_year else None)]
        while waiting:
            place = waiting.pop()
            if place in seen:
                continue
            seen.add(place)
            for operand in working_at(result, *place).operands:  # type: ignore[arg-type]
                if operand.kind == "line":
                    below = (operand.key, operand.span, operand.at)
                    value = working_at(result, *below).value
                    value = math.nan if value is None else value
                    assert operand.value == pytest.approx(value, rel=1e-12, nan_ok=True), below
                    waiting.append(below)
    assert len(seen) > 40


def test_every_operand_is_named_in_the_expression() -> None:
    result = computed(7200)
    shown = working(result, "effective_gross_income", 1)
    named = {token.number for token in shown.tokens if isinstance(token, Ref)}
    assert named == set(range(1, len(shown.operands) + 1))


@pytest.mark.parametrize(
    ("key", "year"), [("noi", None), ("noi", 0), ("noi", 42), ("value", 1), ("dscr_noi", None)]
)
def test_a_year_that_does_not_fit(key: str, year: int | None) -> None:
    with pytest.raises(ValueError, match="year"):
        working(computed(7200), key, year)


def test_an_unknown_line() -> None:
    with pytest.raises(KeyError):
        working(computed(7200), "nothing")


def test_a_row_of_dates_at_one_date() -> None:
    result = computed(7200)
    flows = result.line("unlevered_flows")[0]
    for date in (0, 1, 12):
        assert working_at(result, "unlevered_flows", "date", date).value == flows[date]
