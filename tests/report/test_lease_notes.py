"""What a lease says beyond rent and dates."""

from datetime import date

from tests.fullest import fullest
from tests.report.sections import voice_of
from workbench.deal.earn import Lease, Rent, Step
from workbench.report.lease_notes import lease_note

VOICE = voice_of(fullest())
START, END = date(2027, 1, 1), date(2031, 12, 31)


def note(**more: object) -> str:
    lease = Lease("e1", start=START, end=END, rent=Rent(20.0, "month", "area"))
    return lease_note(VOICE, Lease(**{**vars(lease), **more}))


def test_a_plain_lease_has_no_note() -> None:
    assert note() == ""


def test_steps_in_order_of_their_dates() -> None:
    later, sooner = Step("p1", date(2030, 1, 1), change=-0.015), Step("p2", date(2029, 1, 1))
    assert note(steps=(later, sooner)) == "steps: Jan 1, 2029 —, Jan 1, 2030 −1.5%"
    risen = Step("p3", date(2028, 1, 1), amount=21.5)
    assert note(steps=(later, risen)) == (
        "steps per m² a month: Jan 1, 2028 21.50, Jan 1, 2030 −1.5%"
    )
    assert note(steps=(Step("p4", None, change=0.03),)) == "steps: — +3.0%"


def test_a_break_with_and_without_a_penalty() -> None:
    assert note(break_date=date(2029, 6, 30)) == "tenant’s break on Jun 30, 2029"
    assert note(break_date=date(2029, 6, 30), break_penalty=9000.0, free_months=1) == (
        "tenant’s break on Jun 30, 2029, with a penalty of 9,000; 1 month free of rent"
    )
    assert note(free_months=3) == "3 months free of rent"


def test_a_lease_without_dates_is_expected() -> None:
    assert note(start=None, end=None) == "without dates: all of it is expected"
