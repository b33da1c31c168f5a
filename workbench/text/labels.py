"""What an input is called in a sentence: its label, its year, its item."""

from typing import Any

from workbench.deal.deal import Deal
from workbench.deal.paths import UnknownPathError, field_of, find_item, locate, value_at

ITEMS = {
    "costs": "purchase cost",
    "spaces": "space",
    "leases": "lease",
    "steps": "step",
    "other_income": "other income",
    "expenses": "expense",
    "works": "works",
    "loans": "loan",
    "blend": "part of the blend",
    "statements": "statement",
    "lines": "statement line",
    "comparables": "comparable",
    "cases": "case",
}
"""What one item of each list is called."""

_PLACES = {
    "spaces": "Rent roll",
    "next_id": "Next id",
    "pictures": "Pictures",
    "property.pictures": "Pictures shown",
}


def item_name(deal: Deal, name: str) -> str:
    """An item of a list in words: `space s1 “Flats”`."""
    list_name, _, identity = name.partition("@")
    title = _title(value_at(deal, find_item(deal, name)))
    return f"{ITEMS[list_name]} {identity}" + (f" “{title}”" if title else "")


def _title(item: Any) -> str:
    title = str(getattr(item, "name", "") or getattr(item, "tenant", ""))
    return title if len(title) <= 40 else f"{title[:39]}…"


def label_of(deal: Deal, path: str) -> str:
    """A key path in words: `Vacancy allowance, year 3`; the path itself if the deal lacks it."""
    if path in _PLACES:
        return _PLACES[path]
    head, _, rest = path.partition(".")
    try:
        if not rest:
            name = item_name(deal, head)
            return name[0].upper() + name[1:]
        label = _input_label(deal, path)
        return f"{label} of {item_name(deal, head)}" if "@" in head else label
    except (UnknownPathError, KeyError):
        return path


def _input_label(deal: Deal, path: str) -> str:
    declared = field_of(deal, path).input
    label = declared.label if declared is not None else path
    last = locate(deal, path)[-1]
    return f"{label}, year {last}" if isinstance(last, int) else label
