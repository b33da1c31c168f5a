"""Names of the options that a deal uses, so that a test can demand each of them."""

from datetime import date
from typing import Any

from tests.oracle.draw_rows import market_total
from tests.oracle.loans import maturity
from tests.oracle.tally_rent import rent_names


def varies(row: dict[str, float] | None) -> bool:
    """True where a year row changes."""
    return len(set((row or {}).values())) > 1


def income_names(raw: dict[str, Any]) -> set[str]:
    """Options of growth, allowance, other income and stated lines."""
    earn = raw.get("earn", {})
    names = {f"series:{earn.get('series', 'as_new')}"}
    names |= {f"stated:{key}" for key in raw.get("stated", {})}
    names |= {f"{key}:given" for key in ("growth", "depreciation", "credit_loss") if key in earn}
    for key in ("growth", "depreciation", "vacancy", "credit_loss"):
        if varies(earn.get(key)):
            names.add(f"{key}:row")
    once = earn.get("count_empty_time_once", True)
    names.add("allowance:once" if once else "allowance:off")
    for line in raw.get("other_income", []):
        names.add(f"other:{line.get('basis', 'year')}")
        names |= {f"other:{key}" for key in ("growth", "stated") if key in line}
        names |= {"other:marked"} if line.get("in_allowance") else set()
        names |= {"other:tied"} if line.get("lease") else set()
        if line.get("in_allowance") and line.get("lease"):
            names.add("other:marked_and_tied")
    return names


def cost_names(raw: dict[str, Any]) -> set[str]:
    """Options of purchase, expenses, reserves and works."""
    purchase, spend = raw["purchase"], raw.get("spend", {})
    names = {f"purchase:{key}" for key in purchase if key not in ("price", "costs")}
    names |= {f"purchase_cost:{c.get('basis', 'amount')}" for c in purchase.get("costs", [])}
    if purchase["price"] == 0:
        names.add("price:zero")
    for line in raw.get("expenses", []):
        names.add(f"expense:{line.get('basis', 'year')}")
        names |= {f"expense:{key}" for key in ("growth", "stated") if key in line}
        if line.get("basis", "year") == "year" and line["amount"] > market_total(raw["spaces"]):
            names.add("expense:above_rent")
    if spend.get("reserves"):
        place, use = spend.get("reserves_place", "below"), spend.get("reserves_use", "spent")
        names.add(f"reserves:{use}_{place}")
        names.add(f"reserves:{spend.get('reserves_basis', 'year')}")
        if use == "account" and spend.get("reserves_opening"):
            names.add("reserves:opening")
    keys = ("growth", "works_growth", "reserves_growth")
    names |= {f"spend:{key}" for key in keys if key in spend}
    for work in raw.get("works", []):
        names.add("works:dated" if work.get("date") else "works:by_year")
        names.add("works:todays_money" if work.get("todays_money") else "works:own_money")
    return names


def exit_names(raw: dict[str, Any]) -> set[str]:
    """Options of the exit and of the returns."""
    leave, returns = raw["leave"], raw["returns"]
    hold = leave["hold"]
    names = {f"hold:{hold}"} if hold in (1, 40) else {"hold:other"}
    blend = leave.get("blend", [])
    methods = {part.get("method", "forward_noi") for part in blend}
    names |= {"exit:blend"} | {f"exit:blend_{x}" for x in methods} if blend else set()
    if not blend:
        methods = {leave.get("method", "forward_noi")}
        names |= {f"exit:{x}" for x in methods}
    account = raw.get("spend", {}).get("reserves_use") == "account"
    if account and "perpetuity" in methods:
        names.add(f"exit:{'blend_' if blend else ''}perpetuity_with_account")
    if methods & {"forward_noi", "trailing_noi"} and leave.get("exit_income") == "stabilised":
        names.add("exit:stabilised")
    if "price_per" in methods:
        names.add(f"exit:price_per_{leave.get('price_per_of', 'unit')}")
    if methods & {"price_per", "purchase_price"}:
        names.add(f"price_series:{leave.get('price_series') or 'as_rent'}")
        names |= {"price_growth"} if leave.get("price_growth") else set()
    if methods == {"amount"} and leave["amount"] == 0:
        names.add("exit:amount_zero")
    names |= {"selling_cost"} if leave.get("selling_cost") else set()
    names |= {"extra_return"} if returns.get("extra_on_exit") else set()
    names |= {f"returns:{key}" for key in ("equity", "finance", "reinvest") if key in returns}
    names |= {"returns:row"} if varies(returns["required"]) else set()
    if max(returns["required"].values()) <= 0.03:
        names.add("returns:low")
    return names


def loan_names(raw: dict[str, Any]) -> set[str]:
    """Options of the loans."""
    end = 12 * raw["leave"]["hold"]
    loans = raw.get("loans", [])
    names = {f"loans:{len(loans)}"} | ({"loan:second"} if len(loans) > 1 else set())
    for loan in loans:
        level, first = loan.get("amortisation_months"), loan.get("interest_only_months", 0)
        names.add("loan:level" if level else "loan:interest_only_throughout")
        names |= {"loan:interest_only"} if level and first else set()
        names |= {"loan:rate_steps"} if varies(loan["rate"]) else set()
        names |= {"loan:zero_rate"} if not any(loan["rate"].values()) else set()
        names |= {f"loan:{key}" for key in ("fee", "fee_amount") if key in loan}
        names |= {"loan:term_absent"} if loan.get("term_months") is None else set()
        matures = maturity(loan, raw["leave"]["hold"])
        if matures < end:
            repaid = level is not None and first + level <= matures
            names.add("loan:repaid_in_hold" if repaid else "loan:matures_in_hold")
        elif loan.get("term_months") == end:
            names.add("loan:matures_at_sale")
    return names


def tally(raw: dict[str, Any]) -> set[str]:
    """The options that a deal uses, each as `part:option`."""
    names = rent_names(raw) | income_names(raw) | cost_names(raw)
    names |= exit_names(raw) | loan_names(raw)
    names.add(f"timing:{raw.get('conventions', {}).get('timing', 'month_end')}")
    closing = raw["purchase"].get("closing_date")
    names.add("closing:none" if closing is None else "closing:dated")
    if closing is not None and date.fromisoformat(closing).day > 28:
        names.add("closing:late_in_month")
    return names
