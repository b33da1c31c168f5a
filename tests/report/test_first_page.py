"""The memo's first page."""

from dataclasses import replace

import pytest

from tests.report.deals import DEAL, LONG, collisions, figures
from workbench.charts.shapes import Picture, Rect, Text
from workbench.deal.deal import Deal
from workbench.deal.property import About, Property
from workbench.report.document import Paper
from workbench.report.layout import lay_out
from workbench.report.memo import build
from workbench.text.locale import LOCALES

LONG_DEAL = replace(
    DEAL,
    property=Property(LONG, LONG, LONG, 1962),
    about=About(LONG, LONG, LONG, LONG, DEAL.about.prepared_on),
)


def first(deal: Deal, paper: Paper) -> Picture:
    return lay_out(build(deal, figures(), LOCALES["en-GB"], paper))[0]


@pytest.mark.parametrize("paper", ["a4", "letter"])
@pytest.mark.parametrize("deal", [DEAL, LONG_DEAL], ids=["plain", "long"])
def test_it_holds_key_figures_wall_and_parties(deal: Deal, paper: Paper) -> None:
    page = first(deal, paper)
    said = {shape.text for shape in page.shapes if isinstance(shape, Text)}
    assert {"Price", "Cash to close", "Rent in hand", "rent in hand", "Prepared on"} <= said
    assert collisions(page) == []


def test_a_longer_sheet_has_more_air_and_a_higher_wall() -> None:
    def lowest(page: Picture) -> float:
        bricks = [s for s in page.shapes if isinstance(s, Rect) and s.fill == "in_hand"]
        return max(brick.y + brick.height for brick in bricks)

    assert (
        lowest(first(DEAL, "a4"))
        > lowest(first(DEAL, "letter"))
        > lowest(first(LONG_DEAL, "letter"))
    )
