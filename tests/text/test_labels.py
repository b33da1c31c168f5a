"""What inputs and items are called."""

import pytest

from tests.fullest import fullest
from workbench.deal.changes import set_value
from workbench.deal.deal import ID_LETTERS, Deal
from workbench.deal.inputs import leaves
from workbench.deal.paths import UnknownPathError
from workbench.text.labels import ITEMS, item_name, label_of

DEAL = fullest()


@pytest.mark.parametrize(
    ("path", "label"),
    [
        ("leave.hold", "Hold"),
        ("earn.vacancy", "Vacancy allowance"),
        ("earn.vacancy.3", "Vacancy allowance, year 3"),
        ("spaces@s6.count", "Units of space s6 “Flats”"),
        ("spaces@s6.market_rent.amount", "Market rent of space s6 “Flats”"),
        ("leases@e2.rent.amount", "Rent of lease e2 “Sailmaker”"),
        ("leases@e2.end", "End of lease e2 “Sailmaker”"),
        ("steps@p3.change", "Change of step p3"),
        ("expenses@x16.growth.2", "Growth of expense x16 “Repairs”, year 2"),
        ("loans@l21.rate.1", "Interest rate of loan l21 “Bank”, year 1"),
        ("costs@c13.amount", "Amount of purchase cost c13 “Transfer tax”"),
        ("blend@b9.weight", "Weight of part of the blend b9"),
        ("lines@a23.amount", "Reported amount of statement line a23"),
        ("cases@k25", "Case k25 “A worse sale”"),
        ("works@w19", "Works w19 “Roof”"),
        ("spaces", "Rent roll"),
        ("next_id", "Next id"),
        ("pictures", "Pictures"),
        ("property.pictures", "Pictures shown"),
    ],
)
def test_label(path: str, label: str) -> None:
    assert label_of(DEAL, path) == label


@pytest.mark.parametrize(
    "path",
    [
        "leave.nothing", "earn.vacancy.0", "earn.vacancy.-3", "expenses@x99.amount", "expenses@x99",
        "pictures.0123456789ab", "pictures.012345678901", "leave", "spaces@s6.leases", "noi",
    ],
)  # fmt: skip
def test_a_path_that_is_no_input_stands_for_itself(path: str) -> None:
    assert label_of(DEAL, path) == path


def test_a_draft_may_have_any_path_at_all() -> None:
    assert label_of(DEAL, "") == "An entry"
    assert label_of(DEAL, "x" * 1000) == "x" * 59 + "…"
    assert label_of(DEAL, "a\nb\x1b") == "a b"


def test_every_input_of_a_deal_has_a_label_of_its_own() -> None:
    """No two messages about different inputs could be mistaken for each other."""
    labels = [label_of(DEAL, leaf.path) for leaf in leaves(DEAL) if "@" in leaf.path]
    assert len(set(labels)) == len(labels)
    assert all(label[0].isupper() for label in labels)


def test_every_list_has_a_word_for_its_items() -> None:
    assert set(ITEMS) == set(ID_LETTERS)


@pytest.mark.parametrize(
    ("name", "said"),
    [
        ("spaces@s6", "space s6 “Flats”"),
        ("leases@e5", "lease e5 “Bookbinder”"),
        ("steps@p4", "step p4"),
        ("blend@b8", "part of the blend b8"),
    ],
)
def test_item(name: str, said: str) -> None:
    assert item_name(DEAL, name) == said


def test_a_long_name_is_cut_and_put_on_one_line() -> None:
    deal = set_value(DEAL, "spaces@s6.name", "Flats\nabove\x1b[31m " + "x" * 100)
    assert item_name(deal, "spaces@s6") == "space s6 “Flats above [31m " + "x" * 22 + "…”"


@pytest.mark.parametrize("name", ["spaces@s99", "s6", "", "nothing@s6", "forward_noi"])
def test_an_item_that_is_not_there(name: str) -> None:
    with pytest.raises(UnknownPathError):
        item_name(DEAL, name)


def test_an_empty_deal_has_labels_too() -> None:
    assert label_of(Deal(), "earn.vacancy.1") == "Vacancy allowance, year 1"
