"""Formulas: small expression trees over lines, inputs and compiled data.

The tree admits only what a row of a spreadsheet can print: each node is either cell by cell, or a
named look along the row (running sums, the cell before, the sum of a year). Three kinds of row:
months 1…492, years 1…41 and dates 0…492 (closing and each month's end); a single figure stands for
every cell.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, fields
from typing import Literal, TypeAlias

Along: TypeAlias = Literal[
    "running_sum",  # this cell and all before it
    "running_product",
    "running_least",
    "later_sum",  # all cells after this one
    "following",  # the next cell; the last one has nothing to follow and holds 0
    "year_sum",  # twelve months to their year
    "year_end",  # the last month of each year
    "of_year",  # a year's figure in each of its months
    "month_starts",  # each month's figure on the date it begins; nothing on the last date
    "over_dates",  # the sum of all dates
]
Sign: TypeAlias = Literal["+", "−", "×", "÷", "^", "least", "greatest"]
Comparison: TypeAlias = Literal["<", "≤", "=", ">"]


@dataclass(frozen=True)
class Formula:
    """A node; the operators build bigger ones."""

    def __add__(self, other: Operand) -> Formula:
        return _pair("+", self, other)

    def __radd__(self, other: Operand) -> Formula:
        return _pair("+", other, self)

    def __sub__(self, other: Operand) -> Formula:
        return _pair("−", self, other)

    def __rsub__(self, other: Operand) -> Formula:
        return _pair("−", other, self)

    def __mul__(self, other: Operand) -> Formula:
        return _pair("×", self, other)

    def __rmul__(self, other: Operand) -> Formula:
        return _pair("×", other, self)

    def __truediv__(self, other: Operand) -> Formula:
        return _pair("÷", self, other)

    def __rtruediv__(self, other: Operand) -> Formula:
        return _pair("÷", other, self)

    def __pow__(self, other: Operand) -> Formula:
        return _pair("^", self, other)

    def __neg__(self) -> Formula:
        return _pair("−", 0, self)

    def __lt__(self, other: Operand) -> Compare:
        return Compare("<", self, formula(other))

    def __le__(self, other: Operand) -> Compare:
        return Compare("≤", self, formula(other))

    def __gt__(self, other: Operand) -> Compare:
        return Compare(">", self, formula(other))

    def is_(self, other: Operand) -> Compare:
        """Equal, cell by cell."""
        return Compare("=", self, formula(other))

    def parts(self) -> Iterator[Formula]:
        """The nodes directly below."""
        for spec in fields(self):
            value = getattr(self, spec.name)
            if isinstance(value, Formula):
                yield value

    def leaves(self) -> Iterator[Line | Given | Fact]:
        """Every line, input and fact below, in reading order, repeats included."""
        if isinstance(self, Line | Given | Fact):
            yield self
        for part in self.parts():
            yield from part.leaves()


Operand: TypeAlias = Formula | float | int


def formula(operand: Operand) -> Formula:
    return operand if isinstance(operand, Formula) else Number(float(operand))


@dataclass(frozen=True)
class Number(Formula):
    value: float


@dataclass(frozen=True)
class Line(Formula):
    """Another line of the plan, by key."""

    key: str


@dataclass(frozen=True)
class Given(Formula):
    """An input, by key path."""

    path: str


@dataclass(frozen=True)
class Fact(Formula):
    """What compiling the rent roll, the works or the calendar made, by name."""

    name: str


@dataclass(frozen=True)
class Pair(Formula):
    sign: Sign
    left: Formula
    right: Formula


def _pair(sign: Sign, left: Operand, right: Operand) -> Formula:
    """A pair, left out where it would say nothing: nothing added, once times, 0 less 0."""
    left, right = formula(left), formula(right)
    if right == Number(0.0) and sign in "+−":
        return left
    if left == Number(0.0) and sign == "+":
        return right
    if left == Number(1.0) and sign == "×":
        return right
    if right == Number(1.0) and sign in "×÷":
        return left
    return Pair(sign, left, right)


@dataclass(frozen=True)
class Compare(Formula):
    sign: Comparison
    left: Formula
    right: Formula


@dataclass(frozen=True)
class Where(Formula):
    """One of two. A figure that cannot be given makes the condition false, so what must not hide
    it stands in `no`."""

    condition: Compare
    yes: Formula
    no: Formula


@dataclass(frozen=True)
class Look(Formula):
    """A look along the row."""

    along: Along
    of: Formula


@dataclass(frozen=True)
class Before(Formula):
    """The cell before; the first cell has `first`."""

    of: Formula
    first: Formula


@dataclass(frozen=True)
class AtYear(Formula):
    """The one cell of a year."""

    of: Formula
    year: Formula


@dataclass(frozen=True)
class OnDates(Formula):
    """A row of months set on dates: `first` at closing, each month's figure at its end."""

    of: Formula
    first: Formula


@dataclass(frozen=True)
class FirstDate(Formula):
    """The first date whose cell is not negative, in years from closing."""

    of: Formula


@dataclass(frozen=True)
class OnDate(Formula):
    """One figure set on one date, counted in months from closing; 0 on every other date."""

    of: Formula
    month: Formula


def least(left: Operand, right: Operand) -> Formula:
    return Pair("least", formula(left), formula(right))


def greatest(left: Operand, right: Operand) -> Formula:
    return Pair("greatest", formula(left), formula(right))


def where(condition: Compare, yes: Operand, no: Operand) -> Formula:
    return Where(condition, formula(yes), formula(no))


def total(parts: list[Formula]) -> Formula:
    """The sum of any number of formulas; 0 of none."""
    if not parts:
        return Number(0.0)
    first, *rest = parts
    for part in rest:
        first = first + part
    return first


def running_sum(of: Formula) -> Formula:
    return Look("running_sum", of)


def running_product(of: Formula) -> Formula:
    return Look("running_product", of)


def running_least(of: Formula) -> Formula:
    return Look("running_least", of)


def later_sum(of: Formula) -> Formula:
    return Look("later_sum", of)


def following(of: Formula) -> Formula:
    return Look("following", of)


def year_sum(of: Formula) -> Formula:
    return Look("year_sum", of)


def year_end(of: Formula) -> Formula:
    return Look("year_end", of)


def of_year(of: Formula) -> Formula:
    return Look("of_year", of)


def month_starts(of: Formula) -> Formula:
    return Look("month_starts", of)


def over_dates(of: Formula) -> Formula:
    return Look("over_dates", of)


def before(of: Formula, first: Operand) -> Formula:
    return Before(of, formula(first))


HOLD = Given("leave.hold")


def at_hold(of: Formula) -> Formula:
    """The figure of the last year of the hold."""
    return AtYear(of, HOLD)


def at_year(of: Formula, year: int) -> Formula:
    return AtYear(of, Number(float(year)))
