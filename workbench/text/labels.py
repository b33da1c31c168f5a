"""What an input is called in a sentence: its label, its year, its item."""

from typing import Any

from workbench.deal.deal import Deal
from workbench.deal.paths import UnknownPathError, field_of, find_item, locate, value_at
from workbench.text.excerpt import excerpt

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
    return excerpt(str(getattr(item, "name", "") or getattr(item, "tenant", "")), 40)


def label_of(deal: Deal, path: str) -> str:
    """A key path in words: `Vacancy allowance, year 3`; the path itself if the deal lacks it."""
    if path in _PLACES:
        return _PLACES[path]
    head, _, rest = path.partition(".")
    try:
        if "@" in head and not rest:
            name = item_name(deal, head)
            return name[0].upper() + name[1:]
        declared = field_of(deal, path).input
        if declared is None:
            return path
        steps = locate(deal, path)
        is_market = "market_rent" in steps
        label = f"Market {declared.label.lower()}" if is_market else declared.label
        item = f" of {item_name(deal, head)}" if "@" in head else ""
        year = f", year {steps[-1]}" if isinstance(steps[-1], int) else ""
        return f"{label}{item}{year}"
    except UnknownPathError:
        return excerpt(path) or "An entry"
