"""Lines of measures: returns, cover, break-even and ratios."""

from collections.abc import Iterator

from workbench.engine.formula import (
    HOLD,
    Fact,
    FirstDate,
    Formula,
    Given,
    Line,
    Number,
    OnDates,
    at_hold,
    at_year,
    before,
    greatest,
    least,
    over_dates,
    running_least,
    running_product,
    running_sum,
    year_end,
    year_sum,
)
from workbench.engine.lines.line import Declared, Output, Per, Unless
from workbench.engine.lines.value import RETURN, within_year
from workbench.engine.shape import Shape

PRICE = Given("purchase.price")
TEXTBOOK = "textbook definition (from memory)"


def measure_lines(shape: Shape) -> Iterator[Declared]:
    yield from _returns(shape, "unlevered")
    if shape.loans:
        yield from _returns(shape, "levered")
        yield from _levered_value(shape)
    yield from _paybacks()
    yield from _cover()
    yield from _ratios()


def _measure(
    key: str, label: str, unit: str, per: Per, words: str, body: Formula | Output, *unless: Unless
) -> Declared:
    return Declared(key, label, unit, per, words, body, unless, TEXTBOOK)


def _returns(shape: Shape, side: str) -> Iterator[Declared]:
    flows = Line(f"{side}_flows")
    gains, losses = greatest(flows, 0), least(flows, 0)
    finance = Given("returns.finance") if shape.own_finance_rate else at_year(RETURN, 1)
    reinvest = Given("returns.reinvest") if shape.own_reinvest_rate else at_year(RETURN, 1)
    years = Fact("date_years")
    yield _measure(
        f"irr_{side}",
        f"IRR, {side}",
        "fraction",
        "once",
        "the yearly rate at which all flows, at their dates, are together worth nothing today",
        Output("irr", "rate", (flows,)),
    )
    yield _measure(
        f"money_out_{side}",
        f"Contributions, {side}",
        "money",
        "once",
        "sum of all dates on which cash goes in, each date netted first",
        -over_dates(losses),
    )
    yield _measure(
        f"money_back_{side}",
        f"Distributions, {side}",
        "money",
        "once",
        "sum of all dates on which cash comes out, each date netted first",
        over_dates(gains),
    )
    nothing_in = (Line(f"money_out_{side}") <= 0, "nothing_put_in")
    yield _measure(
        f"equity_multiple_{side}",
        f"Equity multiple, {side}",
        "multiple",
        "once",
        "distributions ÷ contributions",
        Line(f"money_back_{side}") / Line(f"money_out_{side}"),
        nothing_in,
    )
    future = over_dates(gains * (1 + reinvest) ** (HOLD - years))
    present = over_dates(losses * (1 + finance) ** (0 - years))
    yield _measure(
        f"mirr_{side}",
        f"MIRR, {side}",
        "fraction",
        "once",
        "(cash out carried to the end at the reinvestment rate ÷ cash in brought to closing at the "
        "finance rate)^(1 ÷ hold) − 1",
        (future / -present) ** (1 / HOLD) - 1,
        nothing_in,
        (Line(f"money_back_{side}") <= 0, "nothing_comes_back"),
    )


def _levered_value(shape: Shape) -> Iterator[Declared]:
    rate = Given("returns.equity") if shape.own_equity_return else RETURN
    yield Declared(
        "equity_discount_of_year",
        "Discount factor of equity at the year's end",
        "index",
        "year",
        "1 at closing, divided by 1 + required return on equity with each year",
        running_product(1 / (1 + rate)),
    )
    factor = within_year(Line("equity_discount_of_year"), rate, Fact("month_of_year"))
    yield _measure(
        "npv_levered",
        "Net present value, levered",
        "money",
        "once",
        "flows after debt at their dates, discounted at the required return on equity",
        over_dates(Line("levered_flows") * OnDates(factor, Number(1.0))),
    )


def _paybacks() -> Iterator[Declared]:
    flows = Line("unlevered_flows")
    factor = within_year(Line("discount_of_year"), RETURN, Fact("month_of_year"))
    discounted = flows * OnDates(factor, Number(1.0))
    for key, label, row in (
        ("payback", "Payback", flows),
        ("discounted_payback", "Discounted payback", discounted),
    ):
        yield _measure(
            key,
            f"{label}, years",
            "years",
            "once",
            "years until flows before debt"
            + (", discounted at the required return," if row is discounted else "")
            + " have added up to nothing or more",
            FirstDate(running_sum(row)),
            (over_dates(row) < 0, "not_paid_back"),
        )
    yield _measure(
        "profitability_index",
        "Profitability index",
        "multiple",
        "once",
        "value ÷ price, purchase costs and initial works",
        Line("value") / Line("outlay"),
        (Line("outlay") <= 0, "nothing_put_in"),
    )


def _cover() -> Iterator[Declared]:
    service = -year_sum(Line("debt_service"))
    no_service = (service <= 0, "no_debt_service")
    yield _measure(
        "dscr_noi",
        "Debt service cover on net operating income",
        "multiple",
        "year",
        "net operating income of the year ÷ debt service of the year",
        Line("noi_of_year") / service,
        no_service,
    )
    yield _measure(
        "dscr_ncf",
        "Debt service cover on net cash flow",
        "multiple",
        "year",
        "net cash flow before debt of the year ÷ debt service of the year",
        year_sum(Line("net_cash_flow")) / service,
        no_service,
    )
    opening = before(year_end(Line("loan_balance")), Line("loan_amount"))
    yield _measure(
        "debt_yield",
        "Debt yield",
        "fraction",
        "year",
        "net operating income of the year ÷ loan balance at the year's start",
        Line("noi_of_year") / opening,
        (opening <= 0, "no_loan_balance"),
    )
    yield _measure(
        "cash_of_year",
        "Cash flow after debt of the year",
        "money",
        "year",
        "twelve months of cash flow after debt",
        year_sum(Line("cash_flow_after_debt")),
    )
    yield _measure(
        "cash_on_cash",
        "Cash on cash",
        "fraction",
        "year",
        "cash flow after debt of the year ÷ cash to close",
        Line("cash_of_year") / Line("equity"),
        (Line("equity") <= 0, "no_equity"),
    )
    yield _measure(
        "worst_cash_year",
        "Weakest year's cash",
        "money",
        "once",
        "least cash flow after debt of any year of the hold; below nothing it is a cash call",
        at_hold(running_least(Line("cash_of_year"))),
    )


def _ratios() -> Iterator[Declared]:
    costs = -at_year(year_sum(Line("operating_expenses") + Line("debt_service")), 1)
    gross = at_year(Line("gross_rent_of_year") + year_sum(Line("other_income")), 1)
    for key, reserves in (
        ("break_even_without_reserves", False),
        ("break_even_with_reserves", True),
    ):
        paid = costs - at_year(year_sum(Line("reserves")), 1) if reserves else costs
        yield _measure(
            key,
            "Break-even occupancy " + ("with reserves" if reserves else "without reserves"),
            "fraction",
            "once",
            "operating expenses, debt service"
            + (" and reserves" if reserves else "")
            + " of year 1 ÷ rents with empty months, and other income",
            paid / gross,
            (gross <= 0, "no_gross_income"),
        )
    first = at_year(Line("noi_of_year"), 1)
    no_price = (PRICE <= 0, "price_not_positive")
    rent = at_year(Line("gross_rent_of_year"), 1)
    income = at_year(year_sum(Line("effective_gross_income")), 1)
    ratios: list[tuple[str, str, str, str, Formula, Unless]] = [
        (
            "going_in_yield",
            "Going-in yield",
            "fraction",
            "net operating income of year 1 ÷ price",
            first / PRICE,
            no_price,
        ),
        (
            "yield_on_cost",
            "Yield on cost",
            "fraction",
            "net operating income of year 1 ÷ price, purchase costs and initial works",
            first / Line("outlay"),
            (Line("outlay") <= 0, "nothing_put_in"),
        ),
        (
            "gross_rent_multiple",
            "Gross rent multiple",
            "multiple",
            "price ÷ gross rent of year 1",
            PRICE / rent,
            (rent <= 0, "no_gross_income"),
        ),
        (
            "expense_ratio",
            "Expense ratio",
            "fraction",
            "operating expenses of year 1 ÷ effective gross income of year 1",
            -at_year(year_sum(Line("operating_expenses")), 1) / income,
            (income <= 0, "no_gross_income"),
        ),
    ]
    for key, label, unit, words, body, unless in ratios:
        yield _measure(key, label, unit, "once", words, body, unless)
