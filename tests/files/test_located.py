"""Places in a file's plain data: their names and what is declared there."""

from typing import Any

import pytest

from tests.fullest import FULLEST
from workbench.files.located import Location, allowed_at, field_at, place_of, within


@pytest.mark.parametrize(
    ("location", "place"),
    [
        ((), ""),
        (("leave",), "leave"),
        (("leave", "hold"), "leave.hold"),
        (("earn", "vacancy", "3"), "earn.vacancy.3"),
        (("spaces", 1, "count"), "spaces@s6.count"),
        (("spaces", 0, "leases", 1, "rent", "amount"), "leases@e5.rent.amount"),
        (("purchase", "costs", 1, "amount"), "costs@c13.amount"),
        (("cases", 0, "add", 0, "item"), "cases@k25.add[1].item"),
        (("property", "pictures", 0), "property.pictures[1]"),
        (("nowhere", 3, "deep"), "nowhere[4].deep"),
        (("leave", "x" * 100), "leave." + "x" * 59 + "…"),
    ],
)
def test_place(location: Location, place: str) -> None:
    assert place_of(FULLEST, location) == place


def test_an_item_without_a_proper_id_is_numbered() -> None:
    raw = {"spaces": [{"id": 5}, {"name": "x"}, 7, {"id": "s" * 90}]}
    places = [place_of(raw, ("spaces", position)) for position in range(4)]
    assert places == ["spaces[1]", "spaces[2]", "spaces[3]", "spaces@" + "s" * 59 + "…"]


@pytest.mark.parametrize(
    ("location", "expected"),
    [
        (("a", 0, "b"), ("a", 0, "b")),
        (("a", 0, "c", "d"), ("a", 0)),
        (("a", 5), ("a",)),
        (("a", 0, "b", "float"), ("a", 0, "b")),
        (("z",), ()),
        ((), ()),
    ],
)
def test_the_part_of_a_location_that_is_there(location: Location, expected: Location) -> None:
    assert within({"a": [{"b": 1}]}, location) == expected


@pytest.mark.parametrize(
    ("location", "label"),
    [
        (("leave", "hold"), "Hold"),
        (("spaces", 3, "count"), "Units"),
        (("spaces", 3, "leases", 0, "rent", "amount"), "Rent"),
        (("spaces", 3, "leases", 0, "steps", 9, "change"), "Change"),
        (("earn", "vacancy"), "Vacancy allowance"),
        (("earn", "vacancy", "3"), "Vacancy allowance"),
        (("expenses", 0, "growth", "1"), "Growth"),
        (("purchase", "costs", 0, "amount"), "Amount"),
    ],
)
def test_the_declaration_at_a_location(location: Location, label: str) -> None:
    field = field_at(location)
    assert field is not None
    assert field.input is not None
    assert field.input.label == label


@pytest.mark.parametrize(
    "location", [(), ("nothing",), ("leave", "nothing"), ("spaces", 0, "nothing", "more")]
)
def test_nothing_is_declared_there(location: Location) -> None:
    assert field_at(location) is None


def test_inside_free_data_it_is_still_that_field() -> None:
    field = field_at(("cases", 0, "add", 0, "item", "amount"))
    assert field is not None
    assert (field.name, field.input) == ("item", None)


@pytest.mark.parametrize(
    ("location", "said"),
    [
        (("leave", "hold"), "; it must be from 1 to 40"),
        (("leave", "exit_yield"), "; it must be from 0.0001 to 1"),
        (("purchase", "price"), "; it must be from 0 to 1000000000000000"),
        (("earn", "vacancy", "3"), "; it must be from 0 to 1"),
        (("property", "name"), "; at most 5000 characters are allowed"),
        (("earn", "vacancy"), ""),
        (("conventions", "currency"), ""),
        (("leave", "method"), ""),
        (("leave",), ""),
        (("nothing",), ""),
    ],
)
def test_what_is_allowed(location: Location, said: Any) -> None:
    assert allowed_at(location) == said
