"""Sizes of paper, margins and letters: the one place that says how a page looks."""

from dataclasses import dataclass

from workbench.charts.lettering import LEADING
from workbench.report.document import Look, Paper

PAPERS: dict[Paper, tuple[float, float]] = {"a4": (595.28, 841.89), "letter": (612.0, 792.0)}
"""Width and height in points."""

SIDE = 52.0
TOP = 44.0
BOTTOM = 34.0
COLUMN_GAP = 24.0

TITLE = 22.0
SUBTITLE = 10.5
HEADING = 12.0
KEY_VALUE = 14.0
KEY_VALUE_STRONG = 18.0
NOTE = 7.8
FINE_NOTE = 6.9
CELL = 8.8
FINE = 7.4
SUBHEADING = 9.6
FOOT = 7.0
LOOKS: dict[Look, float] = {"lead": 11.5, "body": 9.4, "small": 8.4}

CELL_GAP = 10.0
FINE_GAP = 6.0

PARAGRAPH_SPACE = 5.0
BLOCK_SPACE = 8.0
SUBHEADING_SPACE = 13.0
UNDER_SUBHEADING = 2.0
SECTION_SPACE = 15.0


@dataclass(frozen=True)
class Sheet:
    """A sheet of paper and the column of text on it."""

    width: float
    height: float

    @property
    def column(self) -> float:
        return self.width - 2 * SIDE


def sheet_of(paper: Paper) -> Sheet:
    """The sheet of a size of paper."""
    return Sheet(*PAPERS[paper])


def columns(room: float, share: float) -> tuple[float, float]:
    """Widths of two columns with the gap between them."""
    left = (room - COLUMN_GAP) * share
    return left, room - COLUMN_GAP - left


def line_height(size: float) -> float:
    """From one baseline to the next; long text is set a little wider than labels."""
    return size * (LEADING + 0.1)
