"""The memo's figures."""

from dataclasses import replace
from typing import Any

from tests.report.deals import BARE, DEAL, figures, missing
from workbench.deal.deal import Deal
from workbench.deal.leave import Returns
from workbench.report.document import Table
from workbench.report.key_figures import key_figures, lowest_dscr, measures, tier_table
from workbench.report.readings import Readings
from workbench.report.voice import Voice
from workbench.text.locale import LOCALES

US = LOCALES["en-US"]


def chosen(found: dict[str, Any], deal: Deal = DEAL) -> dict[str, tuple[str, str]]:
    items = key_figures(Readings(found), Voice(deal, US))
    return {item.label: (item.value, item.note) for item in items}


def test_key_figures_of_a_deal_with_a_loan() -> None:
    assert chosen(figures()) == {
        "Price": ("USD\u00a03,200,000", "all amounts in USD"),
        "Value": (
            "USD\u00a03,807,784",
            "worth on these assumptions at a required return of 8.0%, not market value",
        ),
        "Margin": ("USD\u00a0543,784", "value less price, purchase costs and initial works"),
        "Exit-value share": ("53.5%", "hold 10 years; reference share 48.2%"),
        "Ground share": ("33.8%", "part of the price that stands on rent under contract"),
        "IRR, levered": ("11.34%", "before tax, after debt; unlevered 9.12%"),
        "Lowest DSCR": ("1.18", "on NOI, year 3; on net cash flow 1.05, year 3"),
        "Cash to close": ("USD\u00a01,316,000", "own money needed at closing"),
    }


def test_without_a_loan_the_unlevered_return_stands_alone() -> None:
    found = chosen(figures(), BARE)
    assert found["IRR, unlevered"] == ("9.12%", "before tax, without a loan")
    assert found["Cash to close"][1] == "no loan is assumed"
    assert "Lowest DSCR" not in found


def test_missing_figures_are_dashes() -> None:
    found = chosen(missing())
    assert {value for value, _ in found.values()} == {"—"}
    assert found["Exit-value share"][1] == "hold not stated; reference share —"
    assert lowest_dscr(Readings(missing()), Voice(DEAL, US), "noi") == ("—", "no debt service")


def test_the_tiers_and_their_shares() -> None:
    table = tier_table(Readings(figures()), Voice(DEAL, US))
    assert table.rows == (
        ("Rent in hand", "1,081,927", "28.4%"),
        ("Rent expected", "688,869", "18.1%"),
        ("Exit (the sale)", "2,036,988", "53.5%"),
        ("Value", "3,807,784", "100.0%"),
    )


def test_no_shares_of_a_value_that_is_not_above_zero() -> None:
    for found in (figures(((20.0, -180.0),), 100.0), missing()):
        table = tier_table(Readings(found), Voice(DEAL, US))
        assert {row[2] for row in table.rows} == {"—"}


def behind(found: dict[str, Any], deal: Deal) -> dict[str, str]:
    block = measures(Readings(found), Voice(deal, US))
    tables = [table for table in (*block.left, *block.right) if isinstance(table, Table)]
    return {label: value for table in tables for label, value in table.rows}


def test_the_figures_behind_it() -> None:
    assert behind(figures(), DEAL) == {
        "Required return a year": "8.0%",
        "Hold": "10 years",
        "Exit income a year": "291,289",
        "Exit yield": "6.5%",
        "Exit price": "4,481,374",
        "Net exit, after selling costs": "4,379,524",
        "Exit-value share": "53.5%",
        "Reference share at this hold": "48.2%",
        "IRR, unlevered, before tax": "9.12%",
        "IRR, levered, before tax": "11.34%",
        "Lowest DSCR on NOI, year 3": "1.18",
        "Lowest DSCR on net cash flow, year 3": "1.05",
        "Cash to close": "1,316,000",
        "Closing": "Apr 1, 2026",
    }


def test_rows_that_only_some_deals_have() -> None:
    bare = behind(figures(), BARE)
    assert not any("levered, before" in label and "un" not in label for label in bare)
    assert not any("DSCR" in label or label == "Closing" for label in bare)
    extra = replace(DEAL, returns=Returns({1: 0.08}, 0.0025))
    assert behind(figures(), extra)["Extra return on the exit"] == "0.25%"
