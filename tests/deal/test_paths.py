"""Key paths: finding, reading and replacing what they name."""

from typing import Any

import pytest

from tests.fullest import fullest
from workbench.deal.deal import Deal
from workbench.deal.inputs import leaves
from workbench.deal.paths import (
    UnknownPathError,
    field_of,
    find_item,
    get,
    locate,
    put,
    value_at,
)

DEAL = fullest()

KNOWN = [
    ("leave.hold", ("leave", "hold"), 10),
    ("earn.vacancy", ("earn", "vacancy"), {1: 0.05, 3: 0.06}),
    ("earn.vacancy.1", ("earn", "vacancy", 1), 0.05),
    ("earn.vacancy.3", ("earn", "vacancy", 3), 0.06),
    ("earn.vacancy.2", ("earn", "vacancy", 2), None),
    ("earn.vacancy.42", ("earn", "vacancy", 42), None),
    ("spaces@s6.count", ("spaces", 1, "count"), 6),
    ("spaces@s6.market_rent.amount", ("spaces", 1, "market_rent", "amount"), 1150.0),
    ("leases@e5.tenant", ("spaces", 0, "leases", 1, "tenant"), "Bookbinder"),
    ("leases@e5.rent.per", ("spaces", 0, "leases", 1, "rent", "per"), "month"),
    ("steps@p4.amount", ("spaces", 0, "leases", 0, "steps", 1, "amount"), 2450.0),
    ("costs@c13.amount", ("purchase", "costs", 1, "amount"), 0.02),
    ("blend@b9.weight", ("leave", "blend", 1, "weight"), 0.2),
    ("expenses@x17.growth", ("expenses", 1, "growth"), None),
    ("expenses@x17.growth.2", ("expenses", 1, "growth", 2), None),
    ("loans@l21.rate.6", ("loans", 0, "rate", 6), 0.06),
    ("lines@a23.amount", ("statements", 0, "lines", 0, "amount"), -5200.0),
    ("schema", ("schema",), 1),
]

UNKNOWN = [
    ("", ""),
    (".", ""),
    (".leave.hold", ""),
    ("leave.", ""),
    ("leave..hold", ""),
    ("leave.hold.", ""),
    ("leave.hold.1", "1"),
    ("leave.nothing", "nothing"),
    ("nothing", "nothing"),
    ("earn.vacancy.0", "0"),
    ("earn.vacancy.-1", "-1"),
    ("earn.vacancy.01", "01"),
    ("earn.vacancy.1.5", "1"),
    ("earn.vacancy.one", "one"),
    ("earn.vacancy.٣", "٣"),
    ("earn.vacancy." + "9" * 5000, "9" * 5000),
    ("drafts.1", "1"),
    ("pictures.1", "1"),
    ("cases@k25.set.1", "1"),
    ("property.pictures.1", "1"),
    ("spaces@s9.count", "spaces@s9"),
    ("costs@c99.amount", "costs@c99"),
    ("spaces@.count", "spaces@"),
    ("@s1.count", "@s1"),
    ("leases@s1.count", "leases@s1"),
    ("spaces@s1@s6.count", "spaces@s1@s6"),
    ("pictures@x.y", "pictures@x"),
    ("add@None.to", "add@None"),
    ("spaces@s1.leases@e2.start", "leases@e2"),
    ("spaces.0.count", "0"),
]


@pytest.mark.parametrize(("path", "steps", "value"), KNOWN)
def test_known_path(path: str, steps: tuple[str | int, ...], value: Any) -> None:
    assert locate(DEAL, path) == steps
    assert get(DEAL, path) == value


@pytest.mark.parametrize(("path", "part"), UNKNOWN)
def test_unknown_path_names_the_part(path: str, part: str) -> None:
    with pytest.raises(UnknownPathError) as caught:
        locate(DEAL, path)
    assert caught.value.part == part
    assert caught.value.path in (path, part)
    assert f"the deal has no “{part}”" in str(caught.value)


def test_every_input_is_found_by_its_own_path() -> None:
    for leaf in leaves(DEAL):
        assert get(DEAL, leaf.path) == leaf.value
        assert field_of(DEAL, leaf.path) is leaf.field


def test_an_item_is_found_by_itself() -> None:
    assert locate(DEAL, "leases@e5") == find_item(DEAL, "leases@e5") == ("spaces", 0, "leases", 1)
    assert get(DEAL, "leases@e5").tenant == "Bookbinder"


def test_the_field_of_a_year_is_its_row() -> None:
    assert field_of(DEAL, "earn.vacancy.3") is field_of(DEAL, "earn.vacancy")
    assert field_of(DEAL, "expenses@x17.growth.2").name == "growth"


def test_the_field_of_an_item_is_its_list() -> None:
    assert field_of(DEAL, "leases@e5").name == "leases"


def test_value_below_nothing_is_nothing() -> None:
    assert value_at(DEAL, ("expenses", 1, "growth", 3)) is None


@pytest.mark.parametrize(
    ("path", "value"),
    [
        ("leave.hold", 7),
        ("steps@p4.amount", 2600.0),
        ("blend@b9.weight", 0.3),
        ("spaces@s6.market_rent.amount", 1175.0),
        ("earn.vacancy.3", 0.09),
        ("earn.vacancy.2", 0.01),
        ("expenses@x17.growth.2", 0.04),
        ("other_income@i14.lease", None),
    ],
)
def test_put_replaces_one_value_and_nothing_else(path: str, value: Any) -> None:
    before = fullest()
    after = put(DEAL, locate(DEAL, path), value)
    assert get(after, path) == value
    changed = [
        leaf.path
        for leaf, old in zip(leaves(after), leaves(before), strict=True)
        if leaf.value != old.value
    ]
    row = path.rpartition(".")[0]
    assert changed == [path if path in {leaf.path for leaf in leaves(DEAL)} else row]
    assert before == DEAL


def test_put_keeps_years_in_order() -> None:
    after = put(DEAL, ("earn", "vacancy", 2), 0.01)
    assert list(after.earn.vacancy) == [1, 2, 3]


def test_put_none_lets_a_year_follow_again() -> None:
    after = put(DEAL, ("earn", "vacancy", 3), None)
    assert after.earn.vacancy == {1: 0.05}
    assert put(DEAL, ("earn", "vacancy", 7), None) == DEAL


def test_put_none_in_a_row_that_is_not_there() -> None:
    assert put(DEAL, ("expenses", 1, "growth", 2), None).expenses[1].growth == {}


def test_put_of_no_steps_is_the_value() -> None:
    assert put(DEAL, (), Deal()) == Deal()


def test_put_replaces_an_item() -> None:
    first = DEAL.expenses[0]
    after = put(DEAL, ("expenses", 2), first)
    assert after.expenses == (*DEAL.expenses[:2], first)
