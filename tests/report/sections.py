"""Ways to read sections of a document, and deals to make them of."""

from collections.abc import Iterator
from typing import Any

from tests.fullest import fullest_raw
from workbench.deal.deal import Deal
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.files.deal_file import deal_from_raw
from workbench.report.document import (
    Block,
    Paragraph,
    Section,
    SideBySide,
    Subheading,
    Table,
    YearLine,
    YearTable,
)
from workbench.report.readings import Readings
from workbench.report.record import record
from workbench.report.voice import Voice
from workbench.report.years import Years
from workbench.text.locale import LOCALES

US = LOCALES["en-US"]


def voice_of(deal: Deal, code: str = "en-US") -> Voice:
    return Voice(deal, LOCALES[code])


def years_of(deal: Deal, code: str = "en-US") -> Years:
    result = evaluate(compile_deal(deal))
    return Years(result, voice_of(deal, code), deal.leave.hold or 0)


def read_of(years: Years) -> Readings:
    return Readings(record(years.result))


def changed(raw: dict[str, Any] | None = None, **sections: Any) -> Deal:
    """The fullest deal, or another, with some sections changed."""
    base = fullest_raw() if raw is None else raw
    for name, change in sections.items():
        base[name] = base.get(name, {}) | change if isinstance(change, dict) else change
    return deal_from_raw(base)


def blocks(section: Section) -> Iterator[Block]:
    """All blocks, those side by side one after the other."""
    for block in section.blocks:
        if isinstance(block, SideBySide):
            yield from (*block.left, *block.right)
        else:
            yield block


def tables(section: Section) -> list[Table]:
    return [block for block in blocks(section) if isinstance(block, Table)]


def year_tables(section: Section) -> list[YearTable]:
    return [block for block in blocks(section) if isinstance(block, YearTable)]


def words(section: Section) -> list[str]:
    return [
        "".join(run.text for run in block.runs)
        for block in blocks(section)
        if isinstance(block, Paragraph)
    ]


def subheadings(section: Section) -> list[str]:
    return [block.text for block in blocks(section) if isinstance(block, Subheading)]


def named(table: Table, label: str) -> tuple[str, ...]:
    return next(row for row in table.rows if row[0] == label)


def line(table: YearTable, label: str) -> YearLine:
    return next(found for found in table.lines if found.label == label)
