"""What a lease says beyond its rent and its dates, on one line."""

from collections.abc import Iterator
from datetime import date

from workbench.deal.earn import Lease, Step
from workbench.report.rents import rent_unit
from workbench.report.voice import Voice
from workbench.text.numbers import MISSING, rate


def lease_note(voice: Voice, lease: Lease) -> str:
    """Break, steps and free months; empty where there is none of them."""
    return "; ".join(_parts(voice, lease))


def _parts(voice: Voice, lease: Lease) -> Iterator[str]:
    if lease.break_date is not None:
        penalty = voice.money(lease.break_penalty)
        with_it = f", with a penalty of {penalty}" if lease.break_penalty else ""
        yield f"tenant’s break on {voice.day(lease.break_date)}{with_it}"
    steps = sorted(lease.steps, key=lambda step: step.date or date.max)
    if steps:
        unit = rent_unit(voice, lease.rent)
        said = ", ".join(_step(voice, step) for step in steps)
        amounts = any(step.amount is not None for step in steps)
        yield f"steps {unit}: {said}" if amounts else f"steps: {said}"
    if lease.free_months:
        months = "1 month" if lease.free_months == 1 else f"{lease.free_months} months"
        yield f"{months} free of rent"
    if lease.start is None or lease.end is None:
        yield "without dates: all of it is expected"


def _step(voice: Voice, step: Step) -> str:
    if step.change is not None:
        sign = "+" if step.change > 0 else ""
        changed = f"{sign}{rate(step.change, voice.locale, 1, 4)}"
    else:
        changed = MISSING if step.amount is None else voice.exact(step.amount)
    return f"{voice.day(step.date)} {changed}"
