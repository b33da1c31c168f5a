"""Tiers by year: net cash flow in hand and expected, laid as the bricks of the value wall."""

from collections.abc import Callable
from dataclasses import dataclass
from math import isfinite

from workbench.charts.legend import Entry, legend
from workbench.charts.masonry import Box, lay
from workbench.charts.plot import Plot, Room, ground, plot_of, region
from workbench.charts.shapes import Picture, Rect, Shape
from workbench.charts.wall_foot import TIER_NAMES, bond_of, tier_entry
from workbench.charts.wall_stack import Tier

_PART = (0.16, 0.84)
_ROW = 0.75
"""Height of a row of bricks as a multiple of the letter size."""


@dataclass(frozen=True)
class TierFigures:
    """Net cash flow of each year from year 1, by tier. `money` puts one into words."""

    in_hand: tuple[float | None, ...]
    expected: tuple[float | None, ...]
    money: Callable[[float], str]
    mark: Callable[[float], str]
    """The same for the scale, whose amounts are put alike."""


@dataclass(frozen=True)
class _Piece:
    """The part of a year's column that one tier makes up."""

    tier: Tier
    year: int
    start: float
    end: float


def draw_tiers(figures: TierFigures, width: float, height: float, size: float = 11.0) -> Picture:
    """A column for each year: in hand below, expected on it; what is below zero hangs hatched."""
    room = Room(width, height, size)
    pieces = _pieces(figures)
    above, tall = _legend(pieces, room)
    amounts = [amount for piece in pieces for amount in (piece.start, piece.end)]
    years = range(1, len(figures.in_hand) + 1)
    plot, frame = plot_of(room, amounts, years, figures.mark, tall)
    boxes = [(piece, plot.bar(piece.year, piece.start, piece.end, _PART)) for piece in pieces]
    shapes = [*above, *frame]
    for piece, box in boxes:
        shapes += _masonry(piece, box, room, plot)
    regions = tuple(region(f"{piece.tier}.{piece.year}", box) for piece, box in boxes)
    return Picture(width, height, (*shapes, ground(plot)), regions, _words(figures))


def _pieces(figures: TierFigures) -> list[_Piece]:
    """Amounts above zero stand on one another, those below hang from one another."""
    pieces: list[_Piece] = []
    rows = zip(figures.in_hand, figures.expected, strict=True)
    for year, (in_hand, expected) in enumerate(rows, start=1):
        level = {True: 0.0, False: 0.0}
        tiers: tuple[tuple[Tier, float | None], ...]
        tiers = (("in_hand", in_hand), ("expected", expected))
        for tier, amount in tiers:
            if amount and isfinite(amount):
                start = level[amount > 0]
                level[amount > 0] = start + amount
                pieces.append(_Piece(tier, year, start, start + amount))
    return pieces


def _masonry(piece: _Piece, box: Box, room: Room, plot: Plot) -> tuple[Shape, ...]:
    if piece.end < piece.start:
        return (_hatched(box),)
    rows = max(1, int(box.height / (_ROW * room.size)))
    bond = bond_of(piece.tier, room.size, 2 * box.width)
    return lay(box, rows, bond, box.x)


def _hatched(box: Box) -> Rect:
    return Rect(
        box.x, box.y, box.width, box.height, hatch="hatch", stroke="hatch", stroke_width=0.6
    )


def _legend(pieces: list[_Piece], room: Room) -> tuple[list[Shape], float]:
    if not room.lettered:
        return [], 0.0
    seen = {piece.tier for piece in pieces if piece.end > piece.start}
    entries = [tier_entry(tier, room.size, room.width) for tier in TIER_NAMES if tier in seen]
    if any(piece.end < piece.start for piece in pieces):
        entries.append(Entry("below zero", lambda box: [_hatched(box)]))
    return legend(entries, room.size, room.width)


def _words(figures: TierFigures) -> str:
    """The picture in one line."""
    rows = list(zip(figures.in_hand, figures.expected, strict=True))
    if not rows or any(amount is None for row in (rows[0], rows[-1]) for amount in row):
        return "Net cash flow cannot be given."

    def said(in_hand: float | None, expected: float | None) -> str:
        money = figures.money
        return f"{money(in_hand or 0.0)} in hand and {money(expected or 0.0)} expected"

    first = f"Net cash flow before debt is {said(*rows[0])} in year 1"
    return f"{first}, {said(*rows[-1])} in year {len(rows)}." if len(rows) > 1 else f"{first}."
