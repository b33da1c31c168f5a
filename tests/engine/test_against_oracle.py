"""The engine against the plain-loop oracle, on random deals that use every option.

The deals are those of the oracle's own test, which counts that each option is used at least twenty
times among them.
"""

import math
from typing import Any

import numpy as np
import pytest

from tests.oracle.oracle import figures
from tests.oracle.test_random_deals import COUNTED, drawn
from workbench.deal.checks import check
from workbench.engine.cash import irr
from workbench.engine.plan import HARMLESS, compile_deal
from workbench.engine.result import Result, evaluate
from workbench.files.deal_file import deal_from_raw
from workbench.report.record import record

SEARCHED = (-0.99, 10.0)
"""The rates between which the oracle looks for an IRR."""

DEALS = drawn(*COUNTED)


def leaves(tree: Any, place: str = "") -> dict[str, Any]:
    """Every value of nested plain data by its place."""
    if isinstance(tree, dict):
        pairs = [(str(key), held) for key, held in tree.items()]
    elif isinstance(tree, list):
        pairs = [(str(position), held) for position, held in enumerate(tree, start=1)]
    else:
        return {place: tree}
    return {
        found: value
        for key, held in pairs
        for found, value in leaves(held, f"{place}.{key}" if place else key).items()
    }


def same(place: str, want: Any, got: Any) -> bool:
    if isinstance(want, float | int) and isinstance(got, float | int):
        return math.isclose(want, got, rel_tol=1e-9, abs_tol=1e-9)
    if place.startswith("irr.") and want is None and got is not None:
        return not SEARCHED[0] < float(got) < SEARCHED[1]
    return bool(want == got)


def one_of_several(result: Result, place: str, want: Any) -> bool:
    """Whether the oracle's rate is one of those the program found, some beyond where it looks."""
    key = place.replace(".", "_")
    if not place.startswith("irr.") or result.figure(key) is not None:
        return False
    flows = result.line(key.replace("irr_", "") + "_flows")[0]
    found = irr(flows, np.arange(len(flows)) / 12)
    return found.status == "several" and any(same("", want, root) for root in found.roots)


def disagreements(raw: dict[str, Any]) -> list[str]:
    """Where program and oracle part by more than 1e-9 of the figure."""
    result = evaluate(compile_deal(deal_from_raw(raw)))
    expected, actual = leaves(figures(raw)), leaves(record(result))
    if expected["exit.price"] is None:
        # The program still says which income and yield it could not make a price of.
        del expected["exit.income"], expected["exit.yield"]
    found = {place: actual.get(place, "absent") for place in expected}
    return [
        f"{place}: oracle {want!r}, program {found[place]!r}"
        for place, want in expected.items()
        if not same(place, want, found[place]) and not one_of_several(result, place, want)
    ]


@pytest.mark.parametrize("first", range(0, len(DEALS), 50))
def test_random_deals_agree(first: int) -> None:
    for number, raw in enumerate(DEALS[first : first + 50], start=first):
        codes = {issue.code for issue in check(deal_from_raw(raw))}
        assert codes <= HARMLESS, f"deal {number} is not valid"
        assert disagreements(raw) == [], f"deal {number}"
