"""The statement by year: every line of it, with what loans take, and the picture of the two."""

from workbench.charts.income import draw_income
from workbench.engine.figures import NOT_YET, STATEMENT
from workbench.report.chart_figures import income_figures
from workbench.report.document import Block, Figure, Section, Subheading, plain
from workbench.report.names import item_title
from workbench.report.years import Row, Years
from workbench.text.locale import NO_BREAK

_TITLE = "Statement by year"
_SUMS = frozenset(
    {
        "effective_gross_income",
        "operating_expenses",
        "noi",
        "net_cash_flow",
        "cash_flow_after_debt",
    }
)
_INDENT = 2 * NO_BREAK
_CHART = (126.0, 7.6)
"""Height of the picture and size of its letters."""


def statement_section(years: Years, column: float) -> Section:
    """Income and debt service as a picture, then all lines by year."""
    if not years.count:
        return Section(_TITLE, (plain("The hold is not known, so there are no years to show."),))
    picture = draw_income(income_figures(years), column, *_CHART)
    blocks: tuple[Block, ...] = (
        Subheading("Income and debt service"),
        Figure(picture, picture.words),
        Subheading("All lines"),
        plain("Amounts are signed as they add up: what is deducted is negative.", "small"),
        years.table(statement_rows(years)),
    )
    return Section(_TITLE, blocks)


def statement_rows(years: Years) -> list[Row]:
    """The lines in the order of the record; above their sum stands what it is made of."""
    rows: list[Row] = []
    order = _order(years)
    for key in order:
        if key == "operating_expenses":
            rows += [
                Row(item_title(item, "expenses"), years.line(f"expense@{item.id}"))
                for item in years.voice.deal.expenses
            ]
        rows.append(years.row(key, strong=key in _SUMS))
        if key == "other_income":
            rows += _parts_of_other_income(years)
    if "reserve_balance" in years.result.declared:
        rows.append(Row("Reserve balance at the year’s end", years.line("reserve_balance")))
    return rows


def _order(years: Years) -> list[str]:
    """Reserves above net operating income are deducted before it."""
    keys = [key for key in STATEMENT if key not in NOT_YET]
    if years.voice.deal.spend.reserves_place == "above":
        keys.remove("reserves")
        keys.insert(keys.index("noi"), "reserves")
    return keys


def _parts_of_other_income(years: Years) -> list[Row]:
    items = years.voice.deal.other_income
    return [
        Row(f"{_INDENT}{item_title(item)}", years.line(f"other_income@{item.id}"))
        for item in items
        if len(items) > 1
    ]
