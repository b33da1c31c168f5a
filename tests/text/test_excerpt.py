"""A person's own text within a sentence."""

import unicodedata

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.text.excerpt import excerpt


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("", ""),
        ("Quince Lane", "Quince Lane"),
        ("  two\n\nlines\tand\u2028more  ", "two lines and more"),
        ("red \x1b[31m ink\x00\x7f", "red [31m ink"),
        ("half \ud800 a character", "half \ufffd a character"),
        ("no\u00a0break", "no break"),
        ("Ωμέγα 🏠 <b>&", "Ωμέγα 🏠 <b>&"),
        ("x" * 60, "x" * 60),
        ("x" * 61, "x" * 59 + "…"),
        (" " * 100 + "late", "late"),
    ],
)
def test_excerpt(text: str, shown: str) -> None:
    assert excerpt(text) == shown


def test_the_length_may_be_chosen() -> None:
    assert excerpt("x" * 11, 10) == "x" * 9 + "…"


def test_a_very_long_text_is_not_read_to_its_end() -> None:
    assert excerpt("\n" * 10_000 + "end") == ""


@settings(deadline=None)
@given(st.text(st.characters(), max_size=200), st.integers(2, 50))
def test_nothing_in_it_steers_a_terminal(text: str, most: int) -> None:
    shown = excerpt(text, most)
    assert len(shown) <= most
    assert not {unicodedata.category(one) for one in shown} & {"Cc", "Cs", "Zl", "Zp"}
