"""A day as people type it: ISO, in figures in the order of the locale, or with the month's name."""

import re
from datetime import date

from workbench.text.entry import NotTaken
from workbench.text.locale import MONTHS, Locale

_ORDERS = {"day": "dmy", "month": "mdy", "year": "ymd"}
_EXAMPLES = {"day": "31.01.2027", "month": "01/31/2027", "year": "2027-01-31"}
_LEAST_LETTERS = 3
"""A month's name may be cut to its first letters, but no shorter."""


def read_day(text: str, locale: Locale) -> date | NotTaken:
    """The day a text names, or why it names none."""
    words = [word for word in re.split(r"[\s.,/\-]+", text.strip()) if word]
    named = [_month(word) for word in words]
    if len(words) != 3:
        return _refused(locale)
    if any(named):
        place = next(place for place, month in enumerate(named) if month)
        month = named[place]
        figures = [word for position, word in enumerate(words) if position != place]
        year_first = len(figures[0]) == 4
        year, day = figures if year_first else reversed(figures)
        return _made(year, str(month), day, locale)
    order = "ymd" if len(words[0]) == 4 else _ORDERS[locale.date_begins]
    by = dict(zip(order, words, strict=True))
    return _made(by["y"], by["m"], by["d"], locale)


def _month(word: str) -> int:
    """The number of a month by its name; 0 for no name."""
    if len(word) < _LEAST_LETTERS:
        return 0
    low = word.casefold()
    return next((n for n, name in enumerate(MONTHS, 1) if name.casefold().startswith(low)), 0)


def _made(year: str, month: str, day: str, locale: Locale) -> date | NotTaken:
    parts = (year, month, day)
    if not all(part.isascii() and part.isdigit() for part in parts):
        return _refused(locale)
    if len(year) != 4:
        return NotTaken("The year of a date is written with four digits.")
    try:
        return date(int(year), int(month), int(day))
    except ValueError:
        return NotTaken("There is no such day.")


def _refused(locale: Locale) -> NotTaken:
    typed = _EXAMPLES[locale.date_begins]
    also = "" if typed == "2027-01-31" else f" or {typed}"
    return NotTaken(f"A date is written like 2027-01-31{also}.")
