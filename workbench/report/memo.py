"""The purchase memo: the answer on one designed page, what it rests on, and all the working."""

from dataclasses import replace

from workbench.charts.lettering import MARK, lacking
from workbench.deal.deal import Deal
from workbench.engine.result import Result
from workbench.report import sheet
from workbench.report.assumptions import assumption_section
from workbench.report.cautions import FOOT, NOT_STATED, full_cautions, parties
from workbench.report.closing import closing_section
from workbench.report.comparables import comparable_sections
from workbench.report.definitions import definition_section
from workbench.report.document import Column, Document, Paper, Section, Table, plain, texts
from workbench.report.evidence import evidence_section
from workbench.report.first_page import first_page
from workbench.report.gaps import gap_sections
from workbench.report.key_figures import measures
from workbench.report.leaving import exit_section
from workbench.report.loans import loan_section
from workbench.report.names import one_line
from workbench.report.readings import Readings
from workbench.report.record import record
from workbench.report.rent_roll import roll_section
from workbench.report.reported import statement_sections
from workbench.report.statement import statement_section
from workbench.report.tiers import tier_section
from workbench.report.voice import Voice
from workbench.report.withheld import shareable
from workbench.report.wording import rests_on
from workbench.report.years import Years
from workbench.text.locale import Locale
from workbench.text.numbers import day

_SHORT_TEXT = 150
"""Up to so many characters a text on the first page is shown whole there."""


def build(result: Result, locale: Locale, paper: Paper | None = None) -> Document:
    """The memo of a computed deal, on the paper of its locale unless another is asked for."""
    told = shareable(result)
    read, voice = Readings(record(told)), Voice(told.plan.deal, locale)
    column = sheet.sheet_of(paper or locale.paper).column
    return compose(read, voice, paper or locale.paper, _working(told, read, voice, column))


def compose(read: Readings, voice: Voice, paper: Paper, working: tuple[Section, ...]) -> Document:
    """The answer and what it rests on, then the working, then the cautions."""
    deal, about = voice.deal, voice.deal.about
    stated = about.prepared_on
    document = Document(
        kind="Purchase memo",
        title=one_line(deal.property.name) or "Property without a name",
        subtitle=_subtitle(deal, voice),
        author=about.prepared_by,
        dated=day(stated, voice.locale) if stated else f"date {NOT_STATED}",
        foot=FOOT,
        sections=(),
        paper=paper,
        made_on=stated,
    )
    cautions = Section("Cautions", full_cautions(), together=True)
    opening = (*first_page(document, read, voice), *_second_page(deal, read, voice))
    document = replace(document, sections=(*opening, *working, cautions))
    return _with_mark_explained(document) if lacking("".join(texts(document))) else document


def _with_mark_explained(document: Document) -> Document:
    """Say what the mark means that is printed for characters which the font lacks."""
    *others, last = document.sections
    note = plain(f"{MARK} stands for a character that the letters used here do not have.", "small")
    return replace(document, sections=(*others, replace(last, blocks=(*last.blocks, note))))


def _second_page(deal: Deal, read: Readings, voice: Voice) -> tuple[Section, ...]:
    words = rests_on(read, voice)
    sections = [Section("What value and price rest on", words)] if words else []
    sections.append(Section("The figures behind it", (measures(read, voice),), together=True))
    sections += gap_sections(deal, read)
    details = _details(deal, voice)
    if details:
        columns = (Column("", share=0.2), Column("", share=0.8))
        sections.append(Section("The deal in full", (Table(columns, details),)))
    return (replace(sections[0], new_page=True), *sections[1:])


def _working(result: Result, read: Readings, voice: Voice, column: float) -> tuple[Section, ...]:
    """All the sections behind the first two pages."""
    years = Years(result, voice, read.hold or 0)
    return (
        closing_section(read, voice),
        *tier_section(years, read, column),
        assumption_section(years),
        evidence_section(read, voice),
        *roll_section(voice),
        statement_section(years, column),
        exit_section(years),
        *loan_section(years, column),
        definition_section(years, read),
        *statement_sections(years),
        *comparable_sections(voice),
    )


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
    return " · ".join(one_line(part) for part in parts if part.strip())
