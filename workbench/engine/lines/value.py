"""Lines of value: discounting, the stack in three tiers, shares and margin."""

from collections.abc import Iterator

from workbench.engine.formula import (
    Fact,
    Formula,
    Given,
    Line,
    Number,
    at_hold,
    before,
    of_year,
    running_product,
    running_sum,
    total,
    year_sum,
)
from workbench.engine.lines.line import Declared
from workbench.engine.shape import Shape

RETURN = Given("returns.required")
EXTRA = Given("returns.extra_on_exit")


def elapsed(shape: Shape) -> Formula:
    """Months of the year that have passed when a month's property flow counts."""
    return {
        "month_end": Fact("month_of_year"),
        "month_start": Fact("month_of_year") - 1,
        "year_end": Number(12.0),
        "mid_year": Number(6.0),
        "year_start": Number(0.0),
    }[shape.timing]


def within_year(year_discount: Formula, rate: Formula, months: Formula) -> Formula:
    """D(t−1)·(1+r)^(−months/12): the discount so many months into each year."""
    return of_year(before(year_discount, 1)) * of_year(1 + rate) ** (-months / 12)


def value_lines(shape: Shape) -> Iterator[Declared]:
    yield from _discount(shape)
    yield from _stack()
    yield from _outlay(shape)
    yield from _value()


def _discount(shape: Shape) -> Iterator[Declared]:
    yield Declared(
        "discount_of_year",
        "Discount factor at the year's end",
        "index",
        "year",
        "1 at closing, divided by 1 + required return with each year",
        running_product(1 / (1 + RETURN)),
        source="compound interest",
    )
    yield Declared(
        "discount",
        "Discount factor of the month",
        "index",
        "month",
        "discount at the year's start × (1 + required return)^(−months passed ÷ 12), at the "
        "deal's timing",
        within_year(Line("discount_of_year"), RETURN, elapsed(shape)),
        source="compound interest",
    )
    yield Declared(
        "exit_discount_of_year",
        "Discount factor of the exit",
        "index",
        "year",
        "as at the year's end, with the extra return on the exit added to each year's return",
        running_product(1 / (1 + RETURN + EXTRA)),
    )


def _stack() -> Iterator[Declared]:
    for part, words in (("in_hand", "in hand"), ("expected", "expected")):
        yield Declared(
            f"value_{part}_of_year",
            f"Value {words}, by year",
            "money",
            "year",
            f"present value of the year's net cash flow {words}",
            year_sum(Line(f"cash_{part}") * Line("discount")),
        )
        yield Declared(
            f"value_{part}",
            f"Value {words}",
            "money",
            "once",
            f"present value of net cash flow {words} over the hold",
            at_hold(running_sum(Line(f"value_{part}_of_year"))),
        )


def _outlay(shape: Shape) -> Iterator[Declared]:
    price = Given("purchase.price")
    costs = [
        Given(f"costs@{identity}.amount") * (price if basis == "price" else 1)
        for identity, basis in shape.costs
    ]
    yield Declared(
        "purchase_costs",
        "Purchase costs",
        "money",
        "once",
        "all purchase-cost lines",
        total(list(costs)),
    )
    yield Declared(
        "outlay",
        "Price, purchase costs and initial works",
        "money",
        "once",
        "what is paid at closing before any financing",
        price + Line("purchase_costs") + Given("purchase.initial_works"),
    )


def _value() -> Iterator[Declared]:
    yield Declared(
        "value",
        "Value on these assumptions",
        "money",
        "once",
        "present value of net cash flow before debt over the hold and of the net exit, at the "
        "required return; not market value",
        Line("value_in_hand") + Line("value_expected") + Line("exit_present_value"),
        source="discounted cash flow, the textbook definition (from memory)",
    )
    yield Declared(
        "margin",
        "Margin",
        "money",
        "once",
        "value less price, purchase costs and initial works: the unlevered net present value",
        Line("value") - Line("outlay"),
    )
    yield Declared(
        "exit_value_share",
        "Exit-value share",
        "fraction",
        "once",
        "present value of the net exit ÷ value",
        Line("exit_present_value") / Line("value"),
        unless=((Line("value") <= 0, "value_not_positive"),),
    )
    yield Declared(
        "reference_share",
        "Reference share",
        "fraction",
        "once",
        "the exit-value share that an exit by perpetuity, without selling cost and extra return, "
        "would have at the same hold",
        at_hold(Line("reference_share_of_year")),
    )
    yield Declared(
        "ground_share",
        "Ground share",
        "fraction",
        "once",
        "value in hand, after its share of costs, ÷ price",
        Line("value_in_hand") / Given("purchase.price"),
        unless=((Given("purchase.price") <= 0, "price_not_positive"),),
    )
