"""The purchase memo: one designed page with the answer, one with the words and the cautions."""

from collections.abc import Mapping
from dataclasses import replace
from typing import Any

from workbench.charts.lettering import MARK, lacking, shorten
from workbench.charts.shapes import Picture
from workbench.charts.wall import WallFigures, draw_wall
from workbench.deal.deal import Deal
from workbench.report import sheet
from workbench.report.blocks import column_slabs
from workbench.report.cautions import FOOT, NOT_STATED, full_cautions, parties
from workbench.report.document import (
    Block,
    Column,
    Document,
    Figure,
    KeyFigures,
    Paper,
    Section,
    SideBySide,
    Table,
    plain,
    texts,
)
from workbench.report.gaps import gap_sections
from workbench.report.key_figures import key_figures, measures, tier_table
from workbench.report.readings import Readings
from workbench.report.slabs import stack_height
from workbench.report.voice import Voice
from workbench.report.wording import lead, rests_on, sentence
from workbench.text.locale import Locale
from workbench.text.numbers import day

_LEFT_SHARE = 0.5
_AIR: dict[Paper, float] = {"a4": 5.5, "letter": 1.0}
"""What the longer sheet has room for between the key figures."""
_WALL_HEIGHTS = (330.0, 470.0)
_WALL_LETTERS = 8.6
_REASON_ROOM = 75.0
"""How much of a reason the wall shows, as a width in letter sizes."""
_SHORT_TEXT = 150
"""Up to so many characters a text on the first page is shown whole there."""


def build(deal: Deal, figures: Mapping[str, Any], locale: Locale) -> Document:
    """The memo of a deal; `figures` are those of `figures --json`, of which any may be missing."""
    read, voice = Readings(figures), Voice(deal, locale)
    about = deal.about
    dated = day(about.prepared_on, locale) if about.prepared_on else f"date {NOT_STATED}"
    document = Document(
        kind="Purchase memo",
        title=_one_line(deal.property.name) or "Property without a name",
        subtitle=_subtitle(deal, voice),
        author=about.prepared_by,
        dated=dated,
        foot=FOOT,
        sections=(*_first_page(deal, read, voice), *_second_page(deal, read, voice)),
        paper=locale.paper,
    )
    return _with_mark_explained(document) if lacking("".join(texts(document))) else document


def _with_mark_explained(document: Document) -> Document:
    """Say what the mark means that is printed for characters which the font lacks."""
    *others, last = document.sections
    note = plain(f"{MARK} stands for a character that the letters used here do not have.", "small")
    return replace(document, sections=(*others, replace(last, blocks=(*last.blocks, note))))


def _first_page(deal: Deal, read: Readings, voice: Voice) -> tuple[Section, ...]:
    paper = sheet.sheet_of(voice.locale.paper)
    left_room, right_room = sheet.columns(paper.column, _LEFT_SHARE)
    chosen = KeyFigures(key_figures(read, voice), _AIR[voice.locale.paper])
    left: tuple[Block, ...] = (chosen, tier_table(read, voice))
    low, high = _WALL_HEIGHTS
    tall = min(max(stack_height(column_slabs(left, left_room, high)), low), high)
    wall = Figure(draw_wall_of(deal, read, voice, right_room, tall))
    who = Table(
        (Column("", share=0.2), Column("", share=0.8)),
        parties(deal.about, voice.locale),
        most_lines=2,
    )
    return (
        Section("", (lead(read, voice), SideBySide(left, (wall,), _LEFT_SHARE))),
        Section("By whom, for whom and what for", (who,), together=True),
    )


def draw_wall_of(deal: Deal, read: Readings, voice: Voice, width: float, height: float) -> Picture:
    """The value wall of a deal's figures."""
    courses = read.courses()
    exit_value = None if courses is None else read.number("exit.present_value")
    reason = read.reason("exit.present_value", "exit.price", "stack", "value")
    figures = WallFigures(
        courses=courses or (),
        exit=exit_value,
        value=read.number("value"),
        price=read.number("price"),
        exit_share=read.number("exit_value_share"),
        money=voice.short_money,
        share=voice.share,
        has_leases=any(space.leases for space in deal.spaces),
        exit_reason=shorten(sentence(reason), 1.0, _REASON_ROOM),
    )
    return draw_wall(figures, width, height, _WALL_LETTERS)


def _second_page(deal: Deal, read: Readings, voice: Voice) -> tuple[Section, ...]:
    words = rests_on(read, voice)
    sections = [Section("What value and price rest on", words)] if words else []
    sections.append(Section("The figures behind it", (measures(read, voice),), together=True))
    sections += gap_sections(deal, read)
    details = _details(deal, voice)
    if details:
        columns = (Column("", share=0.2), Column("", share=0.8))
        sections.append(Section("The deal in full", (Table(columns, details),)))
    sections.append(Section("Cautions", full_cautions(), together=True))
    return (replace(sections[0], new_page=True), *sections[1:])


def _details(deal: Deal, voice: Voice) -> tuple[tuple[str, str], ...]:
    """The texts of the deal, and those of the first page that may have been cut there."""
    estate = deal.property
    whole = [("Name", estate.name), ("Place", estate.place), ("Kind", estate.kind)]
    whole += parties(deal.about, voice.locale)
    rows = [(label, text) for label, text in whole if len(text) > _SHORT_TEXT or "\n" in text]
    rows += [("Description", estate.description), ("Notes", estate.notes)]
    return tuple((label, text.strip()) for label, text in rows if text.strip())


def _subtitle(deal: Deal, voice: Voice) -> str:
    estate = deal.property
    built = f"built {estate.year_built}" if estate.year_built else ""
    parts = (estate.place, estate.kind, voice.size(), built)
    return " · ".join(_one_line(part) for part in parts if part.strip())


def _one_line(text: str) -> str:
    return " ".join(text.split())
