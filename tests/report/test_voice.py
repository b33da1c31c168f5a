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
