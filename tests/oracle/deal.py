"""A deal worked out by month: what the parts of the result are read from."""

from dataclasses import dataclass
from typing import Any

from tests.oracle.costs import Flows, flows_of
from tests.oracle.income import Income, income_of
from tests.oracle.leave import capitalised_income, exit_price, methods_of
from tests.oracle.loans import Schedule, schedule
from tests.oracle.measures import ratio
from tests.oracle.months import Row, exit_discount, sum_years
from tests.oracle.rent import Roll, rent_roll


@dataclass(frozen=True)
class Deal:
    """What the parts of the result are read from."""

    raw: dict[str, Any]
    hold: int
    required: Row
    roll: Roll
    income: Income
    flows: Flows
    loans: list[Schedule]

    def money(self, key: str) -> float:
        """An amount of the purchase."""
        return float(self.raw["purchase"].get(key, 0.0))


@dataclass(frozen=True)
class Exit:
    """Price, net exit and present value; all None where the exit is refused."""

    price: float | None = None
    net: float | None = None
    present_value: float | None = None
    income: float | None = None
    income_yield: float | None = None


def read(raw: dict[str, Any]) -> Deal:
    """Work out everything by month."""
    hold = raw["leave"]["hold"]
    roll = rent_roll(raw)
    income = income_of(raw, roll)
    only_perpetuity = all(method == "perpetuity" for method, _ in methods_of(raw))
    return Deal(
        raw=raw,
        hold=hold,
        required=raw["returns"]["required"],
        roll=roll,
        income=income,
        flows=flows_of(raw, income, account_allowed=not only_perpetuity),
        loans=[schedule(loan, hold) for loan in raw.get("loans", [])],
    )


def leave(deal: Deal) -> Exit:
    """Sell at the end of the hold."""
    raw, terms = deal.raw, deal.raw["leave"]
    price = exit_price(raw, deal.roll, deal.income, deal.flows)
    if price is None:
        return Exit()
    net = price * (1 - terms.get("selling_cost", 0.0)) + deal.flows.balance[12 * deal.hold - 1]
    extra = raw["returns"].get("extra_on_exit", 0.0)
    method = terms.get("method", "forward_noi")
    if not terms.get("blend") and method in ("forward_noi", "trailing_noi"):
        income = capitalised_income(raw, deal.roll, deal.income, deal.flows, method)
        income_yield = terms["exit_yield"]
    else:
        income = sum_years(deal.flows.noi, deal.hold + 1)[deal.hold]
        income_yield = ratio(income, price)
    present_value = net * exit_discount(deal.required, extra, deal.hold)
    return Exit(price, net, present_value, income, income_yield)
