"""pydantic over the records: strict, and without touching what they are."""

import json
from dataclasses import fields
from typing import Any

import pytest
from pydantic import ValidationError

from tests.fullest import FULLEST, fullest
from workbench.deal.deal import Deal
from workbench.deal.records import Addition
from workbench.files.adapter import deal_adapter, record_classes


def kinds_of_error(raw: Any) -> set[str]:
    with pytest.raises(ValidationError) as caught:
        deal_adapter().validate_json(json.dumps(raw), strict=True)
    return {error["type"] for error in caught.value.errors()}


def test_every_record_is_found_by_name() -> None:
    found = record_classes()
    assert found["Deal"] is Deal
    assert {"Rent", "Step", "StatementLine", "Addition", "ExitPart"} <= set(found)
    assert all(fields(record) for record in found.values())
    assert list(record_classes(Addition)) == ["Addition"]


def test_the_adapter_is_made_once() -> None:
    assert deal_adapter() is deal_adapter()


def test_a_deal_is_made_of_frozen_records() -> None:
    assert deal_adapter().validate_json(json.dumps(FULLEST), strict=True) == fullest()
    assert isinstance(fullest(), Deal)


@pytest.mark.parametrize("record", record_classes(), ids=str)
def test_no_record_takes_an_unknown_key(record: str) -> None:
    if record == "Deal":
        assert kinds_of_error({"schema": 1, "extra": 0}) == {"unexpected_keyword_argument"}
        return
    raw = json.loads(json.dumps(FULLEST))
    keys = {spec.name for spec in fields(record_classes()[record])}
    planted = _plant(raw, keys)
    assert planted
    assert kinds_of_error(raw) == {"unexpected_keyword_argument"}


def _plant(raw: Any, keys: set[str]) -> bool:
    """Put an unknown key into the first object that is this record."""
    if isinstance(raw, list):
        return any(_plant(held, keys) for held in raw)
    if not isinstance(raw, dict):
        return False
    if raw and "schema" not in raw and set(raw) <= keys:
        raw["extra"] = 0
        return True
    return any(_plant(held, keys) for held in raw.values())


@pytest.mark.parametrize(
    ("raw", "kind"),
    [
        ({"purchase": {"price": "5"}}, "float_type"),
        ({"purchase": {"price": True}}, "float_type"),
        ({"leave": {"hold": 1.5}}, "int_type"),
        ({"leave": {"hold": True}}, "int_type"),
        ({"earn": {"count_empty_time_once": 1}}, "bool_type"),
        ({"property": {"name": 1}}, "string_type"),
        ({"purchase": {"closing_date": 5}}, "date_type"),
        ({"purchase": {"closing_date": "1700000000"}}, "date_parsing"),
        ({"purchase": {"price": float("inf")}}, "finite_number"),
        ({"earn": {"vacancy": {"1": float("nan")}}}, "finite_number"),
    ],
)
def test_no_kind_is_turned_into_another(raw: Any, kind: str) -> None:
    assert kind in kinds_of_error({"schema": 1, **raw})
