"""The figures as text: aligned whatever their length, and never without the cautions."""

import json
import re
from dataclasses import replace
from pathlib import Path

import pytest

from tests.commands.running import run
from tests.fullest import fullest, small
from workbench.commands.listing import listing
from workbench.deal.changes import set_value
from workbench.deal.deal import Deal
from workbench.files.deal_file import write_deal
from workbench.report.cautions import IN_ONE
from workbench.report.record import record_of

WIDTH = 100


def text(deal: Deal) -> str:
    return listing(deal, record_of(deal))


def block(deal: Deal, first: str) -> list[str]:
    """The lines of the listing from one that begins so, down to an empty one."""
    lines = text(deal).splitlines()
    start = next(number for number, line in enumerate(lines) if line.strip().startswith(first))
    return lines[start : lines.index("", start)]


def scaled(deal: Deal, factor: float) -> Deal:
    """The deal with its money in another unit."""
    for path in ("purchase.price", "spaces@s1.market_rent.amount", "expenses@x2.amount"):
        deal = set_value(deal, path, factor)
    return deal


SMALL = [small(), scaled(small(), 1e4), scaled(small(), 9e8), scaled(small(), 1e12)]
LONG = replace(
    set_value(set_value(fullest(), "conventions.currency", "X" * 500), "leave.hold", 40),
    property=replace(fullest().property, name="A\nlong\x1b[31m name " * 1000),
)


@pytest.mark.parametrize("deal", [*SMALL, fullest(), LONG, Deal()])
@pytest.mark.parametrize("locale", ["en-US", "de-DE", "sv-SE", "en-IN"])
def test_it_is_clean(deal: Deal, locale: str) -> None:
    shown = text(set_value(deal, "conventions.locale", locale))
    lines = shown.splitlines()
    assert shown.endswith("\n") and not shown.endswith("\n\n")
    assert "\n\n\n" not in shown
    assert all(len(line) <= WIDTH for line in lines)
    assert all(line == line.rstrip() for line in lines)
    assert "\x1b" not in shown


@pytest.mark.parametrize("deal", [*SMALL, fullest()])
def test_head_values_end_at_one_edge_and_keep_clear_of_their_labels(deal: Deal) -> None:
    lines = block(deal, "Price")
    assert len({len(line) for line in lines}) == 1
    assert all("  " in line.strip() for line in lines)
    assert lines[1].startswith("  Worth on these assumptions, not market value  ")


@pytest.mark.parametrize("deal", [*SMALL, fullest()])
def test_years_stand_in_columns(deal: Deal) -> None:
    lines = block(deal, "USD")
    assert len(lines) == 17
    first = max(len(line[: line.index("  ", 2)]) for line in lines)
    edges = [[cell.end() for cell in re.finditer(r"\S+", line[first:])] for line in lines]
    assert len(edges[0]) >= 3
    assert all(row == edges[0] for row in edges)


def test_every_year_of_the_hold_is_shown_once() -> None:
    deal = set_value(fullest(), "leave.hold", 40)
    years = [
        year
        for line in text(deal).splitlines()
        if line.startswith("  USD")
        for year in line.split("year")[1].split()
    ]
    assert years == [str(year) for year in range(1, 41)]


def test_the_answer_stands_there() -> None:
    """The figures themselves are tested elsewhere; here it is that they are the same."""
    deal = fullest()
    figures = record_of(deal)
    shown = " ".join(text(deal).split())
    assert f"Price, USD {figures['price']:,.0f} " in shown
    assert f"not market value {figures['value']:,.0f} " in shown
    assert f"hold 10 years {figures['exit_value_share']:.1%} " in shown
    assert f"for that hold {figures['reference_share']:.1%} " in shown
    assert f"IRR, levered {figures['irr']['levered']:.2%} " in shown
    assert f"Lowest DSCR on NOI {min(figures['dscr']['noi']):.2f}×" in shown
    assert f"Net operating income {figures['statement']['noi'][0]:,.0f} " in shown


def test_a_hold_of_one_year_is_one_year() -> None:
    shown = text(set_value(small(), "leave.hold", 1))
    assert "exit after 1 year " in shown
    assert "hold 1 year " in shown


def test_a_deal_without_a_loan_has_no_figures_of_one() -> None:
    assert "levered" not in text(small()).split("No figure")[0].replace("unlevered", "")
    assert "DSCR" not in text(small()).split("No figure")[0]


def test_a_deal_without_a_name_says_so() -> None:
    assert text(small()).startswith("Property without a name\n")
    assert text(set_value(small(), "property.name", " \n ")).startswith("Property without a name\n")


def test_large_figures_are_counted_in_thousands_or_more() -> None:
    shown = text(scaled(small(), 9e8))
    assert "  USD thousand, year" in shown or "  USD million, year" in shown


def test_figures_without_a_number_are_named_with_their_reason_once() -> None:
    deal = set_value(fullest(), "leave.hold", None)
    shown = text(deal)
    assert shown.count("No figure: waits for an input. Hold: a value from 1 to 40 is needed") == 1
    assert "    value, margin, hold_years," in shown
    assert "\n  USD, year" not in shown


@pytest.mark.parametrize("deal", [small(), fullest(), Deal()])
def test_the_cautions_stand_at_the_end_in_full(deal: Deal) -> None:
    shown = " ".join(text(deal).split())
    assert shown.endswith(IN_ONE)
    assert "page" not in IN_ONE


def test_the_cautions_say_what_is_owed() -> None:
    for phrase in (
        "Arithmetic on the user’s assumptions at the user’s required return",
        "not market value", "not an appraisal, evaluation or valuation, whoever prepared it",
        "Not investment, tax, legal, accounting or lending advice", "not an offer",
        "not a loan commitment", "Projections are not facts", "local codes and rules",
        "licensed professionals", "title, the environment, zoning", "are not examined",
    ):  # fmt: skip
        assert phrase in IN_ONE


def test_the_command_prints_it(capsys: pytest.CaptureFixture[str], tmp_path: Path) -> None:
    path = tmp_path / "my.deal"
    write_deal(path, fullest())
    ran = run(capsys, "figures", path)
    assert (ran.status, ran.out, ran.err) == (0, text(fullest()), "")
    with pytest.raises(json.JSONDecodeError):
        json.loads(ran.out)
