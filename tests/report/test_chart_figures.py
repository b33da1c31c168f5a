"""What the charts by year are given."""

from tests.fullest import fullest, small
from tests.report.sections import years_of
from workbench.report.chart_figures import income_figures, loan_figures, tier_figures


def test_income_and_what_is_paid_above_nothing() -> None:
    years = years_of(fullest())
    figures = income_figures(years)
    assert figures.noi == years.line("noi")
    assert figures.net_cash == years.line("net_cash_flow")
    assert figures.service == tuple(-(paid or 0.0) for paid in years.line("debt_service"))
    assert all(paid is not None and paid > 0 for paid in figures.service)
    assert income_figures(years_of(small())).service == ()


def test_the_loan_from_closing_on() -> None:
    years = years_of(fullest())
    figures = loan_figures(years)
    assert figures.balance == (700_000.0, *years.line("loan_balance"))
    assert figures.sale == (None, *years.line("exit_price_of_year"))
    assert figures.price == 1_250_000.0


def test_tiers_add_up_to_net_cash_flow() -> None:
    years = years_of(fullest())
    figures = tier_figures(years)
    for a, b, net in zip(
        figures.in_hand, figures.expected, years.line("net_cash_flow"), strict=True
    ):
        assert a is not None
        assert b is not None
        assert net is not None
        assert abs(a + b - net) < 1e-9
