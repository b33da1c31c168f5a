"""The oracle's costs, account, blends and loans within a deal, by hand.

No outside source: each expectation is the arithmetic written beside it.
"""

from tests.oracle.by_hand import near, near_list, one_space
from tests.oracle.oracle import figures


def test_the_account_returns_at_the_exit_and_a_perpetuity_has_none() -> None:
    deal = one_space([], 100.0, works=[{"id": "w2", "amount": 500.0, "year": 1, "month": 6}])
    spend = {"reserves": 360.0, "reserves_use": "account", "reserves_opening": 20.0}
    deal["spend"] = spend
    made = figures(deal)
    # By month 6 the account holds 20 + 6 × 30 = 200: 300 of the works are left; 6 × 30 return.
    assert made["statement"]["works"] == [near(-300)]
    assert made["statement"]["reserves"] == [near(-360)]
    assert made["exit"]["net"] == near(1200 / 0.1 + 180)
    deal["leave"]["method"] = "perpetuity"
    made = figures(deal)
    assert (made["statement"]["works"], made["statement"]["reserves"]) == ([-500], [0])
    assert made["statement"]["net_cash_flow"] == [near(700)]


def test_expenses_on_every_basis() -> None:
    deal = one_space([], 100.0)
    deal["spaces"][0] |= {"count": 2, "area": 5.0}
    deal["leave"]["hold"] = 2
    deal["spend"] = {"growth": {"1": 0.1}}
    deal["expenses"] = [
        {"id": "x2", "amount": 7.0},
        {"id": "x3", "amount": 3.0, "basis": "area", "growth": {"1": 0.5}},
        {"id": "x4", "amount": 11.0, "basis": "unit"},
        {"id": "x5", "amount": 0.01, "basis": "egi"},
        {"id": "x6", "amount": 99.0, "stated": {"1": 13.0, "2": 17.0}},
    ]
    # EGI 2400 in both years. Year 1: 7 + 3 × 10 + 11 × 2 + 24 + 13; year 2:
    # 7 × 1.1 + 30 × 1.5 + 22 × 1.1 + 24 + 17.
    assert figures(deal)["statement"]["operating_expenses"] == near_list([-96, -117.9])


def test_works_by_date_and_in_todays_money() -> None:
    deal = one_space([], 100.0)
    deal["leave"]["hold"] = 3
    deal["purchase"]["closing_date"] = "2024-01-31"
    deal["spend"] = {"works_growth": {"1": 0.1}}
    deal["works"] = [
        {"id": "w2", "amount": 10.0, "date": "2025-01-30"},
        {"id": "w3", "amount": 20.0, "date": "2025-01-31", "todays_money": True},
        {"id": "w4", "amount": 40.0, "year": 3, "month": 12, "todays_money": True},
    ]
    # The last day of year 1 is 30 January 2025; 10 % a year to years 2 and 3.
    assert figures(deal)["statement"]["works"] == near_list([-10, -22, -48.4])


def test_a_blend_weighs_prices_and_any_refusal_refuses_it() -> None:
    deal = one_space([], 10.0, earn={"vacancy": {"1": 0.5}, "depreciation": {"1": 0.2}})
    deal["spaces"][0] |= {"count": 3, "area": 2.0}
    deal["leave"] |= {
        "hold": 2,
        "blend": [
            {"id": "b2", "method": "price_per", "weight": 0.2},
            {"id": "b3", "method": "rent_multiple", "weight": 0.3},
            {"id": "b4", "method": "amount", "weight": 0.5},
        ],
        "price_per": 50.0,
        "price_per_of": "area",
        "price_growth": {"1": 0.5},
        "rent_multiple": 10.0,
        "amount": 80.0,
    }
    # 50 × 6 × (1.5 × 0.8)² = 432; gross rent of year 3: 360 × 0.8² = 230.4, ten times.
    made = figures(deal)["exit"]
    assert made["price"] == near(0.2 * 432 + 0.3 * 2304 + 0.5 * 80)
    # Income is the NOI of year 3: half of 230.4.
    assert (made["income"], made["yield"]) == (near(115.2), near(115.2 / 817.6))
    deal["leave"]["price_series"] = "same_buildings"
    assert figures(deal)["exit"]["price"] == near(0.2 * 675 + 0.3 * 2304 + 0.5 * 80)
    deal["leave"]["blend"][0]["method"] = "perpetuity"
    deal["returns"]["required"]["1"] = -0.3
    assert figures(deal)["exit"]["price"] is None


def test_the_reference_has_no_selling_cost_no_extra_return_and_no_account() -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_end"})
    deal["spend"] = {"reserves": 12.0, "reserves_use": "account"}
    deal["leave"] |= {"selling_cost": 0.5, "hold": 2}
    deal["returns"]["extra_on_exit"] = 0.5
    # 120 a year for ever at 10 %: the exit holds 1/1.1² of the value.
    assert figures(deal)["reference_share"] == near(1 / 1.21)


def test_in_a_blend_the_account_stays_and_the_perpetuity_is_priced_without() -> None:
    deal = one_space([], 10.0, conventions={"timing": "year_end"})
    deal["spend"] = {"reserves": 12.0, "reserves_use": "account"}
    deal["leave"]["blend"] = [
        {"id": "b2", "method": "perpetuity", "weight": 0.5},
        {"id": "b3", "method": "amount", "weight": 0.5},
    ]
    deal["leave"]["amount"] = 1000.0
    made = figures(deal)
    # 0.5 × 120 / 0.1 + 0.5 × 1000, and the balance of 12 comes back.
    assert (made["exit"]["price"], made["exit"]["net"]) == (near(1100), near(1112))
    assert made["statement"]["net_cash_flow"] == [near(108)]


def test_a_loan_repaid_in_the_hold() -> None:
    deal = one_space([], 10.0)
    deal["leave"]["hold"] = 2
    deal["purchase"]["deposits"] = 500.0
    deal["loans"] = [{"id": "l2", "amount": 600.0, "rate": {"1": 0.12}, "term_months": 12}]
    made = figures(deal)
    # 6 a month in year 1, then 600 outside debt service; nothing in year 2.
    assert made["statement"]["debt_service"] == near_list([-72, 0])
    assert made["statement"]["loan_repayment"] == near_list([-600, 0])
    assert made["statement"]["cash_flow_after_debt"] == near_list([-552, 120])
    assert made["loans"][0]["balance"] == [0, 0]
    assert made["dscr"]["noi"] == [near(120 / 72), None]
    assert made["debt_yield"] == [near(0.2), None]
    # Equity 1000 − 600 − 500 is below nought; levered: 100 at 0, 10 a month less 6 in year 1
    # and 600 at its end, 1200 less the deposits at the end of year 2.
    assert made["cash_on_cash"] == [None, None]
    assert made["equity_multiple"]["levered"] == near((100 + 44 + 120 + 700) / 596)
    deal.pop("loans")
    made = figures(deal)
    assert (made["irr"]["levered"], made["dscr"]["ncf"]) == (None, [None, None])


def test_debt_yield_on_the_opening_balance() -> None:
    deal = one_space([], 10.0)
    deal["leave"]["hold"] = 3
    rate, months = {"1": 0.0}, 48
    loan = {"id": "l2", "amount": 960.0, "rate": rate, "amortisation_months": months}
    deal["loans"] = [loan, {"id": "l3", "amount": 40.0, "rate": {"1": 0.03}}]
    made = figures(deal)
    # 20 a month off 960: 720, 480, 240 at the years' ends; 40 stays.
    assert made["loans"][0]["balance"] == near_list([720, 480, 240])
    assert made["loans"][1]["interest"] == near_list([1.2, 1.2, 1.2])
    assert made["debt_yield"] == near_list([120 / 1000, 120 / 760, 120 / 520])
    assert made["dscr"]["ncf"] == near_list([120 / 241.2] * 3)
