"""The value stack as heights: what stands on what, from the ground or from the trench's bottom."""

from collections.abc import Callable
from dataclasses import dataclass
from typing import Literal, TypeAlias

Tier: TypeAlias = Literal["in_hand", "expected", "exit"]


@dataclass(frozen=True)
class WallCourse:
    """The present value of one year's net cash flow, by tier."""

    year: int
    in_hand: float
    expected: float


@dataclass(frozen=True)
class WallFigures:
    """What the value wall shows. `money` and `share` put a figure into the reader's locale."""

    courses: tuple[WallCourse, ...]
    exit: float | None
    value: float | None
    price: float | None
    exit_share: float | None
    money: Callable[[float], str]
    share: Callable[[float], str]
    has_leases: bool = True
    exit_reason: str = ""
    """Why there is no exit price, where there is none; as much as a reader needs, in words."""


@dataclass(frozen=True)
class Piece:
    """What one tier puts on the wall: the amount of a year, or of the exit."""

    tier: Tier
    year: int
    amount: float

    @property
    def key(self) -> str:
        return "exit" if self.tier == "exit" else f"{self.tier}.{self.year}"


@dataclass(frozen=True)
class Course:
    """Pieces side by side between two heights in money: one year's, or the exit alone."""

    year: int
    low: float
    high: float
    pieces: tuple[Piece, ...]

    @property
    def is_exit(self) -> bool:
        return self.pieces[0].tier == "exit"


@dataclass(frozen=True)
class Stack:
    """The whole wall: courses from the bottom up, and the trench from the ground down."""

    courses: tuple[Course, ...]
    trench: tuple[Course, ...]

    @property
    def depth(self) -> float:
        return -self.trench[-1].low if self.trench else 0.0

    @property
    def top(self) -> float:
        return self.courses[-1].high if self.courses else -self.depth


def stack_of(figures: WallFigures) -> Stack:
    """Pieces below zero go down from the ground; the rest is stacked from where they end."""
    pieces: list[Piece] = []
    for course in figures.courses:
        pieces.append(Piece("in_hand", course.year, course.in_hand))
        pieces.append(Piece("expected", course.year, course.expected))
    last = max((course.year for course in figures.courses), default=0)
    pieces.append(Piece("exit", last + 1, figures.exit or 0.0))
    trench: list[Course] = []
    level = 0.0
    for piece in pieces:
        if piece.amount < 0:
            trench.append(Course(piece.year, level + piece.amount, level, (piece,)))
            level += piece.amount
    return Stack(_courses(pieces, level), tuple(trench))


def _courses(pieces: list[Piece], level: float) -> tuple[Course, ...]:
    courses: list[Course] = []
    for year in dict.fromkeys(piece.year for piece in pieces):
        above = tuple(piece for piece in pieces if piece.year == year and piece.amount > 0)
        if above:
            high = level + sum(piece.amount for piece in above)
            courses.append(Course(year, level, high, above))
            level = high
    return tuple(courses)
