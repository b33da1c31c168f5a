"""A document as plain data: what is said, in order. How it is drawn is the drawer's matter."""

from collections.abc import Iterator
from dataclasses import dataclass, fields, is_dataclass
from typing import Literal, TypeAlias

from workbench.charts.shapes import Picture
from workbench.charts.wrapping import Run

Look: TypeAlias = Literal["lead", "body", "small"]
Align: TypeAlias = Literal["left", "right"]
Paper: TypeAlias = Literal["a4", "letter"]


@dataclass(frozen=True)
class Paragraph:
    """Plain text with emphasised runs; a line break in it starts a new line."""

    runs: tuple[Run, ...]
    look: Look = "body"


@dataclass(frozen=True)
class KeyFigure:
    """A figure to be seen first, with what must be read beside it."""

    label: str
    value: str
    note: str = ""
    strong: bool = False


@dataclass(frozen=True)
class KeyFigures:
    """Key figures one under the other, their values aligned; `air` is extra height for each."""

    items: tuple[KeyFigure, ...]
    air: float = 0.0


@dataclass(frozen=True)
class Column:
    """A column of a table; `share` is its part of the width, relative to the others."""

    title: str
    align: Align = "left"
    share: float = 1.0


@dataclass(frozen=True)
class Table:
    """Rows of ready text; rows whose number is in `strong` are set bold, with a rule above."""

    columns: tuple[Column, ...]
    rows: tuple[tuple[str, ...], ...]
    strong: frozenset[int] = frozenset()
    most_lines: int | None = None
    """Where set, cells are cut after so many lines, with an ellipsis."""


@dataclass(frozen=True)
class Figure:
    """A picture at the size it was laid out for."""

    picture: Picture


@dataclass(frozen=True)
class SideBySide:
    """Two columns of blocks; `share` is the left one's part of the width."""

    left: tuple["Block", ...]
    right: tuple["Block", ...]
    share: float = 0.5


Block: TypeAlias = Paragraph | KeyFigures | Table | Figure | SideBySide


@dataclass(frozen=True)
class Section:
    """Blocks under a heading, which an empty title leaves out."""

    title: str
    blocks: tuple[Block, ...]
    new_page: bool = False
    together: bool = False
    """Whether it moves to the next page as a whole rather than break."""


@dataclass(frozen=True)
class Document:
    """A whole document. `foot` is the caution that stands on every page."""

    kind: str
    title: str
    subtitle: str
    author: str
    dated: str
    foot: str
    sections: tuple[Section, ...]
    paper: Paper = "a4"


def plain(text: str, look: Look = "body") -> Paragraph:
    """A paragraph without emphasis."""
    return Paragraph((Run(text),), look)


def texts(part: object) -> Iterator[str]:
    """Every piece of text within a document or a part of it."""
    if isinstance(part, str):
        yield part
    elif isinstance(part, tuple):
        for item in part:
            yield from texts(item)
    elif is_dataclass(part):
        for field in fields(part):
            yield from texts(getattr(part, field.name))
