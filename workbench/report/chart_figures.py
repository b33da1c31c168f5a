"""What the charts by year show: the same for the memo and for the screen."""

from workbench.charts.income import IncomeFigures
from workbench.charts.loan import LoanFigures
from workbench.charts.tiers import TierFigures
from workbench.report.years import Years


def income_figures(years: Years) -> IncomeFigures:
    """Income before and after works, and what is paid on loans, as amounts above nothing."""
    has_loan = bool(years.voice.deal.loans)
    noi, cash = years.line("noi"), years.line("net_cash_flow")
    service = years.line("debt_service") if has_loan else ()
    paid = tuple(None if amount is None else -amount + 0.0 for amount in service)
    voice = years.voice
    return IncomeFigures(noi, cash, paid, voice.short_money, voice.alike(noi, cash, paid))


def loan_figures(years: Years) -> LoanFigures:
    """What is owed at closing and at each year's end, the price, and prices of a sale."""
    voice, price = years.voice, years.result.given("purchase.price")
    balance = (years.result.figure("loan_amount"), *years.line("loan_balance"))
    sale = (None, *years.line("exit_price_of_year"))
    mark = voice.alike(balance, (price,), sale)
    return LoanFigures(balance, price, sale, voice.short_money, mark, voice.share)


def tier_figures(years: Years) -> TierFigures:
    """Net cash flow of each year in hand and expected."""
    in_hand, expected = years.line("cash_in_hand"), years.line("cash_expected")
    voice = years.voice
    return TierFigures(in_hand, expected, voice.short_money, voice.alike(in_hand, expected))
