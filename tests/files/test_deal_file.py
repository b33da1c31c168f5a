"""The deal file: what is written is read again, and what cannot be read says why."""

import json
import random
from dataclasses import fields
from pathlib import Path
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.fullest import DIGEST, FULLEST, choices, fullest, kinds, small, small_raw
from workbench.deal.changes import set_value
from workbench.deal.deal import Deal
from workbench.deal.inputs import DAYS, Leaf, leaves
from workbench.files.deal_file import (
    deal_from_raw,
    deal_from_text,
    deal_to_raw,
    deal_to_text,
    read_deal,
    write_deal,
)
from workbench.files.faults import UnreadableError
from workbench.places import sample_deals

SAMPLE = next(sample_deals().glob("quillon*.deal")).read_text(encoding="utf-8")


def refused(text: str) -> list[str]:
    with pytest.raises(UnreadableError) as caught:
        deal_from_text(text)
    return [str(fault) for fault in caught.value.faults]


@pytest.mark.parametrize("deal", [Deal(), small(), fullest()], ids=["empty", "small", "fullest"])
def test_a_deal_comes_back_from_its_file(tmp_path: Path, deal: Deal) -> None:
    path = tmp_path / "my.deal"
    write_deal(path, deal)
    assert read_deal(path) == deal
    assert path.read_text(encoding="utf-8") == deal_to_text(deal)


def test_every_input_is_written() -> None:
    """So that a later version's other default cannot change an old deal's figures."""
    raw = deal_to_raw(Deal())
    assert list(raw) == [spec.name for spec in fields(Deal)]
    assert raw["leave"]["method"] == "forward_noi"
    assert raw["earn"]["growth"] == {"1": 0.0}
    assert raw["purchase"]["price"] is None


def test_the_text_is_plain_and_ends_its_last_line() -> None:
    text = deal_to_text(fullest())
    assert text.startswith('{\n  "schema": 1,\n  "next_id": 40,\n')
    assert text.endswith("}\n")
    assert '"closing_date": "2027-01-01"' in text
    assert text.rindex('"pictures"') > text.rindex('"drafts"')


def test_text_of_any_script_stands_as_it_is() -> None:
    name = 'Ωμέγα Жуков 日本 🏠 <b> \\ " \x7f \u2028'
    text = deal_to_text(set_value(small(), "property.name", name))
    assert "Ωμέγα Жуков 日本 🏠 <b>" in text
    assert deal_from_text(text).property.name == name


def test_whole_numbers_may_stand_for_money() -> None:
    deal = deal_from_raw(small_raw())
    assert deal.purchase.price == 900_000
    assert isinstance(deal.purchase.price, float)


@pytest.mark.parametrize(
    ("data", "said"),
    [
        (b"", "this is not a deal: it is empty"),
        (b"\x00\xff\xfe\x80", "this is not a deal: it is not UTF-8 text"),
        (json.dumps(FULLEST).encode("utf-16"), "this is not a deal: it is not UTF-8 text"),
        (b"\x00\x00\x00", "line 1, column 1: this is not JSON: expecting value"),
        (b"[]", "a deal is a JSON object in braces"),
        (b'"schema"', "a deal is a JSON object in braces"),
        (b"{}", "schema: the version of the schema is needed here; it must be 1"),
    ],
)
def test_what_is_no_deal(tmp_path: Path, data: bytes, said: str) -> None:
    path = tmp_path / "my.deal"
    path.write_bytes(data)
    with pytest.raises(UnreadableError) as caught:
        read_deal(path)
    assert str(caught.value) == said


def test_a_mark_of_byte_order_does_not_hurt(tmp_path: Path) -> None:
    """Some editors put one before the text."""
    path = tmp_path / "my.deal"
    path.write_bytes(b"\xef\xbb\xbf" + json.dumps(FULLEST).encode())
    assert read_deal(path) == fullest()


@pytest.mark.parametrize(
    ("name", "said"),
    [
        ("nothing.deal", "no such file or directory"),
        ("", "is a directory"),
        ("file/x.deal", "not a directory"),
        ("x" * 300, "file name too long"),
    ],
)
def test_a_file_that_is_not_there(tmp_path: Path, name: str, said: str) -> None:
    (tmp_path / "file").write_bytes(b"")
    with pytest.raises(UnreadableError) as caught:
        read_deal(tmp_path / name)
    assert str(caught.value) == said


def test_a_newer_deal_is_refused_with_words() -> None:
    (said,) = refused('{"schema": 2, "more": []}')
    assert said.startswith("schema: this deal was written by a newer program (schema 2;")


def test_ids_and_spellings_are_refused_together() -> None:
    raw = small_raw()
    raw["spaces"][0]["id"] = "x2"
    raw["earn"]["vacancy"]["02"] = 0.05
    assert refused(json.dumps(raw)) == [
        'earn.vacancy: "02" is not a deal year, a whole number from 1, like 1 or 12',
        "spaces@x2: an id here is the letter s and a number from 1",
        "expenses@x2: this id stands twice; each item has its own",
    ]


@pytest.mark.parametrize(
    "key", ["tax", "owners", "answers", "seals", "re_letting", "recoveries", "sizing"]
)
def test_what_a_later_version_holds_is_an_unknown_key(key: str) -> None:
    assert refused(json.dumps({**small_raw(), key: {}})) == [
        f"{key}: a deal has no such key; check its spelling against the schema"
    ]


def test_a_value_out_of_range_still_opens() -> None:
    raw = small_raw()
    raw["leave"]["hold"] = -5
    assert deal_from_raw(raw).leave.hold == -5


def test_reading_does_not_change_what_it_is_given() -> None:
    raw = small_raw()
    deal_from_raw(raw)
    assert raw == small_raw()


# Properties


def valid(leaf: Leaf) -> st.SearchStrategy[Any]:
    """Values that the declaration of an input allows."""
    mark = leaf.input
    if leaf.path == "conventions.currency":
        return st.text("ABCXYZ", min_size=3, max_size=3)
    if choices(leaf.field):
        return st.sampled_from(choices(leaf.field))
    if mark.unit == "switch":
        return st.booleans()
    if mark.unit == "date":
        return st.dates(*DAYS)
    if mark.low is None or mark.high is None:
        return st.text(st.characters(exclude_categories=["Cs"]), max_size=40)
    if int in kinds(leaf.field):
        return st.integers(int(mark.low), int(mark.high))
    number = st.floats(mark.low, mark.high)
    if not leaf.field.is_row:
        return number
    more = st.dictionaries(st.integers(2, 41), number, max_size=3)
    return st.builds(lambda first, rest: {1: first, **rest}, number, more)


INPUTS = list(leaves(fullest()))


@settings(deadline=None)
@given(st.data())
def test_random_changes_come_back_from_the_file(data: st.DataObject) -> None:
    deal = fullest()
    for leaf in data.draw(st.lists(st.sampled_from(INPUTS), min_size=1, max_size=8)):
        deal = set_value(deal, leaf.path, data.draw(valid(leaf), label=leaf.path))
    text = deal_to_text(deal)
    again = deal_from_text(text)
    assert again == deal
    assert deal_to_text(again) == text


@pytest.mark.parametrize("leaf", INPUTS, ids=lambda leaf: leaf.path)
def test_each_input_comes_back_from_the_file(leaf: Leaf) -> None:
    """A value other than the one it has, for every input by itself."""
    deal = fullest()
    changed = set_value(deal, leaf.path, other_value(leaf, random.Random(leaf.path)))
    assert changed != deal
    assert deal_from_text(deal_to_text(changed)) == changed


def other_value(leaf: Leaf, rng: random.Random) -> Any:
    mark, words = leaf.input, choices(leaf.field)
    if words:
        return rng.choice([word for word in words if word != leaf.value])
    if mark.unit == "switch":
        return not leaf.value
    if mark.unit == "date":
        return DAYS[0].replace(year=rng.randrange(1000, 3000))
    if mark.low is None or mark.high is None:
        return f"other {rng.random()}"
    if int in kinds(leaf.field):
        return rng.randint(int(mark.low), int(mark.high))
    number = mark.low + (mark.high - mark.low) * rng.random()
    return {1: number, 7: mark.low} if leaf.field.is_row else number


@settings(deadline=None)
@given(st.binary(max_size=200))
def test_random_bytes_are_read_or_refused(data: bytes) -> None:
    try:
        deal_from_text(data.decode("utf-8", errors="surrogateescape"))
    except UnreadableError as error:
        assert str(error)


@settings(deadline=None)
@given(st.data())
def test_a_sample_with_random_damage_is_read_or_refused(data: st.DataObject) -> None:
    """Pieces cut out, doubled, put in; whatever is read can be written and read again."""
    text = SAMPLE
    for _ in range(data.draw(st.integers(1, 4))):
        start = data.draw(st.integers(0, len(text)))
        end = min(len(text), start + data.draw(st.integers(0, 30)))
        piece = data.draw(
            st.sampled_from(
                ["", text[start:end] * 2, "9", '"', "}", ",", "null", "1e999", "-", "\\"]
            )
        )
        text = text[:start] + piece + text[end:]
    survives(text)


SCALARS = st.none() | st.booleans() | st.integers() | st.floats() | st.text(max_size=6)


@settings(deadline=None)
@given(st.data())
def test_a_sample_with_random_values_is_read_or_refused(data: st.DataObject) -> None:
    raw = json.loads(SAMPLE)
    for _ in range(data.draw(st.integers(1, 3))):
        here: Any = raw
        while True:
            keys = list(here) if isinstance(here, dict) else list(range(len(here)))
            if not keys:
                break
            key = data.draw(st.sampled_from(keys))
            if isinstance(here[key], dict | list) and data.draw(st.booleans()):
                here = here[key]
                continue
            other = st.lists(SCALARS, max_size=2) | st.dictionaries(st.text(max_size=3), SCALARS)
            here[key] = data.draw(SCALARS | other)
            break
    survives(json.dumps(raw))


def survives(text: str) -> None:
    try:
        deal = deal_from_text(text)
    except UnreadableError as error:
        assert error.faults
        return
    assert deal_from_text(deal_to_text(deal)) == deal


def test_the_picture_of_the_fullest_deal_is_held_once() -> None:
    assert deal_to_text(fullest()).count(DIGEST) == 2  # where it is shown, and where it is held
