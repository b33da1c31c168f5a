"""What the rows of a year grid are: data that a page writes down."""

from dataclasses import dataclass
from typing import TypeAlias

from workbench.deal.deal import Deal
from workbench.deal.paths import UnknownPathError, find_item, value_at
from workbench.engine.result import Result
from workbench.session.typed import declaration, unit_text
from workbench.text.labels import item_name


@dataclass(frozen=True)
class Band:
    """A heading over the rows that follow."""

    title: str


@dataclass(frozen=True)
class InputRow:
    """A year row of the deal, edited here. Label and unit come from its declaration if empty."""

    path: str
    label: str = ""
    unit: str = ""


@dataclass(frozen=True)
class LineRow:
    """A line of the engine by year. Its label is the declared one if empty."""

    key: str
    bold: bool = False
    label: str = ""


GridRow: TypeAlias = Band | InputRow | LineRow

LISTS = {
    "other_income": "other_income",
    "expense": "expenses",
    "works": "works",
}
"""The list that an item's line belongs to, by the name before the id; all others are loans."""


def name_of(row: GridRow) -> str:
    """What a row is known by in the rest of the program: its key path, key or title."""
    match row:
        case InputRow(path=path):
            return path
        case LineRow(key=key):
            return key
        case Band(title=title):
            return title


def label_of_row(row: GridRow, deal: Deal, result: Result) -> str:
    """A row in words, without its unit."""
    match row:
        case Band(title=title):
            return title.upper()
        case InputRow(path=path, label=label):
            return label or _with_item(deal, path, _declared_label(deal, path))
        case LineRow(key=key, label=label):
            line = result.declared.get(key)
            return label or _with_item(deal, _as_item(key), line.label if line else key)


def unit_of_row(row: GridRow, deal: Deal) -> str:
    """The unit that stands behind the label of an input: `%`, a currency or nothing."""
    if not isinstance(row, InputRow):
        return ""
    try:
        return row.unit or unit_text(deal, row.path)
    except (UnknownPathError, ValueError):
        return ""


def in_sentence(label: str) -> str:
    """A label as it stands inside a sentence; names of capitals keep them."""
    return label[:1].lower() + label[1:] if label[1:2].islower() else label


def _declared_label(deal: Deal, path: str) -> str:
    try:
        return declaration(deal, path)[1].label
    except (UnknownPathError, ValueError):
        return path


def _as_item(key: str) -> str:
    """`expense@x3` as the item it is computed for: `expenses@x3`."""
    head, mark, identity = key.partition("@")
    return f"{LISTS.get(head, 'loans')}{mark}{identity}" if mark else key


def _with_item(deal: Deal, path: str, label: str) -> str:
    """The label after the name of its item, where it belongs to one."""
    head = path.partition(".")[0]
    if "@" not in head:
        return label
    try:
        title = getattr(value_at(deal, find_item(deal, head)), "name", "")
        words = item_name(deal, head)
    except UnknownPathError:
        return label
    name = title or words[0].upper() + words[1:]
    is_sum = "." not in path and head.partition("@")[0] in LISTS.values()
    return name if is_sum else f"{name}: {in_sentence(label)}"
