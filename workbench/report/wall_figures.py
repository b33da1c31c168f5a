"""The value wall's figures out of a deal's: the same for the memo and for the screen."""

from workbench.charts.lettering import shorten
from workbench.charts.wall_stack import WallFigures
from workbench.engine.result import Result
from workbench.report.readings import Readings
from workbench.report.record import record
from workbench.report.voice import Voice
from workbench.report.wording import sentence

_REASON_ROOM = 75.0
"""How much of a reason the wall shows, as a width in letter sizes."""


def wall_figures(read: Readings, voice: Voice) -> WallFigures:
    """What the wall shows, in the words of one reader."""
    courses = read.courses()
    reason = read.reason("exit.present_value", "exit.price", "stack", "value")
    return WallFigures(
        courses=courses or (),
        exit=None if courses is None else read.number("exit.present_value"),
        value=read.number("value"),
        price=read.number("price"),
        exit_share=read.number("exit_value_share"),
        money=voice.short_money,
        share=voice.share,
        has_leases=any(space.leases for space in voice.deal.spaces),
        exit_reason=shorten(sentence(reason), 1.0, _REASON_ROOM),
    )


def wall_readings(result: Result) -> Readings:
    """Those figures of the record that the wall shows, at a tenth of the cost of the record.

    Where one is missing the whole record is made, for the reason that it gives.
    """
    hold = int(result.given("leave.hold") or 0)
    stack = [
        {
            "year": year,
            "in_hand": result.figure("value_in_hand_of_year", year),
            "expected": result.figure("value_expected_of_year", year),
        }
        for year in range(1, hold + 1)
    ]
    figures = {
        "price": result.given("purchase.price"),
        "value": result.figure("value"),
        "exit_value_share": result.figure("exit_value_share"),
        "exit": {"present_value": result.figure("exit_present_value")},
        "stack": stack,
    }
    given = [figures["value"], *(amount for row in stack for amount in row.values())]
    whole = hold and None not in given
    return Readings(figures) if whole else Readings(record(result))
