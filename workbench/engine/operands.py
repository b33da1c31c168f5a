"""The pieces of a working: operands, the cells behind them, and expressions over their numbers."""

from dataclasses import dataclass, field
from typing import Literal, TypeAlias

from workbench.engine import formula as f

Kind: TypeAlias = Literal["line", "input", "fact", "cells"]
How: TypeAlias = Literal["one", "sum", "product", "least", "first"]
Span: TypeAlias = Literal["year", "month", "date", "once"]


@dataclass(frozen=True)
class Cell:
    """One of several figures behind an operand: when, or of which lease, and what it is."""

    key: str
    at: int | None
    value: float
    parts: tuple[tuple[str, float], ...] = ()


@dataclass(frozen=True)
class Operand:
    """What an expression names by number. `at` is a year or month from 1, or a date from 0."""

    kind: Kind
    key: str
    span: Span
    at: int | None
    value: float
    how: How = "one"
    cells: tuple[Cell, ...] = ()
    of: f.Formula | None = field(default=None, compare=False, repr=False)


@dataclass(frozen=True)
class Ref:
    """The place of an operand in an expression, from 1."""

    number: int


Token: TypeAlias = str | float | Ref
