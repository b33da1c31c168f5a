"""An entry split into its numbers and signs, by the marks of a locale.

Group marks must stand where the locale puts them: a reader used to decimal commas who types
`1,5` among decimal points is told so instead of being given fifteen.
"""

import re
from decimal import Context, Decimal, DivisionByZero, InvalidOperation

from workbench.text.locale import NARROW, NO_BREAK, Locale

EXACT = Context(prec=60, traps=[DivisionByZero, InvalidOperation])
"""Digits enough for any entry that is short enough to be read."""

_SPACES = f" {NO_BREAK}{NARROW}\u2009"
_SUFFIXES = {"k": 3, "m": 6, "bn": 9, "tn": 12}
_SIGNS = "+-*/()%"


class RefusedError(Exception):
    """Carries a sentence out of the nested grammar; `parse_number` turns it into a value."""


def split_entry(text: str, locale: Locale) -> tuple[Decimal | str, ...]:
    """Split into numbers and signs, suffixes already applied."""
    parts: list[Decimal | str] = []
    place = 0
    pattern = _number_pattern(locale)
    while place < len(text):
        if text[place] in _SIGNS:
            parts.append(text[place])
            place += 1
        elif text[place] in _SPACES:
            place += 1
        else:
            found = pattern.match(text, place)
            if found is None:
                raise RefusedError(_unknown(text[place], locale))
            parts.append(_number(found, text, locale))
            place = found.end()
    return tuple(parts)


def _number_pattern(locale: Locale) -> re.Pattern[str]:
    mark = re.escape(locale.decimal)
    group = _group_class(locale)
    digits = rf"\d+(?:{group}\d+)*"
    return re.compile(
        rf"(?P<whole>{digits})?(?:{mark}(?P<part>\d*))?(?P<power>e[+-]?\d{{1,4}})?"
        rf"(?:[{_SPACES}]?(?P<suffix>bn|tn|k|m)(?![^\W\d_]))?(?<=\w|{mark})",
        re.IGNORECASE | re.ASCII,
    )


def _group_class(locale: Locale) -> str:
    return f"[{_SPACES}]" if locale.group in _SPACES else re.escape(locale.group)


def _number(found: re.Match[str], text: str, locale: Locale) -> Decimal:
    whole, part = found["whole"] or "", found["part"] or ""
    if not whole and not part:
        raise RefusedError(_unknown(text[found.start()], locale))
    groups = re.split(_group_class(locale), whole)
    if not _well_grouped(groups, locale):
        raise RefusedError(
            f"In “{found[0].strip()}” the mark “{locale.group}” does not separate thousands; "
            f"the decimal mark here is “{locale.decimal}”."
        )
    following = text[found.end() : found.end() + 1]
    if following == locale.decimal or (following == locale.group and following not in _SPACES):
        raise RefusedError(f"“{text}” has a mark too many.")
    power = int((found["power"] or "e0")[1:]) + _SUFFIXES.get((found["suffix"] or "").lower(), 0)
    digits = "".join(groups) + (f".{part}" if part else "")
    return Decimal(digits).scaleb(power, context=EXACT)


def _well_grouped(groups: list[str], locale: Locale) -> bool:
    sizes = list(locale.grouping)
    for group in reversed(groups[1:]):
        if len(group) != sizes[0]:
            return False
        sizes = sizes[1:] or sizes
    return len(groups) == 1 or 1 <= len(groups[0]) <= sizes[0]


def _unknown(character: str, locale: Locale) -> str:
    return f"“{character}” is not part of a number; the decimal mark here is “{locale.decimal}”."
