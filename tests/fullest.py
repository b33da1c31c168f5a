"""An invented deal that holds at least one of every record and a value in every input."""

import base64
import hashlib
import json
from types import UnionType
from typing import Any, Literal, Union, get_args, get_origin

from workbench.deal.deal import Deal
from workbench.deal.inputs import Field
from workbench.files.deal_file import deal_from_text

Raw = dict[str, Any]

JPEG = b"\xff\xd8\xff\xe0 no picture to look at, but it begins like one"
DIGEST = hashlib.sha256(JPEG).hexdigest()


def rent(amount: float, per: str = "month", of: str = "unit") -> Raw:
    return {"amount": amount, "per": per, "of": of}


_SPACES: list[Raw] = [
    {
        "id": "s1",
        "name": "Corner shop",
        "use": "shop",
        "count": 1,
        "area": 120.0,
        "market_rent": rent(240.0, "year", "area"),
        "leases": [
            {
                "id": "e2",
                "tenant": "Sailmaker",
                "start": "2024-01-01",
                "end": "2029-06-30",
                "rent": rent(2300.0),
                "steps": [
                    {"id": "p3", "date": "2028-01-01", "change": 0.03},
                    {"id": "p4", "date": "2029-01-01", "amount": 2450.0},
                ],
                "free_months": 1,
            },
            {
                "id": "e5",
                "tenant": "Bookbinder",
                "start": "2029-09-01",
                "end": "2034-08-31",
                "rent": rent(2500.0),
                "break_date": "2032-08-31",
                "break_penalty": 9000.0,
            },
        ],
    },
    {
        "id": "s6",
        "name": "Flats",
        "use": "flat",
        "count": 6,
        "area": 62.5,
        "market_rent": rent(1150.0),
        "leases": [{"id": "e7", "tenant": "Six households", "rent": rent(1080.0)}],
    },
]

_LEAVE: Raw = {
    "hold": 10,
    "method": "forward_noi",
    "blend": [
        {"id": "b8", "method": "forward_noi", "weight": 0.6},
        {"id": "b9", "method": "price_per", "weight": 0.2},
        {"id": "b10", "method": "rent_multiple", "weight": 0.1},
        {"id": "b11", "method": "amount", "weight": 0.1},
    ],
    "exit_yield": 0.07,
    "exit_income": "stabilised",
    "stabilised_vacancy": 0.05,
    "price_per": 210000.0,
    "price_per_of": "unit",
    "price_growth": {"1": 0.02},
    "price_series": "same_buildings",
    "rent_multiple": 11.0,
    "amount": 1500000.0,
    "selling_cost": 0.03,
}

FULLEST: Raw = {
    "schema": 1,
    "next_id": 40,
    "property": {
        "name": "Sailmaker's corner",
        "kind": "Shop and six flats",
        "place": "Ebb Street, Tolmouth",
        "year_built": 1931,
        "description": "Brick, three floors.",
        "notes": "Invented throughout.",
        "pictures": [DIGEST],
    },
    "about": {
        "purpose": "To decide whether to offer.",
        "intended_users": "The buyers.",
        "prepared_by": "R. Ellery",
        "interest": "Buyer",
        "prepared_on": "2026-11-02",
    },
    "conventions": {
        "currency": "USD",
        "locale": "en-US",
        "area_unit": "m2",
        "timing": "month_end",
    },
    "purchase": {
        "price": 1250000.0,
        "closing_date": "2027-01-01",
        "costs": [
            {"id": "c12", "name": "Survey", "amount": 3000.0, "basis": "amount"},
            {"id": "c13", "name": "Transfer tax", "amount": 0.02, "basis": "price"},
        ],
        "initial_works": 12000.0,
        "escrows": 4000.0,
        "working_capital": 5000.0,
        "deposits": 6000.0,
    },
    "spaces": _SPACES,
    "earn": {
        "growth": {"1": 0.02, "4": 0.025},
        "depreciation": {"1": 0.005},
        "series": "as_new",
        "vacancy": {"1": 0.05, "3": 0.06},
        "credit_loss": {"1": 0.01},
        "count_empty_time_once": True,
    },
    "other_income": [
        {
            "id": "i14",
            "name": "Sign",
            "amount": 600.0,
            "basis": "year",
            "growth": {"1": 0.01},
            "in_allowance": True,
            "lease": "e2",
        },
        {"id": "i15", "name": "Laundry", "amount": 90.0, "basis": "unit", "stated": {"1": 500.0}},
    ],
    "expenses": [
        {"id": "x16", "name": "Repairs", "amount": 8.0, "basis": "area", "growth": {"1": 0.03}},
        {"id": "x17", "name": "Management", "amount": 0.05, "basis": "egi"},
        {"id": "x18", "name": "Insurance", "amount": 4000.0, "stated": {"1": 4100.0, "5": 4600.0}},
    ],
    "spend": {
        "growth": {"1": 0.02},
        "works_growth": {"1": 0.03},
        "reserves": 300.0,
        "reserves_basis": "unit",
        "reserves_growth": {"1": 0.02},
        "reserves_place": "below",
        "reserves_use": "account",
        "reserves_opening": 2000.0,
    },
    "works": [
        {"id": "w19", "name": "Roof", "amount": 25000.0, "date": "2030-05-01"},
        {
            "id": "w20",
            "name": "Boiler",
            "amount": 9000.0,
            "year": 6,
            "month": 3,
            "todays_money": True,
        },
    ],
    "stated": {
        "empty_time": {"1": 0.0, "2": 1200.0},
        "concessions": {"1": 300.0},
        "vacancy_allowance": {"1": 5000.0},
        "credit_loss": {"1": 700.0},
    },
    "loans": [
        {
            "id": "l21",
            "name": "Bank",
            "amount": 700000.0,
            "rate": {"1": 0.055, "6": 0.06},
            "amortisation_months": 300,
            "interest_only_months": 12,
            "term_months": 240,
            "fee": 0.01,
            "fee_amount": 1500.0,
        }
    ],
    "leave": _LEAVE,
    "returns": {
        "required": {"1": 0.08, "6": 0.085},
        "extra_on_exit": 0.005,
        "equity": {"1": 0.11},
        "finance": 0.06,
        "reinvest": 0.04,
    },
    "statements": [
        {
            "id": "m22",
            "name": "Seller, 2025",
            "kind": "past_year",
            "start": "2025-01-01",
            "end": "2025-12-31",
            "source": "Typed page",
            "lines": [
                {
                    "id": "a23",
                    "line": "expense@x16",
                    "label": "Upkeep",
                    "amount": -5200.0,
                    "adjustment": -800.0,
                    "reason": "The owner painted.",
                }
            ],
        }
    ],
    "comparables": [
        {
            "id": "q24",
            "kind": "sale",
            "date": "2026-03-10",
            "place": "Two streets away",
            "area": 480.0,
            "rent": rent(1100.0),
            "price": 990000.0,
            "noi": 66000.0,
            "noi_basis": "Before reserves",
            "income_yield": 0.0667,
            "source": "Deed record",
        }
    ],
    "cases": [
        {
            "id": "k25",
            "name": "A worse sale",
            "set": {"leave.exit_yield": 0.08, "earn.vacancy.3": None},
            "add": [{"to": "works", "item": {"id": "w26", "amount": 8000.0, "year": 4}}],
            "remove": ["expenses@x18"],
        }
    ],
    "drafts": {},
    "pictures": {DIGEST: base64.b64encode(JPEG).decode("ascii")},
}


def fullest_raw() -> Raw:
    """A copy that may be changed."""
    copied: Raw = json.loads(json.dumps(FULLEST))
    return copied


def fullest() -> Deal:
    return deal_from_text(json.dumps(FULLEST))


def small_raw() -> Raw:
    """Eight numbers and nothing else."""
    return {
        "schema": 1,
        "next_id": 3,
        "purchase": {"price": 900000},
        "spaces": [{"id": "s1", "count": 8, "market_rent": rent(1150)}],
        "earn": {"vacancy": {"1": 0.05}},
        "expenses": [{"id": "x2", "amount": 38000}],
        "leave": {"hold": 10, "exit_yield": 0.07},
        "returns": {"required": {"1": 0.08}},
    }


def small() -> Deal:
    return deal_from_text(json.dumps(small_raw()))


def kinds(field: Field) -> tuple[Any, ...]:
    """What the value of a field may be: its one type, or those of a union."""
    is_union = get_origin(field.kind) in (Union, UnionType)
    return get_args(field.kind) if is_union else (field.kind,)


def choices(field: Field) -> tuple[str, ...]:
    """The words a field may hold, where it is one of a few."""
    literal = (one for one in kinds(field) if get_origin(one) is Literal)
    return get_args(next(literal, None))
