"""Costs, loans, exit: what each choice needs beside it."""

from datetime import date

import pytest

from tests.fullest import fullest, small
from workbench.deal.borrow import Loan
from workbench.deal.changes import set_value
from workbench.deal.checks_sections import check_sections, exit_methods
from workbench.deal.deal import Deal
from workbench.deal.issues import Issue
from workbench.deal.leave import ExitPart
from workbench.deal.paths import field_of
from workbench.deal.spend import Works

CLOSING = date(2027, 1, 1)


def issues(deal: Deal) -> list[Issue]:
    return list(check_sections(deal))


def without_areas() -> Deal:
    """A deal of which no rent needs the area that is missing."""
    return set_value(fullest(), "spaces@s6.area", None)


def test_sound_deals_have_no_issue() -> None:
    assert issues(fullest()) == []
    assert issues(small()) == []


def test_an_expense_by_area_needs_every_area() -> None:
    expected = Issue("expenses@x16.basis", "areas_needed", "area", other={"space": "s6"})
    assert issues(without_areas()) == [expected]


@pytest.mark.parametrize(
    ("changes", "path"),
    [
        ({"other_income@i14.basis": "area"}, "other_income@i14.basis"),
        ({"spend.reserves_basis": "area"}, "spend.reserves_basis"),
        ({"leave.price_per_of": "area"}, "leave.price_per_of"),
    ],
)
def test_whatever_is_by_area_needs_every_area(changes: dict[str, str], path: str) -> None:
    deal = set_value(without_areas(), "expenses@x16.basis", "year")
    assert issues(deal) == []
    for key, value in changes.items():
        deal = set_value(deal, key, value)
    assert issues(deal) == [Issue(path, "areas_needed", "area", other={"space": "s6"})]


def test_what_is_not_used_needs_no_area() -> None:
    deal = set_value(without_areas(), "expenses@x16.basis", "year")
    none = set_value(set_value(deal, "spend.reserves_basis", "area"), "spend.reserves", 0.0)
    assert issues(none) == []
    per = set_value(set_value(deal, "leave.price_per_of", "area"), "leave.blend", ())
    assert issues(per) == []


def test_dated_leases_need_a_closing_date() -> None:
    deal = set_value(fullest(), "purchase.closing_date", None)
    other = {"because": "leases@e2"}
    expected = Issue("purchase.closing_date", "closing_date_needed", None, other=other)
    assert issues(deal) == [expected]


def test_dated_works_need_a_closing_date() -> None:
    deal = set_value(small(), "works", (Works("w3", amount=5.0, date=CLOSING),))
    other = {"because": "works@w3"}
    expected = Issue("purchase.closing_date", "closing_date_needed", None, other=other)
    assert issues(deal) == [expected]


def test_without_dates_no_closing_date_is_needed() -> None:
    deal = set_value(small(), "works", (Works("w3", amount=5.0, year=2),))
    assert issues(deal) == []


@pytest.mark.parametrize(
    ("works", "expected"),
    [
        (Works("w3"), [Issue("works@w3.year", "date_or_year", None, 1, 41)]),
        (Works("w3", date=CLOSING, year=4), [Issue("works@w3.year", "date_and_year", 4)]),
        (Works("w3", date=CLOSING), []),
        (Works("w3", year=4), []),
        (
            Works("w3", date=date(2026, 12, 31)),
            [
                Issue(
                    "works@w3.date",
                    "before_closing",
                    date(2026, 12, 31),
                    other={"closing": CLOSING},
                )
            ],
        ),
    ],
)
def test_works_have_a_date_or_a_year(works: Works, expected: list[Issue]) -> None:
    deal = set_value(set_value(small(), "purchase.closing_date", CLOSING), "works", (works,))
    assert issues(deal) == expected


@pytest.mark.parametrize(
    ("free", "amortisation", "term", "expected"),
    [
        (24, None, None, []),
        (24, 300, None, []),
        (24, None, 24, []),
        (25, None, 24, [Issue("loans@l3.interest_only_months", "longer_than_term", 25, 0, 24)]),
        (24, 300, 324, []),
        (24, 300, 325, [Issue("loans@l3.term_months", "longer_than_amortisation", 325, 1, 324)]),
    ],
)
def test_a_loan_ends_before_it_is_repaid_or_when(
    free: int, amortisation: int | None, term: int | None, expected: list[Issue]
) -> None:
    loan = Loan("l3", "Bank", 5.0, {1: 0.05}, amortisation, free, term)
    assert issues(set_value(small(), "loans", (loan,))) == expected


@pytest.mark.parametrize(
    ("method", "name", "low", "high"),
    [
        ("forward_noi", "exit_yield", 0.0001, 1),
        ("trailing_noi", "exit_yield", 0.0001, 1),
        ("price_per", "price_per", 0, 1e15),
        ("rent_multiple", "rent_multiple", 0, 1000),
        ("amount", "amount", 0, 1e15),
    ],
)
def test_a_method_needs_its_figure(method: str, name: str, low: float, high: float) -> None:
    deal = set_value(set_value(fullest(), "leave.blend", ()), "leave.method", method)
    assert issues(deal) == []
    expected = Issue(f"leave.{name}", "method_needs", None, low, high, {"method": method})
    assert issues(set_value(deal, f"leave.{name}", None)) == [expected]


@pytest.mark.parametrize("method", ["perpetuity", "purchase_price"])
def test_some_methods_need_nothing(method: str) -> None:
    deal = set_value(set_value(small(), "leave.method", method), "leave.exit_yield", None)
    assert issues(deal) == []


def test_the_ranges_a_method_names_are_those_declared() -> None:
    """They stand twice in the code; this holds them together."""
    deal = set_value(fullest(), "leave.blend", ())
    for method, name in (
        ("forward_noi", "exit_yield"), ("price_per", "price_per"),
        ("rent_multiple", "rent_multiple"), ("amount", "amount"),
    ):  # fmt: skip
        bare = set_value(set_value(deal, "leave.method", method), f"leave.{name}", None)
        (issue,) = issues(bare)
        mark = field_of(bare, issue.path).input
        assert mark is not None
        assert (issue.low, issue.high) == (mark.low, mark.high)


def test_every_method_of_a_blend_needs_its_figure_once() -> None:
    deal = set_value(fullest(), "leave.exit_yield", None)
    deal = set_value(deal, "blend@b9.method", "trailing_noi")
    assert [(one.path, one.other["method"]) for one in issues(deal)] == [
        ("leave.exit_yield", "forward_noi"),
        ("leave.exit_yield", "trailing_noi"),
    ]


def test_the_methods_are_those_of_the_blend() -> None:
    assert exit_methods(small()) == ("forward_noi",)
    assert exit_methods(fullest()) == ("forward_noi", "price_per", "rent_multiple", "amount")


def test_stabilised_income_needs_its_vacancy() -> None:
    deal = set_value(fullest(), "leave.stabilised_vacancy", None)
    assert issues(deal) == [Issue("leave.stabilised_vacancy", "missing", None, 0, 1)]
    assert issues(set_value(deal, "leave.exit_income", "modelled")) == []


@pytest.mark.parametrize(
    ("weights", "total"),
    [((0.5, 0.5), None), ((0.5, 0.4), 0.9), ((0.5, None), 0.5), ((0.1, 0.9 + 1e-8), 1 + 1e-8)],
)
def test_weights_sum_to_one(weights: tuple[float | None, ...], total: float | None) -> None:
    parts = tuple(ExitPart(f"b{3 + n}", weight=one) for n, one in enumerate(weights))
    found = issues(set_value(small(), "leave.blend", parts))
    if total is None:
        assert found == []
    else:
        assert [(one.path, one.code, one.low, one.high) for one in found] == [
            ("blend@b3.weight", "weights", 1, 1)
        ]
        assert found[0].value == pytest.approx(total, rel=1e-12)


def test_thirds_sum_to_one() -> None:
    parts = tuple(ExitPart(f"b{n}", weight=1 / 3) for n in (3, 4, 5))
    assert issues(set_value(small(), "leave.blend", parts)) == []
