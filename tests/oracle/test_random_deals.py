"""The random deals: valid, of every kind, and adding up under the oracle."""

import json
from collections import Counter
from pathlib import Path
from random import Random
from typing import Any

import jsonschema
import pytest

from tests.oracle.deals import random_deal, tally
from tests.oracle.oracle import figures

SCHEMA = Path(__file__).parents[2] / "resources" / "deal.schema.json"

# Every option that random deals are to use; kept by hand, so that a lost one is noticed.
GROUPS = {
    "timing": "month_end month_start year_end mid_year year_start",
    "closing": "none late_in_month",
    "hold": "1 40 other",
    "price": "zero",
    "series": "as_new same_buildings",
    "growth": "row",
    "depreciation": "row",
    "vacancy": "row",
    "credit_loss": "row",
    "allowance": "once off",
    "rent": "per_month per_year",
    "space": "area_rent unit_rent many_units no_area market_zero",
    "lease": (
        "none undated running to_come expired several gap back_to_back not_in_order "
        "empty_at_closing mid_month_start mid_month_end beyond_41_years break break_past "
        "break_penalty free_months step_amount step_change step_in_rent step_past_end"
    ),
    "other": "year unit area growth stated marked tied marked_and_tied",
    "stated": "rent empty_time concessions vacancy_allowance credit_loss",
    "expense": "year unit area egi growth stated above_rent",
    "spend": "growth works_growth reserves_growth",
    "reserves": "spent_below spent_above account_below account_above year unit area egi opening",
    "works": "dated by_year todays_money own_money",
    "purchase_cost": "amount price",
    "purchase": "initial_works escrows working_capital deposits",
    "exit": (
        "forward_noi trailing_noi perpetuity price_per rent_multiple purchase_price "
        "amount amount_zero stabilised price_per_unit price_per_area "
        "perpetuity_with_account blend blend_forward_noi blend_trailing_noi "
        "blend_perpetuity blend_price_per blend_rent_multiple blend_purchase_price "
        "blend_amount blend_perpetuity_with_account"
    ),
    "price_series": "as_new same_buildings as_rent",
    "": "price_growth selling_cost extra_return",
    "returns": "row low equity finance reinvest",
    "loans": "0 1",
    "loan": (
        "second level interest_only interest_only_throughout rate_steps zero_rate "
        "term_absent matures_in_hold repaid_in_hold matures_at_sale fee fee_amount"
    ),
}
OPTIONS = {
    f"{group}:{option}".strip(":")
    for group, options in GROUPS.items()
    for option in options.split()
}


COUNTED = (20240131, 400)
"""Seed and number of the deals that are counted here and held against the program elsewhere."""


def drawn(seed: int, number: int) -> list[dict[str, Any]]:
    random = Random(seed)
    return [random_deal(random) for _ in range(number)]


def test_random_deals_use_every_option() -> None:
    seen = Counter(name for deal in drawn(*COUNTED) for name in tally(deal))
    assert {name: seen[name] for name in OPTIONS if seen[name] < 20} == {}
    assert set(seen) - OPTIONS <= {
        "closing:dated",
        "credit_loss:given",
        "depreciation:given",
        "growth:given",
        "loans:2",
        "purchase:closing_date",
    }


def test_random_deals_fit_the_schema_and_plain_json() -> None:
    validator = jsonschema.Draft202012Validator(json.loads(SCHEMA.read_text("utf-8")))
    for deal in drawn(3, 60):
        assert json.loads(json.dumps(deal, allow_nan=False)) == deal
        assert list(validator.iter_errors(deal)) == []


def test_a_seed_draws_the_same_deals_again() -> None:
    assert drawn(5, 10) == drawn(5, 10)
    assert drawn(5, 10) != drawn(6, 10)


@pytest.mark.parametrize("seed", range(20))
def test_figures_add_up(seed: int) -> None:
    made = figures(drawn(seed, 1)[0])
    lines = made["statement"]
    gross = ["rent_in_hand", "rent_expected", "empty_time", "concessions", "recoveries"]
    gross += ["other_income", "vacancy_allowance", "credit_loss"]
    net = ["effective_gross_income", "operating_expenses", "reserves", "leasing_costs", "works"]
    for t in range(made["hold_years"]):
        egi = sum(lines[key][t] for key in gross)
        assert lines["effective_gross_income"][t] == pytest.approx(egi, rel=1e-9, abs=1e-6)
        ncf = sum(lines[key][t] for key in net)
        assert lines["net_cash_flow"][t] == pytest.approx(ncf, rel=1e-9, abs=1e-6)
    if made["value"] is not None:
        tiers = sum(made["tiers"].values())
        assert made["value"] == pytest.approx(tiers, rel=1e-9, abs=1e-6)
        assert made["npv"]["unlevered"] == pytest.approx(made["margin"], abs=1e-6)
    uses, sources = made["sources_uses"]["uses"], made["sources_uses"]["sources"]
    assert sources["total"] == uses["total"]
    paid_in = sources["loans"] + sources["deposits"] + sources["equity"]
    assert paid_in == pytest.approx(uses["total"], rel=1e-9, abs=1e-6)
