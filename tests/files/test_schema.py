"""The shipped schema is the one the records make, and it says what a person needs to know."""

import json
import runpy
import sys
from pathlib import Path
from typing import Any

import jsonschema
import pytest

from tests.fullest import FULLEST, fullest_raw, small_raw
from workbench import places
from workbench.deal.deal import ID_LETTERS
from workbench.deal.inputs import Field, declared
from workbench.files.adapter import record_classes
from workbench.files.deal_file import deal_from_text, deal_to_raw
from workbench.files.schema import deal_schema, schema_path

SCHEMA = deal_schema()
VALIDATOR = jsonschema.Draft202012Validator(
    SCHEMA, format_checker=jsonschema.FormatChecker(["date"])
)
INPUTS = [
    pytest.param(record, one, id=f"{name}.{one.name}")
    for name, record in record_classes().items()
    for one in declared(record).values()
    if one.input is not None
]


def shape_of(record: type, name: str) -> dict[str, Any]:
    shapes = {**SCHEMA["$defs"], "Deal": SCHEMA}
    shape: dict[str, Any] = shapes[record.__name__]["properties"][name]
    return shape


def test_the_shipped_schema_is_the_generated_one() -> None:
    """If not: `python -m workbench.files.schema` writes it anew."""
    assert json.loads(schema_path().read_text(encoding="utf-8")) == SCHEMA


def test_it_is_written_as_shipped(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """By the command `python -m workbench.files.schema`."""
    shipped = schema_path().read_text(encoding="utf-8")
    monkeypatch.setattr(places, "resources", lambda: tmp_path)
    monkeypatch.delitem(sys.modules, "workbench.files.schema")
    runpy.run_module("workbench.files.schema", run_name="__main__")
    assert (tmp_path / "deal.schema.json").read_text(encoding="utf-8") == shipped


def test_it_is_a_schema() -> None:
    jsonschema.Draft202012Validator.check_schema(SCHEMA)
    assert SCHEMA["title"] == "Groundcourse deal, schema 1"
    assert SCHEMA["required"] == ["schema"]


def test_deals_follow_it() -> None:
    for raw in (FULLEST, small_raw(), deal_to_raw(deal_from_text('{"schema": 1}'))):
        VALIDATOR.validate(raw)


@pytest.mark.parametrize(("record", "one"), INPUTS)
def test_an_input_carries_its_label_unit_and_range(record: type, one: Field) -> None:
    mark, shape = one.input, shape_of(record, one.name)
    assert mark is not None
    assert shape["title"] == mark.label
    text = shape["description"]
    assert f"Unit: {mark.unit}." in text
    assert mark.help in text
    assert ("Has no default." in text) is mark.needed
    assert ("Year row:" in text) is one.is_row
    if mark.unit == "text" and mark.high:
        assert "At most 5,000 characters." in text
    elif mark.unit == "date":
        assert "Allowed: 1000-01-01 to 2999-12-31" in text
    elif mark.low is not None:
        assert f"Allowed: {mark.low:.16g} to {mark.high:.16g}" in text
    else:
        assert "Allowed" not in text


def test_a_currency_has_no_length() -> None:
    assert "At most" not in shape_of(record_classes()["Conventions"], "currency")["description"]


@pytest.mark.parametrize("key", ["1", "41", "100"])
def test_a_row_takes_years(key: str) -> None:
    VALIDATOR.validate({**small_raw(), "earn": {"vacancy": {key: 0.05}}})


@pytest.mark.parametrize("key", ["0", "01", "-1", "one", "1.5", " 1"])
def test_a_row_takes_nothing_but_years(key: str) -> None:
    assert not VALIDATOR.is_valid({**small_raw(), "earn": {"vacancy": {key: 0.05}}})


def test_a_row_that_may_be_absent_may_be_null() -> None:
    raw = fullest_raw()
    raw["expenses"][0]["growth"] = None
    VALIDATOR.validate(raw)
    raw["earn"]["vacancy"] = None
    assert not VALIDATOR.is_valid(raw)


def test_every_letter_of_an_id_is_named() -> None:
    text = SCHEMA["properties"]["next_id"]["description"]
    assert all(f"{letter} ({name})" in text for name, letter in ID_LETTERS.items())


def test_records_are_described_where_they_say_something() -> None:
    assert SCHEMA["$defs"]["Lease"]["description"].startswith("A lease over all units")
    assert "description" not in SCHEMA["$defs"]["Purchase"]


def test_an_unknown_key_breaks_it_anywhere() -> None:
    raw = fullest_raw()
    raw["spaces"][0]["leases"][0]["rent"]["each"] = 1
    assert not VALIDATOR.is_valid(raw)
