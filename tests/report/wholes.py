"""Deals whose whole memo is tested: the samples, a very long one, one in Greek, and odd ones."""

from collections.abc import Mapping
from functools import cache
from random import Random
from typing import Any

from tests.bench.deals import raw_deal
from tests.fullest import fullest, fullest_raw, rent, small_raw
from workbench.deal.deal import Deal
from workbench.engine.plan import compile_deal
from workbench.engine.result import Result, evaluate
from workbench.files.deal_file import deal_from_raw, read_deal
from workbench.places import sample_deals
from workbench.report.document import Document, Paper
from workbench.report.memo import build
from workbench.text.locale import DEFAULT, find_locale

_TRADES = ("Lamp maker", "Bookbinder & daughters", "Rope and sail loft", "Dentist", "Bakery")
_USES = ("shop", "office", "workshop", "flat")


def long_raw() -> dict[str, Any]:
    """300 spaces held for 40 years; every lease different, some spaces empty or without dates."""
    raw = raw_deal(300, seed=7)
    random = Random(7)
    raw["leave"]["hold"] = 40
    raw["property"] = {"name": "Three hundred doors", "kind": "Market hall", "place": "Tolmouth"}
    raw["conventions"] = {"currency": "USD", "locale": "en-US", "area_unit": "sqft"}
    for number, space in enumerate(raw["spaces"], start=1):
        space["name"] = f"Door {number}, {random.choice(('ground', 'first', 'second'))} floor"
        space["use"] = _USES[number % 4]
        if number % 17 == 0:
            space["leases"] = []
            continue
        (lease,) = space["leases"]
        lease["tenant"] = f"{random.choice(_TRADES)} no. {number}"
        if number % 13 == 0:
            lease.pop("steps")
            lease.pop("start")
            lease.pop("end")
        elif number % 5 == 0:
            lease["free_months"] = number % 7 + 1
    for number, expense in enumerate(raw["expenses"], start=1):
        expense["name"] = f"Cost number {number}"
    for name, loan in zip(("Senior loan", "Junior loan"), raw["loans"], strict=True):
        loan["name"] = name
    return raw


def greek_raw() -> dict[str, Any]:
    """Greek texts, Greek marks, and a currency that has no decimals."""
    raw = fullest_raw()
    raw["conventions"] = {
        "currency": "KRW", "locale": "el-GR", "area_unit": "m2", "timing": "month_start",
    }  # fmt: skip
    raw["property"] = {
        "name": "Πολυκατοικία Αγίου Μάρκου 14",
        "kind": "Κατάστημα και έξι διαμερίσματα",
        "place": "Άνω Λιμάνι",
        "year_built": 1968,
        "description": "Τρεις όροφοι από τούβλο, με αυλή και κήπο.",
        "notes": "Επινοημένο παράδειγμα.\nΧωρίς πραγματικά πρόσωπα.",
    }
    raw["about"]["prepared_by"] = "Κ. Σταματίου"
    raw["spaces"][0]["name"] = "Γωνιακό κατάστημα"
    raw["spaces"][0]["leases"][0]["tenant"] = "Ιστιοράφος «Μαΐστρος» & Υιοί"
    raw["spaces"][1] |= {"name": "Διαμερίσματα", "use": "διαμέρισμα"}
    raw["expenses"][0]["name"] = "Συντήρηση και επισκευές"
    raw["loans"][0]["name"] = "Στεγαστικό δάνειο"
    _multiply(raw, 1_000.0)
    return raw


def _multiply(raw: Any, by: float) -> None:
    """Amounts in a currency whose unit buys little."""
    if isinstance(raw, list):
        for item in raw:
            _multiply(item, by)
    elif isinstance(raw, dict):
        is_share = raw.get("basis") in ("egi", "price")
        for key, value in raw.items():
            if key in _MONEY and isinstance(value, int | float) and not is_share:
                raw[key] = round(value * by)
            elif key in ("stated",) and isinstance(value, dict):
                raw[key] = {
                    year: {k: v * by for k, v in row.items()} if isinstance(row, dict) else row * by
                    for year, row in value.items()
                }
            else:
                _multiply(value, by)


_MONEY = frozenset(
    {
        "amount", "price", "initial_works", "escrows", "working_capital", "deposits", "noi",
        "break_penalty", "reserves", "reserves_opening", "fee_amount", "price_per", "adjustment",
    }
)  # fmt: skip


def every_method_raw() -> dict[str, Any]:
    """An exit blended from all seven methods, without dates, loans or reserves."""
    raw = small_raw()
    methods = (
        "forward_noi", "trailing_noi", "perpetuity", "price_per", "rent_multiple",
        "purchase_price", "amount",
    )  # fmt: skip
    blend = [
        {"id": f"b{10 + place}", "method": method, "weight": 0.16 if place else 0.04}
        for place, method in enumerate(methods)
    ]
    raw["leave"] |= {
        "blend": blend, "price_per": 110_000.0, "rent_multiple": 8.5, "amount": 950_000.0,
    }  # fmt: skip
    raw["next_id"] = 30
    raw["spaces"][0]["market_rent"] = rent(1150)
    return raw


@cache
def wholes() -> Mapping[str, Deal]:
    """Every deal by name."""
    samples = {path.stem: read_deal(path) for path in sorted(sample_deals().glob("*.deal"))}
    made = {
        "long": long_raw(),
        "greek": greek_raw(),
        "every method": every_method_raw(),
        "one year": small_raw() | {"leave": {"hold": 1, "exit_yield": 0.07}},
        "small": small_raw(),
    }
    deals = {name: deal_from_raw(raw) for name, raw in made.items()}
    return {**samples, **deals, "fullest": fullest(), "empty": Deal()}


@cache
def result_of(name: str) -> Result:
    return evaluate(compile_deal(wholes()[name]))


@cache
def document_of(name: str, paper: Paper | None = None) -> Document:
    deal = wholes()[name]
    return build(result_of(name), find_locale(deal.conventions.locale) or DEFAULT, paper)
