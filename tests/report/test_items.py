"""Lists of a deal as tables."""

from tests.fullest import fullest, small
from tests.report.sections import changed, voice_of
from workbench.report.document import Subheading, Table
from workbench.report.items import item_blocks, item_table


def titles(table: Table) -> list[str]:
    return [column.title for column in table.columns]


def test_a_table_for_each_list_that_has_items() -> None:
    named = [b.text for b in item_blocks(voice_of(small())) if isinstance(b, Subheading)]
    assert named == ["Expenses"]


def test_columns_that_say_nothing_are_left_out() -> None:
    table = item_table(voice_of(small()), "expenses", small().expenses)
    assert titles(table) == ["Name", "Amount a year"]
    assert table.rows == (("Expense x2", "38,000"),)
    assert table.whole


def test_all_columns_where_any_item_has_a_value() -> None:
    deal = fullest()
    table = item_table(voice_of(deal), "loans", deal.loans)
    assert titles(table) == [
        "Name", "Amount", "Interest rate", "Amortisation", "Interest-only months", "Term", "Fee",
        "Fixed fee",
    ]  # fmt: skip
    assert table.rows[0] == (
        "Bank", "700,000", "5.5%; from year 6: 6.0%", "300 months", "12 months", "240 months",
        "1.0%", "1,500",
    )  # fmt: skip


def test_what_an_absent_value_means_is_said() -> None:
    deal = fullest()
    growth = [row[3] for row in item_table(voice_of(deal), "expenses", deal.expenses).rows]
    assert growth == ["3.0%", "as all costs", "as all costs"]
    loans = [
        {"id": "l21", "amount": 5.0, "rate": {"1": 0.05}, "amortisation_months": 300},
        {"id": "l22", "amount": 5.0, "rate": {"1": 0.05}, "term_months": 60},
    ]
    bare = changed(loans=loans)
    table = item_table(voice_of(bare), "loans", bare.loans)
    assert [row[3:] for row in table.rows] == [
        ("300 months", "until repaid"),
        ("interest only", "60 months"),
    ]


def test_a_long_list_may_break() -> None:
    expenses = [{"id": f"x{n}", "amount": 5.0} for n in range(50, 61)]
    deal = changed(expenses=expenses, statements=[])
    assert not item_table(voice_of(deal), "expenses", deal.expenses).whole
