"""The measures with what each of them means, in the words of the lines themselves."""

from collections.abc import Iterator

from workbench.engine.figures import figures_of
from workbench.report.document import Block, Column, Section, Subheading, Table
from workbench.report.key_figures import exit_share_note
from workbench.report.readings import Readings
from workbench.report.wording import sentence
from workbench.report.years import Years
from workbench.text import numbers

_LEFT_OUT = frozenset({"tiers", "exit", "loans", "sources_uses", "statement", "stack"})
"""Figures that have a section of their own."""
_RATES = ("irr", "mirr", "going_in_yield", "yield_on_cost", "debt_yield")
"""Fractions of which the second decimal matters."""
_OF_DEBT = frozenset({"dscr", "debt_yield"})
_LOWEST = frozenset({"dscr", "debt_yield", "cash_on_cash"})


def definition_section(years: Years, read: Readings) -> Section:
    """A row for each measure; those by year stand in a table of their own as well."""
    columns = (
        Column("Measure", share=0.27),
        Column("", "right", fit=True),
        Column("What it is", share=0.73),
    )
    table = Table(columns, tuple(_rows(years, read)), fine=True)
    return Section("Measures and what they mean", (table, *_by_year(years)))


def _rows(years: Years, read: Readings) -> Iterator[tuple[str, str, str]]:
    """Each line once, in the order of the record."""
    seen: set[str] = set()
    for figure in figures_of(years.voice.deal):
        known = figure.key in years.result.declared and figure.key not in seen
        of_debt = figure.place[0] in _OF_DEBT and not years.voice.deal.loans
        if not known or of_debt or figure.place[0] in _LEFT_OUT:
            continue
        seen.add(figure.key)
        declared = years.result.declared[figure.key]
        words = sentence(declared.definition)
        if figure.key == "exit_value_share":
            words += f" {sentence(exit_share_note(read, years.voice))}"
        if figure.place[0] in _LOWEST:
            value, year = _lowest(years, figure.key)
            yield f"{declared.label}, lowest", value, f"{words} {year}".strip()
        else:
            amount = years.result.figure(figure.key)
            yield declared.label, _text(years, figure.key, amount), words


def _lowest(years: Years, key: str) -> tuple[str, str]:
    known = [(value, year) for year, value in enumerate(years.line(key), 1) if value is not None]
    if not known:
        return numbers.MISSING, ""
    value, year = min(known)
    return _text(years, key, value), f"Lowest in year {year}."


def _text(years: Years, key: str, value: float | None) -> str:
    voice = years.voice
    match years.result.declared[key].unit:
        case "money":
            return voice.money(value)
        case "fraction":
            return voice.rate(value) if key.startswith(_RATES) else voice.share(value)
        case "multiple":
            return numbers.multiple(value, voice.locale)
    return numbers.number(value, voice.locale, 1)


def _by_year(years: Years) -> Iterator[Block]:
    if years.count:
        rows = [years.row("cash_of_year"), years.row("cash_on_cash", "fraction")]
        yield Subheading("Cash on cash by year")
        yield years.table(rows)
