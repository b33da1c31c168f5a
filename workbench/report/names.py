"""What items and their lines are called in a document: by their names, without their ids."""

from typing import Protocol

from workbench.deal.deal import Deal
from workbench.engine.result import Result
from workbench.text.excerpt import excerpt
from workbench.text.labels import ITEMS

_LONGEST = 120
"""Characters of a name in a heading or a table."""


class Named(Protocol):
    """An item of a list."""

    @property
    def id(self) -> str: ...
    @property
    def name(self) -> str: ...


_ITEMS = {"expense": "expenses", "other_income": "other_income", "service": "loans"}
"""Lists behind the lines that belong to one item each."""


def one_line(text: str) -> str:
    """A text without line breaks."""
    return " ".join(text.split())


def item_title(item: Named, of: str = "") -> str:
    """The name of an item, or its kind and id where it has none."""
    name = excerpt(item.name, _LONGEST)
    return name or f"{ITEMS.get(of, '')} {item.id}".strip().capitalize()


def line_title(result: Result, key: str) -> str:
    """The label of a line, or the name of the item that it belongs to."""
    head, at, identity = key.partition("@")
    if at:
        for item in _items(result.plan.deal, _ITEMS.get(head, "")):
            if item.id == identity:
                return item_title(item, _ITEMS[head])
    return result.declared[key].label


def _items(deal: Deal, name: str) -> tuple[Named, ...]:
    found: tuple[Named, ...] = getattr(deal, name, ())
    return found
