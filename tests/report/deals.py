"""An invented deal and its figures in the form of `figures --json`, for the tests of documents."""

from dataclasses import replace
from datetime import date
from io import BytesIO
from typing import Any

from pypdf import PdfReader

from workbench.charts.lettering import width
from workbench.charts.shapes import Picture, Text
from workbench.deal.borrow import Loan
from workbench.deal.deal import Deal
from workbench.deal.earn import Lease, Rent, Space
from workbench.deal.leave import Leave, Returns
from workbench.deal.property import About, Property
from workbench.deal.purchase import Purchase
from workbench.report.document import Document, Paper
from workbench.report.memo import compose
from workbench.report.readings import Readings
from workbench.report.voice import Voice
from workbench.text.locale import Locale

STACK = (
    (226_927.0, 0.0),
    (205_000.0, 8_981.0),
    (190_000.0, 11_834.0),
    (150_000.0, 40_521.0),
    (130_000.0, 49_722.0),
    (90_000.0, 79_687.0),
    (60_000.0, 100_177.0),
    (30_000.0, 121_133.0),
    (0.0, 142_483.0),
    (0.0, 134_331.0),
)
LONG = ("A long account of the house & its <b>tenants</b>, Ωμέγα, Жуков, 日本 🏠.\n" * 90)[:5000]

DEAL = Deal(
    property=Property(
        name="Quarry Lane Terrace",
        kind="Apartment house",
        place="Quarry Lane, Emberford",
        year_built=1962,
        description="Three floors, brick, eight flats around one stair.",
    ),
    about=About(
        purpose="Decide whether to offer, and at what price",
        intended_users="The buyers and their bank",
        prepared_by="M. Tarn",
        interest="Buyer; would own the house",
        prepared_on=date(2026, 3, 14),
    ),
    purchase=Purchase(price=3_200_000.0, closing_date=date(2026, 4, 1)),
    spaces=(
        Space(
            "s1",
            "Flats",
            "flat",
            8,
            80.0,
            Rent(1500.0, "month"),
            (Lease("e2", "A", date(2025, 1, 1), date(2033, 1, 1), Rent(1500.0, "month")),),
        ),
    ),
    loans=(Loan("l3", "Bank", 2_000_000.0, {1: 0.055}, 300),),
    leave=Leave(hold=10, exit_yield=0.065),
    returns=Returns(required={1: 0.08}),
)
BARE = replace(
    DEAL,
    spaces=tuple(replace(space, leases=()) for space in DEAL.spaces),
    loans=(),
    about=About(),
    purchase=Purchase(price=3_200_000.0),
)


def deal_named(name: str) -> Deal:
    return replace(DEAL, property=replace(DEAL.property, name=name))


def figures(
    stack: tuple[tuple[float, float], ...] = STACK,
    leaving: float = 2_036_988.0,
    price: float = 3_200_000.0,
    **changed: Any,
) -> dict[str, Any]:
    """Figures that agree with one another, unless some are given."""
    in_hand, expected = sum(a for a, _ in stack), sum(b for _, b in stack)
    value = in_hand + expected + leaving
    found: dict[str, Any] = {
        "price": price,
        "value": value,
        "margin": value - 1.02 * price,
        "hold_years": len(stack),
        "exit_value_share": leaving / value if value > 0 else None,
        "reference_share": 0.482,
        "ground_share": in_hand / price,
        "tiers": {"in_hand": in_hand, "expected": expected, "exit": leaving},
        "stack": [
            {"year": year, "in_hand": a, "expected": b} for year, (a, b) in enumerate(stack, 1)
        ],
        "exit": {
            "price": 4_481_374.0,
            "net": 4_379_524.0,
            "present_value": leaving,
            "yield": 0.065,
            "income": 291_289.0,
        },
        "irr": {"unlevered": 0.0912, "levered": 0.1134},
        "dscr": {"noi": [1.3, 1.25, 1.18, 1.2], "ncf": [1.2, 1.1, 1.05, None]},
        "sources_uses": {"sources": {"equity": 1_316_000.0}},
        "reasons": {},
        "issues": [],
    }
    return {**found, **changed}


def missing() -> dict[str, Any]:
    """What is left of the figures of an empty deal."""
    return {
        "price": None,
        "value": None,
        "margin": None,
        "hold_years": None,
        "exit_value_share": None,
        "reference_share": None,
        "ground_share": None,
        "tiers": None,
        "stack": None,
        "exit": None,
        "irr": {"unlevered": None, "levered": None},
        "dscr": {"noi": [None], "ncf": []},
        "sources_uses": None,
        "reasons": {"price": "the price is missing", "value": "the hold is missing"},
        "issues": None,
    }


def opening(
    deal: Deal, found: dict[str, Any], locale: Locale, paper: Paper | None = None
) -> Document:
    """A memo of made-up figures, without the working that only a computed deal has."""
    return compose(Readings(found), Voice(deal, locale), paper or locale.paper, ())


def pages_of(pdf: bytes) -> list[str]:
    """The text of each page with spaces and line breaks as single spaces."""
    return [" ".join(page.extract_text().split()) for page in PdfReader(BytesIO(pdf)).pages]


def text_boxes(page: Picture) -> list[tuple[float, float, float, float, str]]:
    """Left, top, right and bottom of the capital letters of each text, and the text."""
    boxes = []
    for shape in page.shapes:
        if isinstance(shape, Text) and shape.text.strip():
            wide = width(shape.text, shape.size, shape.weight)
            left = shape.x - {"start": 0.0, "middle": wide / 2, "end": wide}[shape.anchor]
            boxes.append((left, shape.y - 0.72 * shape.size, left + wide, shape.y, shape.text))
    return boxes


def collisions(page: Picture) -> list[tuple[str, str]]:
    """Pairs of texts that overlap."""
    boxes = text_boxes(page)
    return [
        (one[4], other[4])
        for place, one in enumerate(boxes)
        for other in boxes[place + 1 :]
        if one[0] < other[2] - 0.01
        and other[0] < one[2] - 0.01
        and one[1] < other[3] - 0.01
        and other[1] < one[3] - 0.01
    ]
