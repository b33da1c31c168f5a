"""Lines of the exit, each as a row: the sale at the end of every year, of which one is chosen."""

from collections.abc import Iterator

from workbench.engine.formula import (
    Fact,
    Formula,
    Given,
    Line,
    Number,
    at_hold,
    at_year,
    following,
    later_sum,
    of_year,
    running_product,
    total,
    where,
    year_end,
    year_sum,
)
from workbench.engine.lines.earn import NOTHING
from workbench.engine.lines.line import Declared, Unless
from workbench.engine.shape import Part, Shape

RETURN = Given("returns.required")
YIELD = Given("leave.exit_yield")
LAST = 41


def leave_lines(shape: Shape) -> Iterator[Declared]:
    yield from _yearly(shape)
    yield from _reference(shape)
    if shape.stabilised and _capitalises(shape):
        yield from _stabilised(shape)
    if any(part.method in ("price_per", "purchase_price") for part in shape.exits):
        yield _price_index(shape)
    yield from _prices(shape)
    yield from _net_exit(shape)


def _capitalises(shape: Shape) -> bool:
    return any(part.method in ("forward_noi", "trailing_noi") for part in shape.exits)


def _row(
    key: str,
    label: str,
    words: str,
    body: Formula,
    unit: str = "money",
    unless: tuple[Unless, ...] = (),
) -> Declared:
    return Declared(key, label, unit, "year", words, body, unless)


def _yearly(shape: Shape) -> Iterator[Declared]:
    yield _row(
        "noi_of_year",
        "Net operating income of the year, reserves "
        + ("above" if shape.reserves_above else "below"),
        "twelve months of net operating income",
        year_sum(Line("noi")),
    )
    yield _row(
        "gross_rent_of_year",
        "Gross rent of the year",
        "rent in hand and rent expected, before empty time and concessions",
        year_sum(Line("rent_in_hand") + Line("rent_expected")),
    )


def _reference(shape: Shape) -> Iterator[Declared]:
    """The perpetuity: years to 41 one by one, then year 41 for ever at the rent's last growth."""
    plain = Line("plain_value_of_year")
    yield _row(
        "plain_value_of_year",
        "Present value of the year without a reserve account",
        "each month's net cash flow without a reserve account, discounted to closing",
        year_sum(Line("net_cash_flow_without_account") * Line("discount")),
    )
    wear = 1 - at_year(Given("earn.depreciation"), LAST) if shape.rent_as_new else Number(1.0)
    step = (1 + at_year(Given("earn.growth"), LAST)) * wear
    yield Declared(
        "lasting_growth",
        "Lasting growth",
        "fraction",
        "once",
        "growth of market rent from year 41 to 42, net of depreciation where that applies; every "
        "line grows with it for ever after, since costs that grow faster would overtake any rent "
        "in the end; nil where there is no market rent",
        where(Fact("market_total").is_(0), 0, step - 1),
    )
    growth, last_return = Line("lasting_growth"), at_year(RETURN, LAST)
    income = at_year(year_sum(Line("net_cash_flow_without_account")), LAST)
    yield Declared(
        "lasting_value",
        "Present value of all years after 41",
        "money",
        "once",
        "year 41 moved one year on and run for ever at the lasting growth, discounted to closing",
        at_year(plain, LAST) * (1 + growth) / (last_return - growth),
        unless=(
            (1 + last_return <= 1 + growth, "return_not_above_growth"),
            ((1 + growth) * income <= 0, "no_lasting_income"),
        ),
    )
    later = later_sum(plain) + Line("lasting_value")
    whole = at_year(later_sum(plain), 1) + at_year(plain, 1) + Line("lasting_value")
    yield Declared(
        "reference_value",
        "Reference value",
        "money",
        "once",
        "value with an exit by perpetuity, no selling cost, no reserve account and no extra "
        "return: the same for every hold",
        whole,
    )
    yield _row(
        "reference_share_of_year",
        "Reference share, by hold",
        "the part of the reference value that lies after the hold",
        later / Line("reference_value"),
        "fraction",
        ((Line("reference_value") <= 0, "value_not_positive"),),
    )
    yield _row(
        "perpetuity_price",
        "Value of all later years",
        "years after the sale one by one to year 41, then the lasting value, at the sale's date",
        later / Line("discount_of_year"),
    )


def _stabilised(shape: Shape) -> Iterator[Declared]:
    rent = 12 * Fact("market_total") * Line("rent_index")
    marked = year_sum(Line("marked_income"))
    yield _row(
        "stabilised_income",
        "Effective gross income, stabilised",
        "every space at market rent, less the stabilised vacancy on it and on marked other "
        "income; other income and credit loss as modelled",
        rent
        + year_sum(Line("other_income"))
        - Given("leave.stabilised_vacancy") * (rent + marked)
        + year_sum(Line("credit_loss")),
    )
    fees = [one for one in shape.expenses if one.basis == "egi" and not one.stated]
    others = [one for one in shape.expenses if one not in fees]
    costs = total([year_sum(Line(f"expense@{one.id}")) for one in others])
    rates = total([Given(f"expenses@{one.id}.amount") for one in fees])
    reserves: Formula = NOTHING
    if shape.reserves_above:
        reserves = year_sum(Line("reserves"))
        if shape.reserves_basis == "egi" and shape.account != "nil":
            reserves = -Given("spend.reserves") * Line("stabilised_income")
    yield _row(
        "stabilised_noi",
        "Net operating income, stabilised",
        "stabilised effective gross income less expenses as modelled, those on income following "
        "the stabilised one",
        Line("stabilised_income") * (1 - rates) + costs + reserves,
    )
    off = Fact("contract") - Fact("free") - Fact("let") * of_year(Line("rent_index"))
    yield _row(
        "off_market_value",
        "Leases above or below market",
        "present value, at the sale's date and the required return, of contract rent less free "
        "rent less market rent over what remains of dated leases",
        later_sum(year_sum(off * Line("discount"))) / Line("discount_of_year"),
    )


def _price_index(shape: Shape) -> Declared:
    wear = 1 - Given("earn.depreciation") if shape.price_as_new else Number(1.0)
    return _row(
        "price_index",
        "Index of price at the sale",
        "price growth of years 1 to the sale, with depreciation for growth stated as of buildings "
        "as new",
        running_product((1 + Given("leave.price_growth")) * wear),
        "index",
    )


def _prices(shape: Shape) -> Iterator[Declared]:
    if _capitalises(shape):
        chosen = Line("stabilised_noi") if shape.stabilised else Line("noi_of_year")
        for method, income in (("forward_noi", following(chosen)), ("trailing_noi", chosen)):
            if any(part.method == method for part in shape.exits):
                yield from _capitalised(method, income, shape.stabilised)
    prices = [_price(shape, part) for part in shape.exits]
    yield _row(
        "exit_price_of_year",
        "Exit price, by year of sale",
        "price by the exit method, or by the methods of the blend at their weights",
        total(prices),
    )


def _capitalised(method: str, income: Formula, stabilised: bool) -> Iterator[Declared]:
    words = {
        "forward_noi": "net operating income of the twelve months after the sale",
        "trailing_noi": "net operating income of the twelve months before the sale",
    }
    key = f"{method}_income"
    yield _row(key, "Capitalised income", words[method], income)
    price = Line(key) / YIELD
    yield _row(
        f"{method}_price",
        "Income ÷ exit yield",
        "capitalised income ÷ exit yield"
        + (", and leases above or below market" if stabilised else ""),
        price + Line("off_market_value") if stabilised else price,
        unless=((Line(key) < 0, "negative_exit_income"),),
    )


def _price(shape: Shape, part: Part) -> Formula:
    per = Given("leave.price_per") * Fact("units" if shape.price_per_of == "unit" else "area")
    # Read only where the method is in use, so that an absent input of another method is no matter.
    price: dict[str, Formula] = {
        "forward_noi": Line("forward_noi_price"),
        "trailing_noi": Line("trailing_noi_price"),
        "perpetuity": Line("perpetuity_price"),
        "price_per": per * Line("price_index"),
        "rent_multiple": Given("leave.rent_multiple") * following(Line("gross_rent_of_year")),
        "purchase_price": Given("purchase.price") * Line("price_index"),
        "amount": Given("leave.amount"),
    }
    chosen = price[part.method]
    return chosen if part.weight is None else Given(part.weight) * chosen


def _net_exit(shape: Shape) -> Iterator[Declared]:
    balance: Formula = NOTHING
    if shape.account == "account":
        balance = year_end(Line("reserve_balance"))
    price = Line("exit_price_of_year")
    yield _row(
        "net_exit_of_year",
        "Net exit, by year of sale",
        "exit price less selling cost, and the reserve balance",
        price - Given("leave.selling_cost") * price + balance,
    )
    chosen = [
        ("exit_price", "Exit price", "price at the end of the hold", price),
        ("exit_net", "Net exit", "at the end of the hold", Line("net_exit_of_year")),
        (
            "exit_present_value",
            "Present value of the net exit",
            "net exit discounted at the required return and the extra return on the exit",
            Line("net_exit_of_year") * Line("exit_discount_of_year"),
        ),
    ]
    for key, label, words, row in chosen:
        yield Declared(key, label, "money", "once", words, at_hold(row))
    yield from _shown(shape)


def _shown(shape: Shape) -> Iterator[Declared]:
    """The income and the yield printed beside the exit price."""
    only = shape.exits[0].method if len(shape.exits) == 1 else "blend"
    typed = only in ("forward_noi", "trailing_noi")
    income = Line(f"{only}_income") if typed else following(Line("noi_of_year"))
    yield Declared(
        "exit_income",
        "Income at the exit",
        "money",
        "once",
        "the income that is capitalised, or net operating income of the year after the sale",
        at_hold(income),
    )
    yield Declared(
        "exit_yield",
        "Yield at the exit",
        "fraction",
        "once",
        "the exit yield as typed" if typed else "income at the exit ÷ exit price",
        YIELD if typed else Line("exit_income") / Line("exit_price"),
        unless=() if typed else ((Line("exit_price") <= 0, "exit_price_not_positive"),),
    )
