"""Names of the options that the rent roll of a deal uses."""

from itertools import pairwise
from typing import Any

from tests.oracle.months import day_of, first_whole_month_after, month_starts
from tests.oracle.rent import closing_of


def lease_names(lease: dict[str, Any], closing: int, starts: list[int]) -> set[str]:
    """Options of one dated lease."""
    first, last = day_of(lease["start"]), day_of(lease["end"])
    names = {"lease:to_come"} if first > closing else {"lease:running"}
    if first > closing and first not in starts:
        names.add("lease:mid_month_start")
    if last >= closing and last + 1 not in starts:
        names.add("lease:mid_month_end")
    if last < closing:
        names.add("lease:expired")
    if last > starts[-1]:
        names.add("lease:beyond_41_years")
    if lease.get("break_date"):
        past = day_of(lease["break_date"]) < closing
        names.add("lease:break_past" if past else "lease:break")
        if lease.get("break_penalty") and not past:
            month = first_whole_month_after(starts, day_of(lease["break_date"]))
            names |= {"lease:break_penalty"} if month < len(starts) - 1 else set()
    names |= {"lease:free_months"} if lease.get("free_months") and last >= closing else set()
    for step in lease.get("steps", []):
        if day_of(step["date"]) <= closing:
            names.add("lease:step_in_rent")
        elif day_of(step["date"]) <= last:
            names.add("lease:step_amount" if "amount" in step else "lease:step_change")
        else:
            names.add("lease:step_past_end")
    return names


def gap_names(leases: list[dict[str, Any]], closing: int) -> set[str]:
    """How the dated leases of a space follow each other."""
    spans = [(day_of(x["start"]), day_of(x["end"])) for x in leases]
    names = {"lease:several"} if len(spans) > 1 else set()
    names |= {"lease:not_in_order"} if spans != sorted(spans) else set()
    spans.sort()
    if spans and spans[0][0] > closing:
        names.add("lease:empty_at_closing")
    for (_, last), (first, _) in pairwise(spans):
        if first > last + 1 and first > closing:
            names.add("lease:gap")
        elif first == last + 1:
            names.add("lease:back_to_back")
    return names


def rent_names(raw: dict[str, Any]) -> set[str]:
    """Options of spaces and leases."""
    closing = closing_of(raw)
    starts = month_starts(closing)
    names: set[str] = set()
    for space in raw["spaces"]:
        leases = space.get("leases", [])
        dated = [x for x in leases if x.get("start")]
        names |= {"lease:none"} if not leases else set()
        names |= {"lease:undated"} if leases and not dated else set()
        names |= {"space:many_units"} if space["count"] > 1 else set()
        names |= {"space:no_area"} if "area" not in space else set()
        names |= {"space:market_zero"} if space["market_rent"]["amount"] == 0 else set()
        for lease in dated:
            names |= lease_names(lease, closing, starts)
        names |= gap_names(dated, closing)
        for rent in (space["market_rent"], *(x["rent"] for x in leases)):
            names.add(f"rent:per_{rent.get('per', 'year')}")
            names.add(f"space:{rent.get('of', 'unit')}_rent")
    return names
