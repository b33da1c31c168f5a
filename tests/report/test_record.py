"""The record of a deal's figures."""

from dataclasses import replace

import pytest

from tests.fullest import fullest, small, small_raw
from tests.report.sections import changed
from workbench.deal.deal import Deal
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.report.record import record, record_of


def test_figures_stand_at_their_places_in_full_precision() -> None:
    result = evaluate(compile_deal(fullest()))
    figures = record(result)
    assert figures == record_of(fullest())
    assert figures["value"] == result.figure("value")
    assert figures["irr"]["levered"] == result.figure("irr_levered")
    assert figures["statement"]["noi"][2] == result.figure("noi", 3)
    assert figures["hold_years"] == 10
    assert isinstance(figures["hold_years"], int)


def test_loans_and_stack_are_lists() -> None:
    figures = record_of(fullest())
    (loan,) = figures["loans"]
    assert (loan["id"], loan["bound_by"], loan["amount"]) == ("l21", "typed", 700_000.0)
    assert len(loan["balance"]) == 10
    assert [row["year"] for row in figures["stack"]] == list(range(1, 11))
    assert sum(row["in_hand"] for row in figures["stack"]) == pytest.approx(
        figures["tiers"]["in_hand"]
    )


def test_a_deal_without_a_loan_has_none() -> None:
    figures = record_of(small())
    assert figures["loans"] == []
    assert figures["irr"]["levered"] is None
    assert figures["reasons"]["irr.levered"] == "the deal has no loan"


def test_one_reason_for_a_whole_list_where_it_is_the_same() -> None:
    assert record_of(small())["reasons"]["dscr.noi"] == "no debt service falls in this year"


def test_reasons_by_year_where_they_differ_or_only_some_years_lack_a_figure() -> None:
    short = {"id": "l21", "amount": 5e5, "rate": {"1": 0.05}, "term_months": 24}
    reasons = record_of(changed(loans=[short]))["reasons"]
    assert "dscr.noi" not in reasons
    assert reasons["dscr.noi.3"] == "no debt service falls in this year"


def test_a_reason_names_the_input_at_fault() -> None:
    reasons = record_of(changed(small_raw(), leave={"exit_yield": None}))["reasons"]
    assert reasons["value"].startswith("waits for an input. Exit yield:")


def test_issues_are_worded() -> None:
    (issue,) = record_of(replace(small(), drafts={"leave.hold": "ten"}))["issues"]
    assert issue["path"] == "leave.hold"
    assert "“ten”" in issue["message"]


def test_nothing_has_no_minus() -> None:
    figures = record_of(small())
    assert str(figures["statement"]["reserves"][0]) == "0.0"


def test_a_deal_of_nothing() -> None:
    figures = record_of(Deal())
    assert figures["value"] is None
    assert figures["hold_years"] is None
    assert figures["stack"] == []
