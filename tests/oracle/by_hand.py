"""Small deals for cases worked by hand, and how near is near."""

from typing import Any

import pytest


def near(value: float) -> Any:
    return pytest.approx(value, rel=1e-12, abs=1e-9)


def one_space(leases: list[dict[str, Any]], market: float, **more: Any) -> dict[str, Any]:
    """A deal closing on 1 January 2024 with one unit; market rent a month, no growth."""
    rent = {"amount": market, "per": "month"}
    space = {"id": "s1", "count": 1, "market_rent": rent, "leases": leases}
    deal: dict[str, Any] = {
        "schema": 1,
        "purchase": {"price": 1000.0, "closing_date": "2024-01-01"},
        "spaces": [space],
        "earn": {"vacancy": {"1": 0.0}},
        "leave": {"hold": 1, "exit_yield": 0.1},
        "returns": {"required": {"1": 0.1}},
    }
    return {**deal, **more}


def lease(start: str, end: str, amount: float, **more: Any) -> dict[str, Any]:
    return {
        "id": "e2",
        "start": start,
        "end": end,
        "rent": {"amount": amount, "per": "month"},
        **more,
    }


def near_list(values: list[float]) -> Any:
    return pytest.approx(values, rel=1e-12)
