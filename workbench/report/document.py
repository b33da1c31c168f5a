"""A document as plain data: what is said, in order. How it is drawn is the drawer's matter."""

import datetime
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
    fit: bool = False
    """Whether it is as wide as its widest cell; the others share what is left."""


@dataclass(frozen=True)
class Table:
    """Rows of ready text; rows whose number is in `strong` are set bold, with a rule above."""

    columns: tuple[Column, ...]
    rows: tuple[tuple[str, ...], ...]
    strong: frozenset[int] = frozenset()
    most_lines: int | None = None
    """Where set, cells are cut after so many lines, with an ellipsis."""
    notes: tuple[str, ...] = ()
    """Where given, a line under each row across all columns; empty where there is none."""
    fine: bool = False
    """Whether it is set smaller, for many columns."""
    slanted: frozenset[tuple[int, int]] = frozenset()
    """Rows and columns of cells set slanting and paler."""
    whole: bool = False
    """Whether all its rows are kept on one page where they fit one."""


@dataclass(frozen=True)
class YearLine:
    """A row of a table by year. Cells whose place is in `following` repeat the year before."""

    label: str
    cells: tuple[str, ...]
    strong: bool = False
    following: frozenset[int] = frozenset()


@dataclass(frozen=True)
class YearTable:
    """A column for each year, split into as many tables as the width asks for."""

    corner: str
    """What the amounts are counted in."""
    years: tuple[str, ...]
    lines: tuple[YearLine, ...]


@dataclass(frozen=True)
class Subheading:
    """A title within a section."""

    text: str


@dataclass(frozen=True)
class Figure:
    """A picture at the size it was laid out for, and a line under it."""

    picture: Picture
    caption: str = ""


@dataclass(frozen=True)
class SideBySide:
    """Two columns of blocks; `share` is the left one's part of the width."""

    left: tuple["Block", ...]
    right: tuple["Block", ...]
    share: float = 0.5


Block: TypeAlias = Paragraph | Subheading | KeyFigures | Table | YearTable | Figure | SideBySide


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
    made_on: datetime.date | None = None
    """For the properties of the file; not the day it was written, which would differ each time."""


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
