"""Widths of text and marks for what the font lacks."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from reportlab.pdfbase import pdfmetrics, ttfonts

from workbench.charts.font_table import FACES
from workbench.charts.lettering import MARK, Weight, face, lacking, printable, shorten, width
from workbench.places import resources

SAMPLES = [
    "Value 3,807,783",
    "−1 234,50 € · 53,5 %",
    "Ωμέγα Άνω",
    "Жуков и Щука",
    "fi ffi AV To",
    "",
]


@pytest.mark.parametrize("weight", ["regular", "bold", "italic"])
@pytest.mark.parametrize("text", SAMPLES)
def test_widths_are_those_of_the_pdf_library(text: str, weight: Weight) -> None:
    """Against reportlab's stringWidth with the same font files."""
    name = FACES[weight].removesuffix(".ttf")
    pdfmetrics.registerFont(ttfonts.TTFont(name, str(resources() / "fonts" / FACES[weight])))
    assert width(text, 11, weight) == pytest.approx(pdfmetrics.stringWidth(text, name, 11))


def test_digits_are_tabular() -> None:
    assert len({width(digit, 10) for digit in "0123456789"}) == 1


def test_an_unknown_character_is_as_wide_as_the_mark() -> None:
    assert width("日", 10) == width(MARK, 10) > 0


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("plain", "plain"),
        ("日本 🏠", "□□ □"),
        ("a\tb\rc", "a b c"),
        ("a\nb", "a\nb"),
        ("a\u3000b\u2028c", "a b c"),
        ("a\u200bb\u00adc\ufe0fd\ufeffe", "abcde"),
        ("\x00\x07", "□□"),
        ("\ud800", "□"),
        ("a\u0308", "ä"),
        ("5\u00a0%\u202f", "5\u00a0%\u202f"),
    ],
)
def test_what_is_printed(text: str, shown: str) -> None:
    assert printable(text) == shown


def test_what_is_lacking_is_listed_once_in_order() -> None:
    assert lacking("a 🏠 日 🏠 Ω □ \n \x00") == ("🏠", "日", "\x00")
    assert lacking("Only letters, Ωμέγα, Жуков — and 1,234 €.") == ()


@settings(deadline=None)
@given(st.text())
def test_only_known_characters_are_printed(text: str) -> None:
    known = face("regular").widths
    assert all(character in known or character == "\n" for character in printable(text))


def test_shortening() -> None:
    assert shorten("short", 10, 100) == "short"
    cut = shorten("a rather long name of a place", 10, 60)
    assert cut.endswith("…")
    assert width(cut, 10) <= 60
    assert width(cut + "rr", 10) > 60
    assert shorten("anything", 10, 1) == "…"


@settings(deadline=None)
@given(st.text(max_size=80), st.floats(20, 200))
def test_a_shortened_text_fits(text: str, room: float) -> None:
    assert width(shorten(text, 10, room, "bold"), 10, "bold") <= room
