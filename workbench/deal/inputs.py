"""The one declaration an input has: `Annotated[type, Input(...)]` on a field of a record."""

import datetime
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, fields, is_dataclass
from functools import cached_property
from typing import Annotated, Any, TypeAlias, get_args, get_origin, get_type_hints

YearRow: TypeAlias = Mapping[int, float]
"""A sparse row: deal year to value; an absent year follows the last typed one before it."""

YEARS = 41
"""The last deal year that flows are built to, and the last that a year row may name."""

DAYS = (datetime.date(1000, 1, 1), datetime.date(2999, 12, 31))
"""The first and the last day that an input of unit date may name."""


@dataclass(frozen=True)
class Input:
    """What a form, a check, the schema and the help need to know of one input.

    `unit` is one of money, fraction, area, count, months, years, multiple, year, date, choice,
    switch, text, reference. `low` and `high` bound each value, both included. `needed` marks the
    inputs that have no default. `adverse` is the default move against the deal, in the unit.
    """

    label: str
    unit: str
    low: float | None = None
    high: float | None = None
    help: str = ""
    adverse: float = 0.0
    needed: bool = False


@dataclass(frozen=True)
class Field:
    """A field of a record as its class declares it."""

    name: str
    kind: Any
    input: Input | None

    @cached_property
    def is_row(self) -> bool:
        return self.kind == YearRow or YearRow in get_args(self.kind)

    @cached_property
    def records(self) -> tuple[type, ...]:
        """The record classes that the field holds, by itself or in a list."""
        kinds = (self.kind, *get_args(self.kind))
        return tuple(one for one in kinds if isinstance(one, type) and is_dataclass(one))


_DECLARED: dict[type, Mapping[str, Field]] = {}


def declared(record: type) -> Mapping[str, Field]:
    """The fields of a record class by name, in order, with their inputs where they are inputs."""
    if record not in _DECLARED:
        hints = get_type_hints(record, include_extras=True)
        _DECLARED[record] = {
            spec.name: _field(spec.name, hints[spec.name]) for spec in fields(record)
        }
    return _DECLARED[record]


def _field(name: str, hint: Any) -> Field:
    if get_origin(hint) is Annotated:
        kind, *marks = get_args(hint)
        found = next((mark for mark in marks if isinstance(mark, Input)), None)
        return Field(name, kind, found)
    return Field(name, hint, None)


@dataclass(frozen=True)
class Leaf:
    """One input of one deal: its key path, its declaration, its value and its record."""

    path: str
    field: Field
    input: Input
    value: Any
    owner: Any


def leaves(record: Any, prefix: str = "") -> Iterator[Leaf]:
    """Every input below a record, in file order, with its key path."""
    for name, field in declared(type(record)).items():
        value = getattr(record, name)
        path = f"{prefix}.{name}" if prefix else name
        if field.input is not None:
            yield Leaf(path, field, field.input, value, record)
        elif isinstance(value, tuple):
            for item in value:
                if is_dataclass(item):
                    yield from leaves(item, f"{name}@{getattr(item, 'id', '')}")
        elif is_dataclass(value):
            yield from leaves(value, path)


def at_year(row: YearRow, year: int) -> float | None:
    """The value a year row has in a year: the last one typed at or before it."""
    typed = [key for key in row if key <= year]
    return row[max(typed)] if typed else None
