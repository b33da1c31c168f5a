"""Figures in a reader's words."""

from dataclasses import replace
from datetime import date

from tests.report.deals import BARE, DEAL
from workbench.deal.deal import Deal
from workbench.deal.earn import Space
from workbench.deal.leave import Leave, Returns
from workbench.deal.property import Conventions
from workbench.deal.purchase import Purchase
from workbench.report.voice import Voice
from workbench.text.locale import LOCALES
from workbench.text.numbers import THOUSAND

US, DE = LOCALES["en-US"], LOCALES["de-DE"]


def test_amounts() -> None:
    voice = Voice(DEAL, US)
    assert voice.money(3_807_784.4) == "3,807,784"
    assert voice.money(123_456_789_012.0) == "123,456,789,012"
    assert voice.short_money(123_456_789_012.0) == "123,456.79m"
    assert voice.priced(-5.0) == "USD\u00a0−5"
    assert voice.priced(None) == "—"
    assert (
        Voice(replace(DEAL, conventions=Conventions("EUR")), DE).priced(1e6) == "EUR\u00a01.000.000"
    )


def test_shares_rates_and_ratios() -> None:
    voice = Voice(DEAL, US)
    assert voice.share(0.5352) == "53.5%"
    assert voice.rate(0.0912) == "9.12%"
    assert voice.ratio(1.184) == "1.18"
    assert voice.points(0.053) == "5.3 percentage points"


def test_years_and_dates() -> None:
    voice = Voice(DEAL, DE)
    assert [voice.years(count) for count in (1, 10, None)] == ["1 year", "10 years", "not stated"]
    assert voice.sale_date(10) == "the end of year 10 (31 March 2036)"
    assert voice.sale_date(None) == "the end of the hold"
    assert Voice(BARE, DE).sale_date(10) == "the end of year 10"
    late = replace(DEAL, purchase=Purchase(closing_date=date(9995, 1, 1)))
    assert Voice(late, DE).sale_date(10) == "the end of year 10"


def required(row: dict[int, float], extra: float = 0.0, hold: int | None = 5) -> str:
    deal = replace(DEAL, returns=Returns(row, extra), leave=Leave(hold))
    return Voice(deal, US).required_return()


def test_the_required_return_in_words() -> None:
    assert required({1: 0.08}) == "8.0%"
    assert required({1: 0.08, 3: 0.0925}) == "8.0% to 9.25% by year"
    assert required({1: 0.08, 6: 0.09}) == "8.0%"
    assert required({1: 0.08}, 0.01) == "8.0% (1.0% more on the sale)"
    assert required({}) == "— (not stated)"
    assert required({1: 0.08}, hold=None) == "8.0%"


def size(*spaces: Space) -> str:
    return Voice(Deal(spaces=spaces), US).size()


def test_the_size_as_far_as_it_is_known() -> None:
    assert Voice(DEAL, US).size() == "8 units, 640\u00a0m²"
    assert size(Space("s1", count=1)) == "1 unit"
    assert size(Space("s1", area=5.0), Space("s2", count=2)) == "2 units"
    assert size() == ""
    feet = replace(DEAL, conventions=Conventions(area_unit="sqft"))
    assert Voice(feet, US).size() == "8 units, 640\u00a0sq ft"


def with_currency(code: str) -> Voice:
    return Voice(replace(DEAL, conventions=Conventions(code)), US)


def test_amounts_as_typed_have_the_decimals_of_the_currency() -> None:
    assert with_currency("USD").exact(19.5) == "19.50"
    assert with_currency("USD").exact(19.0) == "19"
    assert with_currency("USD").exact(19.0, 2) == "19.00"
    assert with_currency("USD").exact(None) == "—"
    assert with_currency("KRW").exact(19.5) == "19.50"
    assert with_currency("KWD").exact(19.5) == "19.500"
    assert with_currency("none").exact(19.5) == "19.50"


def test_what_amounts_are_counted_in() -> None:
    assert with_currency("EUR").unit() == "EUR"
    assert with_currency("EUR").unit(THOUSAND) == "EUR thousand"
    assert len(with_currency("E" * 5000).unit()) == 10


def test_amounts_of_a_table_are_shortened_beyond_every_scale() -> None:
    voice = Voice(DEAL, US)
    assert voice.scaled(1_234_567.0, THOUSAND) == "1,235"
    assert voice.scaled(1e40, THOUSAND) == "1.0E40"


def test_amounts_of_a_scale_are_put_alike() -> None:
    voice = Voice(DEAL, US)
    small = voice.alike((0.0, 250_000.0), (None, 4e5))
    assert [small(amount) for amount in (0.0, 200_000.0)] == ["0", "200,000"]
    large = voice.alike((2e9,))
    assert [large(amount) for amount in (0.0, 5e8, -1.5e9)] == ["0", "500m", "−1,500m"]
    assert voice.alike((1e60,))(1e60) == "1.0E60"


def test_figures_of_tables() -> None:
    voice = Voice(DEAL, US)
    assert voice.area(62.5) == "62.5\u00a0m²"
    assert voice.day(date(2026, 4, 1)) == "Apr 1, 2026"
    assert voice.day(None) == "—"
    assert voice.count(1200.0) == "1,200"
    assert voice.decimal(1.25, 1) == "1.3"
