"""Charts by year follow the session; their regions lead to lines that there are."""

from collections.abc import Iterator

import pytest
from pytestqt.qtbot import QtBot

from workbench.files.deal_file import read_deal
from workbench.places import sample_deals
from workbench.session.session import Session
from workbench.ui.chart_view import INCOME, LOAN, TIERS, Chart, ChartView


@pytest.fixture
def session(qtbot: QtBot) -> Iterator[Session]:
    held = Session(read_deal(sample_deals() / "quillon-court-flats.deal"))
    yield held
    held.deleteLater()


def shown(qtbot: QtBot, session: Session, chart: Chart) -> ChartView:
    view = ChartView(session, chart)
    qtbot.addWidget(view)
    view.resize(560, 240)
    view.show()
    return view


@pytest.mark.parametrize("chart", [INCOME, LOAN, TIERS], ids=lambda chart: chart.name)
def test_every_region_has_a_line_and_a_sentence(
    qtbot: QtBot, session: Session, chart: Chart
) -> None:
    view = shown(qtbot, session, chart)
    assert view.accessibleName() == chart.name
    assert view.accessibleDescription() == view.picture.words != ""
    assert view.picture.regions
    for region in view.picture.regions:
        meaning = view.meaning(region.key)
        assert isinstance(meaning, tuple)
        line, year = meaning
        assert line in session.result.declared or line == "purchase.price"
        if line in session.result.declared:
            assert session.result.figure(line, year) is not None
        assert view.sentence(region.key).endswith(".")


def test_sentences_carry_the_figures(qtbot: QtBot, session: Session) -> None:
    result = session.result
    income, loan = shown(qtbot, session, INCOME), shown(qtbot, session, LOAN)
    noi, paid = result.figure("noi", 2), result.figure("debt_service", 2)
    assert noi is not None and paid is not None
    assert income.sentence("noi.2").endswith(f", year 2: {noi:,.0f}.")
    assert income.sentence("debt_service.2").endswith(f", year 2: {-paid:,.0f}.")
    owed, price = result.figure("loan_amount"), result.given("purchase.price")
    assert loan.sentence("loan_balance.0").endswith(f"at closing: {owed:,.0f}.")
    assert loan.sentence("price") == f"Price: {price:,.0f}."


def test_a_chart_follows_an_edit_when_it_is_seen(qtbot: QtBot, session: Session) -> None:
    view = shown(qtbot, session, INCOME)
    first = view.picture
    session.set("earn.vacancy.1", 0.5, "vacancy")
    qtbot.waitUntil(lambda: view.picture is not first)
    view.hide()
    second = view.picture
    session.undo()
    session.catch_up()
    assert view.picture is second
    view.show()
    assert view.picture.words == first.words != second.words


@pytest.mark.parametrize("chart", [INCOME, LOAN, TIERS], ids=lambda chart: chart.name)
def test_without_a_hold_it_says_so(qtbot: QtBot, session: Session, chart: Chart) -> None:
    session.set("leave.hold", None, "hold")
    session.catch_up()
    view = shown(qtbot, session, chart)
    said = "The hold is not known, so there are no years to show."
    assert view.picture.words == said
    assert view.picture.regions == ()
    assert not view.grab().isNull()
