"""Inputs as they were typed: each with the marks of the reader and the words of its unit."""

from collections.abc import Iterable, Mapping
from dataclasses import MISSING as NO_DEFAULT
from dataclasses import fields
from typing import Any

from workbench.deal.checks import is_fraction
from workbench.deal.inputs import Field, Input
from workbench.report.names import one_line
from workbench.report.voice import Voice
from workbench.text import numbers
from workbench.text.choices import choice

MOST_DECIMALS = 4


def value_text(voice: Voice, owner: Any, field: Field, value: Any) -> str:
    """The value of an input of a record in words; a dash where there is none."""
    if value is None or value == "" or value == {} or field.input is None:
        return numbers.MISSING
    if field.is_row:
        return row_text(voice, field.input, value)
    unit = "fraction" if is_fraction(owner, field.name) else field.input.unit
    return _one(voice, field.name, unit, value)


def _one(voice: Voice, name: str, unit: str, value: Any) -> str:
    if name == "month":  # counted in months, but one of a year and not a length of time
        return str(value)
    match unit:
        case "choice":
            return choice(name, value)
        case "switch":
            return "yes" if value else "no"
        case "date":
            return voice.day(value)
        case "reference":
            return _lease_name(voice, str(value))
        case "text":
            return str(value)
        case _:
            return amount_text(voice, unit, value)


def _lease_name(voice: Voice, identity: str) -> str:
    """The tenant of a lease, or the lease by its id."""
    leases = (lease for space in voice.deal.spaces for lease in space.leases)
    tenants = (one_line(lease.tenant) for lease in leases if lease.id == identity)
    return next(tenants, "") or f"lease {identity}"


def amount_text(voice: Voice, unit: str, value: float, decimals: int | None = None) -> str:
    """A figure of an input with the decimals it was given, or so many."""
    if unit == "fraction":
        least = 1 if decimals is None else decimals
        most = MOST_DECIMALS if decimals is None else decimals
        return numbers.rate(value, voice.locale, least, most)
    match unit:
        case "money":
            return voice.exact(value, decimals)
        case "area":
            return voice.area(value)
        case "months" | "years":
            named = unit.removesuffix("s") if value == 1 else unit
            return f"{numbers.number(value, voice.locale)} {named}"
        case "multiple":
            return f"{numbers.trimmed(value, voice.locale, 1, MOST_DECIMALS)}×"
        case "year":
            return str(int(value))
    return numbers.trimmed(value, voice.locale)


def row_text(voice: Voice, declared: Input, row: Mapping[int, float]) -> str:
    """A year row in short: its one value, its two, or the lowest and the highest."""
    values = [(year, amount_text(voice, declared.unit, row[year])) for year in sorted(row)]
    if len(values) == 1:
        return values[0][1]
    if len(values) == 2:
        return f"{values[0][1]}; from year {values[1][0]}: {values[1][1]}"
    low, high = min(row.values()), max(row.values())
    ends = (amount_text(voice, declared.unit, value) for value in (low, high))
    return "{} to {} by year".format(*ends)


def decimals_of(voice: Voice, unit: str, values: Iterable[float]) -> int:
    """As many decimals as the values of a row or a column need to line up."""
    if unit == "money":
        whole = all(voice.exact(value) == voice.exact(value, 0) for value in values)
        return 0 if whole else voice.money_digits
    scaled = [numbers.hundredfold(value) if unit == "fraction" else value for value in values]
    most = max((_decimals(value) for value in scaled if value is not None), default=0)
    return max(most, 1) if unit == "fraction" else most


def _decimals(value: float) -> int:
    shown = round(value, MOST_DECIMALS)
    return next(n for n in range(MOST_DECIMALS + 1) if round(shown, n) == shown)


def is_default(owner: Any, name: str) -> bool:
    """Whether an input still has the value that a new deal has."""
    spec = next(one for one in fields(owner) if one.name == name)
    default: Any = spec.default
    if spec.default_factory is not NO_DEFAULT:
        default = spec.default_factory()
    return bool(getattr(owner, name) == default)


def is_given(value: Any) -> bool:
    """Whether there is anything to show of a value."""
    return value not in (None, "", {})
