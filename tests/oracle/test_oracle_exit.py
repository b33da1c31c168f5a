"""The oracle's exits, and small deals as a whole, by hand.

No outside source: each expectation is the arithmetic written beside it.
"""

import pytest

from tests.oracle.by_hand import lease, near, one_space
from tests.oracle.oracle import figures


@pytest.mark.parametrize("hold", [1, 7, 40])
def test_perpetuity_in_advance_has_a_closed_form(hold: int) -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_start"})
    deal["earn"]["depreciation"] = {"1": 0.02}
    deal["returns"]["required"] = {"1": 0.05}
    deal["leave"] = {"hold": hold, "method": "perpetuity"}
    made = figures(deal)
    # P = Σ R ((1−δ)/(1+r))^k = 120 / (1 − 0.98/1.05), whatever the hold.
    q = 0.98 / 1.05
    assert made["value"] == near(120 / (1 - q))
    assert made["exit_value_share"] == made["reference_share"] == near(q**hold)
    assert made["exit"]["price"] == near(120 * 0.98**hold / (1 - q))


def test_closed_form_with_an_as_new_price() -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_start"})
    deal["earn"]["depreciation"] = {"1": 0.02}
    deal["returns"]["required"] = {"1": 0.05}
    deal["leave"] = {"hold": 3, "method": "purchase_price"}
    q = 0.98 / 1.05
    # Σ_{k<3} 120 q^k + 1000 q³: the price of today wears as the rent does.
    assert figures(deal)["value"] == near(120 * (1 + q + q * q) + 1000 * q**3)


@pytest.mark.parametrize(("growth", "refused"), [(0.1, True), (0.099, False)])
def test_a_perpetuity_is_refused_where_growth_reaches_the_return(
    growth: float, refused: bool
) -> None:
    deal = one_space([], 10.0)
    deal["earn"]["growth"] = {"1": 0.0, "41": growth}
    deal["leave"]["method"] = "perpetuity"
    made = figures(deal)
    assert (made["exit"]["price"] is None) == refused
    assert (made["reference_share"] is None) == refused
    assert made["statement"]["noi"] == [near(120)]


def test_a_perpetuity_moves_year_41_on() -> None:
    deal = one_space([], 100.0, conventions={"timing": "year_end"})
    deal["earn"]["growth"] = {"1": 0.0, "41": 0.05}
    deal["expenses"] = [{"id": "x2", "amount": 240.0}]
    deal["leave"] = {"hold": 40, "method": "perpetuity"}
    # Year 41: 1200 − 240 = 960. Year 42 and on: 960 × 1.05 at the rent's growth, worth
    # 960 × 1.05 / (0.10 − 0.05) at the end of year 41.
    assert figures(deal)["exit"]["price"] == near((960 + 960 * 1.05 / 0.05) / 1.1)


def test_negative_income_has_no_price_but_a_statement() -> None:
    deal = one_space([], 10.0, expenses=[{"id": "x2", "amount": 130.0}])
    made = figures(deal)
    assert (made["value"], made["margin"], made["exit"]["price"]) == (None, None, None)
    assert made["statement"]["noi"] == [near(-10)]
    deal["leave"] |= {"method": "amount", "amount": 0.0}
    assert figures(deal)["exit"]["price"] == 0


def test_stabilised_income_and_off_market_rent() -> None:
    deal = one_space([lease("2023-01-01", "2025-02-28", 100.0)], 80.0)
    deal["conventions"] = {"timing": "year_end"}
    deal["earn"]["credit_loss"] = {"1": 0.01}
    deal["other_income"] = [{"id": "i3", "amount": 60.0, "in_allowance": True}]
    deal["expenses"] = [{"id": "x4", "amount": 0.1, "basis": "egi"}, {"id": "x5", "amount": 100.0}]
    deal["leave"] |= {"exit_income": "stabilised", "stabilised_vacancy": 0.05}
    # Year 2: market 960, vacancy 5 % of 960 + 60 = 51, other 60, credit loss as modelled 1 % of
    # 2 × 100 + 10 × 80 + 60 = 10.6: EGI 958.4; less 10 % of that and 100: 762.56.
    # The lease pays 2 × (100 − 80) above market in year 2, worth 40 / 1.1 at the exit.
    made = figures(deal)["exit"]
    assert made["income"] == near(762.56)
    assert made["price"] == near(762.56 / 0.1 + 40 / 1.1)
    assert made["yield"] == 0.1
    # Year 1, for trailing income: the credit loss is 1 % of 1200 + 60.
    deal["leave"]["method"] = "trailing_noi"
    assert figures(deal)["exit"]["income"] == near((960 - 51 + 60 - 12.6) * 0.9 - 100)


def test_a_whole_deal_by_hand() -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_end"})
    deal["earn"]["vacancy"] = {"1": 0.25}
    deal["purchase"] |= {
        "costs": [{"id": "c2", "amount": 0.02, "basis": "price"}],
        "initial_works": 30.0,
        "escrows": 5.0,
        "working_capital": 7.0,
        "deposits": 4.0,
    }
    deal["leave"] |= {"exit_yield": 0.09, "selling_cost": 0.01}
    deal["returns"] |= {"extra_on_exit": 0.15, "equity": {"1": 0.2}}
    deal["loans"] = [{"id": "l3", "amount": 600.0, "rate": {"1": 0.06}, "fee": 0.01}]
    deal["spend"] = {"reserves": 6.0, "reserves_place": "above"}
    made = figures(deal)
    # 120 − 30 of allowance − 6 = NOI 84; exit 84 / 0.09, less 1 %, over 1.25.
    net = 84 / 0.09 * 0.99
    assert made["value"] == near(84 / 1.1 + net / 1.25)
    assert made["margin"] == made["npv"]["unlevered"] == near(84 / 1.1 + net / 1.25 - 1050)
    assert made["irr"]["unlevered"] == near((84 + net) / 1050 - 1)
    # Uses 1000 + 20 + 6 + 30 + 5 + 7 = 1068; equity 1068 − 600 − 4 = 464.
    assert made["sources_uses"]["uses"]["total"] == near(1068)
    assert made["sources_uses"]["sources"]["equity"] == near(464)
    # Interest of 3 each month; at the end 84 + net − 600 − 3 + 5 + 7 − 4.
    paid = sum(3 * 1.2 ** (-k / 12) for k in range(1, 12))
    assert made["npv"]["levered"] == near(-464 - paid + (84 + net - 595) / 1.2)
    # The interest of month 12 is netted with the receipts of that day.
    assert made["equity_multiple"]["levered"] == near((84 + net - 595) / (464 + 33))
    assert made["cash_on_cash"] == [near(48 / 464)]
    assert made["dscr"] == {"noi": [near(84 / 36)], "ncf": [near(84 / 36)]}
    assert made["debt_yield"] == [near(0.14)]
    assert made["break_even_occupancy"]["with_reserves"] == near((36 + 6) / 120)
    assert made["break_even_occupancy"]["without_reserves"] == near(36 / 120)
