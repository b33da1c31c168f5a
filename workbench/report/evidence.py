"""Comparables beside the assumptions that they are evidence for."""

from collections import Counter
from collections.abc import Sequence
from dataclasses import replace

from workbench.deal.checks_sections import exit_methods
from workbench.deal.earn import Rent
from workbench.deal.records import Comparable
from workbench.report.document import Column, Section, Table
from workbench.report.names import one_line
from workbench.report.readings import Readings
from workbench.report.rents import comparable, rent_unit
from workbench.report.typed import amount_text, decimals_of
from workbench.report.voice import Voice
from workbench.text.numbers import MISSING

_NONE = "none entered"


def evidence_section(read: Readings, voice: Voice) -> Section:
    """Market rent and exit yield, each with how many comparables, their range and their sources."""
    columns = (
        Column("Assumption", share=0.24),
        Column("In this deal", share=0.2),
        Column("Comparables", share=0.13),
        Column("Their range", share=0.2),
        Column("Sources", share=0.33),
    )
    rows = (_market_rent(voice), _exit_yield(read, voice))
    return Section("Evidence", (Table(columns, rows, most_lines=8, fine=True),), together=True)


def _market_rent(voice: Voice) -> tuple[str, ...]:
    """By area where areas are known, in the period that most market rents are stated for."""
    spaces = voice.deal.spaces
    periods = Counter(space.market_rent.per for space in spaces)
    by_area = any(space.area is not None or space.market_rent.of == "area" for space in spaces)
    like = Rent(None, max(periods, key=lambda per: periods[per], default="month"), "unit")
    like = replace(like, of="area") if by_area else like
    lettings = [one for one in voice.deal.comparables if one.kind == "rent"]
    used = [comparable(space.market_rent, space.area, like) for space in spaces]
    seen = [(one, comparable(one.rent, one.area, like)) for one in lettings]
    known = [(one, rent) for one, rent in seen if rent is not None]
    label = f"Market rent {rent_unit(voice, like)}"
    return _row(voice, label, _range(voice, used, "money"), known, "money", len(lettings))


def _exit_yield(read: Readings, voice: Voice) -> tuple[str, ...]:
    typed = set(exit_methods(voice.deal)) & {"forward_noi", "trailing_noi"}
    used = voice.deal.leave.exit_yield if typed else read.number("exit.yield")
    sales = [one for one in voice.deal.comparables if one.kind == "sale"]
    known = [(one, rate) for one in sales if (rate := sale_yield(one)) is not None]
    label = "Exit yield" if typed else "Yield that the exit price comes to"
    return _row(voice, label, voice.rate(used), known, "fraction", len(sales))


def sale_yield(sale: Comparable) -> float | None:
    """The yield stated for a sale, or else its income by its price."""
    if sale.income_yield is not None:
        return sale.income_yield
    return sale.noi / sale.price if sale.noi is not None and sale.price else None


def _row(
    voice: Voice,
    label: str,
    used: str,
    known: Sequence[tuple[Comparable, float]],
    unit: str,
    entered: int,
) -> tuple[str, ...]:
    if not entered:
        return label, used, _NONE, "", ""
    count = voice.count(len(known))
    if len(known) < entered:
        count = f"{count} of {voice.count(entered)} that can be compared"
    sources = dict.fromkeys(one_line(one.source) or "no source" for one, _ in known)
    return label, used, count, _range(voice, [at for _, at in known], unit), "; ".join(sources)


def _range(voice: Voice, values: Sequence[float | None], unit: str) -> str:
    known = [value for value in values if value is not None]
    if not known:
        return MISSING

    decimals = 2 if unit == "fraction" else min(2, decimals_of(voice, unit, known))

    def said(value: float) -> str:
        return amount_text(voice, unit, value, decimals)

    low, high = said(min(known)), said(max(known))
    return low if low == high else f"{low} to {high}"
