"""What every document must say."""

import re

from tests.report.deals import DEAL
from workbench.deal.property import About
from workbench.report.cautions import FOOT, NOT_STATED, full_cautions, parties
from workbench.text.locale import LOCALES

US = LOCALES["en-US"]


def whole() -> str:
    return " ".join(run.text for paragraph in full_cautions() for run in paragraph.runs)


def test_the_full_cautions_cover_what_is_owed() -> None:
    text = whole()
    for phrase in (
        "arithmetic on assumptions",
        "return that the user requires",
        "not market value",
        "not an appraisal, an evaluation or a valuation",
        "not investment, tax, legal, accounting or lending advice",
        "offers nothing for sale",
        "commits nobody to lend",
        "will differ",
        "local codes and rules",
        "licensed professionals",
        "condition of the buildings, title, the environment, zoning and the regulation of rents",
    ):
        assert phrase in text, phrase


def test_the_foot_is_short_and_points_to_the_last_page() -> None:
    assert len(FOOT) < 300
    for phrase in ("not market value", "not a loan commitment", "last page"):
        assert phrase in FOOT


def test_a_market_value_is_only_ever_denied() -> None:
    for text in (whole(), FOOT):
        for found in re.finditer("market value|apprais|evaluation|valuation", text):
            assert "not " in text[max(0, found.start() - 45) : found.start()]


def test_who_what_for_and_with_what_interest() -> None:
    assert parties(DEAL.about, US) == (
        ("Purpose", "Decide whether to offer, and at what price"),
        ("Intended users", "The buyers and their bank"),
        ("Prepared by", "M. Tarn"),
        ("Preparer’s interest", "Buyer; would own the house"),
        ("Prepared on", "March 14, 2026"),
    )


def test_what_is_missing_is_said_to_be() -> None:
    assert {text for _, text in parties(About(purpose="  "), US)} == {NOT_STATED}
