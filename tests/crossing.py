"""Deals in which something is wrong: for every code of an issue, how it comes about and is said."""

import base64
from dataclasses import dataclass

from tests.fullest import DIGEST, JPEG


@dataclass(frozen=True)
class Crossing:
    """Entries typed on the fullest deal, and the issue that must follow."""

    code: str
    path: str
    said: str
    entries: tuple[str, ...]


def crossing(code: str, path: str, said: str, *entries: str) -> Crossing:
    return Crossing(code, path, said, entries)


_OTHER = "f" * 64
_MANY = ", ".join(f'"{number:064x}": "AAAA"' for number in range(25))
_HELD = base64.b64encode(JPEG).decode()

CROSSINGS = (
    crossing(
        "missing",
        "purchase.price",
        "Price: a value from 0 to 1,000,000,000,000,000 is needed",
        "purchase.price=null",
    ),
    crossing(
        "missing",
        "steps@p3.date",
        "Date of step p3: a date is needed",
        "steps@p3.date=null",
    ),
    crossing(
        "missing",
        "spend.growth.1",
        "Growth of expenses, year 1: a value from −90% to 1,000% is needed",
        'spend.growth={"4": 0.02}',
    ),
    crossing(
        "missing",
        "leave.stabilised_vacancy",
        "Stabilised vacancy: a value from 0% to 100% is needed",
        "leave.stabilised_vacancy=null",
    ),
    crossing(
        "out_of_range",
        "expenses@x17.amount",
        "Amount a year of expense x17 “Management”: 500% is not allowed; it must be from 0% to "
        "100%",
        "expenses@x17.amount=5",
    ),
    crossing(
        "out_of_range",
        "earn.vacancy.3",
        "Vacancy allowance, year 3: 100.0000001% is not allowed; it must be from 0% to 100%",
        "earn.vacancy.3=1.000000001",
    ),
    crossing(
        "out_of_range",
        "property.year_built",
        "Year built: 2300 is not allowed; it must be from 1000 to 2200",
        "property.year_built=2300",
    ),
    crossing(
        "no_such_day",
        "leases@e5.end",
        "End of lease e5 “Bookbinder”: December 31, 9999 is not allowed; it must be from "
        "January 1, 1000 to December 31, 2999",
        "leases@e5.end=9999-12-31",
    ),
    crossing(
        "too_long",
        "about.purpose",
        "Purpose: the text has 6,000 characters; at most 5,000 are allowed",
        "about.purpose=" + "x" * 6000,
    ),
    crossing(
        "no_such_year",
        "earn.vacancy.42",
        "Vacancy allowance, year 42: there is no deal year 42; years run from 1 to 41",
        "earn.vacancy.42=0.05",
    ),
    crossing(
        "bad_currency",
        "conventions.currency",
        "Currency: “Euro” is not a currency code; three capital letters, such as USD",
        "conventions.currency=Euro",
    ),
    crossing(
        "no_spaces",
        "spaces",
        "Rent roll: there is no space to let yet; enter at least one, with its count of units and "
        "its market rent",
        "spaces=[]",
    ),
    crossing(
        "area_needed",
        "spaces@s1.area",
        "Area of one unit of space s1 “Corner shop”: a value from 0.01 to 1,000,000,000 is needed, "
        "since a rent is given by area",
        "spaces@s1.area=null",
    ),
    crossing(
        "areas_needed",
        "expenses@x16.basis",
        "Basis of expense x16 “Repairs”: an amount by area needs the area of every space; space s6 "
        "“Flats” has none",
        "spaces@s6.area=null",
    ),
    crossing(
        "date_missing",
        "leases@e5.end",
        "End of lease e5 “Bookbinder”: a date is needed: a lease has both its first and its last "
        "day, or neither",
        "leases@e5.end=null",
    ),
    crossing(
        "needs_dated_lease",
        "leases@e7.break_date",
        "Tenant's break of lease e7 “Six households”: January 1, 2030 needs a lease with a first "
        "and a last day",
        "leases@e7.break_date=2030-01-01",
    ),
    crossing(
        "steps_need_dates",
        "leases@e7.start",
        "Start of lease e7 “Six households”: a date is needed, since only a lease with a first and "
        "a last day can have steps",
        'leases@e7.steps=[{"id": "p30", "date": "2030-01-01", "change": 0.03}]',
    ),
    crossing(
        "before_start",
        "leases@e5.end",
        "End of lease e5 “Bookbinder”: August 1, 2029 lies before the start on September 1, 2029; "
        "it must be that day or later",
        "leases@e5.end=2029-08-01",
        "leases@e5.break_date=null",
    ),
    crossing(
        "before_start",
        "statements@m22.end",
        "To of statement m22 “Seller, 2025”: December 1, 2024 lies before the start on "
        "January 1, 2025; it must be that day or later",
        "statements@m22.end=2024-12-01",
    ),
    crossing(
        "break_outside_lease",
        "leases@e5.break_date",
        "Tenant's break of lease e5 “Bookbinder”: August 31, 2034 lies outside the lease; a break "
        "must lie from the start on September 1, 2029 to the day before the end on August 31, 2034",
        "leases@e5.break_date=2034-08-31",
    ),
    crossing(
        "outside_lease",
        "steps@p4.date",
        "Date of step p4: July 1, 2029 lies outside the lease, which runs from January 1, 2024 to "
        "June 30, 2029",
        "steps@p4.date=2029-07-01",
    ),
    crossing(
        "same_date_twice",
        "steps@p4.date",
        "Date of step p4: January 1, 2028 already has a step in this lease; one step a day",
        "steps@p4.date=2028-01-01",
    ),
    crossing(
        "amount_or_change",
        "steps@p4.amount",
        "New rent of step p4: a step has a new rent or a change, and not both; enter one of them",
        "steps@p4.change=2%",
    ),
    crossing(
        "overlaps",
        "leases@e5.start",
        "Start of lease e5 “Bookbinder”: June 1, 2029 lies before lease e2 “Sailmaker” has ended "
        "on June 30, 2029; it must be later",
        "leases@e5.start=2029-06-01",
    ),
    crossing(
        "break_before_next",
        "leases@e2.break_date",
        "Tenant's break of lease e2 “Sailmaker”: June 30, 2028 is a break although lease e5 "
        "“Bookbinder” follows on September 1, 2029; only the last lease of a space may have one",
        "leases@e2.break_date=2028-06-30",
    ),
    crossing(
        "undated_beside_others",
        "leases@e5.start",
        "Start of lease e5 “Bookbinder”: a date is needed, since a space with several leases needs "
        "the dates of each",
        "leases@e5.start=null",
        "leases@e5.end=null",
        "leases@e5.break_date=null",
    ),
    crossing(
        "closing_date_needed",
        "purchase.closing_date",
        "Closing date: a date is needed, since lease e2 “Sailmaker” is dated",
        "purchase.closing_date=null",
    ),
    crossing(
        "date_or_year",
        "works@w19.year",
        "Deal year of works w19 “Roof”: a year from 1 to 41 is needed, or a date",
        "works@w19.date=null",
    ),
    crossing(
        "date_and_year",
        "works@w19.year",
        "Deal year of works w19 “Roof”: year 4 stands beside a date; keep one of the two",
        "works@w19.year=4",
    ),
    crossing(
        "before_closing",
        "works@w19.date",
        "Date of works w19 “Roof”: May 1, 2026 lies before closing on January 1, 2027; works paid "
        "at closing are initial works",
        "works@w19.date=2026-05-01",
    ),
    crossing(
        "longer_than_term",
        "loans@l21.interest_only_months",
        "Interest-only months of loan l21 “Bank”: 241 is more than the loan’s term; it must be "
        "from 0 to 240",
        "loans@l21.interest_only_months=241",
    ),
    crossing(
        "longer_than_amortisation",
        "loans@l21.term_months",
        "Term of loan l21 “Bank”: 313 is more than interest-only and amortisation together; it "
        "must be from 1 to 312",
        "loans@l21.term_months=313",
    ),
    crossing(
        "method_needs",
        "leave.rent_multiple",
        "Multiple of gross rent: a value from 0 to 1,000 is needed for the exit method "
        "“rent_multiple”",
        "leave.rent_multiple=null",
    ),
    crossing(
        "weights",
        "blend@b8.weight",
        "Weight of part of the blend b8: the weights of the blend sum to 0.9; they must sum to 1",
        "blend@b8.weight=0.5",
    ),
    crossing(
        "id_ahead",
        "next_id",
        "Next id: 7 is not above the number of k25; it must be at least 26",
        "next_id=7",
    ),
    crossing(
        "no_such_lease",
        "other_income@i14.lease",
        "Tied to lease of other income i14 “Sign”: “e7” is not a lease with dates in this deal",
        "other_income@i14.lease=e7",
    ),
    crossing(
        "path_lost",
        "cases@k25",
        "Case k25 “A worse sale”: “expenses@x18” is no longer in the deal; the rest of the case "
        "still stands",
        'expenses=[{"id": "x16", "amount": 8.0}]',
    ),
    crossing(
        "too_many",
        "pictures",
        "Pictures: 25 pictures are held; at most 24 are allowed",
        f"pictures={{{_MANY}}}",
    ),
    crossing(
        "not_the_picture",
        f"pictures.{_OTHER[:12]}",
        f"pictures.{_OTHER[:12]}: the data is not a JPEG with the SHA-256 {_OTHER}",
        f'pictures={{"{DIGEST}": "{_HELD}", "{_OTHER}": "{_HELD}"}}',
    ),
    crossing(
        "picture_lost",
        "property.pictures",
        f"Pictures shown: the picture {_OTHER} is named but not held",
        f'property.pictures=["{_OTHER}"]',
    ),
    crossing(
        "draft",
        "leave.hold",
        "Hold: the entry “ten years” could not be understood and is not taken in",
        'drafts={"leave.hold": "ten years"}',
    ),
)
