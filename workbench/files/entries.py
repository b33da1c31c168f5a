"""Changes typed as `KEY=VALUE`: the number of the file, or a per cent, a word, null, JSON."""

from collections.abc import Mapping, Sequence
from decimal import Decimal, InvalidOperation
from math import isfinite
from typing import Any

from workbench.deal.deal import Deal
from workbench.deal.earn import Rent
from workbench.deal.inputs import declared
from workbench.deal.paths import Step, UnknownPathError, field_of, locate, value_at
from workbench.files.deal_file import deal_from_raw, deal_to_raw
from workbench.files.faults import Fault, UnreadableError
from workbench.files.strict_json import read_json, unfit
from workbench.text.excerpt import excerpt


def with_entries(deal: Deal, entries: Sequence[str]) -> Deal:
    """The deal with each entry applied in turn. Raises UnreadableError."""
    for entry in entries:
        path, equals, text = (part.strip() for part in entry.partition("="))
        if not equals or not path:
            raise UnreadableError(Fault(excerpt(entry), "a change is written KEY=VALUE"))
        deal = _with_entry(deal, path, text)
    return deal


def _with_entry(deal: Deal, path: str, text: str) -> Deal:
    try:
        steps = locate(deal, path)
        is_text = field_of(deal, path).kind is str
    except UnknownPathError as error:
        sentence = f"the deal has no “{excerpt(error.part or path)}”"
        raise UnreadableError(Fault(excerpt(path), sentence)) from None
    value = _text(text) if is_text else _as_whole(deal, steps, _value(text))
    raw = deal_to_raw(deal)
    _put(raw, steps, value)
    faults = tuple(unfit(raw))
    if faults:
        raise UnreadableError(*faults)
    return deal_from_raw(raw)


def _text(typed: str) -> Any:
    """A text needs no quotation marks, whatever it looks like; within them it is JSON."""
    value = _value(typed)
    return value if isinstance(value, str) else typed


def _value(typed: str) -> Any:
    """What was typed: a number, a per cent, JSON; anything else is taken as text."""
    if typed.endswith("%"):
        try:
            number = float(Decimal(typed[:-1].strip()).scaleb(-2))
        except InvalidOperation:
            return typed
        return number if isfinite(number) else typed
    try:
        return read_json(typed)
    except UnreadableError:
        return typed


def _as_whole(deal: Deal, steps: tuple[Step, ...], value: Any) -> Any:
    """A bare number for a whole year row is its year 1; for a rent it is its amount."""
    if isinstance(value, bool) or not isinstance(value, int | float) or isinstance(steps[-1], int):
        return value
    owner = value_at(deal, steps[:-1])
    if declared(type(owner))[steps[-1]].is_row:
        return {"1": value}
    held = value_at(deal, steps)
    return {"amount": value, "per": held.per, "of": held.of} if isinstance(held, Rent) else value


def _put(raw: Any, steps: tuple[Step, ...], value: Any) -> None:
    *above, last = steps
    for position, step in enumerate(above):
        here = raw[step]
        if here is None and position == len(above) - 1:
            here = raw[step] = {}
        raw = here
    if isinstance(last, int) and isinstance(raw, Mapping):
        _put_year(raw, str(last), value)
    else:
        raw[last] = value


def _put_year(row: Any, year: str, value: Any) -> None:
    if value is None:
        row.pop(year, None)
    else:
        row[year] = value
