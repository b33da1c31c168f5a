"""`figures`: the answer as text and as JSON with fixed keys."""

import json
import math
from collections.abc import Iterator
from pathlib import Path
from typing import Any

import pytest

from tests.commands.running import run
from tests.fullest import FULLEST, fullest, small_raw
from workbench.places import sample_deals
from workbench.report.record import record_of

SAMPLES = sorted(sample_deals().glob("*.deal"))
YEARLY = "list by year"
KEYS: dict[str, Any] = {
    "price": float,
    "value": float,
    "margin": float,
    "hold_years": int,
    "exit_value_share": float,
    "reference_share": float,
    "ground_share": float,
    "tiers": {"in_hand": float, "expected": float, "exit": float},
    "stack": [{"year": int, "in_hand": float, "expected": float}],
    "exit": {
        "price": float, "net": float, "present_value": float, "yield": float, "income": float,
    },
    "statement": dict.fromkeys(
        (
            "rent_in_hand", "rent_expected", "empty_time", "concessions", "recoveries",
            "other_income", "vacancy_allowance", "credit_loss", "effective_gross_income",
            "operating_expenses", "noi", "reserves", "leasing_costs", "works", "net_cash_flow",
            "debt_service", "cash_flow_after_debt",
        ),
        YEARLY,
    ),
    "irr": {"unlevered": float, "levered": float},
    "mirr": {"unlevered": float, "levered": float},
    "equity_multiple": {"unlevered": float, "levered": float},
    "npv": {"unlevered": float, "levered": float},
    "cash_on_cash": YEARLY,
    "dscr": {"noi": YEARLY, "ncf": YEARLY},
    "debt_yield": YEARLY,
    "loans": [
        {
            "id": str, "amount": float, "bound_by": str, "balance": YEARLY, "service": YEARLY,
            "interest": YEARLY,
        }
    ],
    "break_even_occupancy": {"with_reserves": float, "without_reserves": float},
    "sources_uses": {"sources": dict, "uses": dict},
    "reasons": dict,
    "issues": list,
}  # fmt: skip
"""The keys that other programs may rely on."""


@pytest.fixture
def deal(tmp_path: Path) -> Path:
    path = tmp_path / "my.deal"
    path.write_text(json.dumps(FULLEST), encoding="utf-8")
    return path


def figures(capsys: pytest.CaptureFixture[str], *words: object) -> dict[str, Any]:
    ran = run(capsys, "figures", *words, "--json")
    found: dict[str, Any] = json.loads(ran.out, parse_constant=pytest.fail)
    return found


def wrong(shape: Any, found: Any, hold: int, place: str = "") -> Iterator[str]:
    """Places where the figures have not the shape that is promised."""
    if isinstance(shape, dict):
        for key, below in shape.items():
            if key in found:
                yield from wrong(below, found[key], hold, f"{place}.{key}")
            else:
                yield f"{place}.{key} is missing"
    elif shape is YEARLY:
        if len(found) != hold or not all(isinstance(one, float) for one in found):
            yield f"{place} is not a number for each year"
    elif isinstance(shape, list):
        for item in found:
            yield from wrong(shape[0], item, hold, f"{place}[]")
    elif not isinstance(found, shape):
        yield f"{place} is {found!r}"


def numbers(tree: Any) -> Iterator[float]:
    if isinstance(tree, dict | list):
        for below in tree.values() if isinstance(tree, dict) else tree:
            yield from numbers(below)
    elif isinstance(tree, float):
        yield tree


def test_the_keys_are_fixed(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    found = figures(capsys, deal)
    assert list(wrong(KEYS, found, 10)) == []
    assert [row["year"] for row in found["stack"]] == list(range(1, 11))
    assert (found["reasons"], found["issues"]) == ({}, [])


def test_the_shape_is_looked_at(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    """That the test above could fail."""
    found = figures(capsys, deal)
    del found["exit"]["net"]
    found["dscr"]["noi"].pop()
    found["price"] = None
    assert len(list(wrong(KEYS, found, 10))) == 3


def test_figures_are_in_full_precision(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    assert figures(capsys, deal) == json.loads(json.dumps(record_of(fullest())))


def test_what_a_later_version_has_is_there_and_nothing(
    capsys: pytest.CaptureFixture[str], deal: Path
) -> None:
    found = figures(capsys, deal)
    assert set(found["statement"]["recoveries"]) == {0.0}
    assert set(found["statement"]["leasing_costs"]) == {0.0}
    assert found["loans"][0]["bound_by"] == "typed"


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_samples_have_every_figure(capsys: pytest.CaptureFixture[str], path: Path) -> None:
    found = figures(capsys, path)
    assert all(map(math.isfinite, numbers(found)))
    assert found["issues"] == []
    assert set(found["reasons"]) <= {"measures.discounted_payback", "measures.payback"}


def test_levered_figures_without_a_loan_have_their_reason(
    capsys: pytest.CaptureFixture[str], tmp_path: Path
) -> None:
    path = tmp_path / "small.deal"
    path.write_text(json.dumps(small_raw()))
    found = figures(capsys, path)
    for measure in ("irr", "mirr", "npv", "equity_multiple"):
        assert found[measure]["levered"] is None
        assert found["reasons"][f"{measure}.levered"] == "the deal has no loan"
    assert found["loans"] == []


def test_an_issue_is_told_in_the_figures_too(
    capsys: pytest.CaptureFixture[str], deal: Path
) -> None:
    ran = run(capsys, "figures", deal, "--json", "--set", "leave.exit_yield=0")
    found = json.loads(ran.out)
    message = "Exit yield: 0% is not allowed; it must be from 0.01% to 100%"
    assert ran.status == 1
    assert found["issues"] == [{"path": "leave.exit_yield", "message": message}]
    assert found["value"] is None
    assert found["reasons"]["value"] == f"waits for an input. {message}"
    assert found["statement"]["noi"][0] > 0


def test_a_change_moves_the_figures_and_not_the_file(
    capsys: pytest.CaptureFixture[str], deal: Path
) -> None:
    before = deal.read_bytes()
    plain = figures(capsys, deal)["value"]
    lower = figures(capsys, deal, "--set", "leave.exit_yield=9%", "--set", "leave.amount=1e6")
    assert lower["value"] < plain
    assert deal.read_bytes() == before


@pytest.mark.parametrize(
    "entry",
    [
        "costs@c12.amount=4000", "costs@c13.amount=3%", "blend@b8.weight=0.55",
        "steps@p3.change=9%", "steps@p4.amount=2900", "stated.vacancy_allowance=null",
        "spaces@s6.count=7",
        "spaces@s6.market_rent=1300", "expenses@x17.amount=6%", "leave.hold=9",
        "loans@l21.rate=7%", "works@w20.todays_money=false", "leases@e2.end=2029-07-31",
        "conventions.timing=year_start", 'returns.required={"1": 0.09}', "leave.blend=[]",
    ],
)  # fmt: skip
def test_each_form_of_a_change_moves_a_figure(
    capsys: pytest.CaptureFixture[str], deal: Path, entry: str
) -> None:
    assert figures(capsys, deal, "--set", entry) != figures(capsys, deal)


def test_a_bad_change_is_named(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    ran = run(capsys, "figures", deal, "--set", "leave.hold=5", "--set", "leave.holt=5")
    assert (ran.status, ran.out) == (2, "")
    assert ran.err == f"{deal}: leave.holt: the deal has no “holt”\n"
