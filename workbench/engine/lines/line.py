"""The declaration of a line: what it is, how it is computed, when it cannot be given."""

from dataclasses import dataclass
from typing import Literal, TypeAlias

from workbench.engine.formula import Compare, Formula

Per: TypeAlias = Literal["month", "year", "date", "once"]


@dataclass(frozen=True)
class Output:
    """One array that a kernel returns, and the formulas the kernel is given."""

    kernel: str
    name: str
    arguments: tuple[Formula, ...]


Unless: TypeAlias = tuple[Compare, str]
"""A condition and the code of the reason why the figure cannot be given where it holds."""


@dataclass(frozen=True)
class Declared:
    """A line of the plan. Amounts are signed as they add up: deductions are negative.

    `unless` is looked through in order. `source` names the book or standard that the definition
    follows.
    """

    key: str
    label: str
    unit: str
    per: Per
    definition: str
    body: Formula | Output
    unless: tuple[Unless, ...] = ()
    source: str = "common practice, no source"
    sign: Literal[1, -1] = 1
    standing: bool = False
    """A balance: the figure of a year is the one at its end, not a sum."""
