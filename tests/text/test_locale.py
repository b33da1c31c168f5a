"""Locales; the marks are those of the Unicode CLDR, release 47."""

import pytest

from workbench.text.locale import LOCALES, find_locale
from workbench.text.numbers import number, percent


@pytest.mark.parametrize(
    ("code", "expected"),
    [
        ("en-US", "1,234,567.89"),
        ("en-GB", "1,234,567.89"),
        ("en-IN", "12,34,567.89"),
        ("de-DE", "1.234.567,89"),
        ("fr-FR", "1\u202f234\u202f567,89"),
        ("es-ES", "1.234.567,89"),
        ("it-IT", "1.234.567,89"),
        ("nl-NL", "1.234.567,89"),
        ("el-GR", "1.234.567,89"),
        ("pl-PL", "1\u00a0234\u00a0567,89"),
        ("sv-SE", "1\u00a0234\u00a0567,89"),
        ("pt-BR", "1.234.567,89"),
        ("ja-JP", "1,234,567.89"),
    ],
)
def test_numbers_of_each_locale(code: str, expected: str) -> None:
    assert number(1234567.89, LOCALES[code], 2) == expected


def test_every_locale_was_looked_at() -> None:
    assert len(LOCALES) == 13


@pytest.mark.parametrize(
    ("code", "expected"),
    [("en-US", "53.5%"), ("de-DE", "53,5\u00a0%"), ("sv-SE", "53,5\u00a0%"), ("it-IT", "53,5%")],
)
def test_percent_spacing(code: str, expected: str) -> None:
    assert percent(0.535, LOCALES[code]) == expected


@pytest.mark.parametrize("written", ["de-DE", "de_DE", "DE-de"])
def test_finding_a_locale_in_any_spelling(written: str) -> None:
    assert find_locale(written) is LOCALES["de-DE"]


def test_an_unknown_locale_is_none() -> None:
    assert find_locale("tlh") is None
