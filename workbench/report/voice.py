"""How the memo puts figures: one reader's marks, one currency, the same words everywhere."""

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from datetime import MAXYEAR, date

from workbench.deal.deal import Deal
from workbench.report.cautions import NOT_STATED
from workbench.text import numbers
from workbench.text.currency import find_currency
from workbench.text.excerpt import excerpt
from workbench.text.locale import Locale
from workbench.text.years import year_span

_LONGEST_AMOUNT = 15
"""Characters of an amount in a text or table; a longer one is shortened."""
_SHORT_AMOUNT = 11
_SHORTEST_AMOUNT = 7
_AREA_UNITS = {"m2": "m²", "sqft": "sq ft"}


@dataclass(frozen=True)
class Voice:
    """Figures of one deal in the words of one locale."""

    deal: Deal
    locale: Locale

    def money(self, value: float | None, characters: int = _LONGEST_AMOUNT) -> str:
        return numbers.compact(value, self.locale, characters)

    def short_money(self, value: float | None) -> str:
        return self.money(value, _SHORT_AMOUNT)

    def priced(self, value: float | None) -> str:
        text = self.money(value)
        return text if text == numbers.MISSING else f"{self.unit()}\u00a0{text}"

    @property
    def money_digits(self) -> int:
        """Decimals of amounts that are not whole: two, or more where the currency has more.

        Also in a currency without a smaller unit, of which a rent by area may name a part.
        """
        currency = find_currency(self.deal.conventions.currency)
        return max(2, currency.digits) if currency is not None else 2

    def exact(self, value: float | None, decimals: int | None = None) -> str:
        """An amount as typed: whole, or with the decimals of its currency."""
        if decimals is None:
            whole = value is None or round(value, self.money_digits) == round(value)
            decimals = 0 if whole else self.money_digits
        return numbers.number(value, self.locale, decimals)

    def scaled(self, value: float | None, scale: numbers.Scale) -> str:
        """An amount of a table; one beyond every scale is shortened as an amount of its own."""
        text = numbers.money(value, self.locale, scale)
        return text if len(text) <= _LONGEST_AMOUNT else self.short_money(value)

    def alike(self, *rows: Sequence[float | None]) -> Callable[[float], str]:
        """How amounts of a scale are put: all in units, or all in thousands, millions, …"""
        amounts = tuple(amount for row in rows for amount in row)
        scale = numbers.scale_for(amounts, self.locale, _SHORT_AMOUNT)
        if scale != numbers.ONE:
            scale = numbers.scale_for(amounts, self.locale, _SHORTEST_AMOUNT)

        def mark(amount: float) -> str:
            text = numbers.trimmed(amount / scale.factor, self.locale, 0, 2)
            text = text + scale.short if amount else text
            return text if len(text) <= _LONGEST_AMOUNT else self.short_money(amount)

        return mark

    def unit(self, scale: numbers.Scale = numbers.ONE) -> str:
        """What amounts are counted in: `EUR` or `EUR thousand`."""
        return f"{excerpt(self.deal.conventions.currency, 10)} {scale.name}".strip()

    @property
    def area_unit(self) -> str:
        return _AREA_UNITS[self.deal.conventions.area_unit]

    def area(self, value: float | None) -> str:
        return numbers.area(value, self.locale, self.area_unit)

    def day(self, value: date | None) -> str:
        """A date for a table."""
        return numbers.day(value, self.locale, short=True)

    def count(self, value: float | None) -> str:
        return numbers.number(value, self.locale)

    def decimal(self, value: float | None, decimals: int) -> str:
        return numbers.number(value, self.locale, decimals)

    def share(self, value: float | None) -> str:
        return numbers.percent(value, self.locale)

    def rate(self, value: float | None) -> str:
        return numbers.rate(value, self.locale)

    def ratio(self, value: float | None) -> str:
        return numbers.number(value, self.locale, 2)

    def points(self, value: float) -> str:
        return f"{numbers.number(100 * value, self.locale, 1)} percentage points"

    def years(self, count: int | None) -> str:
        if count is None:
            return NOT_STATED
        return "1 year" if count == 1 else f"{numbers.number(count, self.locale)} years"

    def sale_date(self, hold: int | None) -> str:
        """`the end of year 10 (31 March 2036)`, with the date where there is a closing date."""
        if hold is None:
            return "the end of the hold"
        closing = self.deal.purchase.closing_date
        if closing is None or closing.year + hold > MAXYEAR:
            return f"the end of year {hold}"
        last = year_span(closing, hold)[1]
        return f"the end of year {hold} ({numbers.day(last, self.locale)})"

    def required_return(self) -> str:
        """The required return, with what is required of the sale beyond it."""
        extra = self.deal.returns.extra_on_exit
        rate = self.required_rate()
        return f"{rate} ({self.rate(extra)} more on the sale)" if extra else rate

    def required_rate(self) -> str:
        """The required return: one rate, or the lowest and highest of the years."""
        hold = self.deal.leave.hold or 1
        row = self.deal.returns.required
        used = [rate for year, rate in row.items() if year <= hold]
        if not used:
            return f"— ({NOT_STATED})"
        low, high = min(used), max(used)
        if low == high:
            return self.rate(low)
        return f"{self.rate(low)} to {self.rate(high)} by year"

    def size(self) -> str:
        """Units and area of the rent roll, as far as they are known."""
        spaces = self.deal.spaces
        units = sum(space.count or 0 for space in spaces)
        parts: list[str] = []
        if units:
            count = numbers.number(units, self.locale)
            parts.append("1 unit" if units == 1 else f"{count} units")
        if spaces and all(space.area is not None for space in spaces):
            area = sum((space.area or 0.0) * (space.count or 0) for space in spaces)
            parts.append(self.area(area))
        return ", ".join(parts)
