"""Sources and uses."""

from tests.fullest import fullest, small
from tests.report.sections import named, read_of, tables, voice_of, years_of
from workbench.deal.deal import Deal
from workbench.report.closing import closing_section
from workbench.report.document import Table
from workbench.report.readings import Readings


def both(deal: Deal) -> list[Table]:
    return tables(closing_section(read_of(years_of(deal)), voice_of(deal)))


def amounts(table: Table) -> list[int]:
    return [int(text.replace(",", "")) for _, text in table.rows]


def test_sources_and_uses_balance_and_add_up() -> None:
    for table in both(fullest()):
        *parts, total = amounts(table)
        assert sum(parts) == total == 1_307_500
        assert table.rows[-1][0] == "Total"
        assert table.strong == frozenset({len(parts)})


def test_each_loan_is_named() -> None:
    sources, uses = both(fullest())
    assert named(sources, "Bank") == ("Bank", "700,000")
    assert named(uses, "Loan costs") == ("Loan costs", "8,500")


def test_what_is_nothing_is_left_out() -> None:
    sources, uses = both(small())
    assert sources.rows == (("Cash to close", "900,000"), ("Total", "900,000"))
    assert uses.rows == (("Price", "900,000"), ("Total", "900,000"))


def test_what_cannot_be_given_is_a_dash() -> None:
    sources, _ = tables(closing_section(Readings({}), voice_of(fullest())))
    assert {text for _, text in sources.rows} == {"—"}
