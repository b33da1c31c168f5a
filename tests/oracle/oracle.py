"""All figures of a deal, reckoned slowly and plainly: the model's words, month by month."""

from typing import Any

from tests.oracle.costs import flows_of
from tests.oracle.deal import Deal, Exit, leave, read
from tests.oracle.leave import perpetuity, timing_of
from tests.oracle.measures import irr, mirr, multiple, npv, ratio
from tests.oracle.months import MONTHS, discount_table, flow_date, row_value, sum_years
from tests.oracle.statement import break_even, lender_view, sources_uses, statement


def present_values(deal: Deal, monthly: list[float]) -> list[float]:
    """Present value of each year's flows at the deal's timing."""
    table, timing = discount_table(deal.required), timing_of(deal.raw)
    valued = [monthly[m] * table[flow_date(timing, m)] for m in range(MONTHS)]
    return sum_years(valued, deal.hold)


def reference_share(deal: Deal) -> float | None:
    """Exit share of the deal with a perpetuity exit, no selling cost and no extra return."""
    price = perpetuity(deal.raw, deal.roll, deal.income, deal.hold)
    if price is None:
        return None
    net = flows_of(deal.raw, deal.income, account_allowed=False).net
    at_exit = price * discount_table(deal.required)[12 * deal.hold]
    value = sum(present_values(deal, net)) + at_exit
    return at_exit / value if value > 0 else None


def unlevered_flows(deal: Deal, outlay: float, net_exit: float) -> list[float]:
    """Outlay at closing, net cash flow at its timing, the exit at the end."""
    flows = [0.0] * (12 * deal.hold + 1)
    flows[0] -= outlay
    for m in range(12 * deal.hold):
        flows[flow_date(timing_of(deal.raw), m)] += deal.flows.net[m]
    flows[12 * deal.hold] += net_exit
    return flows


def levered_flows(deal: Deal, equity: float, net_exit: float) -> list[float]:
    """Equity at closing, flows after debt, and what is left of the exit at the end."""
    flows = unlevered_flows(deal, equity, net_exit)
    for loan in deal.loans:
        for k in range(12 * deal.hold):
            flows[k + 1] -= loan.service[k] + loan.repayment[k]
        flows[12 * deal.hold] -= loan.balance[-1]
    flows[12 * deal.hold] += (
        deal.money("escrows") + deal.money("working_capital") - deal.money("deposits")
    )
    return flows


def measures(deal: Deal, table: dict[str, Any], sold: Exit) -> dict[str, Any]:
    """Measures of the unlevered and the levered flows."""
    returns, uses = deal.raw["returns"], table["uses"]
    names = ("irr", "mirr", "equity_multiple", "npv")
    result: dict[str, Any] = {name: {"unlevered": None, "levered": None} for name in names}
    if sold.net is None or sold.present_value is None:
        return result
    outlay = uses["price"] + uses["purchase_costs"] + uses["initial_works"]
    both = {"unlevered": unlevered_flows(deal, outlay, sold.net)}
    if deal.loans:
        both["levered"] = levered_flows(deal, table["sources"]["equity"], sold.net)
    rates = []
    for key in ("finance", "reinvest"):
        typed = returns.get(key)
        rates.append(row_value(deal.required, 1) if typed is None else typed)
    for view, flows in both.items():
        result["irr"][view] = irr(flows)
        result["mirr"][view] = mirr(flows, deal.hold, *rates)
        result["equity_multiple"][view] = multiple(flows)
    value = sum(present_values(deal, deal.flows.net)) + sold.present_value
    result["npv"]["unlevered"] = value - outlay
    if deal.loans:
        on_equity = discount_table(returns.get("equity") or deal.required)
        result["npv"]["levered"] = npv(both["levered"], on_equity)
    return result


def value_stack(deal: Deal, table: dict[str, Any], sold: Exit) -> dict[str, Any]:
    """Value in three tiers, and its shares."""
    all_flows = present_values(deal, deal.flows.net)
    held = present_values(deal, deal.flows.net_in_hand)
    expected = [a - h for a, h in zip(all_flows, held, strict=True)]
    price, value, share, margin = deal.money("price"), None, None, None
    if sold.present_value is not None:
        value = sum(all_flows) + sold.present_value
        share = sold.present_value / value if value > 0 else None
        uses = table["uses"]
        margin = value - price - uses["purchase_costs"] - uses["initial_works"]
    return {
        "price": price,
        "value": value,
        "margin": margin,
        "hold_years": deal.hold,
        "exit_value_share": share,
        "reference_share": reference_share(deal),
        "ground_share": ratio(sum(held), price),
        "tiers": {"in_hand": sum(held), "expected": sum(expected), "exit": sold.present_value},
        "stack": [
            {"year": t + 1, "in_hand": held[t], "expected": expected[t]} for t in range(deal.hold)
        ],
    }


def figures(raw: dict[str, Any]) -> dict[str, Any]:
    """All figures of a valid deal file of schema 1."""
    deal = read(raw)
    sold = leave(deal)
    table = sources_uses(deal)
    lines = statement(deal)
    return {
        **value_stack(deal, table, sold),
        "exit": {
            "price": sold.price,
            "net": sold.net,
            "present_value": sold.present_value,
            "yield": sold.income_yield,
            "income": sold.income,
        },
        "statement": lines,
        **measures(deal, table, sold),
        **lender_view(deal, lines, table["sources"]["equity"]),
        "break_even_occupancy": break_even(lines),
        "sources_uses": table,
    }
