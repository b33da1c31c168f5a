"""Everything that was typed: by year, one by one, and item by item."""

from itertools import groupby

from workbench.deal.checks_sections import exit_methods
from workbench.deal.deal import Deal
from workbench.deal.inputs import Leaf, leaves
from workbench.report.assumed_rows import row_table
from workbench.report.document import Block, Column, Section, SideBySide, Subheading, Table
from workbench.report.items import item_blocks
from workbench.report.typed import is_default, is_given, value_text
from workbench.report.voice import Voice
from workbench.report.years import Years

_SECTIONS = {
    "conventions": "Conventions",
    "purchase": "Purchase",
    "earn": "Income",
    "spend": "Costs",
    "leave": "Exit",
    "returns": "Returns",
}
_LEFT = ("conventions", "purchase", "earn")


def assumption_section(years: Years) -> Section:
    """Year rows first, then single assumptions, then lists."""
    voice = years.voice
    both = [
        _table(voice, [name for name in _SECTIONS if (name in _LEFT) == left]) for left in (1, 0)
    ]
    blocks: list[Block] = [
        *row_table(years),
        Subheading("Single assumptions"),
        SideBySide((both[0],), (both[1],), 0.5),
        *item_blocks(voice),
    ]
    return Section("Assumptions", tuple(blocks))


def _table(voice: Voice, sections: list[str]) -> Table:
    """The inputs of some sections, each section under its name."""
    rows: list[tuple[str, str, str]] = []
    strong: set[int] = set()
    shown = (leaf for leaf in leaves(voice.deal) if _is_shown(voice.deal, leaf))
    for name, found in groupby(shown, key=lambda leaf: leaf.path.partition(".")[0]):
        if name in sections:
            strong.add(len(rows))
            rows.append((_SECTIONS[name], "", ""))
            rows += [_row(voice, leaf) for leaf in found]
    columns = (Column("", share=0.56), Column("", "right", 0.44), Column("", fit=True))
    return Table(columns, tuple(rows), frozenset(strong), fine=True)


def _row(voice: Voice, leaf: Leaf) -> tuple[str, str, str]:
    text = value_text(voice, leaf.owner, leaf.field, leaf.value)
    untouched = not leaf.input.needed and is_default(leaf.owner, leaf.field.name)
    return leaf.input.label, text, "default" if untouched else ""


def _is_shown(deal: Deal, leaf: Leaf) -> bool:
    """Inputs of sections that have a value and a part in this deal."""
    if "@" in leaf.path or leaf.path == "conventions.locale":
        return False
    if leaf.field.is_row and not is_default(leaf.owner, leaf.field.name):
        return False  # it stands in the table by year
    return (is_given(leaf.value) or leaf.input.needed) and _is_used(deal, leaf.path)


def _is_used(deal: Deal, path: str) -> bool:
    """Whether a choice made elsewhere gives an input a part in the figures."""
    methods = set(exit_methods(deal))
    by_yield = bool(methods & {"forward_noi", "trailing_noi"})
    by_index = bool(methods & {"price_per", "purchase_price"})
    reserves = bool(deal.spend.reserves or deal.spend.reserves_opening)
    used = {
        "leave.method": not deal.leave.blend,
        "leave.exit_yield": by_yield,
        "leave.exit_income": by_yield,
        "leave.stabilised_vacancy": by_yield and deal.leave.exit_income == "stabilised",
        "leave.price_per": "price_per" in methods,
        "leave.price_per_of": "price_per" in methods,
        "leave.price_growth": by_index,
        "leave.price_series": by_index,
        "leave.rent_multiple": "rent_multiple" in methods,
        "leave.amount": "amount" in methods,
    }
    if path.startswith("spend.reserves_"):
        return reserves
    return used.get(path, True)
