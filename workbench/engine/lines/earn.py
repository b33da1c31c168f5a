"""Lines of income: rent, empty time, allowance, credit loss, effective gross income."""

from collections.abc import Iterator

from workbench.engine.formula import (
    Fact,
    Formula,
    Given,
    Line,
    Number,
    before,
    greatest,
    least,
    of_year,
    running_product,
    total,
    where,
    year_sum,
)
from workbench.engine.lines.line import Declared
from workbench.engine.shape import IncomeShape, Shape

NOTHING = Number(0.0)


def index(growth: Formula, wear: Formula | None = None) -> Formula:
    """1 in year 1; the value of year t carries the index from year t to t+1."""
    step = 1 + growth if wear is None else (1 + growth) * (1 - wear)
    return before(running_product(step), 1)


def stated(path: str) -> Formula:
    """A typed amount a year as a twelfth each month."""
    return of_year(Given(path)) / 12


def earn_lines(shape: Shape) -> Iterator[Declared]:
    yield from _rent(shape)
    yield from _other_income(shape)
    yield from _losses(shape)
    yield from _effective_income(shape)


def _rent(shape: Shape) -> Iterator[Declared]:
    wear = Given("earn.depreciation") if shape.rent_as_new else None
    yield Declared(
        "rent_index",
        "Index of market rent",
        "index",
        "year",
        "1 in year 1, then moved by each year's growth and, for growth stated as of buildings as "
        "new, by its depreciation",
        index(Given("earn.growth"), wear),
    )
    typed = "rent" in shape.stated
    rent, contract = stated("stated.rent"), Fact("contract")
    rent_index = of_year(Line("rent_index"))
    yield Declared(
        "rent_in_hand",
        "Rent in hand",
        "money",
        "month",
        "rent under leases entered with dates, until the earliest of end and tenant's break"
        + ("; no more than the stated rent" if typed else ""),
        least(contract, rent) if typed else contract,
    )
    yield Declared(
        "rent_expected",
        "Rent expected",
        "money",
        "month",
        "what the stated rent holds beyond rent in hand"
        if typed
        else "market rent of space at market or empty, and rent of units without dates; no "
        "re-letting terms are entered, so a space earns the market rent of each month after its "
        "last lease",
        rent - Line("rent_in_hand")
        if typed
        else (Fact("market") + Fact("gap")) * rent_index + Fact("undated"),
    )
    yield Declared(
        "empty_time",
        "Empty time",
        "money",
        "month",
        "market rent of days before, between and after dated leases, taken off rent expected",
        _stated_or(shape, "empty_time", NOTHING if typed else -Fact("gap") * rent_index),
        sign=-1,
    )
    yield Declared(
        "concessions",
        "Concessions",
        "money",
        "month",
        "rent of free months left under dated leases",
        _stated_or(shape, "concessions", NOTHING if typed else -Fact("free")),
        sign=-1,
    )


def _stated_or(shape: Shape, name: str, computed: Formula) -> Formula:
    return -stated(f"stated.{name}") if name in shape.stated else computed


def _other_income(shape: Shape) -> Iterator[Declared]:
    for one in shape.income:
        path = f"other_income@{one.id}"
        yield Declared(
            path,
            "Other income",
            "money",
            "month",
            "the stated amount" if one.stated else "amount a year, grown, a twelfth each month",
            _one_income(one, path),
        )
    lines: list[Formula] = [Line(f"other_income@{one.id}") for one in shape.income]
    yield Declared(
        "other_income",
        "Other income",
        "money",
        "month",
        "all other income, and penalties of tenants who break",
        total([*lines, Fact("penalty")]),
    )
    marked = [one for one in shape.income if one.marked]
    yield Declared(
        "marked_income",
        "Other income under the allowance",
        "money",
        "month",
        "other income that vacancy and credit loss apply to",
        total([Line(f"other_income@{one.id}") for one in marked]),
    )
    yield Declared(
        "other_income_in_hand",
        "Other income in hand",
        "money",
        "month",
        "other income tied to a lease, for the days under it",
        total([_tied(one) for one in shape.income if one.tied]),
    )
    yield Declared(
        "marked_income_in_hand",
        "Other income under the allowance, in hand",
        "money",
        "month",
        "the marked part of other income in hand",
        total([_tied(one) for one in marked if one.tied]),
    )


def _one_income(one: IncomeShape, path: str) -> Formula:
    if one.stated:
        return stated(f"{path}.stated")
    return Given(f"{path}.amount") * scale(one.basis) / 12 * of_year(index(Given(f"{path}.growth")))


def _tied(one: IncomeShape) -> Formula:
    return Line(f"other_income@{one.id}") * Fact(f"tied@{one.id}")


def scale(basis: str) -> Formula:
    """What an amount by unit or by area is multiplied with."""
    if basis in ("unit", "area"):
        return Fact("units" if basis == "unit" else "area")
    return Number(1.0)


def _losses(shape: Shape) -> Iterator[Declared]:
    base, empty = Line("base"), Line("empty_time")
    yield Declared(
        "base",
        "Base of allowance and credit loss",
        "money",
        "month",
        "rent in hand, rent expected and marked other income, before concessions",
        Line("rent_in_hand") + Line("rent_expected") + Line("marked_income"),
    )
    yield Declared(
        "allowance_of_year",
        "Vacancy allowance of the year",
        "money",
        "year",
        "the allowance on the year's base less empty time already in it, never below nothing",
        greatest(0, Given("earn.vacancy") * year_sum(base) + year_sum(empty)),
    )
    yield Declared(
        "vacancy_allowance",
        "Vacancy allowance",
        "money",
        "month",
        "the year's allowance, spread over its months like the base"
        if shape.count_once
        else "allowance on the base less empty time",
        _stated_or(shape, "vacancy_allowance", _allowance(shape)),
        sign=-1,
    )
    yield Declared(
        "credit_loss",
        "Credit loss",
        "money",
        "month",
        "on the month's base less empty time and concessions",
        _stated_or(
            shape,
            "credit_loss",
            -of_year(Given("earn.credit_loss")) * (base + empty + Line("concessions")),
        ),
        sign=-1,
    )


def _allowance(shape: Shape) -> Formula:
    base, empty = Line("base"), Line("empty_time")
    if not shape.count_once:
        return -of_year(Given("earn.vacancy")) * (base + empty)
    year = year_sum(base)
    rate = where(year <= 0, 0, Line("allowance_of_year") / year)
    return -of_year(rate) * base


def _effective_income(shape: Shape) -> Iterator[Declared]:
    net = Line("base") + Line("empty_time")
    yield Declared(
        "share_of_losses_in_hand",
        "Share of allowance and credit loss that falls on rent in hand",
        "fraction",
        "month",
        "the in-hand part of the base net of empty time; all on expected where that is nil",
        where(net <= 0, 0, (Line("rent_in_hand") + Line("marked_income_in_hand")) / net),
    )
    losses = Line("vacancy_allowance") + Line("credit_loss")
    yield Declared(
        "effective_gross_income",
        "Effective gross income",
        "money",
        "month",
        "rent and other income less empty time, concessions, allowance and credit loss",
        Line("rent_in_hand")
        + Line("rent_expected")
        + Line("empty_time")
        + Line("concessions")
        + Line("other_income")
        + losses,
    )
    free = NOTHING if {"rent", "concessions"} & shape.stated else Line("concessions")
    yield Declared(
        "effective_income_in_hand",
        "Effective gross income in hand",
        "money",
        "month",
        "the part of effective gross income under leases entered with dates",
        Line("rent_in_hand")
        + free
        + Line("other_income_in_hand")
        + Line("share_of_losses_in_hand") * losses,
    )
