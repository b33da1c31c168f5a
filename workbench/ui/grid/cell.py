"""One cell of a grid as it is painted."""

from dataclasses import dataclass
from typing import Literal, TypeAlias

Kind: TypeAlias = Literal[
    "band", "typed", "following", "unset", "figure", "strong", "missing", "entry"
]
Mark: TypeAlias = Literal["", "draft", "issue"]

FOLLOWS = "·\u00a0"
"""Stands before a value that follows the year before, or the row above."""


@dataclass(frozen=True)
class Cell:
    """Its text, what kind of content it is, and whether something is wrong there."""

    text: str
    kind: Kind
    mark: Mark = ""
    left: bool = False
    """Whether the text stands at the left, as words do."""
