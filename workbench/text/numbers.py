"""The one rounding and formatting policy: every figure a person reads passes through here.

A figure is rounded once, when it is shown: half away from zero, on the shortest decimal that
names the float, so that 2.675 shows as 2.68 as a reader expects. A missing figure is an em dash.
Negative figures carry a true minus sign.
"""

from dataclasses import dataclass
from datetime import date
from decimal import ROUND_HALF_UP, Context, Decimal
from math import isfinite

from workbench.text.currency import Currency
from workbench.text.locale import MONTHS, NO_BREAK, Locale

MISSING = "—"
MINUS = "−"
_WIDE = Context(prec=700, rounding=ROUND_HALF_UP)
"""Room for every digit of the largest float."""


@dataclass(frozen=True)
class Scale:
    """What the figures of a table or a label are counted in."""

    factor: float
    name: str
    """For a heading, as in `USD thousand`; empty for single units."""
    short: str
    """For a label, set after the figure."""


ONE = Scale(1.0, "", "")
THOUSAND = Scale(1e3, "thousand", "k")
MILLION = Scale(1e6, "million", "m")
BILLION = Scale(1e9, "billion", "bn")
TRILLION = Scale(1e12, "trillion", "tn")


def _grouped(digits: str, locale: Locale) -> str:
    parts: list[str] = []
    sizes = list(locale.grouping)
    size = sizes.pop(0)
    while len(digits) > size:
        parts.append(digits[-size:])
        digits = digits[:-size]
        size = sizes.pop(0) if sizes else size
    return locale.group.join([digits, *reversed(parts)])


def _rounded(value: float, digits: int) -> Decimal:
    return Decimal(repr(float(value))).quantize(Decimal(1).scaleb(-digits), context=_WIDE)


def number(value: float | None, locale: Locale, digits: int = 0) -> str:
    """A plain number with so many decimals; what is missing or not finite is an em dash."""
    if value is None or not isfinite(value):
        return MISSING
    rounded = _rounded(value, digits)
    whole, _, fraction = f"{abs(rounded):f}".partition(".")
    text = _grouped(whole, locale) + (locale.decimal + fraction if fraction else "")
    return MINUS + text if rounded < 0 else text


def trimmed(value: float | None, locale: Locale, least: int = 0, most: int = 4) -> str:
    """A number with as many decimals as it needs, between two limits."""
    if value is None or not isfinite(value):
        return MISSING
    digits = most
    while digits > least and _rounded(value, digits) == _rounded(value, digits - 1):
        digits -= 1
    return number(value, locale, digits)


def money(value: float | None, locale: Locale, scale: Scale = ONE, digits: int = 0) -> str:
    """An amount without its currency, in whole units unless digits are asked for."""
    return number(None if value is None else value / scale.factor, locale, digits)


def priced(
    value: float | None, locale: Locale, currency: Currency, by_sign: bool = False, digits: int = 0
) -> str:
    """An amount with its currency: `USD 3,200,000`, or `$3,200,000` and `3.200.000 €` by sign."""
    text = number(value, locale, digits)
    if text == MISSING:
        return text
    if not by_sign or currency.sign == currency.code:
        return f"{currency.code}{NO_BREAK}{text}"
    if locale.sign_after:
        return f"{text}{locale.sign_gap}{currency.sign}"
    minus = MINUS if text.startswith(MINUS) else ""
    return f"{minus}{currency.sign}{locale.sign_gap}{text.removeprefix(MINUS)}"


def compact(value: float | None, locale: Locale, characters: int = 11) -> str:
    """An amount in whole units, or shortened (`380.78m`) where it would be longer than that."""
    text = number(value, locale)
    if value is None or len(text) <= characters:
        return text
    for digits in (2, 1, 0):
        for scale in (MILLION, BILLION, TRILLION):
            text = money(value, locale, scale, digits) + scale.short
            if len(text) <= characters and abs(value) >= scale.factor:
                return text
    return f"{value:.1e}".replace("e+", "E").replace(".", locale.decimal).replace("-", MINUS)


def scale_for(values: tuple[float | None, ...], locale: Locale, characters: int = 11) -> Scale:
    """The scale a table needs for its largest figure to fit."""
    for scale in (ONE, THOUSAND, MILLION):
        if all(len(money(value, locale, scale)) <= characters for value in values):
            return scale
    return BILLION


def percent(value: float | None, locale: Locale, digits: int = 1) -> str:
    """A computed share or return: the fraction 0.535 is `53.5%`."""
    return _with_percent(number(hundredfold(value), locale, digits), locale)


def rate(value: float | None, locale: Locale, least: int = 1, most: int = 2) -> str:
    """An assumed rate with the decimals it was given: 0.06 is `6.0%`, 0.0625 is `6.25%`."""
    return _with_percent(trimmed(hundredfold(value), locale, least, most), locale)


def hundredfold(value: float | None) -> float | None:
    """A fraction in per cent, shifted as a decimal, since 100 × 0.0715 is not 7.15 in binary."""
    if value is None or not isfinite(value):
        return None
    return float(Decimal(repr(float(value))).scaleb(2, context=_WIDE))


def _with_percent(text: str, locale: Locale) -> str:
    return text if text == MISSING else f"{text}{locale.percent_gap}%"


def multiple(value: float | None, locale: Locale, digits: int = 2) -> str:
    """A ratio that is read as so many times: `1.85×`."""
    text = number(value, locale, digits)
    return text if text == MISSING else f"{text}×"


def area(value: float | None, locale: Locale, unit: str) -> str:
    """An area with its unit; only small areas need a decimal."""
    most = 0 if value is None or abs(value) >= 1000 else 1
    text = trimmed(value, locale, 0, most)
    return text if text == MISSING else f"{text}{NO_BREAK}{unit}"


def day(value: date | None, locale: Locale, short: bool = False) -> str:
    """A date with its month in words, so that no reader can swap day and month."""
    if value is None:
        return MISSING
    month = MONTHS[value.month - 1]
    month = month[:3] if short else month
    if locale.date_begins == "month":
        return f"{month} {value.day}, {value.year}"
    if locale.date_begins == "year":
        return f"{value.year} {month} {value.day}"
    return f"{value.day} {month} {value.year}"
