"""The memo's sentences."""

from typing import Any

from tests.report.deals import DEAL, figures, missing
from workbench.report.readings import Readings
from workbench.report.voice import Voice
from workbench.report.wording import lead, rests_on
from workbench.text.locale import LOCALES

VOICE = Voice(DEAL, LOCALES["en-US"])


def led(found: dict[str, Any]) -> str:
    return "".join(run.text for run in lead(Readings(found), VOICE).runs)


def rested(found: dict[str, Any]) -> list[str]:
    return ["".join(run.text for run in p.runs) for p in rests_on(Readings(found), VOICE)]


def test_the_lead_gives_value_margin_share_hold_and_reference() -> None:
    assert led(figures()) == (
        "On these assumptions, and at a required return of 8.0%, the property is worth "
        "USD\u00a03,807,784, 543,784 more than its price, purchase costs and initial works "
        "together. 53.5% of the value is the sale at the end of year 10 (March 31, 2036); the "
        "reference share for this hold is 48.2%."
    )


def test_a_margin_below_zero_and_none() -> None:
    assert "543,784 less than its price" in led(figures(margin=-543_784.0))
    assert "3,807,784, the same as its price" in led(figures(margin=-0.2))
    assert "3,807,784. 53.5%" in led(figures(margin=None))


def test_a_value_not_above_zero_has_no_shares() -> None:
    text = led(figures(((20.0, -180.0),), 100.0))
    assert "would be worth less than nothing: USD\u00a0−60" in text
    assert text.endswith("The value is not above zero, so no shares of it are given.")
    assert "the property would be worth nothing, " in led(figures(((0.0, 0.0),), 0.0))


def test_a_value_whose_share_is_missing_for_another_reason() -> None:
    assert led(figures(exit_value_share=None)).endswith("together. ")


def test_no_value_has_a_reason() -> None:
    assert led(missing()) == "No value can be given. The hold is missing."
    assert led({}) == "No value can be given. A figure it needs is missing."


def test_a_missing_reference_share_is_said_to_be_missing() -> None:
    found = figures(reference_share=None, reasons={"reference_share": "Growth is too high."})
    assert led(found).endswith("a reference share for this hold cannot be given.")
    assert "There is no reference share. Growth is too high." in rested(found)[1]
    assert "It cannot be computed." in rested(figures(reference_share=None))[1]


def test_what_it_rests_on() -> None:
    tiers, beside, ground, sale = rested(figures())
    assert tiers == (
        "Brought back to today, rent already under contract comes to 1,081,927 and rent only "
        "expected to 688,869, after its share of the costs; the sale at the end of year 10 "
        "(March 31, 2036) comes to 2,036,988, after selling costs."
    )
    assert beside.startswith(
        "The exit-value share is 53.5% at a hold of 10 years. The reference share is 48.2%:"
    )
    assert beside.endswith("The share lies 5.3 percentage points above it.")
    assert ground.startswith("The ground share is 33.8%: so much of the price stands on rent")
    assert sale == (
        "The sale is taken at 4,481,374 at the end of year 10 (March 31, 2036): an income of "
        "291,289 at a yield of 6.5%. After selling costs, and with what is left in reserve, "
        "4,379,524."
    )


def test_no_rent_under_contract() -> None:
    assert rested(figures(((0.0, 50.0),), 100.0))[0].startswith(
        "No rent is under contract. Brought back to today, rent only expected comes to 50, after"
    )
    assert "The ground share is nil: none of the price stands on rent under contract." in rested(
        figures(((0.0, 50.0),), 100.0)
    )


def test_a_share_below_its_reference() -> None:
    assert rested(figures(reference_share=0.6))[1].endswith("6.5 percentage points below it.")


def test_a_sale_without_yield_or_costs() -> None:
    leaving = {"price": 100.0, "net": 100.0, "present_value": 50.0, "yield": None, "income": None}
    assert rested(figures(exit=leaving))[-1] == (
        "The sale is taken at 100 at the end of year 10 (March 31, 2036)."
    )


def test_a_sale_without_a_price_and_tiers_without_an_exit() -> None:
    found = figures(
        exit=None,
        tiers={"in_hand": 5.0, "expected": 6.0, "exit": None},
        reasons={"exit": "the exit yield is missing"},
        exit_value_share=None,
        ground_share=None,
    )
    assert rested(found) == [
        "Brought back to today, rent already under contract comes to 5 and rent only expected to "
        "6, after its share of the costs.",
        "The sale has no price. The exit yield is missing.",
    ]


def test_nothing_to_say() -> None:
    assert rested({}) == []
