"""The calendar of deal years."""

from datetime import date

from workbench.deal.dates import add_months
from workbench.text.locale import LOCALES
from workbench.text.years import month_and_year, year_span


def test_days_past_a_months_end_become_its_last_day() -> None:
    assert add_months(date(2024, 1, 31), 1) == date(2024, 2, 29)
    assert add_months(date(2024, 2, 29), 12) == date(2025, 2, 28)
    assert add_months(date(2025, 11, 30), 3) == date(2026, 2, 28)


def test_a_deal_year_ends_on_the_day_before_the_next_begins() -> None:
    assert year_span(date(2026, 4, 1), 1) == (date(2026, 4, 1), date(2027, 3, 31))
    assert year_span(date(2026, 4, 1), 10) == (date(2035, 4, 1), date(2036, 3, 31))
    assert year_span(date(2024, 2, 29), 2) == (date(2025, 2, 28), date(2026, 2, 27))


def test_a_month_with_its_year_for_a_narrow_heading() -> None:
    assert month_and_year(date(2027, 9, 30), LOCALES["de-DE"]) == "Sep 2027"
    assert month_and_year(date(2027, 9, 30), LOCALES["sv-SE"]) == "2027 Sep"
