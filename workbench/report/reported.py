"""Reported statements: as the source has them, adjusted with reasons, and as normalised."""

from workbench.deal.records import Statement, StatementLine
from workbench.report.document import Block, Column, Section, Subheading, Table, plain
from workbench.report.names import item_title, line_title
from workbench.report.voice import Voice
from workbench.report.years import Years
from workbench.text.choices import choice
from workbench.text.numbers import MISSING


def statement_sections(years: Years) -> tuple[Section, ...]:
    """A table for each statement; nothing where none was entered."""
    blocks: list[Block] = []
    for statement in years.voice.deal.statements:
        blocks.append(Subheading(item_title(statement, "statements")))
        blocks.append(plain(_origin(years.voice, statement), "small"))
        if statement.lines:
            blocks.append(_table(years, statement, _year_beside(years, statement)))
    return (Section("Reported statements", tuple(blocks)),) if blocks else ()


def _origin(voice: Voice, statement: Statement) -> str:
    parts = [choice("kind", statement.kind).capitalize()]
    if statement.start or statement.end:
        parts.append(f"{voice.day(statement.start)} to {voice.day(statement.end)}")
    parts.append(f"source: {statement.source.strip() or 'not stated'}")
    return "; ".join(parts)


def _year_beside(years: Years, statement: Statement) -> int:
    """The deal year in which the statement begins; the first where it begins before closing."""
    closing, start = years.voice.deal.purchase.closing_date, statement.start
    if closing is None or start is None:
        return 1
    months = 12 * (start.year - closing.year) + start.month - closing.month
    year = months // 12 + 1
    return year if 1 <= year <= years.count else 1


def _table(years: Years, statement: Statement, year: int) -> Table:
    """Each line beside what this deal assumes for it; its reason stands under it."""
    voice = years.voice
    columns = (
        Column(f"As the source calls it, {voice.unit()}", share=1.0),
        Column("Line here", share=0.8),
        *(Column(title, "right", fit=True) for title in (*_AMOUNTS, f"Year {year} here")),
    )
    rows = [_row(years, line, year) for line in statement.lines]
    rows.append(_total(voice, statement))
    notes = tuple(line.reason.strip() for line in statement.lines)
    return Table(
        columns,
        tuple(rows),
        frozenset({len(rows) - 1}),
        most_lines=3,
        notes=(*notes, ""),
        fine=True,
    )


_AMOUNTS = ("Reported", "Adjustment", "Normalised")


def _row(years: Years, line: StatementLine, year: int) -> tuple[str, ...]:
    voice = years.voice
    normalised = None if line.amount is None else line.amount + line.adjustment
    known = line.line in years.result.declared
    name = line_title(years.result, line.line) if known else line.line or MISSING
    assumed = years.result.figure(line.line, year) if known and _is_yearly(years, line) else None
    return (
        line.label.strip() or name,
        name,
        voice.money(line.amount),
        voice.money(line.adjustment) if line.adjustment else "",
        voice.money(normalised),
        voice.money(assumed),
    )


def _is_yearly(years: Years, line: StatementLine) -> bool:
    return years.result.declared[line.line].per in ("month", "year")


def _total(voice: Voice, statement: Statement) -> tuple[str, ...]:
    amounts = [line.amount for line in statement.lines]
    known = [amount for amount in amounts if amount is not None]
    reported = sum(known) if len(known) == len(amounts) else None
    adjusted = sum(line.adjustment for line in statement.lines)
    total = None if reported is None else reported + adjusted
    return "Sum of the lines", "", *map(voice.money, (reported, adjusted, total)), ""
