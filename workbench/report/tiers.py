"""The tiers by year: what is in hand and what is expected, as it falls and brought to today."""

from workbench.charts.tiers import TierFigures, draw_tiers
from workbench.report.document import Block, Figure, Section, Subheading, plain
from workbench.report.readings import Readings
from workbench.report.years import Amounts, Row, Years

_CHART = (150.0, 7.6)


def tier_section(years: Years, read: Readings, column: float) -> tuple[Section, ...]:
    """Net cash flow by tier, then the courses of the value wall as figures."""
    if not years.count:
        return ()
    in_hand, expected = years.line("cash_in_hand"), years.line("cash_expected")
    money = years.voice.short_money
    picture = draw_tiers(TierFigures(in_hand, expected, money), column, *_CHART)
    blocks: tuple[Block, ...] = (
        plain(_words(years), "body"),
        Subheading("Net cash flow before debt, by tier"),
        Figure(picture, picture.words),
        Subheading("As it falls, and brought to today"),
        years.table(_rows(years, read, in_hand, expected)),
    )
    return (Section("The tiers, year by year", blocks),)


def _words(years: Years) -> str:
    return (
        "Rent under contract runs out as leases end; what follows is expected. Each year’s cash is "
        f"brought back to today at a required return of {years.voice.required_rate()}. The sums at "
        "the right are the tiers of value on the first page; the sale is the third of them."
    )


def _rows(years: Years, read: Readings, in_hand: Amounts, expected: Amounts) -> list[Row]:
    worth = {tier: read.number(f"tiers.{tier}") for tier in ("in_hand", "expected", "exit")}
    courses = [years.line(f"value_{tier}_of_year") for tier in ("in_hand", "expected")]
    courses.append((0.0,) * (years.count - 1) + (worth["exit"],))
    value = tuple(_sum(amounts) for amounts in zip(*courses, strict=True))
    return [
        Row("In hand, as it falls", in_hand),
        Row("Expected, as it falls", expected),
        years.row("net_cash_flow", strong=True),
        Row("In hand, present value", courses[0], total=worth["in_hand"]),
        Row("Expected, present value", courses[1], total=worth["expected"]),
        Row("Exit, present value", courses[2], total=worth["exit"]),
        Row("Value", value, strong=True, total=read.number("value")),
    ]


def _sum(amounts: Amounts) -> float | None:
    known = [amount for amount in amounts if amount is not None]
    return sum(known) if len(known) == len(amounts) else None
