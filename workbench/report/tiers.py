"""The tiers by year: what is in hand and what is expected, as it falls and brought to today."""

from workbench.charts.tiers import draw_tiers
from workbench.report.chart_figures import tier_figures
from workbench.report.document import Block, Figure, Section, Subheading, plain
from workbench.report.readings import Readings
from workbench.report.years import Row, Years

_CHART = (126.0, 7.6)


def tier_section(years: Years, read: Readings, column: float) -> tuple[Section, ...]:
    """Net cash flow by tier, then the courses of the value wall as figures."""
    if not years.count:
        return ()
    in_hand, expected = years.line("cash_in_hand"), years.line("cash_expected")
    picture = draw_tiers(tier_figures(years), column, *_CHART)
    rows = [
        Row("In hand, as it falls", in_hand),
        Row("Expected, as it falls", expected),
        years.row("net_cash_flow", strong=True),
        Row("In hand, present value", years.line("value_in_hand_of_year")),
        Row("Expected, present value", years.line("value_expected_of_year")),
    ]
    blocks: tuple[Block, ...] = (
        plain(_WORDS),
        Subheading("Net cash flow before debt, by tier"),
        Figure(picture, picture.words),
        Subheading("As it falls, and brought to today"),
        plain(_sums(years, read), "small"),
        years.table(rows),
    )
    return (Section("The tiers, year by year", blocks),)


_WORDS = (
    "Rent under contract runs out as leases end; what follows it is expected. Each bears its share "
    "of costs, reserves and works. The third tier, the sale, has a section of its own."
)


def _sums(years: Years, read: Readings) -> str:
    """How the present values add up to the tiers of the first page."""
    voice = years.voice
    in_hand, expected, leaving, value = (
        voice.money(read.number(path))
        for path in ("tiers.in_hand", "tiers.expected", "tiers.exit", "value")
    )
    return (
        f"Brought back at a required return of {voice.required_rate()}, the years add up to "
        f"{in_hand} in hand and {expected} expected; with {leaving} for the exit that is the "
        f"value, {value}."
    )
