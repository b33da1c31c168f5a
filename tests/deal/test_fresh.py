"""New items have ids of their own and are empty; what is taken away leaves the rest as it was."""

import pytest

from tests.fullest import fullest, small_raw
from workbench.deal.checks import check
from workbench.deal.checks_records import items, misnamed
from workbench.deal.fresh import NEW_ITEMS, list_fields, new_deal, with_new_item, without_item
from workbench.deal.paths import UnknownPathError, get
from workbench.files.deal_file import deal_from_raw


def test_a_new_deal_has_the_places_of_the_eight_numbers() -> None:
    deal = new_deal()
    assert list(misnamed(deal)) == []
    raw = small_raw()
    assert [item.id for _, item in items(deal)] == [
        item.id for _, item in items(deal_from_raw(raw))
    ]
    assert {one.path for one in check(deal)} == {
        "purchase.price", "spaces@s1.count", "spaces@s1.market_rent.amount", "earn.vacancy.1",
        "expenses@x2.amount", "leave.hold", "leave.exit_yield", "returns.required.1",
    }  # fmt: skip


@pytest.mark.parametrize("name", NEW_ITEMS)
def test_a_new_item_is_the_last_of_its_list_with_a_new_id(name: str) -> None:
    before = fullest()
    after = with_new_item(before, name, **({"weight": 0.0} if name == "blend" else {}))
    added = [item for item in items(after) if item not in list(items(before))]
    assert [(found, item.id[1:]) for found, item in added] == [(name, "40")]
    assert after.next_id == 41
    assert list(misnamed(after)) == []


def test_a_new_item_may_have_values() -> None:
    deal = with_new_item(fullest(), "expenses", name="Lift", amount=900.0)
    assert get(deal, "expenses@x40.name") == "Lift"
    assert get(deal, "expenses@x40.amount") == 900.0


@pytest.mark.parametrize(
    "name", ["expenses@x17", "leases@e5", "steps@p3", "blend@b10", "costs@c12"]
)
def test_an_item_is_taken_away(name: str) -> None:
    before = fullest()
    after = without_item(before, name)
    gone = {item.id for _, item in items(before)} - {item.id for _, item in items(after)}
    assert gone == {name.partition("@")[2]}
    assert after.next_id == before.next_id


def test_an_item_that_is_not_there_cannot_be_taken_away() -> None:
    with pytest.raises(UnknownPathError):
        without_item(fullest(), "expenses@x99")


def test_the_fields_of_a_list() -> None:
    assert list_fields("blend") == ("method", "weight")
    assert list_fields("expenses")[:2] == ("name", "amount")
    assert "id" not in list_fields("spaces")
