"""What the figures do not hold."""

from dataclasses import replace

from tests.report.deals import DEAL, figures
from workbench.report.document import Section, Table, texts
from workbench.report.gaps import figure_name, gap_sections, input_name
from workbench.report.readings import Readings


def rows(section: Section) -> tuple[tuple[str, ...], ...]:
    return next(block.rows for block in section.blocks if isinstance(block, Table))


def test_a_complete_deal_has_no_gaps() -> None:
    assert gap_sections(DEAL, Readings(figures())) == ()


def test_drafts_and_issues_are_listed_with_their_inputs_named() -> None:
    deal = replace(DEAL, drafts={"earn.vacancy.3": "5,,0"})
    issues = [{"path": "spaces@s1.count", "message": "Units is 0; it has to be 1 to 100,000."}]
    (section,) = gap_sections(deal, Readings(figures(issues=issues)))
    assert section.title == "Not taken in, or in need of a look"
    assert rows(section) == (
        ("Vacancy allowance, year 3", "“5,,0” was typed and not taken in."),
        ("Units (Flats)", "Units is 0; it has to be 1 to 100,000."),
    )


def test_figures_with_the_same_reason_stand_together() -> None:
    reasons = {"value": "No exit.", "margin": "No exit.", "irr.levered": "There is no loan."}
    (section,) = gap_sections(DEAL, Readings(figures(reasons=reasons)))
    assert section.title == "Figures that cannot be given"
    assert rows(section) == (
        ("Value, Margin", "No exit."),
        ("IRR, levered", "There is no loan."),
    )


def test_a_long_list_says_how_many_more() -> None:
    issues = [{"path": f"x{n}", "message": "m"} for n in range(15)]
    (section,) = gap_sections(DEAL, Readings(figures(issues=issues)))
    assert len(rows(section)) == 12
    assert "And 3 more." in set(texts(section))


def test_names_of_figures() -> None:
    assert figure_name("exit_value_share") == "Exit-value share"
    assert (
        figure_name("break_even_occupancy.with_reserves") == "Break-even occupancy, with reserves"
    )
    assert figure_name("loans.l1.amount") == "Loans, l1, amount"
    assert figure_name("something.new") == "something.new"


def test_names_of_inputs() -> None:
    assert input_name(DEAL, "purchase.price") == "Price"
    assert input_name(DEAL, "leases@e2.rent.amount") == "Rent (e2)"
    assert input_name(DEAL, "nowhere.at.all") == "nowhere.at.all"
    assert input_name(DEAL, "spaces") == "spaces"
    assert input_name(DEAL, "") == ""
