"""The memo's first page."""

from dataclasses import replace

import pytest

from tests.report.deals import DEAL, LONG, collisions, figures, opening
from workbench.charts.shapes import Picture, Rect, Text
from workbench.deal.deal import Deal
from workbench.deal.property import About, Property
from workbench.report.document import Paper
from workbench.report.layout import lay_out
from workbench.text.locale import LOCALES

LONG_DEAL = replace(
    DEAL,
    property=Property(LONG, LONG, LONG, 1962),
    about=About(LONG, LONG, LONG, LONG, DEAL.about.prepared_on),
)


def first(deal: Deal, paper: Paper) -> Picture:
    return lay_out(opening(deal, figures(), LOCALES["en-GB"], paper))[0]


@pytest.mark.parametrize("paper", ["a4", "letter"])
@pytest.mark.parametrize("deal", [DEAL, LONG_DEAL], ids=["plain", "long"])
def test_it_holds_key_figures_wall_and_parties(deal: Deal, paper: Paper) -> None:
    page = first(deal, paper)
    said = {shape.text for shape in page.shapes if isinstance(shape, Text)}
    assert {"Price", "Cash to close", "Rent in hand", "rent in hand", "Prepared on"} <= said
    assert collisions(page) == []


def test_long_texts_and_a_shorter_sheet_set_it_tighter() -> None:
    def stone(page: Picture) -> float:
        return max(s.height for s in page.shapes if isinstance(s, Rect) and s.fill == "exit")

    tighter = stone(first(LONG_DEAL, "a4"))
    assert stone(first(DEAL, "a4")) > tighter > stone(first(LONG_DEAL, "letter"))
