"""Key paths: `section.field`, `section.field.YEAR`, `list@id.field`.

A list item is named by its list and its id wherever it is nested: `leases@e3.start`. The value of a
year row may be named whole (`earn.vacancy`) or year by year (`earn.vacancy.3`).
"""

import re
from collections.abc import Mapping
from dataclasses import is_dataclass, replace
from functools import cache
from typing import Any, TypeAlias

from workbench.deal.deal import ID_LETTERS
from workbench.deal.inputs import Field, declared

Step: TypeAlias = str | int

_YEAR = re.compile("[1-9][0-9]{0,8}")


class UnknownPathError(LookupError):
    """No input of the deal has this path."""

    def __init__(self, path: str, part: str) -> None:
        super().__init__(f"{path}: the deal has no “{part}”")
        self.path = path
        self.part = part


def locate(deal: Any, path: str) -> tuple[Step, ...]:
    """The steps from the deal down to what the path names: fields by name, items by position.

    The last step of a year path is the year as an integer. Raises UnknownPathError.
    """
    head, *rest = path.split(".")
    steps: tuple[Step, ...] = ()
    if "@" in head:
        steps = find_item(deal, head)
    else:
        rest = [head, *rest]
    record = value_at(deal, steps)
    in_row = False
    for position, part in enumerate(rest):
        if is_dataclass(record) and part in declared(type(record)):
            steps = (*steps, part)
            in_row = declared(type(record))[part].is_row
            record = getattr(record, part)
        elif in_row and position == len(rest) - 1 and _YEAR.fullmatch(part):
            return (*steps, int(part))
        else:
            raise UnknownPathError(path, part)
    return steps


def find_item(deal: Any, name: str) -> tuple[Step, ...]:
    """The steps to the item `list@id`. Raises UnknownPathError."""
    list_name, _, identity = name.partition("@")
    found = _search(deal, list_name, identity) if list_name in ID_LETTERS else None
    if found is None:
        raise UnknownPathError(name, name)
    return found


def _search(record: Any, list_name: str, identity: str) -> tuple[Step, ...] | None:
    for name, field in declared(type(record)).items():
        if list_name not in _names(name, field.records):
            continue
        value = getattr(record, name)
        if is_dataclass(value):
            inner = _search(value, list_name, identity)
            if inner is not None:
                return (name, *inner)
        for position, item in enumerate(value if isinstance(value, tuple) else ()):
            if name == list_name and item.id == identity:
                return (name, position)
            below = _search(item, list_name, identity)
            if below is not None:
                return (name, position, *below)
    return None


@cache
def _names(name: str, records: tuple[type, ...]) -> frozenset[str]:
    """The names of a field and of everything that can lie below it, by the classes alone."""
    below = (field for record in records for field in declared(record).values())
    return frozenset({name}).union(*(_names(field.name, field.records) for field in below))


def value_at(record: Any, steps: tuple[Step, ...]) -> Any:
    """What the steps lead to; None for a year that is not typed."""
    for step in steps:
        if isinstance(record, tuple):
            record = record[int(step)]
        elif isinstance(record, Mapping):
            record = record.get(step)
        elif record is not None:
            record = getattr(record, str(step))
    return record


def get(deal: Any, path: str) -> Any:
    """The value a path names. Raises UnknownPathError."""
    return value_at(deal, locate(deal, path))


def put(record: Any, steps: tuple[Step, ...], value: Any) -> Any:
    """A copy of the record with the value in that place; None takes a year out of its row."""
    if not steps:
        return value
    first, rest = steps[0], steps[1:]
    if isinstance(record, tuple):
        position = int(first)
        inner = put(record[position], rest, value)
        return (*record[:position], inner, *record[position + 1 :])
    if isinstance(record, Mapping) or record is None:
        row = {key: held for key, held in (record or {}).items() if key != first}
        if value is not None:
            row[first] = value
        return dict(sorted(row.items()))
    return replace(record, **{str(first): put(getattr(record, str(first)), rest, value)})


def field_of(deal: Any, path: str) -> Field:
    """The declaration of the input that a path names. Raises UnknownPathError."""
    steps = locate(deal, path)
    if isinstance(steps[-1], int):
        steps = steps[:-1]
    owner = value_at(deal, steps[:-1])
    return declared(type(owner))[str(steps[-1])]
