"""The steps of each exit method, from the lines and inputs it is computed from."""

from collections.abc import Iterator
from dataclasses import dataclass

from workbench.deal.inputs import YEARS, at_year
from workbench.deal.leave import ExitMethod
from workbench.deal.paths import field_of, get
from workbench.report.typed import amount_text, value_text
from workbench.report.years import Years
from workbench.text import numbers


@dataclass(frozen=True)
class Step:
    """A row of the derivation."""

    label: str
    text: str
    note: str = ""
    strong: bool = False


@dataclass(frozen=True)
class Sale:
    """The sale at the end of the hold."""

    years: Years

    @property
    def hold(self) -> int:
        return self.years.count

    def amount(
        self, label: str, key: str, year: int | None = None, note: str = "", strong: bool = False
    ) -> Step:
        """A line of the engine, in one year where it has years."""
        figure = self.years.result.figure(key, year)
        return Step(label, self.years.voice.money(figure), note, strong)

    def defined(self, label: str, key: str, year: int) -> Step:
        """A line with its own definition under it."""
        return self.amount(label, key, year, self.years.result.declared[key].definition)

    def typed(self, path: str) -> Step:
        """An input under its own label."""
        deal = self.years.voice.deal
        field = field_of(deal, path)
        text = value_text(self.years.voice, deal.leave, field, get(deal, path))
        return Step(field.input.label if field.input else path, text)


def method_steps(sale: Sale, method: ExitMethod, price: float | None) -> list[Step]:
    """The steps of one method, the last of them its price."""
    made = {
        "forward_noi": _capitalised,
        "trailing_noi": _capitalised,
        "perpetuity": _perpetuity,
        "price_per": _price_per,
        "rent_multiple": _rent_multiple,
        "purchase_price": _purchase_price,
        "amount": _amount,
    }[method]
    last = Step("Price", sale.years.voice.money(price), strong=True)
    return [*made(sale, method), last]


def _capitalised(sale: Sale, method: ExitMethod) -> Iterator[Step]:
    years, result = sale.years, sale.years.result
    year = sale.hold + (method == "forward_noi")
    keys = ["effective_gross_income", "operating_expenses"]
    if years.voice.deal.spend.reserves_place == "above":
        keys.append("reserves")
    for key in keys:
        yield sale.amount(f"{years.label(key)}, year {year}", key, year)
    yield sale.amount(f"{years.label('noi')}, year {year}, as modelled", "noi", year)
    if result.plan.shape.stabilised:
        yield sale.typed("leave.stabilised_vacancy")
        for key in ("stabilised_income", "stabilised_noi"):
            yield sale.defined(f"{years.label(key)}, year {year}", key, year)
    yield sale.defined("Capitalised income", f"{method}_income", sale.hold)
    yield sale.typed("leave.exit_yield")
    if result.plan.shape.stabilised:
        yield sale.defined("Leases above or below market", "off_market_value", sale.hold)


def _perpetuity(sale: Sale, method: ExitMethod) -> Iterator[Step]:
    voice, result = sale.years.voice, sale.years.result
    growth = result.declared["lasting_growth"]
    text = voice.rate(result.figure("lasting_growth"))
    yield Step(growth.label, text, growth.definition)
    last = at_year(voice.deal.returns.required, YEARS)
    yield Step(f"Required return of year {YEARS} and after", voice.rate(last))
    yield Step(
        sale.years.label("lasting_value"),
        voice.money(result.figure("lasting_value")),
        result.declared["lasting_value"].definition,
    )
    yield sale.defined("Value of all later years", "perpetuity_price", sale.hold)


def _price_per(sale: Sale, method: ExitMethod) -> Iterator[Step]:
    voice, result = sale.years.voice, sale.years.result
    yield sale.typed("leave.price_per")
    by_unit = voice.deal.leave.price_per_of == "unit"
    measure = float(result.plan.facts["units" if by_unit else "area"][0])
    label = "Units" if by_unit else "Area of all units"
    yield Step(label, voice.count(measure) if by_unit else voice.area(measure))
    yield _index(sale)


def _purchase_price(sale: Sale, method: ExitMethod) -> Iterator[Step]:
    voice = sale.years.voice
    yield Step("Price paid", voice.money(voice.deal.purchase.price))
    yield _index(sale)


def _index(sale: Sale) -> Step:
    result, locale = sale.years.result, sale.years.voice.locale
    figure = numbers.number(result.figure("price_index", sale.hold), locale, 4)
    return Step(sale.years.label("price_index"), figure, result.declared["price_index"].definition)


def _rent_multiple(sale: Sale, method: ExitMethod) -> Iterator[Step]:
    label = sale.years.label("gross_rent_of_year")
    yield sale.defined(f"{label}, year {sale.hold + 1}", "gross_rent_of_year", sale.hold + 1)
    multiple = sale.years.voice.deal.leave.rent_multiple
    text = numbers.MISSING
    if multiple is not None:
        text = amount_text(sale.years.voice, "multiple", multiple)
    yield Step("Multiple", text)


def _amount(sale: Sale, method: ExitMethod) -> Iterator[Step]:
    yield from ()
