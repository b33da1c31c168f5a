"""What the figures do not hold: entries not taken in, issues, figures that cannot be given."""

from workbench.deal.deal import Deal
from workbench.report.document import Block, Column, Section, Table, plain
from workbench.report.readings import Readings
from workbench.report.wording import sentence
from workbench.text.labels import label_of

_MOST = 12
_NAMES = {
    "price": "Price",
    "value": "Value",
    "margin": "Margin",
    "exit_value_share": "Exit-value share",
    "reference_share": "Reference share",
    "ground_share": "Ground share",
    "tiers": "Tiers of value",
    "stack": "Value by year",
    "exit": "Exit",
    "irr": "IRR",
    "mirr": "MIRR",
    "npv": "Net present value",
    "equity_multiple": "Equity multiple",
    "cash_on_cash": "Cash-on-cash",
    "dscr": "DSCR",
    "debt_yield": "Debt yield",
    "loans": "Loans",
    "break_even_occupancy": "Break-even occupancy",
    "sources_uses": "Sources and uses",
    "hold_years": "Hold",
    "statement": "Statement by year",
}


_DETAILS = {"noi": "on NOI", "ncf": "on net cash flow", "net": "net price"}


def gap_sections(deal: Deal, read: Readings) -> tuple[Section, ...]:
    """A section for each kind of gap that there is; none for a deal that is complete."""
    sections: list[Section] = []
    entries = _entries(deal, read)
    if entries:
        note = plain("The figures were computed without these entries, or stand on faulty ones.")
        blocks = _listed((Column(""),), tuple((text,) for text in entries))
        sections.append(Section("Not taken in, or in need of a look", (note, *blocks)))
    missing = _missing(read)
    if missing:
        columns = (Column("", share=0.34), Column("", share=0.66))
        sections.append(Section("Figures that cannot be given", _listed(columns, missing)))
    return tuple(sections)


def _entries(deal: Deal, read: Readings) -> list[str]:
    """The issues, and the entries not taken in that no issue speaks of."""
    spoken = {issue.get("path") for issue in read.issues()}
    drafts = [
        f"{label_of(deal, path)}: “{text}” was typed and is not taken in"
        for path, text in deal.drafts.items()
        if path not in spoken
    ]
    return drafts + [issue.get("message", "") for issue in read.issues()]


def _missing(read: Readings) -> tuple[tuple[str, str], ...]:
    """Figures without a number, those with the same reason together."""
    by_reason: dict[str, list[str]] = {}
    for path, reason in read.reasons().items():
        by_reason.setdefault(reason, []).append(figure_name(path))
    return tuple(
        ("; ".join(dict.fromkeys(names)), sentence(reason)) for reason, names in by_reason.items()
    )


def _listed(columns: tuple[Column, ...], rows: tuple[tuple[str, ...], ...]) -> tuple[Block, ...]:
    table = Table(columns, rows[:_MOST], most_lines=4)
    more = len(rows) - _MOST
    return (table, plain(f"And {more} more.", "small")) if more > 0 else (table,)


def figure_name(path: str) -> str:
    """A figure's name for a reader, without its year: `irr.levered` is `IRR, levered`."""
    head, *rest = [part for part in path.split(".") if not part.isdigit()]
    if head == "measures" and rest:
        return " ".join(rest).replace("_", " ").capitalize()
    if head not in _NAMES:
        return path
    details = (_DETAILS.get(part, part.replace("_", " ")) for part in rest)
    return ", ".join((_NAMES[head], *details))
