"""Loans by year: what each costs and leaves, how income covers it, and the loan under the price."""

from dataclasses import replace

from workbench.charts.loan import draw_loan
from workbench.deal.borrow import Loan
from workbench.report.chart_figures import loan_figures
from workbench.report.document import Block, Figure, Section, Subheading, plain
from workbench.report.names import item_title
from workbench.report.years import Amounts, Row, Years

_CHART = (126.0, 7.6)


def loan_section(years: Years, column: float) -> tuple[Section, ...]:
    """Nothing where no loan is assumed: the first page says so."""
    loans = years.voice.deal.loans
    if not loans or not years.count:
        return ()
    picture = draw_loan(loan_figures(years), column, *_CHART)
    blocks: list[Block] = [Subheading("Loan under price"), Figure(picture, picture.words)]
    for loan in loans:
        blocks.append(Subheading(item_title(loan, "loans")))
        blocks += _until_repaid(years, _rows(years, loan), years.line(f"balance@{loan.id}"))
    blocks += [
        Subheading("Cover and debt yield"),
        plain("Debt service is interest and principal, without repayment at a maturity.", "small"),
        *_until_repaid(years, _cover(years, len(loans) > 1), years.line("loan_balance")),
    ]
    return (Section("Loans by year", tuple(blocks)),)


def _until_repaid(years: Years, rows: list[Row], balance: Amounts) -> list[Block]:
    """The table up to the year in which the last is repaid."""
    owed = [year for year, amount in enumerate(balance, start=1) if amount != 0]
    last = min(max(owed, default=0) + 1, years.count)
    if last == years.count:
        return [years.table(rows)]
    note = plain(f"Nothing is owed after year {last}.", "small")
    return [replace(years, count=last).table([row.until(last) for row in rows]), note]


def _rows(years: Years, loan: Loan) -> list[Row]:
    balance = years.line(f"balance@{loan.id}")
    opening: Amounts = (years.result.given(f"loans@{loan.id}.amount"), *balance[:-1])
    return [
        Row("Owed at the year’s start", opening),
        years.row(f"interest@{loan.id}"),
        years.row(f"principal@{loan.id}"),
        years.row(f"service@{loan.id}", strong=True),
        years.row(f"repayment@{loan.id}"),
        Row("Owed at the year’s end", balance, strong=True),
    ]


def _cover(years: Years, several: bool) -> list[Row]:
    rows = [
        years.row("noi_of_year"),
        years.row("net_cash_flow"),
        years.row("debt_service"),
        Row("DSCR on NOI", years.line("dscr_noi"), "multiple", strong=True),
        Row("DSCR on net cash flow", years.line("dscr_ncf"), "multiple", strong=True),
        Row("Debt yield", years.line("debt_yield"), "fraction", strong=True),
    ]
    if several:
        rows.insert(0, Row("All loans, owed at the year’s end", years.line("loan_balance")))
    return rows
