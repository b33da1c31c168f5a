"""The memo's first page: the answer, the key figures beside the value wall, and who made it."""

from dataclasses import dataclass, replace
from math import inf

from workbench.charts.shapes import Picture
from workbench.charts.wall import draw_wall
from workbench.report import sheet
from workbench.report.blocks import column_slabs
from workbench.report.cautions import parties
from workbench.report.document import (
    Block,
    Column,
    Document,
    Figure,
    KeyFigures,
    Section,
    SideBySide,
    Table,
)
from workbench.report.key_figures import key_figures, tier_table
from workbench.report.layout import lay_out
from workbench.report.readings import Readings
from workbench.report.slabs import stack_height
from workbench.report.voice import Voice
from workbench.report.wall_figures import wall_figures
from workbench.report.wording import lead

_LEFT_SHARE = 0.5
_LOWEST_WALL = 330.0
_WALL_LETTERS = 8.6


@dataclass(frozen=True)
class _Setting:
    """Extra height for each key figure, and lines for each text on who and what for."""

    air: float
    lines: int


_SETTINGS = (
    _Setting(6.0, 2), _Setting(3.0, 2), _Setting(1.0, 2), _Setting(-1.0, 2),
    _Setting(1.0, 1), _Setting(-1.0, 1), _Setting(-3.0, 1),
)  # fmt: skip
"""From the airiest to the tightest; the first that fits one sheet is taken."""


def first_page(document: Document, read: Readings, voice: Voice) -> tuple[Section, ...]:
    """The sections of the first page, set as airily as the sheet of the document allows."""
    choices = [_sections(document, read, voice, setting) for setting in _SETTINGS]
    return next((some for some in choices if _fits(document, some)), choices[-1])


def _fits(document: Document, sections: tuple[Section, ...]) -> bool:
    return len(lay_out(replace(document, sections=sections))) == 1


def _sections(
    document: Document, read: Readings, voice: Voice, setting: _Setting
) -> tuple[Section, ...]:
    left_room, right_room = sheet.columns(sheet.sheet_of(document.paper).column, _LEFT_SHARE)
    chosen = KeyFigures(key_figures(read, voice), setting.air)
    left: tuple[Block, ...] = (chosen, tier_table(read, voice))
    beside = stack_height(column_slabs(left, left_room, inf))
    tall = max(beside, _LOWEST_WALL)
    wall = Figure(wall_of(read, voice, right_room, tall))
    columns = (Column("", share=0.2), Column("", share=0.8))
    who = Table(columns, parties(voice.deal.about, voice.locale), most_lines=setting.lines)
    return (
        Section("", (lead(read, voice), SideBySide(left, (wall,), _LEFT_SHARE))),
        Section("By whom, for whom and what for", (who,), together=True),
    )


def wall_of(read: Readings, voice: Voice, width: float, height: float) -> Picture:
    """The value wall of a deal's figures."""
    return draw_wall(wall_figures(read, voice), width, height, _WALL_LETTERS)
