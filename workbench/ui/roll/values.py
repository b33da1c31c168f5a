"""The cells of the rent roll: texts read into values, and values shown, edited and copied."""

import re
from datetime import date
from typing import Any, Literal, TypeAlias

from workbench.deal.deal import Deal
from workbench.deal.earn import Rent
from workbench.session.typed import locale_of
from workbench.text import numbers
from workbench.text.currency import find_currency
from workbench.text.entry import NotTaken, parse_number
from workbench.ui.grid.clipboard import plain
from workbench.ui.roll.columns import AREA_UNITS, Column
from workbench.ui.roll.dates import read_day

Value: TypeAlias = str | int | float | date | Rent | None

_MONTHLY = {"month", "monthly", "mo", "pm", "pcm"}
_YEARLY = {"year", "yearly", "annual", "annually", "yr", "pa", "pax"}
_UNITS = {"unit", "each", "space"}
_AREAS = {
    "m2": {"m²", "m2", "sqm", "area"},
    "sqft": {"sqft", "ft²", "ft2", "sf", "psf", "area"},
}


def choices(deal: Deal) -> list[str]:
    """What a rent can be counted by."""
    area = AREA_UNITS[deal.conventions.area_unit]
    return [f"{of}/{per}" for of in ("unit", area) for per in ("month", "year")]


def read_cell(column: Column, text: str, held: Any, deal: Deal) -> Value | NotTaken:
    """The value a text stands for in a column; an emptied cell is as if never filled."""
    plain_text = " ".join(text.split())
    match column.content:
        case "text":
            return plain_text
        case "basis":
            return _basis(plain_text, held, deal) if plain_text else held
        case "date":
            return read_day(plain_text, locale_of(deal)) if plain_text else None
        case _:
            return _number(column, plain_text, deal)


def _number(column: Column, text: str, deal: Deal) -> Value | NotTaken:
    if not text:
        return 0 if column.field == "free_months" else None
    read = parse_number(_bare(column, text, deal), locale_of(deal))
    if isinstance(read, NotTaken):
        return read
    if column.content != "whole":
        return read.value
    if not read.value.is_integer():
        return NotTaken("A whole number is needed here.")
    return int(read.value)


def _bare(column: Column, text: str, deal: Deal) -> str:
    """A figure without the currency or unit of area that a spreadsheet shows beside it."""
    if column.content == "money":
        currency = find_currency(deal.conventions.currency)
        marks = {deal.conventions.currency, currency.sign if currency else ""}
    else:
        marks = {"m²", "m2"} if deal.conventions.area_unit == "m2" else {"sq ft", "sqft"}
    for mark in sorted(marks - {""}, key=len, reverse=True):
        if text.endswith(mark):
            return text.removesuffix(mark).strip() or text
        sign = text[:1] if text[:1] in "-−(" else ""
        if text[len(sign) :].startswith(mark):
            return sign + text[len(sign) + len(mark) :].strip() or text
    return text


def _basis(text: str, held: Rent, deal: Deal) -> Rent | NotTaken:
    """A rent counted as the words say; what they leave open stays as it is."""
    words = set(re.findall(r"[a-z]+[²2]?", text.casefold().replace("sq ft", "sqft")))
    area = words & _AREAS[deal.conventions.area_unit]
    known = _MONTHLY | _YEARLY | _UNITS | area | {"per", "a", "an", "of", "sq", "ft"}
    both = bool(words & _MONTHLY) and bool(words & _YEARLY)
    if not words or words - known or both or (area and words & _UNITS):
        return NotTaken(f"A rent is counted by one of {', '.join(choices(deal))}.")
    per: Literal["month", "year"] = held.per
    of: Literal["unit", "area"] = held.of
    if words & (_MONTHLY | _YEARLY):
        per = "month" if words & _MONTHLY else "year"
    if area or words & _UNITS:
        of = "area" if area else "unit"
    return Rent(held.amount, per, of)


def shown(column: Column, value: Any, deal: Deal) -> str:
    """A value as the grid shows it."""
    locale = locale_of(deal)
    if value is None or value == "":
        return ""
    match column.content:
        case "text":
            return str(value)
        case "basis":
            return basis_text(value, deal)
        case "date":
            return numbers.day(value, locale, short=True)
        case "money":
            return numbers.number(value, locale, 0 if value == round(value) else 2)
        case "area":
            return numbers.trimmed(value, locale, 0, 2)
        case _:
            return numbers.number(value, locale)


def basis_text(rent: Rent, deal: Deal) -> str:
    of = AREA_UNITS[deal.conventions.area_unit] if rent.of == "area" else "unit"
    return f"{of}/{rent.per}"


def edited(column: Column, value: Any, deal: Deal) -> str:
    """A value as an editor starts with it and as it is copied: all there is, easily read back."""
    if value is None:
        return ""
    match column.content:
        case "date":
            return str(value.isoformat())
        case "whole" | "area" | "money":
            return plain(value, locale_of(deal))
        case _:
            return shown(column, value, deal)
