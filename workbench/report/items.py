"""Lists of a deal as tables, a column for each input that any item has a value for."""

from collections.abc import Iterator, Sequence
from typing import Any

from workbench.deal.deal import Deal
from workbench.deal.inputs import Field, declared
from workbench.report.document import Block, Column, Subheading, Table
from workbench.report.names import item_title
from workbench.report.typed import is_default, is_given, value_text
from workbench.report.voice import Voice

_LISTS = {
    "costs": "Purchase costs",
    "other_income": "Other income",
    "expenses": "Expenses",
    "works": "Dated works",
    "loans": "Loans",
    "blend": "Blend of exit methods",
}
_TEXTS = frozenset({"text", "choice", "reference"})
_ABSENT = {
    "growth": "as all costs",
    "amortisation_months": "interest only",
    "term_months": "until repaid",
}
"""What it means that an item has no value of its own."""
_MOST_LINES = 3
_WHOLE = 10
"""A table of up to so many items is kept on one page."""


def item_blocks(voice: Voice) -> Iterator[Block]:
    """A table for each list that has items."""
    for name, title in _LISTS.items():
        items = _items(voice.deal, name)
        if items:
            yield Subheading(title)
            yield item_table(voice, name, items)


def _items(deal: Deal, name: str) -> Sequence[Any]:
    holder = {"costs": deal.purchase, "blend": deal.leave}.get(name, deal)
    found: Sequence[Any] = getattr(holder, name)
    return found


def item_table(voice: Voice, name: str, items: Sequence[Any]) -> Table:
    """Items one under the other."""
    shown = [field for field in declared(type(items[0])).values() if _is_shown(field, items)]
    columns = tuple(_column(voice, field) for field in shown)
    rows = tuple(tuple(_cell(voice, name, item, field) for field in shown) for item in items)
    whole = len(items) <= _WHOLE
    return Table(columns, rows, most_lines=_MOST_LINES, fine=True, whole=whole)


def _is_shown(field: Field, items: Sequence[Any]) -> bool:
    if field.input is None:
        return False
    if field.input.needed or field.name == "name":
        return True
    return any(
        is_given(getattr(item, field.name)) and not is_default(item, field.name) for item in items
    )


def _column(voice: Voice, field: Field) -> Column:
    assert field.input is not None
    if field.input.unit in _TEXTS:
        return Column(field.input.label, share=1.6 if field.name == "name" else 1.0)
    return Column(field.input.label, "right", fit=True)


def _cell(voice: Voice, name: str, item: Any, field: Field) -> str:
    value = getattr(item, field.name)
    if field.name == "name":
        return item_title(item, name)
    if value is None and field.name in _ABSENT:
        return _ABSENT[field.name]
    return value_text(voice, item, field, value)
