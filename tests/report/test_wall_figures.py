"""The wall's figures: the few that are read for the screen are those of the whole record."""

from dataclasses import replace
from pathlib import Path

import pytest

from workbench.charts.wall_stack import WallFigures
from workbench.deal.deal import Deal
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.files.deal_file import read_deal
from workbench.places import sample_deals
from workbench.report.readings import Readings
from workbench.report.record import record
from workbench.report.voice import Voice
from workbench.report.wall_figures import wall_figures, wall_readings
from workbench.text.locale import DEFAULT

SAMPLES = sorted(sample_deals().glob("*.deal"))


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
@pytest.mark.parametrize("change", ["", "no hold", "no price", "no return"])
def test_they_are_those_of_the_record(path: Path, change: str) -> None:
    deal = changed(read_deal(path), change)
    result = evaluate(compile_deal(deal))
    few, whole = wall_readings(result), Readings(record(result))
    assert seen(wall_figures(few, Voice(deal, DEFAULT))) == seen(
        wall_figures(whole, Voice(deal, DEFAULT))
    )
    assert ("issues" in few.figures) == (change in ("no hold", "no return"))


def seen(figures: WallFigures) -> WallFigures:
    """The figures without how they are put into words."""
    return replace(figures, money=str, share=str)


def changed(deal: Deal, change: str) -> Deal:
    if change == "no hold":
        return replace(deal, leave=replace(deal.leave, hold=None))
    if change == "no price":
        return replace(deal, purchase=replace(deal.purchase, price=None))
    if change == "no return":
        return replace(deal, returns=replace(deal.returns, required={}))
    return deal


def test_why_there_is_no_exit_is_said() -> None:
    deal = read_deal(SAMPLES[0])
    deal = replace(deal, leave=replace(deal.leave, exit_yield=None, blend=()))
    result = evaluate(compile_deal(deal))
    figures = wall_figures(wall_readings(result), Voice(deal, DEFAULT))
    assert figures.exit is None
    assert figures.value is None
    assert "exit yield" in figures.exit_reason.lower()
    assert len(figures.courses) == deal.leave.hold
