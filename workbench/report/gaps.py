"""What the figures do not hold: entries not taken in, issues, figures that cannot be given."""

from workbench.deal.deal import Deal
from workbench.deal.paths import field_of, find_item, locate, value_at
from workbench.report.document import Block, Column, Section, Table, plain
from workbench.report.readings import Readings

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


def gap_sections(deal: Deal, read: Readings) -> tuple[Section, ...]:
    """A section for each kind of gap that there is; none for a deal that is complete."""
    sections: list[Section] = []
    entries = _entries(deal, read)
    if entries:
        note = plain("The figures were computed without these entries, or stand on faulty ones.")
        sections.append(Section("Not taken in, or in need of a look", (note, *_listed(entries))))
    missing = _missing(read)
    if missing:
        sections.append(Section("Figures that cannot be given", _listed(missing)))
    return tuple(sections)


def _entries(deal: Deal, read: Readings) -> list[tuple[str, str]]:
    drafts = [
        (input_name(deal, path), f"“{text}” was typed and not taken in.")
        for path, text in deal.drafts.items()
    ]
    issues = [
        (input_name(deal, issue.get("path", "")), issue.get("message", ""))
        for issue in read.issues()
    ]
    return drafts + issues


def _missing(read: Readings) -> list[tuple[str, str]]:
    """Figures without a number, those with the same reason together."""
    by_reason: dict[str, list[str]] = {}
    for path, reason in read.reasons().items():
        by_reason.setdefault(reason, []).append(figure_name(path))
    return [(", ".join(dict.fromkeys(names)), reason) for reason, names in by_reason.items()]


def _listed(rows: list[tuple[str, str]]) -> tuple[Block, ...]:
    columns = (Column("", share=0.32), Column("", share=0.68))
    table = Table(columns, tuple(rows[:_MOST]), most_lines=4)
    more = len(rows) - _MOST
    return (table, plain(f"And {more} more.", "small")) if more > 0 else (table,)


def figure_name(path: str) -> str:
    """A figure's name for a reader: `irr.levered` is `IRR, levered`."""
    head, _, rest = path.partition(".")
    known = _NAMES.get(head)
    if known is None:
        return path
    detail = rest.replace("_", " ").replace(".", ", ")
    return f"{known}, {detail}" if detail else known


def input_name(deal: Deal, path: str) -> str:
    """An input's label, with its year where it has one; the path itself if no input has it."""
    try:
        steps = locate(deal, path)
        found = field_of(deal, path).input
    except (LookupError, TypeError, ValueError):
        return path
    if found is None:
        return path
    name = f"{found.label}, year {steps[-1]}" if isinstance(steps[-1], int) else found.label
    head = path.partition(".")[0]
    if "@" not in head:
        return name
    item = value_at(deal, find_item(deal, head))
    return f"{name} ({getattr(item, 'name', '') or head})"
