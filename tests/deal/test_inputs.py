"""Declarations of inputs: every one is complete, and a deal's inputs are found by path."""

from dataclasses import dataclass, field, fields, is_dataclass
from typing import Annotated

import pytest

from tests.fullest import fullest
from workbench.deal.deal import Deal
from workbench.deal.inputs import DAYS, YEARS, Field, Input, YearRow, at_year, declared, leaves
from workbench.files.adapter import record_classes

UNITS = {
    "money", "fraction", "area", "count", "months", "years", "multiple", "year", "date", "choice",
    "switch", "text", "reference",
}  # fmt: skip
NUMBERS = UNITS - {"date", "choice", "switch", "text", "reference"}

EVERY = [
    pytest.param(one, id=f"{record.__name__}.{one.name}")
    for record in record_classes().values()
    for one in declared(record).values()
    if one.input is not None
]


@dataclass(frozen=True)
class Plain:
    id: str
    size: Annotated[float, "a mark of another kind", Input("Size", "area", 0, 9)] = 1.0
    note: Annotated[str, "no input"] = ""
    row: Annotated[YearRow | None, Input("Row", "fraction")] = None


@dataclass(frozen=True)
class Whole:
    part: Plain = field(default_factory=lambda: Plain("y1"))
    many: tuple[Plain, ...] = ()
    words: tuple[str, ...] = ()
    count: int = 3


@pytest.mark.parametrize("one", EVERY)
def test_a_declaration_is_complete(one: Field) -> None:
    mark = one.input
    assert mark is not None
    assert mark.label and mark.label[0].isupper() and not mark.label.endswith(".")
    assert mark.unit in UNITS
    assert not mark.help or mark.help.endswith(".")
    if mark.unit in NUMBERS:
        assert mark.low is not None and mark.high is not None and mark.low < mark.high
    else:
        assert mark.low is None
    if one.is_row:
        assert mark.unit in ("fraction", "money")


@pytest.mark.parametrize("one", EVERY)
def test_a_default_lies_within_its_range(one: Field) -> None:
    """A deal in which nothing is typed has no value outside what is allowed."""
    for record in record_classes().values():
        for spec in fields(record):
            if declared(record)[spec.name] is not one or one.input is None:
                continue
            default = spec.default
            if isinstance(default, int | float) and one.input.low is not None:
                assert one.input.high is not None
                assert one.input.low <= default <= one.input.high


def test_needed_inputs_have_no_default() -> None:
    needed = {
        f"{record.__name__}.{one.name}"
        for record in record_classes().values()
        for one in declared(record).values()
        if one.input is not None and one.input.needed
    }
    assert needed == {
        "PurchaseCost.amount", "Purchase.price", "Step.date", "Space.count", "Earn.vacancy",
        "OtherIncome.amount", "Expense.amount", "Works.amount", "Loan.amount", "Loan.rate",
        "ExitPart.weight", "Leave.hold", "Returns.required",
    }  # fmt: skip


def test_an_adverse_move_goes_against_the_deal() -> None:
    """Higher growth and rents are for the deal, all else that has a move is against it."""
    moves = {
        f"{record.__name__}.{one.name}": one.input.adverse
        for record in record_classes().values()
        for one in declared(record).values()
        if one.input is not None and one.input.adverse
    }
    assert moves == {
        "Earn.growth": -0.01, "Earn.depreciation": 0.005, "Earn.vacancy": 0.02,
        "Earn.credit_loss": 0.01, "Spend.growth": 0.01, "Loan.rate": 0.01,
        "Leave.exit_yield": 0.005, "Returns.required": 0.01,
    }  # fmt: skip


def test_fields_are_declared_in_order_with_their_marks() -> None:
    found = declared(Plain)
    assert list(found) == ["id", "size", "note", "row"]
    assert found["id"] == Field("id", str, None)
    assert found["size"] == Field("size", float, Input("Size", "area", 0, 9))
    assert found["note"] == Field("note", str, None)
    assert found["row"].is_row
    assert not found["size"].is_row


def test_declarations_are_read_once() -> None:
    assert declared(Plain) is declared(Plain)


def test_leaves_are_named_by_path_and_item() -> None:
    whole = Whole(many=(Plain("y7", 2.0), Plain("y8")), words=("no input",))
    found = {leaf.path: leaf.value for leaf in leaves(whole)}
    assert found == {
        "part.size": 1.0, "part.row": None,
        "many@y7.size": 2.0, "many@y7.row": None,
        "many@y8.size": 1.0, "many@y8.row": None,
    }  # fmt: skip


def test_a_leaf_knows_its_record_and_declaration() -> None:
    plain = Plain("y7", 2.0)
    leaf = next(leaves(Whole(part=plain)))
    assert leaf.owner is plain
    assert leaf.field is declared(Plain)["size"]
    assert leaf.input.label == "Size"


def test_an_empty_deal_has_the_inputs_of_its_sections() -> None:
    paths = [leaf.path for leaf in leaves(Deal())]
    assert paths[0] == "property.name"
    assert "leave.exit_yield" in paths
    assert not any("@" in path for path in paths)
    assert len(paths) == len(set(paths))


def test_the_fullest_deal_has_every_record_and_a_value_in_every_input() -> None:
    """What the tests of bad input stand on: no input is forgotten."""
    deal = fullest()
    classes = {type(leaf.owner) for leaf in leaves(deal)}
    inputs = {(type(leaf.owner), leaf.field.name) for leaf in leaves(deal)}
    given = {(type(leaf.owner), leaf.field.name) for leaf in leaves(deal) if leaf.value is not None}
    with_inputs = {
        record
        for record in record_classes().values()
        if any(one.input for one in declared(record).values())
    }
    assert classes == with_inputs
    assert {str(name) for _, name in inputs - given} == {"rent"}  # stated: would hide the leases
    assert all(is_dataclass(one) for one in classes)


@pytest.mark.parametrize(
    ("year", "value"), [(0, None), (1, 0.05), (2, 0.05), (3, 0.07), (41, 0.07)]
)
def test_an_absent_year_follows_the_last_one_typed(year: int, value: float | None) -> None:
    assert at_year({1: 0.05, 3: 0.07}, year) == value


def test_years_and_days_reach_far_enough() -> None:
    assert YEARS == 41
    first, last = DAYS
    assert (first.isoformat(), last.isoformat()) == ("1000-01-01", "2999-12-31")
