"""What a person types into a form, read for the input it is meant for, and how inputs are shown."""

import datetime
from typing import Any, get_args

from workbench.deal.checks import is_fraction
from workbench.deal.deal import Deal
from workbench.deal.inputs import Field, Input
from workbench.deal.paths import Step, field_of, locate, value_at
from workbench.text.entry import NotTaken, Taken, parse_number
from workbench.text.locale import DEFAULT, Locale, find_locale
from workbench.text.numbers import rate, trimmed


def locale_of(deal: Deal) -> Locale:
    """The locale a deal is read and written in."""
    return find_locale(deal.conventions.locale) or DEFAULT


def declaration(deal: Deal, path: str) -> tuple[Field, Input]:
    """The field and the input of a path. Raises UnknownPathError, or ValueError for no input."""
    field = field_of(deal, path)
    if field.input is None:
        raise ValueError(f"{path} is not an input")
    return field, field.input


def in_percent(deal: Deal, path: str) -> bool:
    """Whether an input is typed and shown in per cent."""
    steps = _input_steps(deal, path)
    _, mark = declaration(deal, path)
    return mark.unit == "fraction" or is_fraction(value_at(deal, steps[:-1]), str(steps[-1]))


def _input_steps(deal: Deal, path: str) -> tuple[Step, ...]:
    steps = locate(deal, path)
    return steps[:-1] if isinstance(steps[-1], int) else steps


def read_typed(deal: Deal, path: str, text: str) -> Taken | NotTaken | str | datetime.date | None:
    """The value a text stands for in an input; None for an emptied one that may be empty."""
    field, mark = declaration(deal, path)
    plain = text.strip()
    if mark.unit in ("text", "choice", "reference"):
        return text if mark.unit == "text" else plain or None
    if not plain:
        return None if type(None) in get_args(field.kind) else NotTaken("a value is needed here")
    if mark.unit == "date":
        return _day(plain)
    taken = parse_number(plain, locale_of(deal), in_percent(deal, path))
    if _is_whole(field) and isinstance(taken, Taken) and not taken.value.is_integer():
        return NotTaken("a whole number is needed here")
    return taken


def _day(text: str) -> datetime.date | NotTaken:
    try:
        return datetime.date.fromisoformat(text)
    except ValueError:
        return NotTaken("a date is written like 2027-01-31")


def typed_value(deal: Deal, path: str, value: float) -> float | int:
    """A number as the input's kind wants it."""
    field, _ = declaration(deal, path)
    return int(value) if _is_whole(field) else value


def _is_whole(field: Field) -> bool:
    return not field.is_row and int in (field.kind, *get_args(field.kind))


def in_range(deal: Deal, path: str, value: float) -> bool:
    """Whether a number lies in what the input allows."""
    _, mark = declaration(deal, path)
    low, high = (0.0, 1.0) if _is_share(deal, path, mark) else (mark.low, mark.high)
    return (low is None or value >= low) and (high is None or value <= high)


def _is_share(deal: Deal, path: str, mark: Input) -> bool:
    return mark.unit == "money" and in_percent(deal, path)


def shown(deal: Deal, path: str, value: Any) -> str:
    """An input as its field shows it."""
    if value is None:
        return ""
    if isinstance(value, datetime.date):
        return value.isoformat()
    if isinstance(value, str):
        return value
    if in_percent(deal, path):
        return rate(value, locale_of(deal), 0, 6).replace("%", "").strip()
    _, mark = declaration(deal, path)
    return str(int(value)) if mark.unit == "year" else trimmed(value, locale_of(deal), 0, 6)


UNITS = {"months": "months", "years": "years", "multiple": "×", "area": "", "count": "units"}


def unit_text(deal: Deal, path: str) -> str:
    """What stands behind a field: its unit."""
    _, mark = declaration(deal, path)
    if in_percent(deal, path):
        return "%"
    if mark.unit == "money":
        return deal.conventions.currency
    if mark.unit == "area":
        return "m²" if deal.conventions.area_unit == "m2" else "sq ft"
    return UNITS.get(mark.unit, "")
