"""Figures read by path."""

from tests.report.deals import figures, missing
from workbench.charts.wall_stack import WallCourse
from workbench.report.readings import Readings


def test_figures_by_path() -> None:
    read = Readings(figures())
    assert read.number("price") == 3_200_000
    assert read.number("irr.levered") == 0.1134
    assert read.hold == 10
    assert read.row("dscr.noi") == (1.3, 1.25, 1.18, 1.2)
    assert read.lowest("dscr.noi") == (1.18, 3)
    assert read.lowest("dscr.ncf") == (1.05, 3)


def test_what_is_missing_is_none() -> None:
    read = Readings(missing())
    assert read.number("exit.price") is None
    assert read.number("nowhere.at.all") is None
    assert read.number("irr") is None
    assert read.hold is None
    assert read.row("dscr.ncf") == ()
    assert read.row("nowhere.row") == ()
    assert read.lowest("dscr.noi") is None
    assert read.courses() == ()
    assert read.issues() == ()
    assert Readings({"flag": True}).number("flag") is None
    assert Readings({}).reasons() == {}


def test_the_stack_for_the_wall() -> None:
    read = Readings({"stack": [{"year": 1, "in_hand": 2, "expected": 3.0}]})
    assert read.courses() == (WallCourse(1, 2.0, 3.0),)
    broken = Readings({"stack": [{"year": 1, "in_hand": None, "expected": 3.0}]})
    assert broken.courses() is None


def test_a_reason_is_looked_for_upwards_and_in_order() -> None:
    read = Readings({"reasons": {"exit": "no yield", "value": "no exit", "irr.levered": "no loan"}})
    assert read.reason("exit.price") == "no yield"
    assert read.reason("margin", "value") == "no exit"
    assert read.reason("irr.levered", "exit") == "no loan"
    assert read.reason("irr.unlevered") == ""


def test_loans_by_their_ids() -> None:
    read = Readings({"loans": [{"id": "l1", "amount": 5.0}, {"id": "l2"}]})
    assert read.loan_amounts() == {"l1": 5.0, "l2": None}
    assert Readings({}).loan_amounts() == {}
