"""Lines of text."""

from itertools import pairwise

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from workbench.charts.lettering import width
from workbench.charts.wrapping import Run, length, wrap, wrap_runs, wrap_short

TEXT = "The rents of the next few years can be checked against leases"


def test_breaks_at_spaces_and_fills_each_line() -> None:
    lines = wrap(TEXT, 10, 120)
    assert " ".join(lines) == TEXT
    assert len(lines) > 1
    for line, following in pairwise(lines):
        assert width(line, 10) <= 120
        assert width(f"{line} {following.split()[0]}", 10) > 120


def test_line_breaks_are_kept_and_spaces_collapse() -> None:
    assert wrap("one  two\n\nthree", 10, 500) == ("one two", "", "three")
    assert wrap("", 10, 500) == ("",)
    assert wrap(" led", 10, 500) == ("led",)


def test_a_word_that_is_too_long_is_cut() -> None:
    lines = wrap(f"so {'W' * 50} end", 10, 100)
    assert lines[0] == "so"
    assert "".join(lines[1:]) == "W" * 50 + " end"
    assert all(width(line, 10) <= 100 for line in lines)


def test_even_a_letter_wider_than_the_room_is_set() -> None:
    assert wrap("WW", 10, 1) == ("W", "W")


def test_a_no_break_space_does_not_break() -> None:
    assert wrap("12\u00a0345 USD", 10, width("12\u00a0345 US", 10)) == ("12\u00a0345", "USD")


def test_runs_keep_their_weight_and_are_not_torn_from_their_punctuation() -> None:
    runs = (Run("It is worth "), Run("3,807,783", "bold"), Run(", no."))
    assert wrap_runs(runs, 10, 500) == (runs,)
    room = length(runs[:2], 10)
    first, second = wrap_runs(runs, 10, room + 0.1)
    assert first == (Run("It is worth"),)
    assert second == (Run("3,807,783", "bold"), Run(", no."))


def test_shortened_lines_say_that_there_is_more() -> None:
    assert wrap_short("one two", 10, 500, 1) == ("one two",)
    first, second = wrap_short(TEXT, 10, 100, 2)
    assert first == wrap(TEXT, 10, 100)[0]
    assert second.endswith("…")
    assert width(second, 10) <= 100
    assert wrap_short("one\ntwo", 10, 500, 1) == ("one two…",)


@settings(deadline=None)
@given(st.text(alphabet="ab W\n,", max_size=60), st.floats(15, 120))
def test_no_line_is_too_long_and_no_letter_is_lost(text: str, room: float) -> None:
    lines = wrap(text, 10, room)
    assert all(width(line, 10) <= room + 1e-9 for line in lines)
    assert "".join("".join(lines).split()) == "".join(text.split())


@pytest.mark.parametrize("weight", ["regular", "bold"])
def test_the_length_of_a_line_is_the_sum_of_its_runs(weight: str) -> None:
    assert length((Run("a"), Run("b")), 10) == pytest.approx(width("ab", 10))
