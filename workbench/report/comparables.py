"""Comparables: lettings and sales elsewhere, as entered."""

from workbench.deal.records import Comparable
from workbench.report.document import Block, Column, Section, Subheading, Table
from workbench.report.evidence import sale_yield
from workbench.report.rents import rent_text
from workbench.report.typed import amount_text
from workbench.report.voice import Voice
from workbench.text.numbers import MISSING

_MOST_LINES = 4


def comparable_sections(voice: Voice) -> tuple[Section, ...]:
    """A table of lettings and a table of sales; nothing where there are none."""
    blocks: list[Block] = []
    for kind, title, table in (("rent", "Lettings", _lettings), ("sale", "Sales", _sales)):
        found = [one for one in voice.deal.comparables if one.kind == kind]
        if found:
            blocks += [Subheading(title), table(voice, found)]
    return (Section("Comparables", tuple(blocks)),) if blocks else ()


def _lettings(voice: Voice, found: list[Comparable]) -> Table:
    columns = (
        Column("Date", fit=True),
        Column("Place", share=1.2),
        Column("Area", "right", fit=True),
        Column("Rent", "right", fit=True),
        Column("Source"),
    )
    rows = tuple((*_place(voice, one), rent_text(voice, one.rent), _source(one)) for one in found)
    return Table(columns, rows, most_lines=_MOST_LINES, fine=True)


def _sales(voice: Voice, found: list[Comparable]) -> Table:
    columns = (
        Column("Date", fit=True),
        Column("Place", share=1.2),
        Column("Area", "right", fit=True),
        Column(f"Price, {voice.unit()}", "right", fit=True),
        Column("Net operating income", "right", fit=True),
        Column("Yield", "right", fit=True),
        Column("Source"),
    )
    rows = tuple(_sale(voice, one) for one in found)
    notes = tuple(one.noi_basis.strip() for one in found)
    return Table(columns, rows, most_lines=_MOST_LINES, notes=notes, fine=True)


def _sale(voice: Voice, one: Comparable) -> tuple[str, ...]:
    found = sale_yield(one)
    rate = MISSING if found is None else amount_text(voice, "fraction", found, 2)
    amounts = (voice.money(one.price), voice.money(one.noi), rate)
    return (*_place(voice, one), *amounts, _source(one))


def _place(voice: Voice, one: Comparable) -> tuple[str, str, str]:
    return voice.day(one.date), one.place.strip() or MISSING, voice.area(one.area)


def _source(one: Comparable) -> str:
    return one.source.strip() or "not stated"
