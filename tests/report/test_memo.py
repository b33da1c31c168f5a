"""The purchase memo, from a deal to the text on its pages."""

import re
from dataclasses import replace
from functools import cache
from typing import Any

import pytest

from tests.report.deals import (
    BARE,
    DEAL,
    LONG,
    collisions,
    deal_named,
    figures,
    missing,
    opening,
    pages_of,
)
from workbench.charts.shapes import Rect
from workbench.deal.deal import Deal
from workbench.deal.property import About, Conventions, Property
from workbench.report.cautions import FOOT, full_cautions
from workbench.report.layout import lay_out
from workbench.report.pdf import draw
from workbench.text.locale import LOCALES

NEGATIVE = ((-120_000.0, -80_000.0), (50_000.0, -30_000.0), (120_000.0, 60_000.0))
FORTY = tuple((max(0.0, 60_000.0 - 4_000 * year), 20_000.0 + 500 * year) for year in range(40))
LONG_DEAL = replace(
    DEAL,
    property=Property(LONG, LONG, LONG, 1962, LONG, "W" * 5000),
    about=About(LONG, LONG, LONG, LONG, DEAL.about.prepared_on),
    drafts={"leave.hold": LONG},
)
CASES: dict[str, tuple[Deal, dict[str, Any], str]] = {
    "base": (DEAL, figures(), "en-GB"),
    "letter": (DEAL, figures(), "en-US"),
    "negative years": (DEAL, figures(NEGATIVE, 1e6, 9e5), "en-GB"),
    "value below zero": (DEAL, figures(NEGATIVE[:2], 5e4, 5e5), "en-US"),
    "forty years": (DEAL, figures(FORTY, 3e5, 1.9e6), "sv-SE"),
    "no leases": (BARE, figures(), "de-DE"),
    "yen": (
        replace(DEAL, conventions=Conventions("JPY", "ja-JP")),
        figures(tuple((100 * a, 100 * b) for a, b in NEGATIVE), 2e8, 3.2e8),
        "ja-JP",
    ),
    "huge": (DEAL, figures(((1e14, 1e14),), 9e14, 1e15), "en-IN"),
    "nothing": (Deal(), missing(), "fr-FR"),
    "long": (LONG_DEAL, figures(issues=[{"path": "x", "message": LONG}] * 20), "en-US"),
}


def pages(deal: Deal, found: dict[str, Any], code: str = "en-US") -> list[str]:
    return pages_of(draw(opening(deal, found, LOCALES[code])).pdf)


@cache
def pages_of_case(name: str) -> list[str]:
    return pages(*CASES[name])


@pytest.mark.parametrize("name", CASES)
class TestEveryMemo:
    def test_no_text_covers_another_and_none_leaves_the_sheet(self, name: str) -> None:
        deal, found, code = CASES[name]
        for page in lay_out(opening(deal, found, LOCALES[code])):
            assert collisions(page) == []
            for shape in page.shapes:
                if isinstance(shape, Rect):
                    assert shape.x >= 0
                    assert shape.x + shape.width <= page.width
                    assert shape.y + shape.height <= page.height - 60

    def test_each_page_has_its_number_and_the_caution(self, name: str) -> None:
        shown = pages_of_case(name)
        for number, text in enumerate(shown, start=1):
            assert f"page {number} of {len(shown)}" in text
            assert FOOT in text.replace(f" page {number} of {len(shown)}", "")

    def test_the_cautions_stand_in_full_on_the_last_page(self, name: str) -> None:
        last = pages_of_case(name)[-1]
        for paragraph in full_cautions():
            assert "".join(run.text for run in paragraph.runs) in last

    def test_two_pages_but_for_long_texts(self, name: str) -> None:
        count = len(pages_of_case(name))
        assert count == 2 or (name == "long" and count > 8)

    def test_market_value_is_only_ever_denied(self, name: str) -> None:
        whole = " ".join(pages_of_case(name)).lower()
        for found in re.finditer("market value|apprais|valuation", whole):
            assert "not " in whole[max(0, found.start() - 50) : found.start()]


def test_every_headline_figure_is_on_the_first_page() -> None:
    first, second = pages(DEAL, figures())
    for text in (
        "Quarry Lane Terrace",
        "Quarry Lane, Emberford · Apartment house · 8 units, 640 m² · built 1962",
        "USD 3,200,000",
        "USD 3,807,784",
        "worth on these assumptions at a required return of 8.0%, not market value",
        "USD 543,784",
        "53.5%",
        "hold 10 years; reference share 48.2%",
        "33.8%",
        "11.34%",
        "unlevered 9.12%",
        "1.18",
        "year 3",
        "USD 1,316,000",
        "1,081,927",
        "688,869",
        "2,036,988",
        "Decide whether to offer, and at what price",
        "The buyers and their bank",
        "M. Tarn",
        "Buyer; would own the house",
        "March 14, 2026",
    ):
        assert text in first, text
    for text in ("4,481,374", "4,379,524", "291,289", "6.5%", "Apr 1, 2026", "Three floors"):
        assert text in second, text


def test_the_share_is_never_printed_without_its_hold_and_reference() -> None:
    for page in pages(DEAL, figures()):
        assert "53.5%" in page
        assert "48.2%" in page
        assert "10 years" in page


def test_the_wall_stands_on_the_first_page() -> None:
    page = lay_out(opening(DEAL, figures(), LOCALES["en-GB"]))[0]
    fills = {shape.fill for shape in page.shapes if isinstance(shape, Rect)}
    assert {"in_hand", "expected", "exit"} <= fills
    (text, _) = pages(DEAL, figures())
    for amount in ("226,927", "213,981", "134,331", "rent in hand", "rent expected"):
        assert amount in text


def test_a_deal_without_leases_says_so() -> None:
    assert "No leases entered" in pages(BARE, figures())[0]
    assert "No leases entered" not in pages(DEAL, figures())[0]


def test_no_exit_price_is_said_in_the_wall_with_its_reason() -> None:
    found = figures(exit=None, value=None, reasons={"exit": "the exit yield is missing"})
    first, second = pages(DEAL, found)
    assert "No exit price. The exit yield is missing." in first
    assert "rents alone" in first
    assert "Exit The exit yield is missing." in second


def test_a_stack_that_cannot_be_given_leaves_the_wall_empty() -> None:
    stack = [{"year": 1, "in_hand": None, "expected": None}]
    found = {**figures(), "stack": stack, "value": None, "reasons": {"stack": "no rent"}}
    assert "No exit price. No rent. Nothing to stack yet." in pages(DEAL, found)[0]


def test_what_is_not_stated_is_said_not_to_be() -> None:
    first = pages(BARE, figures())[0]
    assert first.count("not stated") == 6
    assert "Property without a name" in pages(Deal(), missing())[0]


def test_names_in_other_alphabets() -> None:
    name = "Πολυκατοικία <ΑΕ> & Υἱοί — Каменная улица"
    first, second = pages(deal_named(name), figures(), "el-GR")
    assert name in first
    assert f"Purchase memo · {name}" in second


def test_a_long_name_is_cut_on_the_first_page_and_whole_later() -> None:
    shown = pages(deal_named(LONG), figures())
    assert "…" in shown[0]
    whole = " ".join(shown[1:])
    assert whole.count("A long account of the house & its <b>tenants</b>") >= LONG.count("A long")


def test_a_name_of_several_lines_stands_on_one_and_is_given_whole() -> None:
    shown = pages(deal_named("Upper\nLower"), figures())
    assert "Upper Lower" in shown[0]
    assert "Name Upper Lower" in shown[1]


def test_the_mark_for_missing_characters_is_explained_where_it_occurs() -> None:
    note = "□ stands for a character that the letters used here do not have."
    assert note in pages(deal_named("日本"), figures())[-1]
    assert note not in pages(DEAL, figures())[-1]


def test_the_paper_follows_the_locale() -> None:
    assert opening(DEAL, figures(), LOCALES["en-US"]).paper == "letter"
    assert opening(DEAL, figures(), LOCALES["en-GB"]).paper == "a4"
    assert opening(DEAL, figures(), LOCALES["en-GB"], "letter").paper == "letter"
