"""The purchase memo: one designed page with the answer, one with the words and the cautions."""

from collections.abc import Mapping
from dataclasses import replace
from typing import Any

from workbench.charts.lettering import MARK, lacking
from workbench.deal.deal import Deal
from workbench.report.cautions import FOOT, NOT_STATED, full_cautions, parties
from workbench.report.document import Column, Document, Paper, Section, Table, plain, texts
from workbench.report.first_page import first_page
from workbench.report.gaps import gap_sections
from workbench.report.key_figures import measures
from workbench.report.readings import Readings
from workbench.report.voice import Voice
from workbench.report.wording import rests_on
from workbench.text.locale import Locale
from workbench.text.numbers import day

_SHORT_TEXT = 150
"""Up to so many characters a text on the first page is shown whole there."""


def build(
    deal: Deal, figures: Mapping[str, Any], locale: Locale, paper: Paper | None = None
) -> Document:
    """The memo of a deal, on the paper of its locale unless another is asked for.

    `figures` are those of `figures --json`, of which any may be missing.
    """
    read, voice = Readings(figures), Voice(deal, locale)
    about = deal.about
    document = Document(
        kind="Purchase memo",
        title=_one_line(deal.property.name) or "Property without a name",
        subtitle=_subtitle(deal, voice),
        author=about.prepared_by,
        dated=day(about.prepared_on, locale) if about.prepared_on else f"date {NOT_STATED}",
        foot=FOOT,
        sections=(),
        paper=paper or locale.paper,
    )
    sections = (*first_page(document, read, voice), *_second_page(deal, read, voice))
    document = replace(document, sections=sections)
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
