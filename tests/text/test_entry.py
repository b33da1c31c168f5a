"""What is typed where a number is wanted."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.text.entry import NotTaken, Taken, parse_number
from workbench.text.locale import LOCALES

US, DE, FR, IN, SE = (LOCALES[code] for code in ("en-US", "de-DE", "fr-FR", "en-IN", "sv-SE"))


def reason(text: str, code: str = "en-US") -> str:
    read = parse_number(text, LOCALES[code])
    assert isinstance(read, NotTaken), f"{text!r} was read as {read}"
    return read.reason


@pytest.mark.parametrize(
    ("text", "value"),
    [
        ("4.5", 4.5),
        ("4.5%", 0.045),
        ("4.5 %", 0.045),
        ("7.15%", 0.0715),
        ("1.2m", 1_200_000.0),
        ("1.2 M", 1_200_000.0),
        ("350k", 350_000.0),
        ("1bn", 1e9),
        ("2tn", 2e12),
        ("12*950", 11_400.0),
        ("12 × 950", 11_400.0),
        ("(500)", -500.0),
        ("(4.5)%", -0.045),
        ("(500+20)", 520.0),
        ("2*(3+4)", 14.0),
        ("-5", -5.0),
        ("−5", -5.0),
        ("--5", 5.0),
        ("+5", 5.0),
        ("2-3-4", -5.0),
        ("100/8/2", 6.25),
        ("2+3*4", 14.0),
        ("0.1+0.2", 0.3),
        (".5", 0.5),
        ("5.", 5.0),
        ("1,234,567.5", 1_234_567.5),
        ("1.2E+06", 1_200_000.0),
        ("1e-3", 0.001),
        ("  7  ", 7.0),
        ("7\u00a0%", 0.07),
        ("-0", 0.0),
    ],
)
def test_entries_that_are_read(text: str, value: float) -> None:
    read = parse_number(text, US)
    assert read == Taken(value)
    assert str(value) == str(read.value)


@pytest.mark.parametrize(
    ("text", "value"),
    [("4.5", 0.045), ("4.5%", 0.045), ("2*3", 0.06), ("(1)", -0.01), ("10%*0.5", 0.05)],
)
def test_a_bare_number_in_a_percent_field_is_a_percentage(text: str, value: float) -> None:
    assert parse_number(text, US, percent=True) == Taken(value)


def test_marks_of_other_locales() -> None:
    assert parse_number("1.234,5", DE) == Taken(1234.5)
    assert parse_number("1 234,5", FR) == Taken(1234.5)
    assert parse_number("1\u202f234 * 2", FR) == Taken(2468.0)
    assert parse_number("12\u202f%", FR) == Taken(0.12)
    assert parse_number("1\u00a0234", SE) == Taken(1234.0)
    assert parse_number("12,34,567", IN) == Taken(1234567.0)


@pytest.mark.parametrize(
    ("text", "code"),
    [
        ("1,5", "en-US"),
        ("1.5", "de-DE"),
        ("1,2345", "en-US"),
        ("1234,567", "en-US"),
        ("123,456", "en-IN"),
        ("12 34", "fr-FR"),
    ],
)
def test_a_group_mark_in_the_wrong_place_is_explained(text: str, code: str) -> None:
    assert "does not separate thousands" in reason(text, code)
    assert f"“{LOCALES[code].decimal}”" in reason(text, code)


@pytest.mark.parametrize("text", ["1.2.3", "1.234,5", "1,200,"])
def test_a_mark_too_many(text: str) -> None:
    assert "a mark too many" in reason(text)


@pytest.mark.parametrize(
    ("text", "words"),
    [
        ("", "Nothing was entered"),
        ("   ", "Nothing was entered"),
        ("abc", "“a” is not part of a number"),
        ("5x", "“x” is not part of a number"),
        ("1.2mm", "“m” is not part of a number"),
        (".", "“.” is not part of a number"),
        ("$5", "“$” is not part of a number"),
        ("٣", "“٣” is not part of a number"),
        ("5 5", "“5” is not expected there"),
        ("5)", "“)” is not expected there"),
        ("(5", "A parenthesis is not closed"),
        ("12*", "ends where a number is expected"),
        ("*5", "A number is expected before “*”"),
        ("()", "A number is expected before “)”"),
        ("1/0", "divides by zero"),
        ("0/0", "divides by zero"),
        ("1e999", "too large"),
        ("-1e9999", "too large"),
        ("1" * 101, "at most 100 characters"),
    ],
)
def test_entries_that_are_refused_with_a_reason(text: str, words: str) -> None:
    assert words in reason(text)


def test_a_value_beside_text_at_the_deepest_nesting() -> None:
    assert parse_number("(" * 49 + "1" + ")" * 49, US) == Taken(1.0)


@settings(deadline=None)
@given(st.text(alphabet="0123456789.,()+-*/%kmbnte −×", max_size=30))
def test_no_entry_raises(text: str) -> None:
    for code in ("en-US", "fr-FR"):
        read = parse_number(text, LOCALES[code])
        assert isinstance(read, Taken | NotTaken)


@settings(deadline=None)
@given(st.text(max_size=120))
def test_no_text_raises(text: str) -> None:
    assert isinstance(parse_number(text, DE, percent=True), Taken | NotTaken)
