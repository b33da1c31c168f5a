"""JSON as a deal file takes it: nothing doubtful gets through, and every fault has its place."""

import json
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.files.faults import UnreadableError
from workbench.files.strict_json import DEEPEST, parse, read_json, unfit


def refused(text: str) -> list[str]:
    with pytest.raises(UnreadableError) as caught:
        parse(text)
    return [str(fault) for fault in caught.value.faults]


@pytest.mark.parametrize(
    ("text", "value"),
    [
        ('{"a": [1, 2.5, true, null, "Ω"]}', {"a": [1, 2.5, True, None, "Ω"]}),
        ("5", 5),
        ('"\\ud83d\\ude00"', "😀"),
        ("  [ ]\n", []),
        ("-0.5e-3", -0.0005),
        ("9" * 300, int("9" * 300)),
    ],
)
def test_json_is_read(text: str, value: Any) -> None:
    assert parse(text) == value


@pytest.mark.parametrize(("text", "kind"), [("10", int), ("10.0", float), ("1e3", float)])
def test_a_number_stays_as_it_is_written(text: str, kind: type) -> None:
    assert type(parse(text)) is kind


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("", "this is not a deal: it is empty"),
        (" \n\t", "this is not a deal: it is empty"),
        ('{"a": 1', "line 1, column 8: this is not JSON: expecting ',' delimiter"),
        ('{\n "a": x}', "line 2, column 7: this is not JSON: expecting value"),
        ("{'a': 1}", "line 1, column 2: this is not JSON: expecting property name enclosed"),
        ('{"a": 1}]', "line 1, column 9: this is not JSON: extra data"),
        ('{"a": "\x01"}', "line 1, column 8: this is not JSON: invalid control character"),
        ("[" * 100_000, "this is not a deal: it is nested too deep"),
    ],
)
def test_what_is_not_json_says_where(text: str, said: str) -> None:
    (fault,) = refused(text)
    assert fault.startswith(said)


@pytest.mark.parametrize("number", ["NaN", "Infinity", "-Infinity", "1e400", "-1e400", "9" * 301])
def test_a_number_that_cannot_be_held_is_named_with_place_and_range(number: str) -> None:
    shown = number if len(number) < 60 else number[:59] + "…"
    said = f"{shown} is not a number that a deal can hold"
    assert refused(f'{{"leave": {{"hold": {number}}}}}') == [
        f"leave.hold: {said}; it must be from 1 to 40"
    ]
    assert refused(f"[{number}]") == [f"[1]: {said}"]
    assert refused(number) == [said]


def test_a_number_of_thousands_of_digits_is_no_bug() -> None:
    """Python itself refuses to read more than 4,300 digits."""
    assert "is not a number that a deal can hold" in refused("9" * 5000)[0]
    assert "is not a number that a deal can hold" in refused("9" * 5000 + ".5")[0]


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ('{"a": 1, "a": 2}', "the key “a” stands twice here; keep one of them"),
        (
            '{"earn": {"vacancy": {"1": 0.1, "1": 0.2}}}',
            "earn.vacancy: the key “1” stands twice here; keep one of them",
        ),
        (
            '{"spaces": [{"id": "s1"}, {"id": "s2", "id": "s2"}]}',
            "spaces[2]: the key “id” stands twice here; keep one of them",
        ),
        (
            '{"spaces": [{"id": "s1", "market_rent": {"per": "year", "per": "month"}}]}',
            "spaces@s1.market_rent: the key “per” stands twice here; keep one of them",
        ),
    ],
)
def test_a_key_stands_once(text: str, said: str) -> None:
    assert refused(text) == [said]


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ('{"property": {"name": "\\ud800"}}', "property.name: this text holds half a character"),
        ('{"property": {"\\udfff": 1}}', "property: a key here holds half a character"),
        ('{"\\ud800": 1}', "a key here holds half a character"),
        ('["\\ud83d \\ude00"]', "[1]: this text holds half a character"),
    ],
)
def test_half_a_character_cannot_be_held(text: str, said: str) -> None:
    (fault,) = refused(text)
    assert fault == f"{said}, which no file can hold"


def nested(levels: int, opening: str = "[", closing: str = "]") -> str:
    return opening * levels + "0" + closing * levels


def test_depth_is_bounded() -> None:
    assert parse(nested(DEEPEST))
    assert refused(nested(DEEPEST + 1)) == ["[1][1][1]: this is nested too deep"]
    assert refused(nested(DEEPEST + 1, '{"a":', "}")) == ["a.a.a: this is nested too deep"]


def test_all_faults_are_named_at_once() -> None:
    text = '{"a": NaN, "b": {"c": 1, "c": 2}, "d": ["\\ud800"]}'
    assert [fault.partition(":")[0] for fault in refused(text)] == ["a", "b", "d[1]"]


def test_reading_alone_leaves_marks_for_later() -> None:
    raw = read_json('{"a": NaN, "b": 1}')
    assert raw["b"] == 1
    assert [fault.place for fault in unfit(raw)] == ["a"]
    assert list(unfit({"a": [1, "b", None]})) == []


PLAIN = st.recursive(
    st.none() | st.booleans() | st.integers(-(10**14), 10**14) | st.text(max_size=5),
    lambda inner: st.lists(inner, max_size=3) | st.dictionaries(st.text(max_size=3), inner),
    max_leaves=20,
)


@settings(deadline=None)
@given(PLAIN)
def test_plain_data_comes_back(raw: Any) -> None:
    assert parse(json.dumps(raw)) == raw


@settings(deadline=None)
@given(st.text(max_size=60))
def test_any_text_is_read_or_refused(text: str) -> None:
    try:
        parse(text)
    except UnreadableError as error:
        assert error.faults
        assert all(fault.sentence for fault in error.faults)
