"""Ids, references, statements, cases, pictures and drafts."""

import base64
import hashlib
from dataclasses import replace
from datetime import date
from typing import Any

import pytest

from tests.fullest import DIGEST, JPEG, fullest, small
from workbench.deal.changes import set_value
from workbench.deal.checks import check
from workbench.deal.checks_records import items, misnamed
from workbench.deal.deal import Deal
from workbench.deal.earn import Space
from workbench.deal.issues import Issue
from workbench.deal.records import Addition, Case


def issues(deal: Deal) -> list[Issue]:
    return check(deal)


def with_pictures(pictures: dict[str, str], shown: tuple[str, ...] = ()) -> Deal:
    estate = replace(small().property, pictures=shown)
    return replace(small(), property=estate, pictures=pictures)


def encoded(data: bytes) -> dict[str, str]:
    return {hashlib.sha256(data).hexdigest(): base64.b64encode(data).decode("ascii")}


def test_sound_deals_have_no_issue() -> None:
    assert issues(fullest()) == []
    assert issues(small()) == []


@pytest.mark.parametrize("code", ["", "usd", "US", "USDX", "U D", "ÄÖÜ", "USD\n"])
def test_a_currency_is_three_capital_letters(code: str) -> None:
    found = issues(set_value(small(), "conventions.currency", code))
    assert found == [Issue("conventions.currency", "bad_currency", code)]


def test_items_are_found_at_any_depth() -> None:
    assert [item.id for name, item in items(fullest()) if name == "steps"] == ["p3", "p4"]
    assert list(items(Deal())) == []
    assert all(name != "add" for name, _ in items(fullest()))  # a case's addition has no id


def test_the_next_id_is_above_all() -> None:
    assert issues(replace(small(), next_id=3)) == []
    found = issues(replace(small(), next_id=2))
    assert found == [Issue("next_id", "id_ahead", 2, 3, None, {"id": "x2"})]


def test_the_next_id_must_be_above_the_highest() -> None:
    found = issues(replace(fullest(), next_id=5))
    assert [(one.path, one.low) for one in found] == [("next_id", 26)]


@pytest.mark.parametrize("identity", ["x9", "s0", "s01", "s", "S1", "s1 ", "s-1", "s1.5", "s" * 9])
def test_an_id_is_the_letter_of_its_list_and_a_number(identity: str) -> None:
    deal = replace(small(), spaces=(Space(identity),))
    assert list(misnamed(deal)) == [
        (f"spaces@{identity}", "an id here is the letter s and a number from 1")
    ]


@pytest.mark.parametrize(("identity", "sound"), [("s999999999", True), ("s1000000000", False)])
def test_an_id_is_not_endless(identity: str, sound: bool) -> None:
    deal = replace(small(), spaces=(Space(identity),))
    assert (list(misnamed(deal)) == []) is sound


def test_an_id_stands_once() -> None:
    deal = replace(small(), spaces=(Space("s1"), Space("s3"), Space("s1")))
    assert list(misnamed(deal)) == [("spaces@s1", "this id stands twice; each item has its own")]


def test_ids_of_nested_items_are_looked_at() -> None:
    deal = set_value(fullest(), "steps@p4.id", "p3")
    assert [path for path, _ in misnamed(deal)] == ["steps@p3"]
    assert list(misnamed(fullest())) == []


@pytest.mark.parametrize("lease", ["e99", "", "s1", "e7"])
def test_income_is_tied_to_a_dated_lease(lease: str) -> None:
    found = issues(set_value(fullest(), "other_income@i14.lease", lease))
    assert found == [Issue("other_income@i14.lease", "no_such_lease", lease)]


def test_income_may_be_tied_to_any_lease_of_a_space() -> None:
    assert issues(set_value(fullest(), "other_income@i14.lease", "e5")) == []


def test_a_lease_with_one_date_ties_nothing() -> None:
    found = issues(set_value(fullest(), "leases@e2.end", None))
    assert Issue("other_income@i14.lease", "no_such_lease", "e2") in found


def test_a_statement_ends_on_its_first_day_or_later() -> None:
    start = date(2025, 1, 1)
    assert issues(set_value(fullest(), "statements@m22.end", start)) == []
    ended = date(2024, 12, 31)
    found = issues(set_value(fullest(), "statements@m22.end", ended))
    other = {"start": start}
    assert found == [Issue("statements@m22.end", "before_start", ended, other=other)]


@pytest.mark.parametrize("name", ["start", "end"])
def test_a_statement_may_lack_a_date(name: str) -> None:
    assert issues(set_value(fullest(), f"statements@m22.{name}", None)) == []


@pytest.mark.parametrize(
    ("case", "lost"),
    [
        (Case("k25", set={"leave.hold": 5.0, "earn.vacancy.9": None}), []),
        (Case("k25", set={"leave.holt": 5.0}), ["leave.holt"]),
        (Case("k25", remove=("expenses@x16", "leases@e2")), []),
        (Case("k25", remove=("expenses@x99",)), ["expenses@x99"]),
        (Case("k25", add=(Addition("works", {}), Addition("spaces@s1.leases", {}))), []),
        (Case("k25", add=(Addition("spaces@s9.leases", {}),)), ["spaces@s9.leases"]),
        (Case("k25", set={"a": 1.0}, remove=("b",), add=(Addition("c", {}),)), ["a", "b", "c"]),
    ],
)
def test_a_path_that_the_deal_lost_is_reported(case: Case, lost: list[str]) -> None:
    case = replace(case, name="Bad year")
    found = issues(replace(fullest(), cases=(case,)))
    other = {"case": "Bad year"}
    assert found == [Issue("cases@k25", "path_lost", path, other=other) for path in lost]


def test_a_picture_is_the_one_its_name_says() -> None:
    assert issues(with_pictures(encoded(JPEG), (DIGEST,))) == []


@pytest.mark.parametrize(
    ("digest", "text"),
    [
        (DIGEST, "no base64 at all!"),
        (DIGEST, "Ü"),
        (DIGEST, base64.b64encode(JPEG + b"x").decode()),
        *encoded(b"\x89PNG").items(),
    ],
)
def test_a_picture_that_is_not_it(digest: str, text: str) -> None:
    found = issues(with_pictures({digest: text}))
    assert found == [Issue(f"pictures.{digest[:12]}", "not_the_picture", digest)]


def test_a_picture_that_is_not_held() -> None:
    found = issues(with_pictures({}, (DIGEST,)))
    assert found == [Issue("property.pictures", "picture_lost", DIGEST)]


def test_at_most_24_pictures() -> None:
    pictures: dict[str, str] = {}
    for number in range(24):
        pictures |= encoded(JPEG + bytes([number]))
    assert issues(with_pictures(pictures)) == []
    pictures |= encoded(JPEG)
    assert issues(with_pictures(pictures)) == [Issue("pictures", "too_many", 25, 0, 24)]


def test_every_draft_is_an_issue() -> None:
    drafts: dict[str, Any] = {"leave.hold": "ten", "nowhere": ""}
    assert issues(replace(small(), drafts=drafts)) == [
        Issue("leave.hold", "draft", "ten"),
        Issue("nowhere", "draft", ""),
    ]
