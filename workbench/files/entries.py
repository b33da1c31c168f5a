"""Changes typed as `KEY=VALUE`: the number of the file, or a per cent, a word, null, JSON."""

from collections.abc import Mapping, Sequence
from decimal import Decimal, InvalidOperation
from typing import Any

from workbench.deal.deal import Deal
from workbench.deal.inputs import declared
from workbench.deal.paths import Step, UnknownPathError, locate, value_at
from workbench.files.deal_file import deal_from_raw, deal_to_raw
from workbench.files.faults import Fault, UnreadableError
from workbench.files.strict_json import parse


def with_entries(deal: Deal, entries: Sequence[str]) -> Deal:
    """The deal with each entry applied in turn. Raises UnreadableError."""
    for entry in entries:
        path, equals, text = entry.partition("=")
        if not equals:
            raise UnreadableError(Fault(entry, "a change is written KEY=VALUE"))
        deal = _with_entry(deal, path.strip(), _value(text.strip()))
    return deal


def _value(text: str) -> Any:
    """What a typed text stands for; anything that is not a number or JSON is taken as text."""
    if text.endswith("%"):
        try:
            return float(Decimal(text[:-1].strip()).scaleb(-2))
        except InvalidOperation:
            return text
    try:
        return parse(text)
    except UnreadableError:
        return text


def _with_entry(deal: Deal, path: str, value: Any) -> Deal:
    try:
        steps = locate(deal, path)
    except UnknownPathError as error:
        raise UnreadableError(Fault(path, f"the deal has no “{error.part}”")) from None
    raw = deal_to_raw(deal)
    _put(raw, steps, _as_whole(deal, steps, value))
    return deal_from_raw(raw)


def _as_whole(deal: Deal, steps: tuple[Step, ...], value: Any) -> Any:
    """A bare number for a whole year row is its year 1; for a rent it is its amount."""
    if isinstance(value, bool) or not isinstance(value, int | float) or isinstance(steps[-1], int):
        return value
    owner = value_at(deal, steps[:-1])
    field = declared(type(owner)).get(str(steps[-1])) if hasattr(owner, "__dict__") else None
    if field is not None and field.is_row:
        return {"1": value}
    held = value_at(deal, steps)
    return {"amount": value, "per": held.per, "of": held.of} if hasattr(held, "per") else value


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
