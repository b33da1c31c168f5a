"""New list items and new deals: ids given once and never again."""

from dataclasses import replace
from typing import Any

from workbench.deal.borrow import Loan
from workbench.deal.deal import ID_LETTERS, Deal
from workbench.deal.earn import OtherIncome, Space
from workbench.deal.inputs import declared
from workbench.deal.leave import ExitPart
from workbench.deal.paths import find_item, put, value_at
from workbench.deal.purchase import PurchaseCost
from workbench.deal.spend import Expense, Works

NEW_ITEMS: dict[str, tuple[type, tuple[str, ...]]] = {
    "costs": (PurchaseCost, ("purchase", "costs")),
    "spaces": (Space, ("spaces",)),
    "other_income": (OtherIncome, ("other_income",)),
    "expenses": (Expense, ("expenses",)),
    "works": (Works, ("works",)),
    "loans": (Loan, ("loans",)),
    "blend": (ExitPart, ("leave", "blend")),
}
"""What an item of each list is made as, and where the list lies in the deal."""


def new_deal() -> Deal:
    """A deal with the places for the eight numbers and nothing else."""
    return Deal(next_id=3, spaces=(Space("s1"),), expenses=(Expense("x2"),))


def with_new_item(deal: Deal, list_name: str, **values: Any) -> Deal:
    """The deal with an empty item at the end of one of its lists."""
    record, place = NEW_ITEMS[list_name]
    item = record(id=f"{ID_LETTERS[list_name]}{deal.next_id}", **values)
    changed: Deal = put(deal, place, (*value_at(deal, place), item))
    return replace(changed, next_id=deal.next_id + 1)


def without_item(deal: Deal, name: str) -> Deal:
    """The deal without the item `list@id`. Raises UnknownPathError."""
    *place, position = find_item(deal, name)
    held = value_at(deal, tuple(place))
    kept = (*held[: int(position)], *held[int(position) + 1 :])
    changed: Deal = put(deal, tuple(place), kept)
    return changed


def list_fields(list_name: str) -> tuple[str, ...]:
    """The inputs of an item of a list, in the order of their declaration."""
    record, _ = NEW_ITEMS[list_name]
    return tuple(name for name, field in declared(record).items() if field.input is not None)
