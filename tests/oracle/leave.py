"""The exit: price by one method or a blend, or None where it is refused."""

from typing import Any

from tests.oracle.costs import Flows, flows_of
from tests.oracle.income import Income, quantity
from tests.oracle.months import (
    LAST_YEAR,
    MONTHS,
    discount_table,
    flow_date,
    growth_index,
    row_value,
    sum_years,
)
from tests.oracle.rent import Roll, net_growth


def timing_of(raw: dict[str, Any]) -> str:
    """The deal's timing of property flows."""
    return str(raw.get("conventions", {}).get("timing", "month_end"))


def value_at(raw: dict[str, Any], monthly: list[float], hold: int) -> float:
    """Value at the end of the hold of the months after it, to the end of year 41."""
    table, timing = discount_table(raw["returns"]["required"]), timing_of(raw)
    total = 0.0
    for month in range(12 * hold, MONTHS):
        total += monthly[month] * table[flow_date(timing, month)]
    return total / table[12 * hold]


def perpetuity(raw: dict[str, Any], roll: Roll, income: Income, hold: int) -> float | None:
    """Years to 41 month by month, then year 41 moved on at the last net growth, for ever."""
    net = flows_of(raw, income, account_allowed=False).net
    # From year 41 to 42, for ever after; rents of nought do not grow.
    up = net_growth(raw, LAST_YEAR) if sum(roll.market[MONTHS - 12 :]) > 0 else 1.0
    rate = row_value(raw["returns"]["required"], LAST_YEAR + 1)
    year_42 = [net[month] * up for month in range(MONTHS - 12, MONTHS)]
    if 1 + rate <= up or sum(year_42) <= 0:
        return None
    first = 0.0
    for i in range(12):
        first += year_42[i] * (1 + rate) ** (-flow_date(timing_of(raw), i) / 12)
    # Each later year is worth up/(1+rate) of the one before it.
    after_41 = first / (1 - up / (1 + rate))
    table = discount_table(raw["returns"]["required"])
    return value_at(raw, net, hold) + after_41 * table[MONTHS] / table[12 * hold]


def stabilised_income(
    raw: dict[str, Any], roll: Roll, income: Income, flows: Flows, year: int
) -> float:
    """Every space at market rent, less the stabilised vacancy; the rest as modelled."""
    months = range(12 * year - 12, 12 * year)
    rent = sum(roll.market[m] for m in months)
    marked = sum(income.marked[m] for m in months)
    vacancy: float = raw["leave"]["stabilised_vacancy"]
    egi = rent - vacancy * (rent + marked)
    egi += sum(income.other[m] - income.credit_loss[m] for m in months)
    modelled = sum(income.egi[m] for m in months)
    result = egi - sum(flows.expenses[m] for m in months)
    for line in raw.get("expenses", []):
        if line.get("basis", "year") == "egi" and not line.get("stated"):
            result -= line["amount"] * (egi - modelled)
    spend = raw.get("spend", {})
    if spend.get("reserves_place", "below") == "above":
        result -= sum(flows.reserves[m] for m in months)
        if spend.get("reserves_basis", "year") == "egi":
            result -= spend.get("reserves", 0.0) * (egi - modelled)
    return result


def capitalised_income(
    raw: dict[str, Any], roll: Roll, income: Income, flows: Flows, method: str
) -> float:
    """Income of the year after the sale, or of the last year held, as set."""
    hold: int = raw["leave"]["hold"]
    year = hold + 1 if method == "forward_noi" else hold
    if raw["leave"].get("exit_income", "modelled") == "stabilised":
        return stabilised_income(raw, roll, income, flows, year)
    return sum_years(flows.noi, LAST_YEAR)[year - 1]


def capitalised(
    raw: dict[str, Any], roll: Roll, income: Income, flows: Flows, method: str
) -> float | None:
    """Income over yield; stabilised, plus what leases pay above or below market."""
    amount = capitalised_income(raw, roll, income, flows, method)
    if amount < 0:
        return None
    price = float(amount / raw["leave"]["exit_yield"])
    if raw["leave"].get("exit_income", "modelled") == "stabilised":
        off_market = [
            roll.in_hand[m] - roll.concessions[m] - roll.market_of_let[m] for m in range(MONTHS)
        ]
        price += value_at(raw, off_market, raw["leave"]["hold"])
    return price


def grown_price(raw: dict[str, Any], today: float) -> float:
    """A price of today after the price growth, and the wear, of the years held."""
    leave, earn = raw["leave"], raw.get("earn", {})
    series = leave.get("price_series") or earn.get("series", "as_new")
    wear = earn.get("depreciation") if series == "as_new" else None
    hold: int = leave["hold"]
    return today * growth_index(leave.get("price_growth"), wear)[hold + 1]


def price_by(
    raw: dict[str, Any], roll: Roll, income: Income, flows: Flows, method: str
) -> float | None:
    """Price at the end of the hold by one method."""
    leave = raw["leave"]
    hold = leave["hold"]
    if method in ("forward_noi", "trailing_noi"):
        return capitalised(raw, roll, income, flows, method)
    if method == "perpetuity":
        return perpetuity(raw, roll, income, hold)
    if method == "price_per":
        times = quantity(raw, leave.get("price_per_of", "unit"))
        return grown_price(raw, leave["price_per"] * times)
    if method == "purchase_price":
        return grown_price(raw, raw["purchase"]["price"])
    if method == "rent_multiple":
        months = range(12 * hold, 12 * hold + 12)
        gross = sum(income.in_hand[m] + income.expected[m] for m in months)
        return float(leave["rent_multiple"] * gross)
    return float(leave["amount"])


def methods_of(raw: dict[str, Any]) -> list[tuple[str, float]]:
    """Methods with their weights; a blend stands in place of the single method."""
    blend = raw["leave"].get("blend", [])
    if blend:
        return [(part.get("method", "forward_noi"), part["weight"]) for part in blend]
    return [(raw["leave"].get("method", "forward_noi"), 1.0)]


def exit_price(raw: dict[str, Any], roll: Roll, income: Income, flows: Flows) -> float | None:
    """The weighted price; any refused part refuses the whole."""
    total = 0.0
    for method, weight in methods_of(raw):
        price = price_by(raw, roll, income, flows, method)
        if price is None:
            return None
        total += weight * price
    return total
