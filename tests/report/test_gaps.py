"""What the figures do not hold."""

from dataclasses import replace

from tests.report.deals import DEAL, figures
from workbench.report.document import Section, Table, texts
from workbench.report.gaps import figure_name, gap_sections
from workbench.report.readings import Readings


def rows(section: Section) -> tuple[tuple[str, ...], ...]:
    return next(block.rows for block in section.blocks if isinstance(block, Table))


def test_a_complete_deal_has_no_gaps() -> None:
    assert gap_sections(DEAL, Readings(figures())) == ()


def test_drafts_and_issues_are_listed() -> None:
    deal = replace(DEAL, drafts={"earn.vacancy.3": "5,,0", "leave.hold": "ten"})
    issues = [{"path": "leave.hold", "message": "Hold: the entry “ten” is not taken in"}]
    (section,) = gap_sections(deal, Readings(figures(issues=issues)))
    assert section.title == "Not taken in, or in need of a look"
    assert rows(section) == (
        ("Vacancy allowance, year 3: “5,,0” was typed and is not taken in",),
        ("Hold: the entry “ten” is not taken in",),
    )


def test_figures_with_the_same_reason_stand_together() -> None:
    reasons = {"value": "no exit", "margin": "no exit", "dscr.noi.1": "none", "dscr.noi.2": "none"}
    (section,) = gap_sections(DEAL, Readings(figures(reasons=reasons)))
    assert section.title == "Figures that cannot be given"
    assert rows(section) == (("Value; Margin", "No exit."), ("DSCR, on NOI", "None."))


def test_a_long_list_says_how_many_more() -> None:
    issues = [{"path": f"x{n}", "message": "m"} for n in range(15)]
    (section,) = gap_sections(DEAL, Readings(figures(issues=issues)))
    assert len(rows(section)) == 12
    assert "And 3 more." in set(texts(section))


def test_names_of_figures() -> None:
    assert figure_name("exit_value_share") == "Exit-value share"
    assert figure_name("break_even_occupancy.with_reserves") == (
        "Break-even occupancy, with reserves"
    )
    assert figure_name("loans.l1.balance.3") == "Loans, l1, balance"
    assert figure_name("measures.discounted_payback") == "Discounted payback"
    assert figure_name("something.new") == "something.new"
