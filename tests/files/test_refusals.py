"""Why plain data is no deal: the place, the value, what was wanted and the range."""

from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.fullest import fullest_raw, small_raw
from workbench.files.deal_file import deal_from_raw
from workbench.files.faults import UnreadableError
from workbench.files.refusals import misspelt, refusals


def refused(**sections: Any) -> list[str]:
    with pytest.raises(UnreadableError) as caught:
        deal_from_raw({"schema": 1, **sections})
    return [str(fault) for fault in caught.value.faults]


NUMBER = "; it must be from 0 to 1000000000000000"
BY_METHOD = (
    "forward_noi, trailing_noi, perpetuity, price_per, rent_multiple, purchase_price, amount"
)


@pytest.mark.parametrize(
    ("sections", "said"),
    [
        ({"purchase": {"price": "5"}}, f'purchase.price: "5" is not a number{NUMBER}'),
        ({"purchase": {"price": True}}, f"purchase.price: true is not a number{NUMBER}"),
        ({"purchase": {"price": []}}, f"purchase.price: [] is not a number{NUMBER}"),
        (
            {"purchase": {"price": float("inf")}},
            f"purchase.price: Infinity is not a number that a deal can hold{NUMBER}",
        ),
        (
            {"leave": {"hold": 1.5}},
            "leave.hold: 1.5 is not a whole number; it must be from 1 to 40",
        ),
        (
            {"leave": {"hold": 10.0}},
            "leave.hold: 10.0 is not written as a whole number, without a decimal point; it must "
            "be from 1 to 40",
        ),
        (
            {"property": {"name": 7}},
            "property.name: 7 is not a text; at most 5000 characters are allowed",
        ),
        ({"conventions": {"currency": None}}, "conventions.currency: null is not a text"),
        (
            {"earn": {"count_empty_time_once": "yes"}},
            'earn.count_empty_time_once: "yes" is not true or false',
        ),
        ({"leave": {"method": "sale"}}, f'leave.method: "sale" is not one of {BY_METHOD}'),
        (
            {"purchase": {"closing_date": 5}},
            "purchase.closing_date: 5 is not a date like 2027-01-31",
        ),
        (
            {"purchase": {"closing_date": "2027-02-30"}},
            'purchase.closing_date: "2027-02-30" is not a date like 2027-01-31',
        ),
        (
            {"purchase": {"closing_date": "86400"}},
            'purchase.closing_date: "86400" is not a date like 2027-01-31',
        ),
        ({"spaces": {}}, "spaces: {} is not a list in brackets"),
        ({"spaces": [5]}, "spaces[1]: 5 is not an object in braces"),
        ({"earn": {"vacancy": 0.05}}, "earn.vacancy: 0.05 is not an object in braces"),
        ({"earn": None}, "earn: null is not an object in braces"),
        ({"spaces": [{"name": "x"}]}, "spaces[1].id: this must be there and is missing"),
        (
            {"leave": {"holt": 5}},
            "leave.holt: a deal has no such key; check its spelling against the schema",
        ),
        (
            {"earn": {"vacancy": {"one": 0.05}}},
            'earn.vacancy.one: "one" is not a deal year, a whole number from 1',
        ),
        (
            {"earn": {"vacancy": {"1": "much"}}},
            'earn.vacancy.1: "much" is not a number; it must be from 0 to 1',
        ),
        (
            {"cases": [{"id": "k1", "set": {"leave.hold": [5]}}]},
            "cases@k1.set.leave.hold: [5] is not a number or true or false or a text",
        ),
        ({"drafts": {"leave.hold": 5}}, "drafts.leave.hold: 5 is not a text"),
        ({"property": {"pictures": [5]}}, "property.pictures[1]: 5 is not a text"),
    ],
)
def test_refusal(sections: Any, said: str) -> None:
    assert refused(**sections) == [said]


def test_a_year_of_thousands_of_digits() -> None:
    (said,) = refused(earn={"vacancy": {"9" * 5000: 0.05}})
    assert said.endswith("… is not a deal year, a whole number from 1")
    assert len(said) < 250


def test_a_long_value_is_cut() -> None:
    (said,) = refused(purchase={"price": "x" * 10_000})
    assert said == 'purchase.price: "' + "x" * 58 + f"… is not a number{NUMBER}"


def test_every_fault_is_named_at_once() -> None:
    said = refused(leave={"hold": "x", "holt": 1}, spaces=[{"id": 5, "count": 2.5}])
    assert [one.partition(":")[0] for one in said] == [
        "leave.holt", "spaces[1].id", "spaces[1].count", "leave.hold",
    ]  # fmt: skip


def test_a_kind_of_error_without_words_of_ours_keeps_its_own() -> None:
    error = {"type": "novel", "loc": ("leave",), "msg": "Input should be better", "input": 5}
    (fault,) = refusals({"leave": 5}, [error])
    assert str(fault) == "leave: 5 is not better"


@pytest.mark.parametrize("key", ["01", "+1", " 1", "1_0", "1.0", "1 ", "-0", "00", "٣"])
def test_a_year_has_one_spelling(key: str) -> None:
    (said,) = refused(earn={"vacancy": {"1": 0.05, key: 0.06}})
    assert said.startswith("earn.vacancy")
    assert f'"{key}" is not a deal year, a whole number from 1' in said


@pytest.mark.parametrize("key", ["0", "-3", "42", "1000000000000"])
def test_a_year_that_there_is_not_is_an_issue_and_no_refusal(key: str) -> None:
    deal = deal_from_raw({"schema": 1, "earn": {"vacancy": {"1": 0.05, key: 0.06}}})
    assert int(key) in deal.earn.vacancy


def test_spelling_is_looked_at_in_rows_and_dates_alone() -> None:
    raw = fullest_raw()
    raw["drafts"] = {"01": "86400", "property.name": "86400"}
    raw["cases"][0]["set"]["01"] = "86400"
    assert list(misspelt(raw)) == []


def test_dates_are_looked_at_at_any_depth() -> None:
    raw = fullest_raw()
    raw["spaces"][0]["leases"][0]["steps"][0]["date"] = "0"
    raw["works"][0]["date"] = "-86400"
    assert [fault.place for fault in misspelt(raw)] == ["steps@p3.date", "works@w19.date"]


JSON = st.recursive(
    st.none() | st.booleans() | st.integers() | st.floats() | st.text(max_size=4),
    lambda inner: st.lists(inner, max_size=3) | st.dictionaries(st.text(max_size=3), inner),
    max_leaves=8,
)


@settings(deadline=None)
@given(st.sampled_from(sorted(small_raw())), JSON)
def test_any_section_may_be_anything(section: str, value: Any) -> None:
    raw = {**small_raw(), section: value}
    try:
        deal_from_raw(raw)
    except UnreadableError as error:
        for fault in error.faults:
            assert fault.sentence
            assert "Input" not in fault.sentence
