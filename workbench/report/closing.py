"""Sources and uses: what is paid at closing, and where it comes from."""

from workbench.report.document import Column, Section, SideBySide, Table
from workbench.report.names import item_title
from workbench.report.readings import Readings
from workbench.report.voice import Voice
from workbench.text import numbers

_USES = (
    ("price", "Price"),
    ("purchase_costs", "Purchase costs"),
    ("loan_costs", "Loan costs"),
    ("initial_works", "Initial works"),
    ("escrows", "Escrows"),
    ("working_capital", "Working capital"),
)


def closing_section(read: Readings, voice: Voice) -> Section:
    """Two tables with the same total."""
    lent = read.loan_amounts()
    sources = [(item_title(loan, "loans"), lent.get(loan.id)) for loan in voice.deal.loans]
    sources.append(("Deposits taken over", read.number("sources_uses.sources.deposits")))
    sources.append(("Cash to close", read.number("sources_uses.sources.equity")))
    uses = [(label, read.number(f"sources_uses.uses.{key}")) for key, label in _USES]
    totals = [read.number(f"sources_uses.{side}.total") for side in ("sources", "uses")]
    amounts = (*(amount for _, amount in (*sources, *uses)), *totals)
    scale = numbers.scale_for(amounts, voice.locale, 15)

    def table(title: str, rows: list[tuple[str, float | None]], total: float | None) -> Table:
        kept = [(label, amount) for label, amount in rows if amount != 0]
        cells = [(label, voice.scaled(amount, scale)) for label, amount in kept]
        cells.append(("Total", voice.scaled(total, scale)))
        columns = (Column(title), Column(voice.unit(scale), "right", fit=True))
        return Table(columns, tuple(cells), frozenset({len(cells) - 1}), most_lines=2)

    both = SideBySide(
        (table("Sources", sources, totals[0]),), (table("Uses", uses, totals[1]),), 0.5
    )
    return Section("Sources and uses at closing", (both,), together=True)
