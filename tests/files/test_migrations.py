"""Older files are brought up to date step by step; newer ones are refused with words."""

from typing import Any

import pytest

from workbench.deal.deal import SCHEMA
from workbench.files.faults import UnreadableError
from workbench.files.migrations import MIGRATIONS, Migration, Raw, migrate


def _rename_price(raw: Raw) -> Raw:
    return {**{key: held for key, held in raw.items() if key != "ask"}, "price": raw["ask"]}


def _price_in_a_section(raw: Raw) -> Raw:
    return {"schema": raw["schema"], "purchase": {"price": raw["price"]}}


STEPS: dict[int, Migration] = {1: _rename_price, 2: _price_in_a_section}
"""A story of three versions, of which this program would be the third."""


def refused(raw: Raw, newest: int = SCHEMA) -> str:
    with pytest.raises(UnreadableError) as caught:
        migrate(raw, STEPS, newest)
    (fault,) = caught.value.faults
    assert fault.place == "schema"
    return fault.sentence


@pytest.mark.parametrize(
    ("raw", "newest", "expected"),
    [
        ({"schema": 1, "ask": 5}, 3, {"schema": 3, "purchase": {"price": 5}}),
        ({"schema": 2, "price": 5}, 3, {"schema": 3, "purchase": {"price": 5}}),
        ({"schema": 3, "purchase": {}}, 3, {"schema": 3, "purchase": {}}),
        ({"schema": 1, "ask": 5}, 2, {"schema": 2, "price": 5}),
    ],
)
def test_each_step_is_taken_in_turn(raw: Raw, newest: int, expected: Raw) -> None:
    before = dict(raw)
    assert migrate(raw, STEPS, newest) == expected
    assert raw == before


def test_a_step_may_change_what_it_is_given() -> None:
    """It is given a copy."""

    def move(raw: Raw) -> Raw:
        raw["price"] = raw.pop("ask")
        return raw

    raw = {"schema": 1, "ask": 5}
    assert migrate(raw, {1: move}, 2) == {"schema": 2, "price": 5}
    assert raw == {"schema": 1, "ask": 5}


def test_the_newest_version_passes_as_it_is() -> None:
    raw = {"schema": SCHEMA, "leave": {}}
    assert migrate(raw) is raw


def test_there_is_a_step_from_every_older_version() -> None:
    assert set(MIGRATIONS) == set(range(1, SCHEMA))


def test_a_newer_version_is_refused_with_words() -> None:
    said = refused({"schema": 4}, 3)
    assert "written by a newer program (schema 4; this one reads up to 3)" in said
    assert "it has not been changed" in said


@pytest.mark.parametrize("version", [None, 0, -1, 1.5, "1", True, [], {}])
def test_the_version_must_be_a_whole_number(version: Any) -> None:
    assert refused({"schema": version}, 3).endswith("it must be a whole number from 1 to 3")
    assert refused({"schema": version}, 1).endswith("it must be 1")


def test_the_version_must_be_there() -> None:
    assert refused({}) == "the version of the schema is needed here; it must be 1"
