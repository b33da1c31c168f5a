"""Costs, loans, exit: what each choice needs, and what must fit together."""

from collections.abc import Iterator

from workbench.deal.borrow import Loan
from workbench.deal.checks_leases import is_dated
from workbench.deal.deal import Deal
from workbench.deal.inputs import YEARS
from workbench.deal.issues import Issue
from workbench.deal.leave import ExitMethod
from workbench.deal.spend import Works

_NEEDS: dict[ExitMethod, tuple[str, float, float]] = {
    "forward_noi": ("exit_yield", 0.0001, 1),
    "trailing_noi": ("exit_yield", 0.0001, 1),
    "price_per": ("price_per", 0, 1e15),
    "rent_multiple": ("rent_multiple", 0, 1000),
    "amount": ("amount", 0, 1e15),
}


def exit_methods(deal: Deal) -> tuple[ExitMethod, ...]:
    """The methods in use: those of the blend, or the one method."""
    if deal.leave.blend:
        return tuple(part.method for part in deal.leave.blend)
    return (deal.leave.method,)


def check_sections(deal: Deal) -> Iterator[Issue]:
    yield from _check_areas(deal)
    yield from _check_dates(deal)
    for works in deal.works:
        yield from _check_works(deal, works)
    for loan in deal.loans:
        yield from _check_loan(loan)
    yield from _check_exit(deal)


def _check_areas(deal: Deal) -> Iterator[Issue]:
    """Whatever is priced by area needs the area of every space."""
    users = [f"expenses@{item.id}.basis" for item in deal.expenses if item.basis == "area"]
    users += [f"other_income@{item.id}.basis" for item in deal.other_income if item.basis == "area"]
    if deal.spend.reserves_basis == "area" and deal.spend.reserves:
        users.append("spend.reserves_basis")
    if "price_per" in exit_methods(deal) and deal.leave.price_per_of == "area":
        users.append("leave.price_per_of")
    without = next((space.id for space in deal.spaces if space.area is None), None)
    if not users or without is None:
        return
    for path in users:
        yield Issue(path, "areas_needed", "area", other={"space": without})


def _check_dates(deal: Deal) -> Iterator[Issue]:
    if deal.purchase.closing_date is not None:
        return
    leases = (lease for space in deal.spaces for lease in space.leases)
    dated = next((f"leases@{lease.id}" for lease in leases if is_dated(lease)), None)
    works = next((f"works@{item.id}" for item in deal.works if item.date is not None), None)
    if dated or works:
        other = {"because": dated or works}
        yield Issue("purchase.closing_date", "closing_date_needed", None, other=other)


def _check_works(deal: Deal, works: Works) -> Iterator[Issue]:
    closing = deal.purchase.closing_date
    if works.date is None and works.year is None:
        yield Issue(f"works@{works.id}.year", "date_or_year", None, 1, YEARS)
    if works.date is not None and works.year is not None:
        yield Issue(f"works@{works.id}.year", "date_and_year", works.year)
    if works.date is not None and closing is not None and works.date < closing:
        other = {"closing": closing}
        yield Issue(f"works@{works.id}.date", "before_closing", works.date, other=other)


def _check_loan(loan: Loan) -> Iterator[Issue]:
    path = f"loans@{loan.id}"
    term = loan.term_months
    if term is None:
        return
    if loan.interest_only_months > term:
        low, high = 0, term
        yield Issue(
            f"{path}.interest_only_months", "longer_than_term", loan.interest_only_months, low, high
        )
    if loan.amortisation_months is not None:
        longest = loan.interest_only_months + loan.amortisation_months
        if term > longest:
            yield Issue(f"{path}.term_months", "longer_than_amortisation", term, 1, longest)


def _check_exit(deal: Deal) -> Iterator[Issue]:
    leave = deal.leave
    for method in sorted(set(exit_methods(deal))):
        if method in _NEEDS:
            name, low, high = _NEEDS[method]
            if getattr(leave, name) is None:
                yield Issue(f"leave.{name}", "method_needs", None, low, high, {"method": method})
    if leave.exit_income == "stabilised" and leave.stabilised_vacancy is None:
        yield Issue("leave.stabilised_vacancy", "missing", None, 0, 1)
    total = sum(part.weight or 0.0 for part in leave.blend)
    if leave.blend and abs(total - 1) > 1e-9:
        yield Issue(f"blend@{leave.blend[0].id}.weight", "weights", total, 1, 1)
